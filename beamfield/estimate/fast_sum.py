"""The field of N charges at M points, in their rest frame, in a time that grows with N + M; checked against the
direct sum.

    E_i = sum_j q_j (r_i - r_j) / (|r_i - r_j|^2 + a^2)^(3/2)

How it is done is told by beamfield/kernels, to be read in this order: cells, extent, expansion, moments, far_field,
local_field, near_field, traversal. Results do not depend on the number of threads.
"""

from dataclasses import dataclass
from math import floor, isfinite, log2, log10

import numpy as np

from beamfield.errors import CallError
from beamfield.kernels.cells import plant
from beamfield.kernels.expansion import kept_rows, tables
from beamfield.kernels.extent import COLUMNS, measure
from beamfield.kernels.moments import gather_moments
from beamfield.kernels.moving_charge import superpose
from beamfield.kernels.traversal import Side, rules_for, walk

CHECKED = 96  # points at which a result is compared with the direct sum; so many points or fewer are summed directly
LEAF = 32  # places to a leaf
TRIES = 4  # sums, at most, until one meets its tolerance
SINGLE = 5e-7  # tolerance down to which near pairs may be done in single precision, which costs up to 1.5e-7
GOLDEN = 0.5 * (5.0**0.5 - 1.0)


@dataclass(frozen=True, slots=True, eq=False)
class FastField:
    """field (3, M); doubt, the rms relative error measured at CHECKED of the points; order of the expansions and
    places to a leaf that it was got with; redone, how often it had to be done again, more exactly, to meet its
    tolerance."""

    field: np.ndarray
    doubt: float
    order: int
    leaf: int
    redone: int


def fast_field(points, positions, charges, tolerance, cloud=0.0, seen=None):
    """The FastField of charges (N,) at positions (3, N), at points (3, M) or, where None, at the charges' own places.

    tolerance  rms relative error over the points that is aimed at, 1e-1 to 1e-12
    cloud      softening length a, 0 for bare charges
    seen       what becomes of a field (3, K) before it is compared with the direct sum, where somebody looks at it from
               another frame

    A charge makes no field at its own place. Where the tolerance is missed in the end, doubt says so.
    """
    positions, charges = _rows(positions), np.ascontiguousarray(charges, np.float64)
    where = positions if points is None else _rows(points)
    _check(positions, charges, where, tolerance, cloud)
    chosen = _spread(where.shape[1], CHECKED)
    exact = _direct(where[:, chosen], positions, charges, cloud)
    if where.shape[1] <= CHECKED or not np.any(charges):
        return FastField(_at_all(exact, where.shape[1]), 0.0, 0, 0, 0)
    looked = seen or (lambda whole: whole)
    planted = _plant(None if points is None else where, positions, charges)
    for redone in range(TRIES):
        order, aim, single = settings(tolerance, cloud, redone)
        field = _sum(planted, order, aim, single, cloud, _typical(exact))
        doubt = _relative_error(looked(field[:, chosen]), looked(exact))
        if doubt <= tolerance:
            break
    return FastField(field, doubt, order, LEAF, redone)


def settings(tolerance, cloud=0.0, redone=0):
    """Order of the expansions, tolerance of a single one, and whether near pairs may be done in single precision.

    The order is the cheapest one, found by trial with spheres of 10^5 charges; the rms error then comes out at a
    quarter to three quarters of the tolerance, whatever the shape of the cloud. Each time the sum is redone, it is
    four times as strict.
    """
    aim = 1.5 * tolerance / 4.0**redone
    digits = -log10(aim)
    order = floor(1.8 * digits + 1.0) if cloud == 0.0 else floor(1.4 * digits + 1.5)
    return min(max(order, 3), 20 if cloud == 0.0 else 14), aim, tolerance >= SINGLE and redone < 2


def predicted_bytes(sources, points, order, cloud=0.0):
    """Memory that a sum takes beside its arguments, at most; points None where they are the charges' own places."""
    places = sources + (points or 0)
    cells = 3 * places // LEAF + 64
    planting = 88 * max(sources, points or 0) + 40 * min(sources, points or 0)
    summing = 56 * places + 48 * (points or sources) + cells * 8 * (COLUMNS + 8 + kept_rows(order, cloud == 0.0))
    return max(planting, summing)


# In pairs of the direct sum, which takes 1 ns a pair on two cores of 2024: measured as ratios to it, on the same machine.
SORTED = 400  # a source or a point: sorting, sizes, moments, and its share in the check
WALKED = 900  # a point at a tolerance of 1e-3: far and near field
DIGIT = 1.8  # factor to WALKED for each further digit
CLOUD = 1.5  # factor to WALKED for clouds
STARTED = 5_000_000  # threads, tables


def prefers_fast(sources, points, tolerance, cloud=0.0):
    """Whether fast_field is expected to take less time than the direct sum of sources * points pairs.

    The constants were measured with bare spheres at own places, 10^3 to 10^6 charges; benchmarks/fast_sum.py prints the
    times of both sums, where they cross, and what this function says there.
    """
    if points <= CHECKED:
        return False
    walked = WALKED * DIGIT ** (-3.0 - log10(tolerance)) * (CLOUD if cloud else 1.0)
    fast = STARTED + (SORTED + CHECKED) * sources + SORTED * points + points * min(walked, sources)
    return fast < sources * points


def _rows(vectors):
    return np.ascontiguousarray(vectors, np.float64)


def _check(positions, charges, where, tolerance, cloud):
    """Refuse what cannot be summed."""
    if positions.ndim != 2 or positions.shape[0] != 3 or charges.shape != positions.shape[1:]:
        raise CallError("positions must be (3, N) and charges (N,)")
    if where.ndim != 2 or where.shape[0] != 3:
        raise CallError("points must be (3, M)")
    if not (isfinite(positions.sum()) and isfinite(where.sum()) and isfinite(charges.sum())):
        raise CallError("positions, points and charges must be finite")
    if not 1e-12 <= tolerance <= 0.1:
        raise CallError("the tolerance must lie between 1e-12 and 0.1")
    if not 0.0 <= cloud < float("inf"):
        raise CallError("the cloud must be a length of zero or more")


def _spread(count, wanted):
    """At most `wanted` different numbers below count, spread evenly by the golden section: the same ones each time."""
    if count <= wanted:
        return np.arange(count)
    return np.unique(np.floor((np.arange(wanted) * GOLDEN % 1.0) * count).astype(np.int64))


def _direct(points, positions, charges, cloud):
    """The direct sum, charges at rest."""
    out = np.empty((3, points.shape[1]))
    superpose(np.ascontiguousarray(points), positions, charges, np.zeros(3), cloud * cloud, out)
    return out


def _at_all(exact, count):
    """The direct sum at all points, or zeros where there is no charge at all."""
    return exact if exact.shape[1] == count else np.zeros((3, count))


def _typical(field):
    """Typical strength of a field: the median, but no less than 1 % of the rms; 1 where it vanishes."""
    strength = np.sqrt(np.square(field).sum(axis=0))
    return max(np.median(strength), 0.01 * np.sqrt(np.square(strength).mean())) or 1.0


def _relative_error(field, exact):
    """rms of the difference over the rms of the exact field; the former alone where the latter vanishes."""
    scale = np.abs(exact).max() or 1.0
    error, size = np.square((field - exact) / scale).sum(), np.square(exact / scale).sum()
    return float(np.sqrt(error / size)) if size else float(np.sqrt(error))


@dataclass(frozen=True, slots=True, eq=False)
class _Planted:
    """Trees of sources and targets, which may be the same; lengths in units of `length`, charges in units of
    `charge`.
    """

    source: tuple
    target: tuple
    length: float
    charge: float


def _plant(points, positions, charges):
    spans = [np.ptp(rows, axis=1).max() for rows in (positions, points) if rows is not None]
    length = 2.0 ** floor(log2(max(spans))) if max(spans) > 0.0 else 1.0
    charge = np.abs(charges).max()
    source = plant(positions, charges / charge, LEAF, length)
    target = source if points is None else plant(points, np.ones(points.shape[1]), LEAF, length)
    return _Planted(source, target, length, charge)


def _sum(planted, order, aim, single, cloud, typical):
    """The field (3, M) at one order."""
    table = tables(order, cloud == 0.0)
    source = _side(planted.source, order, table)
    target = source if planted.target is planted.source else _side(planted.target, order)
    unit = planted.charge / planted.length**2
    rules = rules_for(table, aim, typical / unit, cloud / planted.length, single)
    field = walk(target, source, table, rules)
    field *= unit
    return np.take(field, planted.target[2], axis=1)


def _side(planted, order, table=None):
    """A Side of the walk: measured, and with moments where it makes a field."""
    tree, places, _ = planted
    sheets = np.zeros((len(tree.child), COLUMNS))
    measure(places, tree, order, sheets)
    moments = np.zeros((len(tree.child) if table else 0, len(table.kept) if table else 0))
    if table:
        gather_moments(places, tree, sheets, table, moments)
    return Side(tree, places, sheets, moments)
