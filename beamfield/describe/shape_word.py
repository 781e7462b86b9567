"""How the charges are spread: a word, two profiles, or a file of macro-particles."""

from beamfield.beam.shape import SHAPES, Shape
from beamfield.describe.file_word import read_particles
from beamfield.describe.tree import Mapping

KEY = "bunch.shape"
_PROFILES = (f"{KEY}.transverse", f"{KEY}.longitudinal")
_PARTICLES = f"{KEY}.particles"


def spread(reading, folder):
    """Shape or MacroParticles that the reading describes, or None where a fault has been said."""
    if not isinstance(reading.nodes.get(KEY), Mapping):
        return SHAPES.get(reading.word(KEY))
    if _PARTICLES in reading:
        return _particles(reading, folder)
    return _profiles(reading)


def _particles(reading, folder):
    for profile in reading.written(*_PROFILES):
        reading.fault(profile, "a particle file already says how the charges are spread; keep one of the two")
    return reading.attempt(_PARTICLES, read_particles, reading.word(_PARTICLES), folder)


def _profiles(reading):
    for profile in _PROFILES:
        if profile not in reading:
            example = "transverse: gaussian, longitudinal: parabolic"
            reading.fault(profile, f"is missing; a shape has both, {{{example}}}, or {{particles: FILE}}")
    return reading.attempt(KEY, Shape, *(reading.word(profile) for profile in _PROFILES))
