"""Charges placed for each probe: the field of a bunch known as a density, as a sum of moving charges round the probe.

In the frame of the bunch a charge stands at (rho cos phi, rho sin phi, rho sinh zeta) from the probe and carries the
charge of its cell, n rho^2 cosh(zeta) drho dphi dzeta. The inverse square of its field and the size of its cell
cancel: there is nothing to soften and no bias. Between the limits chosen here the density is smooth, so that Gauss
nodes converge fast:

    phi    even in the angle that an elliptic section asks for; only directions that meet the bunch
    rho    from where a ray enters the elliptic cylinder about the bunch to where it leaves it, even in asinh(rho /
    near):
           `near` is how far along z the density is the same; the logarithm at the probe is mapped away
    zeta   in pairs above and below the probe as far as both reach, then the rest of the longer side
"""

import math

from numba import prange

from beamfield.kernels.azimuths import ON_EDGE
from beamfield.kernels.compiled import compiled
from beamfield.kernels.moving_charge import one_charge

GAUSSIAN, FLAT, PARABOLIC, COASTING = 0, 1, 2, 3
PAIRED = 2.0  # rms lengths from the middle of a Gaussian up to which all heights are paired


@compiled(inline="always")
def profile(kind, t):
    """Density profile against t = (x/a)^2: exp(-t/2) of a Gaussian, 1 or 1 - t inside an edge."""
    if kind == GAUSSIAN:
        return math.exp(-0.5 * t)
    if kind == PARABOLIC:
        return max(0.0, 1.0 - t)
    return 1.0


@compiled(inline="always")
def chord(px, py, cos, sin, edge2):
    """Where a ray from (px, py) enters and leaves the circle of radius^2 edge2; (0, 0) when it never does."""
    middle = -(px * cos + py * sin)
    half2 = edge2 - px * px - py * py + middle * middle
    if half2 <= 0.0:
        return 0.0, 0.0
    half = math.sqrt(half2)
    return max(0.0, middle - half), max(0.0, middle + half)


@compiled(inline="always")
def spread(x, inside, pancake):
    """Node x of (0, 1) and its stretch: crowded at a probe inside the bunch, and at the far end too in a pancake."""
    if not inside:
        return x, 1.0
    if pancake:
        return x * x * (3.0 - 2.0 * x), 6.0 * x * (1.0 - x)
    return x * x, 2.0 * x


@compiled()
def column(x, y, z, rho, weight, line, heights, gamma):
    """Field and potential of the charges that stand above and below one place (x, y) from a probe at height z.

    The potential of a charge is its rest-frame field times its distance, taken along it: nothing new to compute.
    """
    c, top, along, endless = line
    many, w_many, few, w_few = heights
    u = math.sqrt((gamma - 1.0) * (gamma + 1.0))
    ex = ey = ez = phi = 0.0
    if along == COASTING:
        inner, outer, side = endless, endless, 1.0
    else:
        inner, outer = math.asinh((top - abs(z)) / rho), math.asinh((top + abs(z)) / rho)
        side = -1.0 if z > 0.0 else 1.0
        if along == GAUSSIAN and abs(z) < PAIRED * c:
            inner = outer
    for part in range(2):
        low, high, signs = (0.0, inner, 2) if part == 0 else (abs(inner), outer, 1)
        longer = part == 0 if along == GAUSSIAN else (part == 0) == (inner >= 0.5 * outer)
        nodes, weights = (many, w_many) if longer else (few, w_few)
        if high <= low:
            continue
        for k in range(nodes.shape[0]):
            grow = math.exp(low + (high - low) * nodes[k])
            height = 0.5 * rho * (grow - 1.0 / grow)
            cell = weight * 0.5 * rho * (grow + 1.0 / grow) * (high - low) * weights[k]
            for s in range(signs):
                dz = side * height if s == 0 else -side * height
                place = (z + dz) / c
                charge = cell * profile(along, place * place)
                fx, fy, fz = one_charge(-x, -y, -dz / gamma, 0.0, 0.0, u, 0.0)
                ex += charge * fx
                ey += charge * fy
                ez += charge * fz
                phi -= charge * (x * fx + y * fy + gamma * dz * fz)
    return ex, ey, ez, phi


@compiled(parallel=True)
def probe_field(
    probes, scales, kinds, window, azimuth, w_azimuth, radial, w_radial, many, w_many, few, w_few, gamma, out
):
    """Fill out (3, M) with lab E / gamma at probes (3, M), given in the frame of the bunch, per unit central density.

    scales (a, b, c), kinds (across, along): the density is profile(x2/a2 + y2/b2) profile(z2/c2);
    azimuth (M, 2, K) and w_azimuth (M, K), directions for each probe in units of a and b; other nodes on (0, 1).
    `window` rms lengths of a Gaussian are kept, and the charges of a coasting beam out to zeta = 2 window, where they
    add e^(-4 window). A fourth row of out takes phi / gamma; a coasting beam has none.
    """
    a, b, c = scales
    across, along = kinds
    heights = (many, w_many, few, w_few)
    edge2 = window * window if across == GAUSSIAN else 1.0
    for m in prange(probes.shape[1]):
        px, py, z = probes[0, m] / a, probes[1, m] / b, probes[2, m]
        d2 = px * px + py * py
        inside = d2 < (edge2 if across == GAUSSIAN else ON_EDGE**2)
        pancake = c * c < a * b
        line = (c, c * (window if along == GAUSSIAN else 1.0), along, 2.0 * window)
        near = max(abs(c - abs(z)), 0.15 * c) if along == FLAT else c
        ex = ey = ez = phi = 0.0
        for i in range(azimuth.shape[2]):
            cos, sin = azimuth[m, 0, i], azimuth[m, 1, i]
            stretch = math.hypot(a * cos, b * sin)
            enter, leave = chord(px, py, cos, sin, edge2)
            if leave <= enter:
                continue
            scale = near / stretch
            first, last = math.asinh(enter / scale), math.asinh(leave / scale)
            for j in range(radial.shape[0]):
                v, dv = spread(radial[j], inside, pancake)
                w = first + (last - first) * v
                r = scale * math.sinh(w)
                dr = scale * math.cosh(w) * (last - first) * dv * w_radial[j]
                qx, qy = px + r * cos, py + r * sin
                weight = profile(across, qx * qx + qy * qy) * a * b * r * dr * w_azimuth[m, i]
                if weight > 0.0:
                    x, y = r * a * cos, r * b * sin
                    fx, fy, fz, f = column(x, y, z, r * stretch, weight, line, heights, gamma)
                    ex += fx
                    ey += fy
                    ez += fz
                    phi += f
        out[0, m], out[1, m], out[2, m] = ex, ey, ez
        if out.shape[0] > 3:
            out[3, m] = phi
