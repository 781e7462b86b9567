"""The map of a case, from its words to the file."""

from types import SimpleNamespace

import numpy as np
import pytest

from beamfield.api import superpose
from beamfield.beam.bunch import Bunch
from beamfield.beam.shape import SHAPES
from beamfield.beam.species import Species
from beamfield.errors import InputError
from beamfield.estimate.potentials import potentials
from beamfield.study.case_map import draw, table

CHARGE, U = 1.602176634e-19, 2.0
BUNCH = Bunch(Species("proton", 1.6726e-27, CHARGE), U, 1e10, (1e-3, 1e-3, 1e-2), SHAPES["gaussian"])
CASE = SimpleNamespace(title="A point", bunch=BUNCH)


def field(points):
    return superpose(points, np.zeros((3, 1)), 1e-9, (0.0, 0.0, U))


def potential(points):
    return potentials(points, np.zeros((3, 1)), 1e-9, (0.0, 0.0, U))[0]


def test_a_plane_as_file_and_as_table(tmp_path):
    """Own numbers: the file holds what the field gives at its points, and the force of a co-moving proton."""
    words = ["x = 1 .. 2 mm, 3", "z = -1 .. 1 mm, 2"], ["y = 1 mm"]
    draw(CASE, tmp_path / "map.npz", field, *words, potential)
    with np.load(tmp_path / "map.npz") as archive:
        x, y, z = (archive[axis] for axis in "xyz")
        points = np.stack(np.meshgrid(x, y, z, indexing="ij")).reshape(3, -1)
        assert np.array_equal(archive["E"].reshape(3, -1), field(points).E)
        assert np.array_equal(archive["phi"].ravel(), potential(points))
        rounding = 1e-15
        across = CHARGE * archive["E"][:2] / (1.0 + U * U)
        assert np.allclose(archive["force"][:2], across, rtol=rounding, atol=0.0)
    rows = table(CASE, field, *words, potential).splitlines()
    assert len(rows) == 1 + 3 * 2
    assert float(rows[1].split(",")[3]) == field(points[:, :1]).E[0, 0]


def test_a_wrong_ending_is_told_before_anything_is_computed(tmp_path):
    """Stated contract."""
    with pytest.raises(InputError, match="a map is written as one of"):
        draw(CASE, tmp_path / "map.dat", None)
