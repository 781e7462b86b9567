"""Limits: numbers against numbers."""

from math import inf, nan

import pytest

from beamfield.judge.limit import COMPARISONS, Limit, judge


def verdict(comparison, bound, value, absolute=False):
    return judge(Limit(f"r {comparison} {bound}", "r", absolute, comparison, bound), value)


@pytest.mark.parametrize("comparison", COMPARISONS)
@pytest.mark.parametrize("value", [-1.0, 0.25, 0.2, 0.3, inf])
def test_met_is_what_the_sign_says(comparison, value):
    assert verdict(comparison, 0.25, value).met is eval_of(comparison, value, 0.25)


def eval_of(comparison, value, bound):
    """Slow twin: the four signs spelled out."""
    below, same = value < bound, value == bound
    return {"<": below, "<=": below or same, ">": not below and not same, ">=": not below}[comparison]


def test_bars_take_the_sign_away():
    assert verdict("<", 0.25, -0.243, absolute=True).met
    assert verdict("<", 0.25, -0.243, absolute=True).value == 0.243
    assert not verdict("<", 0.25, -0.26, absolute=True).met
    assert verdict("<", 0.25, -0.26).met


@pytest.mark.parametrize("comparison", ["<", "<=", ">", ">="])
@pytest.mark.parametrize("bound", [-2.0, 0.0, 0.5])
@pytest.mark.parametrize("step", [-0.125, 0.125])
def test_the_margin_is_positive_exactly_when_met(comparison, bound, step):
    found = verdict(comparison, bound, bound + step)
    assert (found.margin > 0.0) is found.met
    assert abs(found.margin) == 0.125 / (abs(bound) or 1.0)


def test_what_is_no_number_meets_no_limit():
    assert not any(verdict(comparison, 0.25, nan).met for comparison in COMPARISONS)
    assert not verdict("<", 0.25, nan, absolute=True).met


def test_met_is_a_plain_truth_value():
    import numpy as np

    assert verdict("<", 0.25, np.float64(0.2)).met is True
