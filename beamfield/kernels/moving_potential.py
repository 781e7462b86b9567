"""The Lorenz-gauge potentials of point charges in uniform motion, summed over charges, in their order.

Seen at d from a charge of momentum u = gamma beta, softened by a in its rest frame:

    phi = q gamma / (4 pi eps0 sqrt(|d|^2 + (u . d)^2 + a^2)),     c A = beta phi = u phi / gamma
"""

import numpy as np
from numba import prange

from beamfield.kernels.compiled import compiled


@compiled(inline="always")
def one_potential(dx, dy, dz, ux, uy, uz, a2):
    """phi / gamma / (q / 4 pi eps0) of one charge seen now at (dx, dy, dz) from it, 0 where infinite [1/m]."""
    along = ux * dx + uy * dy + uz * dz
    r2 = dx * dx + dy * dy + dz * dz + along * along + a2
    return 1.0 / np.sqrt(r2) if r2 > 0.0 else 0.0


@compiled(parallel=True)
def potential(points, positions, weights, momentum, a2, out):
    """Fill out (M,) with the sum of phi / gamma over sources (3, N) of one shared momentum (3,), at points (3, M)."""
    ux, uy, uz = momentum[0], momentum[1], momentum[2]
    for m in prange(points.shape[1]):
        total = 0.0
        for j in range(positions.shape[1]):
            dx, dy, dz = points[0, m] - positions[0, j], points[1, m] - positions[1, j], points[2, m] - positions[2, j]
            total += weights[j] * one_potential(dx, dy, dz, ux, uy, uz, a2)
        out[m] = total


@compiled(parallel=True)
def potential_each(points, positions, weights, momenta, a2, out):
    """Fill out (4, M) with the sums of phi and of u phi / gamma over sources with a momentum each (3, N)."""
    for m in prange(points.shape[1]):
        phi, ax, ay, az = 0.0, 0.0, 0.0, 0.0
        for j in range(positions.shape[1]):
            dx, dy, dz = points[0, m] - positions[0, j], points[1, m] - positions[1, j], points[2, m] - positions[2, j]
            ux, uy, uz = momenta[0, j], momenta[1, j], momenta[2, j]
            share = weights[j] * one_potential(dx, dy, dz, ux, uy, uz, a2)
            phi += np.sqrt(1.0 + ux * ux + uy * uy + uz * uz) * share
            ax += ux * share
            ay += uy * share
            az += uz * share
        out[0, m], out[1, m], out[2, m], out[3, m] = phi, ax, ay, az
