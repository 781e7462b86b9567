"""A file is whole or it is not there: written under another name beside its place, then renamed."""

from contextlib import contextmanager
from os import getpid
from pathlib import Path

from beamfield.errors import InputError, one_line


@contextmanager
def whole_file(path):
    """Path to write to; takes the place of `path` when the block ends well, is gone when it does not."""
    path = Path(path).resolve()
    part = path.with_name(f".{path.name}.{getpid()}.part")
    try:
        yield part
        part.replace(path)
    except OSError as error:
        raise InputError(f"{one_line(str(path))}: cannot be written: {error.strerror or error}") from None
    finally:
        part.unlink(missing_ok=True)
