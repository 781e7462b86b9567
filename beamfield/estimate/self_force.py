"""How strong is the field of the bunch, and what does it do to a particle in it?"""

from dataclasses import replace
from math import nan

import numpy as np

from beamfield.estimate.background import ACROSS_ONLY, ALONE, left_across, weakened
from beamfield.estimate.cathode import force_weight, odd, remarks_of
from beamfield.estimate.centre import MISSED, peak_place, slopes, smooth_slopes
from beamfield.estimate.finding import Finding
from beamfield.estimate.frame import line_density
from beamfield.estimate.source import asked, source_of
from beamfield.estimate.textbook import closed_axis_field, closed_gradient
from beamfield.laws import intensity

AXES = "xyz"
LONG = 10.0  # rest-frame aspect above which a bunch counts as long


def axes_of(bunch):
    return (0, 1) if bunch.coasting else (0, 1, 2)


def gradients(bunch, numerics, cathode=None, across=1.0):
    """Slopes at the centre (A,), their doubts (A,), closed forms (A,) or None, and the method; with the image in a
    cathode, if there is one.
    """
    closed, axes = closed_gradient(bunch) if cathode is None else None, axes_of(bunch)
    if numerics.method == "closed-form" and closed is not None:
        closed = closed[list(axes)]
        return closed, 1e-9 * abs(closed), closed, "closed form"
    source = source_of(bunch, numerics, cathode, across)
    sigma = np.where(np.isfinite(bunch.sigma), bunch.sigma, 1.0)
    law = slopes if bunch.macro is None else smooth_slopes
    seen = odd if cathode is not None and bunch.macro is None else lambda field: field
    (value, other), (doubt, _) = asked(source, lambda field: law(seen(field), sigma, axes))
    closed = None if closed is None else closed[list(axes)]
    return value, np.hypot(doubt, other - value), closed, source.method


def self_force(bunch, surroundings, ring, numerics):
    """Findings on the strength of the field and on the forces it exerts."""
    yield _perveance(bunch, surroundings)
    cathode, image = surroundings.cathode, remarks_of(surroundings)
    alone = (*image, *((ALONE,) if surroundings.neutralisation else ()))
    found = gradients(bunch, numerics, cathode)
    yield from _findings("field_gradient", found, 1.0, alone)
    force = found if cathode is None else gradients(bunch, numerics, cathode, force_weight(bunch))
    yield from _defocusing(bunch, surroundings, _scaled(force, _bend(bunch)))
    yield _plasma(_scaled(found, _bend(bunch)), alone)
    for axis in axes_of(bunch):
        yield from _peaks(bunch, numerics, axis, surroundings, alone)


def _scaled(found, factor):
    return tuple(part * factor if isinstance(part, np.ndarray) else part for part in found)


def _defocusing(bunch, surroundings, kappas):
    """Across, the background takes its part of the force of the bunch; along, it has none."""
    factor, told, valid = left_across(bunch, surroundings)
    image, along = remarks_of(surroundings), (ACROSS_ONLY,) if told else ()
    for axis, finding in enumerate(_findings("defocusing", kappas, 1.0, image)):
        if axis == 2:
            yield replace(finding, remarks=(*image, *along))
        else:
            yield weakened(finding, factor, told, valid)


def _bend(bunch):
    """kappa over dE/dx: q / (gamma^3 m beta^2 c^2) [1/V]."""
    return intensity.acceleration(1.0, bunch.species.charge, bunch.species.mass, bunch.beta_gamma)


def _perveance(bunch, surroundings):
    species = bunch.species
    current = intensity.current(species.charge, line_density(bunch)[0], bunch.velocity)
    value = intensity.perveance(current, bunch.beta_gamma, species.characteristic_current, surroundings.neutralisation)
    remarks = ()
    if not bunch.coasting and bunch.aspect < LONG:
        remarks = (f"the bunch is only {bunch.aspect:.3g} times longer than wide in its own frame: no long beam",)
    return Finding("perveance", float(value), 0.0, None, "closed form", remarks, not remarks)


def _findings(family, found, factor, remarks):
    values, doubts, closed, method = found
    for row, value in enumerate(values):
        textbook = None if closed is None else float(closed[row])
        yield Finding(f"{family}_{AXES[row]}", float(value), float(abs(doubts[row])), textbook, method, remarks)


def _plasma(kappas, remarks):
    values, doubts, closed, method = kappas
    if not sum(values) > 0.0:
        remark = "the strengths, as summed, do not add up to a defocusing one"
        return Finding("plasma_wavelength", nan, nan, None, method, (*remarks, remark), False)
    value = intensity.plasma_wavelength(*_three(values))
    doubt = 0.5 * value * float(np.linalg.norm(doubts)) / float(np.sum(values))
    textbook = None if closed is None else float(intensity.plasma_wavelength(*_three(closed)))
    return Finding("plasma_wavelength", float(value), doubt, textbook, method, remarks)


def _three(values):
    return (*values, 0.0) if len(values) == 2 else tuple(values)


def _peaks(bunch, numerics, axis, surroundings, remarks):
    cathode = surroundings.cathode
    edge = bunch.extent(axis)
    cusp = bunch.shape is not None and bunch.shape.flat(axis)
    closed_peak = None
    if bunch.shape is not None and cathode is None:
        place = (
            peak_place(lambda places: _closed(bunch, axis, places), bunch.sigma[axis], edge, cusp)
            if _has(bunch, axis)
            else None
        )
        closed_peak = None if place is None else float(abs(_closed(bunch, axis, np.array([place]))[0]))
    if numerics.method == "closed-form" and closed_peak is not None:
        value, doubt, method = closed_peak, 1e-9 * closed_peak, "closed form"
    else:
        source = source_of(bunch, numerics, cathode)
        place = peak_place(lambda places: _along(source.fields[0], axis, places), bunch.sigma[axis], edge, cusp)
        value, doubt = asked(source, lambda field: float(abs(_along(field, axis, np.array([place]))[0])))
        doubt, method = np.hypot(doubt, MISSED * value), source.method
    bend = abs(_bend(bunch))
    yield Finding(f"peak_field_{AXES[axis]}", value, float(doubt), closed_peak, method, remarks)
    if axis < 2:
        closed_kick = None if closed_peak is None else bend * closed_peak
        if cathode is not None:
            force = source_of(bunch, numerics, cathode, force_weight(bunch))
            value, doubt = asked(force, lambda field: float(abs(_along(field, axis, np.array([place]))[0])))
        kick = Finding(f"peak_kick_{AXES[axis]}", bend * value, bend * float(doubt), closed_kick, method)
        factor, told, valid = left_across(bunch, surroundings)
        yield weakened(replace(kick, remarks=remarks_of(surroundings)), abs(factor), told, valid)
    else:
        remarks = (*remarks_of(surroundings), *((ACROSS_ONLY,) if surroundings.neutralisation else ()))
        work = intensity.energy_change(1.0, bunch.species.charge)
        closed_work = None if closed_peak is None else work * closed_peak
        yield Finding("peak_energy_change_z", work * value, work * float(doubt), closed_work, method, remarks)


def _has(bunch, axis):
    return closed_axis_field(bunch, axis, np.array([bunch.sigma[axis]])) is not None


def _closed(bunch, axis, places):
    return closed_axis_field(bunch, axis, places)


def _along(field, axis, places):
    points = np.zeros((3, len(places)))
    points[axis] = places
    return field(points)[axis]
