"""What does the bunch that ours meets do to it: now, in a passage, and to the tune?"""

import numpy as np

from beamfield.estimate.centre import slopes_amid
from beamfield.estimate.companions import closed_law, met
from beamfield.estimate.finding import Finding
from beamfield.estimate.passage import FEWER, closed_strengths, passage_strengths
from beamfield.estimate.source import asked, source_of
from beamfield.estimate.textbook import closed_gradient
from beamfield.laws.beam_beam import force_over_electric, linear_tune_shift, passage_kick

DISRUPTED = 0.5  # length of the other bunch over the focal length, from which paths bend within the passage


def encounter_force(bunch, surroundings, ring, numerics):
    """Findings on the force of the bunch that ours meets."""
    encounter = surroundings.encounter
    if encounter is None:
        return
    yield from _now(bunch, encounter, numerics)
    if encounter.opposing:
        yield from _passed(bunch, encounter, ring, numerics)


def _now(bunch, encounter, numerics):
    other, companion = encounter.other, met(encounter)
    weakened = force_over_electric(bunch.beta_gamma, companion.momentum)

    def gradient(field):
        return weakened * slopes_amid(lambda points: companion.electric(field, points), other.sigma, (0, 1))

    source, law = source_of(other, numerics), closed_law(other)
    closed = None if law is None else gradient(law)
    if not any(encounter.offset):
        closed = weakened * closed_gradient(other)[:2]
    value, doubt, method = _by_road(numerics, closed, lambda: (*asked(source, gradient), source.method))
    yield from _pair("encounter_gradient", value, doubt, closed, method)


def _passed(bunch, encounter, ring, numerics):
    closed = closed_strengths(encounter)
    value, doubt, method = _by_road(numerics, closed, lambda: _summed(encounter, numerics))
    bend = passage_kick(1.0, bunch.species.charge, bunch.species.mass, bunch.beta_gamma, encounter.other.beta_gamma)
    value, doubt, closed = bend * value, abs(bend) * doubt, None if closed is None else bend * closed
    if encounter.aside:
        aside = np.array(encounter.offset[:2]) != 0.0  # on the axis of symmetry there is no kick
        kicks = [None if part is None else np.where(aside, part[:2], 0.0) for part in (value, doubt, closed)]
        yield from _pair("encounter_kick", *kicks, method)
    value, doubt, closed = -value[2:], doubt[2:], None if closed is None else -closed[2:]
    remarks = _disrupted(encounter, value)
    yield from _pair("encounter_focusing", value, doubt, closed, method, remarks)
    beta = _beta(encounter, ring)
    if beta is not None:
        shifts = [None if part is None else linear_tune_shift(part, beta) for part in (value, doubt, closed)]
        yield from _pair("beam_beam_tune_shift", *shifts, method, remarks + _hourglass(bunch, encounter, beta))


def _by_road(numerics, closed, summed):
    if numerics.method == "closed-form" and closed is not None:
        return closed, 1e-9 * np.abs(closed), "closed form"
    return summed()


def _summed(encounter, numerics):
    source = source_of(encounter.other, numerics)
    value, doubt = asked(source, lambda field: passage_strengths(field, encounter))
    coarser = passage_strengths(source.fields[0], encounter, FEWER)
    return value, np.hypot(doubt, coarser - value), source.method


def _beta(encounter, ring):
    """Beta functions (2,) [m] where the bunches meet: as said, else the ring's mean, else None."""
    if encounter.beta is not None:
        return np.array(encounter.beta)
    return (
        None
        if ring is None
        else np.array([ring.optics.weights @ ring.optics.beta_x, ring.optics.weights @ ring.optics.beta_y])
    )


def _disrupted(encounter, focusing):
    worst = float(np.abs(focusing).max()) * encounter.other.sigma[2]
    if worst < DISRUPTED:
        return ()
    return (f"the other bunch is {worst:.2g} focal lengths long (rms): paths bend within the passage",)


def _hourglass(bunch, encounter, beta):
    reach = encounter.other.sigma[2] * bunch.beta / (bunch.beta + encounter.other.beta)
    if reach < beta.min():
        return ()
    return (f"the passage is {2.0 * reach:.3g} m long (2 rms), while beta is {beta.min():.3g} m: sizes change in it",)


def _pair(family, values, doubts, closed, method, remarks=()):
    for row, axis in enumerate("xy"):
        textbook = None if closed is None else float(closed[row])
        yield Finding(
            f"{family}_{axis}", float(values[row]), float(doubts[row]), textbook, method, remarks, not remarks
        )
