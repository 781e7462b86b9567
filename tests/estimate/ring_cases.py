"""Ring cases whose every number is written by hand: constants typed anew, formulas from the trade, nothing of laws/."""

from math import pi, sqrt

from beamfield.beam.bunch import Bunch
from beamfield.beam.numerics import Numerics
from beamfield.beam.ring import Ring
from beamfield.beam.shape import Shape
from beamfield.beam.species_table import named
from beamfield.beam.surroundings import Surroundings
from beamfield.estimate.answer import answer

C, E, EPS0 = 299792458.0, 1.602176634e-19, 8.8541878188e-12  # CODATA 2022
MASSES = {"proton": 1.67262192595e-27, "electron": 9.1093837139e-31, "positron": 9.1093837139e-31}  # kg, CODATA 2022
CIRCUMFERENCE, TUNE = 158.0, (4.2, 4.3)
LINE_PEAK = {"gaussian": 1.0 / sqrt(2.0 * pi), "uniform": 0.5 / sqrt(3.0), "parabolic": 0.75 / sqrt(5.0)}


def gamma_of(kinetic, species="proton"):
    """gamma from a kinetic energy [eV]."""
    return 1.0 + kinetic * E / (MASSES[species] * C * C)


def radius(species="proton"):
    """Classical radius [m]."""
    return E * E / (4.0 * pi * EPS0 * MASSES[species] * C * C)


def smooth_size(axis, emittance):
    """rms size [m] in a ring of constant beta = R / Q, from a geometric rms emittance."""
    return sqrt(emittance * CIRCUMFERENCE / (2.0 * pi) / TUNE[axis])


def ring_bunch(
    kinetic=160e6, emittances=(2.5e-6, 2.5e-6), shape=("gaussian", "gaussian"), species="proton", number=3.5e12, z=10.0
):
    """A bunch matched to the smooth ring, from normalised rms emittances; z, rms length [m]."""
    gamma = gamma_of(kinetic, species)
    momentum = sqrt((gamma - 1.0) * (gamma + 1.0))
    geometric = tuple(e / momentum for e in emittances)
    sigma = (*(smooth_size(axis, e) for axis, e in enumerate(geometric)), z)
    return Bunch(named(species), momentum, number, sigma, Shape(*shape), emittance=geometric)


def smooth_ring(bunches=1):
    return Ring.smooth(CIRCUMFERENCE, TUNE, bunches)


def findings(bunch, ring=None, surroundings=None, **numerics):
    return answer(bunch, surroundings or Surroundings(), ring, Numerics(**numerics))


def round_gaussian_shift(bunch, emittance, factor):
    """-r_0 N / (4 pi emittance_n beta gamma^2 B_f), with the bunching factor `factor`: the formula of the trade."""
    return -radius(bunch.species.name) * bunch.particles / (4 * pi * emittance * bunch.beta * bunch.gamma**2 * factor)
