"""Potential, geometry factor and impedance of bunches in chambers: against the series of the cylinder's own modes."""

from dataclasses import replace
from math import inf, sqrt

import numpy as np
import pytest
from scipy.special import erfcx, j1, jn_zeros

from beamfield.beam.numerics import Numerics
from beamfield.beam.ring import Ring
from beamfield.beam.surroundings import Chamber, Surroundings
from beamfield.constants import COULOMB, VACUUM_IMPEDANCE
from beamfield.estimate.intensity_limit import intensity_limit
from beamfield.estimate.longitudinal import longitudinal
from tests.estimate.made_bunches import DEFAULT, GAMMA, WIDTH, made

PIPE = 5.0 * WIDTH
ROUND = Surroundings(Chamber("round", PIPE, PIPE))
FREE = Surroundings()
RING = Ring.smooth(100.0, (4.2, 4.3))
CLOSED = Numerics(method="closed-form")
ASPECTS = (0.03, 1.0, 10.0, 1e3)
quadrature = 1e-7


def found(bunch, surroundings=ROUND, ring=RING, numerics=DEFAULT):
    return {finding.name: finding for finding in longitudinal(bunch, surroundings, ring, numerics)}


def modes(bunch, radius):
    """phi [V] and dE_z/dz [V/m^2] at the centre of a round Gaussian bunch in a pipe, by its modes J_0(k r).

    From memory of J. D. Jackson, Classical Electrodynamics, 3rd ed., problem 3.23; means over the Gaussian closed.
    """
    zeros = jn_zeros(0, 400)
    k, length = zeros / radius, bunch.gamma * bunch.sigma[2]
    share = 2.0 / radius / (zeros * j1(zeros) ** 2) * np.exp(-0.5 * (k * bunch.sigma[0]) ** 2)
    mean = erfcx(k * length / sqrt(2.0))
    bend = 2.0 * k / (sqrt(2.0 * np.pi) * length) - k * k * mean
    return COULOMB * bunch.charge * bunch.gamma * np.array([share @ mean, share @ bend])


@pytest.mark.large
@pytest.mark.parametrize("aspect", ASPECTS)
@pytest.mark.parametrize("numerics", [DEFAULT, CLOSED])
def test_gaussian_in_a_pipe(aspect, numerics):
    """Closed form: the series of modes; the doubt covers the error and is no more than rounding asks."""
    bunch = made("gaussian", aspect)
    depth, slope = modes(bunch, PIPE)
    curvature = bunch.charge / (sqrt(2.0 * np.pi) * bunch.sigma[2] ** 3)
    wanted = {"potential_depression": depth, "geometry_factor": slope * GAMMA**2 / (COULOMB * curvature)}
    results = found(bunch, numerics=numerics)
    series = 1e-11 * aspect**2  # its terms cancel in long bunches
    for name, value in wanted.items():
        assert results[name].value == pytest.approx(value, rel=max(quadrature, series)), name
        assert abs(results[name].value - value) <= 3.0 * results[name].doubt + series * value, name


@pytest.mark.large
@pytest.mark.parametrize("name", ["gaussian", "kv x parabolic", "parabolic x gaussian", "gaussian x parabolic"])
def test_long_bunches_have_the_factor_of_the_textbook(name):
    """Limit: g of the centre tends to that of a long beam, of uniform, parabolic and Gaussian section."""
    bunch = made(name, 1e3)
    wanted = {"gaussian": 0.5772157 - 0.6931472, "kv": 1.0, "parabolic": 1.5}[bunch.shape.transverse]
    scale = bunch.sigma[0] * (bunch.shape.edge(0) or 1.0)
    factor = found(bunch)["geometry_factor"]
    assert factor.valid
    assert factor.value == pytest.approx(wanted + 2.0 * np.log(PIPE / scale), rel=2e-4)


@pytest.mark.large
@pytest.mark.parametrize(("name", "constant"), [("uniform-ellipsoid", 0.0), ("parabolic-ellipsoid", 1.0)])
def test_long_ellipsoids(name, constant):
    """Closed form: the narrowing ends take 1 and 1/2 from the constants 1 and 3/2."""
    bunch = made(name, 1e3)
    value = found(bunch)["geometry_factor"].value
    assert value == pytest.approx(constant + 2.0 * np.log(PIPE / bunch.extent(0)), rel=2e-4)


@pytest.mark.large
@pytest.mark.parametrize("aspect", [100.0, 4e3, 3e4])
def test_bunches_without_end(aspect):
    """Limit: potential of the long uniform beam, also where the wall sees smoothed ends."""
    bunch = made("uniform-cylinder", aspect)
    line = bunch.charge * bunch.shape.peak_line_density / bunch.sigma[2]
    wanted = COULOMB * line * (1.0 + 2.0 * np.log(PIPE / bunch.extent(0)))
    assert found(bunch)["potential_depression"].value == pytest.approx(wanted, rel=1e-6)


@pytest.mark.parametrize("profile", ["kv", "parabolic", "gaussian"])
def test_coasting_beams(profile):
    """Closed form: 29.979 V (I / beta) g for 1 A, whatever the profile; abs(Z/n) = g Z0 / (2 beta gamma^2)."""
    beam = made(f"{profile} beam")
    results = found(beam)
    factor = results["geometry_factor"].value
    current = beam.line_density * beam.species.charge * beam.velocity
    assert results["potential_depression"].value == pytest.approx(29.97925 * current / beam.beta * factor, rel=1e-6)
    assert results["longitudinal_impedance_over_n"].value == pytest.approx(
        VACUUM_IMPEDANCE * factor / (2.0 * beam.beta * GAMMA**2), rel=1e-12
    )
    assert "energy_change_per_turn" not in results


def test_what_does_not_apply_is_absent():
    """Interface: a coasting beam has no depth in free space, a level bunch no g; without a ring no turn."""
    assert found(made("kv beam"), FREE) == {}
    assert set(found(made("uniform-cylinder", 10.0), FREE, None, CLOSED)) == {"potential_depression"}
    assert set(found(made("gaussian"), ring=None, numerics=CLOSED)) == {"potential_depression", "geometry_factor"}


@pytest.mark.large
def test_free_space_is_a_wall_far_away():
    """Limit: the image of a bunch of charge Q in a wide pipe takes 0.8710 Q / (4 pi eps0 b), a known integral."""
    bunch, wide = made("gaussian"), Surroundings(Chamber("round", 1.0, 1.0))
    free, walled = (found(bunch, around)["potential_depression"].value for around in (FREE, wide))
    assert free - walled == pytest.approx(0.8710 * COULOMB * bunch.charge * GAMMA, rel=1e-3)


@pytest.mark.large
def test_energy_of_a_turn():
    """Closed form: long parabolic bunch, g q C / (4 pi eps0 gamma^2) times the slope at the edge, nearly reached."""
    bunch = made("kv x parabolic", 3e3)
    results = found(bunch)
    steepest = 1.5 * bunch.charge / bunch.extent(2) ** 2
    wanted = results["geometry_factor"].value * COULOMB * steepest * RING.circumference / GAMMA**2
    assert 0.97 * wanted < results["energy_change_per_turn"].value < wanted


@pytest.mark.parametrize(
    ("name", "aspect", "around", "said"),
    [
        ("gaussian", 1.0, ROUND, "short for one g"),
        ("uniform-cylinder", 1.0, ROUND, "no long beam"),
        ("gaussian", 1.0, Surroundings(Chamber("plates", inf, PIPE)), "round pipe"),
    ],
)
def test_outside_its_domain_a_result_says_so(name, aspect, around, said):
    """Interface: a short bunch in a wide pipe."""
    factor = found(made(name, aspect), around, numerics=CLOSED)["geometry_factor"]
    assert not factor.valid
    assert any(said in remark for remark in factor.remarks)


def test_limits_of_current_and_charge():
    """Closed form: Bogdankevich and Rukhadze; eps0 E over the section; both warn where the bunch has more."""
    beam = made("kv beam", species="electron")
    (limit,) = intensity_limit(beam, ROUND, None, DEFAULT)
    factor = 1.0 + 2.0 * np.log(PIPE / (2.0 * WIDTH))
    assert limit.value == pytest.approx(17045.0 * (GAMMA ** (2 / 3) - 1.0) ** 1.5 / factor, rel=1e-5)
    assert limit.valid
    assert not limit.remarks
    (beyond,) = intensity_limit(replace(beam, line_density=1e15), ROUND, None, DEFAULT)
    assert "would not pass" in beyond.remarks[0]
    bunch = made("uniform-cylinder", species="electron")
    (charge,) = intensity_limit(bunch, Surroundings(cathode=1.0, cathode_field=1e6), None, DEFAULT)
    assert charge.value == pytest.approx(8.854e-6 * np.pi * 4.0 * WIDTH**2, rel=1e-4)
    assert "would not give" in charge.remarks[1]
