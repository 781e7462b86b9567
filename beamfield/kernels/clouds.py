"""Charges that each stand for many: small clouds of fourth order, round or drawn out along z, in uniform motion.

A round cloud of size a has, in its rest frame, the field r (r^2 + 5/2 a^2) / (r^2 + a^2)^(5/2): its second moment
vanishes, so that it blurs a smooth bunch by a^4 only. A rod spreads such clouds over 2 h along z; four thirds of a
rod less one third of a rod twice as long has no second moment either.
"""

import math

from numba import prange

from beamfield.kernels.compiled import compiled


@compiled(inline="always")
def one_cloud(dx, dy, dz, ux, uy, uz, a2):
    """E / gamma / (q / 4 pi eps0) of a round cloud of momentum u = gamma beta, seen now at (dx, dy, dz) from it
    [1/m^2].
    """
    along = ux * dx + uy * dy + uz * dz
    r2 = dx * dx + dy * dy + dz * dz + along * along
    s2 = r2 + a2
    s = (r2 + 2.5 * a2) / (s2 * s2 * math.sqrt(s2)) if s2 > 0.0 else 0.0
    return s * dx, s * dy, s * dz


@compiled(inline="always")
def half_rod(rho2, z, a2):
    """Field across over rho, and potential, of clouds spread from -infinity to z, less what both ends share; rest
    frame.
    """
    p2 = rho2 + a2
    s2 = p2 + z * z
    s = math.sqrt(s2)
    across = z / (p2 * s) * (1.0 + a2 / p2 + 0.5 * a2 / s2)
    return across, (1.0 + 0.5 * a2 / s2) / s


@compiled(parallel=True)
def superpose_clouds(points, positions, weights, momenta, a2, out):
    """Fill out (6, M) with sums of E and of u x E / gamma over round clouds, each with its momentum (3, N), in
    order.
    """
    for m in prange(points.shape[1]):
        x, y, z = points[0, m], points[1, m], points[2, m]
        ex = ey = ez = bx = by = bz = 0.0
        for j in range(positions.shape[1]):
            ux, uy, uz = momenta[0, j], momenta[1, j], momenta[2, j]
            gamma = math.sqrt(1.0 + ux * ux + uy * uy + uz * uz)
            fx, fy, fz = one_cloud(x - positions[0, j], y - positions[1, j], z - positions[2, j], ux, uy, uz, a2)
            fx, fy, fz = weights[j] * fx, weights[j] * fy, weights[j] * fz
            ex += gamma * fx
            ey += gamma * fy
            ez += gamma * fz
            bx += uy * fz - uz * fy
            by += uz * fx - ux * fz
            bz += ux * fy - uy * fx
        out[0, m], out[1, m], out[2, m] = ex, ey, ez
        out[3, m], out[4, m], out[5, m] = bx, by, bz


@compiled(parallel=True)
def superpose_rods(points, positions, weights, gamma, h, a2, out):
    """Fill out (3, M) with lab E / gamma of rods of half length h, rest frame, that share one motion along z, in
    order.
    """
    for m in prange(points.shape[1]):
        x, y, z = points[0, m], points[1, m], points[2, m]
        ex = ey = ez = 0.0
        for j in range(positions.shape[1]):
            dx, dy, dz = x - positions[0, j], y - positions[1, j], gamma * (z - positions[2, j])
            rho2 = dx * dx + dy * dy
            across = up = 0.0
            for rod in range(2):
                reach = h if rod == 0 else 2.0 * h
                share = weights[j] * (2.0 / 3.0 if rod == 0 else -1.0 / 12.0) / h
                top, phi_top = half_rod(rho2, dz + reach, a2)
                bottom, phi_bottom = half_rod(rho2, dz - reach, a2)
                across += share * (top - bottom)
                up += share * (phi_bottom - phi_top)
            ex += across * dx
            ey += across * dy
            ez += up / gamma
        out[0, m], out[1, m], out[2, m] = ex, ey, ez
