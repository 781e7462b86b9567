"""The section `surroundings` -> Surroundings."""

from math import inf

from beamfield.beam.surroundings import Chamber, Surroundings

_CHAMBER = "surroundings.chamber"
_SIZES = {  # shape -> the keys of half its width and half its height; None where it has no side walls
    "round": ("radius", "radius"),
    "elliptic": ("half_width", "half_height"),
    "plates": (None, "half_gap"),
    "rectangular": ("half_width", "half_height"),
}
_FREE = "read and checked; its images shift the tunes of a ring, without one forces across are those of free space"
_KEYS = ("radius", "half_width", "half_height", "half_gap")


def surroundings(reading):
    """Surroundings that the reading describes; what could not be read has been said and is left out."""
    for key in reading.written(_CHAMBER, "surroundings.poles"):
        if "ring" not in reading:
            reading.warn(key, _FREE)
    return Surroundings(
        chamber=_chamber(reading) if _CHAMBER in reading else None,
        pole_half_gap=reading.si("surroundings.poles.half_gap"),
        cathode=reading.si("surroundings.cathode.at"),
        neutralisation=reading.si("surroundings.neutralisation", absent=0.0) or 0.0,
        cathode_field=reading.si("surroundings.cathode.field"),
    )


def _chamber(reading):
    shape = reading.word(f"{_CHAMBER}.shape")
    if shape is None:
        return None
    wanted = _wanted(shape)
    for key in _KEYS:
        _check_key(reading, f"{_CHAMBER}.{key}", key in wanted, shape)
    half_width, half_height = (reading.si(f"{_CHAMBER}.{key}") if key else inf for key in _SIZES[shape])
    return reading.attempt(_CHAMBER, Chamber, shape, half_width, half_height)


def _check_key(reading, key, wanted, shape):
    if wanted and key not in reading:
        reading.fault(key, f"is missing; a chamber of shape '{shape}' has it")
    if not wanted and reading.written(key):
        reading.fault(key, f"a chamber of shape '{shape}' has {' and '.join(_wanted(shape))} instead")


def _wanted(shape):
    return dict.fromkeys(key for key in _SIZES[shape] if key)
