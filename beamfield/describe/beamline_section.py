"""The section `beamline` -> Beamline."""

from beamfield.beam.beamline import ELEMENTS, Beamline, Start
from beamfield.describe.tree import Mapping, Sequence
from beamfield.describe.vocabulary import parts

_MOST_PASSAGES = 1_000_000
_START = "beamline.start"


def beamline(reading):
    """Beamline that the reading describes, its start as written; None without one or where a fault has been said."""
    if "beamline" not in reading:
        return None
    reading.warn("beamline", "read and checked; this version does not follow the beam along it")
    elements, repeat = _elements(reading), reading.word("beamline.repeat", absent=1)
    start = _start(reading)
    if elements is None or repeat is None or start is None:
        return None
    if len(elements) * repeat > _MOST_PASSAGES:
        key = "beamline.repeat" if "beamline.repeat" in reading else "beamline.elements"
        return reading.fault(key, f"{len(elements) * repeat} elements in all; at most {_MOST_PASSAGES}")
    return Beamline(elements, repeat, None if start == "matched" else start)


def _elements(reading):
    nodes = reading.nodes.get("beamline.elements")
    if not isinstance(nodes, Sequence):
        return None
    if not nodes.nodes:
        return reading.fault("beamline.elements", "holds no element; write one such as '- drift: {length: 0.5 m}'")
    elements = [_element(reading, f"beamline.elements[{index}]") for index in range(len(nodes.nodes))]
    return None if None in elements else tuple(elements)


def _element(reading, key):
    """One element, or None where a fault has been said."""
    kind = next((name for name in ELEMENTS if f"{key}.{name}" in reading), None)
    values = {name: reading.si(f"{key}.{kind}.{name}") for name in parts(f"{key}.{kind}")}
    return None if kind is None or None in values.values() else ELEMENTS[kind](**values)


def _start(reading):
    """Start, the word 'matched', or None where a fault has been said."""
    if _START not in reading:
        return Start((None, None))
    if not isinstance(reading.nodes.get(_START), Mapping):
        return reading.word(_START)
    betas = [reading.si(f"{_START}.beta_{axis}") for axis in "xy"]
    alphas = [reading.si(f"{_START}.alpha_{axis}", absent=0.0) for axis in "xy"]
    unread = [axis for axis, beta in zip("xy", betas) if beta is None and f"{_START}.beta_{axis}" in reading]
    return None if unread or None in alphas else Start(tuple(betas), tuple(alphas))
