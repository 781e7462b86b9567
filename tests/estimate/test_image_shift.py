"""Tune shifts by images and by a neutralising background: by hand, in their limits, and where they do not hold."""

from dataclasses import replace
from math import inf, pi

import pytest

from beamfield.beam.ring import Ring
from beamfield.beam.surroundings import Chamber, Surroundings
from beamfield.estimate.answer import answer
from beamfield.estimate.image_shift import image_shift
from beamfield.estimate.rms_average import space_charge_ratio
from beamfield.estimate.self_force import self_force
from beamfield.estimate.tune_shift import tune_shift
from tests.estimate.made_bunches import DEFAULT, made

rounding, summed = 1e-10, 1e-9
RING = Ring.smooth(100.0, (4.2, 4.3))
PLATES = Surroundings(Chamber("plates", inf, 20e-3))
CLOSED = replace(DEFAULT, method="closed-form")


def shifts(bunch, surroundings, ring=RING):
    return {found.name: found for found in image_shift(bunch, surroundings, ring, DEFAULT)}


def test_plates_and_poles_by_hand():
    """From memory of Laslett 1963 for a bunch: dQ_y = -(R^2/Q)/(beta^2 gamma) 2 r0 [...], smooth optics."""
    bunch, h, g = made("gaussian", aspect=1e5), 20e-3, 25e-3
    found = shifts(bunch, replace(PLATES, pole_half_gap=g))
    peak, mean = bunch.particles / ((2 * pi) ** 0.5 * bunch.sigma[2]), bunch.particles / 100.0
    beta2, gamma2, r0 = bunch.beta**2, bunch.gamma**2, bunch.species.classical_radius
    radius = 100.0 / (2 * pi)
    unit = {axis: -2.0 * r0 * radius**2 / (tune * beta2 * bunch.gamma) for axis, tune in zip("xy", RING.tune)}
    eps1, eps2, xi = pi**2 / 48, pi**2 / 24, pi**2 / 16
    image = eps1 / h**2 * (mean + (peak - mean) / gamma2) + beta2 * eps2 / g**2 * mean
    steady = beta2 * mean * (eps1 / h**2 + eps2 / g**2)
    assert found["tune_shift_image_y"].value == pytest.approx(unit["y"] * image, rel=rounding)
    assert found["tune_shift_image_x"].value == pytest.approx(-unit["x"] * image, rel=rounding)
    whole = unit["y"] * (xi / h**2 * peak / gamma2 + steady)
    assert found["coherent_tune_shift_y"].value == pytest.approx(whole, rel=rounding)
    assert found["coherent_tune_shift_x"].value == pytest.approx(-unit["x"] * steady, rel=rounding)
    through = unit["y"] * (xi / h**2 * (mean + (peak - mean) / gamma2) + beta2 * xi / g**2 * mean)
    assert f"if it does: {through:.6g}" in found["coherent_tune_shift_y"].remarks[0]
    assert all(finding.valid for finding in found.values())


def test_a_round_chamber_does_not_split_particles_but_pulls_the_beam():
    """Closed form: no incoherent shift; the displaced beam meets its one image at b^2 / y, weakened by gamma^2."""
    bunch = made("kv beam")
    found = shifts(bunch, Surroundings(Chamber("round", 20e-3, 20e-3)))
    assert found["tune_shift_image_y"].value == 0.0
    kappa = 2.0 * bunch.species.classical_radius * bunch.line_density / (bunch.beta**2 * bunch.gamma**3 * 20e-3**2)
    wanted = -kappa * (100.0 / (2 * pi)) ** 2 / (2.0 * 4.3)
    assert found["coherent_tune_shift_y"].value == pytest.approx(wanted, rel=rounding)


def test_absent_without_walls_or_ring():
    bunch = made("gaussian", aspect=1e5)
    assert not shifts(bunch, Surroundings())
    assert not shifts(bunch, PLATES, None)
    assert list(shifts(bunch, Surroundings(pole_half_gap=30e-3)))


def test_out_of_the_domain_is_said():
    """Interface: a short bunch in a wide pipe, and a beam that touches the wall."""
    short = shifts(made("gaussian", aspect=1.0), PLATES)["tune_shift_image_y"]
    assert not short.valid
    assert "no long bunch" in short.remarks[-1]
    touching = shifts(made("gaussian", aspect=1e5), Surroundings(Chamber("round", 2e-3, 2e-3)))["tune_shift_image_x"]
    assert not touching.valid
    assert "touches the wall" in touching.remarks[-1]


@pytest.mark.parametrize("part", [0.0, 0.05, 1.0 / 9.0, 0.5])
def test_a_background_weakens_every_force_across(part):
    """Closed form: 1 - gamma^2 f, here gamma = 3, nought at f = 1/9; no part of fields and forces along."""
    bunch = made("gaussian", aspect=1e3, emittance=(1e-6, 1e-6))
    free, with_it = ({}, {})
    for surroundings, kept in ((Surroundings(), free), (Surroundings(neutralisation=part), with_it)):
        for ask in (self_force, tune_shift, space_charge_ratio):
            kept |= {found.name: found for found in ask(bunch, surroundings, RING, CLOSED)}
    factor = 1.0 - 9.0 * part
    for name in ("perveance", "defocusing_x", "defocusing_y", "tune_shift_y", "space_charge_ratio_x"):
        assert with_it[name].value == pytest.approx(factor * free[name].value, abs=summed * abs(free[name].value)), name
        assert with_it[name].closed_form is None or with_it[name].closed_form == pytest.approx(
            factor * free[name].closed_form, abs=summed * abs(free[name].value)
        )
    kicks = with_it["peak_kick_x"].value, abs(factor) * free["peak_kick_x"].value
    assert kicks[0] == pytest.approx(kicks[1], abs=summed * free["peak_kick_x"].value)
    for name in ("field_gradient_x", "defocusing_z", "peak_field_y", "peak_energy_change_z", "plasma_wavelength"):
        assert with_it[name].value == free[name].value, name
    assert bool(part) == any("nought at f = 1/gamma^2 = 0.111111" in said for said in with_it["defocusing_x"].remarks)


def test_a_short_bunch_in_a_background_is_out_of_the_domain():
    found = {f.name: f for f in self_force(made("gaussian"), Surroundings(neutralisation=0.1), None, CLOSED)}
    assert not found["defocusing_x"].valid
    assert found["field_gradient_x"].valid


def test_in_the_answer():
    """Interface: catalogue order, and Gauss's law still holds with a background."""
    found = answer(made("gaussian", aspect=1e3), replace(PLATES, neutralisation=0.2), RING, CLOSED)
    names = list(found)
    assert names.index("tune_shift_y") < names.index("tune_shift_image_x") < names.index("coherent_tune_shift_x")
