"""Lines of charge in conducting chambers: no field along the wall, flux, mirrored charges, fitted walls."""

from math import inf

import numpy as np
import pytest

from beamfield.laws.laslett import image_coefficients
from beamfield.laws.wall_field import image_field, line_field
from tests.walls import ellipse_image, rectangle_image

PROMISED, rounding, fitted = 1e-3, 1e-11, 1e-9
CHAMBERS = [
    ("round", 1.0, 1.0),
    ("elliptic", 1.0 + 1e-9, 1.0),
    ("elliptic", 1.0001, 1.0),
    ("elliptic", 2.0, 1.0),
    ("elliptic", 1.0, 2.0),
    ("elliptic", 10.0, 1.0),
    ("rectangular", 1.0, 1.0),
    ("rectangular", 3.0, 1.0),
    ("rectangular", 1.0, 10.0),
    ("plates", inf, 1.0),
]


def wall(shape, w, h):
    """Places (2, K) on the wall and outward unit normals (2, K)."""
    if shape in ("round", "elliptic"):
        t = 2.0 * np.pi * (np.arange(400) + 0.5) / 400
        normals = np.stack([h * np.cos(t), w * np.sin(t)])
        return np.stack([w * np.cos(t), h * np.sin(t)]), normals / np.hypot(*normals)
    x, ones = np.linspace(-0.98, 0.98, 201), np.ones(201)
    top = np.stack([min(w, 3.0) * x, h * ones]), np.stack([0.0 * x, ones])
    if shape == "plates":
        return top
    side = np.stack([w * ones, h * x]), np.stack([ones, 0.0 * x])
    return tuple(np.hstack(pair) for pair in zip(top, side, strict=True))


@pytest.mark.parametrize("shape, w, h", CHAMBERS)
@pytest.mark.parametrize("place", [(0.0, 0.0), (0.3, -0.2), (-0.5, 0.6)])
def test_no_field_along_the_wall(shape, w, h, place):
    """Fact: a conductor bears no field along it. Promised is 1e-3 of the normal one; the maps keep 1e-11."""
    points, normals = wall(shape, w, h)
    field = line_field(shape, w, h, (place[0] * min(w, 3.0), place[1] * h), points)
    across = np.abs(field[0] * normals[1] - field[1] * normals[0])
    outward = (field * normals).sum(axis=0)
    assert np.all(outward > 0.0)
    assert np.all(across <= rounding * outward)
    assert rounding < PROMISED


@pytest.mark.parametrize("shape, w, h", [("elliptic", 2.0, 1.0), ("elliptic", 1.0, 2.0), ("round", 1.0, 1.0)])
def test_all_flux_ends_on_the_wall(shape, w, h):
    """Gauss: the flux of a unit line is 2 pi in units of lambda / (2 pi eps0)."""
    points, normals = wall(shape, w, h)
    t = 2.0 * np.pi * (np.arange(400) + 0.5) / 400
    lengths = np.hypot(w * np.sin(t), h * np.cos(t)) * 2.0 * np.pi / 400
    flux = (line_field(shape, w, h, (0.2, 0.3), points) * normals).sum(axis=0) @ lengths
    assert flux == pytest.approx(2.0 * np.pi, rel=1e-9)


@pytest.mark.parametrize("shape, image", [("elliptic", ellipse_image), ("rectangular", rectangle_image)])
def test_against_a_fitted_wall(shape, image):
    """Slow twin, line and place anywhere."""
    for line, place in [((0.5, 0.3), (0.8, -0.4)), ((-1.1, 0.2), (0.1, 0.5)), ((0.0, 0.0), (1.2, 0.1))]:
        slow = image(2.0, 1.0, complex(*line), complex(*place))
        assert image_field(shape, 2.0, 1.0, line, np.array([place]).T)[:, 0] == pytest.approx(slow, abs=fitted)


def mirrored_lines(line, points, count):
    """Image field (2, M) between plates at y = -1, 1: lines of sign (-1)^n at (-1)^n y + 2 n, the last by half."""
    total = np.zeros(points.shape)
    for n in (n for m in range(1, count + 1) for n in (m, -m)):
        away = points - np.array([[line[0]], [(-1) ** n * line[1] + 2.0 * n]])
        total += (0.5 if abs(n) == count else 1.0) * (-1) ** n * away / np.square(away).sum(axis=0)
    return total


def test_plates_as_mirrored_charges():
    """Slow twin: the series of mirrored lines, its rest of first order in 1 / count taken away."""
    line, points = (0.1, 0.2), np.array([[0.3, -0.2], [0.1, 0.4]])
    few, many = (mirrored_lines(line, points, count) for count in (1000, 2000))
    found = image_field("plates", inf, 1.0, line, points)
    assert 2.0 * many - few == pytest.approx(found, abs=1e-8)


@pytest.mark.parametrize("shape, w, h", CHAMBERS)
def test_slope_of_the_image_field_is_the_coefficient(shape, w, h):
    """Two laws of one wall: E_y = 2 eps_1 y / h^2 near the axis."""
    step = 1e-3 * min(w, h)
    near, far = image_field(shape, w, h, (0.0, 0.0), np.array([[0.0, 0.0], [step, 2.0 * step]]))[1] / (step, 2.0 * step)
    eps = image_coefficients(shape, w, h)[0]
    assert (4.0 * near - far) / 3.0 * h**2 / 2.0 == pytest.approx(eps, abs=2e-8 * max(1.0, abs(eps)))
