"""The lab-frame field of charges that somebody lists: the Python door to the sum."""

from dataclasses import dataclass

import numpy as np

from beamfield.constants import COULOMB, SPEED_OF_LIGHT
from beamfield.errors import CallError


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
    from beamfield.kernels import moving_charge

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
    if method not in ("auto", "direct"):
        raise CallError(f"method: {method!r} is not one of auto, direct")
    weights = np.ascontiguousarray(np.broadcast_to(charges, (count,))) * COULOMB
    if momenta.ndim == 1:
        field = np.empty((3, points.shape[1]))
        moving_charge.superpose(points, positions, weights, momenta, cloud**2, field)
        gamma = np.sqrt(1.0 + momenta @ momenta)
        return Field(gamma * field, np.cross(momenta, field, axisb=0, axisc=0) / SPEED_OF_LIGHT, method="direct sum")
    both = np.empty((6, points.shape[1]))
    moving_charge.superpose_each(points, positions, weights, np.ascontiguousarray(momenta), cloud**2, both)
    return Field(both[:3], both[3:] / SPEED_OF_LIGHT, method="direct sum")
