"""A bunch known as particles: its clouds and rods against the field of the density they were drawn from."""

from dataclasses import replace
from functools import cache

import numpy as np
import pytest

from beamfield import superpose
from beamfield.beam.surroundings import Surroundings
from beamfield.estimate.particle_source import ParticleSource, cloud_field, half_of
from beamfield.estimate.self_force import gradients, self_force
from beamfield.estimate.source import self_field
from beamfield.estimate.textbook import closed_field, closed_gradient
from tests.estimate.made_bunches import DEFAULT, made, places, rms_error
from tests.estimate.particle_sets import COUNT, as_particles, even, random

SPHERE, NEEDLE, PANCAKE = 1.0, 1e3, 0.1
WITHIN = 3.0  # factor between doubt and error


def in_order(count):
    """Random points as a sorted file has them."""
    unit = random(count)
    return unit[:, np.argsort(unit[2])]


@cache
def error_and_doubt(draw, aspect, count=COUNT, section=1.0):
    bunch = made("gaussian", aspect, section)
    points = places(bunch, 60, reach=2.5)
    field = self_field(as_particles(bunch, draw(count)), DEFAULT, points)
    return rms_error(field.E, closed_field(bunch, points)), field.doubt


@pytest.mark.parametrize("aspect", [SPHERE, NEEDLE])
def test_even_charges(aspect):
    """Closed form: 131072 Sobol points give the field of their density to one per cent."""
    one_per_cent = 0.01
    assert error_and_doubt(even, aspect)[0] < one_per_cent


@pytest.mark.parametrize("aspect, noisy", [(SPHERE, 0.03), (NEEDLE, 0.03), (PANCAKE, 0.06)])
def test_random_charges(aspect, noisy):
    """Closed form: random points give it with their shot noise, more than even ones."""
    error = error_and_doubt(random, aspect)[0]
    assert error_and_doubt(even, aspect)[0] < error < noisy


@pytest.mark.parametrize("count", [2048, 16384, COUNT])
@pytest.mark.parametrize("aspect", [SPHERE, NEEDLE, PANCAKE])
@pytest.mark.parametrize("draw", [even, random, in_order])
def test_doubt(draw, aspect, count):
    """The doubt says so: within a factor of three of the true error, for few charges and many."""
    error, doubt = error_and_doubt(draw, aspect, count)
    assert error / WITHIN < doubt < error * WITHIN


def test_more_charges_are_better():
    """Closed form: noise and bias shrink together."""
    for draw in (even, random):
        errors = [error_and_doubt(draw, SPHERE, count)[0] for count in (2048, 16384, COUNT)]
        assert errors == sorted(errors, reverse=True)


def test_slopes_of_particles():
    """Closed form: the slope within 0.3 rms of the centre, smoothed over clouds; its doubt covers the error."""
    bunch, few_per_cent = made("gaussian", SPHERE), 0.05
    value, doubt, closed, method = gradients(as_particles(bunch, even()), DEFAULT)
    error = np.abs(value / closed_gradient(bunch) - 1.0)
    assert closed is None
    assert method.startswith("superposition, 131072 clouds")
    assert error.max() < few_per_cent
    assert np.all(error <= WITHIN * doubt / np.abs(value))


def test_every_result_of_particles():
    """Closed form of the density: gradients, peaks and strengths to five per cent, the textbook absent everywhere."""
    bunch, few_per_cent = made("gaussian", SPHERE), 0.05
    particles, density = (
        {finding.name: finding for finding in self_force(b, Surroundings(), None, DEFAULT)}
        for b in (as_particles(bunch, even(8192)), bunch)
    )
    assert set(particles) == set(density)
    for name, found in particles.items():
        assert found.value == pytest.approx(density[name].value, rel=few_per_cent, abs=0.0)
        assert found.closed_form is None


def test_closed_form_road_of_particles():
    """No textbook knows a particle file: the sum of charges answers, and says so."""
    particles = as_particles(made("gaussian"), even(2048))
    method = gradients(particles, replace(DEFAULT, method="closed-form"))[3]
    assert method.startswith("superposition")


def test_needles_are_rods_and_pancakes_clouds():
    for aspect, word in ((NEEDLE, "rods"), (SPHERE, "clouds"), (PANCAKE, "clouds")):
        assert word in ParticleSource(as_particles(made("gaussian", aspect), even(2048))).method


def test_halves():
    """Definition: about half of the particles, weights that sum to 1, momenta that stay with their particles."""
    unit, weights = even(2048), np.random.default_rng(1).uniform(1.0, 2.0, 2048)
    macro = as_particles(made("gaussian"), unit, weights, momenta=np.cumsum(np.ones((3, 2048)), axis=1)).macro
    half, rounding = half_of(macro), 1e-14
    assert abs(half.count / 1024 - 1.0) < 0.1
    assert half.weights.sum() == pytest.approx(1.0, rel=rounding, abs=0.0)
    kept = half.momenta[0].astype(int) - 1
    assert np.array_equal(half.positions, macro.positions[:, kept])
    assert np.array_equal(half.momenta, macro.momenta[:, kept])
    share = macro.weights[kept]
    assert np.allclose(half.weights, share / share.sum(), rtol=rounding, atol=0.0)


@pytest.mark.parametrize("order", ["quasi-random", "sorted", "few"])
def test_halves_are_no_sides(order):
    """Whatever the order of the file, both halves are spread like the whole, in every direction."""
    unit = even(16 if order == "few" else 4096)
    unit = unit[:, np.argsort(unit[2])] if order == "sorted" else unit
    macro = as_particles(made("gaussian"), unit).macro
    half, noise = half_of(macro), 4.0 / np.sqrt(macro.count)
    assert np.all(np.abs(half.positions @ half.weights) < noise * macro.rms)
    assert np.all(np.abs(half.rms / macro.rms - 1.0) < noise)


@pytest.mark.parametrize("aspect", [SPHERE, NEEDLE])
def test_weights_stand_for_repetition(aspect):
    """Closed form: a particle of weight three is three particles at one place."""
    bunch, unit = made("gaussian", aspect), even(1024)
    times = np.tile([1, 3], 512)
    points = places(bunch, 20)
    weighted = as_particles(bunch, unit, times.astype(float))
    source = ParticleSource(weighted)
    repeated = replace(as_particles(bunch, np.repeat(unit, times, axis=1)), sigma=weighted.sigma)

    def summed(particles):  # with clouds of one size, which else follows the count of the file
        return cloud_field(particles, particles.macro, source.size, source.rods, False, points)

    rounding = 1e-12
    assert rms_error(summed(repeated), summed(weighted)) < rounding


def test_common_weight_does_not_show():
    """Closed form: weights are shares; twice all of them is the same bunch, bit for bit."""
    bunch, unit = made("gaussian"), even(1024)
    points = places(bunch, 20)
    once, twice = (self_field(as_particles(bunch, unit, np.full(1024, w)), DEFAULT, points).E for w in (1.0, 2.0))
    assert np.array_equal(once, twice)


def own_momenta(unit, bunch, kind):
    """Momenta (3, N): a divergent or a sheared set about the momentum of the bunch."""
    momenta = np.zeros_like(unit)
    momenta[2] = bunch.beta_gamma
    if kind == "divergent":
        momenta[:2] += 0.5 * unit[:2]
    else:
        momenta[2] *= 1.0 + 0.4 * np.tanh(unit[0])
    return momenta


@pytest.mark.parametrize("kind", ["divergent", "sheared"])
def test_own_momenta(kind):
    """The direct sum of the same charges, softened by as much: far outside the clouds do not show, E and B."""
    bunch, unit = made("gaussian"), even(512)
    momenta = own_momenta(unit, bunch, kind)
    particles = as_particles(bunch, unit, momenta=momenta)
    points = 12.0 * np.linalg.norm(bunch.sigma) * np.array([[1.0, 0.0, 0.6], [0.0, -1.0, 0.0], [0.1, 0.2, 0.8]])
    field = self_field(particles, DEFAULT, points)
    direct = superpose(points, particles.macro.positions, bunch.charge / 512, momenta)
    clouds = 1e-4  # fourth order in the size of a cloud over the distance
    assert rms_error(field.E, direct.E) < clouds
    shared = superpose(points, particles.macro.positions, bunch.charge / 512, [0.0, 0.0, bunch.beta_gamma])
    assert rms_error(shared.E, direct.E) > 100.0 * clouds


@pytest.mark.parametrize("kind", ["divergent", "sheared"])
def test_magnetic_field_of_own_momenta(kind):
    """The direct sum of the same charges: B belongs to each charge's own motion, not to that of the bunch."""
    bunch, unit = made("gaussian"), even(512)
    momenta = own_momenta(unit, bunch, kind)
    particles = as_particles(bunch, unit, momenta=momenta)
    points = 12.0 * np.linalg.norm(bunch.sigma) * np.array([[1.0, 0.0, 0.6], [0.0, -1.0, 0.0], [0.1, 0.2, 0.8]])
    clouds = 1e-4
    direct = superpose(points, particles.macro.positions, bunch.charge / 512, momenta)
    assert rms_error(self_field(particles, DEFAULT, points).B, direct.B) < clouds


def test_small_spread_is_no_motion_of_its_own():
    """A spread of momenta below a hundredth of m c is left out: the field of the shared motion, bit for bit."""
    bunch, unit = made("gaussian"), even(512)
    points = places(bunch, 10)
    still = as_particles(bunch, unit)
    momenta = np.array([0.0, 0.0, bunch.beta_gamma])[:, None] + 1e-3 * random(512, seed=8)
    moved = as_particles(bunch, unit, momenta=momenta)
    assert np.array_equal(self_field(still, DEFAULT, points).E, self_field(moved, DEFAULT, points).E)


def test_internal_forces_sum_to_nothing():
    """Newton's third law at rest in the bunch: the mean field over its own particles vanishes, E across and along."""
    bunch = made("gaussian")
    particles = as_particles(bunch, random(2000, seed=5))
    field = self_field(particles, DEFAULT, particles.macro.positions).E
    rounding = 1e-12
    assert np.abs(field.mean(axis=1)).max() < rounding * np.abs(field).max()
