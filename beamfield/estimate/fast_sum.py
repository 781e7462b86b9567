"""The field of N charges at M points in a time that grows with N + M, checked against the direct sum.

    E_i = sum_j q_j (r_i - r_j) / (|r_i - r_j|^2 + a^2)^(3/2)      rest frame of the charges

How: kernels/tree.py, extent.py, expansion.py, moments.py, far_field.py, local_field.py, near_field.py, traversal.py, in this order.
"""

from dataclasses import dataclass
from math import floor, log2, log10

import numpy as np

from beamfield.kernels.expansion import tables
from beamfield.kernels.extent import COLUMNS, measure
from beamfield.kernels.moments import gather_moments
from beamfield.kernels.moving_charge import superpose
from beamfield.kernels.traversal import Rules, Side, walk
from beamfield.kernels.tree import plant

CHECKED = 96  # points at which a result is compared with the direct sum


@dataclass(frozen=True, slots=True, eq=False)
class FastField:
    field: np.ndarray
    doubt: float
    order: int
    leaf: int
    redone: int


def direct(points, positions, charges, cloud):
    out = np.empty((3, points.shape[1]))
    superpose(points, positions, charges, np.zeros(3), cloud * cloud, out)
    return out


def fast_field(points, positions, charges, tolerance, cloud=0.0, order=5, eps=7e-4, leaf=32, tleaf=32, single=True, info=None):
    import time
    T=[time.perf_counter()]; C=[time.process_time()]
    def tick(): T.append(time.perf_counter()); C.append(time.process_time())
    where = positions if points is None else points
    m = where.shape[1]
    pick = np.unique(np.floor((np.arange(CHECKED) + 0.5) * 0.6180339887498949 % 1.0 * m).astype(np.int64))
    checked = np.ascontiguousarray(where[:, pick])
    ref = direct(checked, positions, charges, cloud)
    tick()
    unit = 2.0 ** floor(log2(np.ptp(positions, axis=1).max()))
    top = np.abs(charges).max()
    q = charges / top
    scale = np.median(np.sqrt((ref**2).sum(0))) * unit**2 / top
    folded = cloud == 0.0
    t = tables(order, folded)
    tree, places, number = plant(positions, q, leaf, unit)
    tick()
    sheets = np.zeros((len(tree.first), COLUMNS))
    measure(places, tree, order, sheets)
    tick()
    moments = np.zeros((len(tree.first), len(t.kept)))
    gather_moments(places, tree, sheets, t, moments)
    tick()
    source = Side(tree, places, sheets, moments)
    target = source
    if points is not None:
        tt, tp, tn = plant(points, np.ones(m), tleaf, unit)
        ts = np.zeros((len(tt.first), COLUMNS))
        measure(tp, tt, order, ts)
        target = Side(tt, tp, ts, np.zeros((0, 0)))
        number = tn
    tt = target.tree
    size = tt.last - tt.first
    most = size[0] / max(1, min(256, len(size) / 400))
    tasks = np.flatnonzero((size <= most) & np.r_[True, size[tt.parent[1:]] > most] | (tt.child < 0) & (size > most))
    pairs = 0.4 * len(t.climb) + 0.25 * 4 * len(t.contract)
    ranked = 0.4 * len(t.climb) + 0.25 * 4 * t.forces
    if not single: pairs /= 3; ranked /= 3
    rules = Rules(eps**2 * scale, (cloud / unit) ** 2, pairs, ranked, order, single, tleaf)
    field = np.zeros((3, target.places.shape[1]))
    tick()
    walk(target, source, t, rules, tasks, field)
    tick()
    field *= top / unit**2
    out = np.take(field, number, axis=1)
    tick()
    doubt = np.sqrt(((out[:, pick] - ref) ** 2).sum() / (ref**2).sum())
    if info is not None:
        names = "audit tree measure moments prep walk out".split()
        info.update({k: round(b - a, 3) for k, a, b in zip(names, T, T[1:])}, total=round(T[-1]-T[0],3), cpu=round(C[-1]-C[0],3), wcpu=round(C[-2]-C[-3],3))
    return FastField(out, doubt, order, leaf, 0)
