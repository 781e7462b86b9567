"""A beamline: elements in the order in which the bunch meets them, and the optics at their start."""

from dataclasses import dataclass

from beamfield.errors import NonsenseError


@dataclass(frozen=True, slots=True)
class Drift:
    """Free flight over a length [m]."""

    length: float


@dataclass(frozen=True, slots=True)
class Quadrupole:
    """length [m]; gradient [T/m], positive where it focuses x for a positive charge moving forward."""

    length: float
    gradient: float


@dataclass(frozen=True, slots=True)
class Solenoid:
    """length [m]; field on the axis [T]."""

    length: float
    field: float


@dataclass(frozen=True, slots=True)
class Gap:
    """A thin RF gap: voltage [V], frequency [Hz], phase at the passage of the centre [rad]."""

    voltage: float
    frequency: float
    phase: float

    length = 0.0


ELEMENTS = {"drift": Drift, "quadrupole": Quadrupole, "solenoid": Solenoid, "gap": Gap}


@dataclass(frozen=True, slots=True)
class Start:
    """beta (x, y) [m], None where neither optics nor size and emittance say it; alpha (x, y) [1]."""

    beta: tuple[float | None, float | None]
    alpha: tuple[float, float] = (0.0, 0.0)

    def __post_init__(self):
        if not all(beta is None or beta > 0.0 for beta in self.beta):
            raise NonsenseError(f"no beam has beta functions {self.beta} m")


@dataclass(frozen=True, slots=True)
class Beamline:
    """elements, passed `repeat` times; start, or None for the matched beam of the periodic cell."""

    elements: tuple[Drift | Quadrupole | Solenoid | Gap, ...]
    repeat: int = 1
    start: Start | None = None

    def __post_init__(self):
        if not self.elements or self.repeat < 1:
            raise NonsenseError("a beamline has an element at least, passed once at least")
        if any(element.length < 0.0 for element in self.elements):
            raise NonsenseError("no element has a negative length")

    @property
    def length(self):
        """Length of all passages [m]."""
        return self.repeat * sum(element.length for element in self.elements)
