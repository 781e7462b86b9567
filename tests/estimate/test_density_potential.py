"""The potential that the charges placed for each probe make, against closed forms in the frame of the bunch."""

import numpy as np
import pytest

from beamfield.beam.bunch import Bunch
from beamfield.beam.shape import SHAPES
from beamfield.beam.species import Species
from beamfield.constants import COULOMB
from beamfield.estimate.density_source import DensitySource, density_map
from beamfield.laws.ellipsoid import uniform_ellipsoid_potential
from beamfield.laws.gaussian import gaussian_centre_potential
from beamfield.laws.parabolic import parabolic_ellipsoid_centre_potential

GAMMA, U = 5.0, 24.0**0.5
CARRIER = Species("one coulomb", 1.0, 1.0)
LENGTHS = pytest.mark.parametrize("length", [1e-3, 0.1, 1.0, 10.0, 1e3])


def potential_of(shape, scales, probes):
    """Potential (M,) of a unit charge at probes in the frame of the bunch, by the rule that maps use."""
    sigma = np.array(scales) * np.array([1.0, 1.0, 1.0 / GAMMA]) / (shape.edge(0) or 1.0)
    bunch = Bunch(CARRIER, U, 1.0, tuple(sigma), shape)
    lab = probes / np.array([[1.0], [1.0], [GAMMA]])
    return density_map(bunch, DensitySource(bunch, 32768).rule, lab)[3] / (COULOMB * GAMMA)


@pytest.mark.large
@LENGTHS
def test_uniform_ellipsoid_inside_and_outside(length):
    """Closed form: Carlson's integrals."""
    scales = (1.0, 0.7, length)
    probes = np.random.default_rng(1).normal(size=(3, 40)) * np.array(scales)[:, None]
    quadrature = 1e-7  # from just outside the edge; elsewhere far less
    mine = potential_of(SHAPES["uniform-ellipsoid"], scales, probes)
    assert np.allclose(mine, uniform_ellipsoid_potential(probes, scales), rtol=quadrature, atol=0.0)


@LENGTHS
def test_parabolic_ellipsoid_at_its_centre(length):
    """Closed form: Carlson's integrals."""
    scales, quadrature = (1.0, 0.7, length), 1e-9
    mine = potential_of(SHAPES["parabolic-ellipsoid"], scales, np.zeros((3, 1)))[0]
    assert mine == pytest.approx(parabolic_ellipsoid_centre_potential(scales), rel=quadrature)


@LENGTHS
def test_gaussian_at_its_centre(length):
    """Closed form: 2 / sqrt(2 pi) R_F."""
    scales, window = (1.0, 0.7, length), 2e-8  # what lies beyond six rms sizes
    mine = potential_of(SHAPES["gaussian"], scales, np.zeros((3, 1)))[0]
    assert mine == pytest.approx(gaussian_centre_potential(scales), rel=window)


@pytest.mark.large
@pytest.mark.parametrize("name", SHAPES)
def test_field_is_what_the_potential_makes(name):
    """Closed form: the rest-frame field across is -grad phi, inside and outside, of each shape by name."""
    scales, step = (1.0, 0.7, 1.5), 1e-4
    probes = np.array([[0.3, 1.2], [0.2, 0.9], [0.4, 1.1]])
    shift = np.array([[step], [0.0], [0.0]])
    after, before = (potential_of(SHAPES[name], scales, probes + sign * shift) for sign in (1.0, -1.0))
    sigma = np.array(scales) * np.array([1.0, 1.0, 1.0 / GAMMA]) / (SHAPES[name].edge(0) or 1.0)
    bunch = Bunch(CARRIER, U, 1.0, tuple(sigma), SHAPES[name])
    lab = probes / np.array([[1.0], [1.0], [GAMMA]])
    field = density_map(bunch, DensitySource(bunch, 32768).rule, lab)[0] / (COULOMB * GAMMA)
    differences = 1e-5
    assert np.allclose((before - after) / (2.0 * step), field, rtol=differences, atol=0.0)
