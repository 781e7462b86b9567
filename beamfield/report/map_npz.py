"""A map as numpy's own archive: x, y, z along the axes, scalars (nx, ny, nz), vectors (3, nx, ny, nz)."""

import zipfile
from contextlib import ExitStack
from shutil import copyfileobj
from tempfile import TemporaryFile

import numpy as np

LONG_AGO = (1980, 1, 1, 0, 0, 0)  # the same map makes the same bytes


def ready():
    """Nothing else is needed."""


def write(path, field_map):
    """Write a FieldMap as NPZ: each quantity grows in a file without a name and is packed when the map is through."""
    grid = field_map.grid
    with ExitStack() as stack:
        spools = {m.name: stack.enter_context(TemporaryFile(dir=path.parent)) for m in field_map.quantities}
        for block in field_map.blocks:
            for name, spool in spools.items():
                spool.write(np.ascontiguousarray(block.values[name].T, "<f8").data)
        archive = stack.enter_context(zipfile.ZipFile(path, "w"))
        for axis, name in enumerate("xyz"):
            with _member(archive, name, grid.counts[axis : axis + 1]) as member:
                member.write(grid.along(axis).astype("<f8").tobytes())
        for mapped in field_map.quantities:
            shape = (3, *grid.counts) if mapped.components == 3 else grid.counts
            spools[mapped.name].seek(0)
            with _member(archive, mapped.name, shape) as member:
                copyfileobj(spools[mapped.name], member, 1 << 20)


def _member(archive, name, shape):
    """An open member of the archive with the head of an array whose first index runs fastest."""
    member = archive.open(zipfile.ZipInfo(f"{name}.npy", LONG_AGO), "w", force_zip64=True)
    head = {"descr": "<f8", "fortran_order": len(shape) > 1, "shape": tuple(shape)}
    np.lib.format.write_array_header_1_0(member, head)
    return member
