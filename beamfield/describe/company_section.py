"""The sections `bunch.train` -> Train and `other_bunch` -> Encounter."""

from beamfield.beam.encounter import Encounter
from beamfield.beam.train import Train
from beamfield.describe import units
from beamfield.describe.bunch_section import bunch as read_bunch
from beamfield.describe.renamed import Renamed

_TRAIN, _SPACING, _OTHER = "bunch.train", "bunch.train.spacing", "other_bunch"
_TIME = units.unit("s").dimension


def train(reading, bunch):
    """Train that the reading describes; None without one or where a fault has been said."""
    if _TRAIN not in reading:
        return None
    if bunch and bunch.coasting:
        return reading.fault(_TRAIN, "a coasting beam is not bunched; leave it out")
    count, place = reading.word("bunch.train.count"), reading.word("bunch.train.place", absent=0)
    return reading.attempt(_TRAIN, Train, count, _spacing(reading, bunch), place)


def _spacing(reading, bunch):
    quantity = reading.quantity(_SPACING)
    if quantity is None or bunch is None:
        return None
    return reading.within(_SPACING, quantity.si * (bunch.velocity if quantity.unit.dimension == _TIME else 1.0))


def encounter(reading, folder):
    """Encounter that the reading describes; None without one or where a fault has been said."""
    if _OTHER not in reading:
        return None
    other = read_bunch(Renamed(reading, "bunch", _OTHER), None, None, folder)
    offset = tuple(reading.si(f"{_OTHER}.offset.{axis}", absent=0.0) for axis in "xyz")
    beta = tuple(reading.si(f"{_OTHER}.beta.{axis}") for axis in "xy") if f"{_OTHER}.beta" in reading else ()
    if None in offset + beta:
        return None
    return reading.attempt(_OTHER, Encounter, other, reading.word(f"{_OTHER}.direction"), offset, beta=beta or None)
