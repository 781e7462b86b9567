"""A bunch known as a density: its field as charges placed for each probe, and the same from a coarser rule."""

from dataclasses import dataclass
from functools import partial
from math import pi, sqrt

import numpy as np

from beamfield.constants import COULOMB
from beamfield.estimate.probe_rule import azimuth_nodes, height_nodes, ray_rule, rule_for, unit_nodes
from beamfield.estimate.textbook import filling, rest_scales

COARSER = 7.0 / 8.0  # nodes of the coarser rule in each direction: its error stands for the doubt, and covers it
_CODES = {"gaussian": 0, "kv": 1, "uniform": 1, "parabolic": 2, "coasting": 3}
_AREAS = {"gaussian": 2.0 * pi, "kv": pi, "parabolic": pi / 2.0}
_LENGTHS = {"gaussian": sqrt(2.0 * pi), "uniform": 2.0, "parabolic": 4.0 / 3.0, "coasting": 1.0}
_VOLUMES = {"uniform": 4.0 * pi / 3.0, "parabolic": 8.0 * pi / 15.0}
_BLOCK = 8192  # probes whose nodes are held in memory together


@dataclass(frozen=True, slots=True)
class DensitySource:
    """fields: functions of lab points (3, M) that give lab E (3, M); the first is the answer, the others its
    variants.
    """

    bunch: object
    charges: int

    @property
    def method(self):
        return f"superposition, {self.charges} charges a probe"

    @property
    def fields(self):
        rule = self.rule
        return partial(density_field, self.bunch, rule), partial(density_field, self.bunch, rule.thinned(COARSER))

    @property
    def rule(self):
        bunch = self.bunch
        if bunch.shape.ellipsoid:
            return ray_rule(self.charges)
        aspect = 1e5 if bunch.coasting else bunch.aspect
        faced = bunch.shape.longitudinal in ("uniform", "parabolic")
        return rule_for(aspect, bunch.sigma[0] / bunch.sigma[1], self.charges, faced)


def central_density(bunch):
    """Charge per volume at the centre in the frame of the bunch [C/m3]."""
    shape, scales = bunch.shape, rest_scales(bunch)
    form = _VOLUMES[shape.transverse] if shape.ellipsoid else _AREAS[shape.transverse] * _LENGTHS[shape.longitudinal]
    return filling(bunch) / (form * scales.prod())


def density_field(bunch, rule, points):
    """Lab E (3, M) [V/m] at lab points (3, M) about the centre of a bunch known as a density."""
    return density_map(bunch, rule, points)[:3]


def density_map(bunch, rule, points):
    """Lab E [V/m] and, last, phi [V], (4, M), at lab points (3, M); phi of a coasting beam means nothing."""
    probes = np.ascontiguousarray(points * np.array([1.0, 1.0, bunch.gamma])[:, None], float)
    out = np.empty((4, probes.shape[1]))
    for first in range(0, probes.shape[1], _BLOCK):
        block = np.ascontiguousarray(probes[:, first : first + _BLOCK])
        out[:, first : first + _BLOCK] = _sum(bunch, rule, block)
    return COULOMB * central_density(bunch) * bunch.gamma * out


def _sum(bunch, rule, probes):
    from beamfield.kernels import probe_charges, probe_rays

    shape, out = bunch.shape, np.empty((4, probes.shape[1]))
    scales = tuple(float(scale) for scale in rest_scales(bunch))
    edged = shape.transverse != "gaussian"
    directions, weights = azimuth_nodes(probes, scales, rule.azimuth, edged, shape.ellipsoid)
    if shape.ellipsoid:
        degree = 2 if shape.transverse == "parabolic" else 0
        probe_rays.ray_field(probes, scales, degree, directions, weights, *height_nodes(rule), bunch.gamma, out)
    else:
        kinds = (_CODES[shape.transverse], _CODES[shape.longitudinal])
        nodes = (*unit_nodes(rule.radial), *height_nodes(rule))
        probe_charges.probe_field(probes, scales, kinds, rule.window, directions, weights, *nodes, bunch.gamma, out)
    return out
