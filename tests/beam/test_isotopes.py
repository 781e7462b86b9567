"""Tables of atoms: whole, in order, and refused with a way out."""

from itertools import pairwise

import pytest

from beamfield.beam.isotopes import _energies, _masses, atomic_mass, ion_mass, split_name
from beamfield.constants import ATOMIC_MASS
from beamfield.errors import NonsenseError
from tests.reference.ion_masses import binding_of_all_electrons


def test_carbon_twelve():
    """Closed form: the unit is defined by it."""
    assert atomic_mass("C", 12) == 12.0


def test_every_atom_weighs_its_mass_number():
    """Textbook: the binding of nuclei moves a mass by less than 0.8 % of a mass number and hydrogen's excess."""
    excess = [abs(mass / number - 1.0) for known in _masses().values() for number, mass in known.items() if number > 4]
    assert len(excess) > 3000
    assert max(excess) < 0.008


def test_every_element_has_masses_and_all_its_electrons():
    """Textbook: hydrogen to lawrencium, one energy per electron, each harder to take off than the last."""
    assert list(_masses()) == list(_energies())
    assert [len(energies) for energies in _energies().values()] == list(range(1, 104))
    assert all(first <= second for energies in _energies().values() for first, second in pairwise(energies))


@pytest.mark.parametrize("element", ["Sn", "Xe", "Au", "Pb", "U"])
def test_binding_of_all_electrons(element):
    """Published: the fit of Lunney, Pearson and Thibault."""
    energies = _energies()[element]
    fit = 2e-3
    assert sum(energies) == pytest.approx(binding_of_all_electrons(len(energies)), rel=fit)


def test_each_electron_taken_off_makes_an_ion_lighter():
    """Limit: every ionisation energy is far below an electron's rest energy."""
    masses = [ion_mass("U", 238, state) for state in (-1, *range(1, 93))]
    assert all(light < heavy for heavy, light in pairwise(masses))
    assert masses[-1] < 238.0507870 * ATOMIC_MASS


@pytest.mark.parametrize("word", ["Ar-40", "Ar40", "40Ar", "40-Ar", "ar-40", " Ar-40 "])
def test_ways_to_write_it(word):
    """The trade writes an isotope in several ways; all are read."""
    assert split_name(word) == ("Ar", 40)


@pytest.mark.parametrize(
    "word", ["argon", "Ar", "40", "Ar-40.5", "Ar--40", "Ar-4000", "", "Ar-40 8+", "\u0664Ar", None]
)
def test_other_words_are_refused(word):
    """Whatever is no isotope says how to write one."""
    with pytest.raises(NonsenseError, match="such as 'Ar-40'"):
        split_name(word)


@pytest.mark.parametrize(
    "element, number, state, way_out",
    [
        ("Ar", 99, 8, "near it are .*Ar-53, Ar-54"),
        ("He", 5, 2, "He-3, He-4, He-6, He-8"),
        ("Uu", 238, 1, "called 'Uu'; did you mean 'U'?"),
        ("Qq", 238, 1, "called 'Qq'; give the symbol"),
        ("Og", 294, 1, "from hydrogen to lawrencium"),
        ("Ar", 40, 19, "from 1 to 18"),
        ("Ar", 40, 0, "from 1 to 18"),
        ("Ar", 40, -2, "or -1"),
        ("Ar", 40, 1.5, "whole number"),
        ("Ar", 40, float("nan"), "whole number"),
        ("Ar", 40, "8", "whole number"),
    ],
)
def test_no_such_ion(element, number, state, way_out):
    """What does not exist is refused with what does."""
    with pytest.raises(NonsenseError, match=way_out):
        ion_mass(element, number, state)
