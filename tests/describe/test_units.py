"""Units: prefixes, products, quotients, and the two bases that keep apart what must not be mixed up."""

import pytest

from beamfield.describe.nearest import excerpt, hint, nearest
from beamfield.describe.units import PLAIN, unit

ONE_ROUNDING = 2.3e-16


@pytest.mark.parametrize(
    ("text", "si"),
    [
        ("mm", 1e-3),
        ("um", 1e-6),
        ("µm", 1e-6),
        ("μm", 1e-6),
        ("cm", 1e-2),
        ("ns", 1e-9),
        ("fs", 1e-15),
        ("kA", 1e3),
        ("nC", 1e-9),
        ("MHz", 1e6),
        ("kV", 1e3),
        ("G", 1e-4),
        ("kG", 0.1),
        ("T/m", 1.0),
        ("T/cm", 100.0),
        ("T m", 1.0),
        ("T·m", 1.0),
        ("Tm", 1.0),
        ("1/m2", 1.0),
        ("1/mm²", 1e6),
        ("MV/m^2", 1e6),
        ("mm mrad", 1e-6),
        ("%", 1e-2),
        ("kohm", 1e3),
        ("Ω", 1.0),
        ("1", 1.0),
        ("", 1.0),
    ],
)
def test_factor(text, si):
    """Definition of the SI and its prefixes, BIPM brochure, 9th edition, 2019."""
    assert unit(text).si(1.0) == pytest.approx(si, rel=ONE_ROUNDING)


def test_electronvolts():
    """1 eV = 1.602176634e-19 J exactly; eV/c and eV/c2 by c = 299792458 m/s: SI brochure, 9th edition, 2019."""
    assert unit("eV").si(1.0) == 1.602176634e-19
    assert unit("GeV/c").si(1.0) == pytest.approx(1.602176634e-10 / 299792458.0, rel=2 * ONE_ROUNDING)
    assert unit("MeV/c2").si(1.0) == pytest.approx(1.602176634e-13 / 299792458.0**2, rel=3 * ONE_ROUNDING)


@pytest.mark.parametrize(("number", "text", "si"), [(4.2, "mm", 0.0042), (6.1, "um", 6.1e-6), (0.1, "kA", 100.0)])
def test_a_prefix_costs_no_rounding(number, text, si):
    assert unit(text).si(number) == si
    assert unit(text).count(si) == number


@pytest.mark.parametrize(
    ("one", "other"),
    [
        ("mrad", "m"),
        ("mrad", "1"),
        ("MeV/u", "MeV"),
        ("eV", "eV/c"),
        ("mm mrad", "mm"),
        ("particles", "1"),
        ("Hz", "s"),
    ],
)
def test_what_is_kept_apart(one, other):
    assert unit(one).dimension != unit(other).dimension


@pytest.mark.parametrize(
    "text", ["mev", "MM", "parsec", "m//s", "m/s/s", "/", "m2.5", "m-1", "5", "kdeg", "k%", "mkg", "ü"]
)
def test_unknown(text):
    assert unit(text) is None


def test_same_dimension_by_two_roads():
    """V = J/C and T m2 = V s."""
    assert unit("V").dimension == unit("J/C").dimension
    assert unit("T m2").dimension == unit("V s").dimension
    assert unit("").times(unit("m"), -1).dimension == unit("1/m").dimension
    assert unit("1") == PLAIN


def test_the_word_that_was_meant():
    assert nearest("mev", ["eV", "MeV"]) == "MeV"
    assert hint("sise", ["size", "shape"]) == "; did you mean 'size'?"
    assert hint("zebra", ["size", "shape"]) == ""
    assert len(excerpt("x" * 1000)) < 70
