"""The bunch in a line or two, in the words of the trade."""

from math import isinf

from beamfield.constants import ELEMENTARY_CHARGE
from beamfield.laws.kinematics import kinetic_energy
from beamfield.report.human import brief


def bunch_lines(bunch):
    """What it is and how big: two lines."""
    return [" · ".join(filter(None, parts)) for parts in (_what(bunch), _size(bunch))]


def _what(bunch):
    return bunch.species.name, _energy(bunch), _count(bunch), bunch.shape.name if bunch.shape else "given particles"


def _size(bunch):
    x, y, z = (brief(size, "m") for size in bunch.sigma)
    size = f"{x} × {y} rms, no ends" if isinf(bunch.sigma[2]) else f"{x} × {y} × {z} rms"
    spread = f"momentum spread {brief(bunch.momentum_spread)} rms" if bunch.momentum_spread else None
    return size, _emittance(bunch), spread


def _energy(bunch):
    kinetic = kinetic_energy(bunch.beta_gamma, bunch.species.rest_energy) / ELEMENTARY_CHARGE
    nucleons = bunch.species.nucleons or 1
    return f"{brief(kinetic / nucleons, 'eV')}{'/u' if nucleons > 1 else ''} kinetic"


def _count(bunch):
    if bunch.particles is None:
        return f"{brief(bunch.line_density)} particles per metre"
    return f"{brief(bunch.particles)} particles ({brief(bunch.charge, 'C')})"


def _emittance(bunch):
    if bunch.emittance is None:
        return None
    x, y = (brief(bunch.beta_gamma * emittance, "m") for emittance in bunch.emittance)
    return f"emittance {x} × {y} normalised rms"
