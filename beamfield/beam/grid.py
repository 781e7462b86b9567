"""Where a map is drawn: a line, a plane or a box of evenly spaced points, about the bunch centre."""

from dataclasses import dataclass
from math import isfinite, prod

import numpy as np

from beamfield.errors import NonsenseError

AXES = "xyz"


@dataclass(frozen=True, slots=True)
class Grid:
    """start and step (x, y, z) [m] and counts of points; an axis of one point is not spanned. In every list x runs
    fastest, then y, then z."""

    start: tuple[float, float, float]
    step: tuple[float, float, float]
    counts: tuple[int, int, int]

    def __post_init__(self):
        if not all(isfinite(value) for value in self.start + self.step) or min(self.counts) < 1:
            raise NonsenseError("a map has a finite start, finite steps and at least one point along each axis")
        if not self.axes:
            raise NonsenseError("a map of one point is no map; span at least one axis")
        if any(not self.step[axis] > 0.0 for axis in self.axes):
            raise NonsenseError("a map runs from the smaller place to the larger one")

    @classmethod
    def between(cls, first, last, counts):
        """Grid from one corner to the opposite one, both (x, y, z) [m] and both included."""
        steps = ((b - a) / (n - 1) if n > 1 else 0.0 for a, b, n in zip(first, last, counts))
        return cls(tuple(first), tuple(steps), tuple(counts))

    @property
    def axes(self):
        """The spanned axes, 0 for x: one for a line, two for a plane, three for a box."""
        return tuple(axis for axis in range(3) if self.counts[axis] > 1)

    @property
    def size(self):
        return prod(self.counts)

    def along(self, axis):
        """Places (K,) of the points on one axis [m]."""
        return self.start[axis] + self.step[axis] * np.arange(self.counts[axis])

    def indices(self, first, last):
        """Three (K,) index arrays of the points first to last of the list."""
        return np.unravel_index(np.arange(first, last), self.counts, order="F")

    def points(self, first, last):
        """The points first to last of the list, (3, K) [m]."""
        index = self.indices(first, last)
        return np.stack([self.start[axis] + self.step[axis] * index[axis] for axis in range(3)])

    def runs(self, most):
        """(first, last) of pieces of the list, at most `most` points each, that are boxes of the grid as well."""
        row, plane = self.counts[0], self.counts[0] * self.counts[1]
        unit, whole = next(((u, w) for u, w in ((plane, self.size), (row, plane)) if u <= most), (1, row))
        length = unit * min(max(1, most // unit), whole // unit)
        for begin in range(0, self.size, whole):
            for first in range(begin, begin + whole, length):
                yield first, min(first + length, begin + whole)

    def box(self, first, last):
        """Slices (z, y, x) of the box that a run is."""
        begin, end = ([int(index[0]) for index in self.indices(at, at + 1)] for at in (first, last - 1))
        return tuple(slice(begin[axis], end[axis] + 1) for axis in (2, 1, 0))
