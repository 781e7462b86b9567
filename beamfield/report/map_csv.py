"""A map as a table: one row a point, numbers to the last digit."""

import numpy as np


def ready():
    """Nothing else is needed."""


def write(path, field_map):
    """Write a FieldMap as CSV, block by block."""
    with open(path, "w", encoding="ascii", newline="\n") as file:
        file.writelines(lines(field_map))


def lines(field_map):
    """The table as text, in pieces of whole lines."""
    columns = [f"{column} [{mapped.unit}]" for mapped in field_map.quantities for column in mapped.columns]
    yield ",".join(["x [m]", "y [m]", "z [m]", *columns]) + "\n"
    for block in field_map.blocks:
        values = [np.atleast_2d(block.values[mapped.name]) for mapped in field_map.quantities]
        table = np.concatenate([field_map.grid.points(block.first, block.last), *values])
        yield "".join(",".join(map(repr, row)) + "\n" for row in table.T.tolist())
