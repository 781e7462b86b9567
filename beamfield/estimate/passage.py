"""What an opposing bunch does in all of its passage: its field integrated along its length, and the textbook's."""

from functools import partial
from math import hypot, sqrt

import numpy as np

from beamfield.constants import COULOMB
from beamfield.estimate.centre import slopes_amid
from beamfield.estimate.probe_rule import unit_nodes
from beamfield.laws import flat_beam

FAR = 1e5  # sizes beyond which nothing is left of the field
STEPS, SECTION = 64, 40  # heights along half a bunch without ends; before an end and behind it
FEWER = 0.75  # part of them in the coarser rule, whose error stands for the doubt
_SECTIONS = {
    "gaussian": flat_beam.gaussian_beam_field,
    "kv": flat_beam.kv_field,
    "parabolic": flat_beam.parabolic_field,
}
_EDGES = {"gaussian": 1.0, "kv": 2.0, "parabolic": sqrt(6.0)}  # scale of the section over its rms size
_AXIS = {
    "uniform": 1.2,
    "parabolic": 10.0 / 7.0,
}  # an ellipsoid seen along z: density of the axis over a uniform ellipse


def passage_field(field, bunch, aside, part, points):
    """Integral of E dz (3, M) [V] from end to end at (x, y) of points (3, M) about the centre of a density.

    aside, distance from the axis that is to be resolved [m]; part, of the heights. E_x and E_y are even in z.
    """
    heights, weights = _heights(bunch, aside, part)
    probes = np.repeat(points, len(heights), axis=1)
    probes[2] = np.tile(heights, points.shape[1])
    result = 2.0 * field(probes).reshape(3, points.shape[1], -1) @ weights
    result[2] = 0.0
    return result


def _heights(bunch, aside, part):
    """Nodes and weights of z > 0: even steps of asinh for a bunch without ends, else crowded at the end from within
    and without.
    """
    width = hypot(sqrt(bunch.sigma[0] * bunch.sigma[1]), aside) / bunch.gamma
    edge, length, count = bunch.extent(2), bunch.sigma[2], round(part * STEPS)
    if edge is None:
        t = np.arcsinh(FAR * hypot(length, width) / length) * np.arange(count) / count
        weights = length * t[1] * np.cosh(t)
        weights[0] *= 0.5
        return length * np.sinh(t), weights
    x, w = unit_nodes(round(part * SECTION))
    inner, reach = np.arcsinh(edge / width), np.arcsinh(FAR)
    heights = [edge - width * np.sinh(inner * x), edge + width * np.sinh(reach * x)]
    return np.concatenate(heights), np.concatenate([width * np.cosh(long * x) * long * w for long in (inner, reach)])


def passage_strengths(field, encounter, part=1.0):
    """Integral of E_x, E_y dz [V] at the centre of our bunch, and their slopes [V/m], (4,)."""
    other, place = encounter.other, -np.array([*encounter.offset[:2], 0.0])[:, None]
    along = partial(passage_field, field, other, hypot(*encounter.offset[:2]), part)
    return _strengths(lambda points: along(points + place), other.sigma)


def closed_strengths(encounter):
    """The same by the textbook, or None: the field of a long beam of the same section and of one charge a metre."""
    other, place = encounter.other, -np.array(encounter.offset[:2])[:, None]
    sigma, shape = np.array(other.sigma[:2]), other.shape
    scale = COULOMB * other.charge
    if not encounter.aside:
        density = _AXIS[shape.transverse] if shape.ellipsoid else flat_beam.AXIS_DENSITY[shape.transverse]
        return scale * density * np.array([0.0, 0.0, *(1.0 / (sigma * sigma.sum()))])
    if shape.ellipsoid:
        return None
    law, scales = _SECTIONS[shape.transverse], _EDGES[shape.transverse] * sigma
    return scale * _strengths(lambda points: _flat(law(points[:2] + place, scales)), other.sigma)


def _flat(field):
    return np.concatenate([field, np.zeros((1, field.shape[1]))])


def _strengths(field, sigma):
    return np.concatenate([field(np.zeros((3, 1)))[:2, 0], slopes_amid(field, sigma, (0, 1))])
