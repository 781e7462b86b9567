"""Limits: a result against a number."""

from dataclasses import dataclass
from operator import ge, gt, le, lt

COMPARISONS = {"<": lt, "<=": le, ">": gt, ">=": ge}


@dataclass(frozen=True, slots=True)
class Limit:
    """text, as the user wrote it; result, a name of the catalogue; absolute, whether |...| stood round it;
    comparison, one of < <= > >=; bound, in the unit of the result; line and column of the text in the case."""

    text: str
    result: str
    absolute: bool
    comparison: str
    bound: float
    line: int = 0
    column: int = 0


@dataclass(frozen=True, slots=True)
class Verdict:
    """A limit and what became of it: the value compared, whether it is met, and the margin.

    margin is the distance to the bound over the bound, positive when met (the plain distance for a bound of zero)."""

    limit: Limit
    value: float
    met: bool
    margin: float


def judge(limit, value):
    """Verdict on one limit for the value of its result."""
    value = abs(value) if limit.absolute else value
    room = limit.bound - value if limit.comparison[0] == "<" else value - limit.bound
    met = bool(COMPARISONS[limit.comparison](value, limit.bound))
    return Verdict(limit, value, met, room / (abs(limit.bound) or 1.0))
