"""Jacobi's theta functions: what a rectangle, an ellipse or a pair of plates looks like to a conformal map.

With the nome q = exp(-pi K' / K): theta_3(0)^2 = 2 K / pi, theta_2(0)^4 / theta_3(0)^4 = k^2. Source: NIST Digital
Library of Mathematical Functions, eqs. 20.2.1-4 and 22.2.2 (from memory of it).
"""

from math import log, pi

import numpy as np

TERMS = 40  # of a series; for q <= 0.9 the first one left out is below 1e-70
STEEP = 0.5  # nome above which a constant is taken from the complementary nome


def theta(kind, v, q):
    """theta_kind(v, q) for kind 1, 2, 3, 4, complex v (any shape) [1] and nome 0 <= q < 1 [1]; q to about 0.9."""
    v, n = np.asarray(v)[..., None], np.arange(_terms(q))
    if kind < 3:
        wave = (-1.0) ** n * np.sin((2 * n + 1) * v) if kind == 1 else np.cos((2 * n + 1) * v)
        return 2.0 * (wave * q ** np.square(n + 0.5)).sum(axis=-1)
    sign = 1.0 if kind == 3 else (-1.0) ** n[1:]
    return 1.0 + 2.0 * (sign * np.cos(2 * n[1:] * v) * q ** np.square(n[1:].astype(float))).sum(axis=-1)


def constants(q):
    """theta_2, theta_3, theta_4 at v = 0 for a nome 0 <= q < 1, all digits up to q = 1.

    Above STEEP by theta_2,3,4(q) = sqrt(-pi / ln q) theta_4,3,2(q'), ln q ln q' = pi^2.
    """
    if q <= STEEP:
        return tuple(float(theta(kind, 0.0, q)) for kind in (2, 3, 4))
    scale, other = (-pi / log(q)) ** 0.5, np.exp(pi**2 / log(q))
    return tuple(scale * float(theta(kind, 0.0, other)) for kind in (4, 3, 2))


def _terms(q):
    """As many terms as raise q to a power that is nothing beside 1, growth of the waves included."""
    return TERMS if q > 0.1 else 12
