"""A case with every section, and how to change it, for the tests beside this file."""

from pathlib import Path

import pytest

from beamfield.describe.case import parse
from beamfield.errors import InputError

FILE = "ring.yaml"
TEXT = """\
title: Injection plateau, nominal fill
bunch:
  species: proton
  energy: 160 MeV kinetic
  intensity: 3.5e12 particles
  shape: gaussian
  size: {x: 6.1 mm rms, y: 4.9 mm rms, z: 120 ns rms}
  emittance: {x: 2.5 um normalised rms, y: 2.5 um normalised rms}
  momentum_spread: 1.5e-3 rms
surroundings:
  chamber: {shape: round, radius: 60 mm}
  poles: {half_gap: 70 mm}
  neutralisation: 0
ring:
  circumference: 158 m
  tune: {x: 4.2, y: 4.3}
  bunches: 1
  optics: {beta_x: 16 m, beta_y: 16 m, dispersion_x: 2.7 m}
beamline:
  start: {beta_x: 8 m, alpha_x: 0, beta_y: 6 m, alpha_y: 0}
  elements:
    - drift: {length: 0.5 m}
    - quadrupole: {length: 0.1 m, gradient: 12 T/m}
    - solenoid: {length: 0.2 m, field: 0.15 T}
    - gap: {voltage: 120 kV, frequency: 200 MHz, phase: -90 deg}
  repeat: 20
limits:
  - "|tune_shift_y| < 0.25"
  - "defocusing_x < 0.02 1/m2"
numerics: {charges_per_probe: 32768, macro_particles: 131072, seed: 1, method: superposition}
"""
BUNCH = """\
bunch:
  species: electron
  energy: gamma 20
  intensity: 1 nC
  shape: gaussian
  size: {x: 1 mm rms, y: 1 mm rms, z: 1 mm rms}
"""


def changed(*changes, text=TEXT):
    """The text with some parts replaced: pairs of old and new."""
    for old, new in changes:
        assert old in text, old
        text = text.replace(old, new)
    return text


def case(*changes, text=TEXT, folder=Path()):
    return parse(changed(*changes, text=text), FILE, folder)


def faults(*changes, text=TEXT, folder=Path()):
    """The faults of a changed case, each as the line a user sees."""
    with pytest.raises(InputError) as caught:
        case(*changes, text=text, folder=folder)
    return [str(fault) for fault in caught.value.faults]


def fault(*changes, text=TEXT, folder=Path()):
    """The one fault of a changed case."""
    (line,) = faults(*changes, text=text, folder=folder)
    return line


def complaints(function, *arguments):
    """The faults that a call ends with; none where it ends well. Any other exception passes."""
    try:
        function(*arguments)
    except InputError as error:
        return error.faults
    return ()
