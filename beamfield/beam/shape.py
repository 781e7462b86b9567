"""How the charges of a bunch are spread about its centre: profiles, edges, and what a width word means for each."""

from dataclasses import dataclass
from math import log, sqrt

from beamfield.errors import NonsenseError

TRANSVERSE = ("gaussian", "kv", "parabolic")
LONGITUDINAL = ("gaussian", "uniform", "parabolic", "coasting")

# Edge (half extent) and full width at half maximum of the profile projected on one axis, both over the rms size.
# A profile that has no edge, or no width, has None.
_GAUSSIAN = (None, 2.0 * sqrt(2.0 * log(2.0)))
_UNLIMITED = (None, None)
_WIDTHS = {  # density -> (transverse, longitudinal)
    "gaussian": (_GAUSSIAN, _GAUSSIAN),
    "kv": ((2.0, 2.0 * sqrt(3.0)), None),  # uniform ellipse, projected: sqrt(1 - x2/a2)
    "parabolic": ((sqrt(6.0), 2.0 * sqrt(6.0) * sqrt(1.0 - 2.0 ** (-2.0 / 3.0))), (sqrt(5.0), sqrt(10.0))),
    "uniform": (None, (sqrt(3.0), 2.0 * sqrt(3.0))),
    "coasting": (None, _UNLIMITED),
}
_ELLIPSOID_WIDTHS = {
    "uniform": (sqrt(5.0), sqrt(10.0)),  # projected: 1 - x2/a2
    "parabolic": (sqrt(7.0), 2.0 * sqrt(7.0) * sqrt(1.0 - 1.0 / sqrt(2.0))),  # projected: (1 - x2/a2)^2
}


@dataclass(frozen=True, slots=True)
class Shape:
    """A density of constant form.

    Either a product of a transverse profile (over the ellipse x2/a2 + y2/b2) and a line density, or an `ellipsoid`
    whose density depends on x2/a2 + y2/b2 + z2/c2 alone; then both profiles carry the same word, "uniform" or
    "parabolic". A Gaussian is both and counts as a product.
    """

    transverse: str
    longitudinal: str
    ellipsoid: bool = False

    def __post_init__(self):
        known = (
            self.transverse == self.longitudinal and self.transverse in _ELLIPSOID_WIDTHS
            if self.ellipsoid
            else self.transverse in TRANSVERSE and self.longitudinal in LONGITUDINAL
        )
        if not known:
            raise NonsenseError(f"no bunch is {self.transverse} across and {self.longitudinal} along")

    @property
    def name(self):
        known = (name for name, shape in SHAPES.items() if shape == self)
        return next(known, f"{self.transverse} x {self.longitudinal}")

    @property
    def coasting(self):
        return self.longitudinal == "coasting"

    def edge(self, axis):
        """Half the edge-to-edge extent over the rms size along axis 0, 1, 2; None without an edge."""
        return self._widths(axis)[0]

    def flat(self, axis):
        """Whether the density is constant up to an edge along an axis through the centre."""
        return (self.longitudinal if axis == 2 else self.transverse) in ("kv", "uniform")

    def fwhm(self, axis):
        """Full width at half maximum of the projected profile over the rms size; None where it has no meaning."""
        return self._widths(axis)[1]

    def _widths(self, axis):
        if self.ellipsoid:
            return _ELLIPSOID_WIDTHS[self.transverse]
        return _WIDTHS[self.longitudinal][1] if axis == 2 else _WIDTHS[self.transverse][0]

    @property
    def peak_line_density(self):
        """Peak of the line density of one particle, times the rms length [1]; 0 for a coasting beam.

        Gaussian 1/sqrt(2 pi), uniform 1/(2 sqrt 3), parabolic 3/(4 sqrt 5), ellipsoids by projection.
        """
        if self.ellipsoid:
            return {"uniform": 0.75 / sqrt(5.0), "parabolic": 15.0 / 16.0 / sqrt(7.0)}[self.transverse]
        return {
            "gaussian": 0.3989422804014327,
            "uniform": 0.5 / sqrt(3.0),
            "parabolic": 0.75 / sqrt(5.0),
            "coasting": 0.0,
        }[self.longitudinal]


SHAPES = {
    "gaussian": Shape("gaussian", "gaussian"),
    "uniform-ellipsoid": Shape("uniform", "uniform", ellipsoid=True),
    "parabolic-ellipsoid": Shape("parabolic", "parabolic", ellipsoid=True),
    "uniform-cylinder": Shape("kv", "uniform"),
}
