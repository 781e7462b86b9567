"""How much of it could there be? The current that the chamber lets through, the charge that the cathode gives."""

from beamfield.estimate.finding import Finding
from beamfield.estimate.frame import line_density
from beamfield.estimate.pipe_wall import LONG, mean_scale, wall_of
from beamfield.estimate.textbook import rest_scales
from beamfield.laws import current_limit, intensity, long_beam
from beamfield.laws.current_limit import emitting_area


def intensity_limit(bunch, surroundings, ring, numerics):
    """Findings on the largest peak current and the largest charge; of a bunch known as a density."""
    if bunch.shape is None:
        return
    wall = wall_of(bunch, surroundings)
    if wall:
        yield _pipe(bunch, surroundings, wall)
    if surroundings.cathode_field and not bunch.coasting:
        yield _cathode(bunch, surroundings.cathode_field)


def _pipe(bunch, surroundings, wall):
    profile = {"uniform": "kv"}.get(bunch.shape.transverse, bunch.shape.transverse)
    factor = long_beam.geometry_factor(long_beam.ON_AXIS[profile], wall.radius, mean_scale(bunch))
    value = current_limit.pipe_limit(bunch.gamma, bunch.species.characteristic_current, factor)
    remarks, valid = (), True
    if wall.closeness <= LONG:
        said = f"the bunch is only {wall.closeness:.2g} of b / gamma long (rms): a short one may carry more"
        remarks, valid = (said,), False
    if surroundings.neutralisation:
        remarks, valid = (*remarks, "a neutralised beam may carry more"), False
    peak = intensity.current(bunch.species.charge, line_density(bunch)[0], bunch.velocity)
    if peak > value:
        remarks += (f"the peak current is {peak / value:.3g} times this: the beam would not pass",)
    return Finding("limiting_current", value, 0.0, value, "closed form", remarks, valid)


def _cathode(bunch, field):
    area = emitting_area(bunch.shape.transverse, bunch.shape.ellipsoid, rest_scales(bunch)[:2])
    value = current_limit.short_pulse_limit(field, area)
    remarks = ("taken with the section that the bunch has where the case describes it",)
    if abs(bunch.charge) > value:
        remarks += (f"the bunch has {abs(bunch.charge) / value:.3g} times this charge: the cathode would not give it",)
    return Finding("cathode_charge_limit", value, 0.0, value, "closed form", remarks)
