"""Units as users write them: 'mm', 'MeV/u', 'T m', '1/m2', with the prefixes of the trade.

A unit is a number times base units to integer powers. Two more bases than physics has, the radian and the nucleon,
keep apart what must not be mixed up: an angle and a ratio, an energy and an energy per nucleon.
"""

import re
from dataclasses import dataclass
from decimal import Decimal
from functools import lru_cache
from math import pi

from beamfield.constants import ELEMENTARY_CHARGE, SPEED_OF_LIGHT

PREFIXES = {"f": -15, "p": -12, "n": -9, "u": -6, "m": -3, "k": 3, "M": 6, "G": 9, "T": 12, "P": 15}
_SIGNS = str.maketrans(
    {"µ": "u", "μ": "u", "²": "2", "³": "3", "·": " ", "*": " ", "^": None, "\u03a9": "ohm", "\u2126": "ohm"}
)
_ATOM = re.compile(r"([A-Za-z%]+)([2-9]?)")


@dataclass(frozen=True, slots=True)
class Unit:
    """scale * 10**power times the base units to the powers in `dimension`: m, kg, s, A, rad, nucleon, particle."""

    scale: float
    power: int
    dimension: tuple[int, ...]

    def si(self, number):
        """A number of this unit in SI; a decimal prefix costs no rounding: 4.2 mm is the float nearest to 0.0042."""
        return self.scale * _shift(number, self.power)

    def count(self, si):
        """How many of this unit an SI value is."""
        return _shift(si / self.scale, -self.power)

    def times(self, other, exponent=1):
        """This unit times another one to a power."""
        dimension = tuple(a + exponent * b for a, b in zip(self.dimension, other.dimension))
        return Unit(self.scale * other.scale**exponent, self.power + exponent * other.power, dimension)


def _shift(number, power):
    return float(Decimal(repr(float(number))).scaleb(power)) if power else float(number)


def _unit(scale=1.0, power=0, m=0, kg=0, s=0, A=0, rad=0, nucleon=0, particle=0):
    return Unit(scale, power, (m, kg, s, A, rad, nucleon, particle))


PLAIN = _unit()
_PREFIXED = {
    "m": _unit(m=1),
    "s": _unit(s=1),
    "g": _unit(power=-3, kg=1),
    "A": _unit(A=1),
    "C": _unit(A=1, s=1),
    "V": _unit(m=2, kg=1, s=-3, A=-1),
    "ohm": _unit(m=2, kg=1, s=-3, A=-2),
    "T": _unit(kg=1, s=-2, A=-1),
    "G": _unit(power=-4, kg=1, s=-2, A=-1),
    "Hz": _unit(s=-1),
    "J": _unit(m=2, kg=1, s=-2),
    "eV": _unit(ELEMENTARY_CHARGE, m=2, kg=1, s=-2),
    "rad": _unit(rad=1),
}
_WHOLE = {
    "1": PLAIN,
    "%": _unit(power=-2),
    "cm": _unit(power=-2, m=1),
    "deg": _unit(pi / 180.0, rad=1),
    "c": _unit(SPEED_OF_LIGHT, m=1, s=-1),
    "u": _unit(nucleon=1),
    "particles": _unit(particle=1),
    "particle": _unit(particle=1),
}
_JOINED = {"Tm": "T m", "mrad mm": "mm mrad"}  # nobody measures in terametres


@lru_cache(maxsize=512)
def unit(text):
    """The Unit that a text means ('' is a plain number), or None for one that is not known."""
    text = _JOINED.get(text, text).translate(_SIGNS)
    above, slash, below = text.partition("/")
    parts = [_product(above or "1"), _product(below) if slash else PLAIN]
    return None if None in parts else parts[0].times(parts[1], -1)


def _product(text):
    product = PLAIN
    for atom in text.split() or ["?"]:
        factor = _power(atom)
        if factor is None:
            return None
        product = product.times(factor)
    return product


def _power(atom):
    if atom == "1":
        return PLAIN
    found = _ATOM.fullmatch(atom)
    base = _symbol(found[1]) if found else None
    return base and PLAIN.times(base, int(found[2] or 1))


def _symbol(word):
    known = _WHOLE.get(word) or _PREFIXED.get(word)
    if known or word[:1] not in PREFIXES or word[1:] not in _PREFIXED:
        return known
    base = _PREFIXED[word[1:]]
    return Unit(base.scale, base.power + PREFIXES[word[0]], base.dimension)
