"""The cavities of a ring and the field of a cathode, as one writes them; limits that lack what they need."""

import pytest

from beamfield.beam.rf import Rf
from tests.describe.ring_case import BUNCH, case, fault

TUNE = "  tune: {x: 4.2, y: 4.3}\n"
RF = (TUNE, TUNE + "  rf: {voltage: 8 kV, harmonic: 2, transition_gamma: 4.1}\n")


def test_read():
    assert case(RF).ring.rf == Rf(8e3, 2, 4.1)
    assert case().ring.rf is None


def test_field_of_a_cathode():
    read = case(text=BUNCH + "surroundings: {cathode: {at: 20 mm, field: 40 MV/m}}\n")
    assert read.surroundings.cathode_field == 40e6


@pytest.mark.parametrize(
    ("old", "new", "said"),
    [
        ("8 kV", "8", "ring.rf.voltage"),
        ("8 kV", "-8 kV", "ring.rf.voltage"),
        ("harmonic: 2", "harmonic: 2.5", "ring.rf.harmonic"),
        (", transition_gamma: 4.1", "", "transition_gamma"),
        ("harmonic", "harmonik", "did you mean"),
    ],
)
def test_faults(old, new, said):
    assert said in fault((RF[0], RF[1].replace(old, new)))


@pytest.mark.parametrize(
    ("limit", "needs"),
    [
        ("synchrotron_tune_shift > -0.1", "ring.rf"),
        ("limiting_current > 1 A", "surroundings.chamber"),
        ("cathode_charge_limit > 1 nC", "surroundings.cathode.field"),
        ("impedance_threshold > 1 ohm", "bunch.momentum_spread"),
    ],
)
def test_limits_that_lack_something(limit, needs):
    ring = "ring: {circumference: 50 m, tune: {x: 4.2, y: 4.3}}\n"
    rf = (
        ring.replace("}}", "}, rf: {voltage: 8 kV, harmonic: 2, transition_gamma: 4.1}}") if "rf" not in needs else ring
    )
    assert needs in fault(text=BUNCH + rf + f'limits: ["{limit}"]\n')
