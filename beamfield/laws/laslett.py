"""Laslett's image coefficients: how conducting walls and iron poles answer a long beam in their middle.

A wall is told by two numbers about its centre, from the conformal map f(z) = (z + a z^3 + ...) / R on the unit disc:
R, the conformal radius, and a. With h the half height of the wall,

    eps_1 = -a h^2,   xi_1y + xi_1x = h^2 / R^2,   xi_1y - xi_1x = 3 eps_1

eps_1 [1] gives the image field E_y = lambda eps_1 y / (pi eps_0 h^2) of a line lambda on the axis (E_x with -x); xi_1
[1] the field E_y = lambda xi_1y Y / (pi eps_0 h^2) that a line displaced to Y meets at its own place; eps_2, xi_2 the
same for currents and iron. Source: L. J. Laslett, On intensity limitations imposed by transverse space-charge effects,
BNL-7534, 1963 (from memory of it); the closed forms: own derivation from the maps, tested against charges on the walls.
"""

from math import atanh, exp, inf, pi

import numpy as np

from beamfield.laws.theta import STEEP, constants

POLES_EPS, POLES_XI = pi**2 / 24.0, pi**2 / 16.0  # eps_2 and vertical xi_2 of parallel iron; the horizontal xi_2 is 0
_TERMS = 64  # of the series, for nomes up to STEEP
# An eighth of the ways to write n as a sum of four squares (Jacobi): theta_3^4 = 1 + 8 sum of _SQUARES[n] q^n.
_SQUARES = np.array([0] + [sum(d for d in range(1, n + 1) if n % d == 0 and d % 4) for n in range(1, _TERMS)])


def image_coefficients(shape, half_width, half_height):
    """eps_1, xi_1x, xi_1y [1], over the half height squared, of a chamber.

    shape round, elliptic, plates or rectangular; half sizes [m], either the larger, half_width inf between plates.
    """
    if half_width < half_height:  # turned on its side
        eps, xi_x, xi_y = image_coefficients(shape, half_height, half_width)
        scale = (half_height / half_width) ** 2
        return -eps * scale, xi_y * scale, xi_x * scale
    eps, total = _OF_SHAPE["plates" if half_width == inf else shape](half_width, half_height)
    return eps, 0.5 * (total - 3.0 * eps), 0.5 * (total + 3.0 * eps)


def _round(w, h):
    return 0.0, 1.0


def _plates(w, h):
    return pi**2 / 48.0, pi**2 / 16.0


def _rectangle(w, h):
    """eps_1 = pi^2/48 (theta_4^4 - theta_2^4), h^2/R^2 = pi^2/16 theta_3^4 at the nome exp(-pi w/h).

    The same in elliptic integrals: eps_1 = (h K / w)^2 (2 k^2 - 1) / 12, R = 2 w / K, K'/K = h/w.
    """
    two, three, four = constants(exp(-pi * w / h))
    return pi**2 / 48.0 * (four**4 - two**4), pi**2 / 16.0 * three**4


def _ellipse(w, h):
    """eps_1 = h^2/(12 d^2) (theta_3^4 + theta_4^4 - 2), h^2/R^2 = h^2/(4 d^2) theta_2^4, nome q = (w - h)/(w + h),
    d^2 = w^2 - h^2.

    In elliptic integrals: eps_1 = h^2/(12 d^2) [(1 + k'^2) (2 K / pi)^2 - 2]. Near the circle, where that cancels,
    Jacobi's series of a sum of four squares is divided by q term by term: d^2 = q (w + h)^2.
    """
    q = (w - h) / (w + h)
    if q <= STEEP:
        part, odd, even = (h / (w + h)) ** 2, np.arange(1, _TERMS, 2), np.arange(2, _TERMS, 2)
        series = [_SQUARES[n] @ q ** (n - 1.0) for n in (odd, even)]
        return 4.0 / 3.0 * part * float(series[1]), 4.0 * part * float(series[0])
    scale, other = (pi / (2.0 * atanh(h / w))) ** 2, exp(-(pi**2) / (2.0 * atanh(h / w)))
    two, three, four = constants(other)
    share = h * h / ((w - h) * (w + h))
    return share / 12.0 * (scale * (three**4 + two**4) - 2.0), share / 4.0 * scale * four**4


_OF_SHAPE = {"round": _round, "plates": _plates, "rectangular": _rectangle, "elliptic": _ellipse}
