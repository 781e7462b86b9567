"""Limits only: a line a case, a line a limit, a sum."""

from beamfield.report.check_page import check_page
from beamfield.report.ink import Ink
from tests.report.made_outcomes import BARE, OVERFULL, RING


def test_the_page():
    assert check_page([RING, OVERFULL, BARE]).splitlines() == [
        "ring.yaml  Injection plateau, nominal fill: the limit is met",
        "  met       |tune_shift_y| < 0.25                     0.243052   2.8 % to spare",
        "  warning   the footprint reaches the half integer",
        "overfull.yaml  Injection plateau, twice the fill: 2 of 3 limits broken",
        "  met       |tune_shift_y| < 0.25                     0.243052   2.8 % to spare",
        "  BROKEN    |tune_shift_x| < 0.2                      0.201346   0.67 % over",
        "  BROKEN    |field_gradient_x| > 412345.7 V/m2   412.346 kV/m²   5e-8 short, within the doubt",
        "  warning   the footprint reaches the half integer",
        "bare.yaml  A case without limits: no limits set",
        "",
        "3 cases, 4 limits, 2 broken",
    ]


def test_one_of_each_is_singular():
    assert check_page([RING]).endswith("1 case, 1 limit, none broken\n")


def test_colour_only_where_wanted():
    assert "\x1b[" not in check_page([OVERFULL])
    assert "\x1b[1;35mBROKEN" in check_page([OVERFULL], Ink(colour=True))
