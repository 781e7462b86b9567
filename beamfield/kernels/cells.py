"""A binary tree over points, that any arrangement of them may grow: spheres, needles, halos, clusters, coincident points.

A cell is cut across the longest side of its box, at the median rounded to whole leaves, so that nearly all leaves are full;
but no nearer to an end than a tenth of the side. The second rule keeps sparse surroundings apart from a dense core and makes
the cells small where the points are close: the heavier part then shrinks by ten, so depth grows with the logarithm of
number and of range. Points that coincide cannot be cut; such a pile becomes one place with the sum of their charges.

Sources: P. B. Callahan, S. R. Kosaraju, J. ACM 42 (1995) 67, for cuts that keep a fair share of the side, from memory.
"""

from typing import NamedTuple

import numpy as np
from numba import prange

from beamfield.kernels.compiled import compiled, inner

SHARE = 0.1  # of the side of a box that either part keeps at least
LEAF, PILE = -1, -2  # what a cell may be instead of cut
SAMPLE = 63  # values that a pivot is chosen from


class Tree(NamedTuple):
    """Cells, level by level from the root, which is cell 0; all arrays of indices.

    first, last  places of a cell: first .. last - 1
    child        first of two children, which are neighbours; -1 for a leaf
    parent       -1 for the root
    level        first cell of each level, and behind the last
    """

    first: np.ndarray
    last: np.ndarray
    child: np.ndarray
    parent: np.ndarray
    level: np.ndarray


def plant(positions, charges, leaf, unit=1.0):
    """Tree of leaves of at most `leaf` places, places (4, n) as x, y, z and charge, and the place of each point (N,).

    positions (3, N) are taken in multiples of unit, a power of two, so that nothing is rounded; charges (N,).
    """
    points = np.empty((positions.shape[1], 4))
    np.multiply(positions.T, 1.0 / unit, out=points[:, :3])
    points[:, 3] = np.arange(positions.shape[1])
    rows, end, child, parent, level = grow(points, leaf)
    number = points[:, 3].astype(np.int64)
    first, last = settle(rows, end, child)
    places = np.empty((4, last[0]))
    place = np.empty(len(number), np.int64)
    if len(number) == last[0]:
        places[:3], places[3] = points[:, :3].T, charges[number]
        place[number] = np.arange(len(number))
    else:
        begin = first_of_places(rows, end, child)
        places[:3], places[3] = points[begin, :3].T, np.add.reduceat(charges[number], begin)
        place[number] = np.repeat(np.arange(len(begin)), np.diff(begin, append=len(number)))
    return Tree(first, last, np.maximum(child, LEAF), parent, level), places, place


def first_of_places(rows, end, child):
    """The first row of each place: every row, but only the first one of a pile."""
    alone = np.zeros(end[0], np.int64)
    alone[rows[child == PILE]] += 1
    last = end[child == PILE]
    alone[last[last < len(alone)]] -= 1
    inside = np.cumsum(alone) > 0
    inside[rows[child == PILE]] = False
    return np.flatnonzero(~inside)


@compiled(parallel=True)
def grow(points, leaf):
    """Sort the points into cells; rows, end, child, parent of each cell, and the levels."""
    rows, end = np.zeros(64, np.int64), np.zeros(64, np.int64)
    child, parent = np.zeros(64, np.int64), np.zeros(64, np.int64)
    end[0], parent[0] = points.shape[0], -1
    level = [0]
    low, high = 0, 1
    while high > low:
        level.append(high)
        need = high + 2 * (high - low)
        rows, end, child, parent = longer(rows, need), longer(end, need), longer(child, need), longer(parent, need)
        for v in prange(low, high):
            child[v] = divide(points, rows[v], end[v], leaf)
        count = high
        for v in range(low, high):
            middle = child[v]
            if middle >= 0:
                child[v] = count
                parent[count], parent[count + 1] = v, v
                rows[count], end[count], rows[count + 1], end[count + 1] = rows[v], middle, middle, end[v]
                count += 2
        low, high = high, count
    return rows[:low].copy(), end[:low].copy(), child[:low].copy(), parent[:low].copy(), np.array(level)


@inner
def longer(array, need):
    """The array, or a copy of at least twice its length where it is shorter than needed."""
    if need <= array.shape[0]:
        return array
    copy = np.zeros(max(need, 2 * array.shape[0]), np.int64)
    copy[: array.shape[0]] = array
    return copy


@inner
def divide(points, low, high, leaf):
    """Sort rows low .. high - 1 into two parts; where the second begins, or else LEAF or PILE."""
    axis, bottom, top = longest_side(points, low, high)
    if bottom == top:
        return PILE
    if high - low <= leaf:
        return LEAF
    middle = low + leaf * (((high - low + leaf - 1) // leaf + 1) // 2)
    select(points, low, high, middle, axis)
    share = SHARE * (top - bottom)
    if points[middle, axis] < bottom + share:
        return cut(points, low, high, axis, bottom + share if bottom + share > bottom else top)
    if points[middle, axis] > top - share:
        return cut(points, low, high, axis, top - share if top - share > bottom else top)
    return middle


@inner
def longest_side(points, low, high):
    """Axis, lower and upper end of the longest side of the box about rows low .. high - 1."""
    x, y, z = points[low, 0], points[low, 1], points[low, 2]
    left, right, down, up, back, front = x, x, y, y, z, z
    for i in range(low, high):
        x, y, z = points[i, 0], points[i, 1], points[i, 2]
        left, right = min(left, x), max(right, x)
        down, up = min(down, y), max(up, y)
        back, front = min(back, z), max(front, z)
    if right - left >= max(up - down, front - back):
        return 0, left, right
    return (1, down, up) if up - down >= front - back else (2, back, front)


@inner
def swap(points, i, j):
    for d in range(4):
        points[i, d], points[j, d] = points[j, d], points[i, d]


@inner
def cut(points, low, high, axis, value):
    """Rows below the value first; where the others begin."""
    i, j = low, high - 1
    while True:
        while i <= j and points[i, axis] < value:
            i += 1
        while i <= j and not points[j, axis] < value:
            j -= 1
        if i >= j:
            return i
        swap(points, i, j)


@inner
def select(points, low, high, k, axis):
    """Rows low .. k - 1 no greater than row k, rows behind it no smaller: C. A. R. Hoare's FIND, pivot from a sample."""
    i, j = low, high - 1
    while j > i:
        pivot = choose(points, i, j, k, axis)
        a, b = i, j
        while a <= b:
            while points[a, axis] < pivot:
                a += 1
            while points[b, axis] > pivot:
                b -= 1
            if a <= b:
                swap(points, a, b)
                a += 1
                b -= 1
        if k <= b:
            j = b
        elif k >= a:
            i = a
        else:
            return


@inner
def choose(points, i, j, k, axis):
    """A value of rows i .. j that should stand near row k."""
    if j - i < 10 * SAMPLE:
        a, b, c = points[i, axis], points[(i + j) // 2, axis], points[j, axis]
        return max(min(a, b), min(max(a, b), c))
    sample = np.empty(SAMPLE)
    step = (j - i) // SAMPLE
    for s in range(SAMPLE):
        sample[s] = points[i + s * step, axis]
    sort(sample)
    return sample[min((k - i) * SAMPLE // (j - i + 1), SAMPLE - 1)]


@inner
def sort(values):
    """Insertion sort of a few values."""
    for i in range(1, values.shape[0]):
        value, j = values[i], i
        while j > 0 and values[j - 1] > value:
            values[j] = values[j - 1]
            j -= 1
        values[j] = value


@compiled()
def settle(rows, end, child):
    """Places first .. last - 1 of each cell: as many as points, but one for a pile."""
    first, last = np.zeros(rows.shape[0], np.int64), np.zeros(rows.shape[0], np.int64)
    for v in range(rows.shape[0] - 1, -1, -1):
        if child[v] >= 0:
            last[v] = last[child[v]] + last[child[v] + 1]
        else:
            last[v] = 1 if child[v] == PILE else end[v] - rows[v]
    for v in range(rows.shape[0]):
        if child[v] >= 0:
            first[child[v]] = first[v]
            first[child[v] + 1] = first[v] + last[child[v]]
        last[v] += first[v]
    return first, last
