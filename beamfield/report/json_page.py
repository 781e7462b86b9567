"""Outcomes as JSON: SI values that come back to the same bits, null where there is no number."""

import json
from math import isfinite

from beamfield import __version__
from beamfield.estimate.catalogue import CATALOGUE


def json_page(outcomes, results=True):
    """One object for one case, an array for several; without the results where only the limits were asked for."""
    cases = [_case(outcome, results) for outcome in outcomes]
    return dump(cases[0] if len(cases) == 1 else cases)


def dump(tree):
    """Text of plain data, a line each, ending in a line break."""
    return json.dumps(tree, indent=2, ensure_ascii=False, allow_nan=False) + "\n"


def _case(outcome, results):
    ordered = sorted(outcome.findings.values(), key=lambda finding: list(CATALOGUE).index(finding.name))
    return (
        {"beamfield": __version__, "case": outcome.title, "file": outcome.file}
        | ({"results": {finding.name: _result(finding) for finding in ordered}} if results else {})
        | {
            "limits": [_limit(verdict) for verdict in outcome.verdicts],
            "met": bool(outcome.met),
            "warnings": list(outcome.warnings),
        }
    )


def _result(finding):
    entry = CATALOGUE[finding.name]
    return {
        "value": _number(finding.value),
        "unit": entry.unit,
        "doubt": _number(finding.doubt),
        "method": finding.method,
        "closed_form": _number(finding.closed_form),
        "source": entry.source,
        "valid": bool(finding.valid),
        "remarks": list(finding.remarks),
    }


def _limit(verdict):
    return {"limit": verdict.limit.text, "value": _number(verdict.value), "met": bool(verdict.met)}


def _number(value):
    return float(value) if value is not None and isfinite(value) else None
