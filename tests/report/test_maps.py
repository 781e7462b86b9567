"""Each map format read back by a reader that is not ours; the same bytes every time; whole or not there."""

import csv
import time
import xml.etree.ElementTree as ElementTree
from subprocess import run
from sys import executable

import numpy as np
import pytest

from beamfield.beam.grid import Grid
from beamfield.beam.mapped import MAPPED
from beamfield.errors import InputError
from beamfield.estimate.field_map import field_map
from beamfield.report.map_file import WRITERS, write_map

LINE = Grid.between((0.0, 2e-3, -1e-2), (0.0, 2e-3, 1e-2), (1, 1, 9))
PLANE = Grid.between((-1e-3, 2e-3, -1e-2), (1e-3, 2e-3, 1e-2), (5, 1, 7))
BOX = Grid.between((-1e-3, -2e-3, -1e-2), (1e-3, 2e-3, 1e-2), (4, 3, 5))
GRIDS = pytest.mark.parametrize("grid", [LINE, PLANE, BOX], ids=["line", "plane", "box"])


def made_up(points):
    """Numbers that say where they were taken, so that no transposition goes unseen."""
    x, y, z = points
    values = {
        name: np.stack([x + i, 10.0 * y - i, z * i + 1.0 / 3.0]) for i, name in enumerate(MAPPED) if name != "phi"
    }
    return values | {"phi": 1.0 + x + 2.0 * y + 3.0 * z}


def drawn(path, grid, block=3):
    write_map(path, field_map("A map of <nothing> & all", made_up, grid, block))
    return path


def expected(grid, name):
    """(z, y, x) or (z, y, x, 3), from the corner coordinates alone."""
    z, y, x = np.meshgrid(*(grid.along(axis) for axis in (2, 1, 0)), indexing="ij")
    values = made_up(np.stack([x, y, z]).reshape(3, -1))[name]
    return np.moveaxis(values.reshape((-1, *x.shape)), 0, -1).squeeze(-1 if name == "phi" else ())


@GRIDS
def test_csv_read_by_the_csv_module(tmp_path, grid):
    """Own numbers, to the last digit."""
    head, *rows = csv.reader(drawn(tmp_path / "map.csv", grid).read_text().splitlines())
    table = {name: np.array([float(row[i]) for row in rows]) for i, name in enumerate(head)}
    assert head[:4] == ["x [m]", "y [m]", "z [m]", "E_x [V/m]"]
    assert np.array_equal(table["A_z [T m]"], expected(grid, "A")[..., 2].ravel())
    assert np.array_equal(table["phi [V]"], expected(grid, "phi").ravel())
    assert np.array_equal(table["z [m]"], grid.points(0, grid.size)[2])


@GRIDS
def test_npz_read_by_numpy(tmp_path, grid):
    """Own numbers, to the last digit."""
    with np.load(drawn(tmp_path / "map.npz", grid)) as archive:
        for name in MAPPED:
            assert np.array_equal(archive[name].T, expected(grid, name))
        assert [archive[axis].tolist() for axis in "xyz"] == [grid.along(axis).tolist() for axis in range(3)]


@GRIDS
def test_hdf5_read_by_h5py(tmp_path, grid):
    """Own numbers, to the last digit, and places from the attributes alone."""
    h5py = pytest.importorskip("h5py")
    with h5py.File(drawn(tmp_path / "map.h5", grid)) as file:
        meshes = file["data/0/meshes"]
        for i, axis in enumerate("xyz"):
            assert np.array_equal(meshes["force"][axis], expected(grid, "force")[..., i].squeeze())
        assert np.array_equal(meshes["phi"], expected(grid, "phi").squeeze())
        for label, start, step in zip(
            *(meshes["E"].attrs[k] for k in ("axisLabels", "gridGlobalOffset", "gridSpacing"))
        ):
            axis = "xyz".index(label.decode())
            assert (start, step) == (grid.start[axis], grid.step[axis])


@GRIDS
def test_hdf5_keeps_the_open_standard(tmp_path, grid):
    """The public validator of the openPMD standard 1.1: no errors."""
    pytest.importorskip("openpmd_validator")
    pytest.importorskip("h5py")
    path = drawn(tmp_path / "map.h5", grid)
    told = run([executable, "-m", "openpmd_validator.check_h5", "-i", path], capture_output=True, text=True)
    assert "Result: 0 Errors" in told.stdout


@GRIDS
def test_vti_read_by_an_xml_parser(tmp_path, grid):
    """The VTK User's Guide, appended raw data: '_', then for each array its length in bytes and its numbers."""
    head, _, raw = drawn(tmp_path / "map.vti", grid).read_bytes().partition(b'<AppendedData encoding="raw">\n_')
    image = ElementTree.fromstring(head + b"</VTKFile>").find("ImageData")
    assert image.get("WholeExtent") == " ".join(f"0 {count - 1}" for count in grid.counts)
    assert [float(v) for v in image.get("Origin").split()] == list(grid.start)
    for array in image.iter("DataArray"):
        begin = int(array.get("offset"))
        (size,) = np.frombuffer(raw, "<u8", 1, begin)
        numbers = np.frombuffer(raw, "<f8", int(size) // 8, begin + 8)
        assert np.array_equal(numbers, expected(grid, array.get("Name")).ravel())
    assert raw[begin + 8 + int(size) :].split() == [b"</AppendedData>", b"</VTKFile>"]


@GRIDS
def test_picture_shows_the_whole_map(tmp_path, grid):
    """A PNG by its signature, with more than one colour; the thinned-out points are the right ones."""
    image = pytest.importorskip("matplotlib.image")
    from beamfield.report.picked import picked

    path = drawn(tmp_path / "map.png", grid)
    assert path.read_bytes()[:8] == b"\x89PNG\r\n\x1a\n"
    assert len(np.unique(image.imread(path).reshape(-1, 4), axis=0)) > 10
    for pick in picked(field_map("", made_up, grid, 4), most=3):
        points = np.stack(np.meshgrid(*pick.places[::-1], indexing="ij")[::-1]).reshape(3, -1)
        assert max(len(places) for places in pick.places) <= 3
        assert np.array_equal(pick.values["phi"], made_up(points)["phi"])


@pytest.mark.parametrize("ending", WRITERS)
def test_the_same_map_makes_the_same_bytes(tmp_path, ending):
    """Stated contract: no clock, no chance, no dependence on the size of the blocks."""
    pytest.importorskip({".h5": "h5py", ".png": "matplotlib"}.get(ending, "numpy"))
    first = drawn(tmp_path / f"first{ending}", BOX, 3).read_bytes()
    time.sleep(1.1 if ending in (".h5", ".npz") else 0.0)  # their clocks tick in seconds
    assert drawn(tmp_path / f"second{ending}", BOX, 1000).read_bytes() == first


@pytest.mark.parametrize("ending", WRITERS)
def test_an_interrupted_writer_leaves_nothing(tmp_path, ending):
    """Stated contract: the old file stays, and no half of a new one."""
    pytest.importorskip({".h5": "h5py", ".png": "matplotlib"}.get(ending, "numpy"))
    path = tmp_path / f"map{ending}"
    path.write_text("old")

    def breaks_off(points):
        if points[2, 0] > 0.0:
            raise KeyboardInterrupt
        return made_up(points)

    with pytest.raises(KeyboardInterrupt):
        write_map(path, field_map("", breaks_off, BOX, 4))
    assert [entry.name for entry in tmp_path.iterdir()] == [path.name]
    assert path.read_text() == "old"


def test_an_unknown_ending_is_refused(tmp_path):
    """Stated contract: exit 2, with the endings that there are."""
    with pytest.raises(InputError, match=r"\.csv, \.npz, \.h5, \.vti, \.png"):
        write_map(tmp_path / "map.dat", field_map("", made_up, LINE))
    with pytest.raises(InputError, match="cannot be written"):
        write_map(tmp_path / "no" / "such" / "map.csv", field_map("", made_up, LINE))
