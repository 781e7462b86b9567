"""The bunch as a source of field, whichever way it is known, and numbers drawn from it with their doubt."""

import numpy as np

from beamfield.constants import SPEED_OF_LIGHT
from beamfield.estimate.cathode import BeforeCathode, behind, mirror_field
from beamfield.estimate.density_source import DensitySource
from beamfield.estimate.particle_source import ParticleSource
from beamfield.estimate.superposition import Field
from beamfield.estimate.textbook import closed_field

ROUNDING = 4e-15  # relative, of a sum of many charges


def source_of(bunch, numerics, cathode=None, across=1.0):
    """What answers `.fields` and `.method` for a bunch; with its mirror image in a cathode [m] behind it, whose field
    across the motion counts `across` times.
    """
    alone = ParticleSource(bunch) if bunch.macro is not None else DensitySource(bunch, numerics.charges_per_probe)
    return alone if cathode is None else BeforeCathode(alone, cathode, across)


def asked(source, question):
    """value and doubt of question(field), a number or an array: its spread over the variants of the field, and
    rounding.
    """
    value, *others = (question(field) for field in source.fields)
    spread = sum(np.square(other - value) for other in others)
    return value, np.sqrt(spread) + ROUNDING * np.abs(value)


def self_field(bunch, numerics, points, cathode=None):
    """Field of the bunch at lab points (3, M) about its centre; doubt is one relative rms figure for all of them.

    Before a cathode that of its mirror image is in it, and there is no field inside the cathode.
    """
    source = source_of(bunch, numerics)
    field, doubt = asked(source, lambda lab: lab(points))
    if cathode is not None:
        return _before(bunch, source, cathode, points, field, doubt)
    magnetic = source.magnetic(points) if bunch.macro is not None else None
    return _told(bunch, field, field, doubt, closed_field(bunch, points), source.method, magnetic)


def _before(bunch, source, cathode, points, field, doubt):
    image, more = asked(source, lambda lab: mirror_field(lab, cathode, points))
    free, closed = ~behind(points, cathode), closed_field(bunch, points)
    if closed is not None:
        closed = free * (closed + mirror_field(lambda places: closed_field(bunch, places), cathode, points))
    method = BeforeCathode(source, cathode).method
    return _told(bunch, free * (field + image), free * (field - image), np.hypot(doubt, more), closed, method)


def _told(bunch, field, turned, doubt, closed, method, magnetic=None):
    """turned, the field with that of what runs the other way reversed: its magnetic part has the other sign; magnetic,
    B of particles that keep their own momenta."""
    total = np.square(field).sum()
    relative = float(np.sqrt(np.square(doubt).sum() / total)) if total > 0.0 else 0.0
    if magnetic is None:
        magnetic = bunch.beta / SPEED_OF_LIGHT * np.stack([-turned[1], turned[0], np.zeros(field.shape[1])])
    return Field(field, magnetic, relative, closed, method)
