"""What the columns of a table are called and may hold, whatever kind of file they come from."""

import os
import stat
from collections.abc import Callable
from dataclasses import dataclass

import numpy as np

from beamfield.describe.nearest import excerpt, hint
from beamfield.errors import Fault, InputError

MOST_FAULTS = 10  # a table is refused after so many, whatever its length


@dataclass(frozen=True, slots=True)
class Column:
    """A column that a table may have.

    name      as the header says it
    units     what may stand in brackets after the name; the first is the unit meant
    needed    whether a table is nothing without it
    together  names that come all or none
    allowed   mask of the values that make sense, for values (N,)
    rule      says so in words
    """

    name: str
    units: tuple[str, ...]
    needed: bool = True
    together: tuple[str, ...] = ()
    allowed: Callable = np.isfinite
    rule: str = ""


@dataclass(frozen=True, slots=True, eq=False)
class Table:
    """Columns (N,) by name; `faults` turns [(row, name, message), ...] into faults placed in the file."""

    file: str
    values: dict[str, np.ndarray]
    faults: Callable

    def check(self, columns):
        """InputError for the first values that are not finite or not allowed, in the order of the rows."""
        self.refuse(found for column in columns if column.name in self.values for found in self._complaints(column))

    def refuse(self, complaints):
        """InputError for the first of some complaints (row, name, message), if there are any."""
        first = sorted(complaints, key=lambda complaint: complaint[0])[:MOST_FAULTS]
        if first:
            raise InputError(*self.faults(first))

    def _complaints(self, column):
        values = self.values[column.name]
        finite = np.isfinite(values)
        for row in np.flatnonzero(~(finite & column.allowed(values)))[:MOST_FAULTS]:
            rule = column.rule if finite[row] else "is not a number that can be measured; write a finite one"
            yield int(row), column.name, f"{values[row]:g} {rule}"


def name_faults(names, columns):
    """Faults of a list of column names as [(index, name, message), ...]; index None where a name is missing."""
    known = {column.name: column for column in columns}
    for index, name in enumerate(names):
        if name not in known:
            yield (
                index,
                name,
                f"no column is called {excerpt(name)}{hint(name, known) or '; there are ' + ', '.join(known)}",
            )
        elif name in names[:index]:
            yield index, name, "this column is named twice; leave one"
    for column in columns:
        partners = [name for name in column.together if name in names]
        if column.name not in names and partners:
            yield (
                None,
                column.name,
                f"missing beside {' and '.join(partners)}; give {', '.join(column.together)} or none",
            )
        elif column.name not in names and column.needed:
            needed = ", ".join(column.name for column in columns if column.needed)
            yield None, column.name, f"this column is missing; needed are {needed}"


def plain_size(path):
    """Size of a plain file [bytes]; InputError where the path is something else, or nothing, or empty."""
    try:
        state = os.stat(path)
    except (OSError, ValueError) as error:
        raise InputError(
            Fault(f"cannot be read: {getattr(error, 'strerror', None) or error}", file=str(path))
        ) from None
    if stat.S_ISDIR(state.st_mode):
        raise InputError(Fault("this is a directory; name a file in it", file=str(path)))
    if not stat.S_ISREG(state.st_mode):
        raise InputError(Fault("this is not a plain file", file=str(path)))
    if not state.st_size:
        raise InputError(Fault("the file is empty", file=str(path)))
    return state.st_size
