"""Charges that stand for many: clouds against their potential, rods against rows of clouds, sums against plain ones."""

import numpy as np
import pytest
from mpmath import diff, mp, mpf, quad, sqrt

from beamfield.kernels.clouds import one_cloud, superpose_clouds, superpose_rods

SIZE = 0.7
PLACES = [(0.3, -0.2, 0.5), (1.5, 0.4, -2.0), (0.01, 0.02, 0.0), (0.0, 0.0, 3.0), (20.0, -7.0, 4.0)]
ROUNDING = 1e-13


def potential(x, y, z, a):
    """1 / s + a^2 / (2 s^3), s^2 = r^2 + a^2: a softened charge and what takes its second moment away."""
    s = sqrt(x * x + y * y + z * z + a * a)
    return 1 / s + a * a / (2 * s**3)


def gradient(place, a=SIZE):
    """Minus the gradient of the potential (3,), by finite differences in 40 digits."""
    with mp.workdps(40):
        x = [mpf(float(value)) for value in place]
        steps = [tuple(int(i == j) for j in range(3)) for i in range(3)]
        return [-float(diff(lambda *r: potential(*r, mpf(float(a))), x, step)) for step in steps]


@pytest.mark.parametrize("place", PLACES)
def test_a_cloud_at_rest_has_a_potential(place):
    """Closed form, mpmath: the field is minus the gradient of the potential."""
    assert np.allclose(one_cloud(*place, 0.0, 0.0, 0.0, SIZE**2), gradient(place), rtol=ROUNDING, atol=0.0)


def test_a_cloud_has_no_second_moment():
    """Closed form: from afar a point charge up to (a / r)^4; a plainly softened charge is off by (a / r)^2."""
    for r in (20.0, 40.0, 80.0):
        field = one_cloud(0.0, 0.0, r, 0.0, 0.0, 0.0, 1.0)[2] * r * r
        fourth = 1.875 * 1.05 / r**4 * 2.0  # (1 + 5x/2)(1 + x)^(-5/2) = 1 - 15/8 x^2 ..., x = 1 / r^2
        assert 0.0 < 1.0 - field < fourth


def test_a_cloud_of_no_size_is_a_charge():
    """Closed form: d / (|d|^2 + (u . d)^2)^(3/2); at its own place a charge makes no field."""
    u, d = np.array([0.5, -1.0, 3.0]), np.array([0.1, 0.3, -0.2])
    assert np.allclose(one_cloud(*d, *u, 0.0), d / (d @ d + (u @ d) ** 2) ** 1.5, rtol=ROUNDING, atol=0.0)
    assert tuple(one_cloud(0.0, 0.0, 0.0, *u, 0.0)) == (0.0, 0.0, 0.0)


def clouds(points, positions, weights, momenta, size):
    out = np.empty((6, points.shape[1]))
    superpose_clouds(points, positions, weights, momenta, size**2, out)
    return out


def test_moving_clouds():
    """Naive twin: distances boosted to the frame of the cloud, minus the gradient of its potential, boosted back."""
    chance = np.random.default_rng(2)
    points, positions = chance.normal(size=(3, 5)), chance.normal(size=(3, 4))
    weights, momenta = chance.normal(size=4), 3.0 * chance.normal(size=(3, 4))
    wanted = np.zeros((6, 5))
    for m in range(5):
        for n in range(4):
            u, d = momenta[:, n], points[:, m] - positions[:, n]
            gamma, way = np.sqrt(1.0 + u @ u), u / np.linalg.norm(u)
            rest = np.array(gradient(d + (gamma - 1.0) * (way @ d) * way)) * weights[n]
            wanted[:3, m] += gamma * rest - (gamma - 1.0) * (way @ rest) * way
            wanted[3:, m] += np.cross(u, rest)
    found = clouds(points, positions, weights, momenta, SIZE)
    mixed_signs = 1e-12
    assert np.abs(found - wanted).max() < mixed_signs * np.abs(wanted).max()


def row_of_clouds(dx, dy, dz, reach):
    """Field across over its distance, and along, of clouds spread evenly over 2 reach along z, by mpmath."""
    with mp.workdps(25):
        a2, rho2 = mpf(SIZE) ** 2, mpf(dx) ** 2 + mpf(dy) ** 2

        def share(z):
            r2 = rho2 + z * z
            return (r2 + mpf(5) / 2 * a2) / (r2 + a2) ** mpf(2.5)

        low, high = mpf(dz) - reach, mpf(dz) + reach
        cuts = [low, *(mpf(c) for c in (-3, -1, 0, 1, 3) if low < c < high), high]
        across = quad(share, cuts) / (2 * reach)
        return float(across), float(quad(lambda z: z * share(z), cuts) / (2 * reach))


@pytest.mark.parametrize("gamma", [1.0, 30.0])
@pytest.mark.parametrize("place", [(0.3, -0.2, 0.5), (1.5, 0.4, -9.0), (0.0, 0.0, 2.0), (0.4, 0.1, 30.0)])
def test_rods_are_rows_of_clouds(place, gamma):
    """Closed form, mpmath: four thirds of a row of clouds less one third of a row twice as long."""
    half, x, y, z = 5.0, *place
    found = np.empty((3, 1))
    point = np.array([[x], [y], [z / gamma]])
    superpose_rods(point, np.zeros((3, 1)), np.ones(1), gamma, half, SIZE**2, found)
    (short, long), quadrature = (row_of_clouds(x, y, z, reach) for reach in (half, 2.0 * half)), 1e-12
    across, along = (4.0 / 3.0 * s - 1.0 / 3.0 * l for s, l in zip(short, long, strict=True))
    wanted = np.array([across * x, across * y, along / gamma])
    assert np.abs((found[:, 0] - wanted) * [1.0, 1.0, gamma]).max() < quadrature * np.hypot(across, along)


def test_rods_have_no_second_moment():
    """Closed form: from afar a rod is a charge up to (h / r)^4."""
    for r in (100.0, 200.0):
        out = np.empty((3, 1))
        superpose_rods(np.array([[r], [0.0], [0.0]]), np.zeros((3, 1)), np.ones(1), 1.0, 2.0, 0.0, out)
        assert abs(out[0, 0] * r * r - 1.0) < 15.0 * 2.0**4 / r**4


def test_rods_add_up():
    """Naive twin: one rod at a time, by weight, place and shared motion."""
    chance, gamma = np.random.default_rng(4), 12.0
    points, positions, weights = chance.normal(size=(3, 6)), chance.normal(size=(3, 5)), chance.normal(size=5)
    together, one, wanted = np.empty((3, 6)), np.empty((3, 6)), np.zeros((3, 6))
    superpose_rods(points, positions, weights, gamma, 2.0, SIZE**2, together)
    for n in range(5):
        shifted = np.ascontiguousarray(points - positions[:, [n]])
        superpose_rods(shifted, np.zeros((3, 1)), np.ones(1), gamma, 2.0, SIZE**2, one)
        wanted += weights[n] * one
    mixed_signs = 1e-12
    assert np.abs(together - wanted).max() < mixed_signs * np.abs(wanted).max()
