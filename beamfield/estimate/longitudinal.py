"""How deep is the potential of the bunch, and how strongly does it push itself along inside its chamber?"""

from dataclasses import replace
from functools import partial

import numpy as np

from beamfield.constants import ELEMENTARY_CHARGE
from beamfield.estimate.axis_field import asked_of_axis, centre_potential, centre_slope, closed_along
from beamfield.estimate.centre import peak_place
from beamfield.estimate.finding import Finding
from beamfield.estimate.pipe_wall import LONG, mean_scale, wall_of
from beamfield.estimate.textbook import filling, rest_scales
from beamfield.laws import long_beam
from beamfield.laws.line_shape import line_curvature

NEUTRALISED = "the neutralising background is not in this value"
STRAYED = 0.1  # relative difference from the long beam beyond which one g no longer says it all
_ELLIPSOID_LINES = {"uniform": "parabolic", "parabolic": "squared"}


WALL_ROUNDS = 3  # of the search for the strongest field with a wall: 1e-6 of its value, at a third of the time


def longitudinal(bunch, surroundings, ring, numerics):
    """Findings on the potential and the longitudinal self-field of a bunch known as a density."""
    if bunch.shape is None:
        return
    remarks = (NEUTRALISED,) if surroundings.neutralisation else ()
    wall = wall_of(bunch, surroundings)
    if wall or not bunch.coasting:
        yield _depression(bunch, surroundings, numerics, wall, remarks)
    factor = geometry(bunch, surroundings, numerics, wall, remarks)
    if factor:
        yield factor
        if ring is not None:
            yield _impedance(bunch, factor)
    if ring is not None and not bunch.coasting:
        yield _energy_per_turn(bunch, surroundings, ring, numerics, wall, remarks)


def line_profile(bunch):
    """The line density's word: a uniform ellipsoid has a parabolic one."""
    shape = bunch.shape
    return _ELLIPSOID_LINES[shape.transverse] if shape.ellipsoid else shape.longitudinal


def long_factor(bunch, wall):
    """g of a long beam at its middle, from wall and profile alone."""
    shape = bunch.shape
    constant = (long_beam.OF_ELLIPSOID if shape.ellipsoid else long_beam.ON_AXIS)[shape.transverse]
    return long_beam.geometry_factor(constant, wall.radius, mean_scale(bunch))


def peak_line_charge(bunch):
    """Charge per metre where the beam is densest, signed [C/m]."""
    if bunch.coasting:
        return bunch.line_density * bunch.species.charge
    return bunch.charge * bunch.shape.peak_line_density / bunch.sigma[2]


def _depression(bunch, surroundings, numerics, wall, remarks):
    if bunch.coasting:
        value = abs(long_beam.depression(peak_line_charge(bunch), long_factor(bunch, wall)))
        return Finding("potential_depression", value, _flatness(bunch, wall), value, "closed form", remarks)
    found = centre_potential(bunch, surroundings, numerics)
    found = found.times(1.0 if found.value > 0.0 else -1.0)
    unsure = wall.remarks if wall else ()
    doubt = found.doubt + (_flatness(bunch, wall) if wall else 0.0)
    return Finding("potential_depression", found.value, doubt, found.closed, found.method, remarks + unsure, not unsure)


def _flatness(bunch, wall):
    """What a section that is not round adds, at most, in a chamber that is not round [V]: its quadrupole's image."""
    if wall.round:
        return 0.0
    across = abs(bunch.sigma[0] ** 2 - bunch.sigma[1] ** 2) / wall.radius**2
    return abs(long_beam.depression(peak_line_charge(bunch), across))


def geometry(bunch, surroundings, numerics, wall, remarks):
    """Finding of g, or None where the line density has neither slope nor wall."""
    curvature = 0.0 if bunch.coasting else line_curvature(line_profile(bunch), rest_scales(bunch)[2] / bunch.gamma)
    if wall and not curvature:
        return _long_geometry(bunch, wall, remarks)
    if not curvature:
        return None
    unit = long_beam.axis_field(-filling(bunch) * curvature, 1.0, bunch.gamma)
    found = centre_slope(bunch, surroundings, numerics).times(1.0 / unit)
    valid, said = _holds(bunch, wall, found.value)
    return Finding("geometry_factor", found.value, found.doubt, found.closed, found.method, remarks + said, valid)


def _long_geometry(bunch, wall, remarks):
    value = long_factor(bunch, wall)
    short = wall.closeness <= LONG
    if short:
        remarks += (f"the bunch is only {wall.closeness:.2g} of b / gamma long (rms): no long beam",)
    return Finding("geometry_factor", value, 0.0, value, "closed form", remarks, not short)


def _holds(bunch, wall, value):
    if wall is None:
        return True, ("no chamber: g at the centre in free space, which grows with the logarithm of the length",)
    long = long_factor(bunch, wall)
    if abs(value - long) <= STRAYED * abs(long):
        return True, wall.remarks
    said = (
        f"g of a long beam would be {long:.4g}: this bunch, {wall.closeness:.2g} of b / gamma long (rms), is short for "
        "one g to hold along it"
    )
    return False, (said, *wall.remarks)


def _impedance(bunch, factor):
    unit = long_beam.impedance_over_n(1.0, bunch.beta, bunch.gamma)
    closed = None if factor.closed_form is None else abs(factor.closed_form) * unit
    return replace(
        factor,
        name="longitudinal_impedance_over_n",
        value=abs(factor.value) * unit,
        doubt=factor.doubt * unit,
        closed_form=closed,
    )


def _energy_per_turn(bunch, surroundings, ring, numerics, wall, remarks):
    unit = abs(bunch.species.charge) / ELEMENTARY_CHARGE * ring.circumference
    along = partial(closed_along, bunch, surroundings)
    place = peak_place(along, bunch.sigma[2], bunch.extent(2), rounds=WALL_ROUNDS)
    field = asked_of_axis(bunch, surroundings, numerics, np.array([place]), lambda values: abs(values[0]))
    found = field.times(unit)
    unsure = wall.remarks if wall else ()
    return Finding(
        "energy_change_per_turn", found.value, found.doubt, found.closed, found.method, remarks + unsure, not unsure
    )
