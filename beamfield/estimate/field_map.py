"""The field of a bunch on a grid, in pieces small enough for any memory."""

from collections.abc import Iterator
from dataclasses import dataclass

import numpy as np

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


def field_map(title, evaluate, grid, block=BLOCK):
    """FieldMap of whatever `evaluate` gives; the first point is evaluated at once, to see what that is."""
    quantities = tuple(MAPPED[name] for name in evaluate(grid.points(0, 1)))
    return FieldMap(title, grid, quantities, field_blocks(evaluate, grid, block))


def co_moving(field, charge, beta_gamma, phi=None):
    """What a map shows of a bunch whose charges share the momentum beta_gamma along +z.

    field, with E and B (3, K); charge of the particle that the force acts on [C]; phi (K,) [V], left out if unknown.
    The force is q E / gamma^2 across and q E_z along, without the difference of near equals in E + v x B.
    """
    gamma = np.hypot(1.0, beta_gamma)
    values = {"E": field.E, "B": field.B, "force": charge * field.E / np.array([[gamma**2], [gamma**2], [1.0]])}
    if phi is not None:
        along = beta_gamma / gamma * phi / SPEED_OF_LIGHT
        values |= {"phi": phi, "A": np.stack([np.zeros_like(phi), np.zeros_like(phi), along])}
    return values
