"""Index tables of the Cartesian Taylor expansions, for one order p.

A source cell about its centre c, a target cell about its centre t, X = t - c:

    M_j = sum_i q_i (c - r_i)^[j]                    moments, orders 0 .. p-1
    D_n = d^n/dX^n (|X|^2 + a^2)^(-1/2)              derivatives, orders 0 .. p
    L_n = sum over sources of sum_j D_{n+j} M_j      local coefficients, orders 1 .. p, with |n| + |j| <= p
    E_e(t + s) = - sum_k L_{k+e} s^[k]               e one of x, y, z

n, j, k are triples of exponents and s^[k] = s_x^k_x s_y^k_y s_z^k_z / (k_x! k_y! k_z!). The last line has the form of the
third, and so has the shift of the L to a child cell, L_n(t + s) = sum_k L_{n+k} s^[k]: one list of products serves all.

Folding. For a bare charge (a = 0) D and L are derivatives of a harmonic function, so that

    D_{a,b,c+2} = - D_{a+2,b,c} - D_{a,b+2,c}

and whatever multiplies them, M_j or s^[k], may be folded: the coefficient of z^2 is taken from those of x^2 and of y^2.
Then only exponents of z of 0 and 1 are kept: 2n+1 numbers in order n, as few as with spherical harmonics, and no more
than z^2 is ever met in D and L. With a cloud (a > 0) nothing is folded and all exponents are kept.

Sources: W. Dehnen, Comput. Astrophys. Cosmol. 1:1 (2014), for the expansions; the folding follows from Laplace's equation.
"""

from functools import lru_cache
from typing import NamedTuple

import numpy as np

from beamfield.kernels.lanes import LANES

STEP = 4  # products summed before they are stored
AXES = ((1, 0, 0), (0, 1, 0), (0, 0, 1))


class Tables(NamedTuple):
    """What the kernels need to know about one order. Rows are numbers in the list of exponents named; `at` is a row times
    LANES, where it begins in a flat array of LANES numbers a row.

    full   all exponents,                            orders 0 .. p-1     of s^[k] before folding
    kept   exponent of z at most 1 (cloud: any),     orders 0 .. p-1     of M and of s^[k]
    wide   exponent of z at most 2 (cloud: any),     orders 0 .. p       of D and L
    local  exponent of z at most 1 (cloud: any),     orders 1 .. p       of the sum over sources

    power     (full, 2)        s^[k] from an earlier one: full at, axis at
    inverse   (full,)          ... times the coordinate, times this
    fold      (., 3)           full at: subtract the first from the others
    kept      (kept,)          full at
    convolve  (., 3)           M'_{n+k} += M_n s^[k]: wide row, kept row, full at
    unfold    (., 3)           wide rows: M of the last two -= first; L and D of the first = - both others, lowest z first
    unfold_at (., 3)           the same as at
    moments   ()               how many of the rows of unfold belong to moments
    narrow    (kept,)          wide row
    factor    (p + 1,)         (-1)^m (2m - 1)!!, see climbing
    climb     (., 4)           derivatives: wide at, wide at one lower, axis at, wide at two lower
    weight    (.,)             ... factor of the one two lower
    level     (p + 1,)         where each sweep of climb begins
    contract  (., 1 + 2 STEP)  O_n += D_{n+j} M_j: local at, STEP wide at, STEP kept at, filled up with a row of zeros
    forces    ()               how many rows of contract belong to order 1, which makes the field
    local     (local,)         wide row
    shift     (., 3)           L'_n += L_{n+k} s^[k]: wide row, wide row, full at
    gradient  (3, kept)        wide row of k + e
    wide      ()               how many wide rows
    """

    power: np.ndarray
    inverse: np.ndarray
    fold: np.ndarray
    kept: np.ndarray
    convolve: np.ndarray
    unfold: np.ndarray
    unfold_at: np.ndarray
    narrow: np.ndarray
    factor: np.ndarray
    climb: np.ndarray
    weight: np.ndarray
    level: np.ndarray
    contract: np.ndarray
    local: np.ndarray
    shift: np.ndarray
    gradient: np.ndarray
    moments: int
    forces: int
    wide: int


def exponents(first, last, highest_z):
    """Triples of orders first .. last with z to at most highest_z, order by order."""
    return [
        (x, n - x - z, z)
        for n in range(first, last + 1)
        for z in range(min(n, highest_z) + 1)
        for x in range(n - z, -1, -1)
    ]


def kept_rows(order, folded):
    """How many moments a cell has."""
    return order * order if folded else order * (order + 1) * (order + 2) // 6


def add(*triples):
    return tuple(sum(parts) for parts in zip(*triples, strict=True))


def minus(k, e):
    return tuple(a - b for a, b in zip(k, e, strict=True))


def rows(triples):
    """Number of each triple."""
    return {k: i for i, k in enumerate(triples)}


def unsigned(values, columns, scale=1):
    """Rows of indices; unsigned, which spares the loops the test for a negative index."""
    return (np.array(values, np.int64).reshape(-1, columns) * scale).astype(np.uint64)


def folding(triples):
    """Rows (of k, of k + 2x - 2z, of k + 2y - 2z) for each k with z^2 or more, lowest z first, then lowest order."""
    at = rows(triples)
    high = sorted((k for k in triples if k[2] > 1), key=lambda k: (k[2], sum(k)))
    return [(at[k], at[add(k, (2, 0, -2))], at[add(k, (0, 2, -2))]) for k in high]


def climbing(order, triples, at):
    """Steps of R^m_{k} = X_e R^{m+1}_{k-e} + (k_e - 1) R^{m+1}_{k-2e} from m = order - 1 down to 0, in place.

    R^m_0 = (d / d(r^2/2))^m (r^2 + a^2)^{-1/2}; R^0 are the derivatives. High orders go first, for they need lower ones of
    the sweep before. The axis is one with exponent 1 where there is one, as that spares the second term.
    Source: L. E. McMurchie, E. R. Davidson, J. Comput. Phys. 26 (1978) 218, from memory of the paper.
    """
    steps, weights, level = [], [], [0]
    for m in range(order - 1, -1, -1):
        for k in sorted((k for k in triples if 0 < sum(k) <= order - m), key=lambda k: -sum(k)):
            axis = min((d for d in range(3) if k[d]), key=lambda d: k[d])
            lower = minus(k, AXES[axis])
            lowest = minus(lower, AXES[axis])
            steps.append((at[k], at[lower], axis, at.get(lowest, 0)))
            weights.append(float(lower[axis]))
        level.append(len(steps))
    return steps, weights, level


def in_steps(products, zero_wide, zero_kept):
    """Rows of STEP products of one local coefficient each."""
    lines = []
    for n in sorted({p[0] for p in products}):
        pairs = [p[1:] for p in products if p[0] == n]
        pairs += [(zero_wide, zero_kept)] * (-len(pairs) % STEP)
        for i in range(0, len(pairs), STEP):
            wide, kept = zip(*pairs[i : i + STEP], strict=True)
            lines.append((n, *wide, *kept))
    return lines


@lru_cache(32)
def tables(order, folded):
    """The Tables of an order, folded for bare charges."""
    narrow_z, wide_z = (1, 2) if folded else (order, order)
    full = exponents(0, order - 1, order)
    kept, local = exponents(0, order - 1, narrow_z), exponents(1, order, narrow_z)
    wide = exponents(0, order, wide_z)
    at_full, at_kept, at_wide = rows(full), rows(kept), rows(wide)

    axis = [next(d for d in range(3) if k[d]) if any(k) else 0 for k in full]
    power = [(at_full.get(minus(k, AXES[d]), 0), d) for k, d in zip(full, axis, strict=True)]
    pairs = [(k, j) for k in kept for j in kept if sum(k) + sum(j) < order]
    convolve = [(at_wide[add(k, j)], at_kept[k], at_full[j] * LANES) for k, j in pairs]
    unfold = folding(wide) if folded else []
    climb, weight, level = climbing(order, exponents(0, order, narrow_z), at_wide)
    pairs = [(n, j) for n in local for j in kept if sum(n) + sum(j) <= order]
    by_source = sorted(pairs, key=lambda pair: at_kept[pair[1]])  # neighbours add to different sums, none waits
    products = [(local.index(n), at_wide[add(n, j)], at_kept[j]) for n, j in pairs]
    contract = in_steps(products, len(wide), len(kept))
    return Tables(
        power=unsigned(power, 2, LANES),
        inverse=np.array([1.0 / max(k[d], 1) for k, d in zip(full, axis, strict=True)]),
        fold=unsigned(folding(full)[::-1] if folded else [], 3, LANES),
        kept=unsigned([at_full[k] for k in kept], 1, LANES)[:, 0],
        convolve=unsigned(convolve, 3),
        unfold=unsigned(unfold, 3),
        unfold_at=unsigned(unfold, 3, LANES),
        narrow=unsigned([at_wide[k] for k in kept], 1)[:, 0],
        factor=np.cumprod([1.0] + [-(2.0 * m + 1.0) for m in range(order)]),
        climb=unsigned(climb, 4, LANES),
        weight=np.array(weight),
        level=np.array(level),
        contract=unsigned(contract, 1 + 2 * STEP, LANES),
        local=unsigned([at_wide[n] for n in local], 1)[:, 0],
        shift=unsigned([(at_wide[n], at_wide[add(n, j)], at_full[j] * LANES) for n, j in by_source], 3),
        gradient=unsigned([[at_wide[add(k, e)] for k in kept] for e in AXES], len(kept)),
        moments=sum(sum(k) < order and k[2] > 1 for k in wide) if folded else 0,
        forces=sum(sum(local[line[0]]) == 1 for line in contract),
        wide=len(wide),
    )
