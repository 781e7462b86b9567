"""Numbers as this project reads them, and a clear no to every other way of writing one."""

import re
from math import isinf

from beamfield.describe.nearest import excerpt
from beamfield.errors import InputError

NUMBER = re.compile(r"[+-]?(?:[0-9]+\.?[0-9]*|\.[0-9]+)(?:[eE][+-]?[0-9]+)?")
_NOT_FINITE = re.compile(r"[+-]?\.?(nan|inf|infinity)\b", re.IGNORECASE)
_HEXADECIMAL = re.compile(r"[+-]?0[xob][0-9a-f]", re.IGNORECASE)
_THOUSANDS = re.compile(r"[+-]?[0-9]{1,3}(?:,[0-9]{3})+(?![0-9])")
_DIGITS_GO_ON = re.compile(r"\s+[0-9][0-9.eE+-]*(?=\s|$)")


def split_number(text):
    """The number that a text begins with, as (float, its own text, what follows); InputError for anything else."""
    found = NUMBER.match(text)
    _refuse_foreign(text, found)
    number = float(found[0])
    if isinf(number):
        raise InputError(f"{excerpt(text)}: {excerpt(found[0])} is larger than any number here; check the exponent")
    return number, found[0], text[found.end() :]


def whole_number(text):
    """An integer: '1024', or '1e5' where that is one; InputError for anything else."""
    number, _, rest = split_number(text)
    if rest or number != int(number):
        raise InputError(f"{excerpt(text)} is not a whole number")
    return int(number)


def _refuse_foreign(text, found):
    if _NOT_FINITE.match(text):
        raise InputError(f"{excerpt(text)} is not a number that can be measured; write a finite one")
    if _HEXADECIMAL.match(text):
        raise InputError(f"{excerpt(text)}: numbers are decimal here; write it without '0x', '0o' or '0b'")
    if not found:
        raise InputError(f"{excerpt(text)} does not begin with a number")
    complaint = _complaint(found[0], text[found.end() :], _THOUSANDS.match(text))
    if complaint:
        raise InputError(f"{excerpt(text)}: {complaint}")


def _complaint(number, rest, thousands):
    if thousands:
        return f"no commas in numbers; write '{thousands[0].replace(',', '')}', or a point where decimals begin"
    if re.match(r",\s*[0-9]", rest):
        return "decimals begin with a point here, not with a comma"
    if re.match(r"['’_][0-9]", rest):
        return "write the digits of a number in one piece, without separators"
    if _DIGITS_GO_ON.match(rest):
        return "two numbers in a row; write the digits of one number in one piece"
    if re.match(r"\s*(?:[x×·*]\s*10|\*\*|\^)", rest):
        return "write powers of ten as in '3.5e12'"
    if re.match(r"\.", rest):
        return "a number has one decimal point"
    return ""
