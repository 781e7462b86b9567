"""How large each cell is, in the measures that the error of an expansion depends on.

A row of the sheets says of a cell c of n places r_i with charges q_i:

    centre    c = sum |q_i| r_i / sum |q_i|                   columns 0, 1, 2
    radius    max |r_i - c|                                   RADIUS
    size      (mean |r_i - c|^p)^(1/p), p the order           SIZE
    strength  sqrt(Q^2 + sum q_i^2), Q = sum q_i              STRENGTH    what its field scales with, whatever the signs
    least     min |q_i| of those that are not nearly zero     LEAST
    count     n                                               COUNT

Small cells are measured place by place, larger ones through their children, which overestimates radius and size a little.
"""

import numpy as np
from numba import prange

from beamfield.kernels.compiled import compiled, inner

RADIUS, SIZE, STRENGTH, LEAST, COUNT, COLUMNS = 3, 4, 5, 6, 7, 8
EXACT = 1024  # places up to which a cell is measured place by place
FAINT = 1e-30  # weight of a charge of zero beside the largest charge, which is 1
TINY = 1e-12  # nearly zero, beside the same


@compiled(parallel=True)
def measure(places, tree, order, sheets):
    """Fill sheets (cells, COLUMNS)."""
    sums = np.zeros((sheets.shape[0], 3))
    for depth in range(tree.level.shape[0] - 2, -1, -1):
        for v in prange(tree.level[depth], tree.level[depth + 1]):
            weigh(places, tree, v, sums, sheets)
            if tree.child[v] < 0 or tree.last[v] - tree.first[v] <= EXACT:
                by_places(places, tree.first[v], tree.last[v], order, sheets[v])
            else:
                by_children(tree.child[v], order, sheets, sheets[v])


@inner
def weigh(places, tree, v, sums, sheets):
    """Sums of |q|, q and q^2, and from them centre, strength, least and count."""
    low, high, c = tree.first[v], tree.last[v], tree.child[v]
    sheet, total = sheets[v], sums[v]
    sheet[LEAST], sheet[COUNT] = 1.0, high - low
    if c < 0:
        for i in range(low, high):
            q = places[3, i]
            weight = abs(q) + FAINT
            total[0], total[1], total[2] = total[0] + weight, total[1] + q, total[2] + q * q
            sheet[LEAST] = min(sheet[LEAST], weight if weight > TINY else 1.0)
            for d in range(3):
                sheet[d] += weight * places[d, i]
    else:
        for b in range(c, c + 2):
            for k in range(3):
                total[k] += sums[b, k]
                sheet[k] += sums[b, 0] * sheets[b, k]
            sheet[LEAST] = min(sheet[LEAST], sheets[b, LEAST])
    for d in range(3):
        sheet[d] = places[d, low] if high == low + 1 else sheet[d] / total[0]
    sheet[STRENGTH] = np.sqrt(total[1] * total[1] + total[2])


@inner
def power(x, n):
    """x^n for a whole number n >= 0."""
    result = 1.0
    while n:
        if n & 1:
            result *= x
        x *= x
        n >>= 1
    return result


@inner
def by_places(places, low, high, order, sheet):
    """Radius and size from the places."""
    farthest = total = 0.0
    for i in range(low, high):
        x, y, z = places[0, i] - sheet[0], places[1, i] - sheet[1], places[2, i] - sheet[2]
        farthest = max(farthest, x * x + y * y + z * z)
    for i in range(low, high if farthest > 0.0 else low):
        x, y, z = places[0, i] - sheet[0], places[1, i] - sheet[1], places[2, i] - sheet[2]
        share = (x * x + y * y + z * z) / farthest
        total += power(share, order >> 1) * (np.sqrt(share) if order & 1 else 1.0)
    sheet[RADIUS] = np.sqrt(farthest)
    sheet[SIZE] = sheet[RADIUS] * (total / (high - low)) ** (1.0 / order)


@inner
def by_children(child, order, sheets, sheet):
    """Upper bounds of radius and size from those of the children, which the triangle inequality allows."""
    total = 0.0
    for b in range(child, child + 2):
        x, y, z = sheets[b, 0] - sheet[0], sheets[b, 1] - sheet[1], sheets[b, 2] - sheet[2]
        distance = np.sqrt(x * x + y * y + z * z)
        sheet[RADIUS] = max(sheet[RADIUS], distance + sheets[b, RADIUS])
    for b in range(child, child + 2):
        x, y, z = sheets[b, 0] - sheet[0], sheets[b, 1] - sheet[1], sheets[b, 2] - sheet[2]
        distance = np.sqrt(x * x + y * y + z * z)
        total += sheets[b, COUNT] * power((distance + sheets[b, SIZE]) / sheet[RADIUS], order)
    sheet[SIZE] = sheet[RADIUS] * (total / sheet[COUNT]) ** (1.0 / order)
