"""Bunches that are a transverse profile times a line density, of unit charge, in the rest frame.

A density rho smoothed by a Gaussian of variance s solves the heat equation, so its potential over q / (4 pi eps0) is
2 pi integral_0^inf rho_s ds, and a product stays a product: E = -2 pi integral_0^inf grad(T_s Lambda_s) ds.
Closed in one dimension for a Gaussian section everywhere; for a uniform ("kv") or parabolic ellipse on the axis and
for the slopes at the centre, where a flat section asks for a mean over directions besides. Elsewhere such bunches
have no such form. Lengths [m]: `across` (2,) rms sizes of a Gaussian, half axes of an ellipse; `half` rms length of a
Gaussian line, half the full length of a uniform or parabolic one. Source: the heat kernel, textbook potential theory
(own derivation).
"""

import numpy as np

from beamfield.laws.confocal import STEP, lattice
from beamfield.laws.cylinder import azimuths
from beamfield.laws.line_profile import centre_curvature, smoothed

_BELOW = 76.0  # at the end of a line the integrand falls as sqrt(s) only


def gaussian_section_field(points, across, longitudinal, half):
    """Field (3, M) [1/m^2] at points (3, M) [m]: Gaussian across, "uniform", "parabolic" or "gaussian" along."""
    x2, squares = points[:2] ** 2, np.asarray(across, dtype=float)[:, None] ** 2
    largest = max(squares.max(), half**2, np.square(points).sum(axis=0).max())
    total = np.zeros(points.shape)
    for s in lattice(min(squares.min(), half**2), largest, _BELOW):
        reach = squares + s
        section = STEP * s * np.exp(-0.5 * (x2 / reach).sum(axis=0)) / np.sqrt(reach.prod(axis=0))
        line, fall = smoothed(longitudinal, half, points[2], s)
        total[:2] += section * line * points[:2] / reach
        total[2] += section * fall
    return total


def axis_field(z, transverse, across, longitudinal, half):
    """E_z (M,) [1/m^2] at z (M,) [m] on the axis; transverse "gaussian", "kv" or "parabolic"."""
    largest = max(*across, half, np.abs(z).max()) ** 2
    nodes = lattice(min(*across, half) ** 2, largest, _BELOW)
    return sum(STEP * s * section_density(transverse, across, s) * smoothed(longitudinal, half, z, s)[1] for s in nodes)


def product_gradient(transverse, across, longitudinal, half):
    """Slopes dE_i/dx_i (3,) [1/m^3] at the centre."""
    origin = np.zeros(1)
    total = np.zeros(3)
    for s in lattice(min(*across, half) ** 2, max(*across, half) ** 2):
        line = smoothed(longitudinal, half, origin, s)[0][0]
        total[:2] += STEP * s * line * section_curvature(transverse, across, s)
        total[2] += STEP * s * centre_curvature(longitudinal, half, s) * section_density(transverse, across, s)
    return total


def section_density(transverse, across, s):
    """2 pi times the smoothed transverse density on the axis [1/m^2]."""
    a, b = across
    if transverse == "gaussian":
        return 1.0 / np.sqrt((a * a + s) * (b * b + s))
    v = _directions(a, b)[2] / (2.0 * s)
    flat = -np.expm1(-v) / v
    return np.mean(flat if transverse == "kv" else 2.0 * (flat - _rising(v))) / s


def section_curvature(transverse, across, s):
    """2 pi times minus the second derivatives (2,) of the smoothed transverse density on the axis [1/m^4]."""
    a, b = across
    if transverse == "gaussian":
        return 1.0 / np.sqrt((a * a + s) * (b * b + s)) / np.array([a * a + s, b * b + s])
    cos2, sin2, d2 = _directions(a, b)
    v = d2 / (2.0 * s)
    weight = 2.0 * np.exp(-v) if transverse == "kv" else 4.0 * _rising(v)
    return np.array([np.mean(cos2 * weight), np.mean(sin2 * weight)]) / s**2


def _directions(a, b):
    """cos^2, sin^2 and the squared half width d^2 [m^2] of the ellipse round the turn."""
    psi = azimuths(a, b)
    cos2, sin2 = np.cos(psi) ** 2, np.sin(psi) ** 2
    return cos2, sin2, a * a * cos2 + b * b * sin2


def _rising(v):
    """integral_0^1 u exp(-v u) du = (1 - exp(-v) (1 + v)) / v^2, without the cancellation."""
    from scipy.special import gammainc

    return gammainc(2.0, v) / v**2
