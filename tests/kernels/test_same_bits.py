"""Every sum gives the same bits, whatever the number of threads."""

import numba
import numpy as np
import pytest

from beamfield.kernels.azimuths import azimuths
from beamfield.kernels.clouds import superpose_clouds, superpose_rods
from beamfield.kernels.moving_charge import superpose, superpose_each
from beamfield.kernels.probe_charges import probe_field
from beamfield.kernels.probe_cone import cone_field
from beamfield.kernels.probe_rays import ray_field

POINTS, SOURCES = 77, 300  # no multiple of the points carried together
CHANCE = np.random.default_rng(11)
PROBES, PLACES, MOMENTA = (CHANCE.normal(size=(3, count)) for count in (POINTS, SOURCES, SOURCES))
WEIGHTS = CHANCE.normal(size=SOURCES)
NODES = np.polynomial.legendre.leggauss(6)
UNIT = 0.5 * (NODES[0] + 1.0), 0.5 * NODES[1]
TURNS = 2.0 * np.pi * (np.arange(8) + 0.5) / 8
DIRECTIONS = np.ascontiguousarray(np.broadcast_to([np.cos(TURNS), np.sin(TURNS)], (POINTS, 2, 8)))
SHARES = np.full((POINTS, 8), np.pi / 4.0)
SCALES, GAMMA = (1.0, 2.0, 3.0), 4.0


def turned(out):
    angles, weights = np.empty((2, POINTS, 16))
    azimuths(PROBES[0], PROBES[1], 0.7, 0.6, True, 6.5, angles, weights)
    out[: POINTS * 16], out[POINTS * 16 :] = angles.ravel(), weights.ravel()


SUMS = {
    "moving charges": ((3, POINTS), lambda o: superpose(PROBES, PLACES, WEIGHTS, np.array([1.0, 2.0, 9.0]), 0.0, o)),
    "own momenta": ((6, POINTS), lambda o: superpose_each(PROBES, PLACES, WEIGHTS, MOMENTA, 0.1, o)),
    "clouds": ((6, POINTS), lambda o: superpose_clouds(PROBES, PLACES, WEIGHTS, MOMENTA, 0.1, o)),
    "rods": ((3, POINTS), lambda o: superpose_rods(PROBES, PLACES, WEIGHTS, GAMMA, 2.0, 0.1, o)),
    "products": (
        (4, POINTS),
        lambda o: probe_field(PROBES, SCALES, (0, 1), 6.0, DIRECTIONS, SHARES, *UNIT, *UNIT, *UNIT, GAMMA, o),
    ),
    "rays": ((4, POINTS), lambda o: ray_field(PROBES, SCALES, 2, DIRECTIONS, SHARES, *UNIT, *UNIT, GAMMA, o)),
    "cone": ((4, POINTS), lambda o: cone_field(4.0 * PROBES, SCALES, 2, 8, *UNIT, GAMMA, o)),
    "directions": (2 * POINTS * 16, turned),
}


@pytest.mark.large
@pytest.mark.parametrize("name", SUMS)
def test_threads_do_not_show(name):
    """Exact: one thread, two, all of them."""
    shape, fill = SUMS[name]
    results = []
    before = numba.get_num_threads()
    try:
        for threads in {1, min(2, before), before}:
            numba.set_num_threads(threads)
            out = np.full(shape, np.nan)
            fill(out)
            results.append(out.tobytes())
            assert np.isfinite(out).all()
    finally:
        numba.set_num_threads(before)
    assert len(set(results)) == 1
