"""In which directions round a probe its charges stand: even steps of elliptic integrals, which know a flat section
and an edge.

F(phi | m) is the elliptic integral of the first kind, by Landen's transformation: A. Erdelyi (ed.), Higher
Transcendental Functions II, 1953, ch. 13 (from memory of it); tested against scipy.
"""

import math

from numba import prange

from beamfield.kernels.compiled import compiled

NEAREST = 1.0 - 1e-7  # squared scaled distance from the middle at which a probe counts as standing on an edge
ON_EDGE = 1.0 - 1e-12  # scaled distance from which a probe counts as beside the edge, a rounding or two inside it too
BESIDE = 5.0  # rms distance from the middle of a Gaussian from which only the directions that meet it count
GATHER = 3.0  # squared rms distance from the middle of a Gaussian where directions to it start to crowd


@compiled()
def elliptic(phi, m):
    """F(phi | m), any angle, 0 <= m < 1."""
    a, b, scale = 1.0, math.sqrt(1.0 - m), 1.0
    while abs(a - b) > 1e-15 * a:
        turns = math.pi * math.floor(phi / math.pi + 0.5)
        part = min(max(phi - turns, -0.5 * math.pi), 0.5 * math.pi)  # never past the pole of the tangent by rounding
        phi += math.atan(b / a * math.tan(part)) + turns
        a, b, scale = 0.5 * (a + b), math.sqrt(a * b), 2.0 * scale
    return phi / (scale * a)


@compiled()
def solved(wanted, guess, low, high, flat, share, crowd, centre, rest):
    """Angle at which share F(angle | flat) + rest F(angle - centre | crowd) is `wanted`, and the slope there."""
    angle = guess
    for _ in range(80):
        sum_of = share * elliptic(angle, flat)
        slope = share / math.sqrt(1.0 - flat * math.sin(angle) ** 2)
        if rest > 0.0:
            sum_of += rest * elliptic(angle - centre, crowd)
            slope += rest / math.sqrt(1.0 - crowd * math.sin(angle - centre) ** 2)
        short = wanted - sum_of
        low, high = (angle, high) if short > 0.0 else (low, angle)
        step = short / slope
        if abs(step) < 1e-11:
            break
        angle = angle + step if low < angle + step < high else 0.5 * (low + high)
    return angle + step, slope


@compiled(parallel=True)
def azimuths(x, y, flat, portion, edged, window, angles, weights):
    """Fill angles and weights (M, K) for probes at (x, y), in units of the scales of a section that is flat in y.

    flat is 1 - b^2/a^2; portion, the part of the directions that the section asks for, the rest following the edge
    that a probe stands next to, or looking to and from the middle of a Gaussian. Beside an edged bunch only the
    directions that meet it count, crowded at the ends of their range, where the chord vanishes as a root. Beside a
    Gaussian its window is met, in even steps: the charge fades towards the ends by itself.
    """
    count = angles.shape[1]
    quarter = elliptic(0.5 * math.pi, flat)
    for m in prange(len(x)):
        distance, outer = math.hypot(x[m], y[m]), math.atan2(y[m], x[m])
        if distance > (ON_EDGE if edged else BESIDE):
            reach = math.asin(min(1.0, (1.0 if edged else window) / distance))
            start, end = outer + math.pi - reach, outer + math.pi + reach
            first, last = elliptic(start, flat), elliptic(end, flat)
            guess = start
            for k in range(count):
                even = 2.0 * (k + 0.5) / count - 1.0
                turn = 0.5 * math.pi * even
                place, step = (math.sin(turn), 0.5 * math.pi * math.cos(turn)) if edged else (even, 1.0)
                wanted = 0.5 * (first + last) + 0.5 * (last - first) * place
                guess, slope = solved(wanted, guess, start - 1e-9, end + 1e-9, flat, 1.0, 0.0, 0.0, 0.0)
                angles[m, k] = guess
                weights[m, k] = (last - first) * step / count / slope
        else:
            d2 = distance * distance
            crowd, centre = (min(d2, NEAREST), outer) if edged else (d2 / (GATHER + d2), outer + 0.5 * math.pi)
            share = portion / (4.0 * quarter)
            rest = (1.0 - portion) / (4.0 * elliptic(0.5 * math.pi, crowd))
            start = rest * elliptic(-centre, crowd)
            guess = 0.0
            for k in range(count):
                wanted = (k + 0.5) / count + start
                guess, slope = solved(wanted, guess, guess - 1e-9, 7.0, flat, share, crowd, centre, rest)
                angles[m, k] = guess
                weights[m, k] = 1.0 / (count * slope)
