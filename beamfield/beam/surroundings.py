"""What stands round the bunch: chamber, poles, a cathode, a neutralising background, other bunches."""

from dataclasses import dataclass

from beamfield.beam.encounter import Encounter
from beamfield.beam.train import Train
from beamfield.errors import NonsenseError

CHAMBERS = ("round", "elliptic", "plates", "rectangular")


@dataclass(frozen=True, slots=True)
class Chamber:
    """A conducting wall; half_width is infinite between plates [m]."""

    shape: str
    half_width: float
    half_height: float

    def __post_init__(self):
        if self.shape not in CHAMBERS or not (self.half_width > 0.0 and self.half_height > 0.0):
            sizes = f"{self.half_width:g} and {self.half_height:g} m"
            raise NonsenseError(f"no chamber is {self.shape} with half sizes {sizes}")


@dataclass(frozen=True, slots=True)
class Surroundings:
    """chamber; pole_half_gap [m]; cathode, distance behind the bunch centre [m], and cathode_field at its surface
    [V/m]; neutralisation, fraction of its charge; train, the bunches before and behind; encounter, another bunch.
    """

    chamber: Chamber | None = None
    pole_half_gap: float | None = None
    cathode: float | None = None
    neutralisation: float = 0.0
    train: Train | None = None
    encounter: Encounter | None = None
    cathode_field: float | None = None
