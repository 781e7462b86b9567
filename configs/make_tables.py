"""Writes the two tables that demo cases name, beside this file: the optics of a ring and a set of particles.

    python configs/make_tables.py

The ring is sixteen cells of thick quadrupoles and sector dipoles, by hard-edged linear matrices, its quadrupoles turned
until the tunes are those of the case. The particles are points of an additive quasi-random sequence through the inverse
normal distribution. No chance: the same bytes each time.
Source: from memory of E. D. Courant and H. S. Snyder, Ann. Phys. 3, 1 (1958), for the matrices and their optics.
"""

from pathlib import Path
from statistics import NormalDist

import numpy as np

HERE = Path(__file__).parent
CELLS, CIRCUMFERENCE, TUNES = 16, 142.0, (4.17, 4.23)
QUADRUPOLE, DIPOLE, GAP = 0.25, 1.8, 0.9  # lengths in a half cell: half a quadrupole, a dipole, the rest in two
LONGEST = 0.3  # of a slice [m]
CORE, HALO = 3000, 400  # particles; those of the halo twice as far out, each counting a fifth
SIZES = (1.1e-3, 0.9e-3, 1.6e-3)  # rms of the core [m]
SLOPES, TILTS = (3.0e-3, 3.7e-3), (-3.0, 4.0)  # rms of x', y' at x = y = 0, and their growth with x, y [1/m]
BETA_GAMMA, SPREAD = 0.0800, 4e-3  # momentum over m c of the middle, rms dp/p


def matrices(strength, bend, length):
    """Matrices of (x, x', dp/p) and (y, y') of a magnet of focusing strength [1/m2] and curvature [1/m]."""
    across, up = _plane(strength + bend**2, length), _plane(-strength, length)
    k = strength + bend**2
    kick = bend * np.array([(1 - across[0, 0]) / k if k else length**2 / 2, across[0, 1]])
    return np.block([[across, kick[:, None]], [np.zeros((1, 2)), np.ones((1, 1))]]), up


def _plane(k, length):
    root = np.sqrt(complex(k))
    sine = length if k == 0 else (np.sin(root * length) / root).real
    cosine = np.cos(root * length).real
    return np.array([[cosine, sine], [-k * sine, cosine]])


def cell(focusing, defocusing):
    """Slices (length, strength, curvature) of one cell, from the middle of its focusing quadrupole."""
    bend = np.pi / CELLS / DIPOLE
    rest = CIRCUMFERENCE / CELLS / 2 - 2 * QUADRUPOLE - DIPOLE - GAP
    half = [(GAP, 0, 0), (DIPOLE, 0, bend), (rest, 0, 0)]
    ends, middle = [(QUADRUPOLE, focusing, 0)], [(2 * QUADRUPOLE, -defocusing, 0)]
    for length, strength, curvature in ends + half + middle + half[::-1] + ends:
        count = max(1, round(length / LONGEST))
        yield from [(length / count, strength, curvature)] * count


def turn(parts):
    """Matrices of a row of slices, one after the other."""
    x, y = np.eye(3), np.eye(2)
    for length, strength, curvature in parts:
        step = matrices(strength, curvature, length)
        x, y = step[0] @ x, step[1] @ y
    return x, y


def advances(strengths):
    """Phase advances of a cell over 2 pi, times the number of cells: the tunes."""
    return np.array([np.arccos(np.trace(m[:2, :2]) / 2) / (2 * np.pi) * CELLS for m in turn(cell(*strengths))])


def tuned(strengths=(0.9, 0.9)):
    """Strengths of the two families at which the tunes are TUNES, by Newton's method."""
    strengths = np.array(strengths)
    for _ in range(50):
        missing = np.array(TUNES) - advances(strengths)
        slopes = np.array([(advances(strengths + h) - advances(strengths - h)) / 2e-6 for h in 1e-6 * np.eye(2)]).T
        strengths = strengths + np.linalg.solve(slopes, missing)
    return strengths


def optics():
    """Rows (s, beta_x, beta_y, dispersion_x) [m] round the ring; the end of it is its beginning and not said again."""
    parts, rows, s = list(cell(*tuned())), [], 0.0
    for start, (length, _, _) in enumerate(parts):
        x, y = turn(parts[start:] + parts[:start])
        dispersion = np.linalg.solve(np.eye(2) - x[:2, :2], x[:2, 2])[0]
        rows.append((s, beta(x[:2, :2]), beta(y), dispersion))
        s += length
    period = CIRCUMFERENCE / CELLS
    return [(n * period + s, *row) for n in range(CELLS) for s, *row in rows]


def beta(m):
    """Beta function [m] of a matrix (2, 2) that closes."""
    return m[0, 1] / np.sqrt(1 - np.trace(m) ** 2 / 4)


def even(count, dimensions):
    """Points (count, dimensions) that fill a unit cube evenly: an additive sequence of the generalised golden ratio."""
    ratio = 2.0
    for _ in range(60):
        ratio = (1 + ratio) ** (1 / (dimensions + 1))
    return (0.5 + np.arange(1, count + 1)[:, None] * ratio ** -np.arange(1.0, dimensions + 1)) % 1.0


def particles():
    """Rows (x, y, z, ux, uy, uz, weight) of a bunch with a halo."""
    normal = np.vectorize(NormalDist().inv_cdf)(even(CORE + HALO, 6))
    normal[CORE:] *= 2.0
    places = normal[:, :3] * SIZES
    forward = BETA_GAMMA * (1 + SPREAD * normal[:, 5:])
    slopes = normal[:, 3:5] * SLOPES + places[:, :2] * TILTS
    return np.hstack([places, slopes * forward, forward, np.where(np.arange(CORE + HALO) < CORE, 1.0, 0.2)[:, None]])


def write(name, says, header, rows, form):
    """A table of numbers with what it is, in comments, at its head."""
    head = "".join(f"# {line}\n" for line in says.splitlines())
    text = "".join(",".join(format(value, form) for value in row) + "\n" for row in rows)
    (HERE / name).write_text(f"{head}{header}\n{text}", encoding="utf-8")


OPTICS = """\
Optics of the Quillmoor booster ring, computed for a lattice that was never built: the data are invented.
Sixteen cells, tunes 4.17 and 4.23; s from the middle of a focusing quadrupole. Written by make_tables.py."""
PARTICLES = """\
A bunch of negative hydrogen behind the Quillmoor preinjector, nobody's measurement: the data are invented.
A Gaussian core of 3000 particles, 400 of a halo twice as wide that count a fifth. Written by make_tables.py."""


def write_all():
    """Both tables."""
    write("ring_optics.csv", OPTICS, "s,beta_x,beta_y,dispersion_x", optics(), ".4f")
    write("preinjector_bunch.csv", PARTICLES, "x,y,z,ux,uy,uz,weight", particles(), ".5g")


if __name__ == "__main__":
    write_all()
