"""A bunch known as a set of macro-particles."""

from dataclasses import dataclass

import numpy as np

from beamfield.errors import NonsenseError


@dataclass(frozen=True, slots=True, eq=False)
class MacroParticles:
    """Places (3, N) [m] about their weighted centroid, lab frame, at one instant; weights (N,) that sum to 1;
    momenta (3, N) in units of m c, or None where all share the momentum of the bunch."""

    positions: np.ndarray
    weights: np.ndarray
    momenta: np.ndarray | None = None
    source: str = ""

    def __post_init__(self):
        if self.positions.ndim != 2 or self.positions.shape[0] != 3 or self.positions.shape[1] < 2:
            raise NonsenseError("a particle set needs at least two particles with three coordinates each")

    @property
    def count(self):
        return self.positions.shape[1]

    @property
    def rms(self):
        """Weighted rms sizes about the centroid (3,) [m]."""
        return np.sqrt(np.square(self.positions) @ self.weights)
