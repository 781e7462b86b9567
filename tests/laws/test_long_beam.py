"""Potential, geometry factor and impedance of long beams, and the round pipe that a chamber is to them."""

from math import inf, pi

import numpy as np
import pytest
from scipy.integrate import dblquad, quad
from scipy.special import ellipj, ellipk

from beamfield.constants import SPEED_OF_LIGHT, VACUUM_IMPEDANCE
from beamfield.laws import long_beam
from beamfield.laws.wall_radius import wall_radius
from tests.reference import published_longitudinal as published

PRINTED = 5e-5  # half a unit of the last digit
RMS = {"kv": 2.0, "parabolic": 6.0**0.5, "gaussian": 1.0}  # scale over rms size
quadrature = 1e-7


@pytest.mark.parametrize("profile", published.AVERAGED)
def test_averages(profile):
    """Published, read: R. Baartman, arXiv:1508.00153; there a is twice the rms size."""
    found = long_beam.geometry_factor(long_beam.AVERAGED[profile], 2.0, RMS[profile])
    assert abs(found - published.AVERAGED[profile]) < PRINTED


def test_uniform_on_axis_and_against_the_wall():
    """Published, read: 1 + 2 ln(b/a); closed form: 29.979 (I / beta) (1 + 2 ln(b/a)) V."""
    assert long_beam.ON_AXIS["kv"] == published.ON_AXIS_UNIFORM
    factor = long_beam.geometry_factor(1.0, 0.06, 0.01)
    volts = long_beam.depression(2.0 / (0.4 * SPEED_OF_LIGHT), factor)
    assert volts == pytest.approx(published.DEPRESSION * 2.0 / 0.4 * (1.0 + 2.0 * np.log(6.0)), rel=2e-7)


DENSITIES = {"kv": lambda t: 2.0 * t, "parabolic": lambda t: 4.0 * t * (1.0 - t * t)}
DENSITIES["gaussian"] = lambda t: t * np.exp(-0.5 * t * t)


@pytest.mark.parametrize("profile", DENSITIES)
def test_constants_on_the_axis(profile):
    """General library: -2 <ln t> over the profile by quadrature."""
    end = inf if profile == "gaussian" else 1.0
    assert long_beam.ON_AXIS[profile] == pytest.approx(
        quad(lambda t: -2.0 * DENSITIES[profile](t) * np.log(t), 0.0, end)[0], rel=quadrature
    )


@pytest.mark.parametrize("profile", DENSITIES)
def test_constants_of_the_average(profile):
    """General library: twice the field energy, -4 integral of n(r) ln r M(r) dr, M the charge within r."""
    density, end = DENSITIES[profile], 8.0 if profile == "gaussian" else 1.0
    pairs = dblquad(lambda inner, t: density(t) * density(inner) * np.log(t), 0.0, end, 0.0, lambda t: t)[0]
    assert long_beam.AVERAGED[profile] == pytest.approx(-4.0 * pairs, rel=1e-6)


def test_mean_logarithm_of_an_ellipse():
    """General library: <ln r> over the edge of an ellipse, weighted as a thin shell, is ln((a + b)/2)."""
    mean = quad(lambda psi: 0.5 * np.log((3.0 * np.cos(psi)) ** 2 + np.sin(psi) ** 2), 0.0, 2.0 * pi)[0] / (2.0 * pi)
    assert mean == pytest.approx(np.log(2.0), rel=quadrature)


def test_impedance():
    """Closed form: g Z0 / (2 beta gamma^2)."""
    assert long_beam.impedance_over_n(4.0, 0.5, 3.0) == pytest.approx(VACUUM_IMPEDANCE * 4.0 / 9.0, rel=1e-14)


def test_field_is_the_slope_of_the_depression():
    """Closed form: E_z = -d phi/dz / gamma^2 of a slowly varying beam."""
    assert long_beam.axis_field(-3e-9, 4.0, 2.0) == pytest.approx(long_beam.depression(3e-9, 4.0) / 4.0, rel=1e-14)


def test_round_square_plates():
    """From memory of Nehari 1952 and textbooks of conformal mapping: 1; 1.0787; 4/pi of the half side."""
    assert wall_radius("round", 0.06, 0.06) == pytest.approx(0.06, rel=1e-15)
    assert wall_radius("rectangular", 1.0, 1.0) == pytest.approx(1.0787, abs=PRINTED)
    assert wall_radius("plates", inf, 2.0) == pytest.approx(8.0 / pi, rel=1e-15)


@pytest.mark.parametrize("ratio", [1.02, 1.5, 3.0, 8.0])
def test_ellipse_by_its_conformal_map(ratio):
    """General library: f(z) = sqrt(k) sn(2 K/pi asin(z/c)) maps the ellipse on the unit disc; b = 1/f'(0)."""
    nome = ((ratio - 1.0) / (ratio + 1.0)) ** 2
    terms = np.arange(1, 200)
    theta2 = 2.0 * sum(nome ** ((n + 0.5) ** 2) for n in range(200))
    modulus = (theta2 / (1.0 + 2.0 * np.sum(nome ** (terms**2.0)))) ** 2
    step, focus = 1e-4, np.sqrt(ratio**2 - 1.0)
    slope = np.sqrt(modulus) * ellipj(2.0 * ellipk(modulus**2) / pi * np.arcsin(step / focus), modulus**2)[0] / step
    assert wall_radius("elliptic", ratio, 1.0) == pytest.approx(1.0 / slope, rel=1e-6)
    assert wall_radius("elliptic", 1.0, ratio) == wall_radius("elliptic", ratio, 1.0)


@pytest.mark.parametrize("shape", ["elliptic", "rectangular"])
def test_wide_chambers_are_plates(shape):
    """Limit: side walls far away; never beyond the plates, never within the inscribed circle."""
    assert wall_radius(shape, 30.0, 1.0) == pytest.approx(4.0 / pi, rel=1e-3)
    for ratio in (1.0, 1.3, 2.0, 5.0):
        assert 1.0 - 1e-12 <= wall_radius(shape, ratio, 1.0) <= 4.0 / pi + 1e-12
