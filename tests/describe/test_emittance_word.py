"""Words for an emittance, against the share of the beam that an ellipse holds."""

from math import exp, pi

import numpy as np
import pytest
from scipy.integrate import quad

from beamfield.beam.shape import SHAPES, Shape
from beamfield.describe.checked_quantity import read
from beamfield.describe.emittance_word import geometric_rms
from beamfield.errors import InputError

NUMERICAL = 1e-9
# Density over the projected phase plane against the radius r in it, x and x' being scaled to one width:
# Gaussian; uniform disc (KV, a shell in four dimensions); ball uniformly filled in four dimensions, seen on a plane.
PLANES = {
    "gaussian": (lambda r: exp(-0.5 * r**2), 40.0),
    "kv": (lambda r: 1.0, 1.0),
    "parabolic": (lambda r: 1.0 - r**2, 1.0),
}


def emittance(text, shape, beta_gamma=1.0):
    return geometric_rms(read(text, "emittance"), shape, beta_gamma)


def held(profile, radius):
    return quad(lambda r: 2.0 * pi * r * profile(r), 0.0, radius, epsabs=1e-13, epsrel=1e-13)[0]


@pytest.mark.parametrize("transverse", PLANES)
def test_ninety_five_percent(transverse):
    """An ellipse of 95 % emittance holds 95 % of the beam: integration by scipy's quad."""
    profile, edge = PLANES[transverse]
    mean_square = quad(lambda r: pi * r**3 * profile(r), 0.0, edge)[0] / held(profile, edge)  # <x^2> = <r^2> / 2
    over_rms = 1.0 / emittance("1 m geometric 95%", Shape(transverse, "uniform"))
    radius = np.sqrt(over_rms * mean_square)
    assert held(profile, radius) / held(profile, edge) == pytest.approx(0.95, rel=NUMERICAL)


@pytest.mark.parametrize("transverse", ["kv", "parabolic"])
def test_full(transverse):
    """An ellipse of full emittance reaches the edge of the profile on x."""
    shape = Shape(transverse, "uniform")
    assert 1.0 / emittance("1 m geometric full", shape) == pytest.approx(shape.edge(0) ** 2, rel=1e-15)


def test_numbers_of_the_trade():
    """Common practice, no source: 95 % of a Gaussian is 5.991 rms, all of a KV beam 4 rms."""
    assert 1.0 / emittance("1 m geometric 95%", SHAPES["gaussian"]) == pytest.approx(5.991, abs=5e-4)
    assert emittance("4 um geometric full", SHAPES["uniform-cylinder"]) == 1e-6


def test_normalised():
    assert emittance("3 um normalised rms", SHAPES["gaussian"], 2.0) == 1.5e-6
    assert emittance("3 mm mrad normalized rms", SHAPES["gaussian"], 2.0) == 1.5e-6
    assert emittance("3 um geometric rms", SHAPES["gaussian"], 2.0) == 3e-6


@pytest.mark.parametrize(
    ("word", "shape", "said"),
    [
        ("full", SHAPES["gaussian"], "no ellipse holds all of it"),
        ("95%", SHAPES["uniform-ellipsoid"], "an ellipsoid does not fix its phase space"),
        ("full", SHAPES["parabolic-ellipsoid"], "an ellipsoid does not fix its phase space"),
        ("95%", None, "a particle file does not say"),
    ],
)
def test_refused(word, shape, said):
    with pytest.raises(InputError, match=said):
        emittance(f"1 um geometric {word}", shape)
