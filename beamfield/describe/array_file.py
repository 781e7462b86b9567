"""Tables as numpy keeps them: an .npz archive with one array a column."""

import numpy as np

from beamfield.describe.columns import Table, name_faults, plain_size
from beamfield.errors import Fault, InputError


def read_arrays(path, columns):
    """Table of the columns that an .npz archive has, each an array (N,) of real numbers.

    path      of the archive; nothing in it is ever executed
    columns   the Column objects that it may have

    Raises InputError with a fault for each thing wrong.
    """
    plain_size(path)
    values = _arrays(path, columns)
    _refuse([(name, message) for name, array in values.items() if (message := _complaint(array, values))], path)
    table = Table(str(path), {name: array.astype(float) for name, array in values.items()}, lambda c: _located(c, path))
    table.check(columns)
    return table


def _arrays(path, columns):
    try:
        with open(path, "rb") as handle, np.load(handle, allow_pickle=False) as archive:
            _refuse([(name, message) for _, name, message in name_faults(archive.files, columns)], path)
            return {name: archive[name] for name in archive.files}
    except InputError:
        raise
    except Exception:  # a torn archive raises whatever its pieces suggest
        message = "this is no .npz archive of plain arrays; write it with numpy.savez(file, x=x, y=y, z=z)"
        raise InputError(Fault(message, file=str(path))) from None


def _complaint(array, values):
    if array.dtype.kind not in "fiu":
        return f"holds {array.dtype.name}; give real numbers"
    if array.ndim != 1:
        return f"has shape {array.shape}; give one number a particle"
    longest = max(values, key=lambda name: values[name].size)
    if len(array) != values[longest].size:
        return f"has {len(array)} values, {longest} has {values[longest].size}"
    return ""


def _refuse(complaints, path):
    if complaints:
        raise InputError(*(Fault(message, name, file=str(path)) for name, message in complaints))


def _located(complaints, path):
    return [Fault(message, f"{name}[{row}]", file=str(path)) for row, name, message in complaints]
