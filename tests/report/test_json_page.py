"""JSON for programs: the promised keys in the promised order, the same bits back, never a NaN."""

import json
from dataclasses import replace
from math import inf, nan

import numpy as np

from beamfield import __version__
from beamfield.estimate.catalogue import CATALOGUE
from beamfield.estimate.finding import Finding
from beamfield.report.json_page import json_page
from tests.report.made_outcomes import FINDINGS, OVERFULL, RING


def tree(*outcomes, **wish):
    def refuse(word):
        raise AssertionError(f"{word} is not JSON")

    return json.loads(json_page(outcomes, **wish), parse_constant=refuse)


def test_keys_and_order():
    assert list(tree(RING)) == ["beamfield", "case", "file", "results", "limits", "met", "warnings"]
    keys = ["value", "unit", "doubt", "method", "closed_form", "source", "valid", "remarks"]
    assert all(list(result) == keys for result in tree(RING)["results"].values())
    assert list(tree(RING)["limits"][0]) == ["limit", "value", "met"]


def test_results_follow_the_catalogue_whatever_order_they_came_in():
    shuffled = replace(RING, findings=dict(reversed(FINDINGS.items())))
    names = list(tree(shuffled)["results"])
    assert names == [name for name in CATALOGUE if name in names]
    assert len(names) == len(FINDINGS)


def test_what_it_says():
    page = tree(OVERFULL)
    assert (page["beamfield"], page["case"], page["file"]) == (__version__, OVERFULL.title, "overfull.yaml")
    assert (page["met"], [limit["met"] for limit in page["limits"]]) == (False, [True, False, False])
    assert page["limits"][0] == {"limit": "|tune_shift_y| < 0.25", "value": 0.2430518, "met": True}
    assert page["results"]["tune_shift_y"]["source"] == CATALOGUE["tune_shift_y"].source
    assert page["results"]["memory_length_longitudinal"]["valid"] is False
    assert page["results"]["memory_length_longitudinal"]["closed_form"] is None


def test_floats_come_back_to_the_same_bits():
    values = (0.1 + 0.2, np.float64(1.0) / 3.0, 5e-324, 1.7976931348623157e308)
    for value in values:
        finding = Finding("gamma", value, value, value, "made up")
        result = tree(replace(RING, findings={"gamma": finding}))["results"]["gamma"]
        assert result["value"] == result["doubt"] == result["closed_form"] == value


def test_what_is_no_number_is_null():
    for value in (nan, inf, -inf):
        finding = Finding("gamma", value, value, value, "made up")
        result = tree(replace(RING, findings={"gamma": finding}))["results"]["gamma"]
        assert result["value"] is result["doubt"] is result["closed_form"] is None


def test_one_case_is_an_object_and_several_are_an_array():
    assert isinstance(tree(RING), dict)
    assert [case["file"] for case in tree(RING, OVERFULL)] == ["ring.yaml", "overfull.yaml"]


def test_limits_alone():
    assert list(tree(RING, results=False)) == ["beamfield", "case", "file", "limits", "met", "warnings"]


def test_letters_stay_letters_and_quotes_cannot_break_out():
    title = 'µ-ring "β", \\ and \x1b[31m'
    assert tree(replace(RING, title=title))["case"] == title
    assert "µ-ring" in json_page([replace(RING, title=title)])
    assert "\x1b" not in json_page([replace(RING, title=title)])
