"""Where the charges for a probe go: how many in each direction, and on which nodes, for a bunch of given form."""

from dataclasses import dataclass
from functools import lru_cache
from math import log10, sqrt

import numpy as np

LONG = 3.0  # rest-frame aspect from which a flat section needs fewer directions of its own


@dataclass(frozen=True, slots=True)
class Rule:
    """Charges in azimuth, distance and height round a probe; `faced` when the density ends on a face along z;
    `window`, rms lengths of a Gaussian that are kept: beyond 6.5 lies less than 1e-9 of it; `few`, heights of a faced
    density on the shorter part."""

    azimuth: int
    radial: int
    height: int
    faced: bool
    window: float = 6.5
    few: int = 0

    @property
    def charges(self):
        return self.azimuth * self.radial * self.height

    def thinned(self, part):
        """The same rule with `part` of the nodes in each direction and half an rms length less of a Gaussian."""
        radial = self.radial if self.radial == 2 else max(4, round(part * self.radial))
        height, window = even(part * self.height), self.window - 0.5
        return Rule(even(part * self.azimuth), radial, height, self.faced, window, self.few - 1)


def even(number):
    return max(4, 2 * round(number / 2.0))


def rule_for(aspect, section, charges, faced):
    """Rule of at most `charges` for rest-frame aspect sigma_z / sqrt(sigma_x sigma_y) and section sigma_x / sigma_y.

    Flat sections ask for directions, pancakes for distances, needles for heights; the powers were fitted to the error
    against the closed field of a Gaussian bunch over aspects 1e-4 ... 1e5 and sections to 10.
    """
    size = (charges / 32768.0) ** (1.0 / 3.0)
    flatness = max(section, 1.0 / section) ** min(0.25, max(0.14, 0.26 + 0.04 * log10(aspect)))
    azimuth = even(24.0 * size * flatness)
    slenderness = min(1.45, max(0.33, 0.8 * aspect**-0.2))
    radial = max(4, round(sqrt(slenderness * charges / azimuth)))
    height = max(4, int(charges / azimuth / radial) // 2 * 2)
    return Rule(azimuth, radial, height, faced, few=max(6, height // 5))


def ray_rule(charges):
    """Rule for the rays of an ellipsoid: two charges on each, four times as many slopes as directions."""
    azimuth = even(sqrt(charges / 8.0))
    return Rule(azimuth, 2, max(8, int(charges / 2.0 / azimuth)), True)


@lru_cache(64)
def unit_nodes(count):
    """Gauss-Legendre nodes and weights on (0, 1)."""
    x, w = np.polynomial.legendre.leggauss(count)
    return 0.5 * (x + 1.0), 0.5 * w


def height_nodes(rule):
    """Nodes for the longer part of the heights, the pairs or what is left above or below them, and for the shorter.

    Without faces: for the pairs, and for what only one side has, most of a bunch seen from its tail.
    """
    if not rule.faced:
        return *unit_nodes(rule.height // 2), *unit_nodes(rule.height)
    few = min(rule.few, rule.height - 2)
    return *unit_nodes((rule.height - few) // 2), *unit_nodes(few)


def azimuth_nodes(probes, scales, count, edged, window=6.5):
    """Directions (M, 2, K), in units of the scales a and b, and weights (M, K) of the azimuth for probes (3, M).

    window, rms sizes of a Gaussian that are kept.
    """
    from beamfield.kernels.azimuths import azimuths

    a, b = scales[:2]
    x, y = (probes[0] / a, probes[1] / b) if a >= b else (probes[1] / b, probes[0] / a)
    flatness = max(a, b) / min(a, b)
    portion = 0.5 + (0.0 if scales[2] > LONG * sqrt(a * b) else 0.3 * log10(flatness))
    angles, weights = np.empty((len(x), count)), np.empty((len(x), count))
    azimuths(x, y, 1.0 - flatness**-2, portion, edged, window, angles, weights)
    directions = (np.cos(angles), np.sin(angles)) if a >= b else (np.sin(angles), np.cos(angles))
    return np.ascontiguousarray(np.stack(directions, axis=1)), weights
