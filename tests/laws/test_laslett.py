"""Image coefficients: as printed, against walls fitted with charges or a Fourier series, and in their limits."""

from math import inf, pi

import numpy as np
import pytest

from beamfield.laws.laslett import POLES_EPS, POLES_XI, image_coefficients
from tests.reference.laslett_coefficients import POLES, PRINTED
from tests.walls import ellipse_image, rectangle_image, slow_coefficients

printed, fitted, rounding = 6e-4, 1e-6, 1e-13
SLOW = {"elliptic": ellipse_image, "rectangular": rectangle_image}
ELLIPSES = [("elliptic", ratio) for ratio in (1.0001, 1.1, 4.0 / 3.0, 2.0, 2.99, 3.01, 5.0, 10.0)]
RECTANGLES = [("rectangular", ratio) for ratio in (1.0, 1.5, 3.0, 5.0)]


@pytest.mark.parametrize("shape, ratio", PRINTED)
def test_printed(shape, ratio):
    """From memory of Laslett 1963 and Bovet 1970."""
    eps, _, xi = image_coefficients(shape, ratio, 1.0)
    assert (eps, xi) == pytest.approx(PRINTED[shape, ratio], abs=printed)
    assert pytest.approx(POLES, abs=printed) == (POLES_EPS, POLES_XI)


@pytest.mark.parametrize("shape, ratio", ELLIPSES + RECTANGLES)
def test_against_a_fitted_wall(shape, ratio):
    """Slow twin: a Fourier series on the ellipse, charges round the rectangle; also near the circle."""
    slow = slow_coefficients(SLOW[shape], ratio, 1.0)
    assert image_coefficients(shape, ratio, 1.0) == pytest.approx(slow, abs=fitted)


def test_slightly_elliptic():
    """Closed form of first order: eps_1 = q / 2 with q = (w - h) / (w + h); all digits where the formula cancels."""
    for ratio in (1.0 + 1e-9, 1.0 + 1e-6):
        small = (ratio - 1.0) / (ratio + 1.0)
        assert image_coefficients("elliptic", ratio, 1.0)[0] / small == pytest.approx(1.0, abs=1e-5)


@pytest.mark.parametrize("ratio", [1.0, 1.2, 2.0, 2.9999, 3.0001, 20.0, 1e3])
@pytest.mark.parametrize("shape", ["elliptic", "rectangular"])
def test_identity_and_order(shape, ratio):
    """Closed form: xi_1y - xi_1x = 3 eps_1, which vanishes for circle and square; plates are never surpassed."""
    eps, xi_x, xi_y = image_coefficients(shape, ratio, 1.0)
    assert xi_y - xi_x == pytest.approx(3.0 * eps, abs=rounding)
    assert -rounding <= eps <= pi**2 / 48.0 + rounding
    assert (eps == 0.0) == (ratio == 1.0)


@pytest.mark.parametrize("shape", ["elliptic", "rectangular"])
def test_elliptic_integrals(shape):
    """The same by the elliptic integrals of scipy, K'/K from the nome by a root finder."""
    from scipy.optimize import brentq
    from scipy.special import ellipk

    w, h = 1.7, 1.0
    wanted = np.log((w + h) / (w - h)) / pi if shape == "elliptic" else h / w
    m = brentq(lambda m: ellipk(1.0 - m) / ellipk(m) - wanted, 1e-12, 1.0 - 1e-12, xtol=1e-15)
    whole = ellipk(m)
    if shape == "elliptic":
        eps = h**2 / (12.0 * (w**2 - h**2)) * ((2.0 - m) * (2.0 * whole / pi) ** 2 - 2.0)
    else:
        eps = (h * whole / w) ** 2 * (2.0 * m - 1.0) / 12.0
    assert image_coefficients(shape, w, h)[0] == pytest.approx(eps, rel=1e-9)


def test_limits_and_symmetry():
    """Fact: wide chambers are plates; one turned on its side swaps the planes."""
    plates = image_coefficients("plates", inf, 1.0)
    for shape in ("elliptic", "rectangular"):
        assert image_coefficients(shape, 1e4, 1.0) == pytest.approx(plates, abs=1e-7)
        eps, xi_x, xi_y = image_coefficients(shape, 1.5, 1.0)
        turned = np.array(image_coefficients(shape, 1.0, 1.5)) / 1.5**2
        assert turned == pytest.approx((-eps, xi_y, xi_x), rel=rounding)
