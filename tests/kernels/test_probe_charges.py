"""Charges placed for each probe: the kernel against its slow twin, and the charges against the bunch they stand for."""

from math import pi, sqrt

import numpy as np
import pytest

from beamfield.kernels.probe_charges import probe_field
from tests.kernels.placed_charges import even_azimuth, facing_azimuth, field, product_charges

KINDS = {"gaussian": 0, "flat": 1, "parabolic": 2, "coasting": 3}
SCALES = [(1e-3, 1e-3, 1e-3), (3e-3, 1e-3, 8e-2), (1e-3, 2e-3, 1e-5)]
PLACES = [(0.3, 0.2, 0.4), (-0.6, 0.1, -0.7), (0.0, 0.0, 0.0), (1.4, -0.9, 0.3), (-0.2, 0.4, 1.6), (-1.5, 2.0, -1.2)]
WINDOW = 6.0
ROUNDING = 1e-12


def nodes(count):
    """[(place, weight)] of Gauss and Legendre on (0, 1)."""
    x, w = np.polynomial.legendre.leggauss(count)
    return list(zip(0.5 * (x + 1.0), 0.5 * w, strict=True))


def arrays(pairs):
    return tuple(np.array(column) for column in zip(*pairs, strict=True))


def kernel(probe, scales, kinds, azimuth, radial, many, few, gamma):
    """The compiled sum at one probe; its fourth row, phi / gamma, comes along."""
    cosine, sine, weight = arrays(azimuth)
    out = np.empty((4, 1))
    codes = tuple(KINDS[kind] for kind in kinds)
    probes = np.array(probe, dtype=float)[:, None]
    directions = np.stack([cosine, sine])[None]
    probe_field(
        *(probes, scales, codes, WINDOW, directions, weight[None]),
        *(*arrays(radial), *arrays(many), *arrays(few), gamma, out),
    )
    return out[:, 0]


@pytest.mark.parametrize("along", ["gaussian", "flat", "parabolic", "coasting"])
@pytest.mark.parametrize("across", ["gaussian", "flat", "parabolic"])
@pytest.mark.parametrize("scales", SCALES)
def test_slow_twin(across, along, scales):
    """Naive twin: the same charges listed one by one, each boosted to the lab."""
    radial, many, few, gamma = nodes(4), nodes(5), nodes(3), 7.0
    for unit in PLACES:
        probe = [t * s for t, s in zip(unit, scales, strict=True)]
        beside = across != "gaussian" and unit[0] ** 2 + unit[1] ** 2 > 1.0
        azimuth = facing_azimuth(probe, scales, 6) if beside else even_azimuth(6)
        found = kernel(probe, scales, (across, along), azimuth, radial, many, few, gamma)[:3]
        charges = list(product_charges(probe, scales, (across, along), WINDOW, azimuth, radial, many, few))
        twin = np.array(field(charges, gamma))
        size = sum(abs(q) / (x * x + y * y + z * z) for x, y, z, q in charges)
        assert size > 0.0
        assert np.abs(found - twin).max() <= ROUNDING * size


@pytest.mark.parametrize(
    "kinds, volume",
    [
        (("flat", "flat"), pi * 2.0),
        (("parabolic", "parabolic"), pi / 2.0 * 4.0 / 3.0),
        (("gaussian", "flat"), 2.0 * pi * 2.0),
        (("flat", "gaussian"), pi * sqrt(2.0 * pi)),
    ],
)
def test_charges_add_up_to_the_bunch(kinds, volume):
    """Closed form: whoever counts the charges round a probe finds the charge of the bunch, from inside."""
    scales, probe = (1e-3, 2e-3, 3e-3), (0.2e-3, -0.5e-3, 1e-3)
    charges = product_charges(probe, scales, kinds, 7.0, even_azimuth(48), nodes(32), nodes(32), nodes(32))
    quadrature = 1e-5
    assert sum(q for *_, q in charges) == pytest.approx(volume * np.prod(scales), rel=quadrature, abs=0.0)


def test_charges_stand_inside():
    """Every charge lies within the edges of the bunch, also those seen from outside."""
    scales, kinds = (1e-3, 2e-3, 3e-3), ("flat", "parabolic")
    for unit in PLACES:
        probe = np.array(unit) * scales
        charges = list(product_charges(probe, scales, kinds, 7.0, even_azimuth(24), nodes(4), nodes(4), nodes(4)))
        assert charges
        places = (np.array([charge[:3] for charge in charges]) + probe) / scales
        assert np.all(places[:, 0] ** 2 + places[:, 1] ** 2 <= 1.0 + ROUNDING)
        assert np.all(np.abs(places[:, 2]) <= 1.0 + ROUNDING)


def test_phi_is_the_potential_of_the_charges():
    """Closed form: the sum of q / r, less what one frame adds: the fourth row is phi / gamma."""
    scales, probe, kinds, gamma = (1e-3, 2e-3, 3e-3), (0.2e-3, -0.5e-3, 1e-3), ("gaussian", "flat"), 7.0
    rule = even_azimuth(6), nodes(4), nodes(5), nodes(3)
    charges = product_charges(probe, scales, kinds, WINDOW, *rule)
    wanted = sum(q / sqrt(x * x + y * y + z * z) for x, y, z, q in charges)
    assert kernel(probe, scales, kinds, *rule, gamma)[3] == pytest.approx(wanted, rel=ROUNDING, abs=0.0)


def test_motion_turns_the_field_only():
    """Closed form: per gamma, E across does not know the motion and E along is 1 / gamma of that at rest."""
    scales, probe, kinds = (1e-3, 2e-3, 3e-3), (0.2e-3, -0.5e-3, 1e-3), ("gaussian", "parabolic")
    rule = even_azimuth(6), nodes(4), nodes(5), nodes(3)
    rest, fast = (kernel(probe, scales, kinds, *rule, gamma) for gamma in (1.0, 1e5))
    assert np.allclose(fast[:3], rest[:3] / [1.0, 1.0, 1e5], rtol=ROUNDING, atol=0.0)
