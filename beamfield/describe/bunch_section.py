"""The section `bunch` -> Bunch."""

from math import inf

from beamfield.beam.bunch import Bunch
from beamfield.beam.particles import MacroParticles
from beamfield.constants import SPEED_OF_LIGHT
from beamfield.describe import energy_word, intensity_word, size_word, transverse_section
from beamfield.describe.shape_word import spread as read_spread
from beamfield.describe.species_word import species as read_species

_ENERGY, _INTENSITY, _LENGTH = "bunch.energy", "bunch.intensity", "bunch.size.z"
_SPREAD, _REPETITION = "bunch.momentum_spread", "bunch.repetition"


def bunch(reading, ring, beamline, folder):
    """Bunch that the reading describes, in a ring or a beamline or neither; None where a fault has been said."""
    species, form = read_species(reading), read_spread(reading, folder)
    beta_gamma = _beta_gamma(reading, species)
    emittance = transverse_section.emittance(reading, form, beta_gamma)
    momentum_spread = reading.si(_SPREAD)
    if isinstance(form, MacroParticles):
        sigma = _of_particles(reading, form)
    else:
        across = transverse_section.sizes(reading, form, emittance, momentum_spread, ring, beamline)
        sigma = (*across, _length(reading, form, beta_gamma))
    filled = _filled(reading, species, beta_gamma, form, sigma[2], ring)
    if None in (species, form, beta_gamma, filled) or None in sigma:
        return None
    given = {"emittance": emittance, "momentum_spread": momentum_spread}
    macro = isinstance(form, MacroParticles)
    spread = {"shape": None if macro else form, "macro": form if macro else None}
    return reading.attempt("bunch", Bunch, species, beta_gamma, sigma=sigma, **filled, **spread, **given)


def _beta_gamma(reading, species):
    return reading.within(_ENERGY, reading.attempt(_ENERGY, energy_word.beta_gamma, reading.quantity(_ENERGY), species))


def _velocity(beta_gamma):
    return beta_gamma and SPEED_OF_LIGHT * beta_gamma / (1.0 + beta_gamma**2) ** 0.5


def _of_particles(reading, particles):
    for key in reading.written("bunch.size.x", "bunch.size.y", _LENGTH):
        reading.fault(key, "the sizes are those of the particle file; leave it out")
    return tuple(float(size) for size in particles.rms)


def _length(reading, shape, beta_gamma):
    """Rms length [m]; inf of a coasting beam."""
    if shape and shape.coasting:
        for key in reading.written(_LENGTH):
            reading.fault(key, "a coasting beam has no length; leave it out, or choose another longitudinal shape")
        return inf
    if shape and _LENGTH not in reading:
        return reading.fault(_LENGTH, "is missing; write 'z: 120 ns rms', or 'z: 0.3 m rms' (or semi, full, fwhm)")
    quantity, velocity = reading.quantity(_LENGTH), _velocity(beta_gamma)
    return reading.within(_LENGTH, reading.attempt(_LENGTH, size_word.rms_size, quantity, shape, 2, velocity))


def _filled(reading, species, beta_gamma, form, length, ring):
    """Particles and line density of the bunch by the names of their fields, or None."""
    quantity = reading.quantity(_INTENSITY)
    _check_repetition(reading, quantity)
    unread_ring = "ring" in reading and ring is None
    if None in (quantity, species, beta_gamma, form, length) or unread_ring:
        return None
    filling = _filling(reading, species, _velocity(beta_gamma), form, length, ring)
    if length == inf:
        density = reading.attempt(_INTENSITY, intensity_word.line_density, quantity, filling)
        count = ring and density and density * ring.circumference
        return density and {"particles": count, "line_density": density}
    count = reading.within(_INTENSITY, reading.attempt(_INTENSITY, intensity_word.particles, quantity, filling))
    return count and {"particles": count}


def _filling(reading, species, velocity, form, length, ring):
    passing = ring.bunches * velocity / ring.circumference if ring else reading.si(_REPETITION)
    peak = None if isinstance(form, MacroParticles) else form.peak_line_density / length
    return intensity_word.Filling(abs(species.charge), velocity, peak, ring and ring.circumference, passing)


def _check_repetition(reading, quantity):
    for key in reading.written(_REPETITION):
        if "ring" in reading:
            reading.fault(key, "the ring already says how often a bunch passes; leave it out")
        elif quantity and "mean" not in quantity.words:
            reading.warn(key, "is not needed: only a mean current uses it")
