"""A map as HDF5 after the openPMD standard 1.1.0, an open description of fields on meshes.

A line, plane or box is a mesh of one, two or three axes, the last index running along x where x is spanned.
Source: The openPMD Standard, version 1.1.0, base standard.
"""

import numpy as np

from beamfield import __version__


def ready():
    """ImportError where h5py is missing."""
    import h5py  # noqa: F401


def write(path, field_map):
    """Write a FieldMap as HDF5, block by block."""
    import h5py

    with h5py.File(path, "w") as file:
        _describe(file, field_map.title)
        step = file.create_group("data/0")
        step.attrs.update({"time": 0.0, "dt": 0.0, "timeUnitSI": 1.0, "comment": _comment(field_map.grid)})
        meshes = step.create_group("meshes")
        records = {mapped.name: _record(meshes, mapped, field_map.grid) for mapped in field_map.quantities}
        for block in field_map.blocks:
            for name, datasets in records.items():
                _fill(datasets, block, np.atleast_2d(block.values[name]), field_map.grid)


def _describe(file, title):
    """The head of the file; without a date, so that the same map makes the same bytes."""
    words = {"openPMD": "1.1.0", "basePath": "/data/%T/", "meshesPath": "meshes/", "comment": title}
    words |= {"iterationEncoding": "groupBased", "iterationFormat": "/data/%T/"}
    words |= {"software": "beamfield", "softwareVersion": __version__}
    file.attrs.update({key: np.bytes_(text.encode("ascii", "backslashreplace")) for key, text in words.items()})
    file.attrs["openPMDextension"] = np.uint32(0)


def _comment(grid):
    """Where the axes that are not spanned stand."""
    fixed = [f"{'xyz'[axis]} = {grid.start[axis]!r} m" for axis in range(3) if axis not in grid.axes]
    return np.bytes_(", ".join(["places about the bunch centre", *fixed]))


def _record(meshes, mapped, grid):
    """Datasets of one quantity, one a component, with all that the standard asks for."""
    axes = grid.axes[::-1]
    shape = tuple(grid.counts[axis] for axis in axes)
    place = meshes.create_group(mapped.name) if mapped.components == 3 else meshes
    names = "xyz" if mapped.components == 3 else (mapped.name,)
    datasets = [place.create_dataset(name, shape, "<f8", track_times=False) for name in names]
    for dataset in datasets:
        dataset.attrs.update({"unitSI": 1.0, "position": np.zeros(len(axes))})
    (place if mapped.components == 3 else datasets[0]).attrs.update(_mesh(mapped, grid, axes))
    return datasets


def _mesh(mapped, grid, axes):
    return {
        "geometry": np.bytes_("cartesian"),
        "dataOrder": np.bytes_("C"),
        "axisLabels": np.array([np.bytes_("xyz"[axis]) for axis in axes]),
        "gridSpacing": np.array([grid.step[axis] for axis in axes]),
        "gridGlobalOffset": np.array([grid.start[axis] for axis in axes]),
        "gridUnitSI": 1.0,
        "unitDimension": np.array(mapped.powers, float),
        "timeOffset": 0.0,
        "comment": np.bytes_(f"{mapped.title} [{mapped.unit}]"),
    }


def _fill(datasets, block, values, grid):
    """Write the rows of a block to their box of the datasets."""
    box = grid.box(block.first, block.last)
    shape = tuple(side.stop - side.start for side in box)
    spanned = tuple(side for side, axis in zip(box, (2, 1, 0)) if axis in grid.axes)
    flat = tuple(length for length, axis in zip(shape, (2, 1, 0)) if axis in grid.axes)
    for dataset, row in zip(datasets, values):
        dataset[spanned] = row.reshape(flat)
