"""E_z on the axis of a bunch, its slope and its potential, by both roads, with the wall of its chamber."""

from dataclasses import dataclass

import numpy as np

from beamfield.constants import COULOMB
from beamfield.estimate.density_source import COARSER, DensitySource, density_map
from beamfield.estimate.pipe_wall import DIGITS, wall_of
from beamfield.estimate.self_force import gradients
from beamfield.estimate.source import ROUNDING, asked, source_of
from beamfield.estimate.textbook import closed_axis_field, filling, rest_scales
from beamfield.laws import product
from beamfield.laws.ellipsoid import uniform_ellipsoid_potential
from beamfield.laws.parabolic import parabolic_ellipsoid_centre_potential

CLOSED = 1e-9  # relative, of a closed form that is an integral


@dataclass(frozen=True, slots=True)
class Both:
    """value and doubt; closed, the textbook value; method."""

    value: float
    doubt: float
    closed: float
    method: str

    def times(self, factor):
        return Both(self.value * factor, self.doubt * abs(factor), self.closed * factor, self.method)

    def plus(self, wall):
        """With what the wall adds, by the same law on both roads."""
        if wall is None:
            return self
        doubt = float(np.hypot(self.doubt, DIGITS * abs(wall)))
        return Both(self.value + wall, doubt, self.closed + wall, f"{self.method}, wall by closed form")


def centre_potential(bunch, surroundings, numerics):
    """phi of the centre against the wall, or far away [V]: Both."""
    wall = wall_of(bunch, surroundings)
    return _free_potential(bunch, numerics).plus(wall and wall.potential())


def centre_slope(bunch, surroundings, numerics):
    """dE_z/dz at the centre [V/m^2]: Both."""
    wall = wall_of(bunch, surroundings)
    values, doubts, closed, method = gradients(bunch, numerics)
    return Both(*(float(part[2]) for part in (values, doubts, closed)), method).plus(wall and wall.slope())


def closed_along(bunch, surroundings, places):
    """E_z (M,) [V/m] at places (M,) [m] on the axis by closed forms."""
    return closed_axis_field(bunch, 2, places) + _added(bunch, surroundings, places)


def asked_of_axis(bunch, surroundings, numerics, places, question):
    """question(E_z (M,) [V/m] at places (M,) [m] on the axis), a number: Both."""
    wall, added = surroundings.chamber is not None, _added(bunch, surroundings, places)
    closed = float(question(closed_axis_field(bunch, 2, places) + added))
    suffix = ", wall by closed form" if wall else ""
    if numerics.method == "closed-form":
        return Both(closed, max(CLOSED, DIGITS) * abs(closed), closed, f"closed form{suffix}")
    source = source_of(bunch, numerics)
    value, doubt = asked(source, lambda field: question(_along(field, places) + added))
    return Both(float(value), float(doubt) + DIGITS * abs(value), closed, f"{source.method}{suffix}")


def _added(bunch, surroundings, places):
    wall = wall_of(bunch, surroundings)
    return wall.field(places) if wall else np.zeros_like(places)


def _along(field, places):
    points = np.zeros((3, len(places)))
    points[2] = places
    return field(points)[2]


def _free_potential(bunch, numerics):
    closed = COULOMB * bunch.gamma * filling(bunch) * _closed_potential(bunch)
    if numerics.method == "closed-form":
        return Both(closed, CLOSED * abs(closed), closed, "closed form")
    source = DensitySource(bunch, numerics.charges_per_probe)
    centre = np.zeros((3, 1))
    value, other = (
        float(density_map(bunch, rule, centre)[3, 0]) for rule in (source.rule, source.rule.thinned(COARSER))
    )
    return Both(value, abs(other - value) + ROUNDING * abs(value), closed, source.method)


def _closed_potential(bunch):
    """phi [1/m] at the centre of a bunch of one unit, in its frame."""
    shape, scales = bunch.shape, rest_scales(bunch)
    if not shape.ellipsoid:
        return product.centre_potential(shape.transverse, scales[:2], shape.longitudinal, scales[2])
    if shape.transverse == "uniform":
        return float(uniform_ellipsoid_potential(np.zeros((3, 1)), scales)[0])
    return float(parabolic_ellipsoid_centre_potential(scales))
