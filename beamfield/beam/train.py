"""A train: equal bunches one behind the other, and which of them is the bunch in question."""

from dataclasses import dataclass
from math import inf

from beamfield.errors import NonsenseError


@dataclass(frozen=True, slots=True)
class Train:
    """count of bunches; spacing of their centres [m], lab frame; place of the bunch in question, 1 at the head, the
    middle one (the foremost of two) where nobody says.
    """

    count: int
    spacing: float
    place: int = 0

    def __post_init__(self):
        object.__setattr__(self, "place", self.place or (self.count + 1) // 2)
        if self.count < 1 or not 0.0 < self.spacing < inf:
            raise NonsenseError(f"no train has {self.count} bunches {self.spacing:g} m apart")
        if not 1 <= self.place <= self.count:
            raise NonsenseError(f"a train of {self.count} has no bunch number {self.place}")

    @property
    def neighbours(self):
        """Places of the other centres along z about that of the bunch in question [m], from the head to the tail."""
        return tuple((self.place - k) * self.spacing for k in range(1, self.count + 1) if k != self.place)
