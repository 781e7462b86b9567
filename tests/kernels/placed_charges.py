"""The slow twins of the probe kernels: where the charges stand round a probe and what they carry, in plain Python.

Written from the words at the top of the kernels, with lists of charges that anyone may count: each is (x, y, z, q), a
distance from the probe in the frame of the bunch and a charge per unit central density. Their field is that of the
naive twin of the moving charge, boosted back to the lab.
"""

from math import asinh, atan2, cos, cosh, exp, pi, sin, sinh, sqrt

from tests.naive import VACUUM_PERMITTIVITY, field_of_one


def field(charges, gamma):
    """Lab E / gamma (3,) at the probe of all charges (x, y, z, q), z in the frame of the bunch, over 1 / 4 pi eps0."""
    u = [0.0, 0.0, sqrt((gamma - 1.0) * (gamma + 1.0))]
    total = [0.0, 0.0, 0.0]
    for x, y, z, q in charges:
        one = field_of_one([-x, -y, -z / gamma], 4.0 * pi * VACUUM_PERMITTIVITY * q, u)[0]
        total = [t + e / gamma for t, e in zip(total, one, strict=True)]
    return total


def density(kind, t):
    return {"gaussian": exp(-0.5 * t), "flat": 1.0, "parabolic": max(0.0, 1.0 - t), "coasting": 1.0}[kind]


def roots(square, half, rest):
    """Roots of square r^2 + 2 half r + rest, cut at r = 0; none where they are complex."""
    disc = half * half - square * rest
    if disc <= 0.0:
        return None
    near, far = (-half - sqrt(disc)) / square, (-half + sqrt(disc)) / square
    return (max(0.0, near), far) if far > 0.0 else None


def height_parts(z, rho, top, along, window):
    """[(low, high, signs)] of zeta: pairs as far as both ends reach, the longer side; which takes the many nodes."""
    if along == "coasting":
        return [(0.0, 2.0 * window, (1.0, -1.0))], 0
    inner, outer = asinh((top - abs(z)) / rho), asinh((top + abs(z)) / rho)
    side = -1.0 if z > 0.0 else 1.0
    if along == "gaussian":
        return [(0.0, outer, (side, -side))], 0
    parts = [(0.0, inner, (side, -side))] if inner > 0.0 else [(0.0, 0.0, ())]
    return parts + [(abs(inner), outer, (side,))], 0 if inner >= 0.5 * outer else 1


def product_charges(probe, scales, kinds, window, azimuth, radial, many, few):
    """Charges of a product bunch; azimuth [(cos, sin, weight)], the other nodes [(place on (0, 1), weight)]."""
    (a, b, c), (across, along) = scales, kinds
    px, py, z = probe[0] / a, probe[1] / b, probe[2]
    edge = window if across == "gaussian" else 1.0
    top = c * (window if along == "gaussian" else 1.0)
    near = max(abs(c - abs(z)), 0.15 * c) if along == "flat" else c
    for cosine, sine, turn in azimuth:
        met = roots(1.0, px * cosine + py * sine, px * px + py * py - edge * edge)
        if met is None:
            continue
        stretch = sqrt((a * cosine) ** 2 + (b * sine) ** 2)
        ends = [asinh(stretch * r / near) for r in met]
        for node, share in radial:
            place, slope = node, 1.0
            if px * px + py * py < edge * edge:
                pancake = c < sqrt(a * b)
                place = node**2 * (3.0 - 2.0 * node) if pancake else node**2
                slope = 6.0 * node * (1.0 - node) if pancake else 2.0 * node
            w = ends[0] + (ends[1] - ends[0]) * place
            rho = near * sinh(w)
            drho = near * cosh(w) * (ends[1] - ends[0]) * slope * share
            x, y = a * rho / stretch * cosine, b * rho / stretch * sine
            weight = density(across, (px + x / a) ** 2 + (py + y / b) ** 2) * a * b * rho * drho / stretch**2 * turn
            parts, longer = height_parts(z, rho, top, along, window)
            for number, (low, high, signs) in enumerate(parts):
                for spot, part in many if number == longer else few:
                    zeta = low + (high - low) * spot
                    for sign in signs:
                        dz = sign * rho * sinh(zeta)
                        cell = rho * cosh(zeta) * (high - low) * part
                        yield x, y, dz, weight * cell * density(along, ((z + dz) / c) ** 2)


def ray_charges(probe, scales, degree, azimuth, paired, single, steep):
    """Charges of an ellipsoid, two on each ray; `steep`, eta beyond the steepest diagonal; nodes as above."""
    a, b, c = scales
    p = [q / s for q, s in zip(probe, scales, strict=True)]
    beyond = sum(q * q for q in p) - 1.0
    for cosine, sine, turn in azimuth:
        stretch = sqrt((a * cosine) ** 2 + (b * sine) ** 2)
        unit = min(stretch / c, 1.0)
        limit = exp(steep) * max(1.0, stretch / c)
        lowest, highest = (-limit, limit) if beyond <= 0.0 else slopes_that_meet(p, cosine, sine, limit)
        if highest <= lowest:
            continue
        for slope, step in slope_nodes(asinh(lowest / unit), asinh(highest / unit), paired, single, beyond > 0.0):
            w = unit * sinh(slope)
            weight = turn * a * b * c * unit * cosh(slope) * step
            yield from two_on_a_chord(p, scales, cosine, sine, w, degree, weight)


def slopes_that_meet(p, cosine, sine, limit):
    """Slopes dz/drho, scaled, whose rays meet the unit sphere ahead: where the chord's discriminant is positive."""
    b, d2 = p[0] * cosine + p[1] * sine, p[0] ** 2 + p[1] ** 2
    # (b + p_z w)^2 - (1 + w^2) (d^2 + p_z^2 - 1) = (1 - d^2) w^2 + 2 b p_z w + b^2 - beyond
    square, half, rest = 1.0 - d2, b * p[2], b * b - (d2 + p[2] ** 2 - 1.0)
    disc = half * half - square * rest
    if disc <= 0.0 or (d2 >= 1.0 and b >= 0.0):
        return 0.0, 0.0
    first, second = sorted(((-half - sqrt(disc)) / square, (-half + sqrt(disc)) / square))
    if square > 0.0:  # above or below: all steeper ones that point to the sphere
        return (-limit, first) if p[2] > 0.0 else (second, limit)
    return max(-limit, first), min(limit, second)


def slope_nodes(low, high, paired, single, outside):
    """(eta, step): pairs about the level as far as both sides reach, then single ones on the rest of the longer."""
    if low > 0.0 or high < 0.0:
        common, rest = 0.0, (low, high)
    else:
        common, rest = min(-low, high), ((-low, high) if high >= -low else (low, -high))
    for start, end, nodes, signs in ((0.0, common, paired, (1.0, -1.0)), (*rest, single, (1.0,))):
        for node, share in nodes if end - start > 0.0 else ():
            place, slope = (node**2 * (3.0 - 2.0 * node), 6.0 * node * (1.0 - node)) if outside else (node, 1.0)
            for sign in signs:
                yield sign * (start + (end - start) * place), (end - start) * slope * share


def two_on_a_chord(p, scales, cosine, sine, w, degree, weight):
    """Two charges at the Gauss nodes of the chord that a ray of slope w cuts out of the unit sphere."""
    met = roots(1.0 + w * w, p[0] * cosine + p[1] * sine + p[2] * w, sum(q * q for q in p) - 1.0)
    if met is None:
        return
    for node in (0.5 - 0.5 / sqrt(3.0), 0.5 + 0.5 / sqrt(3.0)):
        r = met[0] + (met[1] - met[0]) * node
        spot = (p[0] + r * cosine, p[1] + r * sine, p[2] + r * w)
        inside = 1.0 - sum(s * s for s in spot) if degree == 2 else 1.0
        distance = (r * cosine * scales[0], r * sine * scales[1], r * w * scales[2])
        yield *distance, 0.5 * weight * (met[1] - met[0]) * r * r * inside


def even_azimuth(count):
    """[(cos, sin, weight)] of even directions."""
    turn = 2.0 * pi / count
    return [(cos(turn * (k + 0.3)), sin(turn * (k + 0.3)), turn) for k in range(count)]


def facing_azimuth(probe, scales, count):
    """The same over the half turn that faces the axis."""
    middle = atan2(-probe[1] / scales[1], -probe[0] / scales[0])
    return [
        (cos(middle + t), sin(middle + t), pi / count) for t in [pi * ((k + 0.5) / count - 0.5) for k in range(count)]
    ]
