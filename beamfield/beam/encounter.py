"""An encounter: another bunch beside or against ours."""

from dataclasses import dataclass
from math import isfinite

from beamfield.beam.bunch import Bunch
from beamfield.errors import NonsenseError

DIRECTIONS = ("opposing", "same")


@dataclass(frozen=True, slots=True)
class Encounter:
    """other, as it would be alone and moving along +z; direction in which it moves against ours; offset (x, y, z) of
    its centre from ours, now [m]; beta functions (x, y) of our ring where they meet [m], or None.
    """

    other: Bunch
    direction: str = "opposing"
    offset: tuple[float, float, float] = (0.0, 0.0, 0.0)
    beta: tuple[float, float] | None = None

    def __post_init__(self):
        if self.direction not in DIRECTIONS or not all(map(isfinite, self.offset)):
            raise NonsenseError(f"no bunch stands at {self.offset} m and moves in the direction {self.direction!r}")
        if self.other.coasting:
            raise NonsenseError("a coasting beam is never met and left behind: the other beam is a bunch")
        if self.beta is not None and not all(beta > 0.0 for beta in self.beta):
            raise NonsenseError(f"no ring has beta functions {self.beta} m")

    @property
    def opposing(self):
        return self.direction == "opposing"

    @property
    def aside(self):
        """Whether the centres pass beside each other."""
        return any(self.offset[:2])
