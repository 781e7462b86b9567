"""Writes bunch_fields.csv, beam_fields.csv and cylinder_fields.csv beside this file; run by hand, minutes.

Every number comes from mpmath at 30 digits by a formula, or a quadrature, that the package does not use:

ellipsoids             Ferrers' integral of the confocal family, adaptive tanh-sinh quadrature by decades (package:
                       Carlson's R_D, or a trapezoidal rule in the logarithm)
kv beam                4 / (z + sqrt(z^2 - a^2 + b^2)) outside, in the complex plane (package: confocal root)
parabolic beam         an onion of kv beams, weight 4 u^3 (package: elementary confocal integrals)
gaussian beam          an onion of kv beams, weight u^3 exp(-u^2/2) / 2 (package: error functions or confocal sum)
cylinder               rectangular sheets, whose field is elementary, over x (package: integrals round the edge)

Source: Coulomb's law, by superposition. Points are given in units of the semi-axes (rms sizes of a Gaussian).
"""

import csv
from multiprocessing import Pool
from pathlib import Path

from mpmath import mp, mpc, mpf

mp.dps = 30
HERE = Path(__file__).parent
SHAPES = [(1, 1, 1), (1, 2, 5), (1, 1, 1e-4), (10, 1, 1e-3), (1, 1, 1e5), (1, 10, 1e5), (1, 1.0000001, 1)]
PLACES = [(0.3, 0.2, 0.4), (0.48, 0.6, 0.64), (1, 0, 0), (0, 1, 0), (0, 0, 1), (0, 0, 1.5), (1.2, 0, 0)]
PLACES += [(0.7, -0.9, 0.8), (3.0, 2.0, -5.0), (-0.001, 0.002, 0.001)]
SECTIONS = [(1, 1), (1, 1.0001), (2, 1), (10, 1), (1, 10), (1e-3, 1.00000001e-3)]
CROSSINGS = [(0.3, 0.2), (0.6, 0.8), (1, 0), (0, 1), (1.2, 0), (0.9, -0.8), (4.0, 3.0), (-0.001, 0.002), (0.0, 6.0)]
CYLINDERS = [(1, 1, 1), (2, 1, 0.5), (1, 10, 3), (1, 1, 1e-4), (10, 1, 1e-3), (1, 1, 1e5), (1, 10, 1e4)]
PLACES_OF_A_CYLINDER = [(0.3, 0.2, 0.4), (1, 0, 0), (0, 1, 0), (0.6, 0.8, 0.2), (0, 0, 1), (0, 0, 1.5), (1.2, 0.3, 1.1)]


def root(point, axes):
    """Confocal root by bisection-guarded Newton in 30 digits; 0 inside."""

    def over(s):
        return sum(x * x / (a * a + s) for x, a in zip(point, axes, strict=True)) - 1

    if over(mpf(0)) <= 0:
        return mpf(0)
    low, high = mpf(0), sum(x * x for x in point)
    for _ in range(400):
        slope = -sum(x * x / (a * a + low) ** 2 for x, a in zip(point, axes, strict=True))
        low_next = low - over(low) / slope  # convex and falling: from below, never past the root
        middle = (low_next + high) / 2
        low, high = (middle, high) if over(middle) > 0 else (low_next, middle)
        if high - low <= mpf(10) ** -28 * high:
            break
    return low


def ferrers(profile, edge=True):
    """Field of a density profile(m^2) / (2 pi a b c) by quadrature over s in decades."""

    def field(point, axes):
        start = root(point, axes) if edge else mpf(0)
        squares = [a * a + start for a in axes]
        last = max(*squares, sum(x * x for x in point))
        decades = [mpf(0), min(squares) / 100]
        while decades[-1] < 100 * last:
            decades.append(10 * decades[-1])

        def integrand(s, i):
            reach = [q + s for q in squares]
            m2 = sum(x * x / q for x, q in zip(point, reach, strict=True))
            return profile(m2) / (reach[i] * mp.sqrt(reach[0] * reach[1] * reach[2]))

        return [
            x * mp.quad(lambda s, i=i: integrand(s, i), [*decades, mp.inf]) if x else x for i, x in enumerate(point)
        ]

    return field


def kv(point, axes):
    (x, y), (a, b) = point, axes
    if (x / a) ** 2 + (y / b) ** 2 <= 1:
        return [4 * x / (a * (a + b)), 4 * y / (b * (a + b))]
    z = mpc(abs(x), abs(y))
    focal = a * a - b * b
    field = 4 / (z + (z * mp.sqrt(1 - focal / z**2) if x else mpc(0, mp.sqrt(y * y + focal))))
    return [mp.sign(x) * field.real, -mp.sign(y) * field.imag]


def onion(shell, weight, last):
    """Field of a superposition of similar bodies of size u, weight(u) du."""

    def field(point, axes):
        kept = {}

        def at(u):
            if u not in kept:
                kept[u] = [weight(u) * e for e in shell(point, [u * a for a in axes])]
            return kept[u]

        own = [abs(x / a) for x, a in zip(point, axes, strict=True)]
        marks = {mpf(0), mpf(last), mp.sqrt(sum(v * v for v in own)), *own}
        marks |= {mpf(k) for k in (1, 3, 6, 10) if last > 1}
        marks |= {mp.sqrt(v * v + w * w) for v in own for w in own if v is not w}
        cuts = sorted(u for u in marks if u <= last)
        return [mp.quad(lambda u, i=i: at(u)[i], cuts) if x else mpf(0) for i, x in enumerate(point)]

    return field


def sheets(point, axes):
    """Uniform cylinder as rectangular sheets normal to x, each in closed form."""
    (x, y, z), (a, b, length) = point, axes

    def sheet(place, i):
        high, d, total = b * mp.sqrt(1 - (place / a) ** 2), x - place, mpf(0)
        for side in (1, -1):
            for end in (1, -1):
                v, w = side * high - y, end * length - z
                term = {
                    0: lambda v=v, w=w: mp.atan(v * w / (d * mp.sqrt(d * d + v * v + w * w))) if d else mpf(0),
                    1: lambda v=v, w=w: mp.asinh(w / mp.sqrt(d * d + v * v)) if d or v else mpf(0),
                    2: lambda v=v, w=w: mp.asinh(v / mp.sqrt(d * d + w * w)) if d or w else mpf(0),
                }[i]()
                total += side * end * term
        return total

    near = [x + sign * scale for sign in (1, -1) for scale in (0, b / 1000, b / 100, b / 10, b, length, a / 10)]
    ends = [sign * a * (1 - mpf(10) ** -k) for sign in (1, -1) for k in (1, 3, 6)]
    cuts = sorted({-a, a, mpf(0), *(p for p in [*near, *ends] if -a < p < a)})
    scale = 2 * mp.pi * a * b * length
    return [mp.quad(lambda p, i=i: sheet(p, i), cuts) / scale if c else mpf(0) for i, c in enumerate(point)]


LAWS = {
    "uniform": ferrers(lambda m2: mpf(3) / 2),
    "parabolic": ferrers(lambda m2: mpf(15) / 4 * (1 - m2)),
    "gaussian": ferrers(lambda m2: mp.exp(-m2 / 2) / mp.sqrt(2 * mp.pi), edge=False),
    "kv": kv,
    "parabolic-beam": onion(kv, lambda u: 4 * u**3, 1),
    "gaussian-beam": onion(kv, lambda u: u**3 * mp.exp(-u * u / 2) / 2, 16),
    "cylinder": sheets,
}


def line(job):
    """One row: law, semi-axes, point, field; the point is the double nearest to place times axis."""
    law, axes, place = job
    point = [float(p) * float(a) for p, a in zip(place, axes, strict=True)]
    field = LAWS[law]([mpf(v) for v in point], [mpf(float(a)) for a in axes])
    return [law, *map(repr, map(float, axes)), *map(repr, point), *(mp.nstr(e, 20) for e in field)]


def write(name, letters, laws, shapes, places):
    jobs = [(law, shape, place) for law in laws for shape in shapes for place in places]
    with Pool(2) as pool, (HERE / name).open("w", newline="") as out:
        table = csv.writer(out, lineterminator="\n")
        table.writerow(["law", *(f"a{c}" for c in letters), *letters, *(f"e{c}" for c in letters)])
        table.writerows(pool.imap(line, jobs))


if __name__ == "__main__":
    write("bunch_fields.csv", "xyz", ["uniform", "parabolic", "gaussian"], SHAPES, PLACES)
    write("beam_fields.csv", "xy", ["kv", "parabolic-beam", "gaussian-beam"], SECTIONS, CROSSINGS)
    write("cylinder_fields.csv", "xyz", ["cylinder"], CYLINDERS, PLACES_OF_A_CYLINDER)
