"""Direct tune shifts: the sum of charges against formulas of the trade and published scalings."""

from dataclasses import replace
from functools import cache
from math import hypot, pi, sqrt

import numpy as np
import pytest

from beamfield.beam.numerics import Numerics
from beamfield.beam.ring import Optics, Ring
from beamfield.beam.surroundings import Surroundings
from beamfield.estimate.tune_shift import tune_shift
from tests.estimate.made_bunches import BUNCHES, honest
from tests.estimate.ring_cases import (
    CIRCUMFERENCE,
    LINE_PEAK,
    TUNE,
    findings,
    gamma_of,
    radius,
    ring_bunch,
    round_gaussian_shift,
    smooth_ring,
)

GOOD = 1e-5
LONG_LIMIT = 1e-5  # what is left of a bunch being finite: about ln(aspect) / aspect^2, 1e-6 here
SAME = 1e-10
EMITTANCE = 2.5e-6
NOTHING_AROUND = Surroundings()
LENGTHS = (1e-4, 1e-2, 1.0, 100.0, 1e4)  # m rms


def bunching_factor(bunch):
    peak = bunch.particles * LINE_PEAK[bunch.shape.longitudinal] / bunch.sigma[2]
    return bunch.particles / (CIRCUMFERENCE * peak)


def round_in_both(bunch):
    """The same bunch, as round as a ring of tunes 4.2 and 4.3 does not make it."""
    return replace(bunch, sigma=(bunch.sigma[0], bunch.sigma[0], bunch.sigma[2]))


@cache
def shift(bunch, axis="y", ring=None, surroundings=NOTHING_AROUND, **numerics):
    found = tune_shift(bunch, surroundings, ring or smooth_ring(), Numerics(**numerics))
    return {finding.name: finding for finding in found}[f"tune_shift_{axis}"]


@pytest.mark.parametrize("z", [10.0, 1000.0])
def test_round_gaussian_formula(z):
    """From memory of K. Schindl, CERN/PS 99-012 (DI): bunches 10^4 and 10^6 times longer than wide at rest."""
    bunch = round_in_both(ring_bunch(z=z))
    assert bunch.gamma * z / bunch.sigma[0] > 2e3
    wanted = round_gaussian_shift(bunch, EMITTANCE, bunching_factor(bunch))
    assert shift(bunch, "x").value == pytest.approx(wanted, rel=LONG_LIMIT, abs=0.0)


@pytest.mark.parametrize("along", LINE_PEAK)
def test_uniform_is_exactly_half(along):
    """Closed form: at equal rms sizes the axis of a uniform section is half as dense as that of a Gaussian one."""
    full, half = (shift(ring_bunch(shape=(across, along))).value for across in ("gaussian", "kv"))
    assert half / full == pytest.approx(0.5, rel=GOOD, abs=0.0)


@pytest.mark.parametrize("axis, other", [("x", "y"), ("y", "x")])
def test_unequal_emittances(axis, other):
    """Common practice, no source: round formula times 2 / (1 + sigma_other / sigma), sizes from smooth beta = R / Q."""
    emittances = {"x": 6e-6, "y": 1.5e-6}
    bunch = ring_bunch(emittances=tuple(emittances.values()))
    tune = dict(zip("xy", TUNE, strict=True))
    ratio = sqrt(emittances[other] / tune[other] / (emittances[axis] / tune[axis]))
    wanted = round_gaussian_shift(bunch, emittances[axis], bunching_factor(bunch)) * 2.0 / (1.0 + ratio)
    assert shift(bunch, axis).value == pytest.approx(wanted, rel=LONG_LIMIT, abs=0.0)


@pytest.mark.parametrize(
    "energies, factor, printed",
    [((50e6, 160e6), 2.0439, 3e-5), ((1.0e9, 1.4e9), 1.5234, 4e-5), ((200e6, 400e6), 1.741, 4e-4)]
    + [((400e6, 800e6), 1.992, 4e-4)],
)
def test_published_scalings(energies, factor, printed):
    """Injection at a higher energy at fixed brightness and bunching: 50 to 160 MeV "factor 2", CERN-AB-2006-084,
    abstract (seen); the others from memory of laboratory upgrade reports, 1993-2020; digits by beta gamma^2."""
    low, high = (shift(ring_bunch(kinetic=energy)).value for energy in energies)
    assert low / high == pytest.approx(factor, rel=printed, abs=0.0)


def test_electrons_shift_like_positrons():
    """Closed form: q E has the sign of q^2, so that electrons too are defocused: negative shifts, positive kappas."""
    found = {name: findings(ring_bunch(kinetic=1e9, species=name), smooth_ring()) for name in ("electron", "positron")}
    for name, sign in (("tune_shift_y", -1.0), ("defocusing_y", 1.0)):
        assert found["electron"][name].value == found["positron"][name].value
        assert sign * found["electron"][name].value > 0.0
    assert found["electron"]["field_gradient_y"].value == -found["positron"]["field_gradient_y"].value < 0.0


def test_coasting_beam():
    """From memory of Schindl: the round formula with B_f = 1 and all particles in the ring."""
    bunched = round_in_both(ring_bunch())
    beam = replace(
        bunched,
        sigma=(*bunched.sigma[:2], np.inf),
        shape=replace(bunched.shape, longitudinal="coasting"),
        line_density=bunched.particles / CIRCUMFERENCE,
    )
    wanted = round_gaussian_shift(bunched, EMITTANCE, 1.0)
    assert shift(beam, "x").value == pytest.approx(wanted, rel=GOOD, abs=0.0)
    assert shift(beam, "x").closed_form == pytest.approx(wanted, rel=SAME, abs=0.0)


def table(beta_x, beta_y, dispersion, weights):
    places = CIRCUMFERENCE * np.arange(len(weights)) / len(weights)
    columns = (np.array(column, dtype=float) for column in (beta_x, beta_y, dispersion, weights))
    return Ring(CIRCUMFERENCE, TUNE, 1, Optics(places, *columns, "a table"))


def long_shift(bunch, beta, own, other):
    """-r_0 lambda C beta / (2 pi beta^2 gamma^3 own (own + other)): a long Gaussian; sizes and beta in m."""
    peak = bunch.particles * LINE_PEAK["gaussian"] / bunch.sigma[2]
    return -radius() * peak * CIRCUMFERENCE * beta / (2 * pi * bunch.beta**2 * bunch.gamma**3 * own * (own + other))


def test_dispersion_widens():
    """Common practice, no source: sigma_x^2 = emittance beta + (D dp/p)^2, row by row, weakens both shifts."""
    spread, dispersion, betas = 1.5e-3, 2.7, (6.0, 5.5)
    bunch = replace(ring_bunch(), momentum_spread=spread)
    x, y = (sqrt(e * beta) for e, beta in zip(bunch.emittance, betas, strict=True))
    wide = hypot(x, dispersion * spread)
    ring = table([betas[0]] * 2, [betas[1]] * 2, [dispersion, -dispersion], [0.5, 0.5])
    assert wide > 1.1 * x
    assert shift(bunch, "x", ring).value == pytest.approx(long_shift(bunch, betas[0], wide, y), rel=LONG_LIMIT, abs=0.0)
    assert shift(bunch, "y", ring).value == pytest.approx(long_shift(bunch, betas[1], y, wide), rel=LONG_LIMIT, abs=0.0)


def test_table_is_the_weighted_mean():
    """Definition: a table's shift is the mean over its rows, each with its own sizes, by their weights."""
    spread, weights = 1e-3, np.array([0.2, 0.5, 0.3])
    rows = np.array([[3.0, 12.0, 7.0], [11.0, 2.5, 6.0], [0.0, 2.0, -1.0]])
    bunch = replace(ring_bunch(), momentum_spread=spread)
    single = [table(*row[:, None], [1.0]) for row in rows.T]
    for axis, beta in (("x", rows[0]), ("y", rows[1])):
        x, y = np.sqrt(bunch.emittance[0] * rows[0] + (rows[2] * spread) ** 2), np.sqrt(bunch.emittance[1] * rows[1])
        own, other = (x, y) if axis == "x" else (y, x)
        wanted = weights @ [long_shift(bunch, *numbers) for numbers in zip(beta, own, other, strict=True)]
        assert shift(bunch, axis, table(*rows, weights)).value == pytest.approx(wanted, rel=LONG_LIMIT, abs=0.0)
    assert not any(ring.optics.tabulated for ring in single)


def test_equal_rows_are_the_mean_ring():
    """A table that says the same everywhere is the ring of that one row, up to the fewer charges along a table."""
    bunch = ring_bunch()
    betas = [CIRCUMFERENCE / (2.0 * pi * q) for q in TUNE]
    flat = table(*([beta] * 4 for beta in betas), [0.0] * 4, [0.25] * 4)
    assert shift(bunch, "y", flat).value == pytest.approx(shift(bunch, "y").value, rel=GOOD, abs=0.0)


def test_great_shifts_are_marked():
    """More than a tenth of the tune is no small shift: said, and not valid."""
    small, great = shift(ring_bunch(number=1e11)), shift(ring_bunch(number=1e14))
    assert small.valid
    assert not small.remarks
    assert abs(great.value) > 0.1 * TUNE[1]
    assert not great.valid
    assert "first order" in great.remarks[-1]


def test_neutralisation():
    """J. D. Lawson, J. Electron. Control 5, 146 (1958), its abstract: 1 - gamma^2 f of the force is left, and is named."""
    fraction, own = 0.1, shift(ring_bunch(), "x")
    found = shift(ring_bunch(), "x", surroundings=Surroundings(neutralisation=fraction))
    left = 1.0 - gamma_of(160e6) ** 2 * fraction
    for value, whole in ((found.value, own.value), (found.closed_form, own.closed_form), (found.doubt, own.doubt)):
        assert value == pytest.approx(left * whole, rel=SAME, abs=0.0)
    assert "f = 1/gamma^2" in found.remarks[0]


def test_closed_form_road():
    """The textbook's value is the answer, within its doubt of the sum of charges."""
    summed, closed = shift(ring_bunch()), shift(ring_bunch(), method="closed-form")
    assert closed.method == "closed form"
    assert closed.value == summed.closed_form
    assert abs(closed.value / summed.value - 1.0) < GOOD


def test_linear_in_intensity():
    """Closed form: twice the particles, twice the shift."""
    assert shift(ring_bunch(number=7e12)).value == pytest.approx(2.0 * shift(ring_bunch()).value, rel=SAME, abs=0.0)


@cache
def errors(shape, z):
    bunch = replace(ring_bunch(emittances=(7e-6, 2e-6), z=z), shape=shape)
    found = tune_shift(bunch, NOTHING_AROUND, smooth_ring(), Numerics())
    return np.array([[abs(f.value / f.closed_form - 1.0), f.doubt / abs(f.value)] for f in found]).T


def test_every_shape_in_a_ring():
    """Closed form of the slopes, bunches of 0.1 mm to 10 km: pancakes, and needles a million times longer than wide."""
    for shape in BUNCHES.values():
        for z in LENGTHS:
            assert errors(shape, z)[0].max() < GOOD, (shape, z)


def test_doubts_are_honest():
    """They cover nine errors in ten, and are rarely a hundred times too large."""
    covered, not_scared = honest(*np.concatenate([errors(s, z) for s in BUNCHES.values() for z in LENGTHS], 1))
    assert covered >= 0.9
    assert not_scared >= 0.85


def test_gamma_by_hand():
    """The other tests lean on it: 160 MeV protons."""
    assert ring_bunch().gamma == pytest.approx(gamma_of(160e6), rel=1e-14, abs=0.0)
    assert gamma_of(160e6) == pytest.approx(1.0 + 160.0 / 938.27208943, rel=1e-10, abs=0.0)
