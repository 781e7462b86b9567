"""Line densities of one particle against z over its edge, or over the rms length of a Gaussian."""

from math import pi, sqrt

import numpy as np

# profile -> density times the scale, and minus its second derivative at the centre times the scale cubed
_SHAPES = {
    "gaussian": (lambda u: np.exp(-0.5 * u * u) / sqrt(2.0 * pi), 1.0 / sqrt(2.0 * pi)),
    "uniform": (lambda u: np.where(abs(u) < 1.0, 0.5, 0.0), 0.0),
    "parabolic": (lambda u: np.maximum(0.0, 0.75 * (1.0 - u * u)), 1.5),
    "squared": (lambda u: np.maximum(0.0, 1.0 - u * u) ** 2 * 15.0 / 16.0, 3.75),
}


def line_density(profile, z, scale):
    """Particles per metre (M,) [1/m] at z (M,) [m] of one particle; "squared" is (1 - z^2/c^2)^2."""
    return _SHAPES[profile][0](np.asarray(z, float) / scale) / scale


def line_curvature(profile, scale):
    """Minus the second derivative at the centre [1/m^3]."""
    return _SHAPES[profile][1] / scale**3
