"""Files that a case names: found beside it, and read once however often the case is built anew."""

from functools import lru_cache, partial

from beamfield import progress
from beamfield.describe.nearest import excerpt, hint
from beamfield.errors import InputError


def named_file(name, folder):
    """Path of a regular file that a case names, relative to its folder; InputError, with the nearest name, for none."""
    path = folder / name
    try:
        if path.is_file():
            return path
        there = "is not a regular file" if path.exists() else "is not there"
        names = [each.name for each in path.parent.iterdir()] if path.parent.is_dir() else []
    except (OSError, ValueError) as error:
        raise InputError(f"the file {excerpt(name)} cannot be found: {error}") from None
    raise InputError(
        f"the file {excerpt(name)} {there}{hint(path.name, names)}; names are relative to the case's folder"
    )


def read_particles(name, folder):
    """MacroParticles of a file that a case names."""
    path = named_file(name, folder)
    return _particles(path, *_stamp(path))


def read_optics(name, folder, circumference):
    """Optics of a file that a case names, round a ring of given circumference [m]."""
    path = named_file(name, folder)
    return _optics(path, circumference, *_stamp(path))


def _stamp(path):
    """What changes when the file does."""
    status = path.stat()
    return status.st_mtime_ns, status.st_size


@lru_cache(maxsize=4)
def _particles(path, *_):
    from beamfield.describe import particle_file

    return particle_file.read(path, partial(progress.told, f"reading {path.name}"))


@lru_cache(maxsize=16)
def _optics(path, circumference, *_):
    from beamfield.describe import optics_file

    return optics_file.read(path, circumference)
