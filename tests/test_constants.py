"""The constants against scipy's copy of CODATA 2022."""

from math import pi

import pytest
import scipy
from scipy.constants import value

from beamfield import constants

NAMES = {
    "SPEED_OF_LIGHT": "speed of light in vacuum",
    "ELEMENTARY_CHARGE": "elementary charge",
    "VACUUM_PERMITTIVITY": "vacuum electric permittivity",
    "VACUUM_PERMEABILITY": "vacuum mag. permeability",
    "VACUUM_IMPEDANCE": "characteristic impedance of vacuum",
    "ATOMIC_MASS": "atomic mass constant",
    "ELECTRON_MASS": "electron mass",
    "PROTON_MASS": "proton mass",
    "MUON_MASS": "muon mass",
    "DEUTERON_MASS": "deuteron mass",
    "TRITON_MASS": "triton mass",
    "HELION_MASS": "helion mass",
    "ALPHA_MASS": "alpha particle mass",
}
CODATA_2022 = tuple(map(int, scipy.__version__.split(".")[:2])) >= (1, 15)


@pytest.mark.skipif(not CODATA_2022, reason="this scipy holds an older data set")
@pytest.mark.parametrize("name", NAMES)
def test_value(name):
    """Published: CODATA 2022, digit by digit."""
    assert getattr(constants, name) == value(NAMES[name])


def test_every_constant_is_tested():
    """A constant added without its name in scipy fails here; COULOMB is computed."""
    numbers = {name for name, number in vars(constants).items() if isinstance(number, float) and name.isupper()}
    assert numbers == NAMES.keys() | {"COULOMB"}


def test_vacuum_hangs_together():
    """Closed form: eps0 mu0 c^2 = 1, Z0 = mu0 c, and the field of a charge is 1 / (4 pi eps0)."""
    printed_digits = 1e-11
    c, eps0, mu0 = constants.SPEED_OF_LIGHT, constants.VACUUM_PERMITTIVITY, constants.VACUUM_PERMEABILITY
    assert eps0 * mu0 * c**2 == pytest.approx(1.0, rel=printed_digits, abs=0.0)
    assert mu0 * c == pytest.approx(constants.VACUUM_IMPEDANCE, rel=printed_digits, abs=0.0)
    assert pytest.approx(mu0 * c**2 / (4.0 * pi), rel=printed_digits, abs=0.0) == constants.COULOMB
