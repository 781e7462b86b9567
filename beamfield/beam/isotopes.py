"""Atoms by name, and what is left of them when electrons are taken off: the mass of an ion.

The two tables beside this file name their sources; they are read when the first ion is asked for.
"""

import re
from functools import cache
from pathlib import Path

from beamfield.constants import ATOMIC_MASS, ELECTRON_MASS, ELEMENTARY_CHARGE, SPEED_OF_LIGHT
from beamfield.errors import NonsenseError, did_you_mean

_NAME = re.compile(r"([A-Za-z]{1,2})-?([0-9]{1,3})|([0-9]{1,3})-?([A-Za-z]{1,2})")


def split_name(word):
    """Element and mass number of an isotope, ('Ar', 40) for 'Ar-40', 'Ar40' or '40Ar'; NonsenseError for any other."""
    found = _NAME.fullmatch(str(word).strip())
    if not found:
        raise NonsenseError(f"'{word}' is no isotope; write the element and the mass number, such as 'Ar-40' or '40Ar'")
    return (found[1] or found[4]).capitalize(), int(found[2] or found[3])


def atomic_mass(element, mass_number):
    """Mass of the neutral atom [u]; NonsenseError, with what there is instead, where the table has none."""
    known = _masses().get(element)
    if known is None:
        raise NonsenseError(_no_element(element))
    if mass_number not in known:
        raise NonsenseError(_no_isotope(element, mass_number, sorted(known)))
    return known[mass_number]


def ion_mass(element, mass_number, charge_state):
    """Mass of an ion at rest.

        m = m_atom - n m_e + (sum of the first n ionisation energies) / c^2

    element, mass_number  of a neutral atom in the table
    charge_state          n, electrons taken off; -1 for one too many, its affinity (below 4 eV) neglected  [1]

    returns               m                                                                                 [kg]
    Raises NonsenseError for an atom not in the table and for a charge state that it does not have.
    Source: energy conservation; atomic masses and ionisation energies as cited in their tables.
    """
    mass = atomic_mass(element, mass_number) * ATOMIC_MASS
    energies = _energies()[element]
    if charge_state == 0 or charge_state not in range(-1, len(energies) + 1):
        raise NonsenseError(_no_charge_state(element, charge_state, len(energies)))
    binding = sum(energies[: int(max(charge_state, 0))]) * ELEMENTARY_CHARGE / SPEED_OF_LIGHT**2
    return mass - charge_state * ELECTRON_MASS + binding


def _no_charge_state(element, charge_state, bare):
    return f"no ion of {element} has charge state {charge_state}; give a whole number from 1 to {bare} (bare), or -1"


def _no_element(element):
    hint = did_you_mean(element, _masses()) or "; give the symbol, such as 'Ar' for argon"
    return f"no element from hydrogen to lawrencium is called '{element}'{hint}"


def _no_isotope(element, mass_number, known):
    near = sorted(sorted(known, key=lambda number: abs(number - mass_number))[:6])
    names = ", ".join(f"{element}-{number}" for number in near)
    return (
        f"no {element}-{mass_number} that lives 1 us or longer is known; near it are {names} "
        f"({element}-{known[0]} to {element}-{known[-1]} in all); or give mass and charge_state instead"
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
