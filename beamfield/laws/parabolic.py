"""Parabolic ellipsoid of unit charge, in its rest frame.

Density 15 / (8 pi a b c) (1 - m^2) inside m^2 = sum x_i^2 / a_i^2 = 1.
Fields are over q / (4 pi eps0): [1/m^2] for one unit of charge.
Source: the confocal integral, O. D. Kellogg, Foundations of Potential Theory, 1929, ch. VII, sec. 6 (from memory of
it).
"""

import numpy as np

from beamfield.laws.confocal import confocal_integral, confocal_root
from beamfield.laws.ellipsoid import carlson_slopes


def parabolic_ellipsoid_field(points, semi_axes):
    """Field (3, M) [1/m^2] at points (3, M) [m], inside, outside and on the surface; semi_axes (3,) [m].

    E_i = 15/4 x_i integral_lambda^inf (1 - m^2(s)) ds / ((a_i^2 + s) Delta(s)); the integrand is analytic and the
    trapezoidal rule in ln(s - lambda) exact to rounding.
    """
    squares = np.asarray(semi_axes, dtype=float) ** 2
    root = confocal_root(points, squares)
    return 3.75 * points * confocal_integral(points, squares, root, lambda m2: 1.0 - m2)


def parabolic_ellipsoid_gradient(semi_axes):
    """Slopes dE_i/dx_i (3,) [1/m^3] at the centre: 5/2 of those of a uniform ellipsoid of the same edge."""
    return 2.5 * carlson_slopes(np.asarray(semi_axes, dtype=float) ** 2)


def parabolic_ellipsoid_centre_potential(semi_axes):
    """Potential [1/m] at the centre, zero at infinity: 15/8 R_F(a^2, b^2, c^2)."""
    from scipy.special import elliprf

    return 1.875 * float(elliprf(*(np.asarray(semi_axes, dtype=float) ** 2)))
