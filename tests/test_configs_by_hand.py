"""Headline numbers of the demo cases, done again as one would on paper, from the words of the case alone.

Formulas as textbooks have them, written here anew: Laslett's direct shift from memory of K. Schindl, CERN/PS 99-012
(DI); perveance and plasma length from memory of M. Reiser, Theory and Design of Charged Particle Beams, 1994; the
spheroid from memory of J. A. Osborn, Phys. Rev. 67, 351 (1945). Constants: scipy's CODATA; masses of ions: from memory
of the atomic mass evaluation, less the electrons that are gone.
"""

from functools import lru_cache
from math import asin, pi, sqrt
from pathlib import Path

import numpy as np
import pytest
from scipy.constants import c, e, epsilon_0, m_e, m_p, physical_constants

from beamfield import api

pytestmark = pytest.mark.large
CONFIGS = Path(__file__).parents[1] / "configs"
U, MUON = physical_constants["atomic mass constant"][0], physical_constants["muon mass"][0]
DIGITS, LONG = 1e-4, 1e-2  # masses to so many digits; a formula for bunches without end


def radius(mass, state=1):
    """Classical radius [m]."""
    return (state * e) ** 2 / (4 * pi * epsilon_0 * mass * c**2)


def motion(kinetic, mass):
    """gamma and beta of a kinetic energy [eV]."""
    gamma = 1 + kinetic * e / (mass * c**2)
    return gamma, sqrt(1 - gamma**-2)


def strength(r0, density, gamma, beta):
    """Perveance of particles per metre."""
    return 2 * r0 * density / (beta**2 * gamma**3)


def booster():
    """7e11 protons in a parabola of 210 ns half length; sizes from the table, row by row; the vertical shift."""
    gamma, beta = motion(120e6, m_p)
    s, beta_x, beta_y, dispersion = np.loadtxt(CONFIGS / "ring_optics.csv", delimiter=",", skiprows=3, unpack=True)
    size_x = np.sqrt(2.6e-6 / (beta * gamma) * beta_x + (1.6e-3 * dispersion) ** 2)
    size_y = np.sqrt(2.2e-6 / (beta * gamma) * beta_y)
    density = 0.75 * 7e11 / (210e-9 * beta * c)
    along = beta_y / (size_y * (size_x + size_y))
    turn = np.trapezoid(np.append(along, along[0]), np.append(s, 142.0))
    return -strength(radius(m_p), density, gamma, beta) * turn / (4 * pi)


def damping_ring():
    """3.2 nC of positrons, 5.4 mm long, flat; gamma from 1.15 GeV in all."""
    gamma = 1.15e9 * e / (m_e * c**2)
    size_x, size_y = sqrt(9e-9 * 3.1 + (0.16 * 7e-4) ** 2), sqrt(60e-12 * 4.6)
    bell = (2 * pi) ** 1.5 * 5.4e-3
    return -radius(m_e) * (3.2e-9 / e) * 4.6 * 118.4 / (bell * gamma**3 * size_y * (size_x + size_y))


def storage_ring():
    """18 mA of xenon 41+ round 96 m: smooth optics, no dispersion."""
    mass = 128.90478 * U - 41 * m_e
    gamma, beta = motion(52e6 * 129, mass)
    beta_x, beta_y = 96 / (2 * pi) / 2.41, 96 / (2 * pi) / 2.31
    size_x, size_y = sqrt(0.60e-6 * beta_x), sqrt(0.52e-6 * beta_y)
    force = strength(radius(mass, 41), 18e-3 / (41 * e * beta * c), gamma, beta) / (size_y * (size_x + size_y))
    return -beta_y * force * 96 / (4 * pi)


def linac():
    """6 mA of argon 9+ at 108.5 MHz; 15/8 of the mean density of the ellipsoid's box at its centre, over pi."""
    mass = 39.96238 * U - 9 * m_e
    gamma, beta = motion(1.4e6 * 40, mass)
    density = 15 / (8 * pi) * 6e-3 / (9 * e * 108.5e6) / (6.5e-3 * 4.8e-3 * 9e-3)
    return 2 * pi / sqrt(4 * pi * radius(mass, 9) * density / (beta**2 * gamma**3))


def photo_injector():
    """300 pC in 9 ps from end to end: the field at the edge, as of a beam without ends."""
    _, beta = motion(4.6e6, m_e)
    return 300e-12 / (9e-12 * beta * c) / (2 * pi * epsilon_0 * 0.9e-3)


def pancake():
    """1e5 electrons in a spheroid of half axes 160 um and gamma times 120 fs / sqrt 2: the field at its pole."""
    gamma, beta = motion(90e3, m_e)
    half = 120e-15 / sqrt(2) * beta * c
    m = 160e-6 / (gamma * half)
    share = m * m / (m * m - 1) * (1 - asin(sqrt(1 - m**-2)) / sqrt(m * m - 1))
    charge_density = 1e5 * e / (4 / 3 * pi * (160e-6) ** 2 * half)
    return share * charge_density * half / epsilon_0


def light_source():
    """250 pC, 25 fs rms at 6.4 GeV: the horizontal strength of the middle, as of a beam without ends."""
    gamma = 6.4e9 * e / (m_e * c**2)
    density = 250e-12 / e / (sqrt(2 * pi) * 25e-15 * c)
    return strength(radius(m_e), density, gamma, 1.0) / (32e-6 * (32e-6 + 24e-6))


def muon_channel():
    """4e11 muons of 160 MeV/c, 70 mm rms, in a round uniform section of 9 mm: the strength of the middle."""
    beta_gamma = 0.16e9 * e / c / (MUON * c)
    gamma = sqrt(1 + beta_gamma**2)
    return strength(radius(MUON), 4e11 / (sqrt(2 * pi) * 70e-3), gamma, beta_gamma / gamma) / 9e-3**2


def preinjector():
    """45 mA at 325 MHz, negative."""
    return -45e-3 / 325e6


@lru_cache
def results(name):
    return api.evaluate(api.load(CONFIGS / f"{name}.yaml"), "closed-form")


@pytest.mark.parametrize(
    ("case", "result", "by_hand", "tolerance"),
    [
        ("ring_injection", "tune_shift_y", booster, DIGITS),
        ("damping_ring", "tune_shift_y", damping_ring, DIGITS),
        ("coasting_ions", "tune_shift_y", storage_ring, DIGITS),
        ("ion_linac", "plasma_wavelength", linac, DIGITS),
        ("photo_injector", "peak_field_x", photo_injector, LONG),
        ("diffraction_pancake", "peak_field_z", pancake, DIGITS),
        ("short_bunch", "defocusing_x", light_source, DIGITS),
        ("muon_channel", "defocusing_x", muon_channel, LONG),
        ("preinjector", "bunch_charge", preinjector, DIGITS),
    ],
)
def test_by_hand(case, result, by_hand, tolerance):
    assert results(case)[result].value == pytest.approx(by_hand(), rel=tolerance)
