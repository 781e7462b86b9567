"""Every word for an energy, against the same relation in fifty digits."""

import mpmath
import pytest

from beamfield.beam.species_table import NAMES, named
from beamfield.constants import ELEMENTARY_CHARGE, SPEED_OF_LIGHT
from beamfield.describe.checked_quantity import read
from beamfield.describe.energy_word import beta_gamma
from beamfield.errors import InputError

ROUNDING = 1e-15
mpmath.mp.dps = 50


def momentum(text, species):
    return beta_gamma(read(text, "energy"), named(species))


def rest(species):
    """m c^2 in eV, in fifty digits."""
    return mpmath.mpf(named(species).mass) * mpmath.mpf(SPEED_OF_LIGHT) ** 2 / mpmath.mpf(ELEMENTARY_CHARGE)


def from_gamma_less_one(excess):
    """sqrt(gamma^2 - 1) from gamma - 1: E^2 = (p c)^2 + (m c^2)^2, special relativity."""
    return mpmath.sqrt(mpmath.mpf(excess) * (mpmath.mpf(excess) + 2))


@pytest.mark.parametrize("species", NAMES)
@pytest.mark.parametrize("number", ["1", "160e3", "160e6", "1.4e9", "7e12"])
def test_kinetic(species, number):
    exact = from_gamma_less_one(mpmath.mpf(float(number)) / rest(species))
    assert abs(momentum(f"{number} eV kinetic", species) / exact - 1) < ROUNDING


@pytest.mark.parametrize(
    ("text", "excess"), [("gamma 12.5", "11.5"), ("gamma 1.000001", None), ("gamma 1e6", "999999")]
)
def test_gamma(text, excess):
    exact = from_gamma_less_one(excess or mpmath.mpf(1.000001) - 1)
    assert abs(momentum(text, "electron") / exact - 1) < ROUNDING


def test_total():
    exact = from_gamma_less_one(mpmath.mpf(1.1e9) / rest("proton") - 1)
    assert abs(momentum("1.1 GeV total", "proton") / exact - 1) < 10 * ROUNDING  # E - m c^2 loses a digit here


def test_momentum():
    assert abs(momentum("0.57 GeV/c", "proton") / (mpmath.mpf(0.57e9) / rest("proton")) - 1) < ROUNDING


@pytest.mark.parametrize("species", ["proton", "electron", "alpha"])
def test_rigidity(species):
    """p = q B rho, whatever the sign of q."""
    mass, charge = mpmath.mpf(named(species).mass), abs(mpmath.mpf(named(species).charge))
    exact = charge * mpmath.mpf(1.2) / (mass * mpmath.mpf(SPEED_OF_LIGHT))
    assert abs(momentum("rigidity 1.2 T m", species) / exact - 1) < ROUNDING


def test_per_nucleon_is_that_many_times_the_energy():
    for word in ("kinetic", "total"):
        assert momentum(f"2 GeV/u {word}", "alpha") == momentum(f"8 GeV {word}", "alpha")


def test_rule_of_thumb():
    """B rho [T m] = 3.3356 p [GeV/c] for one elementary charge: common practice, no source (1e9/c)."""
    assert momentum("rigidity 3.33564095 T m", "proton") == pytest.approx(momentum("1 GeV/c", "proton"), rel=1e-8)


@pytest.mark.parametrize(
    ("text", "species", "said"),
    [
        ("gamma 1", "proton", "gamma is above 1 for whatever moves"),
        ("gamma 0.5", "proton", "gamma is above 1 for whatever moves"),
        ("900 MeV total", "proton", "not above the rest energy of proton, 938.272 MeV"),
        ("0 MeV kinetic", "proton", "a beam moves"),
        ("-1 MeV kinetic", "proton", "a beam moves"),
        ("-1 MeV/c", "proton", "a beam moves"),
        ("rigidity -1 T m", "proton", "a beam moves"),
        ("5 MeV/u kinetic", "muon-", "muon- has no nucleons to share an energy; write it in MeV"),
        ("5 meV kinetic", "proton", "did you mean 'MeV'?"),
    ],
)
def test_refused(text, species, said):
    with pytest.raises(InputError) as caught:
        momentum(text, species)
    assert said in str(caught.value)
