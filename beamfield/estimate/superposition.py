"""The lab-frame field of charges that somebody lists: the Python door to the sum."""

from dataclasses import dataclass

import numpy as np

from beamfield.constants import COULOMB, SPEED_OF_LIGHT
from beamfield.errors import CallError

METHODS = ("auto", "direct", "fast")
SMALL = 10**7  # pairs that are summed directly in less time than the fast sum takes to load
CHECKED = 96  # points at which the fast sum is compared with the direct one


@dataclass(frozen=True, slots=True, eq=False)
class Field:
    """E (3, M) V/m, B (3, M) T, in the lab; doubt, estimated relative rms error; closed_form, E (3, M) of the
    textbook or None.
    """

    E: np.ndarray
    B: np.ndarray
    doubt: float = 0.0
    closed_form: np.ndarray | None = None
    method: str = ""


def rows(name, values, count=None):
    """(3, count) float array from an argument; CallError names the argument that does not fit."""
    try:
        array = np.ascontiguousarray(values, float)
    except (TypeError, ValueError):
        raise CallError(f"{name}: not an array of numbers") from None
    if array.ndim != 2 or array.shape[0] != 3 or (count is not None and array.shape[1] != count):
        raise CallError(f"{name}: shape {array.shape} is not (3, {'K' if count is None else count})")
    return finite(name, array)


def finite(name, array):
    if not np.isfinite(array).all():
        raise CallError(f"{name}: holds nan or inf")
    return array


def superpose(points, positions, charges, momenta, cloud=0.0, method="auto", tolerance=1e-4):
    """Lab-frame field, now, of N uniformly moving charges.

    points (3, M) and positions (3, N) in m; charges (N,) or scalar in C; momenta u = gamma beta, (3,) shared or (3,
    N) each; cloud, softening length in the rest frame of each charge [m]. Returns a Field. A charge makes no field at
    its own place. Raises CallError for shapes that do not fit, nan, a negative cloud or an unknown method.
    Source: O. Heaviside, The Electrician 22 (1888) 147: the field of a charge in uniform motion.
    """
    points, positions = rows("points", points), rows("positions", positions)
    count = positions.shape[1]
    charges = finite("charges", np.asarray(charges, float))
    if charges.shape not in ((), (count,)):
        raise CallError(f"charges: shape {charges.shape} is neither () nor ({count},)")
    momenta = finite("momenta", np.asarray(momenta, float))
    if momenta.shape not in ((3,), (3, count)):
        raise CallError(f"momenta: shape {momenta.shape} is neither (3,) nor (3, {count})")
    if not 0.0 <= cloud < np.inf:
        raise CallError(f"cloud: a softening length of {cloud} m makes no sense; write 0 or more")
    if method not in METHODS:
        raise CallError(f"method: {method!r} is not one of {', '.join(METHODS)}")
    if not 1e-12 <= tolerance <= 0.1:
        raise CallError(f"tolerance: {tolerance} is not between 1e-12 and 0.1")
    refuse_too_large(points.shape[1], count, momenta.ndim)
    weights = np.ascontiguousarray(np.broadcast_to(charges, (count,))) * COULOMB
    shared = shared_momentum(momenta)
    if shared is None and method == "fast":
        raise CallError("method: the fast sum needs one momentum for all charges; write method='direct'")
    if shared is None:
        return _each(points, positions, weights, momenta, cloud)
    if method == "fast" or (method == "auto" and _pays(points, positions, tolerance, cloud)):
        return _fast(points, positions, weights, shared, cloud, tolerance)
    return _direct(points, positions, weights, shared, cloud)


def shared_momentum(momenta):
    """The momentum (3,) of all charges, or None where they differ."""
    if momenta.ndim == 1:
        return momenta
    return momenta[:, 0].copy() if momenta.shape[1] and np.all(momenta == momenta[:, :1]) else None


def refuse_too_large(points, sources, dimensions):
    """CallError where the sum would take more memory than the machine has, before any is taken."""
    from os import sysconf

    wanted = 8 * (points * (6 if dimensions == 2 else 12) + sources * (2 + 3 * (dimensions == 2)))
    there = sysconf("SC_PAGE_SIZE") * sysconf("SC_PHYS_PAGES")
    if wanted > there:
        told = f"{wanted / 2**30:.3g} GiB for {points} points and {sources} charges, of {there / 2**30:.3g} GiB"
        raise CallError(f"memory: the sum would take {told}; sum in parts")


def _direct(points, positions, weights, momentum, cloud):
    from beamfield.kernels import moving_charge

    field = np.empty((3, points.shape[1]))
    moving_charge.superpose(points, positions, weights, momentum, cloud**2, field)
    return _shared(np.sqrt(1.0 + momentum @ momentum) * field, momentum, 0.0, "direct sum")


def _each(points, positions, weights, momenta, cloud):
    from beamfield.kernels import moving_charge

    both = np.empty((6, points.shape[1]))
    moving_charge.superpose_each(points, positions, weights, np.ascontiguousarray(momenta), cloud**2, both)
    return Field(both[:3], both[3:] / SPEED_OF_LIGHT, method="direct sum")


def _pays(points, positions, tolerance, cloud):
    """Whether the fast sum is expected to be quicker; small sums are not worth loading it."""
    if points.shape[1] * positions.shape[1] < SMALL:
        return False
    from beamfield.estimate.fast_sum import prefers_fast

    return prefers_fast(positions.shape[1], points.shape[1], tolerance, cloud)


def _fast(points, positions, weights, momentum, cloud, tolerance):
    """In the rest frame of the charges, where distances along the motion are gamma times longer, and back to the
    lab.
    """
    from beamfield.estimate.fast_sum import fast_field

    gamma, size = np.sqrt(1.0 + momentum @ momentum), np.linalg.norm(momentum)
    along = momentum / size if size > 0.0 else np.array([0.0, 0.0, 1.0])
    stretch = size * size / (gamma + 1.0)  # gamma - 1, all its digits

    def seen(field):
        return gamma * field - stretch * np.outer(along, along @ field)

    rest_positions = positions + stretch * np.outer(along, along @ positions)
    same = points is positions or np.array_equal(points, positions)
    rest_points = None if same else points + stretch * np.outer(along, along @ points)
    found = fast_field(rest_points, rest_positions, weights, tolerance, cloud, seen)
    method = f"fast sum, order {found.order}, checked at {CHECKED} points"
    if found.redone:
        method += f", done again {found.redone} times to meet {tolerance:g}"
    if found.doubt > tolerance:
        method += f"; the tolerance of {tolerance:g} is missed"
    return _shared(seen(found.field), momentum, found.doubt, method)


def _shared(electric, momentum, doubt, method):
    """Field of charges that share their momentum: B = u x E / (gamma c)."""
    magnetic = np.cross(momentum, electric, axisb=0, axisc=0) / (np.sqrt(1.0 + momentum @ momentum) * SPEED_OF_LIGHT)
    return Field(electric, magnetic, doubt, method=method)
