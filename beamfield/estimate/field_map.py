"""The field of a bunch on a grid, in pieces small enough for any memory."""

from collections.abc import Iterator
from dataclasses import dataclass

import numpy as np

from beamfield import progress
from beamfield.beam.grid import Grid
from beamfield.beam.mapped import MAPPED, Mapped
from beamfield.constants import SPEED_OF_LIGHT

BLOCK = 32768  # points at a time: 4 MB of results


@dataclass(frozen=True, slots=True, eq=False)
class Block:
    """values of the points first to last of a grid's list: name -> (3, K), or (K,) for a scalar."""

    first: int
    last: int
    values: dict[str, np.ndarray]


@dataclass(frozen=True, slots=True, eq=False)
class FieldMap:
    """title; grid; quantities in the order of the file; blocks, once through, in the order of the grid's list."""

    title: str
    grid: Grid
    quantities: tuple[Mapped, ...]
    blocks: Iterator[Block]


def field_blocks(evaluate, grid, block=BLOCK):
    """Blocks of what evaluate(points (3, K)) -> {name: (3, K) or (K,)} gives on a grid, at most `block` points each."""
    for first, last in grid.runs(block):
        yield Block(first, last, evaluate(grid.points(first, last)))
        progress.told("map", last / grid.size)


def field_map(title, evaluate, grid, block=BLOCK):
    """FieldMap of whatever `evaluate` gives; the first point is evaluated at once, to see what that is."""
    quantities = tuple(MAPPED[name] for name in evaluate(grid.points(0, 1)))
    return FieldMap(title, grid, quantities, field_blocks(evaluate, grid, block))


def co_moving(electric, charge, beta_gamma, phi=None):
    """What a map shows of charges that share the momentum beta_gamma along +z.

    electric, E (3, K) [V/m]; charge of the particle that the force acts on [C]; phi (K,) [V], left out where unknown.
    B = beta z x E / c, A = beta phi z / c. The force is q E / gamma^2 across and q E_z along, free of the difference of
    near equals in E + v x B.
    """
    gamma = np.hypot(1.0, beta_gamma)
    slowness, nought = beta_gamma / gamma / SPEED_OF_LIGHT, np.zeros(electric.shape[1])
    magnetic = slowness * np.stack([-electric[1], electric[0], nought])
    force = charge * electric / np.array([[gamma**2], [gamma**2], [1.0]])
    values = {"E": electric, "B": magnetic, "force": force}
    return values if phi is None else values | {"phi": phi, "A": np.stack([nought, nought, slowness * phi])}
