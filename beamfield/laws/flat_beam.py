"""Infinitely long beams of unit line density: field across the beam, in its rest frame.

Fields are over q / (4 pi eps0): [1/m] for one unit of line density; far away 2 / r. Points are (2, M) or (3, M); z,
where given, is not looked at and the field along it is 0.
Sources: I. M. Kapchinskij and V. V. Vladimirskij, Proc. Int. Conf. on High Energy Accelerators, CERN, 1959, p. 274
(uniform ellipse); M. Bassetti and G. A. Erskine, CERN-ISR-TH/80-06, 1980 (Gaussian); both from memory of them; the
confocal integral.
"""

from math import pi, sqrt

import numpy as np

from beamfield.laws.confocal import confocal_integral, confocal_root

_CANCELLED = 1e-3  # a difference this small against its terms is found by the integral instead


def kv_field(points, semi_axes):
    """Uniform ellipse, semi_axes (2,) [m], anywhere: E_x = 4 x / (A (A + B)), A and B those of the confocal ellipse."""
    a, b = _confocal_axes(points, semi_axes)
    return _like(points, 4.0 * points[0] / (a * (a + b)), 4.0 * points[1] / (b * (a + b)))


def parabolic_field(points, semi_axes):
    """Density 2 / (pi a b) (1 - x^2/a^2 - y^2/b^2), semi_axes (2,) [m], inside, outside and on the edge.

        E_x = 4 x [2 / (A (A + B)) - x^2 2 (2 A + B) / (3 A^3 (A + B)^2) - y^2 2 / (A B (A + B)^2)]

    and the like for y, with A^2 = a^2 + lambda, B^2 = b^2 + lambda: in two dimensions the integral is elementary.
    """
    a, b = _confocal_axes(points, semi_axes)
    x, y = points[:2]
    return _like(points, x * _parabolic_slope(x, y, a, b), y * _parabolic_slope(y, x, b, a))


def gaussian_beam_field(points, sigma):
    """Gaussian of rms sizes sigma (2,) [m]: Bassetti and Erskine's form, and the confocal integral where that form
    loses digits (round or nearly round sections, near the centre, far away)."""
    points2 = points[:2]
    field, terms = _bassetti_erskine(points2, sigma)
    lost = ~(np.hypot(*field) > _CANCELLED * terms)
    if lost.any():
        field[:, lost] = gaussian_beam_integral(points2[:, lost], sigma)
    return _like(points, *field)


def gaussian_beam_integral(points, sigma):
    """The same field (2, M) at points (2, M) by the confocal integral; good for every section."""
    squares = np.asarray(sigma, dtype=float) ** 2
    return points * confocal_integral(points, squares, 0.0, lambda m2: np.exp(-0.5 * m2))


def beam_gradient(profile, sigma):
    """Slopes dE_x/dx, dE_y/dy (2,) [1/m^2] on the axis, profile "kv", "parabolic" or "gaussian", sigma (2,) [m].

    dE_x/dx = n / (sigma_x (sigma_x + sigma_y)), n the density of the axis over that of a uniform ellipse of equal rms
    """
    sigma = np.asarray(sigma, dtype=float)
    return AXIS_DENSITY[profile] / (sigma * sigma.sum())


AXIS_DENSITY = {"kv": 1.0, "parabolic": 4.0 / 3.0, "gaussian": 2.0}


def _confocal_axes(points, semi_axes):
    squares = np.asarray(semi_axes, dtype=float) ** 2
    return np.sqrt(squares[:, None] + confocal_root(points[:2], squares))


def _parabolic_slope(x, y, a, b):
    ab = a + b
    return 4.0 * (2.0 / (a * ab) - x * x * 2.0 * (2.0 * a + b) / (3.0 * a**3 * ab**2) - y * y * 2.0 / (a * b * ab**2))


def _bassetti_erskine(points, sigma):
    """Field (2, M), and the size [1/m] of the two terms whose difference it is (inf for a round section)."""
    from scipy.special import wofz

    if sigma[0] < sigma[1]:
        field, terms = _bassetti_erskine(points[::-1], sigma[::-1])
        return field[::-1], terms
    x, y = np.abs(points)
    wide, narrow = sigma
    scale = sqrt(2.0 * (wide - narrow) * (wide + narrow))
    if not scale > 0.0:
        return np.zeros_like(points, dtype=float), np.inf
    damping = np.exp(-0.5 * ((x / wide) ** 2 + (y / narrow) ** 2))
    w = wofz((x + 1j * y) / scale) - damping * wofz((x * narrow / wide + 1j * y * wide / narrow) / scale)
    terms = 2.0 * sqrt(pi) / scale
    return terms * np.array([w.imag, w.real]) * np.sign(points), terms


def _like(points, x, y):
    return np.array([x, y, np.zeros_like(x)][: len(points)])
