"""How large each cell is, in the measures that the error of an expansion depends on.

A row of the sheet of a cell: centre (3), radius, strength, least, W_0 .. W_p.

    centre    mean of its places, weighted with |q|
    radius    of a ball about the centre that holds all places
    strength  sqrt(Q^2 + sum q^2): the charge that its far field scales with, whatever the mix of signs
    least     smallest |q| that is not nearly zero
    W_k       mean |r - centre|^k over its places

Small cells are measured place by place; larger ones through their children, which overestimates radius and W_k a little.
"""

import numpy as np
from numba import prange

from beamfield.kernels.compiled import compiled

RADIUS, STRENGTH, LEAST, SPREAD = 3, 4, 5, 6  # columns of a sheet; W_k stands in column SPREAD + k
EXACT = 1024  # places up to which a cell is measured place by place
TINY = 1e-12  # nearly zero, beside the largest charge, which is 1
FAINT = 1e-30  # weight of a charge of zero beside the largest, which is 1


@compiled(parallel=True)
def measure(places, tree, binomial, sheets):
    """Fill sheets (cells, SPREAD + p + 1); binomial (p + 1, p + 1), its last row sets p."""
    sums = np.zeros((sheets.shape[0], 3))
    for depth in range(tree.level.shape[0] - 2, -1, -1):
        for v in prange(tree.level[depth], tree.level[depth + 1]):
            total(places, tree, v, sums, sheets)
            if tree.child[v] < 0 or tree.last[v] - tree.first[v] <= EXACT:
                by_places(places, tree.first[v], tree.last[v], sheets[v])
            else:
                by_children(tree, v, binomial, sheets)


@compiled()
def total(places, tree, v, sums, sheets):
    """Sums of |q|, q and q^2, and from them centre and strength."""
    low, high, c = tree.first[v], tree.last[v], tree.child[v]
    sheets[v, LEAST] = 1.0
    for i in range(low, high if c < 0 else low):
        weight = abs(places[3, i]) + FAINT
        sums[v, 0] += weight
        if weight > TINY:
            sheets[v, LEAST] = min(sheets[v, LEAST], weight)
        sums[v, 1] += places[3, i]
        sums[v, 2] += places[3, i] * places[3, i]
        for d in range(3):
            sheets[v, d] += weight * places[d, i]
    for b in range(c, c + 2 if c >= 0 else c):
        for k in range(3):
            sums[v, k] += sums[b, k]
        sheets[v, LEAST] = min(sheets[v, LEAST], sheets[b, LEAST])
        for d in range(3):
            sheets[v, d] += sums[b, 0] * sheets[b, d]
    for d in range(3):
        sheets[v, d] = places[d, low] if high == low + 1 else sheets[v, d] / sums[v, 0]
    sheets[v, STRENGTH] = np.sqrt(sums[v, 1] * sums[v, 1] + sums[v, 2])


@compiled()
def by_places(places, low, high, sheet):
    """Radius and W_k from the places."""
    farthest = 0.0
    for i in range(low, high):
        x, y, z = places[0, i] - sheet[0], places[1, i] - sheet[1], places[2, i] - sheet[2]
        distance = np.sqrt(x * x + y * y + z * z)
        farthest = max(farthest, distance)
        power = 1.0 / (high - low)
        for k in range(SPREAD, sheet.shape[0]):
            sheet[k] += power
            power *= distance
    sheet[RADIUS] = farthest


@compiled()
def by_children(tree, v, binomial, sheets):
    """Radius and W_k from those of the children: |r - c|^k <= (|r - b| + |b - c|)^k, b the centre of the child."""
    for b in range(tree.child[v], tree.child[v] + 2):
        x, y, z = sheets[b, 0] - sheets[v, 0], sheets[b, 1] - sheets[v, 1], sheets[b, 2] - sheets[v, 2]
        distance = np.sqrt(x * x + y * y + z * z)
        sheets[v, RADIUS] = max(sheets[v, RADIUS], distance + sheets[b, RADIUS])
        share = (tree.last[b] - tree.first[b]) / (tree.last[v] - tree.first[v])
        for k in range(binomial.shape[0]):
            power = share
            for j in range(k, -1, -1):
                sheets[v, SPREAD + k] += binomial[k, j] * sheets[b, SPREAD + j] * power
                power *= distance
