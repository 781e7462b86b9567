"""Charges on rays from each probe: the field of an ellipsoid, full or parabolic, as a sum of moving charges.

In the frame of the bunch a ray leaves the probe at azimuth phi and slope h = dz/drho = k sinh(eta). Two charges stand
on its chord through the ellipsoid, at Gauss nodes, and carry n rho^2 drho dh dphi: exact along the chord for a
density of second degree, with nothing to soften. From inside rays go out in pairs, up and down, and the roots in the
two chords cancel; from outside only the slopes of the tangent cone count.
"""

import math

from numba import prange

from beamfield.kernels.compiled import compiled
from beamfield.kernels.moving_charge import one_charge

LEFT, RIGHT = 0.5 - 0.5 / math.sqrt(3.0), 0.5 + 0.5 / math.sqrt(3.0)  # two Gauss nodes of (0, 1)
ON_SURFACE = 1.0 + 1e-12  # squared scaled distance up to which a probe counts as inside: a rounding or two
STEEPEST = 16.0  # eta beyond the steepest diagonal of the ellipsoid, where e^-2 eta has nothing left to add


@compiled(inline="always")
def slopes(d2, height, b, steepest):
    """Downward slopes, in scaled lengths, at which a ray from outside meets the unit sphere; b, its way from the axis.

    d2 and height >= 0 are the probe's place; low >= high when no slope does.
    """
    beyond = d2 + height * height - 1.0
    root2 = beyond * (b * b + 1.0 - d2)
    if root2 <= 0.0 or (d2 >= 1.0 and b >= 0.0):
        return 0.0, 0.0
    root = math.sqrt(root2)
    if d2 < 1.0:
        return (b * height + root) / (1.0 - d2), steepest
    return max(-steepest, (-b * height - root) / (d2 - 1.0)), min(steepest, (-b * height + root) / (d2 - 1.0))


@compiled(inline="always")
def two_charges(p, cos, sin, w, scales, degree, weight, u, gamma):
    """Field and potential of the two charges on the chord of one ray from p, all in scaled lengths; w, its slope."""
    a, b, c = scales
    square = 1.0 + w * w
    along = p[0] * cos + p[1] * sin + p[2] * w
    beyond = p[0] * p[0] + p[1] * p[1] + p[2] * p[2] - 1.0
    root2 = along * along - square * beyond
    ex = ey = ez = phi = 0.0
    if root2 > 0.0:
        root = math.sqrt(root2)
        first, last = max(0.0, (-along - root) / square), max(0.0, (root - along) / square)
        for part in (LEFT, RIGHT):
            r = first + (last - first) * part
            inside = -beyond - r * (2.0 * along + r * square)
            charge = 0.5 * weight * (last - first) * r * r * (inside if degree == 2 else 1.0)
            fx, fy, fz = one_charge(-r * a * cos, -r * b * sin, -r * w * c / gamma, 0.0, 0.0, u, 0.0)
            ex += charge * fx
            ey += charge * fy
            ez += charge * fz
            phi -= charge * r * (a * cos * fx + b * sin * fy + gamma * w * c * fz)
    return ex, ey, ez, phi


@compiled(parallel=True)
def ray_field(probes, scales, degree, azimuth, w_azimuth, paired, w_paired, single, w_single, gamma, out):
    """Fill out (3, M) with lab E / gamma at probes (3, M), given in the frame of the bunch, per unit central density.

    scales (a, b, c), semi-axes there; degree 0 or 2, density 1 or 1 - x2/a2 - y2/b2 - z2/c2 inside; azimuth (M, 2, K)
    and w_azimuth (M, K), directions for each probe in units of a and b; paired and single, nodes on (0, 1) for eta.
    A fourth row of out takes phi / gamma.
    """
    a, b, c = scales
    u = math.sqrt((gamma - 1.0) * (gamma + 1.0))
    for m in prange(probes.shape[1]):
        p = (probes[0, m] / a, probes[1, m] / b, probes[2, m] / c)
        d2, height = p[0] * p[0] + p[1] * p[1], abs(p[2])
        inside = d2 + height * height <= ON_SURFACE
        down = -1.0 if p[2] >= 0.0 else 1.0
        ex = ey = ez = phi = 0.0
        for i in range(azimuth.shape[2]):
            cos, sin = azimuth[m, 0, i], azimuth[m, 1, i]
            stretch = math.hypot(a * cos, b * sin)
            unit = min(stretch / c, 1.0)  # scaled slope at which sinh(eta) is one
            steepest = math.exp(STEEPEST) * max(1.0, stretch / c)
            if inside:
                low, high = -steepest, steepest
            else:
                low, high = slopes(d2, height, p[0] * cos + p[1] * sin, steepest)
            if high <= low:
                continue
            low, high = math.asinh(low / unit), math.asinh(high / unit)
            common = max(0.0, min(-low, high))
            side = 1.0 if high >= -low else -1.0
            other, rest = (max(common, low), high) if side > 0.0 else (max(common, -high), -low)
            cell = w_azimuth[m, i] * a * b * stretch * unit * c / stretch
            for part in range(2):
                start, length = (0.0, common) if part == 0 else (other, rest - other)
                nodes, weights = (paired, w_paired) if part == 0 else (single, w_single)
                for k in range(nodes.shape[0] if length > 0.0 else 0):
                    x, dx = nodes[k], 1.0
                    if not inside:
                        x, dx = x * x * (3.0 - 2.0 * x), 6.0 * x * (1.0 - x)
                    eta = start + length * x
                    slope = unit * math.sinh(eta)
                    weight = cell * math.cosh(eta) * length * dx * weights[k]
                    for s in range(2 - part):
                        w = slope * down * side * (1.0 if s == 0 else -1.0)
                        fx, fy, fz, f = two_charges(p, cos, sin, w, scales, degree, weight, u, gamma)
                        ex += fx
                        ey += fy
                        ez += fz
                        phi += f
        out[0, m], out[1, m], out[2, m] = ex, ey, ez
        if out.shape[0] > 3:
            out[3, m] = phi
