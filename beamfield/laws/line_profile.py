"""Line densities of one unit of charge, smoothed by a Gaussian of variance s: value, slope, curvature at the centre.

The smoothing is what the heat equation does to a density; `product` integrates it to a field. `half` is the rms
length of a Gaussian and half the full length of a uniform or parabolic line [m].
"""

from math import pi, sqrt

import numpy as np

_NODES, _WEIGHTS = np.polynomial.legendre.leggauss(24)


def smoothed(profile, half, z, s):
    """Values (K, M) [1/m] and minus the slopes (K, M) [1/m^2] at z (M,) [m] of a line density smoothed by variances
    s (K,) [m^2], ascending."""
    if profile == "gaussian":
        width = np.sqrt(half**2 + s)[:, None]
        value = _bell(z / width) / width
        return value, value * z / width**2
    narrow, wide = _parted(s, half)
    pairs = _sharp(profile, half, z, narrow[:, None]), _blurred(profile, half, z, wide[:, None])
    return tuple(np.concatenate(parts) for parts in zip(*pairs))


def centre_curvature(profile, half, s):
    """Minus the second derivatives (K,) [1/m^3] at z = 0 of a line density smoothed by variances s (K,) [m^2]."""
    if profile == "gaussian":
        return _bell(0.0) / (half**2 + s) ** 1.5
    narrow, wide = _parted(s, half)
    t = half / narrow
    flat = _bell(t) / narrow**3 if profile == "uniform" else 3.0 / half**3 * (_half_erf(t) - t * _bell(t))
    t = half / wide[:, None] * _NODES
    return np.concatenate([flat, (_height(profile) * _bell(t) * (1.0 - t * t)) @ _WEIGHTS / wide**3])


def _parted(s, half):
    """Widths of the smoothing, those within the line and those beyond it."""
    return np.sqrt(s[s <= half**2]), np.sqrt(s[s > half**2])


def _sharp(profile, half, z, root):
    """Smoothing narrower than the line: closed forms."""
    up, down = (z + half) / root, (z - half) / root
    inside, step = _between(down, up), (_bell(down) - _bell(up)) / root
    if profile == "uniform":
        return inside / (2.0 * half), step / (2.0 * half)
    slope = 1.5 / half**3 * (z * inside - root * (_bell(down) - _bell(up)))
    edges = root * ((half - z) * _bell(up) + (half + z) * _bell(down))
    return 0.75 / half**3 * ((half**2 - z**2 - root**2) * inside + edges), slope


def _blurred(profile, half, z, root):
    """Smoothing wider than the line, where the closed forms cancel: Gauss-Legendre over the line."""
    t = (z[:, None] - half * _NODES) / root[:, :, None]
    bell = _height(profile) * _bell(t)
    return bell @ _WEIGHTS / root, (bell * t) @ _WEIGHTS / root**2


def _height(profile):
    return 0.5 if profile == "uniform" else 0.75 * (1.0 - _NODES**2)


def _bell(t):
    return np.exp(-0.5 * np.square(t)) / sqrt(2.0 * pi)


def _half_erf(t):
    from scipy.special import erf

    return 0.5 * erf(t / sqrt(2.0))


def _between(down, up):
    """Part of a normal distribution between two bounds, by the tail that keeps its digits."""
    from scipy.special import ndtr

    down, up = np.where(down + up > 0.0, -up, down), np.where(down + up > 0.0, -down, up)
    return ndtr(up) - ndtr(down)
