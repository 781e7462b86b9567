"""Tables of ring optics: averages they stand for, and rows no ring can have."""

import numpy as np
import pytest

from beamfield.describe.optics_file import read, ring_weights
from beamfield.errors import InputError

RING = 100.0
rounding = 1e-14


def write(folder, *rows, header="s,beta_x,beta_y,dispersion_x"):
    path = folder / "optics.csv"
    path.write_text("\n".join([header, *rows]) + "\n")
    return path


def faults(path):
    with pytest.raises(InputError) as caught:
        read(path, RING)
    return [str(fault).removeprefix(str(path)) for fault in caught.value.faults]


def test_rows_are_read(tmp_path):
    """Columns come in SI and in their order; where no dispersion is given there is none."""
    optics = read(write(tmp_path, "0,10,20", "40,11,19", "70,12,18", header="s [m],beta_x [m],beta_y [m]"), RING)
    np.testing.assert_array_equal(optics.s, [0, 40, 70])
    np.testing.assert_array_equal(optics.beta_x, [10, 11, 12])
    np.testing.assert_array_equal(optics.beta_y, [20, 19, 18])
    np.testing.assert_array_equal(optics.dispersion_x, [0, 0, 0])
    assert optics.source == "optics.csv"
    assert optics.tabulated


@pytest.mark.parametrize(
    "s, expected",
    [
        ([0.0, 40.0, 70.0], [0.35, 0.35, 0.30]),  # the last stretch leads round to the first row
        ([0.0, 40.0, 100.0], [0.20, 0.50, 0.30]),  # first and last row are one place
        ([20.0, 60.0, 80.0], [0.40, 0.30, 0.30]),  # the ring goes on before the first row
        ([0.0, 40.0, 40.0, 70.0], [0.35, 0.20, 0.15, 0.30]),  # a place named twice counts once
    ],
)
def test_weights_of_the_ring_average(s, expected):
    """Closed form: half of the stretches on both sides, over the circumference."""
    np.testing.assert_allclose(ring_weights(np.array(s), RING), expected, rtol=rounding)


def test_average_of_a_periodic_function():
    """Closed form: the mean of 10 + 3 cos is 10 and of its square 104.5, exact for the trapezoid of 16 equal steps."""
    s = np.arange(16) * RING / 16
    beta, weights = 10.0 + 3.0 * np.cos(2.0 * np.pi * s / RING), ring_weights(s, RING)
    assert beta @ weights == pytest.approx(10.0, rel=rounding)
    assert beta**2 @ weights == pytest.approx(104.5, rel=rounding)


def test_a_repeated_place_and_a_closed_end_are_welcome(tmp_path):
    """Common practice, no source: tables name the ends of elements twice, and the end of the ring as its beginning."""
    rows = ["0,10,20,0", "30,11,19,2", "30,11.05,19,2", "70,12,18,1", "100.00001,10.05,20,0.01"]
    optics = read(write(tmp_path, *rows), RING)
    assert optics.weights.sum() == pytest.approx(1.0, rel=rounding)
    assert optics.weights.min() > 0.0


def test_steep_optics_are_welcome(tmp_path):
    """Closed form: beta = b + s^2 / b about a waist of 0.1 m rises thousandfold in a few metres."""
    s = np.array([0.0, 0.01, 0.05, 1.0, 10.0, 50.0, 90.0])
    rows = [f"{place},{0.1 + min(place, 100 - place) ** 2 / 0.1},5,0" for place in s]
    assert read(write(tmp_path, *rows), RING).beta_x.max() > 1e4


@pytest.mark.parametrize(
    "rows, expected",
    [
        (
            ["0,10,20,1", "60,9,9,1", "50,8,8,1", "80,8,8,1"],
            [":4:1: s: 50 comes after 60; order the rows along the ring"],
        ),
        (["0,10,20,1", "40,9,9,1", "101,8,8,1"], [":4:1: s: 101 is not on the ring, 0 to 100 m"]),
        (["-1,10,20,1", "40,9,9,1", "70,8,8,1"], [":2:1: s: -1 is not on the ring"]),
        (["0,10,20,1", "40,0,9,1", "70,8,-8,1"], [":3:4: beta_x: 0 is not above 0", ":4:6: beta_y: -8 is not above 0"]),
        (["0,10,20,1", "40,9,9,1", "70,8,8,nan"], [":4:8: dispersion_x: nan is not a number"]),
        (
            ["0,10,20,1", "40,9,9,1", "60,9,9,1", "100,11,20,1"],
            [":5:5: beta_x: ends at 11 but began at 10; a ring closes, within 1%"],
        ),
        (["0,10,20,1", "40,9,9,1", "60,9,9,1", "100,10,20,0"], [":5:11: dispersion_x: ends at 0 but began at 1"]),
        (["0,10,20,1", "40,9,9,1", "40,9,12,1", "70,9,9,1"], [":4:6: beta_y: jumps from 9 to 12 at s = 40 m"]),
        (["0,10,20,1", "10,9,9,1", "25,10,20,1"], [":4:1: s: 75 m of 100 m without a row from here on; give the"]),
        (["0,10,20,1", "25,9,9,1", "50,10,20,1"], [":4:1: s: 50 m of 100 m without a row"]),
        (["0,10,20,1"], [":2:1: s: 100 m of 100 m without a row"]),
        (["0,10,20,1", "40,9 m,9,1"], [":3:4: beta_x: '9 m' is not a number"]),
    ],
)
def test_refused_with_its_place(tmp_path, rows, expected):
    """Every row no ring can have, by line, column and name."""
    found = faults(write(tmp_path, *rows))
    assert len(found) == len(expected)
    assert all(line.startswith(start) for line, start in zip(found, expected)), found


def test_empty_table(tmp_path):
    """A header alone covers nothing."""
    assert faults(write(tmp_path)) == [": a header alone; give the optics round the ring, a row for each place"]


def test_unknown_column(tmp_path):
    """The header is checked as that of any table."""
    path = write(tmp_path, "0,1,2", header="s,beta_x,betay")
    assert faults(path)[0].startswith(":1:10: betay: no column is called 'betay'; did you mean 'beta_y'?")


def test_no_archive_for_optics(tmp_path):
    """Optics are text; anything else is refused as such."""
    path = tmp_path / "optics.npz"
    np.savez(path, s=[0.0])
    assert "no table in UTF-8 text" in faults(path)[0]
