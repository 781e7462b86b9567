"""The potential that the charges placed for each probe make, against closed forms in the frame of the bunch."""

from math import pi, sqrt

import numpy as np
import pytest

from beamfield.estimate.probe_rule import azimuth_nodes, height_nodes, ray_rule, rule_for, unit_nodes
from beamfield.kernels import probe_charges, probe_rays
from beamfield.laws.ellipsoid import uniform_ellipsoid_potential
from beamfield.laws.gaussian import gaussian_centre_potential
from beamfield.laws.parabolic import parabolic_ellipsoid_centre_potential

GAMMA = 5.0
LENGTHS = pytest.mark.parametrize("length", [1e-3, 0.1, 1.0, 10.0, 1e3])


def rayed(probes, scales, degree):
    """Field and potential (4, M) of unit central density by 32768 charges on rays."""
    rule = ray_rule(32768)
    directions, weights = azimuth_nodes(probes, scales, rule.azimuth, True, True)
    out = np.empty((4, probes.shape[1]))
    probe_rays.ray_field(probes, scales, degree, directions, weights, *height_nodes(rule), GAMMA, out)
    return out


@pytest.mark.large
@LENGTHS
def test_uniform_ellipsoid_inside_and_outside(length):
    """Closed form: Carlson's integrals; the rows of the field do not depend on the fourth."""
    scales = (1.0, 0.7, length)
    probes = np.random.default_rng(1).normal(size=(3, 40)) * np.array(scales)[:, None]
    potential = rayed(probes, scales, 0)[3] / (4.0 * pi / 3.0 * np.prod(scales))
    quadrature = 1e-7 if length <= 1.0 else 1e-4  # from just outside the edge; elsewhere far less
    assert np.allclose(potential, uniform_ellipsoid_potential(probes, scales), rtol=quadrature, atol=0.0)


@LENGTHS
def test_parabolic_ellipsoid_at_its_centre(length):
    """Closed form: Carlson's integrals."""
    scales = (1.0, 0.7, length)
    potential = rayed(np.zeros((3, 1)), scales, 2)[3, 0] / (8.0 * pi / 15.0 * np.prod(scales))
    quadrature = 1e-9
    assert potential == pytest.approx(parabolic_ellipsoid_centre_potential(scales), rel=quadrature)


@LENGTHS
def test_gaussian_at_its_centre(length):
    """Closed form: 2 / sqrt(2 pi) R_F."""
    scales = (1.0, 0.7, length)
    rule = rule_for(length / sqrt(0.7), 1.0 / 0.7, 32768, False)
    directions, weights = azimuth_nodes(np.zeros((3, 1)), scales, rule.azimuth, False)
    out, nodes = np.empty((4, 1)), (*unit_nodes(rule.radial), *height_nodes(rule))
    probe_charges.probe_field(np.zeros((3, 1)), scales, (0, 0), 6.0, directions, weights, *nodes, GAMMA, out)
    window = 2e-8  # what lies beyond six rms sizes
    assert out[3, 0] / ((2.0 * pi) ** 1.5 * np.prod(scales)) == pytest.approx(
        gaussian_centre_potential(scales), rel=window
    )
