"""A map as a picture: curves along a line, shaded planes with equipotentials; of a box its three middle planes.

The shades (cividis) and the three line colours are told apart by every kind of colour vision, and in grey.
"""

import numpy as np

from beamfield.report.human import scale
from beamfield.report.picked import picked

LINES, STYLES = ("#00354f", "#c9711a", "#7f9fb0"), ("-", "--", "-.")
DOTS = 110  # per inch


def ready():
    """ImportError where matplotlib is missing."""
    import matplotlib  # noqa: F401


def write(path, field_map):
    """Draw a FieldMap as PNG; what a picture cannot show is passed over, block by block."""
    import matplotlib as plotter

    with plotter.rc_context({"font.size": 9, "axes.spines.top": False, "axes.spines.right": False}):
        figure = _curves(field_map) if len(field_map.grid.axes) == 1 else _planes(field_map)
        figure.suptitle(field_map.title, x=0.02, ha="left", fontsize=11)
        figure.savefig(path, format="png", dpi=DOTS, metadata={"Software": None})


def _scaled(values, unit):
    """Divisor of an axis and its label: 'MV/m', '1e-14 N'."""
    fit = scale(float(np.abs(values).max()), unit)
    return fit.factor * 10.0**fit.power, (f"1e{fit.power} " if fit.power else "") + fit.unit


def _sheet(rows, columns, width, height):
    from matplotlib.figure import Figure  # no windows, no global state

    figure = Figure(figsize=(width * columns, height * rows), layout="constrained")
    return figure, figure.subplots(rows, columns, squeeze=False)


def _curves(field_map):
    """One panel a quantity, its components as curves."""
    (pick,) = picked(field_map, most=4000)
    figure, panels = _sheet(len(field_map.quantities), 1, 7.5, 1.9)
    axis = pick.axes[0]
    step, metres = _scaled(pick.places[axis], "m")
    for panel, mapped in zip(panels[:, 0], field_map.quantities):
        values = np.atleast_2d(pick.values[mapped.name])
        divisor, unit = _scaled(values, mapped.unit)
        for row, column, colour, style in zip(values, mapped.columns, LINES, STYLES):
            panel.plot(pick.places[axis] / step, row / divisor, style, color=colour, label=column)
        panel.set_ylabel(f"{mapped.name} [{unit}]")
        panel.grid(color="0.92")
        panel.legend(frameon=False, loc="center left", bbox_to_anchor=(1.0, 0.5))
    panels[-1, 0].set_xlabel(f"{'xyz'[axis]} [{metres}]")
    return figure


def _planes(field_map):
    """One row a plane: the size of E and of the force, with lines of equal potential."""
    picks = picked(field_map, most=800)
    shown = [mapped for mapped in field_map.quantities if mapped.name in ("E", "force")]
    figure, panels = _sheet(len(picks), len(shown), 5.2, 4.0)
    for row, pick in zip(panels, picks):
        for panel, mapped in zip(row, shown):
            _plane(figure, panel, pick, mapped)
    return figure


def _plane(figure, panel, pick, mapped):
    across, up = pick.axes
    steps, metres = zip(*(_scaled(pick.places[axis], "m") for axis in pick.axes))
    places = [pick.places[axis] / step for axis, step in zip(pick.axes, steps)]
    size = np.linalg.norm(pick.values[mapped.name], axis=0).reshape(len(places[1]), len(places[0]))
    divisor, unit = _scaled(size, mapped.unit)
    shades = panel.pcolormesh(*places, size / divisor, cmap="cividis", shading="nearest", rasterized=True)
    figure.colorbar(shades, ax=panel, label=f"|{mapped.name}| [{unit}]")
    if "phi" in pick.values and np.ptp(pick.values["phi"]) > 0.0:
        panel.contour(*places, pick.values["phi"].reshape(size.shape), 9, colors="white", linewidths=0.6, alpha=0.7)
    panel.set(xlabel=f"{'xyz'[across]} [{metres[0]}]", ylabel=f"{'xyz'[up]} [{metres[1]}]", title=pick.where)
