"""Particles from counts, charges and currents: I = q N / T, with the time that the words name."""

import pytest

from beamfield.beam.shape import SHAPES
from beamfield.constants import ELEMENTARY_CHARGE as E
from tests.describe.ring_case import BUNCH, case, fault

ROUNDING = 1e-15
COASTING = ("shape: gaussian", "shape: {transverse: kv, longitudinal: coasting}"), (", z: 120 ns rms", "")


def bunch(intensity, *changes, **source):
    return case(("3.5e12 particles", intensity), *changes, **source).bunch


@pytest.mark.parametrize("intensity", ["0.56 uC", "-0.56 uC"])
def test_the_magnitude_of_a_charge_counts(intensity):
    assert bunch(intensity).particles == pytest.approx(0.56e-6 / E, rel=ROUNDING)
    assert bunch(intensity, ("proton", "H-")).charge == pytest.approx(-0.56e-6, rel=ROUNDING)


def test_an_ion_carries_several_charges():
    ion = bunch("0.56 uC", ("proton", "{isotope: Ar-40, charge_state: 8}"), ("120 ns", "300 ns"))
    assert ion.particles == pytest.approx(0.56e-6 / (8 * E), rel=ROUNDING)


def test_peak_current():
    """Of a Gaussian: I = q N v / (sqrt(2 pi) sigma_z), with sigma_z = v sigma_t, so N = I sqrt(2 pi) sigma_t / q."""
    assert bunch("2 A peak").particles == pytest.approx(2.0 * 2.5066282746310002 * 120e-9 / E, rel=ROUNDING)


def test_peak_current_of_a_uniform_line():
    """I = q N / (full length in time)."""
    changes = ("shape: gaussian", "shape: uniform-cylinder"), ("120 ns rms", "400 ns full")
    assert bunch("2 A peak", *changes).particles == pytest.approx(2.0 * 400e-9 / E, rel=ROUNDING)


@pytest.mark.parametrize("bunches", [1, 2])
def test_mean_current_of_a_ring(bunches):
    """Each bunch passes once a turn: I = bunches q N v / C."""
    found = bunch("6 mA mean", ("bunches: 1", f"bunches: {bunches}"), ("120 ns rms", "60 ns rms"))
    assert found.particles * bunches * E * found.velocity / 158.0 == pytest.approx(6e-3, rel=ROUNDING)


def test_mean_current_of_a_line():
    """I = q N f."""
    text = BUNCH.replace("1 nC", "13 mA mean\n  repetition: 1.3 GHz")
    assert case(text=text).bunch.particles == pytest.approx(1e-11 / E, rel=ROUNDING)


@pytest.mark.parametrize("word", ["peak", "mean"])
def test_current_of_a_coasting_beam(word):
    found = bunch(f"6 mA {word}", *COASTING)
    assert found.line_density * E * found.velocity == pytest.approx(6e-3, rel=ROUNDING)
    assert found.particles == pytest.approx(found.line_density * 158.0, rel=ROUNDING)


def test_a_coasting_beam_of_unknown_length():
    shape = ("shape: gaussian", "shape: {transverse: gaussian, longitudinal: coasting}")
    found = case(shape, ("1 nC", "2 A mean"), (", z: 1 mm rms", ""), text=BUNCH).bunch
    assert found.particles is None
    assert found.line_density * E * found.velocity == pytest.approx(2.0, rel=ROUNDING)


def test_a_coasting_beam_counted_without_a_ring():
    shape = ("shape: gaussian", "shape: {transverse: gaussian, longitudinal: coasting}")
    line = fault(shape, (", z: 1 mm rms", ""), text=BUNCH)
    said = "of a coasting beam this is what a ring holds; add ring, or write a current"
    assert line == f"ring.yaml:4:14: bunch.intensity: '1 nC': {said}"


def test_mean_current_needs_a_rate():
    assert "only with ring, or with bunch.repetition" in fault(("1 nC", "1 mA mean"), text=BUNCH)


def test_a_rate_beside_a_ring_contradicts():
    line = fault(("intensity: 3.5e12 particles", "intensity: 6 mA mean\n  repetition: 1 MHz"))
    assert line == "ring.yaml:6:15: bunch.repetition: the ring already says how often a bunch passes; leave it out"


def test_a_rate_that_nobody_needs():
    found = case(("1 nC", "1 nC\n  repetition: 1 kHz"), text=BUNCH)
    assert found.warnings == ("bunch.repetition: is not needed: only a mean current uses it",)


def test_the_peak_of_a_particle_file(tmp_path):
    (tmp_path / "macro.csv").write_text("x,y,z\n1,1,1\n-1,-1,-1\n")
    size = "  size: {x: 1 mm rms, y: 1 mm rms, z: 1 mm rms}\n"
    changes = ("shape: gaussian", "shape: {particles: macro.csv}"), (size, ""), ("1 nC", "1 A peak")
    assert "the peak of a particle file is not known beforehand" in fault(*changes, text=BUNCH, folder=tmp_path)


@pytest.mark.parametrize("intensity", ["0 particles", "-3e11 particles", "0 nC", "0 A peak"])
def test_nothing_is_no_beam(intensity):
    assert "a beam has an intensity above zero" in fault(("3.5e12 particles", intensity))


@pytest.mark.parametrize("intensity", ["1e15 particles", "1 C", "0.5 particles"])
def test_more_than_any_bunch_and_less_than_one_particle(intensity):
    line = fault(("3.5e12 particles", intensity))
    assert "at least 1 particles, below 1e+15 particles (several times what any machine has held in one bunch)" in line


def test_more_than_any_ring_holds():
    assert "1e+17 round a ring" in fault(("3.5e12 particles", "2e17 particles"), *COASTING)
    assert case(("3.5e12 particles", "1e15 particles"), *COASTING).bunch.particles == pytest.approx(1e15, rel=ROUNDING)


@pytest.mark.parametrize("shape", [name for name, shape in SHAPES.items() if shape.edge(2)])
def test_peak_current_comes_back(shape):
    """q lambda_peak v of what was read is the current that was written."""
    found = bunch("2 A peak", ("shape: gaussian", f"shape: {shape}"))
    current = E * found.particles * found.shape.peak_line_density / found.sigma[2] * found.velocity
    assert current == pytest.approx(2.0, rel=ROUNDING)
