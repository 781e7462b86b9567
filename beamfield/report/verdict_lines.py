"""Limits and what became of them, in words."""

from beamfield.estimate.catalogue import CATALOGUE
from beamfield.report.human import digits, scale, share, shown

STATE = 10  # characters of the word that a line opens with


def verdict_line(verdict, outcome, width, ink):
    """'met  |tune_shift_y| < 0.25   0.2430   2.8 % to spare'."""
    state = ink.calm(f"{'met':{STATE}}") if verdict.met else ink.alarm(f"{'BROKEN':{STATE}}")
    return f"{state}{verdict.limit.text:{width}}  {_value(verdict, outcome):>14}   {_room(verdict, outcome)}"


def summary(outcome):
    """The verdict on a case in a few words."""
    total, broken = len(outcome.verdicts), sum(not verdict.met for verdict in outcome.verdicts)
    if not total:
        return "no limits set"
    if total == 1:
        return "the limit is broken" if broken else "the limit is met"
    return f"{broken} of {total} limits broken" if broken else f"all {total} limits met"


def width_of(verdicts):
    """Characters that the longest limit takes."""
    return max((len(verdict.limit.text) for verdict in verdicts), default=0)


def _value(verdict, outcome):
    name = verdict.limit.result
    at = scale(verdict.value, CATALOGUE[name].unit)
    return f"{shown(verdict.value, at, digits(verdict.value, outcome[name].doubt))} {at.unit}".rstrip()


def _room(verdict, outcome):
    finding, limit = outcome[verdict.limit.result], verdict.limit
    room = f"{share(verdict.margin)} {'to spare' if verdict.met else 'over' if limit.comparison[0] == '<' else 'short'}"
    if not finding.valid:
        room += ", outside the domain of the estimate"
    if abs(verdict.value - limit.bound) <= finding.doubt:
        room += ", within the doubt"
    return room
