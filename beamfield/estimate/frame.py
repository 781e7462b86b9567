"""What is the bunch? Its energy, its charge, its current."""

from math import pi

import numpy as np

from beamfield.constants import ELEMENTARY_CHARGE, SPEED_OF_LIGHT
from beamfield.estimate.finding import Finding
from beamfield.laws import intensity, kinematics

SMOOTHED = 1.06  # times rms over count^(1/5): width of the Gaussian that smooths the line density of particles


def exact(name, value, remarks=()):
    """Finding of a number that follows from the input by definition."""
    return Finding(name, float(value), 0.0, None, "definition", remarks)


def line_density(bunch):
    """Peak particles per metre, lab [1/m], and a remark where it had to be smoothed."""
    if bunch.coasting:
        return bunch.line_density, ()
    if bunch.shape is not None:
        return intensity.peak_line_density(bunch.particles, bunch.sigma[2], bunch.shape.peak_line_density), ()
    width = SMOOTHED * bunch.sigma[2] * bunch.macro.count**-0.2
    return bunch.particles * _smoothed_peak(bunch.macro, width), (f"line density smoothed over {width:.3g} m rms",)


def _smoothed_peak(macro, width):
    z, places = macro.positions[2], np.linspace(-2.0, 2.0, 81) * macro.rms[2]
    shares, edges = np.histogram(z, bins=1024, weights=macro.weights)
    middles = 0.5 * (edges[1:] + edges[:-1])
    bells = np.exp(-0.5 * np.square((places[:, None] - middles) / width)) / (width * np.sqrt(2.0 * pi))
    return float((bells @ shares).max())


def frame(bunch, surroundings, ring, numerics):
    """Findings on the bunch itself."""
    species, density = bunch.species, line_density(bunch)
    yield exact("gamma", bunch.gamma)
    yield exact("beta", bunch.beta)
    momentum = kinematics.momentum(bunch.beta_gamma, species.mass)
    yield exact("momentum", momentum * SPEED_OF_LIGHT / ELEMENTARY_CHARGE)
    yield exact("rigidity", kinematics.rigidity(bunch.beta_gamma, species.mass, species.charge))
    if bunch.particles is not None:
        yield exact("particles", bunch.particles)
        yield exact("bunch_charge", bunch.charge)
    yield exact("peak_current", intensity.current(species.charge, density[0], bunch.velocity), density[1])
    yield exact("peak_line_density", *density)
    if ring is not None:
        yield _bunching(bunch, ring, density)


def _bunching(bunch, ring, density):
    if bunch.coasting:
        return exact("bunching_factor", 1.0)
    value = intensity.bunching_factor(bunch.particles, ring.bunches, ring.circumference, density[0])
    if value <= 1.0:
        return exact("bunching_factor", value, density[1])
    remark = "above 1: the bunches overlap, so that this is no bunched beam"
    return Finding("bunching_factor", value, 0.0, None, "definition", (*density[1], remark), False)
