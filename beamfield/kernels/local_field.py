"""Local coefficients of a target cell: from its parent, from far sources, and to the field at its points.

    L'_n = sum_k L_{n+k} s^[k]          about a centre displaced by s
    E_e(s) = - sum_k L_{k+e} s^[k]      e one of x, y, z

A Bench is what one task works with: one batch of LANES far sources and the coefficients of each level above its cell.
"""

from typing import NamedTuple

import numpy as np

from beamfield.kernels.compiled import inner
from beamfield.kernels.far_field import contract, derivatives
from beamfield.kernels.lanes import LANES, add_scaled, row_sum
from beamfield.kernels.moments import powers


class Bench(NamedTuple):
    """x (4 rows), m (kept + 1), d (wide + 1), base (p + 2), o (local), t (full), f (3 rows): flat, LANES a row, the last
    row of m and of d zero; local (depth, wide)."""

    x: np.ndarray
    m: np.ndarray
    d: np.ndarray
    base: np.ndarray
    o: np.ndarray
    t: np.ndarray
    f: np.ndarray
    local: np.ndarray


@inner
def bench(tables, depth):
    """A Bench for one order and a tree of some depth."""
    kept, wide, full = tables.kept.shape[0], tables.wide, tables.power.shape[0]
    return Bench(
        np.zeros(4 * LANES),
        np.zeros((kept + 1) * LANES),
        np.zeros((wide + 1) * LANES),
        np.zeros((tables.level.shape[0] + 1) * LANES),
        np.zeros(tables.local.shape[0] * LANES),
        np.zeros(full * LANES),
        np.zeros(3 * LANES),
        np.zeros((depth, wide)),
    )


@inner
def inherit(work, tables, depth, parent, sheet):
    """Fill row depth of local from the row before, which belongs to the cell of sheet `parent`."""
    work.local[depth, :] = 0.0
    for d in range(3):
        work.x[d * LANES] = sheet[d] - parent[d]
    powers(work.x, tables.power, tables.inverse, tables.fold, work.t)
    for i in range(tables.shift.shape[0]):
        work.local[depth, tables.shift[i, 0]] += work.local[depth - 1, tables.shift[i, 1]] * work.t[tables.shift[i, 2]]


@inner
def take_cell(work, lane, sheet, source, moments):
    """Put a source cell into a lane of the batch."""
    for d in range(3):
        work.x[d * LANES + lane] = sheet[d] - source[d]
    for i in range(moments.shape[0]):
        work.m[i * LANES + lane] = moments[i]


@inner
def take_place(work, lane, sheet, places, i):
    """Put a single charge into a lane of the batch."""
    for d in range(3):
        work.x[d * LANES + lane] = sheet[d] - places[d, i]
    work.m[lane] = places[3, i]
    for k in range(lane + LANES, work.m.shape[0], LANES):
        work.m[k] = 0.0


@inner
def finish_batch(work, tables, lanes, cloud2):
    """Add the first `lanes` lanes of the batch to the sum over sources."""
    for lane in range(lanes, LANES):
        work.x[lane] = 1.0
        for k in range(lane, work.m.shape[0], LANES):
            work.m[k] = 0.0
    derivatives(work.x, cloud2, tables, work.base, work.d)
    contract(tables.contract, tables.contract.shape[0], work.d, work.m, work.o)


@inner
def finish_cell(work, tables, depth):
    """Move the sum over sources into row depth of local, and complete that row."""
    local = work.local[depth]
    for i in range(tables.local.shape[0]):
        local[tables.local[i]] += row_sum(work.o, i * LANES)
    for k in range(work.o.shape[0]):
        work.o[k] = 0.0
    for i in range(tables.unfold.shape[0]):
        local[tables.unfold[i, 0]] = -local[tables.unfold[i, 1]] - local[tables.unfold[i, 2]]


@inner
def field_at_places(work, tables, depth, sheet, places, low, high, field):
    """field[:, i] += the field of the local coefficients at places low .. high - 1."""
    for block in range(low, high, LANES):
        here = min(LANES, high - block)
        for d in range(3):
            for k in range(LANES):
                work.x[d * LANES + k] = places[d, block + min(k, here - 1)] - sheet[d]
                work.f[d * LANES + k] = 0.0
        powers(work.x, tables.power, tables.inverse, tables.fold, work.t)
        for d in range(3):
            for i in range(tables.kept.shape[0]):
                add_scaled(work.f, d * LANES, -work.local[depth, tables.gradient[d, i]], work.t, tables.kept[i])
        give(work.f, block, here, 1.0, field)


@inner
def give(rows, first, count, factor, field):
    for d in range(3):
        for k in range(count):
            field[d, first + k] += factor * rows[d * LANES + k]


@inner
def field_of_cell(work, tables, source, moments, places, low, high, cloud2, field):
    """field[:, i] += the field of a far cell at places low .. high - 1, one by one: E_e = - sum_j D_{j+e} M_j."""
    for i in range(moments.shape[0]):
        for k in range(LANES):
            work.m[i * LANES + k] = moments[i]
    for block in range(low, high, LANES):
        here = min(LANES, high - block)
        for d in range(3):
            for k in range(LANES):
                work.x[d * LANES + k] = places[d, block + min(k, here - 1)] - source[d]
                work.f[d * LANES + k] = 0.0
        derivatives(work.x, cloud2, tables, work.base, work.d)
        contract(tables.contract, tables.forces, work.d, work.m, work.f)
        give(work.f, block, here, -1.0, field)
