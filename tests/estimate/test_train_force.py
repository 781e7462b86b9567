"""Trains: the field of the neighbours against sums of moving charges and closed forms."""

from dataclasses import replace

import numpy as np
import pytest

from beamfield.beam.encounter import Encounter
from beamfield.beam.numerics import Numerics
from beamfield.beam.particles import MacroParticles
from beamfield.beam.surroundings import Chamber, Surroundings
from beamfield.beam.train import Train
from beamfield.constants import COULOMB, SPEED_OF_LIGHT
from beamfield.estimate.companions import field_of_others, force_of_others
from beamfield.estimate.source import self_field
from beamfield.estimate.superposition import superpose
from beamfield.estimate.train_force import train_force
from beamfield.laws.intensity import acceleration
from tests.estimate.made_bunches import BUNCHES, DEFAULT, made, places

COARSE = Numerics(charges_per_probe=8192)


def found(bunch, train, numerics=COARSE, **near):
    return {f.name: f for f in train_force(bunch, Surroundings(train=train, **near), None, numerics)}


def test_places():
    assert Train(5, 2.0).neighbours == (4.0, 2.0, -2.0, -4.0)
    assert Train(4, 1.0).neighbours == (1.0, -1.0, -2.0)
    assert Train(3, 1.0, place=1).neighbours == (-1.0, -2.0)
    assert Train(1, 1.0).neighbours == ()


@pytest.mark.parametrize("values", [(0, 1.0), (3, 0.0), (3, 1.0, 4), (3, float("inf")), (2, 1.0, -1)])
def test_no_such_train(values):
    with pytest.raises(ValueError, match="train"):
        Train(*values)


def test_a_train_of_one_is_no_train():
    assert found(made("gaussian"), Train(1, 1.0)) == {}
    field = field_of_others(made("gaussian"), Surroundings(train=Train(1, 1.0)), COARSE, np.zeros((3, 2)))
    assert not field.E.any()
    assert not field.B.any()
    assert field.doubt == 0.0


@pytest.mark.parametrize("name", BUNCHES)
def test_far_neighbours_are_points(name):
    """Closed form: E_z = sum of +-Q / (4 pi eps0 gamma^2 d^2), slopes Q / (4 pi eps0 gamma^2 d^3) times 1 and -2."""
    bunch = made(name, 1.0, 1.0)
    spacing = 300.0 * bunch.sigma[2]
    findings = found(bunch, Train(3, spacing, place=1))
    near, quadrupole = COULOMB * bunch.charge / bunch.gamma**2, 1e-3
    distances = np.array([spacing, 2.0 * spacing])
    bend = acceleration(1.0, bunch.species.charge, bunch.species.mass, bunch.beta_gamma)
    slope = bend * near * (distances**-3.0).sum()
    assert findings["train_field_z"].value == pytest.approx(near * (distances**-2.0).sum(), rel=quadrupole)
    assert findings["train_defocusing_x"].value == pytest.approx(slope, rel=quadrupole)
    assert findings["train_defocusing_y"].value == pytest.approx(slope, rel=quadrupole)
    assert findings["train_defocusing_z"].value == pytest.approx(-2.0 * slope, rel=quadrupole)


@pytest.mark.parametrize("name", ["gaussian", "uniform-ellipsoid", "uniform-cylinder"])
@pytest.mark.parametrize("aspect", [1e-2, 1.0, 100.0])
def test_against_the_closed_form(name, aspect):
    """Closed form of the shape, shifted and summed; no space charge outside, so that the three kappas sum to zero."""
    bunch = made(name, aspect, 2.0)
    findings = found(bunch, Train(4, 8.0 * (bunch.extent(2) or 3.0 * bunch.sigma[2]), place=2), DEFAULT)
    largest = max(abs(f.value) for n, f in findings.items() if n != "train_field_z")
    good = 1e-5
    for finding in findings.values():
        assert finding.value == pytest.approx(finding.closed_form, rel=good)
        assert abs(finding.value - finding.closed_form) <= finding.doubt + 1e-7 * abs(finding.value)
    total = sum(findings[f"train_defocusing_{axis}"].value for axis in "xyz")
    assert abs(total) < 1e-4 * largest


def test_far_apart_they_vanish_and_the_middle_feels_no_field():
    bunch = made("gaussian", 1.0)
    near, far = (found(bunch, Train(3, step * bunch.sigma[2])) for step in (10.0, 1000.0))
    assert near["train_field_z"].value == pytest.approx(0.0, abs=1e-12 * COULOMB * bunch.charge / bunch.sigma[2] ** 2)
    assert abs(far["train_defocusing_x"].value / near["train_defocusing_x"].value) < 2e-6


def test_one_sum_of_charges_with_their_own_momenta():
    """Naive twin: every bunch of train and encounter as points on a grid, each with its momentum, in one direct sum."""
    bunch, other = made("gaussian", 1.0, 2.0), made("gaussian", 1.0, 1.0, gamma=4.0, species="electron")
    train, encounter = Train(3, 12.0 * bunch.sigma[2]), Encounter(other, offset=(20e-3, -10e-3, 5e-3))
    near = Surroundings(train=train, encounter=encounter)
    nodes, weights = np.polynomial.hermite_e.hermegauss(9)
    unit = np.stack([axis.ravel() for axis in np.meshgrid(nodes, nodes, nodes, indexing="ij")])
    share = np.einsum("i,j,k->ijk", weights, weights, weights).ravel() / weights.sum() ** 3
    positions, charges, momenta = [], [], []
    for z in train.neighbours:
        positions.append(unit * np.array(bunch.sigma)[:, None] + np.array([[0.0], [0.0], [z]]))
        charges.append(bunch.charge * share)
        momenta.append(np.tile([[0.0], [0.0], [bunch.beta_gamma]], share.size))
    positions.append(unit * np.array(other.sigma)[:, None] + np.array(encounter.offset)[:, None])
    charges.append(other.charge * share)
    momenta.append(np.tile([[0.0], [0.0], [-other.beta_gamma]], share.size))
    points = places(bunch, 8, reach=1.0)
    twin = superpose(points, np.hstack(positions), np.hstack(charges), np.hstack(momenta))
    field = field_of_others(bunch, near, DEFAULT, points)
    good = 1e-5
    for mine, theirs in ((field.E, twin.E), (field.B, twin.B), (field.closed_form, twin.E)):
        assert np.linalg.norm(mine - theirs) < good * np.linalg.norm(theirs)
    push = twin.E + bunch.velocity * np.stack([-twin.B[1], twin.B[0], np.zeros(8)])
    force = force_of_others(bunch, near, DEFAULT, points)
    assert np.linalg.norm(force - bunch.species.charge * push) < good * np.linalg.norm(force)
    assert 0.0 < field.doubt < good


def test_own_and_others_are_the_whole():
    """Closed form: two bunches on one place have twice the field of one."""
    bunch = made("gaussian", 1.0)
    points = places(bunch, 6)
    near = Surroundings(encounter=Encounter(bunch, "same"))
    own, others = self_field(bunch, COARSE, points), field_of_others(bunch, near, COARSE, points)
    assert np.allclose(own.E, others.E, rtol=1e-12)
    assert np.allclose(own.B, others.B, rtol=1e-12, atol=1e-12 * np.abs(own.E).max() / SPEED_OF_LIGHT)


def test_a_train_of_particles():
    """Closed form: the same train of Gaussian bunches; seen from outside, a sample of 20000 is smooth."""
    bunch = made("gaussian", 1.0)
    unit = np.random.default_rng(3).normal(size=(3, 10000))
    positions = np.concatenate([unit, -unit], axis=1) * np.array(bunch.sigma)[:, None]
    sampled = replace(bunch, shape=None, macro=MacroParticles(positions, np.full(20000, 5e-5)))
    train = Train(3, 10.0 * bunch.sigma[2], place=1)
    mine, theirs = found(sampled, train), found(bunch, train)
    good = 0.01
    for name, finding in mine.items():
        assert finding.closed_form is None
        assert finding.value == pytest.approx(theirs[name].value, rel=good)


def test_walls_screen_distant_neighbours():
    bunch = made("gaussian", 1.0)
    findings = found(bunch, Train(3, 1.0), chamber=Chamber("round", 0.02, 0.02))
    assert not any(finding.valid for finding in findings.values())
    assert all(
        finding.valid for finding in found(bunch, Train(3, 0.006), chamber=Chamber("round", 0.02, 0.02)).values()
    )


def test_the_same_twice():
    bunch, train = made("kv x parabolic", 1.0), Train(5, 0.05)
    assert found(bunch, train) == found(bunch, train)
