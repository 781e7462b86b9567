"""Size words -> rms sizes, by way of the shape."""

from beamfield.describe import units
from beamfield.describe.nearest import excerpt
from beamfield.errors import InputError

_TIME = units.unit("s").dimension


def rms_size(quantity, shape, axis, velocity=0.0):
    """Rms size along axis 0, 1, 2 [m]; a time is turned into a length by the velocity [m/s].

    InputError for a word that the shape has no meaning for.
    """
    length = quantity.si * (velocity if quantity.unit.dimension == _TIME else 1.0)
    (word,) = quantity.words
    return length / _over_rms(word, shape, axis, quantity)


def _over_rms(word, shape, axis, quantity):
    """What a word measures, in rms sizes."""
    if word == "rms":
        return 1.0
    width = shape.fwhm(axis) if word == "fwhm" else shape.edge(axis)
    if width is None:
        profile = shape.longitudinal if axis == 2 else shape.transverse
        ways = "rms" if word == "fwhm" else "rms or fwhm"
        raise InputError(f"{excerpt(quantity.text)}: a {profile} profile has no edge; write its {ways} size")
    return 2.0 * width if word == "full" else width
