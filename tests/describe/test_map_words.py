"""Where a map is drawn, in words."""

from types import SimpleNamespace

import pytest

from beamfield.describe.map_words import COUNTS, REACH, grid_for
from beamfield.errors import InputError

BUNCH = SimpleNamespace(sigma=(1e-3, 2e-3, 5e-2), coasting=False)
COASTING = SimpleNamespace(sigma=(1e-3, 2e-3, float("inf")), coasting=True)


def test_nothing_said_is_the_line_along_x():
    """Stated contract."""
    grid = grid_for(BUNCH)
    assert grid.counts == (COUNTS[1], 1, 1)
    assert grid.start == (-REACH * 1e-3, 0.0, 0.0)
    assert grid.along(0)[-1] == pytest.approx(REACH * 1e-3, rel=1e-15)


@pytest.mark.parametrize(
    "overs, ats, counts, start, end",
    [
        (["x = -15 .. 15 mm, 301"], [], (301, 1, 1), (-0.015, 0, 0), (0.015, 0, 0)),
        (["z=-40..40 mm,9"], ["y = 2 mm", "x=-1e-3 m"], (1, 1, 9), (-1e-3, 2e-3, -0.04), (-1e-3, 2e-3, 0.04)),
        (["z = -1 cm .. 25 mm, 3", "x = 0 .. 3 um"], [], (101, 1, 3), (0, 0, -0.01), (3e-6, 0, 0.025)),
        (["x", "y", "z"], [], (41, 41, 41), (-4e-3, -8e-3, -0.2), (4e-3, 8e-3, 0.2)),
    ],
)
def test_lines_planes_and_boxes(overs, ats, counts, start, end):
    """Own examples; 4 rms to either side where nothing is said."""
    grid = grid_for(BUNCH, overs, ats)
    assert grid.counts == counts
    assert grid.start == pytest.approx(start, rel=1e-15)
    assert [grid.along(axis)[-1] for axis in range(3)] == pytest.approx(end, rel=1e-15)


@pytest.mark.parametrize(
    "overs, ats, told",
    [
        (["w"], [], "--over 'w': begin with x, y or z"),
        (["x = 3 mm"], [], "from where to where"),
        (["x = -3 .. 3"], [], "'-3 ' is no length"),
        (["x = -3 .. 3 mm rms"], [], "is no length"),
        (["x = -3 .. 3 s"], [], "is no length"),
        (["x = 3 .. -3 mm"], [], "does not lie beyond"),
        (["x = -3 .. 3 mm, 1"], [], "at least 2 points"),
        (["x = -3 .. 3 mm, 2.5"], [], "not a whole number"),
        (["x = -3 .. 3 mm, 1e6", "y = -3 .. 3 mm, 1e6"], [], "more than a map holds"),
        (["x = nan .. 3 mm"], [], "not a number"),
        (["x", "x"], [], "x is said twice"),
        (["x"], ["x = 2 mm"], "x is said twice"),
        (["x"], ["y"], "--at 'y': write where"),
        (["x"], ["y = 2"], "is no length"),
    ],
)
def test_what_is_misread(overs, ats, told):
    """Stated contract: one line, the option, the words, a way out."""
    with pytest.raises(InputError) as caught:
        grid_for(BUNCH, overs, ats)
    assert told in str(caught.value)
    assert "\n" not in str(caught.value)


def test_all_faults_together():
    """Stated contract."""
    with pytest.raises(InputError) as caught:
        grid_for(BUNCH, ["w", "x = 3 mm"], ["y"])
    assert len(caught.value.faults) == 3


def test_a_coasting_beam_has_no_length():
    """Stated contract."""
    assert grid_for(COASTING, ["z = -1 .. 1 m"]).counts == (1, 1, COUNTS[1])
    with pytest.raises(InputError, match="coasting"):
        grid_for(COASTING, ["z"])
