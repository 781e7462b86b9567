"""Slopes at the centre of the bunch: the sum of charges against the textbook, and the stencil that draws them."""

import numpy as np
import pytest

from beamfield.estimate.centre import peak_place, slopes, smooth_slopes
from tests.estimate.made_bunches import ASPECTS, BEAMS, BUNCHES, honest, slope_errors

SECTIONS = (1.0, 10.0)
GOOD = 1e-5
COVERED, NOT_SCARED = 0.9, 0.85


def every_case():
    yield from ((name, aspect, section) for name in BUNCHES for aspect in ASPECTS for section in SECTIONS)
    yield from ((name, 1.0, section) for name in BEAMS for section in SECTIONS)


@pytest.mark.parametrize("name", BUNCHES)
def test_bunches(name):
    """Closed form, every aspect from pancakes to bunches of a ring, every section, all three directions."""
    worst = max(ASPECTS, key=lambda aspect: max(max(slope_errors(name, aspect, s)[0]) for s in SECTIONS))
    assert max(max(slope_errors(name, worst, section)[0]) for section in SECTIONS) < GOOD, worst


@pytest.mark.parametrize("name", BEAMS)
def test_coasting_beams(name):
    """Closed form."""
    assert max(max(slope_errors(name, 1.0, section)[0]) for section in SECTIONS) < GOOD


def test_doubts_are_honest():
    """They cover nine errors in ten, and are rarely a hundred times too large."""
    covered, not_scared = honest(*np.concatenate([np.array(slope_errors(*case)).T for case in every_case()]).T)
    assert covered >= COVERED
    assert not_scared >= NOT_SCARED


def test_slopes_of_a_polynomial():
    """Closed form: five places are exact for odd powers to the ninth, four, which judge them, to the seventh."""
    sigma, rounding = (1e-3, 2e-3, 5.0), 1e-12

    def field(points, ninth=0.0):
        t = points / np.array(sigma)[:, None]
        return np.array([[3.0], [-2.0], [0.5]]) * (t - t**3 + 7.0 * t**5 - 2.0 * t**7 + ninth * t**9)

    wanted = np.array([3.0, -2.0, 0.5]) / np.array(sigma)
    assert np.allclose(slopes(field, sigma), [wanted] * 2, rtol=rounding, atol=0.0)
    assert np.allclose(slopes(field, sigma, axes=(2, 0)), [wanted[[2, 0]]] * 2, rtol=rounding, atol=0.0)
    five, four = slopes(lambda points: field(points, 50.0), sigma)
    assert np.allclose(five, wanted, rtol=rounding, atol=0.0)
    assert np.allclose(four, wanted * (1.0 - 50.0 * (0.06 * 0.12 * 0.18 * 0.24) ** 2), rtol=rounding, atol=0.0)


def test_smooth_slopes_are_least_squares():
    """Independent: numpy's fit of a straight line to the same places; a noisy field has a slope within 0.3 rms."""
    chance, sigma = np.random.default_rng(5), (1e-3, 1e-3, 2e-3)
    kept, rounding = {}, 1e-12

    def field(points):
        kept["points"], kept["field"] = points, 4.0 * points + 1e-4 * chance.normal(size=points.shape)
        return kept["field"]

    found = smooth_slopes(field, sigma)
    for axis, place, value in zip(range(3), np.split(kept["points"], 3, 1), np.split(kept["field"], 3, 1), strict=True):
        assert found[axis] == pytest.approx(np.polyfit(place[axis], value[axis], 1)[0], rel=rounding, abs=0.0)


def test_peak_place_of_a_smooth_top():
    """From memory of CERN-2006-002: a round Gaussian beam has its strongest field at 1.5852 rms."""
    near = 3e-6  # the places stand 2e-6 rms apart, the number has eight digits
    place = peak_place(lambda r: -np.expm1(-0.5 * (r / 2e-3) ** 2) / r, 2e-3, None)
    assert place / 2e-3 == pytest.approx(1.5852011, rel=near, abs=0.0)


@pytest.mark.parametrize("sign", [1.0, -1.0])
def test_peak_place_at_a_cusp(sign):
    """Closed form: a uniform cylinder without end has its strongest field on the edge, whatever its sign."""
    assert peak_place(lambda r: sign * np.where(r < 0.7, r / 0.49, 1.0 / r), 0.35, 0.7, cusp=True) == 0.7


def test_peak_place_of_a_top_near_an_edge():
    """Closed form: where the density fades out at its edge the top is smooth, a little inside."""
    near = 1e-5
    place = peak_place(lambda r: 1.0 - np.square(r - 0.68), 0.35, 0.7)
    assert place == pytest.approx(0.68, rel=near, abs=0.0)
