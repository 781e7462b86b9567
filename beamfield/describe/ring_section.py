"""The section `ring` -> Ring."""

from dataclasses import replace

from beamfield.beam.rf import Rf
from beamfield.beam.ring import Optics, Ring
from beamfield.describe.file_word import read_optics
from beamfield.describe.tree import Mapping

_RESONANT = 1e-3  # a tune this close to a multiple of one half


def ring(reading, folder):
    """Ring that the reading describes; None without one or where a fault has been said."""
    if "ring" not in reading:
        return None
    circumference, bunches = reading.si("ring.circumference"), reading.word("ring.bunches", absent=1)
    tune = tuple(_tune(reading, f"ring.tune.{axis}") for axis in "xy")
    if None in tune or circumference is None or bunches is None:
        return None
    if "ring.optics" not in reading:
        return Ring.smooth(circumference, tune, bunches, _rf(reading))
    ring = reading.attempt("ring", Ring, circumference, tune, bunches, _optics(reading, circumference, folder))
    return ring and replace(ring, rf=_rf(reading))


def _rf(reading):
    if "ring.rf" not in reading:
        return None
    parts = reading.si("ring.rf.voltage"), reading.word("ring.rf.harmonic"), reading.si("ring.rf.transition_gamma")
    return reading.attempt("ring.rf", Rf, *parts)


def _tune(reading, key):
    tune = reading.si(key)
    if tune is not None and abs(2.0 * tune - round(2.0 * tune)) < 2.0 * _RESONANT:
        kind = "half-integer" if round(2.0 * tune) % 2 else "integer"
        reading.warn(key, f"{tune:g} is {kind}: no beam is stable on this resonance")
    return tune


def _optics(reading, circumference, folder):
    if not isinstance(reading.nodes.get("ring.optics"), Mapping):
        return reading.attempt("ring.optics", read_optics, reading.word("ring.optics"), folder, circumference)
    betas = (reading.si("ring.optics.beta_x"), reading.si("ring.optics.beta_y"))
    return reading.attempt("ring.optics", Optics.mean, *betas, reading.si("ring.optics.dispersion_x", absent=0.0))
