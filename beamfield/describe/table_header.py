"""The line of a table that names its columns: 'x [m], y [m], z [m]'."""

import re
from itertools import count

from beamfield.describe.columns import MOST_FAULTS, name_faults
from beamfield.describe.nearest import excerpt
from beamfield.describe.number_text import NUMBER
from beamfield.errors import Fault, InputError

_LONGEST = 1 << 16  # characters; no header is longer
_HEADING = re.compile(r'\s*"?\s*(?P<name>[^\[\]()"]*?)\s*(?:[\[(]\s*(?P<unit>[^\])]*?)\s*[\])])?\s*"?\s*')
_OTHER_SEPARATORS = {";": "semicolons", "\t": "tabs", "|": "bars"}


def is_data(line):
    """Whether a line of text holds more than a comment."""
    text = line.lstrip()
    return bool(text) and not text.startswith("#")


def cell_column(text, index):
    """Column, from 1, where a cell of a line begins."""
    cells = text.split(",")
    indent = len(cells[index]) - len(cells[index].lstrip())
    return sum(len(cell) + 1 for cell in cells[:index]) + indent + 1


def read_header(handle, columns, file):
    """Number of the header line, from 1, and the names it gives; InputError, located, unless they are right.

    handle   a text file at its beginning; on return at the line after the header
    columns  the Column objects that the table may have
    """
    line, text = _first_line(handle, file)
    heading = text.partition("#")[0].rstrip()
    _check_form(heading, columns, line, file)
    names, units = zip(*map(_name_and_unit, heading.split(",")))
    faults = [*name_faults(names, columns), *_unit_faults(names, units, columns)][:MOST_FAULTS]
    if faults:
        raise InputError(*(_located(*fault, heading, line, file) for fault in faults))
    return line, names


def _first_line(handle, file):
    for line in count(1):
        text = handle.readline(_LONGEST)
        if not text:
            raise InputError(Fault("nothing but comments; begin with the names of the columns", file=file))
        if len(text) == _LONGEST or (is_data(text) and re.search("[\0\ufffd]", text)):
            raise InputError(Fault("this is no table in UTF-8 text; write columns parted by commas", "", line, 1, file))
        if is_data(text):
            return line, text
    return None


def _check_form(heading, columns, line, file):
    for sign, name in _OTHER_SEPARATORS.items():
        if sign in heading:
            place = line, heading.index(sign) + 1, file
            raise InputError(Fault(f"columns are parted by commas here, not by {name}", "", *place))
    if any(NUMBER.fullmatch(cell.strip()) for cell in heading.split(",")):
        example = ",".join(column.name for column in columns if column.needed)
        raise InputError(Fault(f"a number where columns should be named; begin with '{example}'", "", line, 1, file))


def _name_and_unit(cell):
    found = _HEADING.fullmatch(cell)
    return (found["name"], found["unit"]) if found else (cell.strip(), None)


def _unit_faults(names, units, columns):
    allowed = {column.name: column.units for column in columns}
    for index, (name, unit) in enumerate(zip(names, units)):
        if unit and unit not in allowed.get(name, (unit,)):
            yield index, name, f"{excerpt(unit)} is not read; write this column in {excerpt(allowed[name][0])}"


def _located(index, name, message, heading, line, file):
    return Fault(message, name, line, 1 if index is None else cell_column(heading, index), file)
