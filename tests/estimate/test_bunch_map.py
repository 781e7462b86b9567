"""What a map of a bunch holds, however the bunch is known."""

from math import inf, pi

import numpy as np
import pytest

from beamfield.beam.bunch import Bunch
from beamfield.beam.numerics import Numerics
from beamfield.beam.particles import MacroParticles
from beamfield.beam.shape import SHAPES, Shape
from beamfield.beam.species import Species
from beamfield.errors import InputError
from beamfield.estimate.bunch_map import bunch_map
from beamfield.laws.gaussian import gaussian_centre_potential

EPS0, CHARGE = 8.8541878188e-12, 1.602176634e-19  # CODATA 2022
PROTON = Species("proton", 1.67262192595e-27, CHARGE)
SIZES, U, COUNT = (2e-3, 1e-3, 5e-3), 0.8, 1e9
CENTRE = np.zeros((3, 1))
DENSITY = Bunch(PROTON, U, COUNT, SIZES, SHAPES["gaussian"])


def sampled(count=20000, sizes=SIZES):
    places = np.random.default_rng(5).normal(size=(3, count)) * np.array(sizes)[:, None]
    macro = MacroParticles(places - places.mean(axis=1, keepdims=True), np.full(count, 1.0 / count))
    return Bunch(PROTON, U, COUNT, tuple(macro.rms), None, macro)


def centre_potential(sizes):
    """Closed form in the rest frame, then the lab: phi = gamma phi*."""
    gamma = np.hypot(1.0, U)
    rest = gaussian_centre_potential((*sizes[:2], gamma * sizes[2]))
    return gamma * COUNT * CHARGE / (4.0 * pi * EPS0) * rest


def test_potential_of_a_density():
    """Closed form: Carlson's integral at the centre of a Gaussian bunch."""
    values = bunch_map(DENSITY, Numerics())(CENTRE)
    window = 1e-7
    assert list(values) == ["E", "B", "force", "phi", "A"]
    assert values["phi"][0] == pytest.approx(centre_potential(SIZES), rel=window)


@pytest.mark.parametrize("sizes", [SIZES, (1e-3, 1e-3, 0.1)], ids=["clouds", "rods"])
def test_potential_of_particles(sizes):
    """Closed form, as far as 20 000 particles drawn by chance tell."""
    shot_noise = 0.01
    assert bunch_map(sampled(sizes=sizes), Numerics())(CENTRE)["phi"][0] == pytest.approx(
        centre_potential(sizes), rel=shot_noise
    )


@pytest.mark.large
@pytest.mark.parametrize(
    "bunch", [DENSITY, sampled(2000), sampled(2000, (1e-3, 1e-3, 0.1))], ids=["density", "clouds", "rods"]
)
def test_field_is_what_the_potential_makes(bunch):
    """Closed form: E = -grad phi across and -grad phi / gamma^2 along."""
    evaluate = bunch_map(bunch, Numerics())
    points = np.array(bunch.sigma)[:, None] * np.array([[1.0, -0.5], [0.5, 1.5], [0.7, -1.0]])
    steps = 1e-4 * np.array(bunch.sigma)
    for axis in range(3):
        shift = steps[axis] * np.eye(3)[:, axis : axis + 1]
        slope = (evaluate(points + shift)["phi"] - evaluate(points - shift)["phi"]) / (2.0 * steps[axis])
        field = -slope / (bunch.gamma**2 if axis == 2 else 1.0)
        differences = 1e-4
        assert np.allclose(field, evaluate(points)["E"][axis], rtol=differences, atol=0.0)


def test_a_coasting_beam_has_no_potential_here():
    """Stated contract: absent, not zero."""
    beam = Bunch(PROTON, U, None, (1e-3, 1e-3, inf), Shape("gaussian", "coasting"), line_density=1e9)
    assert list(bunch_map(beam, Numerics())(CENTRE)) == ["E", "B", "force"]


def test_by_closed_form():
    """Stated contract: fields as of the superposition, no potentials; a shape without a form is an error."""
    points = np.array([[1e-3], [0.5e-3], [1e-3]])
    summed = bunch_map(DENSITY, Numerics())(points)["E"]
    closed = bunch_map(DENSITY, Numerics(method="closed-form"))(points)
    quadrature = 1e-6
    assert np.allclose(closed["E"], summed, rtol=quadrature, atol=0.0)
    assert list(closed) == ["E", "B", "force"]
    with pytest.raises(InputError, match="no closed form"):
        bunch_map(sampled(200), Numerics(method="closed-form"))(points)
