"""A bunch before a cathode: the field stands upright on it, and is that of mirrored charges running the other way."""

from math import sqrt

import numpy as np
import pytest

from beamfield.beam.bunch import Bunch
from beamfield.beam.numerics import Numerics
from beamfield.beam.particles import MacroParticles
from beamfield.beam.surroundings import Surroundings
from beamfield.constants import SPEED_OF_LIGHT
from beamfield.estimate.bunch_map import bunch_map
from beamfield.estimate.cathode import force_weight, mapped
from beamfield.estimate.self_force import self_force
from beamfield.estimate.source import self_field
from beamfield.estimate.superposition import superpose
from tests.estimate.made_bunches import DEFAULT, made

PROMISED, summed, slope = 1e-3, 1e-5, 1e-4
AWAY = 4e-3
SHAPES = ("gaussian", "uniform-ellipsoid", "uniform-cylinder", "kv x gaussian")


@pytest.mark.parametrize("name", SHAPES)
def test_no_field_along_the_cathode(name):
    """Fact: promised is 1e-3 of the normal field; inside the metal there is none at all."""
    x, y = (grid.ravel() for grid in np.meshgrid(np.linspace(-5e-3, 5e-3, 7), np.linspace(-5e-3, 5e-3, 7)))
    on = np.stack([x, y, np.full(x.shape, -AWAY)])
    field = self_field(made(name, aspect=0.9), DEFAULT, on, AWAY)
    assert np.all(np.hypot(*field.E[:2]) <= PROMISED * np.abs(field.E[2]))
    inside = self_field(made(name), DEFAULT, on - 1e-6, AWAY)
    assert not inside.E.any()
    assert not inside.B.any()


@pytest.mark.parametrize("place", [(1e-3, -0.5e-3, 0.3e-3), (0.0, 0.0, -2e-3), (6e-3, 2e-3, 1e-3)])
def test_as_mirrored_charges(place):
    """Slow twin: every particle and its mirror image, each with its own momentum, summed one by one."""
    bunch, points = drawn(), np.array([place]).T
    macro, charge = bunch.macro, bunch.charge
    mirrored = macro.positions * [[1.0], [1.0], [-1.0]] - [[0.0], [0.0], [2.0 * AWAY]]
    ahead = np.array([0.0, 0.0, bunch.beta_gamma])
    size = self_field_size(bunch)
    one = superpose(points, macro.positions, charge * macro.weights, ahead, size)
    other = superpose(points, mirrored, -charge * macro.weights, -ahead, size)
    found, alone = self_field(bunch, Numerics(), points, AWAY), self_field(bunch, Numerics(), points)
    smoothing = 3e-3  # clouds of second order here, of fourth there
    assert pytest.approx(other.E, abs=smoothing * np.linalg.norm(other.E)) == found.E - alone.E
    assert pytest.approx(other.B, abs=smoothing * np.linalg.norm(one.B)) == found.B - alone.B


def drawn():
    chance = np.random.default_rng(11)
    positions = chance.normal(size=(3, 4000)) * [[1e-3], [1e-3], [0.5e-3]]
    macro = MacroParticles(positions, np.full(4000, 1 / 4000), None, "made here")
    return Bunch(made("gaussian").species, sqrt(8.0), 1e10, (1e-3, 1e-3, 0.5e-3), None, macro)


def self_field_size(bunch):
    from beamfield.estimate.particle_source import ParticleSource

    return ParticleSource(bunch).size


def test_closed_form_beside_the_sum():
    """Closed form of the Gaussian and of its mirror image."""
    points = np.array([[0.5e-3, 0.0, 2e-3], [0.1e-3, 0.0, 0.0], [-3e-3, 1e-3, -1e-3]])
    field = self_field(made("gaussian"), DEFAULT, points, AWAY)
    assert pytest.approx(field.closed_form, abs=summed * np.abs(field.closed_form).max()) == field.E


def test_far_image_is_a_point_charge():
    """Closed form: the slopes of a point charge -Q at 2 D, moving away; its pull across (1 + beta^2) gamma^2 times."""
    bunch, far = made("gaussian", aspect=0.5, gamma=1.5), 0.1
    free, near = (
        {found.name: found for found in self_force(bunch, Surroundings(cathode=place), None, DEFAULT)}
        for place in (None, far)
    )
    beside = bunch.charge / (4.0 * np.pi * 8.8541878128e-12) / bunch.gamma**2 / (2.0 * far) ** 3
    for axis, part in (("x", -1.0), ("z", 2.0)):
        change = near[f"field_gradient_{axis}"].value - free[f"field_gradient_{axis}"].value
        assert change == pytest.approx(part * beside, rel=0.01, abs=1e-8 * abs(free["field_gradient_x"].value))
    bend = free["defocusing_x"].value / free["field_gradient_x"].value
    weighted = bend * (near["field_gradient_x"].value - free["field_gradient_x"].value) * force_weight(bunch)
    assert near["defocusing_x"].value - free["defocusing_x"].value == pytest.approx(weighted, rel=slope)
    assert any("cathode" in remark for remark in near["defocusing_x"].remarks)
    assert near["defocusing_x"].closed_form is None


def test_magnetic_force_of_the_image_helps():
    """Two ways to one number: q (E + v x B) of the whole field, and E of the image (1 + beta^2) gamma^2 times."""
    bunch, points = made("gaussian", aspect=0.5, gamma=2.0), np.array([[1e-3], [0.0], [0.0]])
    near, alone = self_field(bunch, DEFAULT, points, 2e-3), self_field(bunch, DEFAULT, points)
    whole = near.E[0, 0] - bunch.beta * SPEED_OF_LIGHT * near.B[1, 0]
    parts = (alone.E + force_weight(bunch) * (near.E - alone.E))[0, 0] / bunch.gamma**2
    assert whole == pytest.approx(parts, rel=1e-10)


def test_maps_have_the_image_too():
    """Two ways to one field, and q (E + v x B) for the force; on the cathode no potential."""
    bunch, at = made("gaussian", aspect=0.5, gamma=2.0), 2e-3
    points = np.array([[1e-3, 0.5e-3, 1e-3], [0.0, 1e-3, 0.0], [0.3e-3, -2e-3, -2.1e-3]])
    values, field = mapped(bunch_map(bunch, DEFAULT), bunch, at)(points), self_field(bunch, DEFAULT, points, at)
    assert values["E"] == pytest.approx(field.E, rel=1e-12, abs=1e-12 * np.abs(field.E).max())
    assert values["B"] == pytest.approx(field.B, rel=1e-12, abs=1e-12 * np.abs(field.B).max())
    velocity = np.array([[0.0], [0.0], [bunch.beta * SPEED_OF_LIGHT]])
    force = bunch.species.charge * (field.E + np.cross(velocity, field.B, axis=0))
    assert values["force"] == pytest.approx(force, abs=1e-10 * np.abs(force).max())
    assert abs(values["phi"][1]) < 1e-10 * abs(values["phi"][0])
    assert not values["E"][:, 2].any()
