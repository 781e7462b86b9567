"""Synchrotron motion under space charge: signs, domains, and the numbers of one ring by hand."""

from dataclasses import replace
from math import log, pi, sqrt

import pytest

from beamfield.beam.rf import Rf
from beamfield.beam.ring import Ring
from beamfield.beam.surroundings import Chamber, Surroundings
from beamfield.constants import COULOMB
from beamfield.errors import NonsenseError
from beamfield.estimate.synchrotron_motion import synchrotron_motion
from tests.estimate.made_bunches import GAMMA, WIDTH, made
from tests.estimate.test_longitudinal import CLOSED, DEFAULT

BELOW, ABOVE = Rf(5e3, 4, 6.0), Rf(5e3, 4, 2.0)
PIPE = Surroundings(Chamber("round", 6.0 * WIDTH, 6.0 * WIDTH))
NAMES = {"synchrotron_tune", "synchrotron_tune_shift", "bunch_lengthening"}
STABILITY = {"impedance_threshold", "impedance_threshold_ratio"}


def found(bunch, rf=BELOW, surroundings=PIPE, numerics=CLOSED):
    ring = Ring.smooth(100.0, (4.2, 4.3), rf=rf)
    return {finding.name: finding for finding in synchrotron_motion(bunch, surroundings, ring, numerics)}


def long_bunch(**changes):
    return made("kv x parabolic", 3e3, momentum_spread=1e-3, **changes)


@pytest.mark.large
def test_by_hand():
    """Closed form: long parabolic bunch, r = g 3 N q / (8 pi eps0 gamma^2 l^3) C^2 / (2 pi h V), l its half length."""
    bunch = long_bunch()
    factor = 1.0 + 2.0 * log(3.0)
    slope = factor * COULOMB * 1.5 * bunch.charge / (GAMMA**2 * bunch.extent(2) ** 3)
    share = slope * 100.0**2 / (2.0 * pi * 4 * 5e3)
    for numerics in (DEFAULT, CLOSED):
        results = found(bunch, numerics=numerics)
        assert results["synchrotron_tune_shift"].value == pytest.approx(sqrt(1.0 - share) - 1.0, rel=1e-4)
        assert results["bunch_lengthening"].value == pytest.approx((1.0 - share) ** -0.25 - 1.0, rel=1e-2)


def test_transition_turns_the_signs():
    """Textbook: below transition space charge weakens the focusing, above it adds to it."""
    below, above = found(long_bunch()), found(long_bunch(), ABOVE)
    assert below["synchrotron_tune_shift"].value < 0.0 < below["bunch_lengthening"].value
    assert above["bunch_lengthening"].value < 0.0 < above["synchrotron_tune_shift"].value
    assert all(finding.valid for finding in (*below.values(), *above.values()))
    assert any("below transition" in remark for remark in below["impedance_threshold_ratio"].remarks)
    assert not above["impedance_threshold_ratio"].remarks


def test_sign_of_the_charge_does_not_matter():
    """Symmetry: protons and antiprotons."""
    one, other = found(long_bunch()), found(long_bunch(species="antiproton"))
    assert {name: finding.value for name, finding in one.items()} == {n: f.value for n, f in other.items()}


def test_no_bucket_and_transition_say_so():
    crowded = found(replace(long_bunch(), particles=1e18))["synchrotron_tune_shift"]
    assert crowded.value == -1.0
    assert not crowded.valid
    assert "no bucket" in crowded.remarks[-1]
    frozen = found(long_bunch(), Rf(5e3, 4, GAMMA))
    assert not any(finding.valid for finding in frozen.values())


def test_what_does_not_apply_is_absent():
    assert set(found(long_bunch())) == NAMES | STABILITY
    assert set(found(replace(long_bunch(), momentum_spread=None))) == NAMES
    assert set(found(made("kv beam", momentum_spread=1e-3))) == STABILITY
    assert found(long_bunch(), None) == {}


def test_ratio_is_one_over_the_other():
    """Closed form: the catalogue's own definition, for a coasting beam, with Z/n = g Z0 / (2 beta gamma^2)."""
    beam = made("kv beam", momentum_spread=1e-3)
    results = found(beam)
    impedance = (1.0 + 2.0 * log(3.0)) * 376.730313 / (2.0 * beam.beta * GAMMA**2)
    ratio = impedance / results["impedance_threshold"].value
    assert results["impedance_threshold_ratio"].value == pytest.approx(ratio, rel=1e-7)


@pytest.mark.parametrize("parts", [(0.0, 1, 4.0), (1e3, 0, 4.0), (1e3, 1, float("nan"))])
def test_nonsense(parts):
    with pytest.raises(NonsenseError):
        Rf(*parts)
