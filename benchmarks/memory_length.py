"""How soon a bunch forgets its past: the field across it, retarded, against the co-moving one, over straight flight.

Draws the rms difference for bunches out of a bend and from a cathode, with the lengths that beamfield reports as
memory_length_transverse and memory_length_longitudinal marked. Usage: python benchmarks/memory_length.py FIGURE.png
"""

import json
import sys

import numpy as np

from beamfield.beam.past import AfterBend, AfterCathode
from beamfield.estimate.past_motion import field_against_straight

HALF_WIDTH, LENGTH = 1e-3, 2e-3  # transverse half extent and full length of a uniform cylinder [m]
GAMMAS = {2.0: "#0b3c5d", 10.0: "#d9822b", 50.0: "#5c9e7a"}
PASTS = {"out of a bend of 1 m radius": AfterBend(0.0, 1.0), "from a cathode": AfterCathode(0.0)}


def cylinder(count, seed):
    chance = np.random.default_rng(seed)
    radius, turn = HALF_WIDTH * np.sqrt(chance.random(count)), 2.0 * np.pi * chance.random(count)
    return np.stack([radius * np.cos(turn), radius * np.sin(turn), LENGTH * (chance.random(count) - 0.5)])


def settle(gamma, past, count=1000, probes=100):
    """Flight of the tail [m], relative difference, and the two memory lengths [m]."""
    u = np.sqrt(gamma**2 - 1.0)
    transverse, longitudinal = u * HALF_WIDTH, u * (u + gamma) * LENGTH
    flight = np.geomspace(0.01 * transverse, 2.0 * longitudinal, 60)
    difference = field_against_straight(cylinder(probes, 1), cylinder(count, 2), 1e-12, u, past, flight + 0.5 * LENGTH)
    return flight, difference, transverse, longitudinal


def draw(path, curves):
    import matplotlib

    matplotlib.use("Agg")
    from matplotlib import pyplot

    figure, panels = pyplot.subplots(1, len(PASTS), figsize=(10, 4.2), sharey=True, layout="constrained")
    for panel, title in zip(panels, PASTS):
        for gamma, colour in GAMMAS.items():
            flight, difference, transverse, longitudinal = curves[title, gamma]
            panel.loglog(flight, np.maximum(difference, 1e-9), color=colour, label=f"$\\gamma$ = {gamma:g}")
            panel.axvline(transverse, color=colour, linestyle=":", linewidth=1)
            panel.axvline(longitudinal, color=colour, linestyle="--", linewidth=1)
        panel.set(title=title, xlabel="straight flight of the tail [m]", ylim=(1e-8, 10.0))
    panels[0].set_ylabel("rms difference of E over rms E")
    panels[0].legend(frameon=False, title="dotted: transverse memory\ndashed: longitudinal memory")
    figure.savefig(path, dpi=120, metadata={"Software": None})


def main(path="memory_length.png"):
    curves = {(title, gamma): settle(gamma, past) for title, past in PASTS.items() for gamma in GAMMAS}
    draw(path, curves)
    rows = {}
    for (title, gamma), (flight, difference, *memories) in curves.items():
        at = [float(np.interp(length, flight, difference)) for length in memories]
        rows[f"{title}, gamma {gamma:g}"] = {"at transverse memory": at[0], "at longitudinal memory": at[1]}
    print(json.dumps(rows, indent=2))


if __name__ == "__main__":
    main(*sys.argv[1:])
