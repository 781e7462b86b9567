"""Field laws against published numbers and textbook formulas of special shapes."""

import mpmath
import numpy as np
import pytest

from beamfield.laws.cylinder import uniform_cylinder_axis_field, uniform_cylinder_gradient
from beamfield.laws.ellipsoid import depolarisation_factors
from beamfield.laws.flat_beam import gaussian_beam_field
from beamfield.laws.gaussian import gaussian_field
from beamfield.laws.product import axis_field, product_gradient
from tests.reference import published_fields as published

rounding = 1e-13


@pytest.mark.parametrize("ratio", published.PROLATE)
def test_osborn(ratio):
    """From memory of Osborn 1945: the printed digits of the polar factor."""
    prolate, oblate = 5e-7, 5e-5
    assert abs(depolarisation_factors((1.0, 1.0, ratio))[2] - published.PROLATE[ratio]) <= 1.2 * prolate
    assert abs(depolarisation_factors((ratio, ratio, 1.0))[2] - published.OBLATE[ratio]) <= 1.2 * oblate


def test_three_two_one():
    """Closed form."""
    printed = 5e-8
    assert np.allclose(depolarisation_factors((3.0, 2.0, 1.0)), published.THREE_TWO_ONE, rtol=0.0, atol=printed)


@pytest.mark.parametrize("axes", [(1, 1, 1e5), (1, 1, 1e-4), (1, 10, 1e5), (1e-6, 1e-5, 1e-9), (3, 2, 1)])
def test_factors_sum_to_one(axes):
    """Closed form, NIST DLMF 19.33.8; the smallest one has all its digits (against mpmath)."""
    factors = depolarisation_factors(axes)
    assert abs(factors.sum() - 1.0) < rounding
    a, b, c = sorted(map(mpmath.mpf, axes))
    smallest = a * b * c / 3 * mpmath.elliprd(a**2, b**2, c**2)
    assert abs(min(factors) / smallest - 1) < rounding


def test_bassetti_and_erskine():
    """Closed form, printed digits."""
    printed = 5e-11
    field = gaussian_beam_field(np.array([[1.0], [1.0]]), (2.0, 1.0))[:, 0] / 2.0
    assert np.allclose(field, published.BASSETTI_ERSKINE, rtol=0.0, atol=printed)


def test_round_gaussian_peak():
    """From memory of CERN-2006-002: where and how high."""
    place, height = 1e-6, 5e-6
    r = np.linspace(1.584, 1.586, 4001)
    field = gaussian_beam_field(np.array([r, 0.0 * r]), (1.0, 1.0))[0] / 2.0
    assert abs(r[field.argmax()] - published.ROUND_PEAK_AT) < place
    assert abs(field.max() - published.ROUND_PEAK) < height


@pytest.mark.parametrize("difference", [0.0, 1e-14, 1e-9, 1e-5, 1e-3, 0.1])
def test_round_limit_keeps_its_digits(difference):
    """Closed form: 2 (1 - exp(-r^2/2)) / r, and the first order in the difference of the sizes bounds the rest."""
    r = np.array([1e-6, 1e-3, 0.1, 1.0, 3.0, 30.0, 1e4])
    field = gaussian_beam_field(np.array([r, 0.0 * r]), (1.0 + difference, 1.0))[0]
    assert np.all(np.abs(field / (-2.0 * np.expm1(-(r**2) / 2.0) / r) - 1.0) < 2.0 * difference + rounding)


def test_gaussian_sphere():
    """Textbook: [erf(r/sqrt 2) - sqrt(2/pi) r exp(-r^2/2)] / r^2, in mpmath."""
    for r in (1e-3, 0.5, 2.0, 9.0, 1e4):
        with mpmath.workdps(30):
            t = mpmath.mpf(r)
            textbook = (mpmath.erf(t / mpmath.sqrt(2)) - mpmath.sqrt(2 / mpmath.pi) * t * mpmath.exp(-t * t / 2)) / t**2
        found = gaussian_field(np.array([[0.0], [0.6 * r], [0.8 * r]]), (1.0, 1.0, 1.0))
        assert abs(np.linalg.norm(found) / float(textbook) - 1.0) < rounding


@pytest.mark.parametrize("length", [1e-4, 0.5, 1e5])
def test_round_cylinder(length):
    """Textbook, round uniform cylinder of radius 1, in mpmath: on the axis and its slope at the centre."""
    z = length * np.array([1e-3, 0.3, 1.0, 1.7, 40.0])
    with mpmath.workdps(40):
        half = mpmath.mpf(length)
        exact = [
            (mpmath.sqrt(1 + (half - t) ** 2) - mpmath.sqrt(1 + (half + t) ** 2) + abs(half + t) - abs(half - t)) / half
            for t in map(mpmath.mpf, z)
        ]
        slope = 2 / half * (1 - half / mpmath.sqrt(1 + half**2))
    exact = np.array(exact, dtype=float)
    assert np.all(np.abs(uniform_cylinder_axis_field(z, (1.0, 1.0, length)) / exact - 1.0) < rounding)
    assert np.all(np.abs(axis_field(z, "kv", (1.0, 1.0), "uniform", length) / exact - 1.0) < rounding)
    assert abs(uniform_cylinder_gradient((1.0, 1.0, length))[2] / float(slope) - 1.0) < rounding
    assert abs(product_gradient("kv", (1.0, 1.0), "uniform", length)[2] / float(slope) - 1.0) < rounding


DISCS = {  # field of a thin round disc of unit charge on its axis at height u > 0: textbook
    "kv": lambda u: 2 * (1 - u / mpmath.sqrt(1 + u * u)),
    "gaussian": lambda u: 1 - u * mpmath.sqrt(mpmath.pi / 2) * mpmath.exp(u * u / 2) * mpmath.erfc(u / mpmath.sqrt(2)),
    "parabolic": lambda u: 4 * (1 + 2 * u * u - 2 * u * mpmath.sqrt(1 + u * u)),
}
LINES = {  # line density of unit charge, half length or rms length l
    "uniform": lambda t, l: 1 / (2 * l),
    "parabolic": lambda t, l: 3 / (4 * l) * (1 - (t / l) ** 2),
    "gaussian": lambda t, l: mpmath.exp(-(t**2) / (2 * l * l)) / (l * mpmath.sqrt(2 * mpmath.pi)),
}


@pytest.mark.parametrize("section", DISCS)
@pytest.mark.parametrize("line", LINES)
@pytest.mark.parametrize("length", [1e-3, 0.7, 20.0])
def test_stacks_of_discs(section, line, length):
    """Closed form: a product bunch is a stack of discs, summed in mpmath."""
    quadrature = 1e-11
    with mpmath.workdps(25):
        l, z = mpmath.mpf(length), mpmath.mpf(length) * mpmath.mpf(0.75)
        end = 12 * l if line == "gaussian" else l
        cuts = [-end, -l, z - l / 8, z - l / 100, z, z + l / 100, z + l / 8, end]
        disc, density = DISCS[section], LINES[line]
        exact = mpmath.quad(lambda t: mpmath.sign(z - t) * density(t, l) * disc(abs(z - t)), cuts)
    found = axis_field(np.array([0.75 * length]), section, (1.0, 1.0), line, length)[0]
    assert abs(found / float(exact) - 1.0) < quadrature
