"""The field of moving charges against two witnesses that share nothing with it, and against the facts of the trade."""

from math import atan, degrees, pi, sqrt

import numpy as np
import pytest

from beamfield import superpose
from tests.naive import field_of_many
from tests.retarded import retarded_field

EPS0 = 8.8541878188e-12  # F/m, CODATA 2022
LIGHT = 299792458.0  # m/s
CHARGE = 1.6e-12
GAMMAS = [1.0 + 1e-7, 1.0 + 1e-3, 1.5, 12.0, 1e3, 1e5]
DIRECTIONS = [(0.0, 0.0, 1.0), (0.48, -0.6, 0.64), (-0.8, 0.36, 0.48), (0.6, 0.8, 0.0)]


def momentum(gamma, direction=(0.0, 0.0, 1.0)):
    return sqrt((gamma - 1.0) * (gamma + 1.0)) * np.array(direction)


def alone(points, charge=CHARGE, u=(0.0, 0.0, 0.0)):
    """The field of one charge that stands at the origin now."""
    return superpose(np.asarray(points, dtype=float), np.zeros((3, 1)), np.array([charge]), np.asarray(u, dtype=float))


def column(x, y, z):
    return np.array([[x], [y], [z]], dtype=float)


def distance(a, b):
    """Largest |a - b| / |b| over the columns."""
    return np.max(np.linalg.norm(a - b, axis=0) / np.linalg.norm(b, axis=0))


@pytest.mark.parametrize("direction", DIRECTIONS)
@pytest.mark.parametrize("gamma", GAMMAS)
def test_one_charge_is_the_retarded_solution(gamma, direction):
    """Closed form: Lienard-Wiechert with sixty digits, from gamma - 1 = 1e-7 to gamma = 1e5, oblique momenta."""
    u = momentum(gamma, direction)
    d = 1e-3 * np.random.default_rng(20).normal(size=(3, 12))
    field = alone(d, u=u)
    truth = np.array([retarded_field(place, CHARGE, u) for place in d.T]).T
    rounding = 1e-13
    assert distance(field.E, truth[:3]) < rounding
    assert distance(field.B, truth[3:]) < rounding


@pytest.mark.parametrize("axis", range(3))
def test_abeam_of_a_fast_charge_no_digit_is_lost(axis):
    """Closed form: gamma = 1e5, places within a few 1/gamma of the plane across the motion, where the field peaks."""
    u = momentum(1e5, np.eye(3)[axis])
    d = np.roll([[1e-3] * 5, [2e-3] * 5, [-3e-8, -1e-8, 0.0, 1e-9, 2e-8]], axis + 1, axis=0)
    truth = np.array([retarded_field(place, CHARGE, u) for place in d.T]).T
    rounding = 1e-13
    assert distance(alone(d, u=u).E, truth[:3]) < rounding
    assert distance(alone(d, u=u).B, truth[3:]) < rounding


@pytest.mark.parametrize("gamma", [12.0, 1e3, 1e5])
def test_abeam_of_an_oblique_charge_only_the_inner_product_is_rounded(gamma):
    """Closed form: near the plane across an oblique motion u . d is a small difference of large products."""
    u = momentum(gamma, DIRECTIONS[1])
    d = 1e-3 * np.random.default_rng(21).normal(size=(3, 40))
    d -= (1.0 - 1.0 / gamma) * np.outer(u, u @ d) / (u @ u)
    field = alone(d, u=u)
    truth = np.array([retarded_field(place, CHARGE, u) for place in d.T]).T
    rounding = 1e-15 + gamma * np.finfo(float).eps
    assert distance(field.E, truth[:3]) < rounding
    assert distance(field.B, truth[3:]) < rounding


def test_many_charges_are_the_naive_sum():
    """Naive twin: 40 charges of mixed sign, each with its own oblique momentum, at 17 points."""
    chance = np.random.default_rng(3)
    points, positions = chance.normal(size=(3, 17)) * 1e-3, chance.normal(size=(3, 40)) * 1e-3
    charges, momenta = CHARGE * chance.normal(size=40), 4.0 * chance.normal(size=(3, 40))
    field = superpose(points, positions, charges, momenta)
    electric, magnetic = field_of_many(points.tolist(), positions.tolist(), charges.tolist(), momenta.tolist())
    rounding = 1e-12  # mixed signs cancel
    assert distance(field.E, np.array(electric)) < rounding
    assert distance(field.B, np.array(magnetic)) < rounding
    assert np.all(field.doubt == 0.0)


def test_shared_momentum_is_the_same_momentum_for_each():
    """Closed form: (3,) and its (3, N) repetition are one case; a scalar charge is N equal charges."""
    chance = np.random.default_rng(4)
    points, positions, u = chance.normal(size=(3, 33)), chance.normal(size=(3, 9)), np.array([1.0, -2.0, 30.0])
    shared = superpose(points, positions, CHARGE, u)
    each = superpose(points, positions, np.full(9, CHARGE), np.tile(u[:, None], 9))
    rounding = 1e-13
    assert distance(shared.E, each.E) < rounding
    assert distance(shared.B, each.B) < rounding


@pytest.mark.parametrize("cloud", [1e-4, 1e-3])
def test_cloud_softens_in_the_rest_frame(cloud):
    """Naive twin: Coulomb softened in the frame of the charge, boosted back."""
    u = momentum(20.0, DIRECTIONS[1])
    points = 1e-3 * np.random.default_rng(5).normal(size=(3, 10))
    field = superpose(points, np.zeros((3, 1)), np.array([CHARGE]), u, cloud=cloud)
    electric, magnetic = field_of_many(points.tolist(), [[0.0]] * 3, [CHARGE], [[x] for x in u.tolist()], cloud)
    rounding = 1e-13
    assert distance(field.E, np.array(electric)) < rounding
    assert distance(field.B, np.array(magnetic)) < rounding


@pytest.mark.parametrize("beta, ahead, abeam", [(0.5, 0.75, 1.154701), (0.9, 0.19, 2.294157), (0.99, 0.0199, 7.088812)])
def test_field_ahead_and_abeam(beta, ahead, abeam):
    """Heaviside (1888), in every electrodynamics text: 1/gamma^2 ahead, gamma abeam, over Coulomb."""
    u, r = (0.0, 0.0, beta / sqrt(1.0 - beta**2)), 0.7
    coulomb = CHARGE / (4.0 * pi * EPS0 * r**2)
    printed = 5e-7
    assert alone(column(0, 0, r), u=u).E[2, 0] / coulomb == pytest.approx(ahead, rel=printed)
    assert alone(column(r, 0, 0), u=u).E[0, 0] / coulomb == pytest.approx(abeam, rel=printed)


@pytest.mark.parametrize("gamma", GAMMAS)
def test_field_ahead_is_that_of_a_resting_charge_further_away(gamma):
    """Common practice, no source: at L / gamma ahead of a moving charge as at L of the same charge at rest."""
    length, rounding = 0.03, 1e-14
    moving = alone(column(0, 0, length / gamma), u=momentum(gamma)).E[2, 0]
    assert moving == pytest.approx(alone(column(0, 0, length)).E[2, 0], rel=rounding)


@pytest.mark.parametrize("gamma", GAMMAS)
def test_field_points_from_the_present_position(gamma):
    """Common practice, no source: E is radial about where the charge is now, not where it was when the light left."""
    points = np.random.default_rng(6).normal(size=(3, 20))
    electric = alone(points, u=momentum(gamma, DIRECTIONS[2])).E
    sine = np.linalg.norm(np.cross(electric, points, axis=0), axis=0)
    rounding = 1e-15
    assert np.all(sine <= rounding * np.linalg.norm(electric, axis=0) * np.linalg.norm(points, axis=0))


@pytest.mark.parametrize("gamma", GAMMAS[:-1])
def test_force_on_a_co_moving_charge(gamma):
    """Common practice, no source: across the motion E + v x B = E / gamma^2; along it the magnetic part vanishes."""
    u = momentum(gamma)
    velocity = (u / gamma)[:, None] * LIGHT
    field = alone(column(1e-3, 2e-3, 1e-4), u=u)
    force = field.E + np.cross(velocity, field.B, axis=0)
    rounding = 4e-16 * gamma**2  # two nearly equal parts are subtracted here, in the test
    assert np.allclose(force[:2], field.E[:2] / gamma**2, rtol=rounding, atol=0.0)
    assert force[2] == field.E[2]


def flux(u, cosine, weight, centre, radius=1.0, azimuths=64):
    """Flux of E [V m] out of a sphere's zone about z that holds a charge at the origin, by Gauss and equal angles."""
    turn = 2.0 * pi * np.arange(azimuths) / azimuths
    sine = np.sqrt(1.0 - cosine**2)
    normal = np.stack([np.outer(sine, np.cos(turn)), np.outer(sine, np.sin(turn)), np.outer(cosine, np.ones(azimuths))])
    points = radius * normal + np.array(centre)[:, None, None]
    outward = np.sum(alone(points.reshape(3, -1), u=u).E.reshape(normal.shape) * normal, axis=0)
    return radius**2 * 2.0 * pi / azimuths * np.sum(weight @ outward)


@pytest.mark.parametrize("direction", DIRECTIONS[:3])
@pytest.mark.parametrize("gamma", [1.0 + 1e-7, 1.5, 3.0])
def test_flux_through_a_closed_surface(gamma, direction):
    """Closed form: q / eps0 whatever the motion, with the charge off the centre of the sphere."""
    cosine, weight = np.polynomial.legendre.leggauss(200)
    through = flux(momentum(gamma, direction), cosine, weight, centre=(0.2, -0.1, 0.15), azimuths=200)
    quadrature = 1e-12
    assert through == pytest.approx(CHARGE / EPS0, rel=quadrature)


@pytest.mark.parametrize("beta, angle", [(0.9, 14.12579), (0.99, 4.65619)])
def test_half_the_flux_is_near_the_plane_across(beta, angle):
    """Closed form: half of q / eps0 leaves within atan(1 / (sqrt(3) gamma)) of the plane across the motion."""
    gamma = 1.0 / sqrt(1.0 - beta**2)
    half = atan(1.0 / (sqrt(3.0) * gamma))
    printed, quadrature = 1e-5, 1e-12
    assert degrees(half) == pytest.approx(angle, abs=printed)
    node, weight = np.polynomial.legendre.leggauss(200)
    zone = np.sin(half)
    through = flux(momentum(gamma), zone * node, zone * weight, centre=(0.0, 0.0, 0.0))
    assert through == pytest.approx(0.5 * CHARGE / EPS0, rel=quadrature)


def test_a_charge_makes_no_field_at_its_own_place():
    """Stated convention: zero, not nan, at its own place; the others are still felt there."""
    places = np.array([[0.0, 1.0], [0.0, 0.0], [0.0, 0.0]])
    field = superpose(places, places, np.array([CHARGE, CHARGE]), momentum(7.0))
    assert np.all(alone(np.zeros((3, 1)), u=momentum(7.0)).E == 0.0)
    assert np.all(alone(np.zeros((3, 1)), u=momentum(7.0)).B == 0.0)
    assert field.E[0, 0] < 0.0 < field.E[0, 1]


@pytest.mark.parametrize("gamma", [1.0, 1.5, 12.0, 1e3])
def test_internal_forces_sum_to_nothing(gamma):
    """Closed form: with one momentum for all, actions and reactions cancel pair by pair."""
    chance = np.random.default_rng(8)
    positions, charges = 1e-3 * chance.normal(size=(3, 500)), CHARGE * chance.normal(size=500)
    u = momentum(gamma, DIRECTIONS[1])
    field = superpose(positions, positions, charges, u)
    forces = charges * (field.E + np.cross((u / gamma)[:, None] * LIGHT, field.B, axis=0))
    rounding = 1e-12
    magnitudes = np.sum(np.abs(charges) * np.linalg.norm(field.E, axis=0))
    assert np.linalg.norm(forces.sum(axis=1)) <= rounding * magnitudes


def test_superposition_is_linear_in_the_charges():
    """Closed form: the field of two charges is the sum of their fields, signs and all."""
    points, u = np.random.default_rng(9).normal(size=(3, 40)), momentum(5.0, DIRECTIONS[2])
    places = np.array([[0.1, -0.2], [0.3, 0.1], [0.0, 0.2]])
    both = superpose(points, places, np.array([1.0, -2.0]) * CHARGE, u).E
    first = superpose(points, places[:, :1], CHARGE, u).E
    second = superpose(points, places[:, 1:], 2.0 * CHARGE, u).E
    rounding = 1e-14 * (np.linalg.norm(first, axis=0) + np.linalg.norm(second, axis=0))
    assert np.all(np.linalg.norm(both - (first - second), axis=0) <= rounding)
