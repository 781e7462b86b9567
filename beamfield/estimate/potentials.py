"""The potentials of charges that somebody lists, in the Lorenz gauge."""

import numpy as np

from beamfield.constants import COULOMB, SPEED_OF_LIGHT
from beamfield.errors import CallError
from beamfield.estimate.superposition import finite, rows


def potentials(points, positions, charges, momenta, cloud=0.0):
    """phi (M,) [V] and A (3, M) [T m], now, of N uniformly moving charges; arguments as for superpose.

    Nought far away; a charge adds nothing at its own place, unless a cloud makes it finite there. About one charge the
    surfaces of equal phi are the ellipsoids |d|^2 + (u . d)^2 = constant.
    Source: Lienard-Wiechert potentials of uniform motion; J. D. Jackson, Classical Electrodynamics, 3rd ed., eq. 14.8,
    from memory of it.
    """
    from beamfield.kernels import moving_potential

    points, positions = rows("points", points), rows("positions", positions)
    momenta = finite("momenta", np.ascontiguousarray(momenta, float))
    if momenta.shape not in ((3,), positions.shape):
        raise CallError(f"momenta: shape {momenta.shape} is neither (3,) nor {positions.shape}")
    weights = COULOMB * np.ascontiguousarray(np.broadcast_to(finite("charges", charges), positions.shape[1:]))
    if momenta.ndim == 2:
        both = np.empty((4, points.shape[1]))
        moving_potential.potential_each(points, positions, weights, momenta, cloud**2, both)
        return both[0], both[1:] / SPEED_OF_LIGHT
    share = np.empty(points.shape[1])
    moving_potential.potential(points, positions, weights, momenta, cloud**2, share)
    return np.sqrt(1.0 + momenta @ momenta) * share, np.outer(momenta, share) / SPEED_OF_LIGHT
