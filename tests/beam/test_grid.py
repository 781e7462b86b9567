"""The grid of a map: order, places, and runs that are boxes."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from beamfield.beam.grid import Grid
from beamfield.errors import NonsenseError

COUNTS = st.tuples(*[st.integers(1, 7)] * 3).filter(lambda counts: max(counts) > 1)


@given(COUNTS, st.integers(1, 400))
def test_runs_cover_the_list_once_and_are_boxes(counts, most):
    """Ours: every point once, in order, never too many at a time, and each run the box it claims."""
    grid = Grid.between((0.0, 0.0, 0.0), (1.0, 2.0, 3.0), counts)
    label = np.arange(grid.size).reshape(counts[::-1])
    runs = list(grid.runs(most))
    assert [first for first, _ in runs] == [0] + [last for _, last in runs[:-1]]
    assert runs[-1][1] == grid.size
    for first, last in runs:
        assert 0 < last - first <= most
        assert label[grid.box(first, last)].ravel().tolist() == list(range(first, last))


@given(COUNTS)
def test_points_run_along_x_first(counts):
    """numpy's own mesh as the witness."""
    grid = Grid.between((-1.0, 0.5, 2.0), (1.0, 2.0, 3.0), counts)
    z, y, x = np.meshgrid(*(grid.along(axis) for axis in (2, 1, 0)), indexing="ij")
    assert np.array_equal(grid.points(0, grid.size), np.stack([x, y, z]).reshape(3, -1))
    assert grid.axes == tuple(axis for axis in range(3) if counts[axis] > 1)


@pytest.mark.parametrize(
    "start, step, counts",
    [
        ((0, 0, 0), (1, 0, 0), (1, 1, 1)),
        ((0, 0, 0), (-1, 0, 0), (2, 1, 1)),
        ((0, 0, 0), (0, 0, 0), (2, 1, 1)),
        ((0, 0, float("nan")), (1, 0, 0), (2, 1, 1)),
        ((0, 0, 0), (1, 0, 0), (2, 0, 1)),
    ],
)
def test_what_is_no_map_is_refused(start, step, counts):
    """Stated contract."""
    with pytest.raises(NonsenseError):
        Grid(start, step, counts)
