"""Does it matter that the bunch did not always fly straight? Its retarded field against the co-moving one."""

import numpy as np

from beamfield.beam.past import AfterBend
from beamfield.constants import COULOMB, SPEED_OF_LIGHT
from beamfield.errors import CallError
from beamfield.estimate.superposition import Field, finite, rows, superpose


def retarded_field(points, positions, charges, beta_gamma, past):
    """Lab-frame field, now, of N charges that move along +z with momentum beta_gamma and have a past.

    points (3, M) and positions (3, N), about the bunch centre [m]; charges (N,) or scalar [C]; past, an AfterBend or an
    AfterCathode. Returns a Field. Slow: one search for the retarded time per charge and point.
    Raises CallError for shapes that do not fit and for charges that are not yet out of the bend or the cathode.
    Source: Lienard-Wiechert fields; J. D. Jackson, Classical Electrodynamics, 3rd ed., eq. 14.14, from memory of it.
    """
    from beamfield.kernels import retarded

    points, positions = rows("points", points), rows("positions", positions)
    weights = np.ascontiguousarray(np.broadcast_to(finite("charges", np.asarray(charges, float)), positions.shape[1:]))
    if past.straight + positions[2].min() < 0.0:
        raise CallError(
            f"past: {past.straight:g} m of straight flight leave the tail of the bunch still on its way out"
        )
    both, gamma = np.empty((6, points.shape[1])), np.hypot(1.0, beta_gamma)
    if isinstance(past, AfterBend):
        retarded.after_bend(
            points, positions, weights * COULOMB, beta_gamma, gamma, past.straight, past.radius, past.angle, both
        )
    else:
        retarded.after_cathode(points, positions, weights * COULOMB, beta_gamma, gamma, past.straight, both)
    return Field(both[:3], both[3:] / SPEED_OF_LIGHT, method="retarded sum")


def field_against_straight(points, positions, charges, beta_gamma, past, lengths):
    """How the field settles with the length of straight flight.

    As retarded_field, for each of `lengths` (K,) [m] in place of past.straight. Returns (K,) relative differences: rms
    over the points of |E - E_straight| over rms |E_straight|, E_straight being the field of eternal straight motion.
    """
    straight = superpose(points, positions, charges, (0.0, 0.0, beta_gamma)).E
    size = np.sqrt(np.sum(straight**2))
    fields = (retarded_field(points, positions, charges, beta_gamma, past.flown(float(length))).E for length in lengths)
    return np.array([np.sqrt(np.sum((field - straight) ** 2)) / size for field in fields])
