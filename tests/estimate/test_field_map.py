"""What a map holds: the force and the potentials of charges that move together."""

from math import sqrt

import numpy as np
import pytest

from beamfield.api import superpose
from beamfield.beam.grid import Grid
from beamfield.estimate.field_map import co_moving, field_blocks, field_map
from beamfield.estimate.potentials import potentials

LIGHT = 299792458.0
CHARGE = -1.6e-19


def bunch(gamma):
    """Evaluator of a map of a hundred charges, and the momentum they share."""
    u = sqrt((gamma - 1.0) * (gamma + 1.0))
    places = 1e-3 * np.random.default_rng(1).normal(size=(3, 100))

    def evaluate(points):
        phi, _ = potentials(points, places, -1e-12, (0.0, 0.0, u))
        return co_moving(superpose(points, places, -1e-12, (0.0, 0.0, u)).E, CHARGE, u, phi)

    return evaluate, u, places


@pytest.mark.parametrize("gamma", [1.2, 10.0])
def test_force_and_vector_potential(gamma):
    """Closed form: q (E + v x B), and A of the charges one by one."""
    evaluate, u, places = bunch(gamma)
    points = 1e-3 * np.random.default_rng(2).normal(size=(3, 20))
    values = evaluate(points)
    velocity = np.array([[0.0], [0.0], [u / gamma * LIGHT]])
    lorentz = CHARGE * (values["E"] + np.cross(velocity, values["B"], axis=0))
    _, vector = potentials(points, places, -1e-12, np.tile([[0.0], [0.0], [u]], 100))
    rounding = 1e-13
    assert np.allclose(values["force"], lorentz, rtol=0.0, atol=rounding * np.abs(CHARGE * values["E"]).max())
    magnetic = superpose(points, places, -1e-12, (0.0, 0.0, u)).B
    assert np.allclose(values["B"], magnetic, rtol=0.0, atol=rounding * np.abs(magnetic).max())
    assert np.allclose(values["A"], vector, rtol=0.0, atol=rounding * np.abs(vector).max())


def test_blocks_make_the_map_whatever_their_size():
    """Ours: the same numbers in pieces of any size, and the quantities that the evaluator gives, in its order."""
    evaluate, _, _ = bunch(5.0)
    grid = Grid.between((-1e-3, 0.0, -2e-3), (1e-3, 0.0, 2e-3), (7, 1, 5))
    whole = evaluate(grid.points(0, grid.size))
    for most in (1, 3, 7, 20, 1000):
        blocks = list(field_blocks(evaluate, grid, most))
        for name, values in whole.items():
            assert np.array_equal(np.concatenate([block.values[name] for block in blocks], axis=-1), values)
    drawn = field_map("", evaluate, grid, 3)
    assert [mapped.name for mapped in drawn.quantities] == ["E", "B", "force", "phi", "A"]
    assert sum(block.last - block.first for block in drawn.blocks) == grid.size


def test_without_potentials():
    """Stated contract: what is not known is left out, not zero."""
    assert list(co_moving(np.ones((3, 2)), CHARGE, 2.0)) == ["E", "B", "force"]
