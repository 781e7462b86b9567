"""A grounded wall the slow way: the image potential of a line of charge fitted to the wall, without conformal maps."""

import numpy as np


def ellipse_image(w, h, source, place, modes=1500):
    """Image field (2,) over lambda/(2 pi eps0) at complex `place` of a line at complex `source` in an ellipse w > h.

    Fourier series in the angle of elliptic coordinates z = d cosh(mu + i theta): cosh(n mu) cos(n theta), sinh sin.
    """
    d, edge = np.sqrt((w - h) * (w + h)), np.arctanh(h / w)
    theta = 2.0 * np.pi * np.arange(4 * modes) / (4 * modes)
    wall = w * np.cos(theta) + 1j * h * np.sin(theta)
    series = np.fft.rfft(np.log(np.abs(wall - source)))[1:modes] / (2 * modes)
    n, xi = np.arange(1, modes), np.arccosh(complex(place) / d + 0j)
    grow = np.exp(n * (xi - edge)) - np.exp(-n * (xi + edge))  # 2 sinh(n xi) exp(-n mu of the wall)
    fall = np.exp(-2.0 * n * edge)
    share = series.real / (1.0 + fall) + 1j * series.imag / (1.0 - fall)
    slope = np.sum(n * grow * share) / (d * np.sinh(xi))  # d/dz of the complex potential, E_x - i E_y = -slope
    return np.array([-slope.real, slope.imag])


def rectangle_image(w, h, source, place, count=50, off=0.6):
    """The same in a rectangle, by `count` lines of charge a side of a wider one, fitted to no potential on the wall."""
    outer = _frame(w + off * h, h + off * h, count)
    wall = _frame(w, h, 3 * count)
    matrix = np.log(np.abs(wall[:, None] - outer))
    charges = np.linalg.lstsq(matrix, -np.log(np.abs(wall - source)), rcond=1e-14)[0]
    field = np.sum(charges / (place - outer))
    return np.array([field.real, -field.imag])


def _frame(w, h, count):
    t = -np.cos((np.arange(count) + 0.5) * np.pi / count)
    return np.concatenate([w * t - 1j * h, w * t + 1j * h, 1j * h * t - w, 1j * h * t + w])


def slow_coefficients(image, w, h):
    """eps_1, xi_1x, xi_1y of a wall, each from two places near its middle and the even polynomial through them."""
    step = 0.01 * h

    def limit(one, two):
        return h * h / 2.0 * (4.0 * one - two) / 3.0

    eps = limit(*(image(w, h, 0.0, 1j * e)[1] / e for e in (step, 2.0 * step)))
    xi_x = limit(*(image(w, h, e, e)[0] / e for e in (step, 2.0 * step)))
    xi_y = limit(*(image(w, h, 1j * e, 1j * e)[1] / e for e in (step, 2.0 * step)))
    return np.array([eps, xi_x, xi_y])
