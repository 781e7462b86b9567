"""A bunch before a conducting plane: its own field and that of its mirror image, charge by charge."""

from dataclasses import dataclass
from functools import partial

import numpy as np

MIRROR = np.array([[-1.0], [-1.0], [1.0]])  # reflected in a plane across the motion, and of opposite charge
IMAGE = "with the image in the cathode: mirrored charges of opposite sign and momentum"
STEADY = "as if the bunch had always moved so: for one just emitted, see memory_length_longitudinal"


@dataclass(frozen=True, slots=True)
class BeforeCathode:
    """fields: like those of `source`, with the mirror image added.

    source    of the bunch alone
    distance  of the cathode behind the centre of the bunch             [m]
    across    what the image's field across the motion counts for       [1]
    """

    source: object
    distance: float
    across: float = 1.0

    @property
    def method(self):
        return f"{self.source.method}, and its mirror image"

    @property
    def fields(self):
        return tuple(partial(self._both, field) for field in self.source.fields)

    def _both(self, field, points):
        return field(points) + self.weights * mirror_field(field, self.distance, points)

    @property
    def weights(self):
        return np.array([[self.across], [self.across], [1.0]])


def mirror_field(field, distance, points):
    """E (3, M) of the mirrored charges at points (3, M), from field(points) of the charges themselves.

    The image of a moving charge is its opposite at the mirrored place, its momentum along the motion reversed; in a
    conductor at z = -distance the field across is nought. Source: method of images in the frame of the plane; J. D.
    Jackson, Classical Electrodynamics, 3rd ed., sec. 2.1 (from memory of it), and its Lorentz transformation.
    """
    x, y, z = points
    return MIRROR * field(np.stack([x, y, -2.0 * distance - z]))


def behind(points, distance):
    """Which of the points (3, M) lie inside the cathode."""
    return points[2] < -distance


def force_weight(bunch):
    """Pull across of the image's field over that of the bunch's own at equal E: (1 + beta^2) / (1 - beta^2).

    Image and bunch run against each other, so that the magnetic force helps the electric one instead of weakening it.
    """
    return bunch.gamma**2 + bunch.beta_gamma**2


def mapped(evaluate, bunch, distance):
    """An evaluate(points) -> {name: values} of a field map with the mirror image added; nothing inside the cathode."""
    if distance is None:
        return evaluate
    pull = force_weight(bunch)
    turned = {"E": MIRROR, "B": 1.0, "force": np.array([[-pull], [-pull], [1.0]]), "phi": -1.0, "A": 1.0}

    def both(points):
        x, y, z = points
        own, image = evaluate(points), evaluate(np.stack([x, y, -2.0 * distance - z]))
        return {name: ~behind(points, distance) * (own[name] + turned[name] * image[name]) for name in own}

    return both


def odd(field):
    """The part of a field that is odd about the centre: what slopes there are drawn from."""
    return lambda points: 0.5 * (field(points) - field(-points))


def remarks_of(surroundings):
    return () if surroundings.cathode is None else (IMAGE, STEADY)
