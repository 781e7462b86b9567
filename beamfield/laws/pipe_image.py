"""What the charge induced on a round pipe adds on the axis, for a bunch in its rest frame, of unit charge.

    phi = -(2 / pi b) integral_0^inf F(u/b) cos(u z / b) K_0(u) / I_0(u) du

F the form factor of the bunch. Over q / (4 pi eps0): potential [1/m], field [1/m^2], slope [1/m^3].
Source: Green's function of the cylinder, J. D. Jackson, Classical Electrodynamics, 3rd ed., sec. 3.11 (from memory of
it), of which only the part even round the axis is felt there.
"""

from math import pi

import numpy as np

_GAUSS = np.polynomial.legendre.leggauss(14)
LAST = 20.0  # K_0 / I_0 has fallen to exp(-40), with a beam as wide as the pipe the integrand to exp(-20)
_FIRST = 1e-12


def nodes(form, wall, length, last=LAST):
    """u (K,) and the weights (K,) of the integral, with K_0 / I_0 and the form factor in them.

    form(k) with k in 1/m; wall b [m]; length [m] sets how fast the form factor turns, a panel each turn;
    last, of u.
    """
    from scipy.special import i0e, k0e

    turn = min(2.0 * pi * wall / length, 0.25 * last)
    edges = np.concatenate([[0.0], np.geomspace(_FIRST, 1.0, 41) * turn])
    edges = np.concatenate([edges, np.linspace(turn, last, 2 + int((last - turn) / min(turn, 1.0)))[1:]])
    middle, half = 0.5 * (edges[1:] + edges[:-1]), 0.5 * np.diff(edges)
    u = (middle[:, None] + half[:, None] * _GAUSS[0]).ravel()
    weights = (half[:, None] * _GAUSS[1]).ravel()
    return u, weights * form(u / wall) * k0e(u) / i0e(u) * np.exp(-2.0 * u)


def image_potential(u, weights, wall):
    """phi [1/m] at the centre."""
    return -2.0 / (pi * wall) * float(weights.sum())


def image_slope(u, weights, wall):
    """dE_z/dz [1/m^3] at the centre."""
    return -2.0 / (pi * wall**3) * float(weights @ (u * u))


def image_field(z, u, weights, wall):
    """E_z (M,) [1/m^2] at z (M,) [m] on the axis."""
    z = np.atleast_1d(np.asarray(z, float)) / wall
    return -2.0 / (pi * wall**2) * np.array([(weights * u) @ np.sin(u * place) for place in z])
