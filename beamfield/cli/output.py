"""Pages to standard output or whole into a file; notices to a terminal."""

import os
import sys
from pathlib import Path

from beamfield.errors import InputError, one_line

# What a plain ASCII terminal shows for the signs on our pages; any other character becomes its number.
PLAIN = str.maketrans(
    {"—": "-", "–": "-", "−": "-", "·": ".", "…": "...", "×": "x", "±": "+-", "µ": "u", "μ": "u", "²": "2", "³": "3"}
    | {"≤": "<=", "≥": ">=", "≈": "~", "≠": "!=", "→": "->", "─": "-", "━": "=", "│": "|", "γ": "gamma", "β": "beta"}
)


def emit(page, path=None, *, fresh=False):
    """Write a page to standard output, or to a file that is either complete or untouched; fresh: only to a new one."""
    if path is None:
        return _to_stdout(page)
    path = Path(path)
    if fresh and path.exists():
        raise InputError(f"{one_line(str(path))}: exists already; name another file")
    try:
        _to_file(page, path)
    except OSError as error:
        raise InputError(f"{one_line(str(path))}: cannot be written: {error.strerror}") from None


def colour(options):
    """Whether the page may be coloured: a terminal looks at it and nobody said no."""
    return (
        getattr(options, "output", None) is None
        and _is_terminal(sys.stdout)
        and not os.environ.get("NO_COLOR")
        and os.environ.get("TERM") != "dumb"
    )


def watched():
    """Whether somebody looks at standard error."""
    return _is_terminal(sys.stderr)


def notice(text):
    """Tell somebody who watches what takes time."""
    if watched():
        print(f"beamfield: {text}", file=sys.stderr, flush=True)


def _is_terminal(stream):
    return stream is not None and stream.isatty()


def _to_stdout(page):
    if sys.stdout is None:
        raise InputError("beamfield: standard output is closed")
    try:
        _send(page, sys.stdout)
    except BrokenPipeError:  # the reader has seen enough
        _mute()
    except OSError as error:
        _mute()
        raise InputError(f"beamfield: standard output cannot be written: {error.strerror}") from None


def _send(page, stream):
    """UTF-8 to a pipe or a file; to a terminal what it can show."""
    if _is_terminal(stream):
        stream.write(_legible(page, stream.encoding))
    else:
        stream.buffer.write(page.encode("utf-8", "backslashreplace"))
    stream.flush()


def _legible(page, encoding):
    try:
        page.encode(encoding)
    except UnicodeEncodeError:
        return page.translate(PLAIN).encode(encoding, "backslashreplace").decode(encoding)
    return page


def _mute():
    """Nothing more can be written; spare the interpreter from trying again when it ends."""
    os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())


def _to_file(page, path):
    target = Path(os.path.realpath(path))
    if target.exists() and not target.is_file():
        return _write(page, target)
    part = target.with_name(f".{target.name}.{os.getpid()}.part")
    try:
        _write(page, part)
        part.replace(target)
    finally:
        part.unlink(missing_ok=True)


def _write(page, path):
    path.write_bytes(page.encode("utf-8", "backslashreplace"))
