"""Lienard-Wiechert fields, now, of charges that move straight along +z at present but did not always.

    E = q / (4 pi eps0) [(n - beta) / (gamma^2 k^3 R^2) + n x ((n - beta) x dbeta/dt) / (c k^3 R)]
    k = 1 - n . beta,   c B = n x E

at the instant the light left. A charge came out of an arc of radius rho, its centre towards +x, and into the arc from a
straight line; or it left a conducting plane. It has flown straight for `flown` metres; X and Y across and `ahead` along
lead from its present place to the point; phi is the angle it had still to turn when the light left. Every difference of
near equals is taken by hand: the light has run about gamma^2 times further than the answer is wide.
"""

import math

from numba import prange

from beamfield.kernels.compiled import compiled
from beamfield.kernels.moving_charge import one_charge


@compiled(inline="always")
def excess(x):
    """x - sin x, to the last digits for small x."""
    if abs(x) > 0.7:
        return x - math.sin(x)
    t = x * x
    return x * t / 6.0 * (1.0 - t / 20.0 * (1.0 - t / 42.0 * (1.0 - t / 72.0 * (1.0 - t / 110.0 * (1.0 - t / 156.0)))))


@compiled(inline="always")
def lateness(phi, X, Y, ahead, flown, rho, u):
    """(c t)^2 - R^2 for light that leaves at phi, t ago: negative if it left too late to be here already [m^2]."""
    path, half = flown + rho * phi, math.sin(0.5 * phi)
    bow = 4.0 * rho * rho * excess(0.5 * phi) * (0.5 * phi + half) + 2.0 * rho * (flown + ahead) * excess(phi)
    return bow - ahead * (2.0 * path + ahead) + (path / u) * (path / u) - X * X - Y * Y + 4.0 * X * rho * half * half


@compiled(inline="always")
def shortened(phi, X, ahead, flown, rho, u, gamma):
    """R (1 - n . beta) for light that leaves at phi [m]."""
    half = math.sin(0.5 * phi)
    bow = 2.0 * (flown + ahead) * half * half + rho * excess(phi) - ahead + X * math.sin(phi)
    return (flown + rho * phi) / (u * gamma) + u / gamma * bow


@compiled()
def angle_left(X, Y, ahead, flown, rho, angle, u, gamma):
    """phi at which the light left: lateness grows through zero between 0 and angle. Newton, kept inside its bracket."""
    low, high, phi = 0.0, angle, 0.5 * angle
    for _ in range(200):
        late = lateness(phi, X, Y, ahead, flown, rho, u)
        low, high = (phi, high) if late < 0.0 else (low, phi)
        slope = 2.0 * rho * gamma / u * shortened(phi, X, ahead, flown, rho, u, gamma)
        step = phi - late / slope if slope > 0.0 else -1.0
        step = step if low < step < high else 0.5 * (low + high)
        if abs(step - phi) <= 2.3e-16 * phi or high - low <= 2.3e-16 * high:
            return step
        phi = step
    return phi


@compiled()
def from_arc(phi, X, Y, ahead, flown, rho, u, gamma):
    """E and n x E over q / 4 pi eps0, of a charge that was on the arc when the light left [1/m^2]."""
    sin, cos, half, path, beta2 = math.sin(phi), math.cos(phi), math.sin(0.5 * phi), flown + rho * phi, (u / gamma) ** 2
    bow = 2.0 * half * half
    wx, wz = X - rho * bow + path * sin, (flown + ahead) * bow + rho * (phi * bow - excess(phi)) + ahead * cos
    light = path * gamma / u  # R
    short = shortened(phi, X, ahead, flown, rho, u, gamma)
    near, turn = 1.0 / (gamma * gamma * short**3), beta2 / (rho * short**3)
    along = near + turn * (wx * cos + wz * sin)
    ex, ey, ez = along * wx - turn * short * light * cos, along * Y, along * wz - turn * short * light * sin
    nx, ny, nz = (X - rho * bow) / light, Y / light, (flown + ahead + rho * sin) / light
    return ex, ey, ez, ny * ez - nz * ey, nz * ex - nx * ez, nx * ey - ny * ex


@compiled(inline="always")
def from_line(dx, dy, dz, bx, bz, u, gamma):
    """The same of a charge that was on a straight line of direction (bx, 0, bz) and would now be at distance d."""
    fx, fy, fz = one_charge(dx, dy, dz, u * bx, 0.0, u * bz, 0.0)
    return gamma * fx, gamma * fy, gamma * fz, -u * bz * fy, u * (bz * fx - bx * fz), u * bx * fy


@compiled()
def one_after_bend(X, Y, ahead, flown, rho, angle, u, gamma):
    if lateness(0.0, X, Y, ahead, flown, rho, u) >= 0.0:
        return from_line(X, Y, ahead, 0.0, 1.0, u, gamma)
    if lateness(angle, X, Y, ahead, flown, rho, u) >= 0.0:
        phi = angle_left(X, Y, ahead, flown, rho, angle, u, gamma)
        return from_arc(phi, X, Y, ahead, flown, rho, u, gamma)
    sin, cos, path = math.sin(angle), math.cos(angle), flown + rho * angle
    dx, dz = X - rho * (1.0 - cos) + path * sin, flown + ahead + rho * sin - path * cos
    return from_line(dx, Y, dz, -sin, cos, u, gamma)


@compiled()
def one_after_cathode(X, Y, ahead, flown, u, gamma):
    """Charge and image, both born at the plane `flown` ago: nothing outside the light sphere of that instant."""
    if flown + ahead < 0.0 or lateness(0.0, X, Y, ahead, flown, 0.0, u) < 0.0:
        return 0.0, 0.0, 0.0, 0.0, 0.0, 0.0
    ex, ey, ez, bx, by, bz = from_line(X, Y, ahead, 0.0, 1.0, u, gamma)
    ix, iy, iz, jx, jy, jz = from_line(X, Y, ahead + 2.0 * flown, 0.0, -1.0, u, gamma)
    return ex - ix, ey - iy, ez - iz, bx - jx, by - jy, bz - jz


@compiled(parallel=True)
def after_bend(points, positions, weights, u, gamma, straight, rho, angle, out):
    """Fill out (6, M) with E and c B at points (3, M), of sources (3, N) that left the arc at z = -straight."""
    for m in prange(points.shape[1]):
        out[:, m] = 0.0
        for j in range(positions.shape[1]):
            X, Y, ahead = points[0, m] - positions[0, j], points[1, m] - positions[1, j], points[2, m] - positions[2, j]
            field = one_after_bend(X, Y, ahead, straight + positions[2, j], rho, angle, u, gamma)
            for i in range(6):
                out[i, m] += weights[j] * field[i]


@compiled(parallel=True)
def after_cathode(points, positions, weights, u, gamma, straight, out):
    """Fill out (6, M) with E and c B at points (3, M), of sources (3, N) born at a conducting plane z = -straight."""
    for m in prange(points.shape[1]):
        out[:, m] = 0.0
        for j in range(positions.shape[1]):
            X, Y, ahead = points[0, m] - positions[0, j], points[1, m] - positions[1, j], points[2, m] - positions[2, j]
            field = one_after_cathode(X, Y, ahead, straight + positions[2, j], u, gamma)
            for i in range(6):
                out[i, m] += weights[j] * field[i]
