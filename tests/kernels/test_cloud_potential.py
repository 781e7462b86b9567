"""The potentials of clouds and rods against the fields of the same, and against quadrature."""

import numpy as np
import pytest

from beamfield.kernels import cloud_potential, clouds

GAMMA, U = 3.0, np.sqrt(8.0)
PLACES = np.random.default_rng(3).normal(size=(3, 4))
WEIGHTS = np.array([1.0, -2.0, 0.5, 1.5])
POINTS = np.random.default_rng(4).normal(size=(3, 10))
MOMENTA = np.tile([[0.0], [0.0], [U]], 4)


def of_clouds(points, size):
    out = np.empty((4, points.shape[1]))
    cloud_potential.potential_of_clouds(points, PLACES, WEIGHTS, MOMENTA, size**2, out)
    return out


def of_rods(points, size, half):
    out = np.empty(points.shape[1])
    cloud_potential.potential_of_rods(points, PLACES, WEIGHTS, GAMMA, half, size**2, out)
    return out


def slopes(potential):
    """Slopes (3, M) along x, y, z by central differences."""
    step = 1e-5  # truncation 1e-10, rounding 1e-11
    shifts = [step * np.eye(3)[:, axis : axis + 1] for axis in range(3)]
    return np.array([(potential(POINTS + shift) - potential(POINTS - shift)) / (2.0 * step) for shift in shifts])


@pytest.mark.parametrize("size", [0.0, 0.3])
def test_clouds_make_the_field_of_clouds(size):
    """Closed form: across, E = -grad phi; along, E = -grad phi / gamma^2; for what moves along z."""
    field = np.empty((6, 10))
    clouds.superpose_clouds(POINTS, PLACES, WEIGHTS, MOMENTA, size**2, field)
    electric = -slopes(lambda points: of_clouds(points, size)[0]) / np.array([[1.0], [1.0], [GAMMA**2]])
    differences = 1e-7
    assert np.allclose(electric, field[:3], rtol=0.0, atol=differences * np.abs(field[:3]).max())
    assert np.allclose(of_clouds(POINTS, size)[1:], U / GAMMA * np.outer([0, 0, 1], of_clouds(POINTS, size)[0]))


def test_rods_make_the_field_of_rods():
    """Closed form: as for clouds."""
    field, size, half = np.empty((3, 10)), 0.3, 0.8
    clouds.superpose_rods(POINTS, PLACES, WEIGHTS, GAMMA, half, size**2, field)
    electric = -slopes(lambda points: of_rods(points, size, half)) / np.array([[1.0], [1.0], [GAMMA**2]])
    differences = 1e-7
    assert np.allclose(electric, field, rtol=0.0, atol=differences * np.abs(field).max())


def test_a_rod_is_a_mean_of_clouds():
    """Closed form: four thirds of the mean over a rod less one third over one twice as long, by Gauss-Legendre."""
    size, half = 0.3, 0.8
    node, weight = np.polynomial.legendre.leggauss(80)
    means = [
        sum(0.5 * w * of_clouds(POINTS + [[0.0], [0.0], [reach * x / GAMMA]], size)[0] for x, w in zip(node, weight))
        for reach in (half, 2.0 * half)
    ]
    quadrature = 1e-12
    expected = (4.0 * means[0] - means[1]) / 3.0 / GAMMA
    assert np.allclose(of_rods(POINTS, size, half), expected, rtol=0.0, atol=quadrature * np.abs(expected).max())
