"""A quantity as a user writes it: NUMBER [± NUMBER] UNIT WORD…, or 'gamma NUMBER', 'rigidity NUMBER T m'."""

import re
from dataclasses import dataclass, replace

from beamfield.describe import units
from beamfield.describe.nearest import excerpt
from beamfield.describe.number_text import split_number
from beamfield.errors import InputError

HEADS = ("gamma", "rigidity")
WORDS = ("rms", "semi", "full", "fwhm", "kinetic", "total", "normalised", "geometric", "95%", "peak", "mean")
_SPELLINGS = {"normalized": "normalised", "RMS": "rms", "FWHM": "fwhm"}
_HEAD = re.compile(rf"({'|'.join(HEADS)})\s+(?=\S)")
_TOLERANCE = re.compile(r"\s*(?:±|\+/?-)\s*")
_TIDY = str.maketrans({"−": "-", "µ": "u", "μ": "u"})


@dataclass(frozen=True, slots=True)
class Quantity:
    """number, tolerance (None without one) and unit_text as written; words behind the unit, head before the number;
    `unit` is None for a unit that is not known."""

    text: str
    number: float
    number_text: str
    tolerance: float | None
    unit_text: str
    words: tuple[str, ...]
    head: str
    unit: units.Unit | None

    @property
    def si(self):
        """The number in SI (radians, particles, nucleons counting one each)."""
        return self.unit.si(self.number)

    @property
    def si_tolerance(self):
        """The tolerance in SI, None without one."""
        return None if self.tolerance is None else self.unit.si(self.tolerance)

    def written(self, number):
        """The text of the same quantity with another number and no tolerance, to the last digit."""
        return " ".join(part for part in (self.head, repr(float(number)), self.unit_text, *self.words) if part)

    def holding(self, *words):
        """The same quantity with other words behind it."""
        return replace(self, words=words)


def parse(text):
    """Quantity that a text says; InputError where its number or its order cannot be read. The unit may be unknown."""
    tidy = " ".join(text.translate(_TIDY).split())
    head = _HEAD.match(tidy)
    number, number_text, rest = split_number(tidy[head.end() :] if head else tidy)
    tolerance, rest = _tolerance(rest, tidy)
    unit_text, words = _unit_and_words(rest, tidy)
    unit = units.unit(unit_text)
    return Quantity(tidy, number, number_text, tolerance, unit_text, words, head[1] if head else "", unit)


def _tolerance(rest, whole):
    sign = _TOLERANCE.match(rest)
    if not sign:
        return None, rest
    tolerance, _, rest = split_number(rest[sign.end() :])
    if not tolerance >= 0.0:
        raise InputError(f"{excerpt(whole)}: a tolerance is not negative")
    return tolerance, rest


def _unit_and_words(rest, whole):
    """Unit text and words: the unit ends where the first word stands."""
    if "±" in rest or "+-" in rest:
        raise InputError(f"{excerpt(whole)}: the tolerance follows the number, as in '1.2 ± 0.1 nC'")
    tokens = [_SPELLINGS.get(token, token) for token in re.sub(r"\b95 %", "95%", rest).split()]
    first = next((place for place, token in enumerate(tokens) if token in WORDS), len(tokens))
    strange = [token for token in tokens[first:] if token not in WORDS]
    if strange:
        return " ".join(tokens[:first] + strange), tuple(token for token in tokens if token in WORDS)
    return " ".join(tokens[:first]), tuple(tokens[first:])
