"""Field of a line of charge inside a conducting wall, by the conformal map F of the chamber on the unit disc.

    E_x - i E_y = lambda / (2 pi eps0) d/dz ln[(F(z) - F(s)) / (1 - conj(F(s)) F(z))],   z = x + i y, line at s

Round: F = z / b. Plates: tanh(pi z / 4 h). Ellipse: theta_1 / theta_4 of asin(z / d), nome ((w - h)/(w + h))^2.
Rectangle: theta_1 theta_3 / (theta_2 theta_4) of pi z / 4 w, nome exp(-pi h / w), turned by a right angle if w > h.
Source: maps by elliptic functions from memory of Z. Nehari, Conformal Mapping, 1952, ch. VI.
"""

from math import exp, inf, pi, sqrt

import numpy as np

from beamfield.laws.theta import TERMS, constants, theta

NOTHING = 1e-20  # of the first wave: growth of the waves up to the wall, and weight, together


def line_field(shape, half_width, half_height, line, points):
    """Field (2, M) over lambda / (2 pi eps0) [1/m] at points (2, M) of a line of charge at `line` (2,) [m], image
    charges on the wall included.

    shape round, elliptic, plates or rectangular, half sizes [m]. Domain: line inside, points inside or on the wall;
    for a bunch: long against the wall distance over gamma. Errors: some 1e-12 for sides up to 1 : 20.
    """
    source, z = complex(*line), points[0] + 1j * np.asarray(points[1])
    disc, slope = wall_map(shape, half_width, half_height, z)
    at, _ = wall_map(shape, half_width, half_height, np.array(source))
    field = slope * (1.0 / (disc - at) + np.conj(at) / (1.0 - np.conj(at) * disc))
    return np.stack([field.real, -field.imag])


def image_field(shape, half_width, half_height, line, points):
    """The same without the line's own field: what the wall adds, points not at the line itself."""
    away = np.asarray(points) - np.reshape(line, (2, 1))
    return line_field(shape, half_width, half_height, line, points) - away / np.square(away).sum(axis=0)


def wall_map(shape, half_width, half_height, z):
    """F and dF/dz [1/m] at complex places z [m] in the chamber; F(0) = 0, abs(F) = 1 on the wall."""
    if shape == "round" or (half_width == half_height and shape == "elliptic"):
        return z / half_width, np.full(np.shape(z), 1.0 / half_width)
    if shape == "plates" or half_width == inf:
        wave = np.tanh(pi * z / (4.0 * half_height))
        return wave, pi / (4.0 * half_height) * (1.0 - wave**2)
    if (half_width > half_height and shape == "rectangular") or (half_width < half_height and shape == "elliptic"):
        disc, slope = wall_map(shape, half_height, half_width, 1j * z)
        return -1j * disc, slope
    return (_rectangle if shape == "rectangular" else _ellipse)(half_width, half_height, z)


def _rectangle(w, h, z):
    """F' by the theorem on doubled arguments, so that nothing is divided by nought inside."""
    q, v = exp(-pi * h / w), pi * z / (4.0 * w)
    one, two, three, four = (theta(kind, v, q) for kind in (1, 2, 3, 4))
    t2, t3, t4 = constants(q)
    slope = pi / (4.0 * w) * t2**2 * t3 * t4**2 * theta(3, 2.0 * v, q) / (two * four) ** 2
    return one * three / (two * four), slope


def _ellipse(w, h, z):
    """The waves of asin(z/d) as polynomials in z/d: no branch, and nothing special at the foci."""
    q, d = ((w - h) / (w + h)) ** 2, sqrt((w - h) * (w + h))
    t = z / d
    sines, cosines, three, four = _waves(t, q)
    return t * sines / four, constants(q)[2] ** 2 * cosines * three / (four**2 * d)


def _waves(t, q):
    """theta_1(v)/sin v, theta_2(v)/cos v, theta_3(v), theta_4(v) at t = sin v."""
    double = 2.0 - 4.0 * np.square(t)  # 2 cos 2v
    sine, sine_before, cosine, cosine_before = 1.0, -1.0, 1.0, 1.0
    wave, wave_before = 0.5 * double, 1.0
    sines = cosines = 0.0
    three = four = 1.0
    for n in range(TERMS):
        if q ** (n * (n - 0.5)) < NOTHING:
            break
        weight = 2.0 * q ** ((n + 0.5) ** 2)
        sines, cosines = sines + (-1) ** n * weight * sine, cosines + weight * cosine
        even = 2.0 * q ** ((n + 1.0) ** 2) * wave
        three, four = three + even, four - (-1) ** n * even
        sine, sine_before = double * sine - sine_before, sine
        cosine, cosine_before = double * cosine - cosine_before, cosine
        wave, wave_before = double * wave - wave_before, wave
    return sines, cosines, three, four
