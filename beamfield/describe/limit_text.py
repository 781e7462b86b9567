"""Limits as a user writes them: a result, a comparison, a number and its unit."""

import re

from beamfield.describe import units
from beamfield.describe.nearest import excerpt, hint
from beamfield.describe.quantity import parse
from beamfield.errors import InputError
from beamfield.estimate.catalogue import CATALOGUE
from beamfield.judge.limit import Limit

_SIGN = re.compile(r"[<>=!]=?|[≤≥≠]")
_SPELLINGS = {"≤": "<=", "≥": ">="}
_NAME = re.compile(r"[A-Za-z_][A-Za-z0-9_]*")
_FORM = "a limit is RESULT < NUMBER UNIT, such as '|tune_shift_y| < 0.25' or 'defocusing_x < 0.02 1/m2'"


def limit(text, line=0, column=0):
    """Limit that a text says, its bound in the unit of the result; InputError for anything else."""
    result_text, comparison, bound_text = _three(text)
    name, absolute = _result(result_text, text)
    return Limit(text, name, absolute, comparison, _bound(bound_text, CATALOGUE[name], text), line, column)


def _three(text):
    signs = _SIGN.findall(text)
    if len(signs) > 1:
        raise InputError(f"{excerpt(text)} compares more than once; write one limit for each comparison")
    if not signs:
        raise InputError(f"{excerpt(text)} compares nothing; {_FORM}")
    sign = _SPELLINGS.get(signs[0], signs[0])
    if sign not in ("<", "<=", ">", ">="):
        raise InputError(f"{excerpt(text)}: '{sign}' is no limit; choose from <, <=, >, >=")
    left, right = text.split(signs[0])
    return left.strip(), sign, right.strip()


def _result(result_text, text):
    absolute = len(result_text) > 1 and result_text[0] == result_text[-1] == "|"
    name = result_text[1:-1].strip() if absolute else result_text
    if not _NAME.fullmatch(name):
        raise InputError(f"{excerpt(text)}: {excerpt(result_text)} is no result; {_FORM}")
    if name not in CATALOGUE:
        near = hint(name, CATALOGUE) or "; 'beamfield explain' lists them"
        raise InputError(f"{excerpt(text)}: there is no result {excerpt(name)}{near}")
    return name, absolute


def _bound(bound_text, entry, text):
    """The bound in the unit of the result."""
    quantity, unit = parse(bound_text), units.unit(entry.unit)
    wanted = f"; {entry.name} is in {entry.unit}" if entry.unit != "1" else f"; {entry.name} is a plain number"
    if quantity.head or quantity.words or quantity.unit is None:
        strange = " ".join((quantity.head or quantity.unit_text, *quantity.words))
        raise InputError(f"{excerpt(text)}: {excerpt(strange.strip())} is not understood in a limit{wanted}")
    if quantity.tolerance is not None:
        raise InputError(f"{excerpt(text)}: a limit has no tolerance")
    if not quantity.unit_text and entry.unit != "1":
        raise InputError(f"{excerpt(text)} has no unit; write '{text.strip()} {entry.unit}'")
    if quantity.unit.dimension != unit.dimension:
        raise InputError(f"{excerpt(text)}: {excerpt(quantity.unit_text)} does not measure it{wanted}")
    return quantity.number if quantity.unit == unit else unit.count(quantity.si)
