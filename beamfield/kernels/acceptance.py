"""When an expansion may stand for the charges of a cell: how good it is, and whether it is worth while."""

import numpy as np

from beamfield.kernels.compiled import inner
from beamfield.kernels.extent import COUNT, RADIUS, SIZE, STRENGTH, power

TOUCH = 1.2  # radii of two far cells together, at most, over their distance
LARGE = 2.0  # ratio of the sizes of two cells of which one is large beside the other


@inner
def distance2(sheet, other):
    x, y, z = sheet[0] - other[0], sheet[1] - other[1], sheet[2] - other[2]
    return x * x + y * y + z * z


@inner
def accepted(size, radius, r2, charge, rules):
    """Whether an expansion is good enough at squared distance r2 = R^2, for cells whose sizes and radii add up to these.

    The first order that is dropped is of relative size e = sum_k (p over k) <s_B^k> <s_A^{p-k}> / R^p, the s the distances of
    places from the centre of their cell (W. Dehnen, Comput. Astrophys. Cosmol. 1:1 (2014), from memory); by Hoelder's
    inequality e <= (size / R)^p. The field itself is f = charge / (R^2 F) of the typical one, F. Demanded is

        e sqrt(f) < tolerance:

    strong sources are taken more exactly than weak ones, since many errors add up at random. Radii must not reach far over
    the distance, so that the series converges; with a cloud, R^2 + a^2 stands for R^2, as its singularity is there.
    """
    r2 += rules.cloud2
    if not radius * radius < TOUCH * TOUCH * r2:
        return False
    return power(size * size / r2, rules.order) * charge < rules.limit * r2


@inner
def is_apart(places, low, high, sheet, other, rules):
    """Whether a far expansion of cell B is good, and worth while, at each place of the leaf A."""
    if other[COUNT] <= rules.ranked or not sheet[SIZE] > LARGE * other[SIZE]:
        return False
    return accepted(other[SIZE], other[RADIUS], nearest2(places, low, high, other), other[STRENGTH], rules)


@inner
def is_loose(places, low, high, sheet, other, rules):
    """Whether each charge of the leaf B alone is far from the cell A, and worth while."""
    if sheet[COUNT] <= rules.pairs or not other[SIZE] > LARGE * sheet[SIZE]:
        return False
    return accepted(sheet[SIZE], sheet[RADIUS], nearest2(places, low, high, sheet), other[STRENGTH], rules)


@inner
def nearest2(places, low, high, sheet):
    """Squared distance of the nearest of some places from the centre of a cell."""
    nearest = np.inf
    for i in range(low, high):
        x, y, z = places[0, i] - sheet[0], places[1, i] - sheet[1], places[2, i] - sheet[2]
        nearest = min(nearest, x * x + y * y + z * z)
    return nearest
