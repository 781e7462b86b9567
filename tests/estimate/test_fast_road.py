"""superpose by the fast sum: against the direct sum, in the lab, with the doubt that it measures itself."""

import numpy as np
import pytest

from beamfield import superpose
from beamfield.errors import InputError

COUNT, PROBED = 6000, 400
FAMILIES = {  # rest-frame sizes along x, y, z
    "sphere": (1.0, 1.0, 1.0),
    "needle": (1.0, 1.0, 1e3),
    "pancake": (1.0, 1.0, 1e-3),
}
MOMENTA = {"rest": (0.0, 0.0, 0.0), "slow": (0.0, 0.0, 0.3), "fast": (0.0, 0.0, 1e4), "aslant": (0.6, -1.2, 2.0)}


def cloud_of(family, momentum, signs, seed=5):
    """Places (3, N) in the lab whose rest-frame cloud has the sizes of the family along the motion z, and charges."""
    rng = np.random.default_rng(seed)
    places = rng.standard_normal((3, COUNT)) * np.array(FAMILIES[family])[:, None] * 1e-3
    places[2] /= np.sqrt(1.0 + np.dot(momentum, momentum))
    return places, rng.choice([-1.0, 1.0], COUNT) * 1e-12 if signs else np.full(COUNT, 1e-12)


def relative(field, exact):
    return np.sqrt(np.square(field - exact).sum() / np.square(exact).sum())


@pytest.mark.large
@pytest.mark.parametrize("tolerance", [1e-3, 1e-6])
@pytest.mark.parametrize(
    ("family", "motion", "signs"),
    [
        ("sphere", "rest", False),
        ("sphere", "aslant", True),
        ("needle", "slow", False),
        ("needle", "fast", True),
        ("pancake", "fast", False),
        ("pancake", "slow", True),
    ],
)
def test_meets_its_tolerance(family, motion, signs, tolerance):
    """Naive twin: the direct sum at some of the charges; doubt is measured, so that it is near the true error."""
    places, charges = cloud_of(family, MOMENTA[motion], signs)
    momentum = np.array(MOMENTA[motion])
    fast = superpose(places, places, charges, momentum, method="fast", tolerance=tolerance)
    exact = superpose(places[:, :PROBED], places, charges, momentum, method="direct")
    assert "fast sum" in fast.method
    assert fast.doubt <= tolerance
    sampled = 3.0  # the error at 96 points and at 400 others
    assert relative(fast.E[:, :PROBED], exact.E) <= sampled * max(fast.doubt, 1e-15)
    if any(MOMENTA[motion]):
        assert relative(fast.B[:, :PROBED], exact.B) <= 2.0 * sampled * max(fast.doubt, 1e-15)


@pytest.mark.large
def test_other_points_and_clouds():
    """Naive twin: the direct sum at points that are no charges, one of them far away, with softened charges."""
    places, charges = cloud_of("sphere", MOMENTA["slow"], True)
    points = np.random.default_rng(6).standard_normal((3, 900)) * 2e-3
    points[:, 0] = 1.0
    fast, exact = (
        superpose(points, places, charges, np.array(MOMENTA["slow"]), cloud=1e-4, method=way, tolerance=1e-4)
        for way in ("fast", "direct")
    )
    assert relative(fast.E, exact.E) < 1e-4


@pytest.mark.large
def test_equal_momenta_are_one_and_different_ones_are_refused():
    places, charges = cloud_of("sphere", MOMENTA["slow"], False)
    momenta = np.tile(np.array(MOMENTA["slow"])[:, None], COUNT)
    fast = superpose(places, places, charges, momenta, method="fast", tolerance=1e-3)
    assert fast.doubt <= 1e-3
    momenta[0, 7] += 1e-6
    with pytest.raises(InputError, match="one momentum for all"):
        superpose(places, places, charges, momenta, method="fast")


def test_bad_calls_are_refused_in_one_line():
    """What cannot be summed: each by its own sentence, nothing allocated."""
    ones, charge, still = np.ones((3, 2)), np.ones(2), np.zeros(3)
    for words, arguments in {
        "tolerance": ((ones, ones, charge, still), {"tolerance": 0.5}),
        "method": ((ones, ones, charge, still), {"method": "quickest"}),
        "cloud": ((ones, ones, charge, still), {"cloud": -1.0}),
        "positions: shape": ((ones, np.ones((2, 2)), charge, still), {}),
        "momenta: holds nan": ((ones, ones, charge, np.array([0.0, np.nan, 0.0])), {}),
    }.items():
        with pytest.raises(InputError, match=words) as caught:
            superpose(*arguments[0], **arguments[1])
        assert "\n" not in str(caught.value)


def test_more_memory_than_there_is_is_refused_before_it_is_taken():
    """A view of one column stands for 10^12 points: nothing of that size may be made."""
    from beamfield.errors import CallError
    from beamfield.estimate.superposition import refuse_too_large

    with pytest.raises(CallError, match="GiB"):
        refuse_too_large(10**12, 10, 1)
