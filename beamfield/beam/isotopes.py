"""Atoms by name, and what is left of them when electrons are taken off: the mass of an ion.

The two tables beside this file name their sources; they are read when the first ion is asked for.
"""

import re
from difflib import get_close_matches
from functools import cache
from pathlib import Path

from beamfield.constants import ATOMIC_MASS, ELECTRON_MASS, ELEMENTARY_CHARGE, SPEED_OF_LIGHT
from beamfield.errors import NonsenseError

_NAME = re.compile(
    r"(?P<element>[A-Z][a-z]?)-?(?P<number>\d{1,3})|(?P<number_first>\d{1,3})-?(?P<element_last>[A-Z][a-z]?)"
)


def split_name(word):
    """Element and mass number of an isotope: ('Ar', 40) for 'Ar-40', 'Ar40' or '40Ar'.

    Raises NonsenseError where the word is not of this form, or names no isotope of the table.
    """
    found = _NAME.fullmatch(str(word).strip())
    if not found:
        raise NonsenseError(
            f"'{word}' is not an isotope; write the element and the mass number, such as 'Ar-40' or '40Ar'"
        )
    element = found["element"] or found["element_last"]
    number = int(found["number"] or found["number_first"])
    atomic_mass(element, number)
    return element, number


def atomic_number(element):
    """Protons in the nucleus of an element: 18 for 'Ar'."""
    return len(ionisation_energies(element))


def atomic_mass(element, mass_number):
    """Mass of the neutral atom [u]; NonsenseError, with what there is instead, where the table has none."""
    known = _masses().get(element)
    if known is None:
        raise NonsenseError(_no_element(element))
    if mass_number not in known:
        raise NonsenseError(_no_isotope(element, mass_number, sorted(known)))
    return known[mass_number]


def ionisation_energies(element):
    """Energies that take one electron after another off the atom [eV], as many as it has electrons."""
    if element not in _energies():
        raise NonsenseError(_no_element(element))
    return _energies()[element]


def ion_mass(element, mass_number, charge_state):
    """Mass of an ion at rest.

        m = m_atom - n m_e + (sum of the first n ionisation energies) / c^2

    element, mass_number  of a neutral atom in the table
    charge_state          n, electrons taken off; -1 for one electron too many, whose affinity (below 4 eV) is neglected   [1]

    returns               m                                                                                              [kg]
    Raises NonsenseError for a charge state that the atom does not have.
    Source: energy conservation; atomic masses and ionisation energies as cited in their tables.
    """
    energies = ionisation_energies(element)
    _check_charge_state(element, charge_state, len(energies))
    binding = sum(energies[: max(charge_state, 0)]) * ELEMENTARY_CHARGE / SPEED_OF_LIGHT**2
    return atomic_mass(element, mass_number) * ATOMIC_MASS - charge_state * ELECTRON_MASS + binding


def _check_charge_state(element, charge_state, most):
    if charge_state != int(charge_state) or charge_state == 0 or charge_state < -1 or charge_state > most:
        raise NonsenseError(
            f"no ion of {element} has charge state {charge_state:g}; give a whole number from 1 to {most} (bare), or -1"
        )


def _no_element(element):
    close = get_close_matches(element, _masses(), n=3, cutoff=0.5)
    hint = f"did you mean {' or '.join(close)}?" if close else "give the symbol, such as 'Ar' for argon"
    return f"no element '{element}' from hydrogen to lawrencium; {hint}"


def _no_isotope(element, mass_number, known):
    near = sorted(sorted(known, key=lambda number: abs(number - mass_number))[:6])
    names = ", ".join(f"{element}-{number}" for number in near)
    return (
        f"no {element}-{mass_number} lives 1 us or longer; known near it: {names} (in all {known[0]} to {known[-1]}); "
        "give mass and charge_state instead"
    )


@cache
def _masses():
    table = {}
    for element, number, mass in _rows("atomic_masses.csv")[1:]:
        table.setdefault(element, {})[int(number)] = float(mass)
    return table


@cache
def _energies():
    return {element: tuple(map(float, energies)) for element, *energies in _rows("ionisation_energies.csv")}


def _rows(name):
    text = Path(__file__).with_name(name).read_text(encoding="utf-8")
    return [line.split(",") for line in text.splitlines() if not line.startswith("#")]
