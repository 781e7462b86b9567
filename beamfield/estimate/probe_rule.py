"""Where the charges for a probe go: how many in each direction, and on which nodes, for a bunch of given form."""

from dataclasses import dataclass
from functools import lru_cache
from math import log10, pi, sqrt

import numpy as np


@dataclass(frozen=True, slots=True)
class Rule:
    """Charges in azimuth, distance and height round a probe; `faced` when the density ends on a face along z;
    `window`, rms lengths of a Gaussian that are kept: beyond 6.5 lies less than 1e-9 of it."""

    azimuth: int
    radial: int
    height: int
    faced: bool
    window: float = 6.5

    @property
    def charges(self):
        return self.azimuth * self.radial * self.height

    def thinned(self, part):
        """The same rule with `part` of the nodes in each direction and half an rms length less of a Gaussian."""
        radial = self.radial if self.radial == 2 else max(4, round(part * self.radial))
        return Rule(even(part * self.azimuth), radial, even(part * self.height), self.faced, self.window - 0.5)


def even(number):
    return max(4, 2 * round(number / 2.0))


def rule_for(aspect, section, charges, faced):
    """Rule of at most `charges` for rest-frame aspect sigma_z / sqrt(sigma_x sigma_y) and section sigma_x / sigma_y.

    Flat sections ask for directions, pancakes for distances, needles for heights; the powers were fitted to the error
    against the closed field of a Gaussian bunch over aspects 1e-4 ... 1e5 and sections to 10.
    """
    size = (charges / 32768.0) ** (1.0 / 3.0)
    flatness = max(section, 1.0 / section) ** min(0.25, max(0.14, 0.26 + 0.04 * log10(aspect)))
    azimuth = even(23.0 * size * flatness)
    slenderness = min(1.5, max(0.33, 0.8 * aspect**-0.2))
    radial = max(4, round(sqrt(slenderness * charges / azimuth)))
    height = max(4, int(charges / azimuth / radial) // 2 * 2)
    return Rule(azimuth, radial, height, faced)


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
    """Nodes of the paired part and of the rest above or below."""
    if not rule.faced:
        return *unit_nodes(rule.height // 2), np.empty(0), np.empty(0)
    paired = max(2, rule.height // 3)
    return *unit_nodes(paired), *unit_nodes(max(2, rule.height - 2 * paired))


def azimuth_nodes(probes, scales, count, edged):
    """Directions (M, 2, K), in units of the scales a and b, and weights (M, K) of the azimuth for probes (3, M).

    The angle is the amplitude of Jacobi's functions for the elliptic section, even in their argument: that is how
    1/(a^2 cos^2 + b^2 sin^2) wants to be sampled. From beside an edged bunch only the directions that meet it count,
    crowded at the ends of their range, where the chord vanishes as a root.
    """
    from scipy.special import ellipj, ellipk, ellipkinc

    a, b = scales[:2]
    parameter = 1.0 - (min(a, b) / max(a, b)) ** 2
    x, y = (probes[0] / a, probes[1] / b) if a >= b else (probes[1] / b, probes[0] / a)
    length = 4.0 * ellipk(parameter)
    argument = np.broadcast_to(length * (np.arange(count) + 0.5) / count, (len(x), count)).copy()
    weights = np.full((len(x), count), length / count)
    distance = np.hypot(x, y)
    beside = np.flatnonzero(edged & (distance > 1.0))
    if len(beside):
        centre, reach = np.arctan2(-y[beside], -x[beside]), np.arcsin(1.0 / distance[beside])
        low, high = (ellipkinc(centre + side * reach, parameter)[:, None] for side in (-1.0, 1.0))
        turn = pi * ((np.arange(count) + 0.5) / count - 0.5)
        argument[beside] = 0.5 * (high + low) + 0.5 * (high - low) * np.sin(turn)
        weights[beside] = 0.5 * (high - low) * np.cos(turn) * pi / count
    sin, cos, slope, _ = ellipj(argument, parameter)
    directions = (cos, sin) if a >= b else (sin, cos)
    return np.ascontiguousarray(np.stack(directions, axis=1)), weights * slope
