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
_BLOCK = 64


def gaussian_section_field(points, across, longitudinal, half):
    """Field (3, M) [1/m^2] at points (3, M) [m]: Gaussian across, "uniform", "parabolic" or "gaussian" along."""
    field = np.empty(points.shape)
    for block in np.array_split(np.arange(points.shape[1]), points.shape[1] // _BLOCK + 1):
        field[:, block] = _gaussian_section(points[:, block], across, longitudinal, half)
    return field


def axis_field(z, transverse, across, longitudinal, half):
    """E_z (M,) [1/m^2] at z (M,) [m] on the axis; transverse "gaussian", "kv" or "parabolic"."""
    s = _variances(across, half, np.abs(z).max(initial=0.0))
    return (STEP * s * section_density(transverse, across, s)) @ smoothed(longitudinal, half, z, s)[1]


def product_gradient(transverse, across, longitudinal, half):
    """Slopes dE_i/dx_i (3,) [1/m^3] at the centre."""
    s = _variances(across, half)
    line, bend = smoothed(longitudinal, half, np.zeros(1), s)[0][:, 0], centre_curvature(longitudinal, half, s)
    section = section_density(transverse, across, s)
    return np.array([*(section_curvature(transverse, across, s) @ (STEP * s * line)), section @ (STEP * s * bend)])


def centre_potential(transverse, across, longitudinal, half):
    """Potential [1/m] at the centre, nought far away."""
    s = _variances(across, half)
    line = smoothed(longitudinal, half, np.zeros(1), s)[0][:, 0]
    return float(section_density(transverse, across, s) @ (STEP * s * line))


def section_density(transverse, across, s):
    """2 pi times the transverse density on the axis, smoothed by variances s (K,) [m^2]: (K,) [1/m^2]."""
    a, b = across
    if transverse == "gaussian":
        return 1.0 / np.sqrt((a * a + s) * (b * b + s))
    _, _, d2, share = azimuths(a, b)
    v = d2 / (2.0 * s[:, None])
    flat = -np.expm1(-v) / v
    return (flat if transverse == "kv" else 2.0 * (flat - _rising(v))) @ share / s


def section_curvature(transverse, across, s):
    """2 pi times minus the second derivatives of the same along x and y: (2, K) [1/m^4]."""
    a, b = across
    if transverse == "gaussian":
        return section_density(transverse, across, s) / np.array([a * a + s, b * b + s])
    cos2, sin2, d2, share = azimuths(a, b)
    v = d2 / (2.0 * s[:, None])
    weight = 2.0 * np.exp(-v) if transverse == "kv" else 4.0 * _rising(v)
    return np.array([weight @ (cos2 * share), weight @ (sin2 * share)]) / s**2


def _gaussian_section(points, across, longitudinal, half):
    s = _variances(across, half, np.sqrt(np.square(points).sum(axis=0).max(initial=0.0)))
    line, fall = smoothed(longitudinal, half, points[2], s)
    reach_x, reach_y = (size**2 + s[:, None] for size in across)
    bell = np.exp(-0.5 * (points[0] ** 2 / reach_x + points[1] ** 2 / reach_y))
    section = STEP * s[:, None] * bell / np.sqrt(reach_x * reach_y)
    across_sum = [x * (section * line / reach).sum(axis=0) for x, reach in ((points[0], reach_x), (points[1], reach_y))]
    return np.array([*across_sum, (section * fall).sum(axis=0)])


def _variances(across, half, farthest=0.0):
    """Variances s (K,) [m^2] of the smoothing, for points no farther from the centre than `farthest` [m]."""
    return lattice(min(*across, half) ** 2, max(*across, half, farthest) ** 2, _BELOW)


def _rising(v):
    """integral_0^1 u exp(-v u) du = (1 - exp(-v) (1 + v)) / v^2, without the cancellation."""
    from scipy.special import gammainc

    return gammainc(2.0, v) / v**2
