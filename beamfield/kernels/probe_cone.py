"""Charges on rays from a probe outside a long ellipsoid: slopes first, then the azimuths at which a slope meets it.

What `probe_rays` does from inside, in the other order: at a slope the ellipsoid fills one sector of azimuth about the
way to its axis, with chords that vanish as roots at both ends, and the sum over the sector is smooth in the slope.
The charges of one slope and of its mirror stand on equal nodes, so that the small field along the needle keeps its
digits.
"""

import math

from numba import prange

from beamfield.kernels.compiled import compiled
from beamfield.kernels.probe_rays import STEEPEST, slopes, two_charges


@compiled()
def one_slope(p, v, turn, scales, degree, weight, count, u, gamma):
    """Field of all charges at downward slope v, scaled, from p (p[2] >= 0); turn, angle of the way to the axis."""
    d, beyond = math.hypot(p[0], p[1]), p[0] * p[0] + p[1] * p[1] + p[2] * p[2] - 1.0
    ex = ey = ez = 0.0
    reach = math.sqrt((1.0 + v * v) * beyond) - p[2] * v
    if reach >= d:
        return ex, ey, ez
    around = reach <= -d
    half = math.pi if around else math.acos(reach / d)
    squeeze = math.sqrt(scales[0] / scales[1])
    first, last = even_angle(turn - half, squeeze), even_angle(turn + half, squeeze)
    for k in range(count):
        x = (k + 0.5) / count
        if around:
            angle, step = first + (last - first) * x, (last - first) / count
        else:
            psi = math.pi * (x - 0.5)
            angle = 0.5 * (first + last) + 0.5 * (last - first) * math.sin(psi)
            step = 0.5 * (last - first) * math.cos(psi) * math.pi / count
        cos, sin = math.cos(angle), squeeze * math.sin(angle)
        norm = 1.0 / math.sqrt(cos * cos + sin * sin)
        charge = weight * step * squeeze * norm * norm
        fx, fy, fz = two_charges(p, cos * norm, sin * norm, -v, scales, degree, charge, u, gamma)
        ex += fx
        ey += fy
        ez += fz
    return ex, ey, ez


@compiled(inline="always")
def even_angle(angle, squeeze):
    """Angle whose tangent is smaller by `squeeze`, in the same turn: even steps of it suit an elliptic section."""
    turns = math.floor(angle / math.pi + 0.5)
    return math.atan(math.tan(angle - turns * math.pi) / squeeze) + turns * math.pi


@compiled(parallel=True)
def cone_field(probes, scales, degree, count, nodes, weights, gamma, out):
    """Fill out (3, M) as `probe_rays.ray_field` does, for probes outside; count azimuths, nodes on (0, 1) for the
    slopes.

    Three parts of the slopes take the same nodes: pairs up and down about the level, the rest of the longer side, and
    what meets the ellipsoid at every azimuth, from above or below it.
    """
    a, b, c = scales
    u = math.sqrt((gamma - 1.0) * (gamma + 1.0))
    for m in prange(probes.shape[1]):
        p = (probes[0, m] / a, probes[1, m] / b, abs(probes[2, m]) / c)
        mirror = 1.0 if probes[2, m] >= 0.0 else -1.0
        d = math.hypot(p[0], p[1])
        turn = math.atan2(-p[1], -p[0])
        unit = min(math.sqrt(a * b) / c, 1.0)
        steepest = math.exp(STEEPEST) * max(1.0, math.sqrt(a * b) / c)
        low, high = slopes(d * d, p[2], -d, steepest)
        everywhere = slopes(d * d, p[2], d, steepest)[0] if d < 1.0 else high
        low, high, everywhere = math.asinh(low / unit), math.asinh(high / unit), math.asinh(everywhere / unit)
        common = max(0.0, min(-low, everywhere))
        side = 1.0 if everywhere >= -low else -1.0
        ends = (max(common, low), everywhere) if side > 0.0 else (max(common, -everywhere), -low)
        ex = ey = ez = 0.0
        for part in range(3):
            if part == 0:
                start, length = 0.0, common
            elif part == 1:
                start, length = ends[0], ends[1] - ends[0]
            else:
                start, length = everywhere, high - everywhere
            for k in range(nodes.shape[0] if length > 0.0 else 0):
                x, dx = nodes[k], 1.0
                if part > 0:
                    x, dx = x * x * (3.0 - 2.0 * x), 6.0 * x * (1.0 - x)
                eta = start + length * x
                weight = a * b * c * unit * math.cosh(eta) * length * dx * weights[k]
                for s in range(2 if part == 0 else 1):
                    sign = 1.0 if part == 2 else (side if s == 0 else -side)
                    fx, fy, fz = one_slope(
                        p, sign * unit * math.sinh(eta), turn, scales, degree, weight, count, u, gamma
                    )
                    ex += fx
                    ey += fy
                    ez += fz
        out[0, m], out[1, m], out[2, m] = ex, ey, mirror * ez
