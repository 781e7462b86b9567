"""The bunch as a noun: derived values, and no nonsense at birth."""

from dataclasses import FrozenInstanceError, replace
from math import inf, nan, sqrt

import pytest

from beamfield.beam.bunch import Bunch
from beamfield.beam.shape import SHAPES, Shape
from beamfield.beam.species_table import named

LIGHT, CHARGE = 299792458.0, 1.602176634e-19  # CODATA 2022, exact
ROUNDING = 1e-15
BUNCH = Bunch(named("electron"), 0.75, 1e9, (2e-3, 0.5e-3, 4e-3), SHAPES["uniform-ellipsoid"])


def test_motion():
    """Closed form: the 3-4-5 triangle of momentum, mass and energy."""
    assert BUNCH.gamma == pytest.approx(1.25, rel=ROUNDING, abs=0.0)
    assert BUNCH.beta == pytest.approx(0.6, rel=ROUNDING, abs=0.0)
    assert BUNCH.velocity == pytest.approx(0.6 * LIGHT, rel=ROUNDING, abs=0.0)


@pytest.mark.parametrize("momentum", [1e-9, 1e9])
def test_motion_loses_no_digits(momentum):
    """Closed form: beta gamma itself comes back, from creeping to 1e9."""
    bunch = replace(BUNCH, beta_gamma=momentum)
    assert bunch.beta * bunch.gamma == pytest.approx(momentum, rel=2.0 * ROUNDING, abs=0.0)


def test_charge_is_signed():
    assert BUNCH.charge == pytest.approx(-1e9 * CHARGE, rel=ROUNDING, abs=0.0)
    assert replace(BUNCH, species=named("positron")).charge == -BUNCH.charge
    assert replace(BUNCH, particles=None).charge is None


def test_aspect_is_that_at_rest():
    """Definition: gamma sigma_z / sqrt(sigma_x sigma_y)."""
    assert BUNCH.aspect == pytest.approx(1.25 * 4.0 / sqrt(2.0 * 0.5), rel=ROUNDING, abs=0.0)


def test_extent_is_half_the_size_in_the_lab():
    """Closed form: sqrt 5 rms of a uniform ellipsoid; none of a Gaussian, nor of particles."""
    for axis, size in enumerate(BUNCH.sigma):
        assert BUNCH.extent(axis) == pytest.approx(sqrt(5.0) * size, rel=ROUNDING, abs=0.0)
    assert replace(BUNCH, shape=SHAPES["gaussian"]).extent(2) is None
    assert replace(BUNCH, shape=None).extent(0) is None


def test_coasting():
    beam = replace(BUNCH, sigma=(1e-3, 1e-3, inf), shape=Shape("kv", "coasting"), line_density=1e10, particles=None)
    assert beam.coasting
    assert not BUNCH.coasting
    assert beam.aspect == inf


@pytest.mark.parametrize(
    "changes, words",
    [
        ({"beta_gamma": 0.0}, "does not move"),
        ({"beta_gamma": -1.0}, "does not move"),
        ({"beta_gamma": nan}, "does not move"),
        ({"beta_gamma": inf}, "does not move"),
        ({"sigma": (0.0, 1e-3, 1e-3)}, "rms sizes"),
        ({"sigma": (1e-3, nan, 1e-3)}, "rms sizes"),
        ({"sigma": (inf, 1e-3, 1e-3)}, "rms sizes"),
        ({"particles": 0.0}, "particles"),
        ({"particles": nan}, "particles"),
        ({"line_density": 1.0}, "coasting"),
        ({"sigma": (1e-3, 1e-3, inf)}, "coasting"),
    ],
)
def test_nonsense_is_refused(changes, words):
    """Also a ValueError, for callers from Python."""
    with pytest.raises(ValueError, match=words):
        replace(BUNCH, **changes)


def test_frozen():
    with pytest.raises(FrozenInstanceError):
        BUNCH.particles = 1.0
