"""The other bunches: each a superposition of charges of its own momentum, seen from the centre of ours."""

from dataclasses import dataclass

import numpy as np

from beamfield.beam.bunch import Bunch
from beamfield.constants import SPEED_OF_LIGHT
from beamfield.estimate.source import asked, source_of
from beamfield.estimate.superposition import Field
from beamfield.estimate.textbook import closed_field
from beamfield.laws.beam_beam import force_over_electric


@dataclass(frozen=True, slots=True)
class Companion:
    """bunch, as it would be alone and moving along +z; place (x, y, z) of its centre from ours [m]; whether it comes
    towards us. An opposing bunch is seen in the mirror of the transverse plane: its head is at the smaller z.
    """

    bunch: Bunch
    place: tuple[float, float, float]
    opposing: bool = False

    @property
    def way(self):
        return -1.0 if self.opposing else 1.0

    @property
    def momentum(self):
        """gamma beta along z, signed [1]."""
        return self.way * self.bunch.beta_gamma

    def own(self, points):
        """Places (3, M) about its own centre, along its own way, of lab points (3, M) about ours [m]."""
        return (points - np.array(self.place)[:, None]) * np.array([[1.0], [1.0], [self.way]])

    def electric(self, field, points):
        """Lab E (3, M) [V/m] at lab points (3, M) about our centre, of the field it has alone."""
        return field(self.own(points)) * np.array([[1.0], [1.0], [self.way]])

    def force_per_charge(self, field, points, beta_gamma):
        """E + v x B (3, M) [V/m] on charges that move along +z with beta_gamma: no difference of near equals."""
        weakened = force_over_electric(beta_gamma, self.momentum)
        return self.electric(field, points) * np.array([[weakened], [weakened], [1.0]])


def neighbours(bunch, train):
    """Companions of a bunch in its train, from the head to the tail."""
    return tuple(Companion(bunch, (0.0, 0.0, z)) for z in train.neighbours) if train else ()


def met(encounter):
    """The bunch of an encounter as a Companion."""
    return Companion(encounter.other, encounter.offset, encounter.opposing)


def companions(bunch, surroundings):
    """All the other bunches of a case."""
    others = (met(surroundings.encounter),) if surroundings.encounter else ()
    return neighbours(bunch, surroundings.train) + others


def sum_over(group, numerics, question):
    """Sum over companions of question(companion, field) -> array, its doubt, and the methods; zeros for no companion.

    Bunches of one kind are varied together, for they err alike.
    """
    kinds = {id(companion.bunch): companion.bunch for companion in group}
    value, doubt, methods = 0.0, 0.0, {}
    for bunch in kinds.values():
        equal = [companion for companion in group if companion.bunch is bunch]
        source = source_of(bunch, numerics)
        one, spread = asked(source, lambda field, equal=equal: sum(question(companion, field) for companion in equal))
        value, doubt, methods[source.method] = value + one, doubt + spread, None
    return value, doubt, "; ".join(methods)


def field_of_others(bunch, surroundings, numerics, points):
    """Lab Field of all the other bunches, now, at lab points (3, M) about the centre of ours."""
    nought = np.zeros((6, points.shape[1]))

    def both(companion, field):
        electric = companion.electric(field, points)
        slowness = companion.momentum / companion.bunch.gamma / SPEED_OF_LIGHT
        return np.concatenate([electric, slowness * np.stack([-electric[1], electric[0], 0.0 * electric[0]])])

    value, doubt, method = sum_over(companions(bunch, surroundings), numerics, both)
    value = nought + value
    total = np.square(value[:3]).sum()
    relative = float(np.sqrt(np.square((nought + doubt)[:3]).sum() / total)) if total > 0.0 else 0.0
    return Field(value[:3], value[3:], relative, _closed(bunch, surroundings, points), method)


def force_of_others(bunch, surroundings, numerics, points):
    """Force (3, M) [N] of all the other bunches, now, on particles of ours at lab points (3, M) about its centre."""

    def force(companion, field):
        return companion.force_per_charge(field, points, bunch.beta_gamma)

    value = sum_over(companions(bunch, surroundings), numerics, force)[0]
    return bunch.species.charge * (np.zeros(points.shape) + value)


def _closed(bunch, surroundings, points):
    fields = [c.electric(law, points) for c in companions(bunch, surroundings) if (law := closed_law(c.bunch))]
    return sum(fields) if fields and len(fields) == len(companions(bunch, surroundings)) else None


def closed_law(bunch):
    """The closed form of the field as a function of points, or None where the shape has none."""
    if closed_field(bunch, np.array(bunch.sigma)[:, None]) is None:
        return None
    return lambda points: closed_field(bunch, points)
