"""Uniform cylinder of elliptic section, unit charge, in its rest frame: half axes a, b across and half length l along.

Fields are over q / (4 pi eps0): [1/m^2] for one unit of charge. With p' running round the edge of the section, d its
distance across from the point, u = l -/+ z the distances to the ends, R = sqrt(d^2 + u^2) and rho = 1 / (2 pi a b l),

    E_perp = rho  closed integral of n dl [asinh((l - z) / d) + asinh((l + z) / d)]
    E_z    = rho  closed integral of (p' - p) . n dl [1 / (R_1 + |l - z|) - 1 / (R_2 + |l + z|)]

(Gauss's theorem on 1/r over the volume, and on div[d (R - |u|) / d^2] = 1/R over each end; own derivation, common
practice.)
"""

import numpy as np

_STEPS = (0.25, 0.125, 0.0625, 0.03125, 0.015625)  # of the rule round the edge; halved until two agree
_AGREE = 1e-9  # the error of the finer of two rules is the square of this
_REACH = 74.0  # of the hyperbolic sine: beyond it 1e-15 of the edge is left
_SHARPEST = 1e-15
_BLOCK = 256


def uniform_cylinder_field(points, half_axes):
    """Field (3, M) [1/m^2] at points (3, M) [m], anywhere; half_axes (a, b, l) [m]. The rim itself is a singular line.

    The trapezoidal rule round the edge, its nodes crowded about the part next to the point and its step halved until
    two rules agree; good to rounding of the largest field, so that a point very near the centre has fewer digits.
    """
    a, b, length = half_axes
    points = np.asarray(points, dtype=float)
    if a < b:
        return uniform_cylinder_field(points[[1, 0, 2]], (b, a, length))[[1, 0, 2]]
    field = np.zeros_like(points)
    axis = (points[0] == 0.0) & (points[1] == 0.0)
    field[2, axis] = uniform_cylinder_axis_field(points[2, axis], half_axes)
    for block in np.array_split(np.flatnonzero(~axis), points.shape[1] // _BLOCK + 1):
        field[:, block] = _settled(points[:, block], half_axes)
    return field


def uniform_cylinder_gradient(half_axes):
    """Slopes dE_i/dx_i (3,) [1/m^3] at the centre; half_axes (a, b, l) [m].

    (1/pi) closed integral of (cos^2 psi / (d^2 R), sin^2 psi / (d^2 R), 1 / (l R (R + l))) dpsi, d the half width
    towards psi: every term positive. For a round section d = a and all three are elementary.
    """
    a, b, length = half_axes
    psi = azimuths(a, b)
    d2 = (a * np.cos(psi)) ** 2 + (b * np.sin(psi)) ** 2
    reach = np.sqrt(d2 + length**2)
    terms = np.cos(psi) ** 2 / (d2 * reach), np.sin(psi) ** 2 / (d2 * reach), 1.0 / (length * reach * (reach + length))
    return 2.0 * np.mean(terms, axis=1)


def uniform_cylinder_axis_field(z, half_axes):
    """E_z (M,) [1/m^2] at z (M,) [m] on the axis; half_axes (a, b, l) [m].

        E_z = 2 pi rho [sqrt(d^2 + u_1^2) - u_1 - sqrt(d^2 + u_2^2) + u_2], u = |l -/+ z|, mean over the direction of d

    written as a quotient, so that no digits go for long or flat cylinders or near the centre.
    """
    a, b, length = half_axes
    z = np.asarray(z, dtype=float)[:, None]
    psi = azimuths(a, b)
    d2 = (a * np.cos(psi)) ** 2 + (b * np.sin(psi)) ** 2
    near, far = np.abs(length - z), np.abs(length + z)
    r_near, r_far = np.sqrt(d2 + near**2), np.sqrt(d2 + far**2)
    gain = 4.0 * length * z / (r_near + r_far) + 2.0 * np.clip(z, -length, length)
    return np.mean(gain / ((r_near + near) * (r_far + far)), axis=1) / length


def azimuths(a, b):
    """Angles psi (K,) round the turn, enough for a mean over the half width of an ellipse of half axes a, b."""
    return 2.0 * np.pi * np.arange(count := 80 * int(np.ceil(max(a / b, b / a)))) / count


def _settled(points, half_axes):
    coarse = _edge_sum(points, half_axes, _STEPS[0])
    for step in _STEPS[1:]:
        fine = _edge_sum(points, half_axes, step)
        if np.all(np.linalg.norm(fine - coarse, axis=0) <= _AGREE * np.linalg.norm(fine, axis=0)):
            break
        coarse = fine
    return fine


def _edge_sum(points, half_axes, step):
    """The closed integrals by a rule of the given step: (3, M)."""
    a, b, length = half_axes
    x, y, z = points[:, :, None]
    eta, weight = _nodes(points, a, b, step)
    cos, sin = -np.sin(eta), np.cos(eta)
    dx, dy = a * cos - x, b * sin - y
    d2 = np.maximum(dx**2 + dy**2, (_SHARPEST * b) ** 2)
    across = weight * (np.arcsinh((length - z) / np.sqrt(d2)) + np.arcsinh((length + z) / np.sqrt(d2)))
    near, far = (1.0 / (np.sqrt(d2 + u**2) + np.abs(u)) for u in (length - z, length + z))
    along = weight * (dx * b * cos + dy * a * sin) * (near - far)
    return np.stack([(across * b * cos).sum(1), (across * a * sin).sum(1), along.sum(1)]) / (
        2.0 * np.pi * a * b * length
    )


def _nodes(points, a, b, step):
    """Nodes and weights (M, K) in eta = psi - pi/2, where x = a cos psi, y = b sin psi is the edge and a >= b.

    tan eta = sqrt(b/a) tan theta spreads the ends of a flat section and its sides evenly; tan((theta - theta_0) / 2) =
    width sinh(tau) crowds the nodes about the point's own direction theta_0, the more the nearer it lies to the edge.
    """
    x, y = points[:2, :, None]
    stretch = np.sqrt(b / a)
    cos, sin = np.cos(psi := np.arctan2(y / b, x / a)), np.sin(psi)
    depth = np.abs(np.hypot(x / a, y / b) - 1.0) * np.hypot(a * cos, b * sin) / np.hypot(a * sin, b * cos)
    start = np.arctan2(-cos, stretch * sin)
    width = np.clip(0.5 * depth * _slope(start, stretch) ** -1, _SHARPEST, 1.0)
    tau = step * np.arange(-np.ceil(_REACH / step), np.ceil(_REACH / step) + 1.0)
    v = width * np.sinh(tau)
    theta = start + 2.0 * np.arctan(v)
    weight = step * 2.0 * width * np.cosh(tau) / (1.0 + v * v) * _slope(theta, stretch)
    return np.arctan2(stretch * np.sin(theta), np.cos(theta)), weight


def _slope(theta, stretch):
    """d eta / d theta for tan eta = stretch tan theta."""
    return stretch / (np.cos(theta) ** 2 + (stretch * np.sin(theta)) ** 2)
