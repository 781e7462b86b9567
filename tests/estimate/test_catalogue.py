"""The catalogue: whole, in order and readable."""

import pytest

from beamfield.estimate.catalogue import CATALOGUE, QUESTIONS

UNITS = {
    "1",
    "C",
    "A",
    "m",
    "V",
    "ohm",
    "deg",
    "1/m",
    "1/m2",
    "V/m",
    "V/m2",
    "T m",
    "eV/c",
    "eV/m",
    "eV",
    "rad",
    "rad/m",
}
NEEDS = {"bunch", "ring", "emittance", "walls", "density", "train", "encounter", "opposing", "aside", "beta"}
NEEDS |= {"momentum_spread", "rf", "chamber", "chamber or ends", "chamber or slopes", "cathode"}
FIRST = [
    *("gamma", "beta", "momentum", "rigidity", "particles", "bunch_charge", "peak_current", "peak_line_density"),
    *("bunching_factor", "perveance", "field_gradient_x", "field_gradient_y", "field_gradient_z"),
    *("peak_field_x", "peak_field_y", "peak_field_z", "defocusing_x", "defocusing_y", "defocusing_z"),
    *("peak_kick_x", "peak_kick_y", "peak_energy_change_z", "plasma_wavelength", "space_charge_ratio_x"),
    *("space_charge_ratio_y", "tune_shift_x", "tune_shift_y", "memory_length_transverse", "memory_length_longitudinal"),
]


def test_promised_results():
    """Interface: the results that every version has, in the order of the questions."""
    assert set(FIRST) <= set(CATALOGUE)
    order = [list(QUESTIONS).index(entry.question) for entry in CATALOGUE.values()]
    assert order == sorted(order)


@pytest.mark.parametrize("name", CATALOGUE)
def test_entry(name):
    """Interface: a name, a unit, a sentence, a formula, a domain and a source each."""
    entry = CATALOGUE[name]
    assert entry.name == name == name.lower()
    assert entry.unit in UNITS
    assert entry.definition.endswith(".")
    assert all(text.strip() and "{" not in text for text in (entry.formula, entry.domain, entry.source))


def test_results_without_a_bunch():
    """Interface: what is along the bunch is absent of a coasting beam, what a ring or an emittance gives needs one."""
    assert all("bunch" in entry.needs for name, entry in CATALOGUE.items() if name.endswith("_z"))
    assert all("ring" in CATALOGUE[name].needs for name in ("bunching_factor", "tune_shift_x", "tune_shift_y"))
    assert all("emittance" in CATALOGUE[f"space_charge_ratio_{axis}"].needs for axis in "xy")
    assert all(set(entry.needs) <= NEEDS for entry in CATALOGUE.values())
