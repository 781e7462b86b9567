"""Which page for which wish."""

from beamfield.report.check_page import check_page as check_text
from beamfield.report.ink import Ink
from beamfield.report.json_page import json_page
from beamfield.report.text_page import text_page


def report_page(outcomes, form="text", colour=False):
    """Findings and verdicts of all cases as one text; form: text or json."""
    if form == "json":
        return json_page(outcomes)
    return "\n\n".join(text_page(outcome, Ink(colour)) for outcome in outcomes)


def check_page(outcomes, form="text", colour=False):
    """Verdicts of all cases as one text; form: text or json."""
    return json_page(outcomes, results=False) if form == "json" else check_text(outcomes, Ink(colour))
