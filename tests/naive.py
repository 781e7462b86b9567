"""The slow twin of the moving charge: boost to its rest frame, Coulomb, boost back. Plain loops, plain floats."""

from math import hypot, pi, sqrt

SPEED_OF_LIGHT = 299792458.0  # m/s, exact
VACUUM_PERMITTIVITY = 8.8541878188e-12  # F/m, CODATA 2022, typed here on purpose: a twin shares no constants


def dot(a, b):
    return a[0] * b[0] + a[1] * b[1] + a[2] * b[2]


def cross(a, b):
    return [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]]


def to_rest_frame(d, u):
    """Split a lab distance d at one lab instant into (across, along) the momentum u, as the charge measures it."""
    speed = hypot(*u)
    direction = [ui / speed for ui in u] if speed else [0.0, 0.0, 1.0]
    along = dot(direction, d)
    across = [di - along * ni for di, ni in zip(d, direction, strict=True)]
    return across, sqrt(1.0 + dot(u, u)) * along, direction


def coulomb(across, along, charge, cloud):
    """Field of a charge at rest, split as the distance is; `cloud` softens it [m]."""
    r2 = dot(across, across) + along * along + cloud * cloud
    if r2 == 0.0:
        return [0.0, 0.0, 0.0], 0.0
    strength = charge / (4.0 * pi * VACUUM_PERMITTIVITY) / (r2 * sqrt(r2))
    return [strength * component for component in across], strength * along


def to_lab(across, along, direction, u):
    """Boost a purely electric field back: the part across grows by gamma, B = u x E* / c."""
    gamma = sqrt(1.0 + dot(u, u))
    electric = [gamma * ai + along * ni for ai, ni in zip(across, direction, strict=True)]
    magnetic = [component / SPEED_OF_LIGHT for component in cross(u, across)]
    return electric, magnetic


def field_of_one(d, charge, u, cloud=0.0):
    """E [V/m] and B [T] at the distance d = (x, y, z) [m] from a charge [C] of momentum u = gamma beta."""
    across, along, direction = to_rest_frame(d, u)
    return to_lab(*coulomb(across, along, charge, cloud), direction, u)


def field_of_many(points, positions, charges, momenta, cloud=0.0):
    """E and B, lists of three rows, at points (3, M) of charges (N,) at positions (3, N) with momenta (3, N)."""
    electric, magnetic = [[[0.0] * len(points[0]) for _ in range(3)] for _ in range(2)]
    for m in range(len(points[0])):
        for n in range(len(positions[0])):
            d = [points[i][m] - positions[i][n] for i in range(3)]
            one = field_of_one(d, charges[n], [momenta[i][n] for i in range(3)], cloud)
            for i in range(3):
                electric[i][m] += one[0][i]
                magnetic[i][m] += one[1][i]
    return electric, magnetic
