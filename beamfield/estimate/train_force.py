"""What do the bunches before and behind do to this one?"""

from dataclasses import replace

import numpy as np

from beamfield.estimate.centre import slopes_amid
from beamfield.estimate.companions import closed_law, neighbours, sum_over
from beamfield.estimate.finding import Finding
from beamfield.laws import intensity
from beamfield.laws.beam_beam import force_over_electric

CHARGES, LEAST = 262144, 2048  # of all neighbours for each probe, and of one: seen from far off, fewer will do
CENTRE = np.zeros((3, 1))


def train_force(bunch, surroundings, ring, numerics):
    """Findings on the field of the other bunches of the train at the centre of this one."""
    group = neighbours(bunch, surroundings.train)
    if not group:
        return
    charges = min(numerics.charges_per_probe, max(LEAST, CHARGES // len(group)))
    each = replace(numerics, charges_per_probe=charges)
    value, doubt, method = sum_over(group, each, lambda companion, field: _strengths(bunch, companion, field))
    law = closed_law(bunch)
    closed = None if law is None else sum(_strengths(bunch, companion, law) for companion in group)
    if numerics.method == "closed-form" and closed is not None:
        value, doubt, method = closed, 1e-9 * np.abs(closed), "closed form"
    remarks = _screened(bunch, surroundings)
    for row, name in enumerate(("train_field_z", *(f"train_defocusing_{axis}" for axis in "xyz"))):
        textbook = None if closed is None else float(closed[row])
        yield Finding(name, float(value[row]), float(doubt[row]), textbook, method, remarks, not remarks)


def _strengths(bunch, companion, field):
    """E_z [V/m] and the three kappas [1/m2] of one neighbour at the centre, (4,)."""
    gradient = slopes_amid(lambda points: companion.electric(field, points), bunch.sigma)
    bend = intensity.acceleration(1.0, bunch.species.charge, bunch.species.mass, bunch.beta_gamma)
    across = bend * bunch.gamma**2 * force_over_electric(bunch.beta_gamma, companion.momentum)
    return np.append(companion.electric(field, CENTRE)[2], gradient * np.array([across, across, bend]))


def _screened(bunch, surroundings):
    chamber, spacing = surroundings.chamber, surroundings.train.spacing
    if chamber is None or bunch.gamma * spacing < min(chamber.half_width, chamber.half_height):
        return ()
    return ("the bunches are further apart than the chamber's half size over gamma: its walls screen them",)
