"""Limits only: one line a case, one line a limit, and a last line that sums up."""

from beamfield.errors import one_line
from beamfield.report.ink import Ink
from beamfield.report.paragraph import hanging
from beamfield.report.verdict_lines import STATE, summary, verdict_line, width_of


def check_page(outcomes, ink=None):
    """The verdicts on all cases."""
    ink = ink or Ink()
    width = max((width_of(outcome.verdicts) for outcome in outcomes), default=0)
    lines = [line for outcome in outcomes for line in _case(outcome, width, ink)]
    return "\n".join([*lines, "", _total(outcomes)]) + "\n"


def _case(outcome, width, ink):
    yield ink.strong(f"{one_line(outcome.file)}  {one_line(outcome.title)}: {summary(outcome)}")
    for verdict in outcome.verdicts:
        yield "  " + verdict_line(verdict, outcome, width, ink)
    for warning in outcome.warnings:
        yield from hanging(f"  {'warning':{STATE}}", warning)


def _total(outcomes):
    limits = sum(len(outcome.verdicts) for outcome in outcomes)
    broken = sum(not verdict.met for outcome in outcomes for verdict in outcome.verdicts)
    return f"{_count(len(outcomes), 'case')}, {_count(limits, 'limit')}, {broken or 'none'} broken"


def _count(number, word):
    return f"{number} {word}" if number == 1 else f"{number} {word}s"
