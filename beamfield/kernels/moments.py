"""Moments of every cell, from the leaves up.

    M_j = sum_i q_i (c - r_i)^[j]                  leaf, about its centre c
    M_n = sum over children b of sum_k M_k(b) (c - b)^[n-k]

both folded (expansion.py); a row of moments holds the kept ones, orders 0 .. p-1.
"""

import numpy as np
from numba import prange

from beamfield.kernels.compiled import compiled, inner
from beamfield.kernels.lanes import LANES, add_product, minus_from, row_sum, times


@compiled(parallel=True)
def gather_moments(places, tree, sheets, tables, moments):
    """Fill moments (cells, kept)."""
    for depth in range(tree.level.shape[0] - 2, -1, -1):
        for v in prange(tree.level[depth], tree.level[depth + 1]):
            if tree.child[v] < 0:
                from_places(places, tree.first[v], tree.last[v], sheets[v], tables, moments[v])
            else:
                from_children(tree.child[v], sheets, sheets[v], tables, moments, moments[v])


@inner
def from_places(places, low, high, sheet, tables, out):
    """Fill out with the moments of places low .. high - 1."""
    x, t = np.zeros(4 * LANES), np.empty(tables.power.shape[0] * LANES)
    total = np.zeros(out.shape[0] * LANES)
    for block in range(low, high, LANES):
        for k in range(LANES):
            i = min(block + k, high - 1)
            for d in range(3):
                x[d * LANES + k] = sheet[d] - places[d, i]
            x[3 * LANES + k] = places[3, i] if block + k < high else 0.0
        powers(x, tables.power, tables.inverse, tables.fold, t)
        for i in range(out.shape[0]):
            add_product(total, i * LANES, x, 3 * LANES, t, tables.kept[i])
    for i in range(out.shape[0]):
        out[i] = row_sum(total, i * LANES)


@inner
def from_children(child, sheets, sheet, tables, moments, out):
    """Fill out with the moments of a parent, from rows child and child + 1 of moments."""
    x, t, wide = np.zeros(3 * LANES), np.empty(tables.power.shape[0] * LANES), np.zeros(tables.wide)
    for b in range(2):
        for d in range(3):
            x[d * LANES + b] = sheet[d] - sheets[child + b, d]
    powers(x, tables.power, tables.inverse, tables.fold, t)
    for b in range(2):
        for i in range(tables.convolve.shape[0]):
            wide[tables.convolve[i, 0]] += (
                moments[child + b, tables.convolve[i, 1]] * t[tables.convolve[i, 2] + np.uint64(b)]
            )
    for i in range(tables.moments):
        wide[tables.unfold[i, 1]] -= wide[tables.unfold[i, 0]]
        wide[tables.unfold[i, 2]] -= wide[tables.unfold[i, 0]]
    for i in range(out.shape[0]):
        out[i] = wide[tables.narrow[i]]


@inner
def powers(x, power, inverse, fold, t):
    """Fill t with s^[k] of the LANES vectors s in x (3 rows), folded."""
    for k in range(LANES):
        t[k] = 1.0
    for i in range(1, power.shape[0]):
        times(t, i * LANES, inverse[i], x, power[i, 1], t, power[i, 0])
    for i in range(fold.shape[0]):
        minus_from(t, fold[i, 1], fold[i, 0])
        minus_from(t, fold[i, 2], fold[i, 0])
