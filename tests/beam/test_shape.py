"""What a width word means for each shape: conversions against projections integrated numerically by scipy."""

from functools import cache
from itertools import product
from math import exp, inf, sqrt

import pytest
from scipy.integrate import quad
from scipy.optimize import brentq

from beamfield.beam.shape import LONGITUDINAL, SHAPES, TRANSVERSE, Shape
from beamfield.errors import NonsenseError

QUADRATURE = 1e-8
PROFILES = {  # against t = (x/a)^2, in units of the scale a: half axis, half length or rms size
    "gaussian": lambda t: exp(-0.5 * t),
    "kv": lambda t: 1.0 if t < 1.0 else 0.0,
    "uniform": lambda t: 1.0 if t < 1.0 else 0.0,
    "parabolic": lambda t: max(0.0, 1.0 - t),
}
PRODUCTS = [Shape(*kinds) for kinds in product(TRANSVERSE, LONGITUDINAL[:-1])]
ELLIPSOIDS = [shape for shape in SHAPES.values() if shape.ellipsoid]
AXES = [(shape, axis) for shape in PRODUCTS + ELLIPSOIDS for axis in range(3)]


def reach(kind):
    return 9.0 if kind == "gaussian" else 1.0


@cache
def projected(shape, axis, x):
    """Density projected on one axis, at x scales from the centre; not normalised."""
    kind = shape.longitudinal if axis == 2 else shape.transverse
    density, end = PROFILES[kind], reach(kind)
    if abs(x) >= end:
        return 0.0
    if shape.ellipsoid:  # over a disc: of radius^2 1 - x^2
        return quad(lambda r2: density(x * x + r2), 0.0, 1.0 - x * x)[0]
    if axis == 2:
        return density(x * x)
    span = sqrt(end * end - x * x)
    return quad(lambda y: density(x * x + y * y), -span, span)[0]


@cache
def moments(shape, axis):
    """Integral and rms, in scales, of the projection."""
    end = reach(shape.longitudinal if axis == 2 else shape.transverse)
    total, square = (
        quad(lambda x, power: projected(shape, axis, x) * x**power, -end, end, args=(power,), limit=200)[0]
        for power in (0, 2)
    )
    return total, sqrt(square / total)


@pytest.mark.parametrize("shape, axis", AXES)
def test_edge(shape, axis):
    """Integral: the edge is one scale from the centre; how many rms sizes that is, the second moment says."""
    kind = shape.longitudinal if axis == 2 else shape.transverse
    if kind == "gaussian":
        assert shape.edge(axis) is None
        assert moments(shape, axis)[1] == pytest.approx(1.0, rel=QUADRATURE, abs=0.0)
    else:
        assert shape.edge(axis) == pytest.approx(1.0 / moments(shape, axis)[1], rel=QUADRATURE, abs=0.0)


@pytest.mark.parametrize("shape, axis", AXES)
def test_width_at_half_maximum(shape, axis):
    """Integral and root: where the projection has fallen to half of its middle."""
    middle = projected(shape, axis, 0.0)
    end = reach(shape.longitudinal if axis == 2 else shape.transverse)
    half = brentq(lambda x: projected(shape, axis, x) - 0.5 * middle, 0.0, end, xtol=1e-13)
    assert shape.fwhm(axis) == pytest.approx(2.0 * half / moments(shape, axis)[1], rel=QUADRATURE, abs=0.0)


@pytest.mark.parametrize("shape", PRODUCTS + ELLIPSOIDS)
def test_peak_line_density(shape):
    """Integral: middle of the line density over its integral, times its rms length."""
    total, rms = moments(shape, 2)
    wanted = projected(shape, 2, 0.0) / total * rms
    assert shape.peak_line_density == pytest.approx(wanted, rel=QUADRATURE, abs=0.0)


@pytest.mark.parametrize("across", TRANSVERSE)
def test_coasting(across):
    """A beam without ends has no length to convert, and the section of its bunched like."""
    beam, bunch = Shape(across, "coasting"), Shape(across, "gaussian")
    assert beam.coasting
    assert not bunch.coasting
    assert beam.edge(2) is beam.fwhm(2) is None
    assert beam.peak_line_density == 0.0
    assert [beam.edge(axis) for axis in (0, 1)] == [bunch.edge(axis) for axis in (0, 1)]


def test_flat_along():
    """Constant up to an edge: there the field has a cusp."""
    flat = {name: [shape.flat(axis) for axis in range(3)] for name, shape in SHAPES.items()}
    assert flat == {
        "gaussian": [False] * 3,
        "uniform-ellipsoid": [True] * 3,
        "parabolic-ellipsoid": [False] * 3,
        "uniform-cylinder": [True] * 3,
    }
    assert [Shape("kv", "parabolic").flat(axis) for axis in range(3)] == [True, True, False]


def test_names():
    """Interface: four words, and two words each for a product."""
    assert {shape.name for shape in SHAPES.values()} == {
        *("gaussian", "uniform-ellipsoid"),
        *("parabolic-ellipsoid", "uniform-cylinder"),
    }
    assert Shape("kv", "uniform").name == "uniform-cylinder"
    assert Shape("parabolic", "parabolic").name == "parabolic x parabolic"


@pytest.mark.parametrize(
    "kinds", [("uniform", "gaussian"), ("gaussian", "kv"), ("round", "gaussian"), ("gaussian", "gaussian", True)]
)
def test_no_such_shape(kinds):
    with pytest.raises(NonsenseError, match="no bunch is"):
        Shape(*kinds)


def test_no_such_ellipsoid():
    with pytest.raises(NonsenseError, match="uniform across and parabolic along"):
        Shape("uniform", "parabolic", ellipsoid=True)
    assert inf > Shape("uniform", "uniform", ellipsoid=True).edge(0) > 0.0
