"""The cavities of a ring, and how the time of a turn depends on energy."""

from dataclasses import dataclass

from beamfield.errors import NonsenseError


@dataclass(frozen=True, slots=True)
class Rf:
    """voltage, the amplitude a turn [V]; harmonic, its frequency over that of a turn; transition_gamma."""

    voltage: float
    harmonic: int
    transition_gamma: float

    def __post_init__(self):
        if not self.voltage > 0.0 or self.harmonic < 1 or not self.transition_gamma > 0.0:
            raise NonsenseError("the cavities of a ring have a voltage, a harmonic from 1 up and a transition gamma")
