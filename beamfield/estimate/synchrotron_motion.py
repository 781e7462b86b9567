"""What does the longitudinal self-field do to the synchrotron oscillations in a ring, and is the bunch stable?"""

from dataclasses import replace

import numpy as np

from beamfield.estimate.axis_field import Both, asked_of_axis, centre_slope
from beamfield.estimate.finding import Finding
from beamfield.estimate.frame import line_density
from beamfield.estimate.longitudinal import NEUTRALISED, geometry, line_profile
from beamfield.estimate.pipe_wall import wall_of
from beamfield.estimate.textbook import rest_scales
from beamfield.laws import intensity, synchrotron
from beamfield.laws.line_shape import line_density as density_along
from beamfield.laws.long_beam import impedance_over_n

FLAT = 1e-4  # of the slip factor: nearer to transition the motion is frozen
FWHM = 2.3548200450309493  # of a Gaussian spread over its rms
NODES = 48
NO_BUCKET = "space charge undoes the focusing of the cavities: no bucket is left at the centre"
FROZEN = "at transition: the linear slip factor does not tell the motion"
BELOW = "below transition space charge alone drives no such instability: a bound for what other impedances add"


def synchrotron_motion(bunch, surroundings, ring, numerics):
    """Findings on synchrotron tune, bunch length and microwave stability; nothing without the cavities of the ring."""
    if ring is None or ring.rf is None:
        return
    slip = synchrotron.slip_factor(bunch.gamma, ring.rf.transition_gamma)
    frozen = (FROZEN,) if abs(slip) < FLAT else ()
    remarks = frozen + ((NEUTRALISED,) if surroundings.neutralisation else ())
    if not bunch.coasting:
        yield _tune(bunch, ring, slip, frozen)
        if bunch.shape is not None:
            yield _shift(bunch, surroundings, ring, numerics, slip, remarks)
            yield _lengthening(bunch, surroundings, ring, numerics, slip, remarks)
    if bunch.momentum_spread:
        yield from _stability(bunch, surroundings, numerics, slip, remarks)


def _energy(bunch):
    return bunch.gamma * bunch.species.rest_energy


def _tune(bunch, ring, slip, frozen):
    rf, charge = ring.rf, bunch.species.charge
    value = synchrotron.synchrotron_tune(slip, rf.harmonic, rf.voltage, charge, _energy(bunch), bunch.beta)
    return Finding("synchrotron_tune", value, 0.0, value, "closed form", frozen, not frozen)


def _share(ring, slope):
    """Both of the share of the cavities, from Both of a slope [V/m^2]."""
    unit = synchrotron.share_of_rf(1.0, ring.circumference, ring.rf.harmonic, ring.rf.voltage)
    return slope.times(unit if slope.value > 0.0 else -unit)


def _applied(name, law, slip, share, remarks, valid):
    value, varied, closed = (
        law(slip, max(0.0, part)) for part in (share.value, share.value + share.doubt, share.closed)
    )
    if slip < 0.0 and share.value >= 1.0:
        remarks, valid = (*remarks, NO_BUCKET), False
    doubt = abs(varied - value) if np.isfinite(value) else 0.0
    return Finding(name, value, doubt, closed, share.method, remarks, valid)


def _outside(bunch, surroundings, remarks):
    """Remarks, and whether the law holds."""
    wall = wall_of(bunch, surroundings)
    unsure = wall.remarks if wall else ()
    return (*remarks, *unsure), not unsure and FROZEN not in remarks


def _shift(bunch, surroundings, ring, numerics, slip, remarks):
    share = _share(ring, centre_slope(bunch, surroundings, numerics))
    return _applied(
        "synchrotron_tune_shift", synchrotron.tune_shift, slip, share, *_outside(bunch, surroundings, remarks)
    )


def _lengthening(bunch, surroundings, ring, numerics, slip, remarks):
    """The slope that the rms length feels is <z E_z> / sigma_z^2 over the line density."""
    edge = bunch.extent(2)
    u, weights = np.polynomial.legendre.leggauss(NODES)
    z = u * (edge or 6.0 * bunch.sigma[2])
    dense = density_along(line_profile(bunch), z, rest_scales(bunch)[2] / bunch.gamma)
    weights = weights * dense * z
    weights = weights / (weights @ z)
    slope = asked_of_axis(bunch, surroundings, numerics, z, lambda values: weights @ values)
    share = _share(ring, slope)
    return _applied("bunch_lengthening", synchrotron.lengthening, slip, share, *_outside(bunch, surroundings, remarks))


def _stability(bunch, surroundings, numerics, slip, remarks):
    species = bunch.species
    current = intensity.current(species.charge, line_density(bunch)[0], bunch.velocity)
    spread = FWHM * bunch.momentum_spread
    value = synchrotron.threshold_impedance(current, species.charge, _energy(bunch), bunch.beta, slip, spread)
    valid = FROZEN not in remarks
    allowed = Finding("impedance_threshold", value, 0.0, value, "closed form", remarks, valid)
    yield allowed
    if bunch.shape is None or not value:
        return
    factor = geometry(bunch, surroundings, numerics, wall_of(bunch, surroundings), remarks)
    if factor:
        yield _ratio(bunch, factor, value, slip, valid)


def _ratio(bunch, factor, threshold, slip, valid):
    own = Both(abs(factor.value), factor.doubt, abs(factor.closed_form), factor.method)
    own = own.times(impedance_over_n(1.0, bunch.beta, bunch.gamma) / threshold)
    remarks = factor.remarks + ((BELOW,) if slip < 0.0 else ())
    return replace(
        factor,
        name="impedance_threshold_ratio",
        value=own.value,
        doubt=own.doubt,
        closed_form=own.closed,
        remarks=remarks,
        valid=factor.valid and valid,
    )
