"""Trains and other bunches in words: what becomes of them, and what is said of those that cannot be."""

import pytest

from beamfield.beam.encounter import Encounter
from beamfield.beam.shape import Shape
from beamfield.beam.species_table import isotope, named
from beamfield.beam.train import Train
from beamfield.constants import SPEED_OF_LIGHT
from tests.describe.ring_case import BUNCH, case, fault, faults

OTHER = """\
other_bunch:
  species: positron
  energy: gamma 30
  intensity: 2 nC
  shape: gaussian
  size: {x: 1 mm rms, y: 2 mm fwhm, z: 3 mm rms}
  direction: opposing
  offset: {x: 0.1 mm}
  beta: {x: 0.8 m, y: 40 mm}
"""
BOTH = BUNCH + OTHER
ROUNDING = 4e-16


def train(words):
    return BUNCH + f"  train: {words}\n"


def test_train_in_metres_and_in_seconds():
    assert case(text=train("{count: 5, spacing: 3 cm}")).surroundings.train == Train(5, 0.03, 3)
    timed = case(text=train("{count: 4, spacing: 1 ns, place: 1}"))
    assert timed.surroundings.train.place == 1
    assert timed.surroundings.train.spacing == pytest.approx(1e-9 * timed.bunch.beta * SPEED_OF_LIGHT, rel=ROUNDING)


def test_other_bunch():
    encounter = case(text=BOTH).surroundings.encounter
    assert isinstance(encounter, Encounter)
    assert (encounter.opposing, encounter.offset, encounter.beta) == (True, (1e-4, 0.0, 0.0), (0.8, 0.04))
    assert encounter.other.species == named("positron")
    assert encounter.other.sigma[1] == pytest.approx(2e-3 / 2.3548200450309493, rel=1e-15)
    assert case(text=BOTH).bunch == case(text=BUNCH).bunch


def test_other_bunch_of_another_kind():
    changes = (
        ("species: positron", "species: {isotope: Ar-40, charge_state: 8}"),
        ("energy: gamma 30", "energy: 10 MeV/u kinetic"),
        ("2 nC", "2 mA mean\n  repetition: 10 MHz"),
        (
            "shape: gaussian\n  size: {x: 1 mm rms, y: 2",
            "shape: {transverse: kv, longitudinal: parabolic}\n  size: {x: 1 mm rms, y: 2",
        ),
        ("opposing", "same"),
    )
    encounter = case(*changes, text=BOTH).surroundings.encounter
    assert encounter.other.species == isotope("Ar-40", 8)
    assert encounter.other.shape == Shape("kv", "parabolic")
    assert not encounter.opposing


def test_without_company():
    assert (case(text=BUNCH).surroundings.train, case(text=BUNCH).surroundings.encounter) == (None, None)


@pytest.mark.parametrize(
    ("words", "said"),
    [
        ("{count: 5}", "bunch.train.spacing: is missing; write one such as 'spacing: 3 ns'"),
        ("{count: 5, spacing: 3}", "bunch.train.spacing: '3' has no unit; write '3 m' or '3 ns'"),
        ("{count: 5, spacing: 3 ns rms}", "bunch.train.spacing: '3 ns rms': 'rms' does not go with a distance"),
        ("{count: 5, spacing: -3 ns}", "bunch.train.spacing: '-3 ns' is outside what is allowed: at least 1e-09 m"),
        ("{count: 0, spacing: 3 m}", "bunch.train.count: '0' is outside what is allowed: at least 1, at most 1000"),
        ("{count: 2, spacing: 3 m, place: 3}", "bunch.train: a train of 2 has no bunch number 3"),
        ("{count: 2, spacing: 3 m, gap: 1 m}", "bunch.train: 'gap' is no key of 'bunch.train'"),
        ("{count: 2, spacing: 3 mm}", "bunch.train.spacing: bunches overlap: one is 0.004 m long (twice 2 rms)"),
    ],
)
def test_no_train(words, said):
    assert f": {said}" in fault(text=train(words))


def test_a_train_in_a_ring():
    held = ("momentum_spread: 1.5e-3 rms", "momentum_spread: 1.5e-3 rms\n  train: {count: 3, spacing: 90 m}")
    lines = faults(held, ("120 ns", "20 ns"))
    assert [line.split(": ", 1)[1] for line in lines] == [
        "bunch.train.count: the train has 3 bunches, ring.bunches says 1",
        "bunch.train.spacing: the train does not fit in the ring of 158 m",
    ]
    coasting = ("shape: gaussian", "shape: {transverse: kv, longitudinal: coasting}"), (", z: 120 ns rms", "")
    assert fault(held, *coasting).endswith("bunch.train: a coasting beam is not bunched; leave it out")


@pytest.mark.parametrize(
    ("change", "said"),
    [
        (("  direction: opposing\n", ""), "8:3: other_bunch.direction: is missing"),
        (("direction: opposing", "direction: oposing"), "other_bunch.direction: 'oposing' is not known here; did you"),
        (("energy: gamma 30", "energy: 30 MeV"), "9:11: other_bunch.energy: '30 MeV' does not say what it measures"),
        (("species: positron", "species: positrn"), "other_bunch.species: 'positrn' is no species here"),
        (("2 mm fwhm", "2 mm full"), "12:26: other_bunch.size.y: '2 mm full': a gaussian profile has no edge"),
        (
            ("intensity: 2 nC", "intensity: 2 mA mean"),
            "other_bunch.intensity: '2 mA mean': the mean current of bunches",
        ),
        (("y: 40 mm}", "y: 0 mm}"), "other_bunch.beta.y: '0 mm' is outside what is allowed: at least 1e-06 m"),
        ((", y: 40 mm}", "}"), "other_bunch.beta.y: is missing"),
        (("x: 0.1 mm", "x: 0.1"), "other_bunch.offset.x: '0.1' has no unit"),
        (
            ("  direction", "  emittance: {x: 1 um normalised rms}\n  direction"),
            "'emittance' is no key of 'other_bunch'",
        ),
        (("gamma 30", "gamma 0.5"), "other_bunch.energy: 'gamma 0.5': gamma is above 1"),
    ],
)
def test_no_other_bunch(change, said):
    assert said in fault(change, text=BOTH)


def test_an_other_bunch_is_a_bunch_of_given_size():
    shape = "shape: gaussian\n  size: {x: 1 mm rms, y: 2 mm fwhm, z: 3 mm rms}"
    assert "'coasting' is not known here" in fault(
        (shape, shape.replace("gaussian", "{transverse: gaussian, longitudinal: coasting}")), text=BOTH
    )
    lines = faults((shape, shape.replace("gaussian", "{particles: a.csv}")), text=BOTH)
    assert any("'particles' is no key of 'other_bunch.shape'" in line for line in lines)
    assert "other_bunch.size.z: is missing" in fault((", z: 3 mm rms", ""), text=BOTH)


@pytest.mark.parametrize(
    ("limit", "text", "said"),
    [
        ("train_field_z < 1 V/m", BUNCH, "train_field_z needs bunch.train, of two at least"),
        ("encounter_gradient_x < 1 V/m2", BUNCH, "needs another bunch; add the section 'other_bunch'"),
        ("encounter_focusing_x < 1 1/m", BOTH.replace("opposing", "same"), "needs an opposing bunch"),
        ("encounter_kick_x < 1 rad", BOTH.replace("  offset: {x: 0.1 mm}\n", ""), "needs a bunch that passes aside"),
        (
            "|beam_beam_tune_shift_y| < 1",
            BOTH.replace("  beta: {x: 0.8 m, y: 40 mm}\n", ""),
            "add other_bunch.beta, or",
        ),
    ],
)
def test_limits_on_what_is_not_there(limit, text, said):
    assert said in fault(text=text + f'limits: ["{limit}"]\n')


def test_limits_are_silent_where_a_section_has_faults():
    broken = BOTH.replace("gamma 30", "30 MeV") + 'limits: ["encounter_gradient_x < 1 V/m2"]\n'
    assert "other_bunch.energy" in fault(text=broken)
