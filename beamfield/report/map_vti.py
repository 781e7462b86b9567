"""A map as VTK image data (XML, numbers appended raw), for three-dimensional viewers.

Source: The VTK User's Guide, 11th ed., "VTK File Formats", sections on XML formats, ImageData and appended data.
"""

import numpy as np

LENGTH = np.dtype("<u8")  # stands before the numbers of each array


def ready():
    """Nothing else is needed."""


def write(path, field_map):
    """Write a FieldMap as VTI: the place of each number is known beforehand, so blocks go straight to theirs."""
    grid = field_map.grid
    sizes = [8 * mapped.components * grid.size for mapped in field_map.quantities]
    offsets = [sum(sizes[:i]) + i * LENGTH.itemsize for i in range(len(sizes))]
    with open(path, "wb") as file:
        file.write(_head(field_map, offsets).encode("utf-8"))
        begin = file.tell()
        for offset, size in zip(offsets, sizes):
            file.seek(begin + offset)
            file.write(np.array(size, LENGTH).tobytes())
        for block in field_map.blocks:
            for mapped, offset in zip(field_map.quantities, offsets):
                file.seek(begin + offset + LENGTH.itemsize + 8 * mapped.components * block.first)
                file.write(np.ascontiguousarray(block.values[mapped.name].T, "<f8").data)
        file.seek(begin + offsets[-1] + LENGTH.itemsize + sizes[-1])
        file.write(b"\n</AppendedData>\n</VTKFile>\n")


def _head(field_map, offsets):
    """Everything before the first number."""
    grid = field_map.grid
    extent = " ".join(f"0 {count - 1}" for count in grid.counts)
    origin, spacing = (" ".join(repr(float(v)) for v in row) for row in (grid.start, (s or 1.0 for s in grid.step)))
    arrays = "".join(_array(mapped, offset) for mapped, offset in zip(field_map.quantities, offsets))
    return (
        '<?xml version="1.0"?>\n'
        f"<!-- lengths in m; {', '.join(f'{m.name} in {m.unit}' for m in field_map.quantities)} -->\n"
        '<VTKFile type="ImageData" version="1.0" byte_order="LittleEndian" header_type="UInt64">\n'
        f'<ImageData WholeExtent="{extent}" Origin="{origin}" Spacing="{spacing}">\n<Piece Extent="{extent}">\n'
        f'<PointData Vectors="E">\n{arrays}</PointData>\n</Piece>\n</ImageData>\n<AppendedData encoding="raw">\n_'
    )


def _array(mapped, offset):
    kind = f'Name="{mapped.name}" type="Float64" NumberOfComponents="{mapped.components}" format="appended"'
    return f'<DataArray {kind} offset="{offset}"/>\n'
