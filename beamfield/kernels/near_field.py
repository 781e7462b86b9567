"""Charges near a target cell, pair by pair.

    E_i += q_j (r_i - r_j) / (|r_i - r_j|^2 + a^2)^(3/2)

Most pairs are done in single precision, two to three times as fast as in double. Positions are taken about the centre of the
target cell, in units of about its size, and kept as a sum of two single-precision numbers, 48 bits together, so that
differences are as good as single precision even for close pairs. Where that is not so, because a pair is closer than CLOSE of
the cell or coincides, the field it makes is enormous or not a number; then that group of sources is done again in double
precision. So is a group that reaches far out of the cell.
"""

import numpy as np

from beamfield.kernels.compiled import inner
from beamfield.kernels.extent import LEAST, RADIUS

BLOCK = 32  # targets carried together, and sources to a group
CLOSE = 1e-6  # of the size of the target cell: a pair closer than this is done in double precision
REACH = 1e3  # of that size: sources farther away than this, too
NOTHING = 1e-200  # added to the squared distance: a pair at distance zero adds 0 times a finite number
ONE = np.float32(1.0)


@inner
def add_near(targets, low, high, centre, source, cells, count, cloud2, single, field):
    """field[:, i] += the sum over the places of the first `count` of the cells, for targets low .. high - 1.

    centre is the sheet of the target cell; source has tree, places and sheets.
    """
    tree, sheets = source.tree, source.sheets
    size = max(centre[RADIUS], 1e-100)
    unit = 2.0 ** -np.floor(np.log2(size))
    soft = min(cloud2 * unit * unit, REACH * REACH)
    single = single and centre[RADIUS] > 0.0 and soft < REACH * REACH
    blocks = (high - low + BLOCK - 1) // BLOCK
    x, xs = np.empty((blocks, 3 * BLOCK)), np.empty((blocks, 6 * BLOCK), np.float32)
    s, ss, es = np.empty(4 * BLOCK), np.empty(7 * BLOCK, np.float32), np.empty(3 * BLOCK, np.float32)
    e = np.zeros((blocks, 3 * BLOCK))
    for b in range(blocks):
        first = low + b * BLOCK
        load(targets, 3, first, min(BLOCK, high - first), x[b])
        halves(x[b], centre, unit, xs[b])
    for c in range(count):
        cell = cells[c]
        compact = single and reach(centre, sheets[cell]) < REACH * size
        limit = np.float32(sheets[cell, LEAST] / (CLOSE * CLOSE))
        for first in range(tree.first[cell], tree.last[cell], BLOCK):
            n = min(BLOCK, tree.last[cell] - first)
            load(source.places, 4, first, n, s)
            if compact:
                halves(s, centre, unit, ss)
            for b in range(blocks):
                if compact and pairs_single(xs[b], ss, n, np.float32(soft), limit, es):
                    add(es, unit * unit, e[b])
                else:
                    pairs_double(x[b], s, n, max(cloud2, NOTHING), e[b])
    for b in range(blocks):
        first = low + b * BLOCK
        for d in range(3):
            for k in range(min(BLOCK, high - first)):
                field[d, first + k] += e[b, d * BLOCK + k]


@inner
def load(places, rows, first, count, out):
    """Rows of `count` places, filled up with the last of them."""
    for d in range(rows):
        for k in range(BLOCK):
            out[d * BLOCK + k] = places[d, first + min(k, count - 1)]


@inner
def reach(centre, sheet):
    """How far from the centre a cell extends."""
    x, y, z = sheet[0] - centre[0], sheet[1] - centre[1], sheet[2] - centre[2]
    return np.sqrt(x * x + y * y + z * z) + sheet[RADIUS]


@inner
def halves(x, centre, unit, out):
    """Rows x, y, z from the centre, times unit, as the sum of out's rows 0-2 and 3-5; its row 6, if any, is row 3 of x."""
    for d in range(3):
        for k in range(BLOCK):
            value = (x[d * BLOCK + k] - centre[d]) * unit
            high = np.float32(value)
            out[d * BLOCK + k] = high
            out[(d + 3) * BLOCK + k] = np.float32(value - np.float64(high))
    if out.shape[0] > 6 * BLOCK:
        for k in range(BLOCK):
            out[6 * BLOCK + k] = np.float32(x[3 * BLOCK + k])


@inner
def pairs_single(x, s, count, soft, limit, e):
    """Fill e (3 rows of BLOCK) in single precision; whether no component of it is above the limit or not a number."""
    for k in range(3 * BLOCK):
        e[k] = np.float32(0.0)
    for j in range(count):
        sx, sy, sz = s[j], s[BLOCK + j], s[2 * BLOCK + j]
        tx, ty, tz = s[3 * BLOCK + j], s[4 * BLOCK + j], s[5 * BLOCK + j]
        q = s[6 * BLOCK + j]
        for k in range(BLOCK):
            dx = (x[k] - sx) + (x[3 * BLOCK + k] - tx)
            dy = (x[BLOCK + k] - sy) + (x[4 * BLOCK + k] - ty)
            dz = (x[2 * BLOCK + k] - sz) + (x[5 * BLOCK + k] - tz)
            r2 = dx * dx + dy * dy + dz * dz + soft
            f = q * (ONE / (r2 * np.sqrt(r2)))
            e[k] += f * dx
            e[BLOCK + k] += f * dy
            e[2 * BLOCK + k] += f * dz
    beyond = 0
    for k in range(3 * BLOCK):
        beyond += 0 if abs(e[k]) <= limit else 1
    return beyond == 0


@inner
def add(e, factor, total):
    for k in range(3 * BLOCK):
        total[k] += factor * np.float64(e[k])


@inner
def pairs_double(x, s, count, soft, e):
    """e (3 rows of BLOCK) += the field in double precision."""
    for j in range(count):
        sx, sy, sz, q = s[j], s[BLOCK + j], s[2 * BLOCK + j], s[3 * BLOCK + j]
        for k in range(BLOCK):
            dx = x[k] - sx
            dy = x[BLOCK + k] - sy
            dz = x[2 * BLOCK + k] - sz
            r2 = dx * dx + dy * dy + dz * dz + soft
            f = q * (1.0 / (r2 * np.sqrt(r2)))
            e[k] += f * dx
            e[BLOCK + k] += f * dy
            e[2 * BLOCK + k] += f * dz
