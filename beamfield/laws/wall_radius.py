"""The round pipe that a chamber is for a thin beam on its axis: the radius of equal potential.

A line of charge on the axis of a grounded pipe has phi = 2 ln(b / r) near it; b is the conformal radius of the
section, seen from its centre. Sources: Schwarz-Christoffel and image sums, textbook conformal mapping (own
derivation); Z. Nehari, Conformal Mapping, 1952, ch. VI, for the ellipse (from memory of it).
"""

from math import isinf, pi, tanh

_TERMS = 60


def wall_radius(shape, half_width, half_height):
    """Radius b [m] of the round pipe; shape "round", "elliptic", "plates" or "rectangular", half sizes [m].

    round: b = the radius;   plates of half gap h: b = 4 h / pi;   either way round.
    """
    wide, narrow = max(half_width, half_height), min(half_width, half_height)
    if shape == "plates" or isinf(wide):
        return 4.0 * narrow / pi
    return _rectangle(wide, narrow) if shape == "rectangular" else _ellipse(wide, narrow)


def _ellipse(wide, narrow):
    """b = (w + h) / (2 sum q^(2 n (n+1)) (1 + 2 sum q^(2 n^2))), q = (w - h)/(w + h); the sums run over n >= 0, n >= 1.

    In the limit of a flat ellipse the sums converge slowly; to a ratio of 30 the terms here do.
    """
    q = (wide - narrow) / (wide + narrow)
    odd = sum(q ** (2 * n * (n + 1)) for n in range(_TERMS))
    even = 1.0 + 2.0 * sum(q ** (2 * n * n) for n in range(1, _TERMS))
    return (wide + narrow) / (2.0 * odd * even)


def _rectangle(wide, narrow):
    """b = (4 h / pi) product over n >= 1 of tanh(pi n w / (2 h))^(-2 (-1)^n): rows of images between plates."""
    radius = 4.0 * narrow / pi
    for n in range(1, _TERMS):
        radius *= tanh(0.5 * pi * n * wide / narrow) ** (2 if n % 2 else -2)
    return radius
