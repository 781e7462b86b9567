"""Numbers for people. SI prefixes: from memory of the SI brochure, 9th edition, table 7; the rest are our own rules."""

import pytest

from beamfield.report.human import (
    AFTER,
    BEFORE,
    brief,
    digits,
    number,
    on_the_point,
    order,
    pretty,
    scale,
    share,
    shown,
)


@pytest.mark.parametrize(
    ("value", "unit", "text"),
    [
        (1.2e-9, "C", "1.2 nC"),
        (-1.2e-9, "C", "-1.2 nC"),
        (3412.0, "V/m", "3.412 kV/m"),
        (6.1e-3, "m", "6.1 mm"),
        (78_800_000.0, "m", "78800 km"),
        (999.96, "V/m", "1000 V/m"),
        (1e6, "V/m2", "1 MV/m²"),
        (0.02, "1/m2", "0.02 1/m²"),
        (2.5e-5, "1/m2", "2.5e-5 1/m²"),
        (3.5e12, "1", "3.5e12"),
        (1.0, "1", "1"),
        (0.0, "m", "0 m"),
        (1e300, "V/m", "1e288 TV/m"),
        (1e-300, "1", "1e-300"),
        (float("nan"), "m", "none m"),
        (float("inf"), "1", "none"),
    ],
)
def test_brief(value, unit, text):
    assert brief(value, unit) == text


@pytest.mark.parametrize(
    ("value", "doubt", "count"),
    [(0.2430518, 2e-3, 3), (0.2430518, 2e-4, 4), (0.2430518, 2e-9, 6), (1.0, 5.0, 2), (1.0, 0.0, 6), (0.0, 1.0, 6)],
)
def test_digits_reach_down_to_the_first_digit_of_the_doubt(value, doubt, count):
    assert digits(value, doubt) == count


@pytest.mark.parametrize("value", [-99999.0, -0.2430518, 3.4123e-9, -1.5e-100, 12.0, 4.0e12])
@pytest.mark.parametrize("unit", ["1", "V/m"])
def test_points_stand_one_below_the_other(value, unit):
    text = number(value, scale(value, unit), 6)
    column = on_the_point(text)
    assert len(column) == BEFORE + AFTER
    assert column.index(".") == BEFORE if "." in text else column[:BEFORE].strip() == text.partition("e")[0]
    assert column.strip() == text


def test_what_is_printed_is_the_value():
    for exponent in range(-40, 40):
        for unit in ("1", "m", "V/m2", "1/m2"):
            value = -1.2345 * 10.0**exponent
            at = scale(value, unit)
            half_a_digit = 0.5e-4 / 1.2345
            assert abs(float(number(value, at, 5)) * at.factor / value - 1.0) < 1.01 * half_a_digit


@pytest.mark.parametrize(
    ("value", "text"),
    [(1.0 - 3.2e-9, "1.00000"), (1.0, "1"), (0.1 + 0.2, "0.3"), (3.5e12, "3.5e12"), (100.0, "100"), (0.25, "0.25")],
)
def test_zeros_go_where_the_number_is_all_there(value, text):
    assert shown(value, scale(value, "1"), 6) == text


@pytest.mark.parametrize(
    ("ratio", "text"),
    [(0.028, "2.8 %"), (-0.0067, "0.67 %"), (12.0, "1200 %"), (4e-7, "4e-7"), (0.0, "0"), (float("nan"), "none")],
)
def test_share(ratio, text):
    assert share(ratio) == text


def test_small_words():
    assert (order(3.4e-12), order(0.02), order(0.0), pretty("V/m2"), pretty("1")) == ("3e-12", "2e-2", "0", "V/m²", "")
