"""Mean of place times force over the bunch, <x E_x>, from the superposed field: what the rms envelope feels."""

from dataclasses import replace
from functools import lru_cache
from math import pi

import numpy as np

from beamfield.estimate.background import left_across, weakened
from beamfield.estimate.finding import Finding
from beamfield.estimate.frame import line_density
from beamfield.estimate.source import asked, source_of
from beamfield.laws import intensity, rms_force

NODES, FEWER = 7, 6  # across, round and along an octant of the bunch; the fewer show the error of the mean
SAMPLE = 4096  # particles whose forces are averaged
NO_IMAGE = "the image in the cathode is not in this value"
CHARGES = 8192  # a probe: the mean over the bunch is known to fewer digits than one field


def space_charge_ratio(bunch, surroundings, ring, numerics):
    """Findings on space charge against emittance."""
    if bunch.emittance is None:
        return
    closed = _closed_ratio(bunch)
    if numerics.method == "closed-form" and closed is not None:
        values, doubts, method = closed, 1e-9 * closed, "closed form"
    else:
        values, doubts, method = _mean_forces(bunch, numerics)
    for axis, name in enumerate("xy"):
        textbook = None if closed is None else float(closed[axis])
        image = (NO_IMAGE,) if surroundings.cathode else ()
        free = Finding(f"space_charge_ratio_{name}", float(values[axis]), float(doubts[axis]), textbook, method, image)
        yield weakened(free, *left_across(bunch, surroundings))


def _mean_forces(bunch, numerics):
    source = source_of(bunch, replace(numerics, charges_per_probe=min(CHARGES, numerics.charges_per_probe)))
    points, weights = _nodes(bunch, NODES)
    fewer, lighter = _nodes(bunch, FEWER)
    bend = intensity.acceleration(1.0, bunch.species.charge, bunch.species.mass, bunch.beta_gamma)
    scale = np.square(bunch.sigma[:2]) * bend / np.square(bunch.emittance)
    values, doubts = asked(source, lambda field: scale * ((points * field(points))[:2] @ weights))
    coarser = scale * ((fewer * source.fields[0](fewer))[:2] @ lighter)
    return values, np.hypot(doubts, coarser - values), source.method


def _closed_ratio(bunch):
    """(2,) of the closed form of the shape, or None."""
    shape, species = bunch.shape, bunch.species
    sigma, emittance = np.array(bunch.sigma[:2]), np.array(bunch.emittance)
    if shape is None:
        return None
    if shape.coasting:
        current = intensity.current(species.charge, line_density(bunch)[0], bunch.velocity)
        strength = intensity.perveance(current, bunch.beta_gamma, species.characteristic_current)
        return rms_force.long_beam_ratio(sigma, rms_force.long_beam_rms_force(sigma), strength, emittance)
    if not (shape.ellipsoid or shape.transverse == shape.longitudinal == "gaussian"):
        return None
    rest = np.array([*sigma, bunch.gamma * bunch.sigma[2]])
    force = rms_force.ellipsoid_rms_force(shape.transverse, rest)[:2]
    return rms_force.space_charge_ratio(
        sigma, force, bunch.particles, species.classical_radius, bunch.beta_gamma, emittance
    )


def _nodes(bunch, count):
    """Lab points (3, K) and weights (K,), sum 1, of the mean over the bunch; an octant stands for all of a density."""
    if bunch.macro is not None:
        step = max(1, bunch.macro.count * NODES // (SAMPLE * count))
        weights = bunch.macro.weights[::step]
        return bunch.macro.positions[:, ::step], weights / weights.sum()
    scales = [(bunch.shape.edge(axis) or 1.0) * bunch.sigma[axis] for axis in range(3)]
    unit, weights = _ellipsoid(bunch.shape.transverse, count) if bunch.shape.ellipsoid else _product(bunch.shape, count)
    if bunch.coasting:
        scales[2] = 1.0
    return unit * np.array(scales)[:, None], weights


@lru_cache
def _product(shape, count):
    r2, across = _radial(shape.transverse, count)
    phi, turn = _legendre(count, 0.5 * pi)
    z, along = _height(shape.longitudinal, count)
    r2, phi, z = (grid.ravel() for grid in np.meshgrid(r2, phi, z, indexing="ij"))
    weights = (across[:, None, None] * turn[:, None] * along).ravel()
    return np.stack([np.sqrt(r2) * np.cos(phi), np.sqrt(r2) * np.sin(phi), z]), weights / weights.sum()


@lru_cache
def _ellipsoid(profile, count):
    r, across = _legendre(count, 1.0)
    across = across * r**2 * (1.0 if profile == "uniform" else 1.0 - r**2)
    phi, turn = _legendre(count, 0.5 * pi)
    cos, along = _legendre(count, 1.0)
    weights = (across[:, None, None] * turn[:, None] * along).ravel()
    r, phi, cos = (grid.ravel() for grid in np.meshgrid(r, phi, cos, indexing="ij"))
    sin = np.sqrt(1.0 - cos**2)
    return r * np.stack([sin * np.cos(phi), sin * np.sin(phi), cos]), weights / weights.sum()


def _legendre(count, length):
    x, w = np.polynomial.legendre.leggauss(count)
    return 0.5 * length * (x + 1.0), 0.5 * length * w


def _radial(profile, count):
    """Nodes and weights of r^2 in units of the scale squared."""
    if profile == "gaussian":
        t, w = np.polynomial.laguerre.laggauss(count)
        return 2.0 * t, w
    t, w = _legendre(count, 1.0)
    return t, w * (1.0 if profile == "kv" else 1.0 - t)


def _height(profile, count):
    if profile == "coasting":
        return np.zeros(1), np.ones(1)
    if profile == "gaussian":
        z, w = np.polynomial.hermite.hermgauss(2 * count)
        return np.sqrt(2.0) * z[count:], w[count:]
    z, w = _legendre(count, 1.0)
    return z, w * (1.0 if profile == "uniform" else 1.0 - z**2)
