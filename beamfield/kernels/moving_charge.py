"""The field of point charges in uniform motion, and its sum over charges, in their order, in strict arithmetic.

Heaviside's field of a charge seen at d from it, with momentum u = gamma beta and softening length a in its rest frame:

    E = q gamma d / (4 pi eps0 (|d|^2 + (u . d)^2 + a^2)^(3/2)),     B = u x E / (gamma c)
"""

import numpy as np
from numba import prange

from beamfield.kernels.compiled import compiled

LANES = 32  # points carried together; the inner loop fills vector registers


@compiled(inline="always")
def one_charge(dx, dy, dz, ux, uy, uz, a2):
    """E / gamma / (q / 4 pi eps0) of a charge of momentum u = gamma beta, seen now at (dx, dy, dz) from it [1/m^2]."""
    along = ux * dx + uy * dy + uz * dz
    r2 = dx * dx + dy * dy + dz * dz + along * along + a2
    s = 1.0 / (r2 * np.sqrt(r2)) if r2 > 0.0 else 0.0
    return s * dx, s * dy, s * dz


@compiled(parallel=True)
def superpose(points, positions, weights, momentum, a2, out):
    """Fill out (3, M) with the sum over sources (3, N) of one shared momentum (3,), in order, at points (3, M)."""
    ux, uy, uz = momentum[0], momentum[1], momentum[2]
    count = points.shape[1]
    for block in prange((count + LANES - 1) // LANES):
        first = block * LANES
        here = min(LANES, count - first)
        x, y, z = np.zeros(LANES), np.zeros(LANES), np.zeros(LANES)
        ex, ey, ez = np.zeros(LANES), np.zeros(LANES), np.zeros(LANES)
        for k in range(here):
            x[k], y[k], z[k] = points[0, first + k], points[1, first + k], points[2, first + k]
        for j in range(positions.shape[1]):
            sx, sy, sz, w = positions[0, j], positions[1, j], positions[2, j], weights[j]
            for k in range(LANES):
                fx, fy, fz = one_charge(x[k] - sx, y[k] - sy, z[k] - sz, ux, uy, uz, a2)
                ex[k] += w * fx
                ey[k] += w * fy
                ez[k] += w * fz
        for k in range(here):
            out[0, first + k], out[1, first + k], out[2, first + k] = ex[k], ey[k], ez[k]


@compiled(parallel=True)
def superpose_each(points, positions, weights, momenta, a2, out):
    """Fill out (6, M) with sums of E and of u x E / gamma over sources with a momentum each (3, N), in order."""
    count = points.shape[1]
    for block in prange((count + LANES - 1) // LANES):
        first = block * LANES
        here = min(LANES, count - first)
        x, y, z = np.zeros(LANES), np.zeros(LANES), np.zeros(LANES)
        ex, ey, ez = np.zeros(LANES), np.zeros(LANES), np.zeros(LANES)
        bx, by, bz = np.zeros(LANES), np.zeros(LANES), np.zeros(LANES)
        for k in range(here):
            x[k], y[k], z[k] = points[0, first + k], points[1, first + k], points[2, first + k]
        for j in range(positions.shape[1]):
            sx, sy, sz, w = positions[0, j], positions[1, j], positions[2, j], weights[j]
            ux, uy, uz = momenta[0, j], momenta[1, j], momenta[2, j]
            e = w * np.sqrt(1.0 + ux * ux + uy * uy + uz * uz)
            for k in range(LANES):
                fx, fy, fz = one_charge(x[k] - sx, y[k] - sy, z[k] - sz, ux, uy, uz, a2)
                ex[k] += e * fx
                ey[k] += e * fy
                ez[k] += e * fz
                bx[k] += w * (uy * fz - uz * fy)
                by[k] += w * (uz * fx - ux * fz)
                bz[k] += w * (ux * fy - uy * fx)
        for k in range(here):
            out[0, first + k], out[1, first + k], out[2, first + k] = ex[k], ey[k], ez[k]
            out[3, first + k], out[4, first + k], out[5, first + k] = bx[k], by[k], bz[k]
