"""The walk: every target cell finds its own far and near cells, from the root down.

A target cell A starts with the source cells B that its parent left open. Each of them is

    far    its moments go to the local coefficients of A, if the expansion is good enough (`accepted`);
    apart  A is a leaf, large beside B: the moments of B go to the field at each place of A;
    loose  B is a leaf, large beside A: each charge of B goes to the local coefficients of A;
    opened if it is the larger of the two or A is a leaf: its children are looked at instead;
    near   both are leaves: pair by pair; so is a far cell with so few pairs that this is cheaper;
    open   otherwise: left to the children of A.

Targets own what they sum, in an order that the trees alone decide. A task is a cell low in the tree; it walks its own path
from the root, repeating a little work instead of sharing it. So the bits do not depend on the number of threads.
"""

from concurrent.futures import ThreadPoolExecutor
from typing import NamedTuple

import numpy as np
from numba import get_num_threads

from beamfield.kernels.acceptance import accepted, distance2, is_apart, is_loose
from beamfield.kernels.cells import longer
from beamfield.kernels.compiled import compiled, inner
from beamfield.kernels.expansion import STEP
from beamfield.kernels.extent import COUNT, RADIUS, SIZE, STRENGTH
from beamfield.kernels.lanes import LANES
from beamfield.kernels.local_field import (
    bench,
    field_at_places,
    field_of_cell,
    finish_batch,
    finish_cell,
    inherit,
    take_cell,
    take_place,
)
from beamfield.kernels.near_field import BLOCK, add_near

TASKS, CELLS = 512, 400  # tasks at most; cells to a task, on average, at least
SHARES = 16  # of the tasks to a thread
BUFFER = 1024  # cells that are collected before they are summed


class Side(NamedTuple):
    """What is known of the targets or of the sources: tree, places (4, n), sheets; moments (of sources only)."""

    tree: tuple
    places: np.ndarray
    sheets: np.ndarray
    moments: np.ndarray


class Rules(NamedTuple):
    """limit    tolerance squared times typical field, see `accepted`
    cloud2   softening length squared
    pairs    pairs that take as long as one source in a batch
    ranked   pairs that take as long as one far cell at one place
    order    of the expansions
    single   whether near pairs may be done in single precision
    """

    limit: float
    cloud2: float
    pairs: float
    ranked: float
    order: int
    single: bool


def rules_for(tables, tolerance, typical, cloud, single):
    """The Rules for the tolerance of one expansion and the typical field; the times of pairs were measured, roughly."""
    pair = 1.0 if single else 3.0
    derive, multiply = 0.4 * tables.climb.shape[0], 0.25 * STEP
    pairs = (derive + multiply * tables.contract.shape[0]) / pair
    ranked = (derive + multiply * tables.forces) / pair
    limit = tolerance * tolerance * typical
    return Rules(float(limit), float(cloud * cloud), pairs, ranked, tables.level.shape[0] - 1, single)


def walk(target, source, tables, rules):
    """The field (3, n) at the places of the targets; shared out among as many threads as numba is allowed."""
    field = np.zeros((3, target.places.shape[1]))
    tasks = tasks_of(target.tree)
    threads = get_num_threads()
    shares = [np.ascontiguousarray(tasks[i :: SHARES * threads]) for i in range(min(SHARES * threads, len(tasks)))]
    with ThreadPoolExecutor(threads) as pool:
        for done in [pool.submit(walk_tasks, target, source, tables, rules, share, field) for share in shares]:
            done.result()
    return field


def tasks_of(tree):
    """Cells that hold all places, none above another, each with a share of the places or less."""
    places = tree.last - tree.first
    share = places[0] / min(max(len(places) / CELLS, 1.0), TASKS)
    whole = (places <= share) | (tree.child < 0)
    return np.flatnonzero(whole & ~np.append(False, whole[tree.parent[1:]]))


@compiled()
def walk_tasks(target, source, tables, rules, tasks, field):
    """Some of the tasks."""
    for t in range(tasks.shape[0]):
        walk_task(target, source, tables, rules, tasks[t], field)


@inner
def walk_task(target, source, tables, rules, task, field):
    """Walk from the root down to cell `task` and on to all leaves below it."""
    depth = target.tree.level.shape[0] + 1
    work = bench(tables, depth)
    begin = np.zeros(depth + 1, np.int64)  # where the open cells of each level begin
    begin[1] = 1
    opened = np.zeros(256, np.int64)
    stack, near, apart = (
        np.zeros(source.tree.level.shape[0] + 2, np.int64),
        np.zeros(BUFFER, np.int64),
        np.zeros(BUFFER, np.int64),
    )
    path = path_to(target.tree.parent, task)
    todo, level = np.zeros(2 * depth, np.int64), np.zeros(2 * depth, np.int64)
    count = 1
    level[0] = 1
    while count:
        count -= 1
        a, d = todo[count], level[count]
        if d > 1:
            inherit(work, tables, d, target.sheets[target.tree.parent[a]], target.sheets[a])
        opened = sort_out(target, source, tables, rules, a, d, work, begin, opened, stack, near, apart, field)
        child = target.tree.child[a]
        if d < path.shape[0]:
            todo[count], level[count] = path[d], d + 1
            count += 1
        elif child >= 0:
            todo[count], todo[count + 1] = child + 1, child
            level[count], level[count + 1] = d + 1, d + 1
            count += 2


@inner
def path_to(parent, task):
    """The cells from the root to a cell."""
    length, v = 0, task
    while v >= 0:
        v = parent[v]
        length += 1
    path = np.zeros(length, np.int64)
    v = task
    for i in range(length - 1, -1, -1):
        path[i] = v
        v = parent[v]
    return path


@inner
def sort_out(target, source, tables, rules, a, d, work, begin, opened, stack, near, apart, field):
    """Deal with all that the parent of cell a, at level d, left open; the list of open cells, perhaps a longer copy."""
    sheet, low, high = target.sheets[a], target.tree.first[a], target.tree.last[a]
    leaf = target.tree.child[a] < 0
    first, last = source.tree.first, source.tree.last
    blocked = BLOCK * ((high - low + BLOCK - 1) // BLOCK)
    lanes, nears, aparts, end = 0, 0, 0, begin[d]
    for i in range(begin[d - 1], begin[d]):
        stack[0] = opened[i]
        waiting = 1
        while waiting:
            waiting -= 1
            b = stack[waiting]
            other = source.sheets[b]
            small = leaf and blocked * other[COUNT] <= rules.pairs
            size, radius = sheet[SIZE] + other[SIZE], sheet[RADIUS] + other[RADIUS]
            if not small and accepted(size, radius, distance2(sheet, other), other[STRENGTH], rules):
                take_cell(work, lanes, sheet, other, source.moments[b])
                lanes += 1
            elif not small and leaf and is_apart(target.places, low, high, sheet, other, rules):
                apart[aparts] = b
                aparts += 1
            elif source.tree.child[b] >= 0 and (leaf or other[SIZE] > sheet[SIZE]) and not small:
                stack[waiting], stack[waiting + 1] = source.tree.child[b] + 1, source.tree.child[b]
                waiting += 2
            elif leaf:
                near[nears] = b
                nears += 1
            elif source.tree.child[b] < 0 and is_loose(source.places, first[b], last[b], sheet, other, rules):
                for j in range(first[b], last[b]):
                    take_place(work, lanes, sheet, source.places, j)
                    lanes += 1
                    if lanes == LANES:
                        finish_batch(work, tables, lanes, rules.cloud2)
                        lanes = 0
            else:
                opened = longer(opened, end + 1)
                opened[end] = b
                end += 1
            if lanes == LANES or (lanes and aparts == BUFFER):
                finish_batch(work, tables, lanes, rules.cloud2)
                lanes = 0
            if nears == BUFFER:
                add_near(target.places, low, high, sheet, source, near, nears, rules.cloud2, rules.single, field)
                nears = 0
            if aparts == BUFFER:
                add_apart(target, source, tables, rules, low, high, apart, aparts, work, field)
                aparts = 0
    begin[d + 1] = end
    if lanes:
        finish_batch(work, tables, lanes, rules.cloud2)
    finish_cell(work, tables, d)
    if leaf:
        field_at_places(work, tables, d, sheet, target.places, low, high, field)
        add_apart(target, source, tables, rules, low, high, apart, aparts, work, field)
        if nears:
            add_near(target.places, low, high, sheet, source, near, nears, rules.cloud2, rules.single, field)
    return opened


@inner
def add_apart(target, source, tables, rules, low, high, cells, count, work, field):
    for i in range(count):
        b = cells[i]
        field_of_cell(work, tables, source.sheets[b], source.moments[b], target.places, low, high, rules.cloud2, field)
