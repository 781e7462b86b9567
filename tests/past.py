"""The slow twin of the retarded sum: a path written down piece by piece, searched by bisection with sixty digits.

The law: J. D. Jackson, Classical Electrodynamics, 3rd ed., eq. 14.14 (from memory of it), straight from the book.
"""

from mpmath import cos, mp, mpf, pi, sin, sqrt

from tests.retarded import DIGITS, VACUUM_PERMITTIVITY, cross, dot


def on_the_way(back, flown, rho, angle):
    """Place, direction and curvature vector, `back` metres ago on a path that now passes the origin along +z."""
    if back <= flown:
        return [mpf(0), mpf(0), -back], [mpf(0), mpf(0), mpf(1)], [mpf(0)] * 3
    phi = min((back - flown) / rho, angle)
    place, direction = [rho * (1 - cos(phi)), mpf(0), -flown - rho * sin(phi)], [-sin(phi), mpf(0), cos(phi)]
    if phi < angle:
        return place, direction, [cos(phi) / rho, mpf(0), sin(phi) / rho]
    rest = back - flown - rho * angle
    return [p - rest * b for p, b in zip(place, direction, strict=True)], direction, [mpf(0)] * 3


def light_left(d, beta, past):
    """How many metres ago on its path the charge sent the light that is now at d: by halving."""

    def late(back):
        arm = [di - ri for di, ri in zip(d, on_the_way(back, *past)[0], strict=True)]
        return back - beta * sqrt(dot(arm, arm))

    low, high = mpf(0), mpf(1)
    while late(high) < 0:
        high *= 2
    for _ in range(int(3.4 * DIGITS)):
        middle = (low + high) / 2
        low, high = (middle, high) if late(middle) < 0 else (low, middle)
    return high


def field_with_a_past(d, u, flown, rho, angle):
    """E [V/m] and c B [V/m], six floats, of one coulomb at the origin now, d = (x, y, z) [m] from it."""
    with mp.workdps(DIGITS):
        d, u, past = [mpf(float(x)) for x in d], mpf(float(u)), [mpf(float(x)) for x in (flown, rho, angle)]
        gamma2 = 1 + u * u
        beta = u / sqrt(gamma2)
        place, direction, curvature = on_the_way(light_left(d, beta, past), *past)
        arm = [di - ri for di, ri in zip(d, place, strict=True)]
        light = sqrt(dot(arm, arm))
        n, v = [a / light for a in arm], [beta * b for b in direction]
        short, lead = 1 - dot(n, v), [ni - vi for ni, vi in zip(n, v, strict=True)]
        swing = cross(n, cross(lead, [beta**2 * k for k in curvature]))
        strength = 1 / (4 * pi * mpf(VACUUM_PERMITTIVITY) * short**3 * light)
        electric = [strength * (a / (gamma2 * light) + b) for a, b in zip(lead, swing, strict=True)]
        return [float(component) for component in electric + cross(n, electric)]
