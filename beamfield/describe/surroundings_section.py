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
_KEYS = ("radius", "half_width", "half_height", "half_gap")
_ALONG_ONLY = (
    "read and checked; its images along are in potential, geometry factor and what follows, those across in no result"
)
_NO_IMAGE = "read and checked; the images in it are not in the results of this version"


def surroundings(reading):
    """Surroundings that the reading describes; what could not be read has been said and is left out."""
    _warn_of_images(reading)
    return Surroundings(
        chamber=_chamber(reading) if _CHAMBER in reading else None,
        pole_half_gap=reading.si("surroundings.poles.half_gap"),
        cathode=reading.si("surroundings.cathode.at"),
        neutralisation=reading.si("surroundings.neutralisation", absent=0.0) or 0.0,
        cathode_field=reading.si("surroundings.cathode.field"),
    )


def _warn_of_images(reading):
    for key in reading.written(_CHAMBER):
        reading.warn(key, _ALONG_ONLY)
    for key in reading.written("surroundings.poles", "surroundings.cathode"):
        reading.warn(key, _NO_IMAGE)


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
