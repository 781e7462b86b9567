"""The optics of a ring as a table: s, beta_x, beta_y, perhaps dispersion_x, round the ring.

Between its rows beta is taken to run straight, and from the last row on to the first. What no ring can have is refused:
a place passed twice with different optics, an end that does not meet the beginning, half a ring and more without a row.
"""

from pathlib import Path

import numpy as np

from beamfield.beam.ring import Optics
from beamfield.describe.columns import Column
from beamfield.describe.table_file import read_table
from beamfield.errors import Fault, InputError

BETAS, DISPERSION = ("beta_x", "beta_y"), "dispersion_x"
_CLOSING = 0.01  # relative change of optics at one place that still counts as rounding
_LONGEST_GAP = 0.4999  # of the circumference
_ROUNDING = 1e-6  # of the circumference, by which the last row may lie beyond it
_ONE_PLACE = 1e-9  # of the circumference


def _columns(circumference):
    longest = circumference * (1.0 + _ROUNDING)
    beyond = f"is not on the ring, 0 to {circumference:g} m; correct it or the circumference"
    return (
        Column("s", ("m",), allowed=lambda s: (s >= 0.0) & (s <= longest), rule=beyond),
        *(Column(name, ("m",), allowed=lambda v: v > 0.0, rule="is not above 0, as every beta is") for name in BETAS),
        Column(DISPERSION, ("m",), needed=False),
    )


def read(path, circumference):
    """Optics of a text file with columns s, beta_x, beta_y and perhaps dispersion_x [m], else 0, in the order of s.

    path           of the table; s may repeat where the optics do not change
    circumference  of the ring [m]

    The weights are those of the trapezoidal rule round the ring. Raises InputError with a located fault for each thing
    wrong, ten at most.
    """
    table = read_table(path, _columns(circumference))
    if not table.values["s"].size:
        raise InputError(Fault("a header alone; give the optics round the ring, a row for each place", file=table.file))
    table.values.setdefault(DISPERSION, np.zeros(len(table.values["s"])))
    table.refuse(_misplaced(table.values))
    table.refuse(_uncovered(table.values["s"], circumference))
    table.refuse(_unsteady(table.values, circumference))
    s, beta_x, beta_y, dispersion_x = (table.values[name] for name in ("s", *BETAS, DISPERSION))
    return Optics(s, beta_x, beta_y, dispersion_x, ring_weights(s, circumference), Path(path).name)


def ring_weights(s, circumference):
    """Weights (K,) of places s (K,) in ascending order round a ring [m], trapezoidal rule, sum 1."""
    gaps = _gaps(s, circumference)
    return (gaps + np.roll(gaps, 1)) / (2.0 * gaps.sum())


def _gaps(s, circumference):
    """Distance (K,) from each place to the next, from the last to the first [m]."""
    return np.maximum(np.diff(s, append=s[:1] + circumference), 0.0)


def _misplaced(values):
    """Complaints of rows that lie behind the row before."""
    s = values["s"]
    for row in np.flatnonzero(np.diff(s) < 0.0) + 1:
        yield row, "s", f"{s[row]:g} comes after {s[row - 1]:g}; order the rows along the ring"


def _unsteady(values, circumference):
    """Complaints of optics that differ at one place: rows of the same s, and both ends of a full turn."""
    gaps = _gaps(values["s"], circumference)
    same = np.flatnonzero(gaps <= _ONE_PLACE * circumference)
    for name in (*BETAS, DISPERSION):
        here, after = values[name], np.roll(values[name], -1)
        allowed = _CLOSING * (np.maximum(here, after) if name in BETAS else np.abs(here).max())
        for row in same[np.abs(after - here)[same] > np.broadcast_to(allowed, here.shape)[same]]:
            yield _unsteady_at(row, name, values)


def _unsteady_at(row, name, values):
    here, s = values[name], values["s"]
    if row + 1 < len(s):
        return (
            row + 1,
            name,
            f"jumps from {here[row]:g} to {here[row + 1]:g} at s = {s[row]:g} m, where it is one value",
        )
    return row, name, f"ends at {here[row]:g} but began at {here[0]:g}; a ring closes, within {_CLOSING:.0%}"


def _uncovered(s, circumference):
    """Complaints of a stretch too long to be taken as straight."""
    gaps = _gaps(s, circumference)
    row = int(gaps.argmax())
    if gaps[row] > _LONGEST_GAP * circumference:
        stretch = f"{gaps[row]:g} m of {circumference:g} m without a row from here on"
        yield row, "s", f"{stretch}; give the optics all round the ring, every period of it"
