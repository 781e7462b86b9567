"""The chamber as the bunch on its axis feels it along: what the charge induced on the wall adds on the axis, lab."""

from dataclasses import dataclass
from functools import cached_property, lru_cache

import numpy as np

from beamfield.constants import COULOMB
from beamfield.estimate.textbook import filling, rest_scales
from beamfield.laws import pipe_image
from beamfield.laws.form_factor import form_factor
from beamfield.laws.wall_radius import wall_radius

LONG = 3.0  # rms length in the bunch frame over the radius of the wall: from here the wall counts as near
SHARP = 1000.0  # the same, up to which the edges of a bunch stay sharp to the wall
DIGITS = 1e-8  # relative, of the integrals
TURNS = 9.0  # of a Gaussian's form factor: exp(-TURNS^2 / 2) is nothing


@dataclass(frozen=True)
class Wall:
    """A chamber as the round pipe that makes the same potential about a thin beam on its axis; `round` if it is one."""

    bunch: object
    radius: float
    round: bool

    @property
    def closeness(self):
        """Length over distance of the wall: gamma sigma_z / b."""
        return self.bunch.gamma * self.bunch.sigma[2] / self.radius

    @property
    def remarks(self):
        """What a chamber that is not round leaves in doubt."""
        if self.round or self.closeness > LONG:
            return ()
        return (
            f"the chamber counts as a round pipe of {self.radius * 1e3:.4g} mm, which it is to a long beam; this bunch "
            f"is but {self.closeness:.2g} of that long (gamma times its rms length)",
        )

    @cached_property
    def nodes(self):
        scales, shape = rest_scales(self.bunch), self.bunch.shape
        sizes = shape.transverse, tuple(scales[:2]), shape.longitudinal, scales[2], shape.ellipsoid

        return pipe_image.nodes(
            lambda k: form_factor(*sizes, k) * np.exp(-0.5 * (k * self._blur) ** 2),
            self.radius,
            self._length(scales),
            self._last(scales),
        )

    @property
    def _blur(self):
        """Length [m], bunch frame, over which the ends of a very long bunch are smoothed for the wall to see."""
        sharp = self.bunch.shape.longitudinal == "gaussian" or self.closeness <= SHARP
        return 0.0 if sharp else 6.0 * self.radius * self.closeness / (SHARP * pipe_image.LAST)

    def _length(self, scales):
        return 3.0 * scales[2] if self.bunch.shape.longitudinal == "gaussian" else scales[2]

    def _last(self, scales):
        """Where the integral ends: the form factor of a Gaussian falls along, and grows across without meaning."""
        last = pipe_image.LAST
        if self.bunch.shape.longitudinal == "gaussian":
            last = min(last, TURNS * self.radius / scales[2])
        else:
            last = min(last, last * SHARP / self.closeness)
        if self.bunch.shape.transverse == "gaussian":
            last = min(last, 2.0 * (self.radius / scales[:2].max()) ** 2)
        return last

    @property
    def _strength(self):
        return COULOMB * filling(self.bunch)

    def potential(self):
        """Added to phi at the centre [V]."""
        return self.bunch.gamma * self._strength * pipe_image.image_potential(*self.nodes, self.radius)

    def slope(self):
        """Added to dE_z/dz at the centre [V/m^2]."""
        return self.bunch.gamma * self._strength * pipe_image.image_slope(*self.nodes, self.radius)

    def field(self, places):
        """Added to E_z (M,) [V/m] at places (M,) [m] on the axis."""
        return self._strength * pipe_image.image_field(self.bunch.gamma * places, *self.nodes, self.radius)


def wall_of(bunch, surroundings):
    """The Wall about a bunch known as a density, or None in free space."""
    return None if surroundings.chamber is None else _wall(bunch, surroundings.chamber)


@lru_cache(8)
def _wall(bunch, chamber):
    radius = wall_radius(chamber.shape, chamber.half_width, chamber.half_height)
    return Wall(bunch, radius, chamber.half_width == chamber.half_height and chamber.shape in ("round", "elliptic"))


def mean_scale(bunch):
    """Mean of the half axes, or of the rms sizes of a Gaussian, x and y [m]."""
    return float(np.mean(rest_scales(bunch)[:2]))
