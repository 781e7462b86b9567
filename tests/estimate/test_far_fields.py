"""The field of a bunch far outside it, where neighbours and other beams stand, against the closed form."""

import numpy as np
import pytest

from beamfield.estimate.source import self_field
from beamfield.estimate.textbook import closed_field
from tests.estimate.made_bunches import DEFAULT, WITH_FIELD_LAW, made, rms_error

GOOD_AHEAD, GOOD_BESIDE = 1e-5, 5e-3  # flat sections, seen from beside, are the hardest
ASPECTS, SECTIONS = (1e-2, 1.0, 1e4), (0.1, 1.0, 10.0)
REACH = 4.0  # times 2 rms lengths: beyond the window that is kept of a Gaussian


def error(bunch, points):
    return max(rms_error(self_field(bunch, DEFAULT, p).E, closed_field(bunch, p)) for p in points)


@pytest.mark.parametrize("aspect", ASPECTS)
@pytest.mark.parametrize("name", WITH_FIELD_LAW)
def test_ahead(name, aspect):
    """Closed form, from 8 to 10^4 rms lengths ahead, a little off the axis."""
    bunch = made(name, aspect, 3.0)
    places = [2.0 * reach * bunch.sigma[2] for reach in (REACH, 20.0, 1e3, 5e3)]
    assert error(bunch, [np.array([[0.1 * bunch.sigma[0]], [0.2 * bunch.sigma[1]], [z]]) for z in places]) < GOOD_AHEAD


@pytest.mark.parametrize("section", SECTIONS)
@pytest.mark.parametrize("aspect", ASPECTS)
def test_beside_a_gaussian(aspect, section):
    """Closed form, from 6 to 1000 rms sizes beside it."""
    bunch = made("gaussian", aspect, section)
    places = [reach * bunch.sigma[0] for reach in (6.0, 10.0, 30.0, 1e3)]
    assert error(bunch, [np.array([[x], [0.2 * bunch.sigma[1]], [0.0]]) for x in places]) < GOOD_BESIDE
