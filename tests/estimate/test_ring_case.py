"""Every result of a plain ring case against a formula written out here: constants typed anew, nothing of laws/ used."""

from dataclasses import replace
from functools import cache
from math import inf, pi, sqrt

import pytest

from beamfield.beam.bunch import Bunch
from beamfield.beam.shape import SHAPES, Shape
from beamfield.beam.species import Species
from beamfield.beam.species_table import isotope, named
from beamfield.beam.surroundings import Surroundings
from beamfield.estimate.answer import checks
from beamfield.estimate.catalogue import CATALOGUE
from beamfield.estimate.self_force import self_force
from tests.estimate.made_bunches import BEAMS, BUNCHES, DEFAULT, made
from tests.estimate.ring_cases import (
    CIRCUMFERENCE,
    EPS0,
    MASSES,
    TUNE,
    C,
    E,
    findings,
    gamma_of,
    radius,
    ring_bunch,
    round_gaussian_shift,
    smooth_ring,
)

ROUNDING = 1e-12
LONG_LIMIT = 1e-5  # the bunch is 10^4 times longer than wide in its own frame, the sum of charges good to 1e-6
N, Z, KINETIC, EMITTANCE = 3.5e12, 10.0, 160e6, 2.5e-6
MASS = MASSES["proton"]
NEEDED = ("ring", "emittance")


@cache
def plain():
    """A round proton bunch of 160 MeV: equal emittances and equal sizes, in two bunches round the ring."""
    bunch = ring_bunch(KINETIC, (EMITTANCE, EMITTANCE), z=Z, number=N)
    bunch = replace(bunch, sigma=(bunch.sigma[0], bunch.sigma[0], Z))
    return bunch, findings(bunch, smooth_ring(bunches=2))


def by_hand():
    """{name: (value, tolerance)} of the plain case."""
    gamma = gamma_of(KINETIC)
    momentum = sqrt(gamma * gamma - 1.0)
    beta = momentum / gamma
    size = sqrt(EMITTANCE / momentum * CIRCUMFERENCE / (2.0 * pi * TUNE[0]))
    line = N / (sqrt(2.0 * pi) * Z)
    current = E * line * beta * C
    bend = E / (gamma * MASS * (momentum * C) ** 2)
    slope = E * line / (4.0 * pi * EPS0 * size**2)  # lab, long round Gaussian: rho / (2 eps0)
    peak = 0.451256 * E * line / (2.0 * pi * EPS0 * size)
    density = N / ((2.0 * pi) ** 1.5 * size**2 * Z)
    defocusing = bend * slope
    geometric = EMITTANCE / momentum
    exact = {
        "gamma": gamma,
        "beta": beta,
        "momentum": momentum * MASS * C * C / E,
        "rigidity": momentum * MASS * C / E,
        "particles": N,
        "bunch_charge": N * E,
        "peak_current": current,
        "peak_line_density": line,
        "bunching_factor": 2.0 * N / CIRCUMFERENCE / line,
        "perveance": 2.0 * current / (4.0 * pi * EPS0 * MASS * C**3 / E) / momentum**3,
        "memory_length_transverse": momentum * 2.0 * size,
        "memory_length_longitudinal": beta / (1.0 - beta) * 4.0 * Z,
    }
    summed = {
        "field_gradient_x": slope,
        "field_gradient_y": slope,
        "defocusing_x": defocusing,
        "defocusing_y": defocusing,
        "peak_field_x": peak,
        "peak_field_y": peak,
        "peak_kick_x": bend * peak,
        "peak_kick_y": bend * peak,
        "plasma_wavelength": 2.0 * pi / sqrt(E * density * bend / EPS0),
        "tune_shift_x": -defocusing * CIRCUMFERENCE**2 / (2.0 * pi * TUNE[0]) / (4.0 * pi),
        "tune_shift_y": -defocusing * CIRCUMFERENCE**2 / (2.0 * pi * TUNE[1]) / (4.0 * pi),
        # the mean of r E over a round Gaussian is lambda / (4 pi eps0), the mean line density the peak over sqrt 2
        "space_charge_ratio_x": size**2 * bend * E * line / sqrt(2.0) / (8.0 * pi * EPS0) / geometric**2,
        "space_charge_ratio_y": size**2 * bend * E * line / sqrt(2.0) / (8.0 * pi * EPS0) / geometric**2,
    }
    wide = {"space_charge_ratio_x": 1e-4, "space_charge_ratio_y": 1e-4}
    return {name: (value, ROUNDING) for name, value in exact.items()} | {
        name: (value, wide.get(name, LONG_LIMIT)) for name, value in summed.items()
    }


@pytest.mark.parametrize("name", by_hand())
def test_by_hand(name):
    """Closed form, definitions of the interface; round long Gaussian formulas, common practice, no source."""
    wanted, tolerance = by_hand()[name]
    assert plain()[1][name].value == pytest.approx(wanted, rel=tolerance, abs=0.0)


def test_every_result_is_there_once():
    """In the order of the catalogue; what is along z a long bunch hardly has: small as 1 / length^2."""
    found = plain()[1]
    along = {"field_gradient_z", "defocusing_z", "peak_field_z", "peak_energy_change_z"}
    assert along | set(by_hand()) <= set(found)
    assert list(found) == [name for name in CATALOGUE if name in found]
    assert all(finding.name == name for name, finding in found.items())
    assert 0.0 < found["field_gradient_z"].value < 1e-5 * found["field_gradient_x"].value


def test_tune_shift_formula():
    """From memory of K. Schindl, CERN/PS 99-012 (DI): the formula of the trade, with beta = R / Q of its plane."""
    bunch, found = plain()
    factor = sqrt(2.0 * pi) * Z / CIRCUMFERENCE  # of one bunch alone: N here is per bunch
    wanted = round_gaussian_shift(bunch, EMITTANCE, factor)
    assert found["tune_shift_x"].value == pytest.approx(wanted, rel=LONG_LIMIT, abs=0.0)


def test_laws_and_charges_agree_everywhere():
    """Each value is within ten doubts of the textbook's, and within a ten-thousandth."""
    for found in plain()[1].values():
        if found.closed_form is not None:
            assert abs(found.value - found.closed_form) <= 10.0 * found.doubt, found
            assert abs(found.value / found.closed_form - 1.0) < 1e-4, found


def test_definitions_have_no_doubt():
    for name in ("gamma", "beta", "momentum", "rigidity", "particles", "peak_current", "bunching_factor", "perveance"):
        assert plain()[1][name].doubt == 0.0
        assert plain()[1][name].valid


@pytest.mark.parametrize("along, peak", [("uniform", 0.5 / sqrt(3.0)), ("parabolic", 0.75 / sqrt(5.0))])
def test_peak_line_density(along, peak):
    """Closed form: a uniform line is 2 sqrt 3 rms long; a parabolic one sqrt 5 rms to its end, 3/2 of its mean."""
    found = findings(ring_bunch(shape=("gaussian", along), z=Z), smooth_ring(), method="closed-form")
    assert found["peak_line_density"].value == pytest.approx(N * peak / Z, rel=ROUNDING, abs=0.0)
    assert found["bunching_factor"].value == pytest.approx(Z / peak / CIRCUMFERENCE, rel=ROUNDING, abs=0.0)


def test_electrons():
    """Interface: charge and gradients are signed, negative for electrons; strengths, currents and kicks are not."""
    found = findings(ring_bunch(1e9, species="electron"), smooth_ring())
    negative = {name for name, finding in found.items() if finding.value < 0.0}
    assert negative == {
        *("bunch_charge", "tune_shift_x", "tune_shift_y"),
        *("field_gradient_x", "field_gradient_y", "field_gradient_z"),
    }


def test_characteristic_currents():
    """Printed "about 17 kA" for electrons in many texts (seen); 31.30 MA for protons from memory of M. Reiser,
    Theory and Design of Charged Particle Beams, 1994."""
    for name, printed, digits in (("electron", 17.045e3, 1e-5), ("proton", 31.30e6, 2e-4)):
        assert named(name).characteristic_current == pytest.approx(printed, rel=digits, abs=0.0)


@pytest.mark.parametrize("kind, constant", [(named("electron"), 1.51536e4), (isotope("Ar-40", 8), 6.4934e5)])
def test_slow_perveance(kind, constant):
    """From memory of Reiser, sec. 4.2: K = 1.515e4 I / V^1.5 of electrons, 6.49e5 sqrt(A / Z) I / V^1.5 of ions, A in
    proton masses, for a slow coasting beam; digits recomputed."""
    volts, line = 10.0, 1e9
    kinetic = abs(kind.charge) * volts / (kind.mass * C * C)
    momentum = sqrt(kinetic * (2.0 + kinetic))
    found = findings(Bunch(kind, momentum, None, (1e-3, 1e-3, inf), Shape("kv", "coasting"), line_density=line))
    current = abs(kind.charge) * line * C * momentum / sqrt(1.0 + momentum**2)
    ratio = kind.mass / MASS / (kind.charge / E) if kind.charge > 0.0 else 1.0
    printed = 4e-5  # relativity of electrons of 10 eV: 2e-5
    assert found["perveance"].value == pytest.approx(
        constant * sqrt(ratio) * current / volts**1.5, rel=printed, abs=0.0
    )


def test_neutralised_perveance():
    """J. D. Lawson, J. Electron. Control 5, 146 (1958), its abstract: a fraction 1 / gamma^2 undoes the self-force."""
    bunch, found = plain()
    for fraction, left in ((0.0, 1.0), (0.5 / bunch.gamma**2, 0.5), (2.0 / bunch.gamma**2, -1.0)):
        value = findings(bunch, None, Surroundings(neutralisation=fraction), method="closed-form")["perveance"].value
        assert value == pytest.approx(left * found["perveance"].value, rel=ROUNDING, abs=0.0)


def test_perveance_wants_a_long_beam():
    """A bunch shorter than ten times its width is no long beam: said, and not valid."""
    for aspect, valid in ((9.9, False), (10.1, True)):
        finding = findings(made("gaussian", aspect), method="closed-form")["perveance"]
        assert finding.valid is valid
        assert bool(finding.remarks) is not valid


def test_coasting_beam():
    """What is along a bunch is absent of a beam without ends; its bunching factor is 1; its current e lambda v."""
    line = 2e10
    found = findings(replace(made("gaussian beam"), particles=line * CIRCUMFERENCE, line_density=line), smooth_ring())
    assert not [name for name in found if name.endswith("_z") or name == "memory_length_longitudinal"]
    assert found["bunching_factor"].value == 1.0
    beta = found["beta"].value
    assert found["peak_current"].value == pytest.approx(E * line * beta * C, rel=ROUNDING, abs=0.0)
    assert found["bunch_charge"].value == pytest.approx(E * line * CIRCUMFERENCE, rel=ROUNDING, abs=0.0)


def test_unknown_number_of_a_coasting_beam():
    """Nobody said how many: neither particles nor charge."""
    found = findings(made("gaussian beam"))
    assert not {"particles", "bunch_charge"} & set(found)
    assert found["peak_current"].value > 0.0


def test_overlapping_bunches():
    """More charge round the ring than the peak allows: no bunched beam, said, and not valid."""
    bunch = ring_bunch(z=Z)
    fitting, overlapping = (findings(bunch, smooth_ring(n), method="closed-form")["bunching_factor"] for n in (6, 7))
    assert sqrt(2.0 * pi) * Z * 6 < CIRCUMFERENCE < sqrt(2.0 * pi) * Z * 7
    assert fitting.valid
    assert fitting.value < 1.0
    assert overlapping.value > 1.0
    assert not overlapping.valid
    assert "overlap" in overlapping.remarks[-1]


def test_absent_without_ring_or_emittance():
    """Interface: a result that does not apply is absent, never zero."""
    everything = set(plain()[1])
    ring_results, ratios = ({name for name in everything if need in CATALOGUE[name].needs} for need in NEEDED)
    assert {"bunching_factor", "tune_shift_x", "tune_shift_y"} <= ring_results
    assert ratios == {"space_charge_ratio_x", "space_charge_ratio_y"}
    assert set(findings(plain()[0], method="closed-form")) == everything - ring_results
    bare = replace(plain()[0], emittance=None)
    assert set(findings(bare, smooth_ring(), method="closed-form")) == everything - ratios


@pytest.mark.parametrize("name", ["gaussian", "parabolic x uniform", "gaussian beam"])
def test_closed_form_road(name):
    """The textbook where it has an answer, the sum of charges where it has none: each says which, each has a doubt."""
    road = findings(made(name), method="closed-form")
    for found in road.values():
        if found.method == "closed form" and found.name != "perveance":
            assert found.value == found.closed_form
            assert 0.0 < found.doubt < 1e-6 * abs(found.value)
        elif found.method != "definition" and found.name != "perveance":
            assert found.method.startswith("superposition")
            assert found.closed_form is None
    has_field_law = name != "parabolic x uniform"
    assert (road["peak_field_x"].method == "closed form") is has_field_law
    assert road["field_gradient_x"].method == "closed form"


@pytest.mark.parametrize("name", [*BUNCHES, *BEAMS])
def test_self_check(name):
    """Gauss's law, by the sum of charges alone: holds as it stands, and notices one part in ten thousand."""
    bunch = made(name, 3.0, 2.0)
    found = {finding.name: finding for finding in self_force(bunch, Surroundings(), None, DEFAULT)}
    ((sentence, passed),) = checks(bunch, found)
    assert passed, sentence
    slope = found["field_gradient_y"]
    assert not checks(bunch, found | {slope.name: replace(slope, value=1.0001 * slope.value)})[0][1]


def test_plasma_wavelength_of_a_uniform_sphere():
    """Closed form: omega_p^2 = n e^2 / (eps0 m) in the rest frame; the bunch goes beta gamma c meanwhile."""
    bunch = made("uniform-ellipsoid")
    at_rest = [bunch.sigma[0], bunch.sigma[1], bunch.gamma * bunch.sigma[2]]
    density = 1e10 / (4.0 / 3.0 * pi * 5.0**1.5 * at_rest[0] * at_rest[1] * at_rest[2])
    wanted = 2.0 * pi * bunch.beta_gamma * C / sqrt(density * E * E / (EPS0 * MASS))
    good = 1e-9
    assert findings(bunch)["plasma_wavelength"].value == pytest.approx(wanted, rel=good, abs=0.0)


def test_memory_is_marked_in_a_ring():
    """A past longer than the radius of the ring was not straight."""
    fast = replace(ring_bunch(), beta_gamma=1e7)
    for bunch, marked in ((fast, True), (ring_bunch(), False)):
        found = findings(bunch, smooth_ring(), method="closed-form")["memory_length_transverse"]
        assert bool(found.remarks) is marked


def test_edges_rule_the_memory():
    """Interface: half extent and full length where there is an edge, 2 rms and 4 rms where there is none."""
    for shape, across, along in ((SHAPES["uniform-ellipsoid"], sqrt(5), 2 * sqrt(5)), (SHAPES["gaussian"], 2.0, 4.0)):
        bunch = replace(made("gaussian", 1.0, 3.0), shape=shape)
        found = findings(bunch, method="closed-form")
        wanted = bunch.beta_gamma * across * bunch.sigma[0]
        assert found["memory_length_transverse"].value == pytest.approx(wanted, rel=ROUNDING, abs=0.0)
        wanted = bunch.beta / (1.0 - bunch.beta) * along * bunch.sigma[2]
        assert found["memory_length_longitudinal"].value == pytest.approx(wanted, rel=ROUNDING, abs=0.0)


def test_ions_have_the_radius_of_their_charge():
    """Closed form: Z^2 / A, and the mass in the denominator of everything."""
    light, heavy = Species("light", MASS, E), Species("heavy", 40.0 * MASS, 8.0 * E)
    assert heavy.classical_radius == pytest.approx(1.6 * light.classical_radius, rel=ROUNDING, abs=0.0)
    assert light.classical_radius == pytest.approx(radius(), rel=ROUNDING, abs=0.0)
    few, many = (
        findings(replace(ring_bunch(), species=kind), smooth_ring(), method="closed-form")["tune_shift_y"].value
        for kind in (light, heavy)
    )
    assert many == pytest.approx(1.6 * few, rel=ROUNDING, abs=0.0)
