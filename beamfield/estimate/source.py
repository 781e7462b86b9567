"""The bunch as a source of field, whichever way it is known, and numbers drawn from it with their doubt."""

import numpy as np

from beamfield.constants import SPEED_OF_LIGHT
from beamfield.estimate.density_source import DensitySource
from beamfield.estimate.particle_source import ParticleSource
from beamfield.estimate.superposition import Field
from beamfield.estimate.textbook import closed_field

ROUNDING = 4e-15  # relative, of a sum of many charges


def source_of(bunch, numerics):
    """What answers `.fields` and `.method` for a bunch."""
    return ParticleSource(bunch) if bunch.macro is not None else DensitySource(bunch, numerics.charges_per_probe)


def asked(source, question):
    """value and doubt of question(field), a number or an array: its spread over the variants of the field, and
    rounding.
    """
    value, *others = (question(field) for field in source.fields)
    spread = sum(np.square(other - value) for other in others)
    return value, np.sqrt(spread) + ROUNDING * np.abs(value)


def self_field(bunch, numerics, points):
    """Field of the bunch at lab points (3, M) about its centre; doubt is one relative rms figure for all of them."""
    source = source_of(bunch, numerics)
    field, doubt = asked(source, lambda lab: lab(points))
    total = np.square(field).sum()
    relative = float(np.sqrt(np.square(doubt).sum() / total)) if total > 0.0 else 0.0
    magnetic = source.magnetic(points) if bunch.macro is not None else None
    if magnetic is None:
        magnetic = bunch.beta / SPEED_OF_LIGHT * np.stack([-field[1], field[0], np.zeros(field.shape[1])])
    return Field(field, magnetic, relative, closed_field(bunch, points), source.method)
