"""A bunch given particle by particle: x, y, z, perhaps momenta and weights, as a table in text or an .npz archive."""

from pathlib import Path

import numpy as np

from beamfield.beam.particles import MacroParticles
from beamfield.describe.array_file import read_arrays
from beamfield.describe.columns import Column
from beamfield.describe.table_file import read_table
from beamfield.errors import Fault, InputError

PLACES, MOMENTA = ("x", "y", "z"), ("ux", "uy", "uz")
_MOMENTUM_UNITS = ("gamma beta", "m c", "1")
_FARTHEST = 1e6  # m; no bunch is longer
_FASTEST = 1e9  # m c
_SMALLEST = 1e-15  # m; less is one place


def _place(name):
    return Column(
        name, ("m",), allowed=lambda v: abs(v) < _FARTHEST, rule="is farther out than any bunch reaches, in m"
    )


def _momentum(name):
    rule = "is beyond 1e9, in units of m c"
    return Column(name, _MOMENTUM_UNITS, False, MOMENTA, lambda v: abs(v) < _FASTEST, rule)


def _forward(values):
    return (values > 0.0) & (values < _FASTEST)


COLUMNS = (
    *map(_place, PLACES),
    *map(_momentum, MOMENTA[:2]),
    Column(
        "uz",
        ("1", "gamma beta", "m c"),
        False,
        MOMENTA,
        _forward,
        "is not between 0 and 1e9: every particle goes forwards, in units of m c",
    ),
    Column("weight", ("1",), False, allowed=lambda v: v >= 0.0, rule="is negative; weights count particles"),
)


def read(path, progress=None):
    """Macro-particles of a file: places about their weighted centroid, weights that sum to 1, momenta as they stand.

    path      of an .npz archive of arrays (N,), or else of a text with columns x, y, z [m], all or none of ux, uy, uz
              [gamma beta], and weight (1 without it)
    progress  called with the fraction of a text read, 0 to 1, now and then

    Raises InputError with a located fault for each thing wrong, ten at most.
    """
    table = read_arrays(path, COLUMNS) if Path(path).suffix.lower() == ".npz" else read_table(path, COLUMNS, progress)
    weights = _weights(table)
    positions = _about_centroid(np.array([table.values.pop(name) for name in PLACES]), weights)
    momenta = np.array([table.values.pop(name) for name in MOMENTA]) if "ux" in table.values else None
    particles = MacroParticles(positions, weights, momenta, Path(path).name)
    _check_sizes(particles, table.file)
    return particles


def _weights(table):
    """Weights (N,) that sum to 1."""
    count = len(table.values["x"])
    weights = table.values.pop("weight", np.ones(count))
    if count < 2:
        raise InputError(Fault(f"{count or 'no'} particle; a bunch needs two at least", file=table.file))
    if not weights.any():
        raise InputError(Fault("every weight is 0; give those that count a weight above", "weight", file=table.file))
    weights = weights / weights.max()
    return weights / weights.sum()


def _about_centroid(positions, weights):
    """Positions less their weighted mean, in place; by way of one particle, to keep the digits far off."""
    positions -= positions[:, :1].copy()
    positions -= (positions @ weights)[:, np.newaxis]
    return positions


def _check_sizes(particles, file):
    faults = [
        Fault(f"all particles that count share one {name}; a bunch has a size in every direction", name, file=file)
        for name, size in zip(PLACES, particles.rms)
        if not size > _SMALLEST
    ]
    if faults:
        raise InputError(*faults)
