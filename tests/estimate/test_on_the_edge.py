"""Where a density ends at once: a place on the edge, or a rounding on either side of it, has the field of the edge."""

import numpy as np
import pytest

from beamfield.estimate.source import self_field
from beamfield.estimate.textbook import closed_field
from tests.estimate.made_bunches import DEFAULT, made

ROUNDINGS = (-4e-16, -2e-16, 0.0, 2e-16, 4e-16)
CASES = [(1e-2, 10.0), (1.0, 3.0), (1e3, 1.0)]  # aspect, section


@pytest.mark.parametrize("aspect, section", CASES)
@pytest.mark.parametrize("name, good", [("uniform-ellipsoid", 1e-8), ("parabolic-ellipsoid", 1e-8), ("kv beam", 1e-6)])
def test_across(name, good, aspect, section):
    """Closed form, on the axes: the cusp of E_x and E_y."""
    bunch = made(name, aspect, section)
    for axis in (0, 1):
        points = np.zeros((3, len(ROUNDINGS)))
        points[axis] = bunch.extent(axis) * (1.0 + np.array(ROUNDINGS))
        found, truth = self_field(bunch, DEFAULT, points).E[axis], closed_field(bunch, points)[axis]
        assert np.abs(found / truth - 1.0).max() < good


@pytest.mark.parametrize("aspect, section", CASES)
def test_side_of_a_cylinder(aspect, section):
    """Closed form, on the axes and off them: half of a turn looks into the cylinder, the other half away from it."""
    bunch, good = made("uniform-cylinder", aspect, section), 1e-5
    turn = np.linspace(0.0, 2.0 * np.pi, 21)
    edge = np.array([bunch.extent(0) * np.cos(turn), bunch.extent(1) * np.sin(turn)])
    points = np.stack([*edge, np.full(21, 0.2 * bunch.extent(2))])
    truth = closed_field(bunch, points)
    off = np.linalg.norm(self_field(bunch, DEFAULT, points).E - truth, axis=0)
    assert np.max(off / np.linalg.norm(truth, axis=0)) < good


@pytest.mark.parametrize("aspect, section", CASES)
def test_tips_and_faces(aspect, section):
    """Closed form: on the axis, at the tip of an ellipsoid and in the face of a cylinder."""
    for name, good in (("uniform-ellipsoid", 1e-8), ("uniform-cylinder", 1e-6), ("gaussian x uniform", 1e-6)):
        bunch = made(name, aspect, section)
        points = np.zeros((3, 3))
        points[2] = bunch.extent(2) * np.array([-1.0, 1.0, 1.0 - 2e-16])
        found, truth = self_field(bunch, DEFAULT, points).E[2], closed_field(bunch, points)[2]
        assert np.abs(found / truth - 1.0).max() < good
