"""Writes product_fields.csv beside this file: fields of product bunches that have no closed form; run by hand, minutes.

Coulomb's law by a route that the package does not take: along z first, then round the edge of a uniform ellipse, or
over the gradient of the density of a parabolic one (Gauss's theorem on grad 1/R across, own derivation):

    E_across = closed integral of n dl T L(d)  (uniform)          integral of (-grad T) L(d) dA        (parabolic)
    E_z      = closed integral of (p' - p) . n dl T K(d)          integral of T M(d) dA
    L = integral of lambda(z') / R dz',  M = integral of lambda u / R^3 dz',
    K d^2 = integral of lambda (sign u - u / R) dz'

with u = z - z' = d sinh t and R = d cosh t: Gauss panels in t, even angles, Gauss panels in ln d; angles doubled until
two answers agree. Lengths are in units of the geometric mean of the two rms widths, fields over q / (4 pi eps0).
"""

import csv
from math import pi, sqrt
from pathlib import Path

import numpy as np

HERE = Path(__file__).parent
SHAPES = [("kv", "gaussian"), ("kv", "parabolic"), ("parabolic", "gaussian"), ("parabolic", "uniform")]
SHAPES += [("parabolic", "parabolic")]
CASES = [(1e-4, 1), (1e-4, 10), (1e-2, 3), (0.3, 1), (1, 1), (1, 10), (10, 3), (1e3, 1), (1e3, 10), (1e5, 1), (1e5, 3)]
CASES += [(1e5, 10)]
POINTS = 6  # a case
REACH = 3.0  # rms sizes: points are even in the ellipsoid of so many
ENOUGH = 1e-10  # where the field is weakest next to its parts; elsewhere the answers agree to 1e-13
EDGE = {"kv": 2.0, "parabolic": sqrt(6.0)}  # half axis over rms size
END = {"gaussian": 1.0, "uniform": sqrt(3.0), "parabolic": sqrt(5.0)}
TALL = 9.0  # rms lengths of a Gaussian, beyond which 1e-18 of it is left
GRADED = np.append(0.0, np.geomspace(1e-10, 1.0, 24))  # next to p the potential of a line is a logarithm
GAUSS = np.polynomial.legendre.leggauss(16)


def panels(edges):
    """Gauss nodes and weights (K,) on the panels between edges."""
    middle, half = 0.5 * (edges[1:] + edges[:-1]), 0.5 * (edges[1:] - edges[:-1])
    return (middle[:, None] + half[:, None] * GAUSS[0]).ravel(), (half[:, None] * GAUSS[1]).ravel()


def line(kind, c, z):
    """Line density of one unit of charge."""
    if kind == "gaussian":
        return np.exp(-0.5 * (z / c) ** 2) / (c * sqrt(2.0 * pi))
    return 0.5 / c + 0.0 * z if kind == "uniform" else 0.75 / c * (1.0 - (z / c) ** 2)


def along(kind, c, z, d):
    """L, M and K at height z for distances d (K,)."""
    top = c * (TALL if kind == "gaussian" else 1.0)
    result = []
    for distance in d:
        ends = np.arcsinh((z - top) / distance), np.arcsinh((z + top) / distance)
        cuts = np.linspace(*ends, int(ends[1] - ends[0]) + 9)
        t, w = panels(np.unique(np.append(cuts, 0.0 if ends[0] < 0.0 < ends[1] else ends[0])))
        density, sinh, cosh = w * line(kind, c, z - distance * np.sinh(t)), np.sinh(t), np.cosh(t)
        gap = np.sign(t) * np.exp(-np.abs(t))  # (sign t - tanh t) cosh t
        result.append((density.sum(), (density * sinh / cosh**2).sum() / distance, (density * gap).sum() / distance))
    return np.array(result).T


class Table:
    """L, M and K of one height as piecewise polynomials in ln d."""

    ORDER, WIDTH = 24, 1.0

    def __init__(self, kind, c, z):
        self.arguments, self.pieces = (kind, c, z), {}
        self.roots = np.cos(pi * (np.arange(self.ORDER) + 0.5) / self.ORDER)
        self.signs = (-1.0) ** np.arange(self.ORDER) * np.sin(pi * (np.arange(self.ORDER) + 0.5) / self.ORDER)

    def __call__(self, d):
        log = np.log(d) / self.WIDTH
        cell, out = np.floor(log), np.empty((3, len(d)))
        for number in np.unique(cell):
            here = cell == number
            if number not in self.pieces:
                self.pieces[number] = along(*self.arguments, np.exp(self.WIDTH * (number + 0.5 * (self.roots + 1.0))))
            x = 2.0 * (log[here] - number) - 1.0
            gap = x[:, None] - self.roots
            weight = self.signs / np.where(gap == 0.0, 1e-300, gap)
            out[:, here] = (weight @ self.pieces[number].T).T / weight.sum(axis=1)
        return out


def edge_sum(p, a, b, table, count):
    """Field of a uniform ellipse."""
    psi = 2.0 * pi * (np.arange(count) + 0.5) / count
    cos, sin = np.cos(psi), np.sin(psi)
    dx, dy = a * cos - p[0], b * sin - p[1]
    at, _, fall = table(np.hypot(dx, dy))
    n = np.array([b * cos, a * sin]) * 2.0 * pi / count / (pi * a * b)
    return np.array([n[0] @ at, n[1] @ at, (dx * n[0] + dy * n[1]) @ fall])


def area_sum(p, a, b, table, count):
    """Field of a parabolic ellipse, in polar angles and distances about p, in units of its half axes."""
    q = p[:2] / (a, b)
    inside = q @ q < 1.0
    if inside:
        phi, step = 2.0 * pi * (np.arange(count) + 0.5) / count, np.full(count, 2.0 * pi / count)
    else:
        turn = pi * ((np.arange(count) + 0.5) / count - 0.5)
        reach = np.arcsin(1.0 / np.hypot(*q))
        phi = np.arctan2(-q[1], -q[0]) + reach * np.sin(turn)
        step = pi / count * reach * np.cos(turn)
    total = np.zeros(3)
    for cos, sin, share in zip(np.cos(phi), np.sin(phi), step, strict=True):
        middle = -(q[0] * cos + q[1] * sin)
        half = sqrt(max(0.0, 1.0 - q @ q + middle**2))
        first, last = max(0.0, middle - half), middle + half
        r, w = panels(first + (last - first) * GRADED)
        x, y = q[0] + r * cos, q[1] + r * sin
        at, slope, _ = table(r * np.hypot(a * cos, b * sin))
        cell = share * w * r
        density = 2.0 / pi * (1.0 - x * x - y * y)
        total += [cell @ (4.0 / pi * x / a * at), cell @ (4.0 / pi * y / b * at), cell @ (density * slope)]
    return total


def field(transverse, a, b, longitudinal, c, p):
    """Field (3,) at p, the angles doubled until two answers agree."""
    table, rule = Table(longitudinal, c, p[2]), edge_sum if transverse == "kv" else area_sum
    count = 128 if transverse == "kv" else 64
    last = rule(p, a, b, table, count)
    for _ in range(11):
        count *= 2
        found = rule(p, a, b, table, count)
        error = np.linalg.norm(found - last) / np.linalg.norm(found)
        if error < ENOUGH:
            return found
        last = found
    raise ArithmeticError(f"{transverse} x {longitudinal} {a} {b} {c} at {p}: {error:.1e}")


def places(chance):
    """Points (3, POINTS) even in the ball of REACH."""
    way = chance.normal(size=(3, POINTS))
    return REACH * way / np.linalg.norm(way, axis=0) * chance.uniform(size=POINTS) ** (1.0 / 3.0)


def rows():
    chance = np.random.default_rng(41)
    for transverse, longitudinal in SHAPES:
        for aspect, section in CASES:
            sigma = np.array([sqrt(section), 1.0 / sqrt(section), aspect])
            a, b, c = sigma * (EDGE[transverse], EDGE[transverse], END[longitudinal])
            for unit in places(chance).T:
                found = field(transverse, a, b, longitudinal, c, unit * sigma)
                yield (transverse, longitudinal, aspect, section, *unit, *found)


if __name__ == "__main__":
    with (HERE / "product_fields.csv").open("w", newline="") as file:
        out = csv.writer(file, lineterminator="\n")
        out.writerow(["transverse", "longitudinal", "aspect", "section", "x", "y", "z", "ex", "ey", "ez"])
        for row in rows():
            out.writerow(row)
            file.flush()
