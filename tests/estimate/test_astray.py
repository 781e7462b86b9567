"""A sum that goes astray says so: shapes beyond what the rule of charges is made for are not valid, never a crash."""

from dataclasses import replace

import pytest

from beamfield.beam.surroundings import Surroundings
from beamfield.estimate.answer import ASTRAY, answer, checks
from tests.estimate.made_bunches import DEFAULT, made

pytestmark = pytest.mark.large
FREE = Surroundings()


@pytest.mark.parametrize("name", ["gaussian", "uniform-ellipsoid", "uniform-cylinder", "kv x gaussian"])
@pytest.mark.parametrize("aspect", [1e-4, 0.01, 1.0])
def test_a_flat_and_short_bunch_is_right_or_invalid(name, aspect):
    """Closed form: the textbook beside each sum; ten times the allowed part of the density would be a lie."""
    bunch = made(name, aspect=aspect, section=300.0)
    found = answer(bunch, FREE, None, DEFAULT)
    total = sum(found[f"defocusing_{axis}"].closed_form for axis in "xyz")
    for axis in "xyz":
        kappa = found[f"defocusing_{axis}"]
        assert not kappa.valid or abs(kappa.value - kappa.closed_form) <= 10.0 * ASTRAY * total
    sums = [finding for finding in found.values() if finding.method.startswith("superposition")]
    assert len({finding.valid for finding in sums}) == 1
    if not sums[0].valid:
        assert all("misses Gauss's law" in finding.remarks[-1] for finding in sums)
        assert [passed for _, passed in checks(bunch, found)] == [False]


def test_the_textbook_road_is_not_touched():
    bunch = made("gaussian", aspect=0.01, section=300.0)
    found = answer(bunch, FREE, None, replace(DEFAULT, method="closed-form"))
    assert all(found[f"defocusing_{axis}"].valid for axis in "xyz")
    assert checks(bunch, found)[0][1]


def test_a_usual_bunch_stays_valid():
    found = answer(made("gaussian", aspect=100.0, section=3.0), FREE, None, DEFAULT)
    assert all(finding.valid for finding in found.values())
