"""The command line's one way in, and every way out."""

import os
import sys

from beamfield.cli.usage import parse
from beamfield.errors import BeamfieldError, Exit, one_line

INTERRUPTED = 130  # as shells count it: 128 + SIGINT


def main(argv=None):
    """Run one command and return its exit code; no exception passes."""
    try:
        return int(_run(sys.argv[1:] if argv is None else list(argv)))
    except SystemExit as end:  # help was asked for and given
        return int(end.code or 0)
    except BeamfieldError as error:
        return _complain(str(error), error.exit)
    except KeyboardInterrupt:
        return _complain("beamfield: stopped", INTERRUPTED)
    except Exception as error:
        return _own_fault(error)


def _run(argv):
    name, options = parse(argv)
    from beamfield.cli import commands  # only now: reading words needs nothing heavy

    return getattr(commands, name)(options)


def _own_fault(error):
    if os.environ.get("BEAMFIELD_DEBUG"):
        import traceback

        traceback.print_exception(error)
    told = one_line(f"{type(error).__name__}: {error}")
    way_out = "please report it (BEAMFIELD_DEBUG=1 shows where)"
    return _complain(f"beamfield: a fault of the program itself: {told}; {way_out}", Exit.FAULT)


def _complain(text, code):
    if sys.stderr:
        print(text, file=sys.stderr)
    return int(code)
