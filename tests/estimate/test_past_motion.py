"""Retarded sums against a sixty-digit twin, against Gauss and the conducting plane, and the two memory lengths."""

from math import pi, sqrt

import numpy as np
import pytest

from beamfield.api import superpose
from beamfield.beam.past import AfterBend, AfterCathode
from beamfield.constants import SPEED_OF_LIGHT, VACUUM_PERMITTIVITY
from beamfield.errors import CallError, NonsenseError
from beamfield.estimate.past_motion import field_against_straight, retarded_field
from tests.past import field_with_a_past

ORIGIN = np.zeros((3, 1))
CHARGE = 1.0e-9


def momentum(gamma):
    return sqrt((gamma - 1.0) * (gamma + 1.0))


def about(scale, count=24, seed=11):
    return np.array(scale)[:, None] * np.random.default_rng(seed).normal(size=(3, count))


@pytest.mark.parametrize("gamma", [1.0 + 1e-4, 1.2, 5.0, 100.0, 5000.0])
@pytest.mark.parametrize("angle", [0.02, 0.7, 3.0])
def test_after_a_bend_is_the_sixty_digit_solution(gamma, angle):
    """Naive twin: light from the straight, from the arc and from the line before it, at places near and far."""
    past = AfterBend(straight=0.05, radius=2.0, angle=angle)
    points = np.concatenate(
        [about(scale, 5) for scale in ((1e-2, 1e-2, 1e-3), (1.0, 0.3, 2.0), (1e-4, 1e-4, 1e-7))], axis=1
    )
    field = retarded_field(points, ORIGIN, 1.0, momentum(gamma), past)
    truth = np.array([field_with_a_past(d, momentum(gamma), 0.05, 2.0, angle) for d in points.T]).T
    rounding = 2e-13 + 40.0 * gamma * np.finfo(float).eps  # n - beta is about 1/gamma
    for mine, theirs in ((field.E, truth[:3]), (SPEED_OF_LIGHT * field.B, truth[3:])):
        assert np.max(np.linalg.norm(mine - theirs, axis=0) / np.linalg.norm(theirs, axis=0)) < rounding


def test_a_sum_is_the_sum_of_its_charges():
    """Closed form: superposition; each charge left the bend at its own time and has flown its own length."""
    past, u = AfterBend(straight=0.1, radius=1.0), momentum(8.0)
    points, places, charges = (
        about((1e-2, 1e-2, 1e-2), 5),
        about((1e-2, 1e-2, 1e-2), 3, seed=4),
        np.array([1.0, -2.0, 0.5]),
    )
    together = retarded_field(points, places, charges, u, past).E
    alone = 0.0
    for place, charge in zip(places.T, charges, strict=True):
        own = past.flown(past.straight + place[2])
        alone += retarded_field(points - place[:, None], ORIGIN, charge, u, own).E
    rounding = 1e-12
    assert np.allclose(together, alone, rtol=0.0, atol=rounding * np.abs(alone).max())


@pytest.mark.large
@pytest.mark.parametrize("gamma", [1.2, 2.0])
def test_flux_after_a_bend_is_the_charge(gamma):
    """Closed form: Gauss, with light from all three pieces on one sphere; the jumps between them are transverse."""
    node, weight = np.polynomial.legendre.leggauss(300)
    turn = 2.0 * pi * np.arange(300) / 300
    sine = np.sqrt(1.0 - node**2)
    normal = np.stack([np.outer(sine, np.cos(turn)), np.outer(sine, np.sin(turn)), np.outer(node, np.ones(300))])
    points = 0.4 * normal.reshape(3, -1)
    field = retarded_field(points, ORIGIN, CHARGE, momentum(gamma), AfterBend(0.1, 0.3, 1.0)).E
    outward = np.sum(field.reshape(normal.shape) * normal, axis=0)
    across_jumps = 2e-3
    through = 0.4**2 * 2.0 * pi / 300 * np.sum(weight @ outward)
    assert through == pytest.approx(CHARGE / VACUUM_PERMITTIVITY, rel=across_jumps)


def test_no_bend_to_speak_of():
    """Closed form: an arc through 1e-13 rad is a straight line."""
    points, u = about((1e-2, 1e-2, 1e-1)), momentum(10.0)
    bent = retarded_field(points, ORIGIN, CHARGE, u, AfterBend(0.01, 1.0, 1e-13)).E
    straight = superpose(points, ORIGIN, CHARGE, (0.0, 0.0, u)).E
    turn = 1e-10
    assert np.allclose(bent, straight, rtol=0.0, atol=turn * np.abs(straight).max())


def test_on_the_cathode_the_field_is_normal():
    """Closed form: no tangential E and no normal B on a conductor; charge and image have one light sphere."""
    plane = np.vstack([about((0.15, 0.15, 0.0))[:2], np.full(24, -0.2)])
    field = retarded_field(plane, ORIGIN, CHARGE, momentum(3.0), AfterCathode(0.2))
    inside = np.linalg.norm(field.E, axis=0) > 0.0
    rounding = 1e-15
    assert 0 < inside.sum() < 24
    assert np.all(np.abs(field.E[:2]) <= rounding * np.abs(field.E[2]).max())
    assert np.all(field.B[2] == 0.0)


@pytest.mark.parametrize("gamma", [1.2, 6.0])
def test_nothing_outside_the_light_sphere(gamma):
    """Closed form: light from the start has come flown / beta; within it charge and image, beyond it nothing."""
    flown, u = 0.3, momentum(gamma)
    points = about((0.3, 0.3, 0.3), 400)
    field = retarded_field(points, ORIGIN, CHARGE, u, AfterCathode(flown)).E
    from_start = np.linalg.norm(points + np.array([[0.0], [0.0], [flown]]), axis=0)
    lit = (from_start < flown * gamma / u) & (points[2] > -flown)
    both = superpose(points, np.array([[0, 0], [0, 0], [0, -2 * flown]]), CHARGE * np.array([1, -1]), (0.0, 0.0, u)).E
    rounding = 1e-13
    assert np.all(field[:, ~lit] == 0.0)
    assert np.allclose(field[:, lit], both[:, lit], rtol=0.0, atol=rounding * np.abs(both).max())
    assert 20 < lit.sum() < 380


@pytest.mark.parametrize("gamma", [1.5, 10.0, 200.0])
@pytest.mark.parametrize("past", [AfterBend(0.0, 0.5), AfterCathode(0.0)])
def test_memory_length_transverse(gamma, past):
    """Closed form: the field abeam at a is the co-moving one once the charge has flown beta gamma a, and not before.

    From a cathode the field is nothing before and the image's share after; from a bend it is exact after."""
    u, a = momentum(gamma), 2e-3
    share = np.array([0.3, 0.999, 1.001, 3.0])
    difference = field_against_straight(np.array([[0.0], [a], [0.0]]), ORIGIN, CHARGE, u, past, share * u * a)
    rounding = 1e-15
    if isinstance(past, AfterCathode):
        image = np.hypot(1.0, 2.0 * share * u) / np.hypot(1.0, 2.0 * gamma * share * u) ** 3
        assert np.all(difference[:2] == 1.0)
        assert np.allclose(difference[2:], image[2:], rtol=0.0, atol=rounding)
    else:
        assert np.all(difference[:2] > 1e-3)
        assert np.all(difference[2:] < rounding)


@pytest.mark.parametrize("beta", [0.5, 0.9, 0.999])
def test_memory_length_longitudinal(beta):
    """Closed form: the tail's field reaches the head, one length ahead, after beta / (1 - beta) lengths of flight."""
    u, length = beta / sqrt(1.0 - beta**2), 0.01
    reach = np.array([0.9, 0.999, 1.001]) * beta / (1.0 - beta) * length
    head = np.array([[0.0], [0.0], [length]])
    difference = field_against_straight(head, ORIGIN, CHARGE, u, AfterCathode(0.0), reach)
    assert np.all(difference[:2] == 1.0)
    assert difference[2] < 0.2
    bent = field_against_straight(head, ORIGIN, CHARGE, u, AfterBend(0.0, 1.0), reach)
    assert np.all(bent[:2] > 0.0)
    rounding = 1e-15
    assert bent[2] < rounding


@pytest.mark.large
def test_the_field_across_a_bunch_settles():
    """Common practice, no source: the longer the straight flight, the nearer the co-moving field."""
    u, places = momentum(20.0), about((1e-3, 1e-3, 5e-3), 300)
    length = np.ptp(places[2])
    memory = u * (u + np.hypot(1.0, u)) * length  # beta / (1 - beta) = beta gamma (beta gamma + gamma)
    lengths = length + memory * np.array([0.0, 1e-3, 1e-2, 0.1, 1.0])
    rounding = 1e-14
    for past in (AfterBend(0.0, 10.0), AfterCathode(0.0)):
        difference = field_against_straight(places[:, :100], places, CHARGE / 300, u, past, lengths)
        assert np.all(np.diff(difference) < 0.0)
        assert difference[0] > 1e-2
        assert difference[-1] < rounding if isinstance(past, AfterBend) else 1e-6


def test_what_cannot_be_is_refused():
    """Stated contract: a bunch half way out of its bend, or a past that no bunch has, is an error."""
    with pytest.raises(CallError, match="tail"):
        retarded_field(ORIGIN, ORIGIN - 0.1, CHARGE, 1.0, AfterBend(0.05, 1.0))
    for past in (lambda: AfterBend(0.1, -1.0), lambda: AfterBend(float("nan"), 1.0), lambda: AfterCathode(-1.0)):
        with pytest.raises(NonsenseError):
            past()
