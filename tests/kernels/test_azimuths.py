"""Directions round a probe: the elliptic integral against scipy, and weights that go once round."""

import numpy as np
import pytest
from scipy.special import ellipkinc

from beamfield.kernels.azimuths import azimuths, elliptic


@pytest.mark.parametrize("m", [0.0, 0.3, 0.99, 1.0 - 1e-7])
def test_elliptic_integral(m):
    """General library: scipy.special.ellipkinc, also at the poles of the tangent and a rounding beside them."""
    angles = [k * np.pi / 4 * nudge for k in range(-9, 10) if k for nudge in (1.0, 1.0 - 1e-15, 1.0 + 1e-15, 0.77)]
    rounding = 1e-14
    assert max(abs(elliptic(angle, m) / ellipkinc(angle, m) - 1.0) for angle in angles) < rounding


@pytest.mark.parametrize("edged", [False, True])
@pytest.mark.parametrize("flat", [0.0, 0.51, 0.99])
def test_weights_go_once_round(flat, edged):
    """Closed form: 2 pi of directions from inside, on the axes of the section and off them, for every count."""
    x = np.array([0.06, 0.3, 0.0, 0.0, 0.0, 0.5, 0.999])
    y = np.array([0.0, 0.0, 0.06, 0.3, 0.0, 0.4, 0.0])
    converged = 1e-5
    for count in range(28, 66, 2):
        angles, weights = np.empty((2, len(x), count))
        azimuths(x, y, flat, 0.58, edged, 6.5, angles, weights)
        assert np.abs(weights[:-1].sum(axis=1) / (2.0 * np.pi) - 1.0).max() < converged
        assert np.all(np.diff(angles, axis=1) > 0.0)


def test_beside_an_edge_only_what_meets_it():
    """Closed form: the sector of half width asin(1/d) about the way to the axis."""
    angles, weights = np.empty((2, 1, 64))
    azimuths(np.array([2.0]), np.array([0.0]), 0.0, 0.5, True, 6.5, angles, weights)
    assert abs(angles - np.pi).max() < np.arcsin(0.5)
    midpoint_rule = 1e-3
    assert weights.sum() == pytest.approx(np.pi / 3.0, rel=midpoint_rule, abs=0.0)
