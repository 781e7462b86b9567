"""The results of a page: one row each, grouped by the question they answer."""

from beamfield.estimate.catalogue import CATALOGUE, QUESTIONS
from beamfield.report.human import AFTER, BEFORE, digits, number, on_the_point, order, scale, shown
from beamfield.report.notes import difference

UNIT, DOUBT = 7, 10
COLUMN = BEFORE + AFTER


def sections(findings):
    """Pairs of a question and its findings, for the questions that have some."""
    for key, question in QUESTIONS.items():
        answers = [f for f in findings.values() if CATALOGUE[f.name].question == key]
        if answers:
            yield question, answers


def heading(question, findings, width, ink):
    """The question, with the names of the columns that its rows have."""
    summed = any(finding.method.startswith("superposition") for finding in findings)
    textbook = any(finding.closed_form is not None for finding in findings)
    columns = f"{'superposed' if summed else 'value':^{COLUMN}}{'':{UNIT}}{'textbook' if textbook else '':^{COLUMN}}"
    doubt = "rel. doubt" if any(finding.doubt for finding in findings) else ""
    return ink.strong(f"{question:{width + 2}}") + ink.faint(f"{columns}{doubt:>{DOUBT}}".rstrip())


def row(finding, width, notes, ink):
    """Name, value with its unit, textbook value in the same unit, relative doubt, and what to beware of."""
    at, count = scale(finding.value, CATALOGUE[finding.name].unit), digits(finding.value, finding.doubt)
    write = number if finding.doubt else shown
    value, textbook = (_cell(write, each, at, count) for each in (finding.value, finding.closed_form))
    text = f"  {finding.name:{width}}{value}{at.unit:{UNIT}}{textbook}{_doubt(finding):>{DOUBT}}"
    return f"{text}{_flag(finding, notes, ink)}".rstrip()


def _cell(write, value, at, count):
    return " " * COLUMN if value is None else on_the_point(write(value, at, count))


def _doubt(finding):
    return order(finding.doubt / abs(finding.value)) if finding.doubt and finding.value else ""


def _flag(finding, notes, ink):
    word = "invalid" if not finding.valid else "differs" if difference(finding) else ""
    numbers = " ".join(map(str, notes.numbers(finding)))
    return "  " + " ".join(filter(None, [ink.alarm(word), f"[{numbers}]" if numbers else ""]))
