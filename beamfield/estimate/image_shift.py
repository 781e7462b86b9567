"""How far do the images in chamber and poles shift the tunes of a ring?"""

from math import inf

import numpy as np

from beamfield.estimate.finding import Finding
from beamfield.estimate.frame import line_density
from beamfield.estimate.tune_shift import GREAT, local_sizes
from beamfield.laws import image_tune
from beamfield.laws.laslett import POLES_EPS, POLES_XI, image_coefficients
from beamfield.laws.tune import direct_tune_shift

LONG = 3.0  # rms lengths in the frame of the bunch over half the chamber from which its field there is that of a beam
TAIL = 3.0  # rms sizes that count as the beam where it has no edge
BEHIND = "the magnetic field of the oscillation does not go through the chamber; if it does: {other:.6g}"
ROUNDING = 1e-12


def image_shift(bunch, surroundings, ring, numerics):
    """Findings on the image tune shifts: one particle's, and the beam's as a whole."""
    if ring is None or (surroundings.chamber is None and surroundings.pole_half_gap is None):
        return
    remarks, valid = domain(bunch, surroundings, ring.optics)
    densities, smoothed = densities_of(bunch, ring)
    beam = (bunch.species.classical_radius, bunch.beta, bunch.gamma, *densities)
    background = surroundings.neutralisation
    for axis in (0, 1):
        name, (wall, poles) = "xy"[axis], coefficients(surroundings, axis)
        kappa = image_tune.incoherent(*beam, (wall[0], wall[2]), (poles[0], poles[2]), background)
        said = (*smoothed, *remarks)
        yield _finding(f"tune_shift_image_{name}", _shift(ring, axis, kappa), ring.tune[axis], said, valid)
    for axis in (0, 1):
        wall, poles = coefficients(surroundings, axis)
        behind, through = (
            _shift(ring, axis, law(*beam, wall, poles))
            for law in (image_tune.coherent_behind_wall, image_tune.coherent_through_wall)
        )
        said = (*smoothed, BEHIND.format(other=through), *remarks)
        if background:
            said += ("the neutralising background is taken to move with the beam: it is not in this value",)
        yield _finding(f"coherent_tune_shift_{'xy'[axis]}", behind, ring.tune[axis], said, valid)


def coefficients(surroundings, axis):
    """(eps_1, xi_1, h) of the chamber and (eps_2, xi_2, g) of the poles in one plane; nought where there is none."""
    sign, chamber, gap = (-1.0, 1.0)[axis], surroundings.chamber, surroundings.pole_half_gap
    wall, poles = (0.0, 0.0, inf), (0.0, 0.0, inf)
    if chamber is not None:
        eps, *xi = image_coefficients(chamber.shape, chamber.half_width, chamber.half_height)
        wall = sign * eps, xi[axis], chamber.half_height
    if gap is not None:
        poles = sign * POLES_EPS, POLES_XI * axis, gap
    return wall, poles


def densities_of(bunch, ring):
    """Peak and mean line density round the ring [1/m], and a remark where the peak had to be smoothed."""
    peak, smoothed = line_density(bunch)
    mean = peak if bunch.coasting else ring.bunches * bunch.particles / ring.circumference
    return (peak, mean), smoothed


def domain(bunch, surroundings, optics):
    """Remarks (), and whether the formulas of a long beam far from the walls hold."""
    chamber, gap = surroundings.chamber, surroundings.pole_half_gap
    height = gap if chamber is None else chamber.half_height
    width = inf if chamber is None else chamber.half_width
    remarks = ()
    if bunch.gamma * bunch.sigma[2] < LONG * min(height, width):
        length = bunch.gamma * bunch.sigma[2] / min(height, width)
        remarks += (f"gamma times the rms length is {length:.3g} of the half gap: no long bunch, images overestimated",)
    edges = [(bunch.shape.edge(axis) if bunch.shape else None) or TAIL for axis in (0, 1)]
    reach = np.array(edges) * local_sizes(bunch, optics).max(axis=1)
    for size, wall, way in zip(reach, (width, height), ("horizontally", "vertically"), strict=True):
        if size >= wall:
            remarks += (f"the beam touches the wall {way}: {size * 1e3:.4g} mm of {wall * 1e3:.4g} mm",)
    return remarks, not remarks


def _shift(ring, axis, kappa):
    beta = (ring.optics.beta_x, ring.optics.beta_y)[axis]
    return direct_tune_shift(beta, kappa, ring.optics.weights, ring.circumference)


def _finding(name, value, tune, remarks, valid):
    if abs(value) > GREAT * tune:
        remarks, valid = (*remarks, f"more than {GREAT:.0%} of the tune: first order no longer holds"), False
    return Finding(name, value, ROUNDING * abs(value), None, "closed form", remarks, valid)
