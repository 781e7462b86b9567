"""The potentials of moving charges against the retarded ones, and against the field they make."""

from math import pi, sqrt

import numpy as np
import pytest
from mpmath import mp, mpf

from beamfield.api import superpose
from beamfield.errors import CallError
from beamfield.estimate.potentials import potentials
from tests.retarded import DIGITS, dot, light_path

EPS0, LIGHT, CHARGE = 8.8541878188e-12, 299792458.0, 1.6e-12  # CODATA 2022
ORIGIN = np.zeros((3, 1))
MOMENTA = [(0.0, 0.0, 1e-4), (0.3, -0.4, 1.2), (0.0, 0.0, 1e3), (3e4, -5e4, 8e4)]


def about(scale, count=12, seed=2):
    return scale * np.random.default_rng(seed).normal(size=(3, count))


def retarded_potential(d, u):
    """phi of a coulomb, by the light that left a past place: q / (4 pi eps0 R (1 - n . beta))."""
    with mp.workdps(DIGITS):
        d, u = [mpf(float(x)) for x in d], [mpf(float(x)) for x in u]
        beta = [ui / mp.sqrt(1 + dot(u, u)) for ui in u]
        run = light_path(d, beta)
        short = run - dot([di + bi * run for di, bi in zip(d, beta, strict=True)], beta)
        return float(1 / (4 * mp.pi * mpf("8.8541878188e-12") * short))


@pytest.mark.parametrize("u", MOMENTA)
def test_one_charge_is_the_retarded_solution(u):
    """Closed form: the Lienard-Wiechert potential with sixty digits; A = beta phi / c."""
    points = about(1e-3)
    phi, vector = potentials(points, ORIGIN, CHARGE, u)
    truth = CHARGE * np.array([retarded_potential(d, u) for d in points.T])
    rounding = 1e-13
    assert np.allclose(phi, truth, rtol=rounding, atol=0.0)
    assert np.allclose(vector, np.outer(u, truth) / sqrt(1.0 + np.dot(u, u)) / LIGHT, rtol=rounding, atol=0.0)


@pytest.mark.parametrize("u", MOMENTA[:2])
@pytest.mark.parametrize("cloud", [0.0, 3e-4])
def test_the_field_is_what_the_potentials_make(u, cloud):
    """Closed form: E = -grad phi - dA/dt and B = curl A, where d/dt = -v . grad for what moves with v."""
    points, places, charges = about(1e-3), about(1e-3, 4, seed=7), CHARGE * np.array([1.0, -2.0, 1.5, 0.5])
    step = 1e-8  # differences of two values 2e-8 m apart: truncation 1e-9, rounding 1e-8
    slopes_phi, slopes_a = [], []
    for axis in range(3):
        shift = step * np.eye(3)[:, axis : axis + 1]
        after, before = (potentials(points + s * shift, places, charges, u, cloud) for s in (1.0, -1.0))
        slopes_phi.append((after[0] - before[0]) / (2.0 * step))
        slopes_a.append((after[1] - before[1]) / (2.0 * step))
    velocity = np.array(u) / sqrt(1.0 + np.dot(u, u)) * LIGHT
    electric = -np.array(slopes_phi) + np.einsum("k,kim->im", velocity, np.array(slopes_a))
    gx, gy, gz = slopes_a
    magnetic = np.array([gy[2] - gz[1], gz[0] - gx[2], gx[1] - gy[0]])
    field = superpose(points, places, charges, u, cloud=cloud)
    differences = 1e-5
    for mine, theirs in ((electric, field.E), (magnetic, field.B)):
        assert np.all(np.linalg.norm(mine - theirs, axis=0) < differences * np.linalg.norm(theirs, axis=0))


@pytest.mark.parametrize("gamma", [1.5, 12.0, 1e3])
def test_equipotentials_are_ellipsoids(gamma):
    """Closed form: phi is one and the same over x2 + y2 + gamma2 z2 = R2, and gamma times Coulomb's at R."""
    direction = about(1.0, 50)
    radius, direction = 0.02, direction / np.linalg.norm(direction, axis=0)
    points = radius * direction / np.array([[1.0], [1.0], [gamma]])
    phi, _ = potentials(points, ORIGIN, CHARGE, (0.0, 0.0, sqrt((gamma - 1.0) * (gamma + 1.0))))
    rounding = 1e-13
    assert np.allclose(phi, gamma * CHARGE / (4.0 * pi * EPS0 * radius), rtol=rounding, atol=0.0)


def test_one_momentum_for_all_or_one_for_each():
    """Closed form: (3,) and its (3, N) repetition are one case; charges with momenta of their own add up."""
    points, places, u = about(1.0), about(1.0, 5, seed=9), np.array([0.5, 1.0, -2.0])
    shared, each = (potentials(points, places, CHARGE, m) for m in (u, np.tile(u[:, None], 5)))
    mixed = potentials(points, places[:, :2], CHARGE, np.stack([u, -u], axis=1))
    single = [potentials(points, places[:, i : i + 1], CHARGE, s * u) for i, s in enumerate((1.0, -1.0))]
    rounding = 1e-14
    for part in range(2):
        assert np.allclose(shared[part], each[part], rtol=rounding, atol=0.0)
        assert np.allclose(mixed[part], single[0][part] + single[1][part], rtol=1e-12, atol=0.0)


def test_its_own_place_and_what_does_not_fit():
    """Stated convention: nothing at its own place, but for a cloud; a shape that does not fit is named."""
    assert potentials(ORIGIN, ORIGIN, CHARGE, (0.0, 0.0, 1.0))[0] == 0.0
    cloud = potentials(ORIGIN, ORIGIN, CHARGE, (0.0, 0.0, 0.0), cloud=1e-3)[0]
    rounding = 1e-15
    assert cloud == pytest.approx(CHARGE / (4.0 * pi * EPS0 * 1e-3), rel=rounding)
    with pytest.raises(CallError, match="momenta"):
        potentials(ORIGIN, ORIGIN, CHARGE, (0.0, 1.0))
