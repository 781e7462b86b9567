"""Charges on rays through an ellipsoid: the kernels against their slow twin, against each other and the textbook."""

from math import pi, sqrt

import numpy as np
import pytest

from beamfield.kernels.probe_cone import cone_field
from beamfield.kernels.probe_rays import STEEPEST, ray_field
from beamfield.laws.ellipsoid import uniform_ellipsoid_field
from beamfield.laws.parabolic import parabolic_ellipsoid_field
from tests.kernels.placed_charges import even_azimuth, facing_azimuth, field, ray_charges

SCALES = [(1e-3, 1e-3, 1e-3), (3e-3, 1e-3, 8e-2), (1e-3, 2e-3, 1e-5)]
INSIDE = [(0.3, 0.2, 0.4), (-0.6, 0.1, -0.7), (0.0, 0.0, 0.0), (0.0, 0.3, 0.0)]
OUTSIDE = [(1.4, -0.9, 0.3), (-0.2, 0.4, 1.6), (0.5, 0.2, -1.3), (-1.5, 2.0, -1.2), (0.8, 0.5, 0.9)]
FULL, PARABOLIC = 0, 2
LAWS = {FULL: (uniform_ellipsoid_field, 4.0 * pi / 3.0), PARABOLIC: (parabolic_ellipsoid_field, 8.0 * pi / 15.0)}
ROUNDING = 1e-11


def nodes(count):
    """[(place, weight)] of Gauss and Legendre on (0, 1)."""
    x, w = np.polynomial.legendre.leggauss(count)
    return list(zip(0.5 * (x + 1.0), 0.5 * w, strict=True))


def arrays(pairs):
    return tuple(np.array(column) for column in zip(*pairs, strict=True))


def rays(probe, scales, degree, azimuth, paired, single, gamma=1.0):
    """The compiled sum (4,) at one probe."""
    cosine, sine, weight = arrays(azimuth)
    out = np.empty((4, 1))
    probes = np.array(probe, dtype=float)[:, None]
    directions = np.stack([cosine, sine])[None]
    ray_field(
        *(probes, scales, degree, directions, weight[None], *arrays(paired), *arrays(single), gamma, out),
    )
    return out[:, 0]


def cone(probe, scales, degree, count, slopes, gamma=1.0):
    out = np.empty((4, 1))
    cone_field(np.array(probe, dtype=float)[:, None], scales, degree, count, *arrays(nodes(slopes)), gamma, out)
    return out[:, 0]


def textbook(probe, scales, degree):
    """Field (3,) per unit central density, at rest, over 1 / 4 pi eps0."""
    law, volume = LAWS[degree]
    return volume * np.prod(scales) * law(np.array(probe, dtype=float)[:, None], scales)[:, 0]


def error(found, truth):
    return np.linalg.norm(found[:3] - truth) / np.linalg.norm(truth)


@pytest.mark.parametrize("degree", [FULL, PARABOLIC])
@pytest.mark.parametrize("scales", SCALES)
@pytest.mark.parametrize("unit", INSIDE + OUTSIDE)
def test_slow_twin(unit, scales, degree):
    """Naive twin: the same charges listed one by one, each boosted to the lab."""
    paired, single, gamma = nodes(5), nodes(4), 7.0
    probe = [t * s for t, s in zip(unit, scales, strict=True)]
    azimuth = facing_azimuth(probe, scales, 6) if unit[0] ** 2 + unit[1] ** 2 > 1.0 else even_azimuth(6)
    found = rays(probe, scales, degree, azimuth, paired, single, gamma)
    charges = list(ray_charges(probe, scales, degree, azimuth, paired, single, STEEPEST))
    size = sum(abs(q) / (x * x + y * y + z * z) for x, y, z, q in charges)
    assert size > 0.0
    assert np.abs(found[:3] - field(charges, gamma)).max() <= ROUNDING * size
    potential = sum(q / sqrt(x * x + y * y + z * z) for x, y, z, q in charges)
    assert found[3] == pytest.approx(potential, rel=ROUNDING, abs=0.0)


def test_charges_add_up_to_the_bunch():
    """Closed form: whoever counts the charges round a probe finds the charge of the bunch, from inside and outside.

    Of a uniform one: two charges a ray are exact for the field of a parabolic one, not for its charge."""
    scales, quadrature = (1e-3, 2e-3, 3e-3), 1e-3
    for unit in ((0.2, -0.3, 0.4), (0.3, 0.2, 2.0), (0.3, 0.2, -1.5)):
        probe = [t * s for t, s in zip(unit, scales, strict=True)]
        charges = list(ray_charges(probe, scales, FULL, even_azimuth(60), nodes(60), nodes(60), STEEPEST))
        total = LAWS[FULL][1] * np.prod(scales)
        assert sum(charge[3] for charge in charges) == pytest.approx(total, rel=quadrature, abs=0.0)
        places = (np.array([charge[:3] for charge in charges]) + probe) / scales
        assert np.all(np.square(places).sum(axis=1) <= 1.0 + ROUNDING)


@pytest.mark.large
@pytest.mark.parametrize("degree", [FULL, PARABOLIC])
@pytest.mark.parametrize("scales", SCALES)
def test_from_inside_it_is_the_textbook(scales, degree):
    """Closed form: Carlson's integrals; even directions serve a round section, 400 of them one of 3 : 1 too."""
    good = 1e-11
    for unit in INSIDE:
        probe = np.array(unit) * scales
        found = rays(probe, scales, degree, even_azimuth(400), nodes(80), nodes(1))
        if np.any(probe):
            assert error(found, textbook(probe, scales, degree)) < good
        else:
            assert np.abs(found[:3]).max() < good * scales[2]


@pytest.mark.large
@pytest.mark.parametrize("degree", [FULL, PARABOLIC])
@pytest.mark.parametrize("scales", SCALES)
def test_from_outside_two_orders_agree(scales, degree):
    """Closed form: directions first or slopes first, both meet Carlson's integrals; slopes first is the sharper."""
    rough, good = 1e-2, 1e-6
    for unit in OUTSIDE:
        probe = np.array(unit) * scales
        truth = textbook(probe, scales, degree)
        beside = unit[0] ** 2 + unit[1] ** 2 > 1.0
        azimuth = facing_azimuth(probe, scales, 400) if beside else even_azimuth(400)
        assert error(rays(probe, scales, degree, azimuth, nodes(200), nodes(200)), truth) < rough
        assert error(cone(probe, scales, degree, 200, 200), truth) < good


def test_small_cone_moves_like_the_rest():
    """Closed form: per gamma, E across does not know the motion and E along is 1 / gamma of that at rest."""
    for unit in OUTSIDE:
        probe, scales = np.array(unit) * (1e-3, 2e-3, 3e-3), (1e-3, 2e-3, 3e-3)
        rest, fast = (cone(probe, scales, FULL, 4, 6, gamma) for gamma in (1.0, 1e5))
        assert np.allclose(fast[:3], rest[:3] / [1.0, 1.0, 1e5], rtol=ROUNDING, atol=0.0)
        assert np.allclose(
            cone(probe * [1.0, 1.0, -1.0], scales, FULL, 4, 6)[:3], rest[:3] * [1.0, 1.0, -1.0], rtol=ROUNDING
        )
