"""Source cells far from a target cell: derivatives of the distance law, and their products with the moments.

    D_n = d^n/dX^n (|X|^2 + a^2)^(-1/2),    O_n += sum_j D_{n+j} M_j

LANES source cells at a time; X, D, M, O are flat with LANES numbers a row (expansion.py).
"""

import numpy as np

from beamfield.kernels.compiled import inner
from beamfield.kernels.lanes import LANES, add_products, minus_both, scaled, times, times_plus


@inner
def derivatives(x, cloud2, tables, base, d):
    """Fill d (wide rows) at separations x (3 rows); base is scratch of order + 2 rows; sweeps as in `climbing`."""
    order = tables.level.shape[0] - 1
    last = (order + 1) * LANES
    for k in range(LANES):
        u = 1.0 / (x[k] * x[k] + x[LANES + k] * x[LANES + k] + x[2 * LANES + k] * x[2 * LANES + k] + cloud2)
        base[last + k] = u
        base[k] = np.sqrt(u)
    for m in range(order):
        times(base, (m + 1) * LANES, 1.0, base, last, base, m * LANES)
    scaled(d, 0, tables.factor[order], base, order * LANES)
    for sweep in range(order):
        m = order - 1 - sweep
        climb_once(tables.climb, tables.weight, tables.level[sweep], tables.level[sweep + 1], x, d)
        scaled(d, 0, tables.factor[m], base, m * LANES)
    unfold(tables.unfold_at, d)


@inner
def climb_once(climb, weight, first, last, x, d):
    """One sweep: R^m from R^{m+1}, in place."""
    for i in range(first, last):
        times_plus(d, climb[i, 0], x, climb[i, 2], climb[i, 1], weight[i], climb[i, 3])


@inner
def unfold(rows, d):
    """D_{a,b,2} = - D_{a+2,b,0} - D_{a,b+2,0}."""
    for i in range(rows.shape[0]):
        minus_both(d, rows[i, 0], rows[i, 1], rows[i, 2])


@inner
def contract(steps, count, d, m, out):
    """out_n += sum_j d_{n+j} m_j over the first count rows of steps."""
    for i in range(count):
        o, d0, d1, d2, d3 = steps[i, 0], steps[i, 1], steps[i, 2], steps[i, 3], steps[i, 4]
        add_products(out, o, d, d0, d1, d2, d3, m, steps[i, 5], steps[i, 6], steps[i, 7], steps[i, 8])
