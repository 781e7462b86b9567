"""Field of a density that is constant on similar ellipsoids, or ellipses: one integral over the confocal family.

With m^2(s) = sum_j x_j^2 / (a_j^2 + s) and Delta^2(s) = prod_j (a_j^2 + s), the field of a density rho(m^2) is

    E_i = 2 pi prod_j(a_j) x_i  integral_lambda^inf  rho(m^2(s)) ds / ((a_i^2 + s) Delta(s))

where lambda = 0 inside the edge and m^2(lambda) = 1 outside.
Source: O. D. Kellogg, Foundations of Potential Theory, 1929, ch. VII, sec. 6 (from memory of it); in two dimensions
the same.
"""

import numpy as np

STEP = 0.25  # in ln s: the trapezoidal rule errs by exp(-pi^2 / STEP) < 1e-17 where rho is bounded for |arg s| < pi/2
_BELOW, _ABOVE = (
    40.0,
    38.0,
)  # ln s runs so far below the smallest and above the largest scale; both tails are under 1e-16
_ROUNDS = 60


def confocal_root(points, squares):
    """The lambda >= 0 whose confocal ellipsoid passes through each point; 0 inside and on the edge.

    points (n, M) [m], squares (n,) of the semi-axes [m^2]; returns (M,) [m^2].
    Newton on 1 / m^2(lambda) = 1: concave, so it climbs to the root from below and never passes it.
    """
    squares = np.asarray(squares)[:, None]
    x2 = points**2
    root = np.maximum(0.0, np.max(x2 - squares, axis=0))
    for _ in range(_ROUNDS):
        term = x2 / (squares + root)
        m2 = term.sum(axis=0)
        slope = (term / (squares + root)).sum(axis=0)
        step = np.where(m2 > 1.0, m2 * (m2 - 1.0) / np.where(slope > 0.0, slope, 1.0), 0.0)
        if not np.any(step > 1e-16 * root):
            break
        root = root + step
    return root


def confocal_integral(points, squares, start, profile):
    """integral_start^inf profile(m^2(s)) ds / ((a_i^2 + s) Delta(s)) for each axis i: (n, M).

    points (n, M) [m], squares (n,) [m^2], start (M,) or 0 [m^2], profile a function of m^2, bounded for |arg s| < pi/2.
    Trapezoidal rule in ln(s - start): the error falls as exp(-pi^2 / STEP), whatever the aspect ratio.
    """
    squares = np.asarray(squares)[:, None] + start + np.zeros(points.shape[1])
    x2 = points**2
    total = np.zeros_like(squares)
    for s in lattice(squares.min(), max(squares.max(), x2.sum(axis=0).max())):
        reach = squares + s
        total += profile((x2 / reach).sum(axis=0)) * (STEP * s / np.sqrt(reach.prod(axis=0))) / reach
    return total


def lattice(smallest, largest, below=_BELOW):
    """Values of s [m^2], equally spaced in ln s, from far below `smallest` to far above `largest`."""
    first, last = np.log(smallest) - below, np.log(largest) + _ABOVE
    return np.exp(STEP * np.arange(np.floor(first / STEP), np.ceil(last / STEP) + 1.0))
