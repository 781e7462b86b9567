"""Emittances, and the sizes x and y: as given, or from emittance and optics."""

from math import hypot, sqrt

from beamfield.beam.particles import MacroParticles
from beamfield.describe import emittance_word, size_word

AXES = "xy"
_EMITTANCE, _SIZE = "bunch.emittance", "bunch.size"


def emittance(reading, form, beta_gamma):
    """Geometric rms emittances (x, y) [m rad]; None without any or where a fault has been said."""
    given = [axis for axis in AXES if f"{_EMITTANCE}.{axis}" in reading]
    for axis in AXES:
        if given and axis not in given:
            reading.fault(f"{_EMITTANCE}.{axis}", "is missing; the emittances x and y come together")
    pair = tuple(_one_emittance(reading, f"{_EMITTANCE}.{axis}", form, beta_gamma) for axis in given)
    return None if len(pair) < 2 or None in pair else pair


def _one_emittance(reading, key, form, beta_gamma):
    quantity = reading.quantity(key)
    if form is None or quantity is None or beta_gamma is None:
        return None
    shape = None if isinstance(form, MacroParticles) else form
    return reading.within(key, reading.attempt(key, emittance_word.geometric_rms, quantity, shape, beta_gamma))


def sizes(reading, shape, emittances, spread, ring, beamline):
    """Rms sizes [x, y] [m], None in place of one that the case does not say."""
    return [_size(reading, axis, shape, emittances, spread, ring, beamline) for axis in range(2)]


def _size(reading, axis, shape, emittances, spread, ring, beamline):
    key = f"{_SIZE}.{AXES[axis]}"
    if key in reading:
        return reading.within(key, reading.attempt(key, size_word.rms_size, reading.quantity(key), shape, axis))
    if f"{_EMITTANCE}.{AXES[axis]}" not in reading:
        return reading.fault(
            key, f"is missing; write '{AXES[axis]}: 6.1 mm rms', or an emittance where optics are known"
        )
    optics = _optics(reading, axis, ring, beamline)
    if optics is None or emittances is None:
        return None
    beta, dispersion = optics
    return reading.within(key, hypot(sqrt(emittances[axis] * beta), dispersion * (spread or 0.0)))


def _optics(reading, axis, ring, beamline):
    """Ring-mean beta and rms dispersion [m], else the beta at the start of the beamline; else None, with a fault."""
    if "ring" in reading:
        return ring and _mean_optics(ring.optics, axis)
    beta = beamline and beamline.start and beamline.start.beta[axis]
    if beta:
        return beta, 0.0
    key = f"beamline.start.beta_{AXES[axis]}"
    if "beamline" not in reading or key not in reading:
        reading.fault(
            f"{_SIZE}.{AXES[axis]}", "is missing, and an emittance says a size only with ring or beamline.start.beta"
        )
    return None


def _mean_optics(optics, axis):
    beta = optics.weights @ (optics.beta_x, optics.beta_y)[axis]
    return float(beta), 0.0 if axis else float(sqrt(optics.weights @ optics.dispersion_x**2))
