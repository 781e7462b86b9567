"""The bunch: what it is made of, how fast it goes, how many there are and how they are spread."""

from dataclasses import dataclass
from math import hypot, inf, isinf

from beamfield.beam.particles import MacroParticles
from beamfield.beam.shape import Shape
from beamfield.beam.species import Species
from beamfield.constants import SPEED_OF_LIGHT
from beamfield.errors import NonsenseError


@dataclass(frozen=True, slots=True)
class Bunch:
    """A bunch in the lab, at one instant, moving along +z.

    beta_gamma       momentum over m c                                     [1]
    particles        real particles in the bunch; all round the ring for a coasting beam, None where nobody said   [1]
    sigma            rms sizes (x, y, z), z = inf for a coasting beam      [m]
    shape            the density, or None when `macro` gives the particles
    line_density     particles per metre of a coasting beam, else 0        [1/m]
    emittance        geometric rms (x, y), or None                         [m rad]
    momentum_spread  rms dp/p, or None                                     [1]
    """

    species: Species
    beta_gamma: float
    particles: float | None
    sigma: tuple[float, float, float]
    shape: Shape | None
    macro: MacroParticles | None = None
    line_density: float = 0.0
    emittance: tuple[float, float] | None = None
    momentum_spread: float | None = None

    def __post_init__(self):
        if not 0.0 < self.beta_gamma < inf:
            raise NonsenseError(f"a bunch of momentum {self.beta_gamma:g} m c does not move")
        if not all(size > 0.0 for size in self.sigma) or any(isinf(size) for size in self.sigma[:2]):
            raise NonsenseError(f"no bunch has rms sizes {self.sigma}")
        if self.particles is not None and not 0.0 < self.particles < inf:
            raise NonsenseError(f"no bunch holds {self.particles:g} particles")
        if isinf(self.sigma[2]) != (self.line_density > 0.0):
            raise NonsenseError("a coasting beam has a line density and no length; a bunch has a length")

    @property
    def gamma(self):
        return hypot(1.0, self.beta_gamma)

    @property
    def beta(self):
        return self.beta_gamma / self.gamma

    @property
    def velocity(self):
        return self.beta * SPEED_OF_LIGHT

    @property
    def coasting(self):
        return isinf(self.sigma[2])

    @property
    def charge(self):
        """Charge of the bunch, signed [C]; None for a coasting beam of unknown length."""
        return None if self.particles is None else self.particles * self.species.charge

    @property
    def aspect(self):
        """Length over width in the frame of the bunch: gamma sigma_z / sqrt(sigma_x sigma_y)."""
        return self.gamma * self.sigma[2] / (self.sigma[0] * self.sigma[1]) ** 0.5

    def extent(self, axis):
        """Half the edge-to-edge size along an axis [m]; None where the density has no edge."""
        edge = self.shape.edge(axis) if self.shape else None
        return None if edge is None else edge * self.sigma[axis]
