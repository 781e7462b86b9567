"""Where a bunch that now flies straight along +z came from."""

from dataclasses import dataclass, replace
from math import inf, pi

from beamfield.errors import NonsenseError


@dataclass(frozen=True, slots=True)
class AfterBend:
    """Out of an arc `straight` metres before the bunch centre, into it from a straight line.

    Each charge turned on its own arc of the same radius [m] through the same angle [rad], the centre towards +x.
    """

    straight: float
    radius: float
    angle: float = 0.5 * pi

    def __post_init__(self):
        if not (0.0 <= self.straight < inf and 0.0 < self.radius < inf and 0.0 < self.angle <= 2.0 * pi):
            raise NonsenseError(
                f"no bunch came {self.straight:g} m after {self.angle:g} rad of radius {self.radius:g} m"
            )

    def flown(self, straight):
        """The same past, `straight` metres further back or nearer."""
        return replace(self, straight=straight)


@dataclass(frozen=True, slots=True)
class AfterCathode:
    """From a conducting plane `straight` metres behind the bunch centre, at full speed from the first instant.

    Charge and image appear together at the plane; before that there is no field, as a charge on a conductor has none.
    The flash of the start itself, an infinitely thin shell, is left out.
    """

    straight: float

    def __post_init__(self):
        if not 0.0 <= self.straight < inf:
            raise NonsenseError(f"no bunch flew {self.straight:g} m from its cathode")

    def flown(self, straight):
        """The same past, `straight` metres further back or nearer."""
        return replace(self, straight=straight)
