"""Slopes of the field at the centre of the bunch, and where it peaks on the axes: numbers drawn from any field."""

import numpy as np

STENCIL = np.array([0.06, 0.12, 0.18, 0.24, 0.3])  # rms sizes from the centre
PEAK_REACH = 4.0  # rms sizes along an axis within which a smooth bunch has its strongest field
FIRST, ZOOM, ROUNDS = 24, 9, 8
MISSED = 1e-12  # of the height of a smooth top: the last places stand 2e-6 rms apart


def stencil(sigma, axes, steps):
    """Points (3, A S) at `steps` rms sizes from the centre along each of the A axes."""
    points = np.zeros((3, len(axes), len(steps)))
    for row, axis in enumerate(axes):
        points[axis, row] = steps * sigma[axis]
    return points.reshape(3, -1)


def slope_weights(count):
    """Weights (count,) of E(x)/x at the first places of the stencil for x = 0.

    The even polynomial through all of them.
    """
    squares = STENCIL[:count] ** 2
    others = [np.delete(squares, i) for i in range(count)]
    return np.array([np.prod(other / (other - own)) for other, own in zip(others, squares, strict=True)])


def slopes(field, sigma, axes=(0, 1, 2)):
    """dE_i/dx_i at the centre of a density, where E is odd, for the given axes, of a function field(points).

    (2, A): from all places of the stencil, and from one less, which shows the error of the polynomial.
    """
    values = field(stencil(sigma, axes, STENCIL)).reshape(3, len(axes), -1)
    ratios = np.array([values[axis, row] / (STENCIL * sigma[axis]) for row, axis in enumerate(axes)])
    return np.array([ratios[:, :count] @ slope_weights(count) for count in (len(STENCIL), len(STENCIL) - 1)])


def slopes_amid(field, sigma, axes=(0, 1, 2)):
    """dE_i/dx_i (A,) at the centre of any smooth field, that of other bunches: only its odd part has a slope there."""
    return slopes(lambda points: 0.5 * (field(points) - field(-points)), sigma, axes)[0]


def smooth_slopes(field, sigma, axes=(0, 1, 2)):
    """The same by least squares on both sides, for the noisy field of particles: the slope within 0.3 rms.

    (2, A): of a straight line, and of one with a cubic term, which shows how far it bends.
    """
    steps = np.concatenate([-STENCIL[::-1], STENCIL])
    values = field(stencil(sigma, axes, steps)).reshape(3, len(axes), -1)
    own = np.array([values[axis, row] / sigma[axis] for row, axis in enumerate(axes)])
    return np.array([own @ np.linalg.pinv(steps ** np.array(powers)[:, None])[:, 0] for powers in ([1], [1, 3])])


def peak_place(along, sigma, edge, cusp=False, rounds=ROUNDS):
    """Distance [m] from the centre at which abs(along(places)) is largest, along one axis.

    edge, half extent or None; cusp, True where the density ends there at once; rounds of refinement, each four times
    finer.

    A first row of places, then ever finer rows about the best of them; where a cusp is the best it is the place.
    """
    places = np.arange(1, FIRST + 1) * (PEAK_REACH * sigma / FIRST if edge is None else edge / (FIRST - 4))
    if cusp:
        places[FIRST - 5] = edge
    best, step = _best(along, places), places[0]
    if cusp and best == edge:
        return best
    for _ in range(rounds):
        best = _best(along, best + np.linspace(-step, step, ZOOM))
        step *= 2.0 / (ZOOM - 1)
    return best


def _best(along, places):
    places = places[places > 0.0]
    return places[np.argmax(np.abs(along(places)))]
