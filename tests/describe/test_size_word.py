"""Words for a size, against the variance and the half maximum of the profiles themselves."""

from math import sqrt

import numpy as np
import pytest
from scipy.integrate import quad
from scipy.optimize import brentq

from beamfield.beam.shape import SHAPES, Shape
from beamfield.describe.checked_quantity import read
from beamfield.describe.size_word import rms_size
from beamfield.errors import InputError

NUMERICAL = 1e-7
PROFILES = {  # (shape, axis) -> profile over (x / edge), of edge 1: the densities integrated over the other coordinates
    (SHAPES["uniform-ellipsoid"], 0): lambda u: 1 - u**2,
    (SHAPES["uniform-ellipsoid"], 2): lambda u: 1 - u**2,
    (SHAPES["parabolic-ellipsoid"], 0): lambda u: (1 - u**2) ** 2,
    (SHAPES["uniform-cylinder"], 1): lambda u: np.sqrt(1 - u**2),
    (SHAPES["uniform-cylinder"], 2): lambda u: 1.0,
    (Shape("parabolic", "gaussian"), 0): lambda u: (1 - u**2) ** 1.5,
    (Shape("kv", "parabolic"), 2): lambda u: 1 - u**2,
}


def size(text, shape, axis, velocity=0.0):
    return rms_size(read(text, "bunch length"), shape, axis, velocity)


@pytest.mark.parametrize(("shape", "axis"), PROFILES)
def test_edges(shape, axis):
    """Second moment by scipy's quad of a profile that reaches from -1 to 1."""
    profile = PROFILES[shape, axis]
    rms = sqrt(quad(lambda u: u**2 * profile(u), -1, 1)[0] / quad(profile, -1, 1)[0])
    assert size("1 m semi", shape, axis) == pytest.approx(rms, rel=NUMERICAL)
    assert size("2 m full", shape, axis) == pytest.approx(rms, rel=NUMERICAL)


@pytest.mark.parametrize(("shape", "axis"), [key for key in PROFILES if key != (SHAPES["uniform-cylinder"], 2)])
def test_half_maximum(shape, axis):
    """Half width at half maximum by scipy's brentq."""
    profile = PROFILES[shape, axis]
    half = brentq(lambda u: profile(u) - 0.5 * profile(0.0), 0.0, 1.0, xtol=1e-14)
    assert size(f"{2 * half!r} m fwhm", shape, axis) == pytest.approx(size("1 m semi", shape, axis), rel=NUMERICAL)


def test_words_of_the_trade():
    """Over rms: Gaussian fwhm 2.3548, ellipsoid semi sqrt 5, KV semi 2, parabola sqrt 5: common practice, no source."""
    assert size("2.354820045 mm fwhm", SHAPES["gaussian"], 0) == pytest.approx(1e-3, rel=1e-9)
    assert size("5 mm semi", SHAPES["uniform-ellipsoid"], 0) == pytest.approx(5e-3 / sqrt(5), rel=1e-15)
    assert size("2 mm semi", SHAPES["uniform-cylinder"], 0) == 1e-3
    assert size("5 mm semi", Shape("gaussian", "parabolic"), 2) == pytest.approx(5e-3 / sqrt(5), rel=1e-15)


def test_a_time_is_a_length_at_the_velocity_of_the_bunch():
    assert size("10 ns rms", SHAPES["gaussian"], 2, 1e8) == pytest.approx(1.0, rel=1e-15)
    assert size("1 m rms", SHAPES["gaussian"], 2, 1e8) == 1.0


@pytest.mark.parametrize("word", ["full", "semi"])
def test_a_gaussian_has_no_edge(word):
    with pytest.raises(InputError, match="a gaussian profile has no edge; write its rms or fwhm size"):
        size(f"1 mm {word}", Shape("gaussian", "uniform"), 0)
    with pytest.raises(InputError, match="no edge"):
        size(f"1 mm {word}", Shape("kv", "gaussian"), 2)
