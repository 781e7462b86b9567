"""A case on one page of text, at most 100 columns: verdict, results by question, notes, caution."""

from beamfield.errors import one_line
from beamfield.report.bunch_line import bunch_lines
from beamfield.report.ink import Ink
from beamfield.report.notes import Notes
from beamfield.report.paragraph import COLUMNS, hanging
from beamfield.report.rows import heading, row, sections
from beamfield.report.verdict_lines import STATE, summary, verdict_line, width_of

CAUTION = (
    "Estimates for design work. They are no radiation-safety, machine-protection or licensing case: "
    "there the rules of the facility and its qualified people decide."
)


def text_page(outcome, ink=None):
    """The whole page as one string."""
    ink = ink or Ink()
    blocks = [_head(outcome, ink), _verdict(outcome, ink), *_results(outcome, ink), _ground(outcome, ink)]
    return "\n\n".join("\n".join(block) for block in blocks if block) + "\n"


def _head(outcome, ink):
    title, file = one_line(outcome.title), one_line(outcome.file)
    gap = COLUMNS - len(title) - len(file)
    first = (
        [ink.strong(title) + " " * gap + ink.faint(file)] if gap > 1 else [*map(ink.strong, hanging("", title)), file]
    )
    return [*first, ink.faint("─" * COLUMNS), *_bunch(outcome.bunch)]


def _bunch(bunch):
    return [line for text in bunch_lines(bunch) for line in hanging("", text)] if bunch else []


def _verdict(outcome, ink):
    width = width_of(outcome.verdicts)
    lines = ["  " + verdict_line(verdict, outcome, width, ink) for verdict in outcome.verdicts]
    tone = ink.strong if outcome.met else ink.alarm
    warnings = [line for text in outcome.warnings for line in hanging(f"  {'warning':{STATE}}", text)]
    return [tone(f"Verdict: {summary(outcome)}"), *lines, *warnings]


def _results(outcome, ink):
    notes = Notes(outcome.findings.values())
    width = max(map(len, outcome.findings), default=0) + 1
    for question, findings in sections(outcome.findings):
        yield [heading(question, findings, width, ink), *(row(f, width, notes, ink) for f in findings)]
    yield _notes(notes, ink)


def _notes(notes, ink):
    lines = [
        line
        for number, (text, names) in enumerate(notes, 1)
        for line in hanging(f"  [{number}] ", f"{', '.join(names)}: {text}")
    ]
    return [ink.strong("Notes"), *lines] if lines else []


def _ground(outcome, ink):
    """What the page stands on: self-checks, methods, caution."""
    checks = [line for check in outcome.checks for line in _check(*check)]
    methods = dict.fromkeys(finding.method for finding in outcome.findings.values())
    by = hanging(f"  {'method':{STATE}}", "; ".join(methods)) if methods else []
    return [*checks, *by, *([""] if checks or by else []), *map(ink.faint, hanging("", CAUTION))]


def _check(sentence, passed):
    return hanging(f"  {'passed' if passed else 'FAILED':{STATE}}", f"self-check: {sentence}")
