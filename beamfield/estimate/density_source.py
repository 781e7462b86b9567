"""A bunch known as a density: its field as charges placed for each probe, and the same from a coarser rule."""

from dataclasses import dataclass
from functools import partial
from math import pi, sqrt

import numpy as np

from beamfield.constants import COULOMB
from beamfield.estimate.probe_rule import azimuth_nodes, height_nodes, ray_rule, rule_for, unit_nodes
from beamfield.estimate.textbook import filling, rest_scales

COARSER = 7.0 / 8.0  # nodes of the coarser rule in each direction: its error stands for the doubt, and covers it
COARSER_RAYS = 3.0 / 4.0  # the same where the error falls only as a power of the nodes
PANCAKE = 0.03  # rest-frame aspect below which an ellipsoid is seen by azimuth first also from outside
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
        coarser = rule.thinned(COARSER_RAYS if self.bunch.shape.ellipsoid else COARSER)
        return partial(density_field, self.bunch, rule), partial(density_field, self.bunch, coarser)

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
    scales = tuple(float(scale) for scale in rest_scales(bunch))
    return (_of_ellipsoid if bunch.shape.ellipsoid else _of_product)(bunch, rule, probes, scales)


def _of_product(bunch, rule, probes, scales):
    from beamfield.kernels import probe_charges

    shape, out = bunch.shape, np.empty((4, probes.shape[1]))
    kinds = (_CODES[shape.transverse], _CODES[shape.longitudinal])
    azimuth = azimuth_nodes(probes, scales, rule.azimuth, shape.transverse != "gaussian", rule.window)
    nodes = (*azimuth, *unit_nodes(rule.radial), *height_nodes(rule))
    probe_charges.probe_field(probes, scales, kinds, rule.window, *nodes, bunch.gamma, out)
    return out


def _of_ellipsoid(bunch, rule, probes, scales):
    """Rays in pairs from inside; from outside slopes first, but azimuths first where the bunch is a thin pancake."""
    from beamfield.kernels import probe_rays

    degree, out = (2 if bunch.shape.transverse == "parabolic" else 0), np.empty((4, probes.shape[1]))
    outside = np.square(probes / np.array(scales)[:, None]).sum(axis=0) > probe_rays.ON_SURFACE
    seen = _from_cone if bunch.aspect > PANCAKE else partial(_on_rays, paired=rule.height // 4)
    for chosen, way in ((~outside, partial(_on_rays, paired=rule.height // 2)), (outside, seen)):
        part = np.ascontiguousarray(probes[:, chosen])
        found = np.empty((4, part.shape[1]))
        way(rule, part, scales, degree, bunch.gamma, found)
        out[:, chosen] = found
    return out


def _from_cone(rule, probes, scales, degree, gamma, out):
    from beamfield.kernels import probe_cone

    probe_cone.cone_field(probes, scales, degree, rule.azimuth, *unit_nodes(rule.height // 4), gamma, out)


def _on_rays(rule, probes, scales, degree, gamma, out, paired):
    from beamfield.kernels import probe_rays

    nodes = (*unit_nodes(paired), *unit_nodes(max(1, rule.height - 2 * paired)))
    azimuth = azimuth_nodes(probes, scales, rule.azimuth, edged=True)
    probe_rays.ray_field(probes, scales, degree, *azimuth, *nodes, gamma, out)
