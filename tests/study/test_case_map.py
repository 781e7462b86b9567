"""The map of a case, from its words to the file."""

import numpy as np
import pytest

from beamfield.api import draw_map, map_table
from beamfield.beam.numerics import Numerics
from beamfield.describe.case import parse
from beamfield.errors import InputError
from beamfield.estimate.bunch_map import bunch_map

CASE = parse("""\
title: A small bunch
bunch:
  species: proton
  energy: 1 GeV kinetic
  intensity: 1e10 particles
  shape: uniform-ellipsoid
  size: {x: 1 mm rms, y: 2 mm rms, z: 9 mm rms}
numerics: {charges_per_probe: 512}
""")
WORDS = ["x = 1 .. 2 mm, 3", "z = -1 .. 1 mm, 2"], ["y = 1 mm"]


def test_a_plane_as_file_and_as_table(tmp_path):
    """Own numbers: both hold what the bunch gives at their points."""
    draw_map(CASE, tmp_path / "map.npz", *WORDS)
    with np.load(tmp_path / "map.npz") as archive:
        points = np.stack(np.meshgrid(*(archive[axis] for axis in "xyz"), indexing="ij")).reshape(3, -1)
        values = bunch_map(CASE.bunch, Numerics(charges_per_probe=512))(points)
        for name in ("E", "B", "force", "A"):
            assert np.array_equal(archive[name].reshape(3, -1), values[name])
        assert np.array_equal(archive["phi"].ravel(), values["phi"])
    head, *rows = map_table(CASE, *WORDS).splitlines()
    assert len(rows) == 3 * 2
    assert float(rows[0].split(",")[head.split(",").index("E_y [V/m]")]) == values["E"][1, 0]


def test_a_wrong_ending_is_told_first(tmp_path):
    """Stated contract: nothing is computed for a file that cannot be written."""
    with pytest.raises(InputError, match="a map is written as one of"):
        draw_map(CASE, tmp_path / "map.dat", ["nonsense"])


def test_method_over_the_case():
    """Stated contract: by closed form there are no potentials."""
    assert "phi" in map_table(CASE, ["x = 1 .. 2 mm, 2"])
    assert "phi" not in map_table(CASE, ["x = 1 .. 2 mm, 2"], method="closed-form")
