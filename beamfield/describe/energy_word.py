"""Energy words -> beta gamma, each by the road that keeps its digits."""

from beamfield.constants import SPEED_OF_LIGHT
from beamfield.describe import units
from beamfield.describe.nearest import excerpt
from beamfield.errors import InputError
from beamfield.laws import kinematics

_PER_NUCLEON = units.unit("eV/u").dimension
_MOMENTUM = units.unit("eV/c").dimension


def beta_gamma(quantity, species):
    """Momentum over m c of one particle of the species [1]; InputError for an energy that it cannot have."""
    if quantity.unit_text.startswith("meV"):
        raise InputError(f"{excerpt(quantity.text)}: m is milli, and no beam is that slow; did you mean 'MeV'?")
    return float(_road(quantity)(quantity, species))


def _road(quantity):
    if quantity.head:
        return {"gamma": _from_gamma, "rigidity": _from_rigidity}[quantity.head]
    if quantity.unit.dimension == _MOMENTUM:
        return _from_momentum
    return _from_kinetic if "kinetic" in quantity.words else _from_total


def _positive(value, quantity):
    if not value > 0.0:
        raise InputError(f"{excerpt(quantity.text)}: a beam moves; write a value above zero")
    return value


def _from_gamma(quantity, _):
    if not quantity.si > 1.0:
        raise InputError(f"{excerpt(quantity.text)}: gamma is above 1 for whatever moves")
    return kinematics.beta_gamma_from_gamma(quantity.si)


def _from_rigidity(quantity, species):
    return kinematics.beta_gamma_from_rigidity(_positive(quantity.si, quantity), species.charge, species.mass)


def _from_momentum(quantity, species):
    return kinematics.beta_gamma_from_momentum(_positive(quantity.si, quantity) * SPEED_OF_LIGHT, species.rest_energy)


def _from_kinetic(quantity, species):
    return kinematics.beta_gamma_from_kinetic(_positive(_energy(quantity, species), quantity), species.rest_energy)


def _from_total(quantity, species):
    total = _energy(quantity, species)
    if not total > species.rest_energy:
        rest = units.unit("MeV").count(species.rest_energy)
        raise InputError(
            f"{excerpt(quantity.text)} is not above the rest energy of {species.name}, {rest:.6g} MeV; "
            "write a larger total energy, or the kinetic one"
        )
    return kinematics.beta_gamma_from_total(total, species.rest_energy)


def _energy(quantity, species):
    """Energy of one particle [J]."""
    if quantity.unit.dimension != _PER_NUCLEON:
        return quantity.si
    if species.nucleons is None:
        raise InputError(
            f"{excerpt(quantity.text)}: {species.name} has no nucleons to share an energy; write it in "
            f"{quantity.unit_text.removesuffix('/u')}"
        )
    return quantity.si * species.nucleons
