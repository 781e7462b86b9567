"""What the vocabulary says about one key, and the span of values it may take."""

from dataclasses import dataclass
from math import inf, isfinite

from beamfield.describe.kinds import KINDS
from beamfield.describe.nearest import excerpt
from beamfield.errors import InputError


@dataclass(frozen=True, slots=True)
class Key:
    """One key of a case.

    path      as 'bunch.size.x'; '[]' stands for any place in a list
    kind      a name of KINDS, or "section", "one of" (a section of exactly one key), "list", "text", "word", "file",
              "whole" (number), "limit", "species"
    says      one sentence for people and editors
    example   a value as one writes it
    required  whether its section must have it
    choices   the words that kind "word" allows
    above, least, most, below   the values allowed, in SI (of what the text comes to: an rms size, a momentum over m c)
    reason    why not more
    """

    path: str
    kind: str
    says: str
    example: str = ""
    required: bool = False
    choices: tuple[str, ...] = ()
    above: float = -inf
    least: float = -inf
    most: float = inf
    below: float = inf
    reason: str = ""

    @property
    def name(self):
        return self.path.rpartition(".")[2]

    @property
    def quantity(self):
        return self.kind in KINDS

    @property
    def scalar(self):
        return self.kind not in ("section", "one of", "list")

    @property
    def span(self):
        """The values allowed, in words."""
        unit = f" {KINDS[self.kind].base}" if self.quantity and KINDS[self.kind].base else ""
        limits = (("above", self.above), ("at least", self.least), ("at most", self.most), ("below", self.below))
        said = ", ".join(f"{word} {value:.10g}{unit}" for word, value in limits if isfinite(value))
        return f"{said} ({self.reason})" if self.reason else said

    def check(self, value, text):
        """The value itself; InputError where it is not among those allowed."""
        if self.above < value < self.below and self.least <= value <= self.most:
            return value
        said = excerpt(text) if text else f"{value:g}, which the rest of the case makes it,"
        raise InputError(f"{said} is outside what is allowed: {self.span}")
