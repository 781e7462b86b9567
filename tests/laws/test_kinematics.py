"""One harness for every way to say how fast a particle goes: to beta gamma and back, from nearly at rest to 1e6."""

import mpmath
import numpy as np
import pytest

from beamfield.constants import ELEMENTARY_CHARGE, PROTON_MASS, SPEED_OF_LIGHT
from beamfield.laws import kinematics as law

REST = PROTON_MASS * SPEED_OF_LIGHT**2
MOMENTA = np.array([1.0e-9, 1.0e-4, 0.3, 1.0, 12.5, 1.0e6])
rounding = 8 * np.finfo(float).eps


def exact(function, *arguments):
    """Value of a formula in 60 digits, for the doubles given."""
    with mpmath.workdps(60):
        return float(function(*map(mpmath.mpf, arguments)))


@pytest.mark.parametrize("ratio", [1.0e-18, 1.0e-9, 1.0e-3, 1.0, 40.0, 1.0e6])
def test_from_kinetic_energy(ratio):
    """Closed form in 60 digits: gamma = 1 + T / m c^2, beta gamma = sqrt(gamma^2 - 1)."""
    value = law.beta_gamma_from_kinetic(ratio * REST, REST)
    assert value == pytest.approx(
        exact(lambda t, m: mpmath.sqrt((1 + t / m) ** 2 - 1), ratio * REST, REST), rel=rounding
    )


@pytest.mark.parametrize("gamma", [1.0, 1.0 + 2.0**-40, 1.5, 12.5, 1.0e6])
def test_from_gamma_and_total_energy(gamma):
    """Closed form in 60 digits: beta gamma = sqrt(gamma^2 - 1); no digit lost to the square near gamma = 1."""
    expected = exact(lambda g: mpmath.sqrt(g**2 - 1), gamma)
    assert law.beta_gamma_from_gamma(gamma) == pytest.approx(expected, rel=rounding, abs=0.0)
    assert law.beta_gamma_from_total(gamma, 1.0) == pytest.approx(expected, rel=rounding, abs=0.0)


@pytest.mark.parametrize("beta_gamma", MOMENTA)
def test_kinetic_energy(beta_gamma):
    """Closed form in 60 digits: T = (gamma - 1) m c^2."""
    expected = exact(lambda u, m: (mpmath.sqrt(1 + u**2) - 1) * m, beta_gamma, REST)
    assert law.kinetic_energy(beta_gamma, REST) == pytest.approx(expected, rel=rounding, abs=0.0)


ROADS = [
    lambda u: law.beta_gamma_from_kinetic(law.kinetic_energy(u, REST), REST),
    lambda u: law.beta_gamma_from_momentum(law.momentum(u, PROTON_MASS) * SPEED_OF_LIGHT, REST),
    lambda u: law.beta_gamma_from_rigidity(law.rigidity(u, PROTON_MASS, -2e-19), -2e-19, PROTON_MASS),
]


@pytest.mark.parametrize("road", ROADS, ids=["kinetic", "momentum", "rigidity"])
def test_there_and_back(road):
    """Symmetry: arrays come back as they went."""
    np.testing.assert_allclose(road(MOMENTA), MOMENTA, rtol=rounding)


def test_magnetic_rigidity():
    """Published: B rho [T m] = 3.3356 p [GeV/c] for unit charge, any accelerator text; 1e9 / c to all digits."""
    beta_gamma = law.beta_gamma_from_momentum(1.0e9 * ELEMENTARY_CHARGE, REST)
    assert law.rigidity(beta_gamma, PROTON_MASS, ELEMENTARY_CHARGE) == pytest.approx(
        1.0e9 / 299792458.0, rel=rounding, abs=0.0
    )


def test_proton_injection():
    """Published, from memory of synchrotron injection tables: 160 MeV protons have beta 0.5197 and 0.571 GeV/c."""
    beta_gamma = law.beta_gamma_from_kinetic(160.0e6 * ELEMENTARY_CHARGE, REST)
    momentum = law.momentum(beta_gamma, PROTON_MASS) * SPEED_OF_LIGHT / ELEMENTARY_CHARGE
    last_digit_beta, last_digit_momentum = 1e-4, 1e-3
    assert beta_gamma / np.hypot(1.0, beta_gamma) == pytest.approx(0.5197, abs=last_digit_beta)
    assert momentum / 1.0e9 == pytest.approx(0.571, abs=last_digit_momentum)
