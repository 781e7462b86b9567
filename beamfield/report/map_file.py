"""Which writer for which ending of a map's file name."""

from importlib import import_module
from pathlib import Path

from beamfield.errors import InputError, did_you_mean, one_line
from beamfield.report.whole_file import whole_file

WRITERS = {".csv": "map_csv", ".npz": "map_npz", ".h5": "map_hdf5", ".vti": "map_vti", ".png": "map_picture"}
_EXTRAS = {"h5py": "hdf5", "matplotlib": "plot"}


def write_map(path, field_map):
    """Write a FieldMap to `path`, whole or not at all, in the format that its ending names."""
    write = map_writer(path)
    with whole_file(path) as part:
        write(part, field_map)


def map_writer(path):
    """The function that writes a file of this name; InputError for an unknown ending, before anything is computed."""
    ending = Path(path).suffix.lower()
    if ending not in WRITERS:
        known = ", ".join(WRITERS)
        raise InputError(f"{one_line(str(path))}: a map is written as one of {known}{did_you_mean(ending, WRITERS)}")
    module = import_module(f"beamfield.report.{WRITERS[ending]}")
    try:
        module.ready()
    except ImportError as error:
        extra = _EXTRAS.get(error.name, error.name)
        raise InputError(f"{ending} files need {error.name}: pip install 'beamfield[{extra}]'") from None
    return module.write
