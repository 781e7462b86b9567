"""Direct tune shift and rms forces: published numbers, limits, and the laws against sums over the density."""

from math import pi, sqrt

import numpy as np
import pytest

from beamfield.constants import ELEMENTARY_CHARGE, PROTON_MASS, SPEED_OF_LIGHT
from beamfield.laws import rms_force
from beamfield.laws.ellipsoid import uniform_ellipsoid_field
from beamfield.laws.flat_beam import AXIS_DENSITY, beam_gradient, kv_field, parabolic_field
from beamfield.laws.parabolic import parabolic_ellipsoid_field
from beamfield.laws.tune import direct_tune_shift, long_beam_tune_shift
from tests.reference import published_fields, published_strengths

rounding, quadrature = 1e-13, 1e-9


def shift(gamma, **changed):
    """Tune shift of a round Gaussian proton bunch."""
    beta = sqrt(1.0 - gamma**-2)
    case = {"particles": 1e12, "classical_radius": 1.5347e-18, "emittance": 2e-6, "bunching_factor": 0.3} | changed
    return long_beam_tune_shift(**case, beta=beta, gamma=gamma)


@pytest.mark.parametrize(("energies", "gain"), published_strengths.GAINS.items())
def test_injection_energy(energies, gain):
    """Published: the shift falls by beta gamma^2 at fixed brightness."""
    printed = 4e-4
    low, high = (shift(1.0 + energy * ELEMENTARY_CHARGE / (PROTON_MASS * SPEED_OF_LIGHT**2)) for energy in energies)
    assert abs(low / high / gain - 1.0) < printed


def test_round_gaussian_formula():
    """From memory of Schindl 1999: -r0 N / (4 pi emittance beta gamma^2 B_f); uniform at equal rms is half of it."""
    gamma = 1.17
    beta = sqrt(1.0 - gamma**-2)
    textbook = -1.5347e-18 * 1e12 / (4.0 * pi * 2e-6 * beta * gamma**2 * 0.3)
    assert shift(gamma) == pytest.approx(textbook, rel=rounding)
    assert shift(gamma, axis_density=AXIS_DENSITY["kv"]) == pytest.approx(0.5 * textbook, rel=rounding)


@pytest.mark.parametrize("profile", AXIS_DENSITY)
def test_both_tune_laws(profile):
    """Closed form: the ring integral of a beam with sigma^2 = beta emittance / (beta gamma) is the textbook formula."""
    gamma, circumference, total, radius = 1.4, 160.0, 2e12, 1.5347e-18
    beta = sqrt(1.0 - gamma**-2)
    optics, emittance = np.array([[12.0, 3.0], [4.0, 1.0]]), np.array([2e-6, 5e-6])  # one ratio of sizes all round
    weights = np.array([0.4, 0.6])
    sigma = np.sqrt(optics * emittance[:, None] / (beta * gamma))
    density = total / (circumference * 0.35)
    kappa = (
        radius
        * density
        / (beta**2 * gamma**3)
        * beam_gradient(profile, sigma[:, 0])[0]
        * sigma[0, 0] ** 2
        / sigma[0] ** 2
    )
    found = direct_tune_shift(optics[0], kappa, weights, circumference)
    ratio = sigma[1, 0] / sigma[0, 0]
    textbook = long_beam_tune_shift(total, radius, 2e-6, 0.35, beta, gamma, ratio, AXIS_DENSITY[profile])
    assert found == pytest.approx(textbook, rel=rounding)


def test_sacherer_spheres():
    """From memory of Sacherer 1971: .0894 and .0940, about 5 % apart; closed form for the first."""
    printed = 5e-5
    unit = np.ones(3)
    assert np.all(np.abs(rms_force.ellipsoid_rms_force("uniform", unit) - published_fields.SPHERE_UNIFORM) < printed)
    assert np.all(np.abs(rms_force.ellipsoid_rms_force("gaussian", unit) - published_fields.SPHERE_GAUSSIAN) < printed)
    assert rms_force.ellipsoid_rms_force("uniform", unit)[0] == pytest.approx(1.0 / (5.0 * sqrt(5.0)), rel=rounding)


def shells(count=24):
    """Directions and weights on a unit sphere octant, Gauss-Legendre (3, K), (K,)."""
    x, w = np.polynomial.legendre.leggauss(count)
    cos, turn = np.meshgrid(0.5 * (x + 1.0), 0.25 * pi * (x + 1.0), indexing="ij")
    sin = np.sqrt(1.0 - cos**2)
    return np.stack([sin * np.cos(turn), sin * np.sin(turn), cos]).reshape(3, -1), np.outer(w, w).ravel() / 4.0


@pytest.mark.parametrize(
    ("profile", "field", "edge", "density"),
    [
        ("uniform", uniform_ellipsoid_field, sqrt(5.0), lambda u: 3.0 * u**2),
        ("parabolic", parabolic_ellipsoid_field, sqrt(7.0), lambda u: 7.5 * u**2 * (1.0 - u**2)),
    ],
)
@pytest.mark.parametrize("sigma", [(1.0, 1.0, 1.0), (1.0, 2.0, 0.3)])
def test_rms_force_is_a_mean(profile, field, edge, density, sigma):
    """Naive twin: <x_i E_i> summed over the density."""
    axes = edge * np.array(sigma)
    directions, weights = shells()
    u, shell = np.polynomial.legendre.leggauss(12)
    u, shell = 0.5 * (u + 1.0), 0.5 * shell
    mean = sum(
        w * density(r) * ((r * axes[:, None] * directions) * field(r * axes[:, None] * directions, axes)) @ weights
        for r, w in zip(u, shell, strict=True)
    )
    assert np.allclose(rms_force.ellipsoid_rms_force(profile, sigma), mean, rtol=quadrature, atol=0.0)


@pytest.mark.parametrize(
    ("field", "edge", "density"),
    [(kv_field, 2.0, lambda u: 2.0 * u), (parabolic_field, sqrt(6.0), lambda u: 4.0 * u * (1.0 - u**2))],
)
def test_rms_force_of_beams(field, edge, density):
    """Naive twin: sigma_x / (sigma_x + sigma_y), whatever the profile."""
    sigma = np.array([1.0, 3.0])
    turn = 2.0 * pi * np.arange(64) / 64.0
    ring = edge * sigma[:, None] * np.stack([np.cos(turn), np.sin(turn)])
    u, w = np.polynomial.legendre.leggauss(12)
    u, w = 0.5 * (u + 1.0), 0.5 * w
    mean = sum(
        v * density(r) * np.mean(r * ring * field(r * ring, edge * sigma), axis=1) for r, v in zip(u, w, strict=True)
    )
    assert np.allclose(rms_force.long_beam_rms_force(sigma), mean, rtol=quadrature, atol=0.0)


def test_space_charge_ratio_of_a_long_bunch():
    """Limit: a needle has the rms force of a long beam at its mean line density, to the logarithm's order."""
    sigma, slender = np.array([1e-3, 2e-3, 1e3]), 1e-4
    needle = rms_force.ellipsoid_rms_force("gaussian", sigma)[:2]
    assert np.allclose(needle, rms_force.long_bunch_rms_force("gaussian", sigma), rtol=slender, atol=0.0)
    ratio = rms_force.space_charge_ratio(1e-3, needle[0], 1e12, 1.5e-18, 0.6, 1e-6)
    gamma, density = sqrt(1.0 + 0.6**2), 1e12 * rms_force.MEAN_LINE_DENSITY["gaussian"] / 1e3 * sqrt(1.0 + 0.6**2)
    strength = 2.0 * 1.5e-18 * density * gamma**2 / (0.6**2 * gamma**3)  # K = 2 r lambda / (beta^2 gamma^3), lab lambda
    textbook = rms_force.long_beam_ratio(1e-3, rms_force.long_beam_rms_force(sigma[:2])[0], strength, 1e-6)
    assert ratio == pytest.approx(textbook, rel=slender)


def test_mean_line_densities():
    """Closed form: integral of the squared line density of unit rms length."""
    x, w = np.polynomial.legendre.leggauss(400)
    for name, end, line in [
        ("uniform", sqrt(3.0), lambda z: 0.5 / sqrt(3.0) + 0.0 * z),
        ("parabolic", sqrt(5.0), lambda z: 0.75 / sqrt(5.0) * (1.0 - z**2 / 5.0)),
        ("gaussian", 12.0, lambda z: np.exp(-0.5 * z**2) / sqrt(2.0 * pi)),
    ]:
        assert rms_force.MEAN_LINE_DENSITY[name] == pytest.approx(end * w @ line(end * x) ** 2, rel=rounding)
