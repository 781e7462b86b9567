"""Where the charges for a probe go: how many in each direction, and on which nodes, for a bunch of given form."""

from dataclasses import dataclass
from functools import lru_cache
from math import log10, pi, sqrt

import numpy as np

LONG = 3.0  # rest-frame aspect from which a flat section needs fewer directions of its own
NEAREST = 1.0 - 1e-7  # squared scaled distance from the middle at which a probe counts as standing on an edge
BESIDE = 5.0  # rms distance from the middle of a Gaussian from which only the directions that meet it count
GATHER = 3.0  # squared rms distance from the middle of a Gaussian where directions to it start to crowd


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
    azimuth = even(24.0 * size * flatness)
    slenderness = min(1.6, max(0.33, 0.8 * aspect**-0.2))
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
    """Nodes for the longer part of the heights, the pairs or what is left above or below them, and for the shorter.

    Without faces: for the pairs, and for a probe beyond the ends, which sees no pairs.
    """
    if not rule.faced:
        return *unit_nodes(rule.height // 2), *unit_nodes(rule.height)
    few = max(6, rule.height // 5)
    return *unit_nodes((rule.height - few) // 2), *unit_nodes(few)


def ray_nodes(rule):
    """Nodes for the slopes of rays: pairs from inside, and single ones for what is seen from outside."""
    return *unit_nodes(rule.height // 4), *unit_nodes(rule.height // 2)


def azimuth_nodes(probes, scales, count, edged, window=6.5):
    """Directions (M, 2, K), in units of the scales a and b, and weights (M, K) of the azimuth for probes (3, M).

    Even steps of a mean of two elliptic integrals F: one crowds the directions where a flat section is near, as
    1/(a^2 cos^2 + b^2 sin^2) wants it, the other those along the edge that a probe stands next to, or those to and
    from the middle of a Gaussian. Beside an edged bunch only the directions that meet it count, crowded at the ends
    of their range, where the chord vanishes as a root. Beside a Gaussian its window is met, in even steps: the charge
    fades towards the ends by itself.
    """
    a, b = scales[:2]
    x, y = (probes[0] / a, probes[1] / b) if a >= b else (probes[1] / b, probes[0] / a)
    flat = 1.0 - (min(a, b) / max(a, b)) ** 2
    distance = np.hypot(x, y)
    share = 0.5 + (0.0 if scales[2] > LONG * sqrt(a * b) else 0.3 * log10(max(a, b) / min(a, b)))
    beside = distance > (1.0 if edged else BESIDE)
    reach = np.arcsin(np.minimum(1.0, (1.0 if edged else window) / distance[beside]))
    angle, weights = np.empty((len(x), count)), np.empty((len(x), count))
    outer = np.arctan2(y, x)
    angle[~beside], weights[~beside] = _round_about(outer[~beside], distance[~beside], flat, share, edged, count)
    angle[beside], weights[beside] = _towards(outer[beside] + pi, reach, flat, edged, count)
    directions = (np.cos(angle), np.sin(angle)) if a >= b else (np.sin(angle), np.cos(angle))
    return np.ascontiguousarray(np.stack(directions, axis=1)), weights


def _round_about(outer, distance, flat, share, edged, count):
    """Angles and weights (M, K) all the way round, for probes at angle `outer` and scaled distance from the middle."""
    from scipy.special import ellipk, ellipkinc

    crowd = np.minimum(distance**2, NEAREST) if edged else distance**2 / (GATHER + distance**2)
    centre, crowd = (outer if edged else outer + 0.5 * pi)[:, None], crowd[:, None]
    whole, own = 4.0 * ellipk(flat) / share, 4.0 * ellipk(crowd) / (1.0 - share)
    offset = ellipkinc(centre, crowd) / own
    wanted = (np.arange(count) + 0.5) / count
    angle = np.broadcast_to(2.0 * pi * wanted, (len(outer), count)).copy()
    low, high = angle - 2.0 * pi, angle + 2.0 * pi
    for _ in range(80):
        slope = 1.0 / np.sqrt(1.0 - flat * np.sin(angle) ** 2) / whole
        slope += 1.0 / np.sqrt(1.0 - crowd * np.sin(angle - centre) ** 2) / own
        short = wanted - ellipkinc(angle, flat) / whole - ellipkinc(angle - centre, crowd) / own - offset
        low, high = np.where(short > 0.0, angle, low), np.where(short > 0.0, high, angle)
        newton = angle + short / slope
        if np.all(np.abs(newton - angle) < 1e-11):
            angle = newton
            break
        angle = np.where((newton > low) & (newton < high), newton, 0.5 * (low + high))
    return angle, 1.0 / (count * slope)


def _towards(centre, reach, flat, edged, count):
    """Angles and weights (M, K) of the directions within `reach` (M,) of the centre (M,)."""
    from scipy.special import ellipj, ellipkinc

    low, high = (ellipkinc(centre + side * reach, flat)[:, None] for side in (-1.0, 1.0))
    even = 2.0 * (np.arange(count) + 0.5) / count - 1.0
    place, step = (np.sin(0.5 * pi * even), 0.5 * pi * np.cos(0.5 * pi * even)) if edged else (even, np.ones(count))
    _, _, slope, angle = ellipj(0.5 * (high + low) + 0.5 * (high - low) * place, flat)
    return angle, slope * (high - low) * step / count
