"""The few points of a large map that a picture shows."""

from dataclasses import dataclass

import numpy as np

from beamfield.report.human import brief


@dataclass(frozen=True, slots=True, eq=False)
class Pick:
    """A line or plane of a map, thinned out: indices kept along x, y, z; spanned axes; places (K,) [m] along each axis;
    values, name -> (3, K) or (K,), x running fastest; where, what stands still."""

    kept: tuple[np.ndarray, np.ndarray, np.ndarray]
    axes: tuple[int, ...]
    places: tuple[np.ndarray, np.ndarray, np.ndarray]
    values: dict[str, np.ndarray]
    where: str

    def take(self, block, index):
        """Copy from a block, whose points have these indices along x, y, z, what is kept."""
        found = [np.searchsorted(kept, at).clip(max=len(kept) - 1) for kept, at in zip(self.kept, index)]
        mine = np.logical_and.reduce([kept[f] == at for kept, f, at in zip(self.kept, found, index)])
        shape = tuple(len(kept) for kept in self.kept)
        slots = np.ravel_multi_index([f[mine] for f in found], shape, order="F")
        for name, values in self.values.items():
            values[..., slots] = block.values[name][..., mine]


def picked(field_map, most):
    """Picks of a FieldMap, at most about `most` points an axis: the line, the plane, or a box's three middle planes."""
    grid = field_map.grid
    still = [{2}, {1}, {0}] if len(grid.axes) == 3 else [set()]
    picks = [_pick(field_map, fixed, most) for fixed in still]
    for block in field_map.blocks:
        index = grid.indices(block.first, block.last)
        for pick in picks:
            pick.take(block, index)
    return picks


def _pick(field_map, fixed, most):
    grid = field_map.grid
    kept = tuple(_kept(count, most, axis in fixed) for axis, count in enumerate(grid.counts))
    places = tuple(grid.along(axis)[kept[axis]] for axis in range(3))
    size = len(kept[0]) * len(kept[1]) * len(kept[2])
    shapes = {m.name: (3, size) if m.components == 3 else (size,) for m in field_map.quantities}
    axes = tuple(axis for axis in grid.axes if axis not in fixed)
    where = ", ".join(f"{'xyz'[axis]} = {brief(float(places[axis][0]), 'm')}" for axis in range(3) if axis not in axes)
    return Pick(kept, axes, places, {name: np.zeros(shape) for name, shape in shapes.items()}, where)


def _kept(count, most, fixed):
    """Indices along one axis: the middle one, or every so-manieth."""
    return np.array([count // 2]) if fixed else np.arange(0, count, -(-count // most))
