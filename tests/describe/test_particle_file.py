"""Particle files: what is read, and one located line for everything that is wrong."""

import tracemalloc

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from beamfield.describe.particle_file import read
from beamfield.errors import InputError

ROWS = "1e-3,0,2e-3\n-1e-3,1e-3,0\n0,2e-3,1e-3\n"
rounding = 1e-15


def write(folder, text, name="bunch.csv"):
    path = folder / name
    path.write_bytes(text if isinstance(text, bytes) else text.encode())
    return path


def faults(path):
    with pytest.raises(InputError) as caught:
        read(path)
    return [str(fault).removeprefix(str(path)) for fault in caught.value.faults]


def test_positions_about_their_centroid(tmp_path):
    """Closed form: three particles of weight 1, 1 and 2."""
    bunch = read(write(tmp_path, "x,y,z,weight\n0,0,8,1\n4,0,0,1\n0,4,0,2\n"))
    np.testing.assert_allclose(bunch.positions, [[-1, 3, -1], [-2, -2, 2], [6, -2, -2]], atol=rounding)
    np.testing.assert_allclose(bunch.weights, [0.25, 0.25, 0.5], rtol=rounding)
    assert bunch.momenta is None
    assert bunch.source == "bunch.csv"


def test_momenta_are_kept_in_any_order_of_columns(tmp_path):
    """The header, not the place, says what a column is."""
    bunch = read(write(tmp_path, "uz,x,uy,y,ux,z\n9,0,.2,1,.1,2\n8,1,.4,0,.3,0\n"))
    np.testing.assert_array_equal(bunch.momenta, [[0.1, 0.3], [0.2, 0.4], [9, 8]])
    np.testing.assert_array_equal(bunch.positions, [[-0.5, 0.5], [0.5, -0.5], [1, -1]])


@pytest.mark.parametrize(
    "text",
    [
        "x,y,z\n" + ROWS,
        "\ufeffx,y,z\n" + ROWS,
        ("x,y,z\n" + ROWS).replace("\n", "\r\n"),
        ("x,y,z\n" + ROWS).replace("\n", "\r"),
        "x[m], y [m], z ( m )\n" + ROWS,
        '"x","y","z"\n' + ROWS,
        "# made by hand\n\n x , y,z # names\n" + ROWS.replace("\n", " # one\n\n   \n  # two\n"),
        ("# gr\xf6\xdfe\nx,y,z\n" + ROWS).encode("latin-1"),
        "x,y,z\n" + ROWS.rstrip("\n"),
        "x,y,z\n" + "# nothing\n" * 3 + ROWS,
    ],
)
def test_ways_to_write_one_table(tmp_path, text):
    """Line ends, marks, blanks, comments and units change nothing."""
    plain = read(write(tmp_path, "x,y,z\n" + ROWS, "plain.csv"))
    np.testing.assert_array_equal(read(write(tmp_path, text)).positions, plain.positions)


REFUSED = {
    "x,y\n1,2\n": [":1:1: z: this column is missing; needed are x, y, z"],
    "x,y,Z\n1,2,3\n": [":1:5: Z: no column is called 'Z'; did you mean 'z'?", ":1:1: z: this column is missing"],
    "x,y,z,wait\n1,2,3,4\n": [":1:7: wait: no column is called 'wait'; did you mean 'weight'?"],
    "x,y,z,q\n1,2,3,4\n": [":1:7: q: no column is called 'q'; there are x, y, z, ux, uy, uz, weight"],
    "x,y,x,z\n1,2,3,4\n": [":1:5: x: this column is named twice"],
    "x,y,z,ux,uz\n1,2,3,4,5\n": [":1:1: uy: missing beside ux and uz; give ux, uy, uz or none"],
    "x [mm],y,z\n" + ROWS: [":1:1: x: 'mm' is not read; write this column in 'm'"],
    "x;y;z\n" + ROWS: [":1:2: columns are parted by commas here, not by semicolons"],
    "x\ty\tz\n": [":1:2: columns are parted by commas here, not by tabs"],
    "x y z\n": [":1:1: x y z: no column is called 'x y z'", ":1:1: x:", ":1:1: y:", ":1:1: z:"],
    ROWS: [":1:1: a number where columns should be named; begin with 'x,y,z'"],
    "# only\n\n": [": nothing but comments"],
    "": [": the file is empty"],
    "x,y,z\n": [": no particle; a bunch needs two"],
    "x,y,z\n1,2,3\n": [": 1 particle; a bunch needs two"],
    "x,y,z\n1,2,3\n1,2\n": [":3:1: 2 values; the header names 3 columns"],
    "x,y,z\n1,2\n3,4\n": [":2:1: 2 values; the header", ":3:1: 2 values"],
    "x,y,z\n# why\n1,2,3\n1, two,3\n": [":4:4: y: 'two' does not begin with a number"],
    "x,y,z\n1,2,3\n1,2 mm,3\n": [":3:3: y: '2 mm' is not a number; a unit belongs to the name"],
    "x,y,z\n1,2,3\n1,,3\n": [":3:3: y: a value is missing"],
    "x,y,z\n1,2,3\n1,0x1p3,3\n": [":3:3: y: '0x1p3'"],
    "x,y,z\n1,2,3\n1,1_0,3\n": [":3:3: y: '1_0'"],
    "x,y,z\n1,2,3\n1,\u0661,3\n": [":3:3: y: "],
    "x,y,z\n1,2,3\n1,4,nan\n\n-inf,3,4\n": [":3:5: z: nan is not a number", ":5:1: x: -inf is not a number"],
    "x,y,z\n1,2,3\n1,4,1e400\n": [":3:5: z: inf is not a number"],
    "x,y,z\n1,2,3\n1e7,2,4\n": [":3:1: x: 1e+07 is farther out than any bunch"],
    "x,y,z,weight\n1,2,3,1\n2,3,4,-1\n": [":3:7: weight: -1 is negative"],
    "x,y,z,weight\n1,2,3,0\n2,3,4,0\n": [": weight: every weight is 0"],
    "x,y,z,weight\n1,2,3,1\n2,3,4,0\n": [": x: all particles that count", ": y: all", ": z: all"],
    "x,y,z\n1,.1,3\n2,.1,4\n5,.1,6\n": [": y: all particles that count share one y"],
    "x,y,z\n" + "".join(f"{k},1000.1,{k}\n" for k in range(7)): [": y: all particles that count share one y"],
    "x,y,z,ux,uy,uz\n1,2,3,0,0,5\n2,3,4,0,0,-5\n": [
        ":3:11: uz: -5 is not between 0 and 1e9: every particle goes forwards"
    ],
    b"x,y,z\n1,2,\xff\n": [":2:5: z: "],
    b"\x89PNG\r\n\x1a\n\0\0": [":1:1: this is no table in UTF-8 text"],
    "x,y,z\n".encode("utf-16"): [":1:1: this is no table in UTF-8 text"],
    "x" * 100000: [":1:1: this is no table in UTF-8 text"],
}


@pytest.mark.parametrize("text", REFUSED, ids=range(len(REFUSED)))
def test_refused_with_its_place(tmp_path, text):
    """Everything wrong has one line each, with file, line, column, name and a way out."""
    found, expected = faults(write(tmp_path, text)), REFUSED[text]
    assert len(found) == len(expected)
    assert all(line.startswith(start) for line, start in zip(found, expected)), found


def test_no_file(tmp_path):
    """Nothing there, a directory, a name the system does not take."""
    assert "No such file" in faults(tmp_path / "absent.csv")[0]
    assert "this is a directory" in faults(tmp_path)[0]
    assert "cannot be read" in faults(tmp_path / ("long" * 200))[0]
    assert "cannot be read" in faults(tmp_path / "nul\0.csv")[0]


def test_ten_faults_are_enough(tmp_path):
    """A file wrong from end to end is refused after ten lines, whether numbers are missing or nonsense."""
    assert len(faults(write(tmp_path, "x,y,z\n" + "a,b,c\n" * 1000))) == 10
    assert len(faults(write(tmp_path, "x,y,z\n" + "nan,nan,1\n" * 1000))) == 10


def test_a_fault_far_down_is_found_again(tmp_path):
    """Blocks and comments between them do not shift the count of lines."""
    good = "0.001,0.002,0.003 # as measured\n\n"
    text = "x,y,z\n" + good * 200_000 + "0.001,nan,0\n"
    assert faults(write(tmp_path, text)) == [
        ":400002:7: y: nan is not a number that can be measured; write a finite one"
    ]
    assert faults(write(tmp_path, text.replace("nan", "n"))) == [":400002:7: y: 'n' does not begin with a number"]


def test_far_from_the_origin(tmp_path):
    """Closed form: a micrometre bunch 1024 m down the line keeps its size (steps of 2^-20 m, exact in binary)."""
    step = 2.0**-20
    rows = "".join(f"{k * step!r},{-k * step!r},{1024.0 + k * step!r}\n" for k in range(5))
    bunch = read(write(tmp_path, "x,y,z\n" + rows))
    np.testing.assert_allclose(bunch.rms, np.sqrt(2.0) * step, rtol=rounding)
    np.testing.assert_array_equal(bunch.positions[2], bunch.positions[0])


def test_progress(tmp_path):
    """Fractions that grow to 1."""
    seen = []
    read(write(tmp_path, "x,y,z\n" + ROWS * 200_000), seen.append)
    assert seen == sorted(seen)
    assert len(seen) > 1
    assert seen[-1] == 1.0


def test_memory_stays_near_that_of_the_arrays(tmp_path):
    """Ours: three times the arrays at most, and a few blocks of text."""
    path = write(tmp_path, "x,y,z\n" + "0.001,0.002,0.003\n0,0,0\n" * 200_000)
    tracemalloc.start()
    bunch = read(path)
    peak = tracemalloc.get_traced_memory()[1]
    tracemalloc.stop()
    blocks = 30e6
    assert peak < 3 * (bunch.positions.nbytes + bunch.weights.nbytes) + blocks


# npz archives


def archive(folder, **arrays):
    path = folder / "bunch.npz"
    np.savez(path, **arrays)
    return path


XYZ = {"x": [0.0, 1.0, 5.0], "y": [2.0, 3.0, 1.0], "z": [1, 0, -1]}


def test_an_archive_reads_as_the_text_does(tmp_path):
    """Same arrays, same bunch; integers are numbers."""
    table = "\n".join(["x,y,z", *(f"{x},{y},{z}" for x, y, z in zip(*XYZ.values()))])
    text, arrays = read(write(tmp_path, table)), read(archive(tmp_path, **XYZ))
    np.testing.assert_array_equal(arrays.positions, text.positions)
    np.testing.assert_array_equal(arrays.weights, text.weights)


@pytest.mark.parametrize(
    "arrays, expected",
    [
        ({"y": [1.0, 2.0, 3.0, 4.0]}, [": x: has 3 values, y has 4", ": z: has 3 values, y has 4"]),
        ({"y": np.ones((3, 2))}, [": x: has 3 values, y has 6", ": y: has shape (3, 2)", ": z: has 3"]),
        ({"y": 1.0}, [": y: has shape ()"]),
        ({"y": ["a", "b", "c"]}, [": y: holds str32; give real numbers"]),
        ({"y": [1j, 2j, 3j]}, [": y: holds complex128; give real numbers"]),
        ({"y": [1.0, np.nan, 3.0]}, [": y[1]: nan is not a number"]),
        ({"weight": [1.0, 1.0, -1.0]}, [": weight[2]: -1 is negative"]),
        ({"weigth": [1.0, 1.0, 1.0]}, [": weigth: no column is called 'weigth'; did you mean 'weight'?"]),
        ({"ux": [1.0, 1.0, 1.0]}, [": uy: missing beside ux; give ux, uy, uz or none", ": uz: missing beside ux"]),
    ],
)
def test_refused_arrays(tmp_path, arrays, expected):
    """Shapes, kinds, names and values of arrays, each with its name."""
    found = faults(archive(tmp_path, **XYZ | arrays))
    assert len(found) == len(expected)
    assert all(line.startswith(start) for line, start in zip(found, expected)), found


def test_a_pickle_is_never_opened(tmp_path):
    """An array of objects is refused unread."""
    path = tmp_path / "bunch.npz"
    np.savez(path, **XYZ | {"y": np.array([print, len, 3], dtype=object)}, allow_pickle=True)
    assert "no .npz archive of plain arrays" in faults(path)[0]


@pytest.mark.parametrize(
    "data", [b"x,y,z\n1,2,3\n", b"PK\x03\x04 torn", b"\x80\x04K\x01.", b"\x93NUMPY\x01\x00", b"\0"]
)
def test_no_archive(tmp_path, data):
    """Text, torn archives, pickles and single arrays under the name of an archive."""
    assert "no .npz archive of plain arrays" in faults(write(tmp_path, data, "bunch.npz"))[0]


def test_a_single_array_is_no_archive(tmp_path):
    """A file of numpy.save under the wrong name."""
    with open(tmp_path / "bunch.npz", "wb") as handle:
        np.save(handle, np.ones(3))
    assert "no .npz archive of plain arrays" in faults(tmp_path / "bunch.npz")[0]


def read_or_refused(path):
    """The number of particles read, or what the refusal says."""
    try:
        return read(path).count, ""
    except InputError as error:
        return 0, str(error)


@given(cut=st.integers(0, 700), place=st.integers(0, 699), byte=st.integers(0, 255))
def test_damaged_archives(tmp_path_factory, cut, place, byte):
    """Whatever happened to an archive on its way, it is read or refused, nothing else."""
    folder = tmp_path_factory.mktemp("damaged")
    data = bytearray(archive(folder, **XYZ).read_bytes())
    data[place % len(data)] = byte
    path = write(folder, bytes(data[: len(data) - cut]), "bunch.npz")
    count, refusal = read_or_refused(path)
    assert count == 3 or refusal.startswith(str(path))


@given(st.text(alphabet='xyzuweight,;0123456789.eE+-# \t\n\r"[]m\0\u20ac', max_size=60))
def test_any_text(tmp_path_factory, text):
    """Whatever is written, it is read or refused by lines that begin with the name of the file."""
    path = write(tmp_path_factory.mktemp("any"), "x,y,z\n" + text)
    count, refusal = read_or_refused(path)
    assert count > 1 or all(line.startswith(str(path)) for line in refusal.splitlines())
