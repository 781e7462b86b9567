"""Tables in plain text, one row a line: a header names the columns, commas part them, '#' begins a comment.

Read in blocks, so that the text of a large file is never held; every fault is found again by its line and column.
"""

from contextlib import contextmanager

import numpy as np

from beamfield.describe.columns import MOST_FAULTS, Table, plain_size
from beamfield.describe.nearest import excerpt
from beamfield.describe.number_text import split_number
from beamfield.describe.table_header import cell_column, is_data, read_header
from beamfield.errors import Fault, InputError

_BLOCK = 1 << 22  # characters


def read_table(path, columns, progress=None):
    """Table of the columns that a text file has.

    path      of a file in UTF-8
    columns   the Column objects that it may have
    progress  called with the fraction read, 0 to 1, now and then

    Raises InputError with a located fault for each thing wrong, ten at most.
    """
    file, size = str(path), plain_size(path)
    with _opened(path) as handle:
        line, names = read_header(handle, columns, file)
        blocks = []
        for first, lines in _blocks(handle, line + 1):
            blocks.append(_rows(lines, first, names, file))
            if progress:
                progress(min(1.0, handle.buffer.tell() / size))
    table = Table(file, _joined(blocks, names), lambda complaints: _located(complaints, names, path))
    table.check(columns)
    return table


@contextmanager
def _opened(path):
    """The file as text; bytes that are no UTF-8 become a sign that no number and no name has."""
    try:
        with open(path, encoding="utf-8-sig", errors="replace") as handle:
            yield handle
    except OSError as error:
        raise InputError(Fault(f"cannot be read: {error.strerror or error}", file=str(path))) from None


def _blocks(handle, first):
    """(number of the first line, lines) of one block after another that holds data."""
    while lines := handle.readlines(_BLOCK):
        if any(map(is_data, lines)):
            yield first, lines
        first += len(lines)


def _rows(lines, first, names, file):
    """Numbers (rows, columns) of a block of lines."""
    try:
        rows = np.loadtxt(lines, delimiter=",", ndmin=2)
    except ValueError:
        return _rows_one_by_one(lines, first, names, file)
    return rows if rows.shape[1] == len(names) else _rows_one_by_one(lines, first, names, file)


def _rows_one_by_one(lines, first, names, file):
    """The same, slowly, with every fault located."""
    rows, faults = [], []
    for line, text in enumerate(lines, first):
        if is_data(text) and len(faults) < MOST_FAULTS:
            rows.append(_numbers(text.partition("#")[0].rstrip(), line, names, file, faults))
    if faults:
        raise InputError(*faults[:MOST_FAULTS])
    return np.array(rows)


def _numbers(text, line, names, file, faults):
    cells = text.split(",")
    if len(cells) != len(names):
        faults.append(
            Fault(f"{_counted(cells, 'value')}; the header names {_counted(names, 'column')}", "", line, 1, file)
        )
        return []
    numbers = []
    for index, cell in enumerate(cells):
        try:
            numbers.append(_number(cell.strip()))
        except InputError as error:
            faults.append(Fault(str(error), names[index], line, cell_column(text, index), file))
    return numbers


def _counted(things, word):
    return f"{len(things)} {word}{'s' if len(things) > 1 else ''}"


def _number(cell):
    if not cell:
        raise InputError("a value is missing")
    number, _, rest = split_number(cell)
    if rest:
        raise InputError(f"{excerpt(cell)} is not a number; a unit belongs to the name of the column")
    return number


def _joined(blocks, names):
    """The blocks as one contiguous stretch of memory a column; each is given up when it is copied."""
    joined = np.empty((len(names), sum(map(len, blocks))))
    end = joined.shape[1]
    while blocks:
        block = blocks.pop()
        joined[:, end - len(block) : end] = block.T
        end -= len(block)
    return dict(zip(names, joined))


def _located(complaints, names, path):
    """Faults of rows known by number, from a second walk through the file."""
    places = _places(path, {row for row, _, _ in complaints})
    for row, name, message in complaints:
        line, text = places[row]
        yield Fault(message, name, line, cell_column(text, names.index(name)), str(path))


def _places(path, rows):
    """{row: (line, text)} for the rows asked for."""
    found = {}
    with _opened(path) as handle:
        data = (pair for pair in enumerate(handle, 1) if is_data(pair[1]))
        for row, place in enumerate(data, -1):
            if row in rows:
                found[row] = place
            if len(found) == len(rows):
                break
    return found
