"""Mean of exp(i k z) I_0(k r) over a bunch: what a pipe sees of it, at wave number k along the axis.

cos(k z) I_0(k r) is harmonic: it is the mean over directions theta of plane waves with the complex wave vector
(-i k cos theta, -i k sin theta, k). The Fourier transform of each profile therefore serves, with an imaginary argument
across: s^2 = k^2 (c^2 - d^2), d the half width of the section towards theta, c the half length. Own derivation.
"""

import numpy as np

_DIRECTIONS = 24
_DEGREE, _FEW = 64, 1000
_NEAR, _TERMS = 1.0, 10  # square of the argument below which the series serves, and its terms
_HUGE = 300.0


def form_factor(transverse, across, longitudinal, half, ellipsoid, k):
    """Form factors (K,) [1] at wave numbers k (K,) [1/m].

    transverse "gaussian", "kv", "parabolic" (an ellipsoid: "uniform", "parabolic"); longitudinal "gaussian", "uniform",
    "parabolic"; across (2,) and half: half axes, rms sizes of a Gaussian [m].
    """
    if ellipsoid:
        return _over_directions(across, lambda d2: _solid(transverse, k * k * (half**2 - d2)))
    return _smooth(k, lambda k: _over_directions(across, lambda d2: _section(transverse, k * k * d2))) * _line(
        longitudinal, k * half
    )


def _smooth(k, law):
    """law(k), positive and smooth, by the polynomial through its logarithm at a few places."""
    if len(k) <= _FEW:
        return law(k)
    series = np.polynomial.Chebyshev.interpolate(lambda k: np.log(law(k)), _DEGREE, domain=(0.0, k.max()))
    return np.exp(series(k))


def _over_directions(across, law):
    a, b = across
    if a == b:
        return law(a * a)
    theta = 0.5 * np.pi * (np.arange(_DIRECTIONS) + 0.5) / _DIRECTIONS
    return sum(law((a * np.cos(t)) ** 2 + (b * np.sin(t)) ** 2) for t in theta) / _DIRECTIONS


def _section(profile, s2):
    """Transform of a section at imaginary argument sqrt(-s2)."""
    from scipy.special import iv

    if profile == "gaussian":
        return np.exp(0.5 * s2)
    s = np.sqrt(s2)
    if profile == "kv":
        return np.where(s < 1e-4, 1.0 + s2 / 8.0, 2.0 * iv(1, s) / np.maximum(s, 1e-4))
    return np.where(s < 1e-3, 1.0 + s2 / 12.0, 8.0 * iv(2, s) / np.maximum(s2, 1e-6))


def _line(profile, s):
    if profile == "gaussian":
        return np.exp(-0.5 * s * s)
    return np.sinc(s / np.pi) if profile == "uniform" else _ball(s * s, 0)


def _solid(profile, s2):
    return _ball(s2, 0 if profile == "uniform" else 1)


def _ball(s2, order):
    """Transform of (1 - r^2)^order over the unit ball, 1 at s = 0; s2 may be negative: 3 j_1(s)/s, 15 j_2(s)/s^2."""
    n, near = order + 1, np.abs(s2) < _NEAR
    t = np.maximum(np.abs(s2), _NEAR)
    s, even = np.sqrt(t), np.minimum(np.sqrt(t), _HUGE)
    sin, cos = np.where(s2 > 0.0, (np.sin(s), np.cos(s)), (np.sinh(even), np.cosh(even)))
    t = np.copysign(t, s2)
    first = 3.0 * (sin / s - cos) / t
    return np.where(near, _near_ball(np.where(near, s2, 0.0), n), first if n == 1 else 15.0 * (first - sin / s) / t)


def _near_ball(s2, n):
    """sum over k of (-s2/2)^k / (k! (2n+3)(2n+5)...(2n+2k+1))."""
    term = total = np.ones_like(s2)
    for k in range(1, _TERMS):
        term = term * -0.5 * s2 / (k * (2 * n + 2 * k + 1))
        total = total + term
    return total
