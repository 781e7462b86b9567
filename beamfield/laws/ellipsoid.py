"""Uniform ellipsoid of unit charge, in its rest frame: field, slopes and potential by Carlson's integrals.

Fields are over q / (4 pi eps0): [1/m^2] for one unit of charge; potentials [1/m].
Source: NIST Digital Library of Mathematical Functions, eqs. 19.33.4-8 (read).
"""

import numpy as np

from beamfield.laws.confocal import confocal_root


def carlson_slopes(squares):
    """R_D(b^2, c^2, a^2) and its two likes [1/m^3] for squares a^2, b^2, c^2, (3,) or (3, M) [m^2]; same shape."""
    from scipy.special import elliprd

    a2, b2, c2 = squares
    return np.array([elliprd(b2, c2, a2), elliprd(c2, a2, b2), elliprd(a2, b2, c2)])


def depolarisation_factors(semi_axes):
    """Factors L_i (3,) of a uniform ellipsoid: E_i = L_i rho x_i / eps0 inside; they sum to 1.

        L_i = a b c / 3  R_D(.., .., a_i^2)

    semi_axes (3,) [m]. Each is found by itself, none as what the others leave, so the small ones keep all their digits.
    """
    axes = np.asarray(semi_axes, dtype=float)
    return axes.prod() / 3.0 * carlson_slopes(axes**2)


def uniform_ellipsoid_gradient(semi_axes):
    """Slopes dE_i/dx_i (3,) [1/m^3] inside; semi_axes (3,) [m]."""
    return carlson_slopes(np.asarray(semi_axes, dtype=float) ** 2)


def uniform_ellipsoid_field(points, semi_axes):
    """Field (3, M) [1/m^2] at points (3, M) [m], inside, outside and on the surface.

    E_i = x_i R_D(.., .., a_i^2 + lambda), lambda the confocal root, 0 inside.
    """
    squares = np.asarray(semi_axes, dtype=float)[:, None] ** 2
    return points * carlson_slopes(squares + confocal_root(points, squares[:, 0]))


def uniform_ellipsoid_potential(points, semi_axes):
    """Potential (M,) [1/m] at points (3, M) [m], 0 at infinity: 3/2 R_F - 1/2 sum x_i^2 R_D,i at the confocal root."""
    from scipy.special import elliprf

    squares = np.asarray(semi_axes, dtype=float)[:, None] ** 2
    squares = squares + confocal_root(points, squares[:, 0])
    return 1.5 * elliprf(*squares) - 0.5 * (points**2 * carlson_slopes(squares)).sum(axis=0)
