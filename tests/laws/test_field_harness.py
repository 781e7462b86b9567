"""One harness for every field law: far away, mirror images, scale, centre slope, Gauss's law, shapes of arrays."""

from math import pi, sqrt

import numpy as np
import pytest

from beamfield.laws import cylinder, ellipsoid, flat_beam, gaussian, parabolic, product

AXES = np.array([0.8, 1.3, 2.1])
rounding, slope_error, far_error = 2e-13, 1e-8, 1e-5


def gaussian_line(line):
    """Gaussian section with a line density, as a law of points and scales, and its slopes."""
    return (
        lambda p, a: product.gaussian_section_field(p, a[:2], line, a[2]),
        lambda a: product.product_gradient("gaussian", a[:2], line, a[2]),
    )


def beam(profile, edge, field):
    """A long beam as a law of points and scales, and its slopes."""
    return lambda p, a: field(p, a[:2]), lambda a: flat_beam.beam_gradient(profile, np.asarray(a[:2]) / edge)


BUNCHES = {  # law, slopes, density of the centre times the product of the scales
    "uniform": (ellipsoid.uniform_ellipsoid_field, ellipsoid.uniform_ellipsoid_gradient, 3.0 / (4.0 * pi)),
    "parabolic": (parabolic.parabolic_ellipsoid_field, parabolic.parabolic_ellipsoid_gradient, 15.0 / (8.0 * pi)),
    "gaussian": (gaussian.gaussian_field, gaussian.gaussian_gradient, (2.0 * pi) ** -1.5),
    "cylinder": (cylinder.uniform_cylinder_field, cylinder.uniform_cylinder_gradient, 1.0 / (2.0 * pi)),
    "gaussian x uniform": (*gaussian_line("uniform"), 1.0 / (4.0 * pi)),
    "gaussian x parabolic": (*gaussian_line("parabolic"), 3.0 / (8.0 * pi)),
    "gaussian x gaussian": (*gaussian_line("gaussian"), (2.0 * pi) ** -1.5),
}
BEAMS = {
    "kv": (*beam("kv", 2.0, flat_beam.kv_field), 1.0 / pi),
    "parabolic beam": (*beam("parabolic", sqrt(6.0), flat_beam.parabolic_field), 2.0 / pi),
    "gaussian beam": (*beam("gaussian", 1.0, flat_beam.gaussian_beam_field), 1.0 / (2.0 * pi)),
}
LAWS = BUNCHES | BEAMS
every = pytest.mark.parametrize("name", LAWS)


def cloud(count=40):
    """Points in and about the bunch, the same each time."""
    golden = np.outer([0.754877666, 0.569840291, 0.430159709], np.arange(1, count + 1)) % 1.0
    return (3.0 * golden - 1.5) * AXES[:, None]


@every
def test_far_away(name):
    """Limit: a point charge, 1/r^2, or a line, 2/r."""
    far = 1e4 * np.array([[0.6], [0.48], [0.64]])
    field = LAWS[name][0](far, AXES)
    seen = far if name in BUNCHES else far[:2]
    r = np.linalg.norm(seen)
    expected = seen / r**3 if name in BUNCHES else 2.0 * seen / r**2
    assert np.linalg.norm(field[: len(seen)] - expected) < far_error * np.linalg.norm(expected)


@every
def test_mirror_images(name):
    """Symmetry: each component turns with its own coordinate and with no other."""
    points, law = cloud(), LAWS[name][0]
    for axis in range(3):
        mirror = np.where(np.arange(3) == axis, -1.0, 1.0)[:, None]
        assert_close(law(mirror * points, AXES), mirror * law(points, AXES))


@every
def test_scale(name):
    """Scaling: a bunch of thrice the size has a ninth of the field at thrice the distance, a long beam a third."""
    points, law = cloud(), LAWS[name][0]
    assert_close(law(3.0 * points, 3.0 * AXES) * (9.0 if name in BUNCHES else 3.0), law(points, AXES))


@every
def test_axes_have_no_favourite(name):
    """Symmetry: x and y change places with their sizes."""
    points, law, swap = cloud(), LAWS[name][0], [1, 0, 2]
    assert_close(law(points[swap], AXES[swap])[swap], law(points, AXES))


@every
def test_one_point_or_many(name):
    """Array in, array out: (3, M) for M of 0, 1 and 40, the same numbers."""
    points, law = cloud(), LAWS[name][0]
    together = law(points, AXES)
    assert together.shape == points.shape
    assert_close(np.concatenate([law(points[:, k : k + 1], AXES) for k in range(40)], axis=1), together)


@every
def test_centre_slope(name):
    """Limit: the field near the centre over the distance."""
    law, slopes, _ = LAWS[name]
    near = 1e-4 * np.diag(AXES)
    field = np.diag(law(near, AXES)) / np.diag(near)
    found = np.resize(np.append(slopes(AXES), 0.0), 3)
    assert np.all(np.abs(field - found) <= slope_error * found.max())


@every
def test_gauss(name):
    """Closed form: the slopes sum to 4 pi rho, for needles and pancakes too."""
    _, slopes, density = LAWS[name]
    for axes in (AXES, np.array([1.0, 1.0, 1e-4]), np.array([1.0, 10.0, 1e5]), np.array([1e-6, 1e-5, 1e-2])):
        volume = axes.prod() if name in BUNCHES else axes[:2].prod()
        assert abs(np.sum(slopes(axes)) * volume / (4.0 * pi * density) - 1.0) < rounding


def test_elliptic_sections_along():
    """Closed form: slopes of kv and parabolic sections with every line density sum to 4 pi rho."""
    sections, lines = (
        {"kv": 1.0 / pi, "parabolic": 2.0 / pi},
        {"uniform": 0.5, "parabolic": 0.75, "gaussian": 1 / sqrt(2 * pi)},
    )
    for section, flat in sections.items():
        for line, peak in lines.items():
            slopes = product.product_gradient(section, (1.0, 7.0), line, 1e-3)
            assert abs(slopes.sum() * 7e-3 / (4.0 * pi * flat * peak) - 1.0) < rounding


def test_long_bunch_is_a_beam():
    """Limit: at the centre of a long bunch the field across is that of a long beam of its peak line density."""
    long_error = 1e-7
    for name, shape, peak in [("gaussian x uniform", "gaussian beam", 0.5), ("cylinder", "kv", 0.5)]:
        points = cloud() * np.array([1.0, 1.0, 0.0])[:, None]
        bunch = LAWS[name][0](points, (0.8, 1.3, 1e5)) * 1e5 / peak
        assert_close(bunch, LAWS[shape][0](points, (0.8, 1.3, 1e5)), long_error)


def test_potentials():
    """Limit: field is minus the slope of the potential; at the centre the three shapes order by their cores."""
    step = 1e-4
    points = cloud()
    for axis in range(3):
        shift = np.where(np.arange(3) == axis, step, 0.0)[:, None]
        before, after = (ellipsoid.uniform_ellipsoid_potential(points + s, AXES) for s in (-shift, shift))
        assert np.allclose(
            (before - after) / (2.0 * step), ellipsoid.uniform_ellipsoid_field(points, AXES)[axis], atol=1e-6
        )


def test_potential_of_spheres():
    """Textbook: at the centre 3/2 uniform, 15/8 parabolic, sqrt(2/pi) Gaussian over radius or rms."""
    origin, ones = np.zeros((3, 1)), (1.0, 1.0, 1.0)
    assert abs(ellipsoid.uniform_ellipsoid_potential(origin, ones)[0] - 1.5) < rounding
    assert abs(parabolic.parabolic_ellipsoid_centre_potential(ones) - 1.875) < rounding
    assert abs(gaussian.gaussian_centre_potential(ones) - sqrt(2.0 / pi)) < rounding


def assert_close(found, expected, tolerance=rounding):
    error = np.linalg.norm(found - expected, axis=0)
    assert np.all(error <= tolerance * np.maximum(np.linalg.norm(expected, axis=0), 1e-3 * np.abs(expected).max()))
