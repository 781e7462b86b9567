"""Particle sets drawn in the tests: evenly by Sobol's points, or at random, with weights and momenta of their own."""

import numpy as np
from scipy.special import ndtri
from scipy.stats import qmc

from beamfield.beam.bunch import Bunch
from beamfield.beam.particles import MacroParticles

COUNT = 131072


def even(count=COUNT, seed=3):
    """Gaussian places (3, count) of unit rms, from scrambled Sobol points."""
    return ndtri(qmc.Sobol(3, seed=seed).random(count)).T


def random(count=COUNT, seed=3):
    """The same, drawn at random."""
    return np.random.default_rng(seed).normal(size=(3, count))


def as_particles(bunch, unit, weights=None, momenta=None):
    """The bunch known as particles at places (3, N) in units of its rms sizes, about their centroid."""
    weights = np.ones(unit.shape[1]) if weights is None else weights
    weights = weights / weights.sum()
    positions = unit * np.array(bunch.sigma)[:, None]
    positions = positions - (positions @ weights)[:, None]
    macro = MacroParticles(positions, weights, momenta, "a test")
    sigma = tuple(float(size) for size in macro.rms)
    return Bunch(bunch.species, bunch.beta_gamma, bunch.particles, sigma, None, macro)
