"""Where a map is drawn, in words: 'x', 'z = -40 .. 40 mm', 'x = -15 .. 15 mm, 201', and 'y = 2 mm' elsewhere."""

import re

from beamfield.beam.grid import AXES, Grid
from beamfield.describe import units
from beamfield.describe.nearest import excerpt
from beamfield.describe.number_text import split_number, whole_number
from beamfield.errors import Fault, InputError

REACH = 4.0  # rms sizes to either side where nobody says how far
COUNTS = {1: 201, 2: 101, 3: 41}  # points along each axis of a line, a plane, a box where nobody says how many
MOST = 10**9
_AXIS = re.compile(rf"\s*([{AXES}])\s*(?:=\s*(.*\S)\s*)?")
_LENGTH = units.unit("m").dimension


def grid_for(bunch, overs=(), ats=()):
    """Grid about the centre of a bunch: `overs`, one text for each spanned axis (x where none is), `ats` for others.

    Where nothing is said a span reaches 4 rms to either side, and an axis that is not spanned stands at the centre.
    InputError with every fault, each with the option it stands in.
    """
    overs, faults = overs or ("x",), []
    spans = [_tried(_span, "--over", text, faults, bunch, COUNTS.get(len(overs), 2)) for text in overs]
    places = [_tried(_place, "--at", text, faults) for text in ats]
    axes = [entry[0] for entry in spans + places if entry]
    faults += [Fault(f"{axis} is said twice", "map") for axis in AXES if axes.count(axis) > 1]
    if faults:
        raise InputError(*faults)
    lines = {axis: (place, place, 1) for axis, place in places} | {axis: line for axis, *line in spans}
    return _grid([lines.get(axis, (0.0, 0.0, 1)) for axis in AXES])


def _grid(lines):
    grid = Grid.between(*zip(*lines))
    if grid.size > MOST:
        raise InputError(Fault(f"{grid.size} points are more than a map holds ({MOST}); take fewer", "--over"))
    return grid


def _tried(read, option, text, faults, *more):
    try:
        return read(text, *more)
    except InputError as error:
        faults += [Fault(fault.message, f"{option} {excerpt(text)}") for fault in error.faults]


def _span(text, bunch, count):
    """(axis, from, to, count) of 'AXIS', 'AXIS = FROM .. TO UNIT' or 'AXIS = FROM .. TO UNIT, COUNT'."""
    axis, rest = _axis(text, "x = -15 .. 15 mm, 201")
    if rest is None:
        reach = _reach(bunch, axis)
        return axis, -reach, reach, count
    rest, comma, number = rest.partition(",")
    first, dots, last = rest.partition("..")
    if not dots:
        raise InputError(f"write from where to where, as in '{axis} = -15 .. 15 mm'")
    begin, end = _ends(first.strip(), last.strip())
    return axis, begin, end, _count(number.strip()) if comma else count


def _ends(first, last):
    """Two lengths [m]; the first may borrow the unit of the second."""
    unit = split_number(last)[2]
    begin = _length(first if split_number(first)[2].strip() else f"{first} {unit.strip()}")
    end = _length(last)
    if not begin < end:
        raise InputError(f"{excerpt(last)} does not lie beyond {excerpt(first)}")
    return begin, end


def _count(text):
    number = whole_number(text)
    if not 2 <= number <= MOST:
        raise InputError(f"a line takes at least 2 points, and at most {MOST}; {number} were asked for")
    return number


def _reach(bunch, axis):
    if axis == "z" and bunch.coasting:
        raise InputError("a coasting beam has no length; write from where to where, as in 'z = -1 .. 1 m'")
    return REACH * bunch.sigma[AXES.index(axis)]


def _place(text):
    """(axis, place) of 'AXIS = NUMBER UNIT'."""
    axis, rest = _axis(text, "y = 2 mm")
    if rest is None:
        raise InputError(f"write where, as in '{axis} = 2 mm'")
    return axis, _length(rest)


def _axis(text, example):
    found = _AXIS.fullmatch(text)
    if not found:
        raise InputError(f"begin with x, y or z, as in '{example}'")
    return found[1], found[2]


def _length(text):
    number, _, unit_text = split_number(text)
    unit = units.unit(unit_text.strip())
    if not unit or unit.dimension != _LENGTH:
        raise InputError(f"{excerpt(text)} is no length; write one such as '2 mm'")
    return unit.si(number)
