"""The potentials of the clouds and rods that stand for many charges each: the twins of their fields.

A round cloud of size a has, in its rest frame, the potential (r^2 + 3/2 a^2) / (r^2 + a^2)^(3/2). A rod has its mean
over 2 h along z: four thirds of one, less one third of one twice as long.
"""

import math

from numba import prange

from beamfield.kernels.compiled import compiled


@compiled(parallel=True)
def potential_of_clouds(points, positions, weights, momenta, a2, out):
    """Fill out (4, M) with the sums of phi and of u phi / gamma over round clouds, each with its momentum (3, N)."""
    for m in prange(points.shape[1]):
        phi, ax, ay, az = 0.0, 0.0, 0.0, 0.0
        for j in range(positions.shape[1]):
            dx, dy, dz = points[0, m] - positions[0, j], points[1, m] - positions[1, j], points[2, m] - positions[2, j]
            ux, uy, uz = momenta[0, j], momenta[1, j], momenta[2, j]
            along = ux * dx + uy * dy + uz * dz
            s2 = dx * dx + dy * dy + dz * dz + along * along + a2
            share = weights[j] * (1.0 + 0.5 * a2 / s2) / math.sqrt(s2) if s2 > 0.0 else 0.0
            phi += math.sqrt(1.0 + ux * ux + uy * uy + uz * uz) * share
            ax += ux * share
            ay += uy * share
            az += uz * share
        out[0, m], out[1, m], out[2, m], out[3, m] = phi, ax, ay, az


@compiled(inline="always")
def half_line(p2, z, a2):
    """Integral from 0 to z of the potential of round clouds along a line, p2 = rho2 + a2 from it."""
    s = math.sqrt(p2 + z * z)
    return math.asinh(z / math.sqrt(p2)) + 0.5 * a2 * z / (p2 * s)


@compiled(parallel=True)
def potential_of_rods(points, positions, weights, gamma, h, a2, out):
    """Fill out (M,) with phi / gamma of rods of half length h, rest frame, that share one motion along z; a2 > 0."""
    for m in prange(points.shape[1]):
        phi = 0.0
        for j in range(positions.shape[1]):
            dx, dy, dz = points[0, m] - positions[0, j], points[1, m] - positions[1, j], points[2, m] - positions[2, j]
            p2, z = dx * dx + dy * dy + a2, gamma * dz
            one = half_line(p2, z + h, a2) - half_line(p2, z - h, a2)
            two = half_line(p2, z + 2.0 * h, a2) - half_line(p2, z - 2.0 * h, a2)
            phi += weights[j] * (8.0 * one - two) / (12.0 * h)
        out[m] = phi
