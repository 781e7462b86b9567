"""Which closed form serves which bunch: fields and slopes of the textbook, brought to the lab."""

import numpy as np

from beamfield.constants import COULOMB
from beamfield.laws import cylinder, ellipsoid, flat_beam, gaussian, parabolic, product


def rest_scales(bunch):
    """Semi-axes, or rms sizes where there is no edge, in the frame of the bunch (3,) [m]; z is 1 m for a coasting
    beam.
    """
    edges = [bunch.shape.edge(axis) or 1.0 for axis in range(3)]
    sigma = np.array([*bunch.sigma[:2], 1.0 if bunch.coasting else bunch.gamma * bunch.sigma[2]])
    return sigma * edges


def filling(bunch):
    """Charge [C] of a bunch, or charge per metre in its own frame [C/m] of a coasting beam."""
    return bunch.charge if not bunch.coasting else bunch.line_density * bunch.species.charge / bunch.gamma


def to_lab(bunch, rest):
    """Lab field [V/m] from the rest-frame field (3, M) over q / (4 pi eps0) of a bunch of one unit."""
    return COULOMB * filling(bunch) * np.array([bunch.gamma, bunch.gamma, 1.0])[:, None] * rest


def closed_field(bunch, points):
    """Lab E (3, M) [V/m] at lab points (3, M) about the centre, by the closed form of the shape; None where it has
    none.
    """
    law = _field_law(bunch)
    return None if law is None else to_lab(bunch, law(points * np.array([1.0, 1.0, bunch.gamma])[:, None]))


def closed_gradient(bunch):
    """Slopes dE_i/dx_i (3,) [V/m2] at the centre, lab, by the closed form of the shape; None for particles."""
    if bunch.shape is None:
        return None
    return COULOMB * filling(bunch) * bunch.gamma * np.asarray(_slopes(bunch))


def closed_axis_field(bunch, axis, places):
    """Lab E_i (M,) [V/m] at places (M,) [m] along one axis from the centre, by a closed form; None where there is
    none.
    """
    points = np.zeros((3, len(places)))
    points[axis] = places
    field = closed_field(bunch, points)
    if field is not None:
        return field[axis]
    if axis < 2 or bunch.shape is None:
        return None
    shape, scales = bunch.shape, rest_scales(bunch)
    rest = product.axis_field(bunch.gamma * places, shape.transverse, scales[:2], shape.longitudinal, scales[2])
    return COULOMB * filling(bunch) * rest


def _field_law(bunch):
    """Rest-frame field of the shape at rest-frame points, or None."""
    shape = bunch.shape
    if shape is None:
        return None
    scales = rest_scales(bunch)
    if shape.coasting:
        return lambda rest: _BEAMS[shape.transverse](rest, scales[:2])
    if shape.name in _FIELDS:
        return lambda rest: _FIELDS[shape.name](rest, scales)
    if shape.transverse == "gaussian":
        return lambda rest: product.gaussian_section_field(rest, scales[:2], shape.longitudinal, scales[2])
    return None


def _slopes(bunch):
    shape, scales = bunch.shape, rest_scales(bunch)
    if shape.coasting:
        return [*flat_beam.beam_gradient(shape.transverse, bunch.sigma[:2]), 0.0]
    if shape.name in _GRADIENTS:
        return _GRADIENTS[shape.name](scales)
    return product.product_gradient(shape.transverse, scales[:2], shape.longitudinal, scales[2])


_BEAMS = {"gaussian": flat_beam.gaussian_beam_field, "kv": flat_beam.kv_field, "parabolic": flat_beam.parabolic_field}
_FIELDS = {
    "gaussian": gaussian.gaussian_field,
    "uniform-ellipsoid": ellipsoid.uniform_ellipsoid_field,
    "parabolic-ellipsoid": parabolic.parabolic_ellipsoid_field,
    "uniform-cylinder": cylinder.uniform_cylinder_field,
}
_GRADIENTS = {
    "gaussian": gaussian.gaussian_gradient,
    "uniform-ellipsoid": ellipsoid.uniform_ellipsoid_gradient,
    "parabolic-ellipsoid": parabolic.parabolic_ellipsoid_gradient,
    "uniform-cylinder": cylinder.uniform_cylinder_gradient,
}
