"""Opposing bunches: kicks, focusing and tune shifts against printed tables, closed forms and plain sums of charges."""

from dataclasses import replace
from math import inf, sqrt

import numpy as np
import pytest

from beamfield.beam.bunch import Bunch
from beamfield.beam.encounter import Encounter
from beamfield.beam.numerics import Numerics
from beamfield.beam.shape import SHAPES, Shape
from beamfield.beam.species_table import named
from beamfield.beam.surroundings import Surroundings
from beamfield.constants import ELEMENTARY_CHARGE, SPEED_OF_LIGHT
from beamfield.estimate.encounter_force import encounter_force
from beamfield.estimate.superposition import superpose
from beamfield.laws.beam_beam import beam_beam_parameter, force_over_electric, passage_kick
from tests.estimate.made_bunches import made
from tests.reference.published_colliders import COLLIDERS

COARSE = Numerics(charges_per_probe=8192)
GOOD = 1e-4  # of the coarse sum, sections to 5 : 1


def relativistic(species, energy, particles, sigma, shape="gaussian"):
    kind = named(species)
    gamma = energy * ELEMENTARY_CHARGE / kind.rest_energy
    return Bunch(kind, sqrt((gamma - 1.0) * (gamma + 1.0)), particles, sigma, SHAPES[shape])


def found(bunch, encounter, numerics=COARSE):
    return {f.name: f for f in encounter_force(bunch, Surroundings(encounter=encounter), None, numerics)}


@pytest.mark.parametrize("name", COLLIDERS)
def test_published_parameters(name):
    """From memory of the tables in tests/reference: the superposed tune shift is the printed parameter."""
    case = COLLIDERS[name]
    own = relativistic(case.species, case.energy, 1e10, case.sigma)
    other = relativistic(case.other, case.other_energy, case.particles, case.sigma)
    findings = found(own, Encounter(other, beta=case.beta))
    for axis, printed in zip("xy", case.xi):
        if printed is not None:
            assert findings[f"beam_beam_tune_shift_{axis}"].value == pytest.approx(printed, rel=case.digit, abs=0.0)


@pytest.mark.parametrize("section", [1.0, 5.0, 0.2])
@pytest.mark.parametrize("aspect", [1e-2, 1.0, 1e4])
def test_textbook_parameter(aspect, section):
    """Closed form: N r beta / (2 pi gamma sigma (sigma + sigma')) of fast bunches, whatever their length."""
    own, other = (made("gaussian", aspect, section, gamma=1e4, species=kind) for kind in ("proton", "antiproton"))
    findings = found(own, Encounter(other, beta=(2.0, 3.0)))
    slow = 1e-8  # 1 - beta
    for axis, name in enumerate("xy"):
        sigma = other.sigma[axis], other.sigma[1 - axis]
        radius = own.species.classical_radius
        xi = beam_beam_parameter(other.particles, radius, (2.0, 3.0)[axis], own.gamma, *sigma)
        finding = findings[f"beam_beam_tune_shift_{name}"]
        assert finding.closed_form == pytest.approx(xi, rel=slow)
        assert finding.value == pytest.approx(xi, rel=GOOD)
        assert abs(finding.value - xi) <= finding.doubt + 1e-9 * xi


@pytest.mark.parametrize("name", ["uniform-cylinder", "uniform-ellipsoid", "parabolic-ellipsoid", "kv x gaussian"])
def test_other_shapes(name):
    """Closed form: the slope in the middle of a long beam of the same section; and the doubt covers the difference."""
    own, other = made(name, 1.0, 2.0), made(name, 3.0, 2.0, gamma=5.0)
    findings = found(own, Encounter(other))
    for axis in "xy":
        finding = findings[f"encounter_focusing_{axis}"]
        assert finding.value < 0.0
        assert finding.value == pytest.approx(finding.closed_form, rel=1e-4)
        assert "beam_beam_tune_shift_x" not in findings


@pytest.mark.parametrize("offset", [(1e-3, 0.0, 0.0), (1e-3, -3e-3, 0.2), (2e-2, 1e-2, 0.0)])
def test_aside_against_bassetti_and_erskine(offset):
    """Closed form, written here once more: Bassetti and Erskine, CERN-ISR-TH/80-06 (from memory), by mpmath."""
    mpmath = pytest.importorskip("mpmath")
    own, other = made("gaussian", 1.0, 4.0), made("gaussian", 10.0, 4.0, gamma=50.0)

    def field(x, y):
        a, b = other.sigma[:2]
        root = mpmath.sqrt(2 * (a * a - b * b))

        def w(z):
            return mpmath.exp(-z * z) * mpmath.erfc(-1j * z)

        x, y, signs = abs(x), abs(y), (mpmath.sign(x), mpmath.sign(y))
        damping = mpmath.exp(-x * x / (2 * a * a) - y * y / (2 * b * b))
        value = w((x + 1j * y) / root) - damping * w((x * b / a + 1j * y * a / b) / root)
        scale = other.charge * 8.9875517862e9 * 2 * mpmath.sqrt(mpmath.pi) / root
        return scale * value.imag * signs[0], scale * value.real * signs[1]

    bend = passage_kick(1.0, own.species.charge, own.species.mass, own.beta_gamma, other.beta_gamma)
    findings = found(own, Encounter(other, offset=offset), Numerics())
    far = 1e-3 if max(abs(place) / size for place, size in zip(offset[:2], other.sigma)) > 5.0 else GOOD
    for axis, wanted in zip("xy", field(-offset[0], -offset[1])):
        value = findings[f"encounter_kick_{axis}"].value
        assert value == pytest.approx(float(bend * wanted), rel=far, abs=1e-4 * abs(findings["encounter_kick_x"].value))


def test_force_of_moving_charges():
    """Closed form: q (E + v x B) of real charges by the direct sum; opposing, 1 + beta_1 beta_2 of q E."""
    place, own = np.array([[1e-3], [0.0], [2e-4]]), 1.7
    for other in (0.8, 1.7, -0.8, -1.7, -40.0):
        field = superpose(place, np.zeros((3, 1)), 1e-12, np.array([0.0, 0.0, other]))
        speed = own / np.hypot(1.0, own) * SPEED_OF_LIGHT
        force = field.E[0, 0] - speed * field.B[1, 0]
        assert force / field.E[0, 0] == pytest.approx(force_over_electric(own, other), rel=1e-13)


def test_nearly_equal_speeds_keep_their_digits():
    """Closed form: 1 / gamma^2 of equal ones, to the last digits at gamma = 10^6; 2 opposing."""
    fast = sqrt((1e6 - 1.0) * (1e6 + 1.0))
    assert force_over_electric(fast, fast) == pytest.approx(1e-12, rel=1e-14, abs=0.0)
    assert force_over_electric(fast, -fast) == pytest.approx(2.0, rel=1e-11)


def test_passage_is_the_passage_of_charges():
    """Naive twin: momentum gained on a straight path past sampled charges, step by step in time, q (E + v x B)."""
    own, other = made("gaussian", 1.0, 1.0, gamma=1.3), made("gaussian", 1.0, 1.0, gamma=1.7)
    offset = (4e-3, 1e-3, 0.0)
    grid = np.random.default_rng(1).normal(size=(3, 20000))
    cloud = np.concatenate([grid, -grid], axis=1) * np.array(other.sigma)[:, None]
    scale = 0.02
    t, w = np.polynomial.legendre.leggauss(120)
    times = scale * np.sinh(12.0 * t) / np.sinh(12.0) * 1e3 / SPEED_OF_LIGHT
    steps = w * 12.0 * scale * np.cosh(12.0 * t) / np.sinh(12.0) * 1e3 / SPEED_OF_LIGHT
    where = np.stack(
        [np.full(120, -offset[0]), np.full(120, -offset[1]), (own.beta + other.beta) * SPEED_OF_LIGHT * times]
    )
    charge = other.charge / cloud.shape[1]
    field = superpose(where, cloud, charge, np.array([0.0, 0.0, -other.beta_gamma]), cloud=2e-4)
    push = own.species.charge * (field.E[:2] + own.velocity * np.array([-field.B[1], field.B[0]])) @ steps
    slope = push / (own.beta_gamma * own.species.mass * SPEED_OF_LIGHT)
    sampled = 0.02
    findings = found(own, Encounter(other, offset=offset))
    for axis, wanted in zip("xy", slope):
        assert findings[f"encounter_kick_{axis}"].value == pytest.approx(wanted, rel=sampled, abs=0.0)


def test_roles_are_symmetric():
    """Newton's third law of the passage as a whole: equal bunches kick each other alike and oppositely."""
    a, b = made("gaussian", 2.0, 1.0), made("gaussian", 2.0, 1.0)
    one = found(a, Encounter(b, offset=(1e-3, 2e-3, 0.0)))
    two = found(b, Encounter(a, offset=(-1e-3, -2e-3, 0.0)))
    rounding = 1e-9
    for axis in "xy":
        name = f"encounter_kick_{axis}"
        assert one[name].value == pytest.approx(-two[name].value, rel=rounding, abs=0.0)
        focusing = f"encounter_focusing_{axis}"
        assert one[focusing].value == pytest.approx(two[focusing].value, rel=rounding, abs=0.0)


def test_a_bunch_that_goes_the_same_way():
    """Closed form: equal ones exert 1 / gamma^2 of the electric slope, and never pass."""
    bunch = made("gaussian", 1.0, 1.0, gamma=7.0)
    findings = found(bunch, Encounter(bunch, "same"))
    assert set(findings) == {"encounter_gradient_x", "encounter_gradient_y"}
    opposing = found(bunch, Encounter(bunch))["encounter_gradient_x"].value
    weaker = (1.0 - bunch.beta**2) / (1.0 + bunch.beta**2)
    assert findings["encounter_gradient_x"].value == pytest.approx(weaker * opposing, rel=1e-12)


def test_what_is_said_of_strong_and_long_encounters():
    own = made("gaussian", 1e3, 1.0)
    long, strong = made("gaussian", 1e3, 1.0), replace(made("gaussian", 1e3, 1.0), particles=1e16)
    hourglass = found(own, Encounter(long, beta=(0.01, 0.01)))["beam_beam_tune_shift_x"]
    assert not hourglass.valid
    assert "sizes change" in hourglass.remarks[0]
    disrupted = found(own, Encounter(strong))["encounter_focusing_x"]
    assert not disrupted.valid
    assert "focal lengths" in disrupted.remarks[0]
    assert found(own, Encounter(long, beta=(10.0, 10.0)))["beam_beam_tune_shift_x"].valid


def test_closed_form_road():
    own, other = made("gaussian", 1.0), made("gaussian", 1.0, species="electron")
    findings = found(own, Encounter(other, beta=(1.0, 1.0)), replace(COARSE, method="closed-form"))
    assert {finding.method for finding in findings.values()} == {"closed form"}
    assert all(finding.value == finding.closed_form for finding in findings.values())


@pytest.mark.parametrize(
    "changes",
    [{"direction": "aside"}, {"offset": (inf, 0.0, 0.0)}, {"beta": (0.0, 1.0)}, {"other": "coasting"}],
)
def test_no_such_encounter(changes):
    other = made("gaussian beam") if changes.pop("other", None) else made("gaussian")
    with pytest.raises(ValueError, match=r"no |never"):
        Encounter(other, **changes)


def test_shape_of_an_axis():
    """Closed form: density on the axis of an ellipsoid seen along z over that of a uniform ellipse of equal rms."""
    from beamfield.estimate.passage import closed_strengths

    for name, ratio in (("uniform-ellipsoid", 1.2), ("parabolic-ellipsoid", 10.0 / 7.0)):
        bunch = made(name, 1.0, 1.0)
        uniform = replace(bunch, shape=Shape("kv", "uniform"))
        mine, theirs = (closed_strengths(Encounter(b))[2] for b in (bunch, uniform))
        assert mine / theirs == pytest.approx(ratio, rel=1e-14)
