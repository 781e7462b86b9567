"""One exception tree and one exit code for each kind of ending."""

from dataclasses import dataclass
from enum import IntEnum


class Exit(IntEnum):
    """What a command returns to the shell."""

    DONE = 0
    FAULT = 1
    MISREAD = 2
    BROKEN = 3


@dataclass(frozen=True, slots=True)
class Fault:
    """One thing wrong with one place of an input; line and column count from 1, 0 where there is none."""

    message: str
    key: str = ""
    line: int = 0
    column: int = 0
    file: str = ""

    def __str__(self):
        place = ":".join(str(part) for part in (self.file, self.line, self.column) if part)
        return one_line(": ".join(part for part in (place, self.key, self.message) if part))


def one_line(text):
    """The text with line breaks and control characters written out: it can neither split nor steer a line."""
    return "".join(sign if sign.isprintable() else repr(sign)[1:-1] for sign in text)


def did_you_mean(word, choices):
    """'; did you mean ...?' for the nearest of some words, or nothing where none is near."""
    from difflib import get_close_matches

    near = get_close_matches(word, list(choices), n=1)
    return f"; did you mean {near[0]!r}?" if near else ""


class BeamfieldError(Exception):
    """Everything that beamfield raises on purpose."""

    exit = Exit.FAULT


class InputError(BeamfieldError):
    """A case, a particle file or a command line that cannot be read; carries every fault found."""

    exit = Exit.MISREAD

    def __init__(self, *faults):
        self.faults = tuple(fault if isinstance(fault, Fault) else Fault(str(fault)) for fault in faults)
        super().__init__("\n".join(str(fault) for fault in self.faults))


class CallError(InputError, ValueError):
    """A Python call with arguments that do not fit: shapes, signs, nan, or more memory than there is."""


class NonsenseError(InputError, ValueError):
    """A noun that cannot exist: a negative size, a beam slower than at rest."""
