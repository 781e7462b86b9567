"""An independent witness for the moving charge: Lienard-Wiechert with sixty digits.

Knows nothing of a co-moving frame or of a present position's field: it looks for the instant at which the light left
the charge, and evaluates the field of that instant. Closed form, any electrodynamics text (Jackson, Classical
Electrodynamics, 3rd ed., eq. 14.14, from memory of it), for a charge without acceleration:

    E = q / (4 pi eps0) (n - beta) / (gamma^2 (1 - n . beta)^3 R^2),   B = n x E / c,   where n x (n - beta) = beta x n
"""

from mpmath import mp, mpf, pi, sqrt

DIGITS = 60
SPEED_OF_LIGHT = 299792458
VACUUM_PERMITTIVITY = "8.8541878188e-12"  # F/m, CODATA 2022


def dot(a, b):
    return sum(x * y for x, y in zip(a, b, strict=True))


def cross(a, b):
    return [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]]


def light_path(d, beta):
    """Distance R [m] the light has run: the root of R = |d + beta R|, by Newton's method, which climbs to it from 0."""
    run, step = mpf(0), mpf(1)
    while abs(step) > mpf(10) ** (10 - DIGITS) * run:
        arm = [di + bi * run for di, bi in zip(d, beta, strict=True)]
        length = sqrt(dot(arm, arm))
        step = (length - run) / (1 - dot(arm, beta) / length)
        run += step
    return run


def retarded_field(d, charge, u):
    """E [V/m] and B [T], six floats rounded once at the end, at d = (x, y, z) [m] from where the charge is now."""
    with mp.workdps(DIGITS):
        d, u = [mpf(float(x)) for x in d], [mpf(float(x)) for x in u]
        gamma = sqrt(1 + dot(u, u))
        beta = [ui / gamma for ui in u]
        run = light_path(d, beta)
        n = [(di + bi * run) / run for di, bi in zip(d, beta, strict=True)]
        strength = mpf(float(charge)) / (4 * pi * mpf(VACUUM_PERMITTIVITY))
        strength /= gamma**2 * (1 - dot(n, beta)) ** 3 * run**2
        electric = [strength * (ni - bi) for ni, bi in zip(n, beta, strict=True)]
        magnetic = [strength * component / SPEED_OF_LIGHT for component in cross(beta, n)]
        return [float(component) for component in electric + magnetic]
