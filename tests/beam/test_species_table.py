"""Named species against the masses CODATA prints, and their charges against the textbook."""

import subprocess
import sys

import pytest

from beamfield.beam.species_table import NAMES, isotope, named
from beamfield.constants import ATOMIC_MASS, ELEMENTARY_CHARGE
from tests.reference.codata_2022_masses import RELATIVE_MASSES, REST_ENERGIES
from tests.reference.ion_masses import BEAM_IONS, CARBON_IONS

CHARGES = {
    **dict.fromkeys(("positron", "proton", "muon+", "deuteron", "triton"), 1),
    **dict.fromkeys(("electron", "antiproton", "muon-", "H-", "D-"), -1),
    **dict.fromkeys(("helion", "alpha"), 2),
}
CODATA_UNIT = 4e-10  # relative uncertainty of the kilogram in MeV and in u, CODATA 2022


def rest_energy(species):
    """Rest energy [MeV]."""
    return species.rest_energy / ELEMENTARY_CHARGE / 1e6


@pytest.mark.parametrize("name", REST_ENERGIES)
def test_masses(name):
    """Published: rest energies of CODATA 2022, which follow from other measurements than the kilograms used here."""
    assert rest_energy(named(name)) == pytest.approx(REST_ENERGIES[name], rel=CODATA_UNIT)


def test_every_name_has_its_charge():
    """Textbook: charges in units of e; every name is tried."""
    assert {name: round(named(name).charge_state, 12) for name in NAMES} == CHARGES


@pytest.mark.parametrize("matter, antimatter", [("electron", "positron"), ("proton", "antiproton"), ("muon-", "muon+")])
def test_antiparticles(matter, antimatter):
    """Symmetry: same mass, opposite charge."""
    assert named(matter).mass == named(antimatter).mass
    assert named(matter).charge == -named(antimatter).charge


def test_nucleons():
    """Textbook: energies per nucleon make sense for nuclei, not for leptons."""
    assert [named(name).nucleons for name in ("electron", "muon+", "proton", "H-", "D-", "helion", "alpha")] == [
        None, None, 1, 1, 2, 3, 4,
    ]  # fmt: skip


@pytest.mark.parametrize("symbol, name", [("p", "proton"), ("e-", "electron"), ("antimuon", "muon+"), ("H+", "proton")])
def test_symbols(symbol, name):
    """A symbol is the same species as its name."""
    assert named(symbol) == named(name)


@pytest.mark.parametrize("word", ["protons", "muon", "", "Proton", 7, None])
def test_unknown_word(word):
    """A word that is no name is a KeyError."""
    with pytest.raises(KeyError):
        named(word)


@pytest.mark.parametrize("ion", RELATIVE_MASSES)
def test_bare_nuclei(ion):
    """Published: CODATA 2022 relative masses of bare nuclei; here atoms less electrons, their binding given back."""
    atomic_mass_evaluation = 1e-10
    assert isotope(*ion).mass / ATOMIC_MASS == pytest.approx(RELATIVE_MASSES[ion], rel=atomic_mass_evaluation)


@pytest.mark.parametrize("ion", CARBON_IONS)
def test_carbon_ions(ion):
    """From memory of weighings in traps: carbon weighs 12 u by definition, so only electrons and binding are tested."""
    two_mev_of_binding = 2e-12
    assert isotope(*ion).mass / ATOMIC_MASS == pytest.approx(CARBON_IONS[ion], abs=two_mev_of_binding)


@pytest.mark.parametrize("ion", BEAM_IONS)
def test_beam_ions(ion):
    """From memory of design reports, to the six digits they give."""
    printed_digits = 5e-6
    assert rest_energy(isotope(*ion)) / 1e3 == pytest.approx(BEAM_IONS[ion], rel=printed_digits)


def test_negative_hydrogen_by_two_roads():
    """Symmetry: proton with two bound electrons, or hydrogen atom with one too many, whose affinity is neglected."""
    affinity = 1e-9
    assert isotope("H-1", -1).mass == pytest.approx(named("H-").mass, rel=affinity, abs=0.0)
    assert isotope("H-2", -1).mass == pytest.approx(named("D-").mass, rel=affinity, abs=0.0)


def test_an_ion_is_named_and_counted():
    """Ours: what a page prints about an ion."""
    ion = isotope("40Ar", 8)
    assert (ion.name, ion.nucleons, round(ion.charge_state, 12)) == ("Ar-40 8+", 40, 8)
    assert isotope("H-1", -1).name == "H-1 1-"


def test_species_load_without_numpy():
    """The door stays light: names and ions need no array library."""
    code = "import sys, beamfield.beam.species_table as t; t.isotope('U-238', 28); sys.exit('numpy' in sys.modules)"
    assert subprocess.run([sys.executable, "-c", code], check=False).returncode == 0
