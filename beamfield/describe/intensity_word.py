"""Intensity words -> particles in a bunch, or particles per metre of a coasting beam."""

from dataclasses import dataclass

from beamfield.describe import units
from beamfield.describe.nearest import excerpt
from beamfield.errors import InputError

_COUNT, _CHARGE = units.unit("particles").dimension, units.unit("C").dimension
_MOST_COASTING = 1e17  # particles round a ring
_DENSEST_COASTING = 1e15  # particles per metre


@dataclass(frozen=True, slots=True)
class Filling:
    """What turns an intensity into particles.

    charge            of one particle, absolute                       [C]
    velocity                                                          [m/s]
    peak_line_density of one particle, None of a particle file        [1/m]
    circumference     None without a ring                             [m]
    passing           bunches that pass a place per second, or None   [Hz]
    """

    charge: float
    velocity: float
    peak_line_density: float | None
    circumference: float | None
    passing: float | None


def particles(quantity, filling):
    """Particles in one bunch; InputError where the case does not say enough."""
    amount = _positive(quantity)
    if quantity.unit.dimension == _COUNT:
        return amount
    if quantity.unit.dimension == _CHARGE:
        return amount / filling.charge
    return _from_peak(quantity, filling) if "peak" in quantity.words else _from_mean(quantity, filling)


def line_density(quantity, filling):
    """Particles per metre of a coasting beam [1/m]; InputError where the case does not say enough."""
    amount = _positive(quantity)
    if quantity.unit.dimension in (_COUNT, _CHARGE):
        count = particles(quantity, filling)
        if filling.circumference is None:
            raise InputError(
                f"{excerpt(quantity.text)}: of a coasting beam this is what a ring holds; add ring, or write a current"
            )
        return _sparse(count / filling.circumference, quantity, filling.circumference)
    return _sparse(amount / (filling.charge * filling.velocity), quantity, filling.circumference)


def _positive(quantity):
    """Magnitude of a charge or current; a count is positive."""
    amount = quantity.si if quantity.unit.dimension == _COUNT else abs(quantity.si)
    if not amount > 0.0:
        raise InputError(f"{excerpt(quantity.text)}: a beam has an intensity above zero")
    return amount


def _from_peak(quantity, filling):
    if filling.peak_line_density is None:
        raise InputError(
            f"{excerpt(quantity.text)}: the peak of a particle file is not known beforehand; "
            "write a charge or a count of particles"
        )
    return _positive(quantity) / (filling.charge * filling.velocity * filling.peak_line_density)


def _from_mean(quantity, filling):
    if filling.passing is None:
        raise InputError(
            f"{excerpt(quantity.text)}: the mean current of bunches says how many they hold only with ring, "
            "or with bunch.repetition, such as 'repetition: 162.5 MHz'"
        )
    return _positive(quantity) / (filling.charge * filling.passing)


def _sparse(density, quantity, circumference):
    """The line density itself, unless no ring holds such a beam."""
    if not density < _DENSEST_COASTING or density * (circumference or 0.0) > _MOST_COASTING:
        raise InputError(
            f"{excerpt(quantity.text)} comes to {density:.3g} particles a metre; at most {_DENSEST_COASTING:g}, and "
            f"{_MOST_COASTING:g} round a ring, far above what any machine has held"
        )
    return density
