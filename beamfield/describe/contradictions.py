"""Parts of a case, each good in itself, that cannot be true together."""

_CHAMBER, _CATHODE, _DISPERSION = "surroundings.chamber", "surroundings.cathode.at", "ring.optics.dispersion_x"
_TAIL_ACROSS = 3.0  # rms sizes that must fit where a bunch has no edge
_TAIL_ALONG = 2.0
_FLATTEST = 1e3  # width over height, or the reverse
_ROUNDED = 1e-3  # a full ring may be described by rounded numbers
_SAME_MOMENTUM = 0.01  # relative difference that may be rounding, or a spread


def contradictions(reading, bunch, surroundings, ring, beamline):
    """Say as faults, or as warnings, what of the bunch does not go with what stands round it."""
    _is_no_sheet(reading, bunch)
    _fits_chamber(reading, bunch, surroundings.chamber)
    _stands_before_cathode(reading, bunch, surroundings.cathode)
    _has_poles_outside(reading, surroundings)
    _agrees_with_file(reading, bunch)
    _fits_train(reading, bunch, surroundings.train, ring)
    if ring:
        _fits_ring(reading, bunch, ring)
        _uses_dispersion(reading, bunch, ring.optics)
    if beamline and beamline.start is None and not bunch.emittance:
        reading.fault("beamline.start", "the matched beam follows from its emittance; add bunch.emittance")


def _reach(bunch, axis, tail):
    """Half extent [m] and how it is called: to the edge, or a number of rms sizes where there is none."""
    edge = bunch.extent(axis)
    return (tail * bunch.sigma[axis], f"{tail:g} rms") if edge is None else (edge, "its edge")


def _is_no_sheet(reading, bunch):
    flatness = max(bunch.sigma[:2]) / min(bunch.sigma[:2])
    if flatness > _FLATTEST:
        key = next(key for key in ("bunch.size", "bunch.emittance", "bunch.shape") if key in reading)
        message = f"one of x and y is {flatness:.3g} times the other; at most {_FLATTEST:g}, far flatter than any beam"
        reading.fault(key, message)


def _fits_chamber(reading, bunch, chamber):
    if chamber is None:
        return
    for axis, wall, name in ((0, chamber.half_width, "horizontally"), (1, chamber.half_height, "vertically")):
        reach, called = _reach(bunch, axis, _TAIL_ACROSS)
        if not reach < wall:
            sides = f"{called} is {reach * 1e3:.4g} mm from the axis, the wall {wall * 1e3:.4g} mm"
            reading.fault(_CHAMBER, f"the beam does not fit: {name} {sides}")


def _has_poles_outside(reading, surroundings):
    gap, chamber = surroundings.pole_half_gap, surroundings.chamber
    if gap and chamber and gap < chamber.half_height:
        reading.warn("surroundings.poles.half_gap", "the poles stand inside the chamber")


def _stands_before_cathode(reading, bunch, distance):
    if distance is None:
        return
    if bunch.coasting:
        return reading.fault(_CATHODE, "a coasting beam has no centre for a cathode to stand behind")
    reach, called = _reach(bunch, 2, _TAIL_ALONG)
    if reach > distance:
        message = f"the bunch reaches through the cathode: {called} is {reach:.4g} m behind its centre"
        (reading.warn if bunch.extent(2) is None else reading.fault)(_CATHODE, message)
    return None


def _agrees_with_file(reading, bunch):
    if bunch.macro is None or bunch.macro.momenta is None:
        return
    mean = float(bunch.macro.momenta[2] @ bunch.macro.weights)
    if abs(mean / bunch.beta_gamma - 1.0) > _SAME_MOMENTUM:
        said = f"gamma beta = {bunch.beta_gamma:.5g}, while the mean uz of the particle file is {mean:.5g}"
        reading.warn("bunch.energy", f"comes to {said}")


def _fits_ring(reading, bunch, ring):
    if bunch.coasting:
        if ring.bunches > 1:
            reading.fault("ring.bunches", "a coasting beam is not bunched; leave it out")
        return
    reach, called = _reach(bunch, 2, _TAIL_ALONG)
    spacing = ring.circumference / ring.bunches
    if 2.0 * reach > spacing:
        key = "bunch.size.z" if "bunch.size.z" in reading else "bunch.shape.particles"
        reading.fault(
            key,
            f"bunches overlap: one is {2.0 * reach:.4g} m long (twice {called}), and {ring.bunches} in "
            f"{ring.circumference:g} m leave {spacing:.4g} m for each",
        )


def _fits_train(reading, bunch, train, ring):
    if train is None:
        return
    reach, called = _reach(bunch, 2, _TAIL_ALONG)
    if train.count > 1 and 2.0 * reach > train.spacing:
        sides = f"one is {2.0 * reach:.4g} m long (twice {called}), and their centres are {train.spacing:.4g} m apart"
        reading.fault("bunch.train.spacing", f"bunches overlap: {sides}")
    if ring and train.count > ring.bunches:
        reading.fault("bunch.train.count", f"the train has {train.count} bunches, ring.bunches says {ring.bunches}")
    if ring and train.count * train.spacing > ring.circumference * (1.0 + _ROUNDED):
        reading.fault("bunch.train.spacing", f"the train does not fit in the ring of {ring.circumference:g} m")


def _uses_dispersion(reading, bunch, optics):
    if bunch.momentum_spread is None and optics.dispersion_x.any():
        key = _DISPERSION if _DISPERSION in reading else "ring.optics"
        reading.warn(key, "the dispersion is ignored: without bunch.momentum_spread it widens nothing")
