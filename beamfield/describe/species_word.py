"""The species of a case: a name, an isotope with a charge state, or a mass with one."""

from beamfield.beam import species_table
from beamfield.beam.species import Species
from beamfield.constants import ATOMIC_MASS, ELEMENTARY_CHARGE
from beamfield.describe.nearest import excerpt, hint
from beamfield.describe.tree import Mapping
from beamfield.errors import InputError

KEY = "bunch.species"


def species(reading):
    """Species that the reading describes, or None where a fault has been said."""
    if isinstance(reading.nodes.get(KEY), Mapping):
        return _described(reading)
    return reading.attempt(KEY, _named, reading.word(KEY))


def _named(word):
    try:
        return species_table.named(word)
    except KeyError:
        pass
    names = ", ".join(species_table.NAMES)
    ways = f"; choose from {names}, {{isotope: Ar-40, charge_state: 8}}, {{mass: 938.272 MeV/c2, charge_state: 1}}"
    raise InputError(f"{excerpt(word)} is no species here{hint(word, species_table.NAMES) or ways}")


def _described(reading):
    isotope, mass = f"{KEY}.isotope" in reading, f"{KEY}.mass" in reading
    if isotope == mass:
        return reading.fault(KEY, "takes either an isotope or a mass, such as {isotope: Ar-40, charge_state: 8}")
    if f"{KEY}.charge_state" not in reading:
        return reading.fault(f"{KEY}.charge_state", "is missing; write 'charge_state: 1', the charge of one in e")
    state = reading.word(f"{KEY}.charge_state")
    if isotope:
        return reading.attempt(f"{KEY}.isotope", species_table.isotope, reading.word(f"{KEY}.isotope"), state)
    return reading.attempt(f"{KEY}.charge_state", _of_mass, _mass(reading), state, reading.text(f"{KEY}.mass"))


def _mass(reading):
    """Mass [kg]."""
    quantity = reading.quantity(f"{KEY}.mass")
    if quantity is None:
        return None
    return reading.within(f"{KEY}.mass", quantity.si * (ATOMIC_MASS if quantity.unit_text == "u" else 1.0))


def _of_mass(mass, state, text):
    if state == 0:
        raise InputError("'0': a neutral particle has no field; write its charge in elementary charges")
    return Species(f"mass {text}, charge {state:+d} e", mass, state * ELEMENTARY_CHARGE)
