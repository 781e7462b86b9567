"""Currents, perveance and what a field does: published numbers, limits, and the laws against each other."""

from math import pi, sqrt

import numpy as np
import pytest

from beamfield.constants import (
    COULOMB,
    ELECTRON_MASS,
    ELEMENTARY_CHARGE,
    PROTON_MASS,
    SPEED_OF_LIGHT,
    VACUUM_PERMITTIVITY,
)
from beamfield.laws import intensity
from beamfield.laws.ellipsoid import uniform_ellipsoid_gradient
from beamfield.laws.flat_beam import beam_gradient
from beamfield.laws.memory import longitudinal_memory, transverse_memory
from tests.reference import published_strengths as published

rounding, printed = 1e-13, 5e-4


def characteristic_current(mass):
    return mass * SPEED_OF_LIGHT**3 / (COULOMB * ELEMENTARY_CHARGE)


def test_characteristic_currents():
    """From memory of Reiser 1994."""
    assert abs(characteristic_current(ELECTRON_MASS) / published.ELECTRON_CURRENT - 1.0) < printed
    assert abs(characteristic_current(PROTON_MASS) / published.PROTON_CURRENT - 1.0) < printed


@pytest.mark.parametrize(
    ("mass", "constant"), [(ELECTRON_MASS, published.SLOW_ELECTRONS), (PROTON_MASS, published.SLOW_IONS)]
)
def test_perveance_of_slow_beams(mass, constant):
    """From memory of Reiser 1994, sec. 4.2: K = constant I / V^1.5, the limit of slow particles."""
    voltage, current = 100.0, 2e-3
    slow = sqrt(2.0 * ELEMENTARY_CHARGE * voltage / mass) / SPEED_OF_LIGHT
    found = intensity.perveance(current, slow, characteristic_current(mass))
    assert abs(found / (constant * current / voltage**1.5) - 1.0) < 2.0 * printed


def test_perveance_vanishes_and_turns():
    """Limit: a background of 1/gamma^2 of the charge balances the beam; more of it pinches."""
    gamma = sqrt(1.0 + 3.0**2)
    free = intensity.perveance(5.0, 3.0, 17e3)
    assert abs(intensity.perveance(5.0, 3.0, 17e3, gamma**-2)) < rounding * free
    assert intensity.perveance(5.0, 3.0, 17e3, 0.5) == pytest.approx(-4.0 * free, rel=rounding)


@pytest.mark.parametrize("beta_gamma", [1e-3, 0.6, 50.0])
def test_perveance_is_the_defocusing_of_a_long_beam(beta_gamma):
    """Closed form: kappa = 2 K / (a (a + b)) for a uniform ellipse, from two laws that do not meet."""
    gamma, density, sigma = sqrt(1.0 + beta_gamma**2), 3e9, np.array([2e-3, 5e-3])
    slope = COULOMB * ELEMENTARY_CHARGE * density * beam_gradient("kv", sigma)  # the two gammas cancel
    kappa = intensity.acceleration(slope, ELEMENTARY_CHARGE, PROTON_MASS, beta_gamma)
    velocity = SPEED_OF_LIGHT * beta_gamma / gamma
    current = intensity.current(-ELEMENTARY_CHARGE, density, velocity)
    strength = intensity.perveance(current, beta_gamma, characteristic_current(PROTON_MASS))
    assert np.allclose(kappa, strength / (2.0 * sigma * sigma.sum()), rtol=rounding, atol=0.0)  # a = 2 sigma


def test_plasma_wavelength():
    """Closed form: 2 pi beta c / omega_p, omega_p^2 = q^2 n / (eps0 gamma^3 m), at the density of a uniform ellipsoid."""
    beta_gamma, particles, axes = 0.8, 1e10, np.array([1e-3, 3e-3, 2e-2])
    gamma = sqrt(1.0 + beta_gamma**2)
    rest = uniform_ellipsoid_gradient(axes * [1.0, 1.0, gamma])
    kappa = intensity.acceleration(
        COULOMB * ELEMENTARY_CHARGE * particles * gamma * rest, ELEMENTARY_CHARGE, PROTON_MASS, beta_gamma
    )
    density = particles / (4.0 / 3.0 * pi * axes.prod())
    frequency = sqrt(ELEMENTARY_CHARGE**2 * density / (VACUUM_PERMITTIVITY * gamma**3 * PROTON_MASS))
    textbook = 2.0 * pi * SPEED_OF_LIGHT * beta_gamma / gamma / frequency
    constants = 1e-9  # eps0 and mu0 are rounded apart
    assert abs(intensity.plasma_wavelength(*kappa) / textbook - 1.0) < constants


def test_bunching_factor():
    """Limit: a coasting beam has 1; a Gaussian bunch sqrt(2 pi) sigma / C."""
    assert intensity.bunching_factor(1e12, 1, 50.0, 1e12 / 50.0) == pytest.approx(1.0, rel=rounding)
    peak = intensity.peak_line_density(1e11, 2.0, 1.0 / sqrt(2.0 * pi))
    assert intensity.bunching_factor(1e11, 3, 100.0, peak) == pytest.approx(3.0 * sqrt(2.0 * pi) * 0.02, rel=rounding)


def test_energy_change():
    """Definition of the electronvolt: 5 V/m on a charge of -3 e."""
    assert intensity.energy_change(5.0, -3.0 * ELEMENTARY_CHARGE) == pytest.approx(15.0, rel=rounding)


@pytest.mark.parametrize("beta_gamma", [1e-3, 1.0, 1e3])
def test_memory_lengths(beta_gamma):
    """Closed form: light leaves the past place and arrives now, in mpmath where digits cancel."""
    from mpmath import mpf, sqrt, workdps

    with workdps(40):
        u = mpf(beta_gamma)
        beta = u / sqrt(1 + u * u)
        behind = mpf(transverse_memory(beta_gamma, 0.02))
        assert abs(sqrt(behind**2 + mpf(0.02) ** 2) / (behind / beta) - 1) < rounding
        assert abs(longitudinal_memory(beta_gamma, 0.3) / (beta / (1 - beta) * mpf(0.3)) - 1) < rounding
