"""Where the field is strongest on the axes: the superposed peak against the top of the closed form, found otherwise."""

from functools import cache

import numpy as np
import pytest
from scipy.optimize import minimize_scalar

from beamfield.beam.surroundings import Surroundings
from beamfield.constants import ELEMENTARY_CHARGE, SPEED_OF_LIGHT
from beamfield.estimate.self_force import self_force
from beamfield.estimate.textbook import closed_axis_field
from tests.estimate.made_bunches import BEAMS, BUNCHES, DEFAULT, honest, made

GOOD = 1e-4
COVERED, NOT_SCARED = 0.9, 0.85
CASES = [(1e-2, 10.0), (1.0, 3.0), (1e5, 1.0)]  # aspect, section


@cache
def found(name, aspect, section):
    bunch = made(name, aspect, section)
    return bunch, {finding.name: finding for finding in self_force(bunch, Surroundings(), None, DEFAULT)}


@cache
def errors(name, aspect, section):
    """Relative errors and doubts (2, A) of the peaks on the axes where the shape has a closed form."""
    bunch, findings = found(name, aspect, section)
    result = []
    for axis in range(2 if bunch.coasting else 3):
        truth = top(bunch, axis)
        if truth is not None:
            finding = findings[f"peak_field_{'xyz'[axis]}"]
            result.append((abs(finding.value / truth - 1.0), finding.doubt / truth))
    return np.array(result).T


def top(bunch, axis):
    """Largest closed-form field on an axis by scipy's bounded search between neighbours of the best of many places."""
    edge = bunch.extent(axis) or 2.0 * bunch.sigma[axis]
    places = np.append(np.linspace(0.02, 2.0, 100), 1.0) * edge
    field = closed_axis_field(bunch, axis, places)
    if field is None:
        return None
    best, step = places[np.argmax(np.abs(field))], places[1] - places[0]

    def depth(z):
        return -abs(closed_axis_field(bunch, axis, np.array([z]))[0])

    search = minimize_scalar(depth, bounds=(best - step, best + step), method="bounded", options={"xatol": 1e-9 * edge})
    return max(-search.fun, -depth(edge))


def every_case():
    yield from ((name, *case) for name in BUNCHES for case in CASES)
    yield from ((name, 1.0, section) for name in BEAMS for section in (1.0, 10.0))


@pytest.mark.parametrize("name", BUNCHES)
def test_bunches(name):
    """Closed form, on the axes where there is one."""
    assert max(errors(name, *case)[0].max() for case in CASES) < GOOD


@pytest.mark.parametrize("name", BEAMS)
def test_coasting_beams(name):
    """Closed form."""
    assert max(errors(name, 1.0, section)[0].max() for section in (1.0, 10.0)) < GOOD


def test_doubts_are_honest():
    """They cover nine errors in ten, and are rarely a hundred times too large."""
    covered, not_scared = honest(*np.concatenate([errors(*case) for case in every_case()], axis=1))
    assert covered >= COVERED
    assert not_scared >= NOT_SCARED


def test_round_gaussian_beam():
    """From memory of CERN-2006-002: 0.45126 lambda / (2 pi eps0 sigma) is the peak of a long round Gaussian beam."""
    printed, eps0 = 2e-5, 8.8541878188e-12
    bunch, findings = found("gaussian beam", 1.0, 1.0)
    wanted = 0.45126 * bunch.line_density * ELEMENTARY_CHARGE / (2.0 * np.pi * eps0 * bunch.sigma[0])
    assert findings["peak_field_x"].value == pytest.approx(wanted, rel=printed, abs=0.0)
    assert "peak_field_z" not in findings


@pytest.mark.parametrize("name", ["gaussian", "kv x parabolic"])
def test_kicks_and_energy_are_the_field_in_other_words(name):
    """Closed form: abs(q E) / (gamma^3 m beta^2 c^2) across, abs(q E) along, with the same doubts."""
    bunch, findings = found(name, 1.0, 3.0)
    rounding = 1e-14
    bend = ELEMENTARY_CHARGE / (bunch.gamma * bunch.species.mass * (bunch.beta_gamma * SPEED_OF_LIGHT) ** 2)
    for axis in "xy":
        field, kick = findings[f"peak_field_{axis}"], findings[f"peak_kick_{axis}"]
        assert kick.value == pytest.approx(bend * field.value, rel=rounding, abs=0.0)
        assert kick.doubt == pytest.approx(bend * field.doubt, rel=rounding, abs=0.0)
    field, change = findings["peak_field_z"], findings["peak_energy_change_z"]
    assert change.value == pytest.approx(field.value, rel=rounding, abs=0.0)  # one elementary charge: V/m is eV/m
    assert change.doubt == pytest.approx(field.doubt, rel=rounding, abs=0.0)
