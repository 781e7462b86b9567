"""A ring: its length, its tunes and its optics."""

from dataclasses import dataclass
from math import pi

import numpy as np

from beamfield.beam.rf import Rf
from beamfield.errors import NonsenseError


@dataclass(frozen=True, slots=True, eq=False)
class Optics:
    """Places s (K,) round the ring and beta_x, beta_y, dispersion_x (K,) there [m]; weights (K,) of the ring average,
    sum 1.
    """

    s: np.ndarray
    beta_x: np.ndarray
    beta_y: np.ndarray
    dispersion_x: np.ndarray
    weights: np.ndarray
    source: str

    @classmethod
    def mean(cls, beta_x, beta_y, dispersion_x=0.0, source="mean values"):
        return cls(*(np.array([float(v)]) for v in (0.0, beta_x, beta_y, dispersion_x, 1.0)), source)

    @property
    def tabulated(self):
        return len(self.s) > 1


@dataclass(frozen=True, slots=True, eq=False)
class Ring:
    """circumference [m], tunes (x, y), equal bunches in it, optics; rf, None where nobody said."""

    circumference: float
    tune: tuple[float, float]
    bunches: int
    optics: Optics
    rf: Rf | None = None

    def __post_init__(self):
        if not self.circumference > 0.0 or not all(q > 0.0 for q in self.tune) or self.bunches < 1:
            raise NonsenseError("a ring has a length, two tunes above zero and at least one bunch")

    @classmethod
    def smooth(cls, circumference, tune, bunches=1, rf=None):
        """Ring of constant beta = R / Q."""
        radius = circumference / (2.0 * pi)
        optics = Optics.mean(radius / tune[0], radius / tune[1], source="smooth: beta = R/Q")
        return cls(circumference, tuple(tune), bunches, optics, rf)
