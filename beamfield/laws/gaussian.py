"""Gaussian bunch of unit charge, in its rest frame, with three rms sizes.

Fields are over q / (4 pi eps0): [1/m^2] for one unit of charge.
Source: the confocal integral, O. D. Kellogg, Foundations of Potential Theory, 1929, ch. VII, sec. 6 (from memory of
it).
"""

from math import pi, sqrt

import numpy as np

from beamfield.laws.confocal import confocal_integral
from beamfield.laws.ellipsoid import carlson_slopes

_NORM = 1.0 / sqrt(2.0 * pi)


def gaussian_field(points, sigma):
    """Field (3, M) [1/m^2] at points (3, M) [m]; sigma (3,) rms sizes [m].

        E_i = x_i / sqrt(2 pi) integral_0^inf exp(-m^2(s) / 2) ds / ((sigma_i^2 + s) Delta(s))

    with m^2(s) = sum x_j^2 / (sigma_j^2 + s), Delta^2(s) = prod (sigma_j^2 + s).
    """
    squares = np.asarray(sigma, dtype=float) ** 2
    return _NORM * points * confocal_integral(points, squares, 0.0, lambda m2: np.exp(-0.5 * m2))


def gaussian_gradient(sigma):
    """Slopes dE_i/dx_i (3,) [1/m^3] at the centre: 2 / (3 sqrt(2 pi)) R_D(.., .., sigma_i^2), exact."""
    return 2.0 / 3.0 * _NORM * carlson_slopes(np.asarray(sigma, dtype=float) ** 2)


def gaussian_centre_potential(sigma):
    """Potential [1/m] at the centre, zero at infinity: 2 / sqrt(2 pi) R_F(sigma_x^2, sigma_y^2, sigma_z^2)."""
    from scipy.special import elliprf

    return 2.0 * _NORM * float(elliprf(*(np.asarray(sigma, dtype=float) ** 2)))
