"""Each kind of quantity, and the way out for whoever wrote another: the lines users see, word for word."""

import pytest

from beamfield.describe.checked_quantity import read
from beamfield.describe.kinds import KINDS
from beamfield.errors import InputError

SIZE = "(or semi, full, fwhm)"


@pytest.mark.parametrize(
    ("kind", "text"),
    [
        ("width", "4.2 mm rms"),
        ("width", "4.2 µm semi"),
        ("bunch length", "12 ns fwhm"),
        ("bunch length", "0.3 m full"),
        ("energy", "160 MeV kinetic"),
        ("energy", "1.1 GeV total"),
        ("energy", "0.57 GeV/c"),
        ("energy", "gamma 12.5"),
        ("energy", "rigidity 1.2 T m"),
        ("energy", "11.4 MeV/u kinetic"),
        ("energy", "1 GeV/u total"),
        ("intensity", "3.5e12 particles"),
        ("intensity", "-1.2 nC"),
        ("intensity", "40 A peak"),
        ("intensity", "6 mA mean"),
        ("emittance", "2.5 um normalised rms"),
        ("emittance", "2.5 um rms normalised"),
        ("emittance", "14 um geometric 95%"),
        ("emittance", "14 mm mrad geometric full"),
        ("momentum spread", "1.5e-3 rms"),
        ("momentum spread", "0.15 % rms"),
        ("length", "60 mm"),
        ("frequency", "200 MHz"),
        ("voltage", "120 kV"),
        ("angle", "-90 deg"),
        ("field", "0.15 T"),
        ("gradient", "12 T/m"),
        ("mass", "938.272 MeV/c2"),
        ("mass", "1.0073 u"),
        ("mass", "1.67e-27 kg"),
        ("number", "0.5"),
        ("number", "50 %"),
    ],
)
def test_complete(kind, text):
    assert read(text, kind).text == text.replace("µ", "u")


@pytest.mark.parametrize(
    ("kind", "text", "message"),
    [
        ("width", "4.2 mm", f"'4.2 mm' does not say what it measures; write '4.2 mm rms' {SIZE}"),
        ("width", "4.2", f"'4.2' has no unit; write '4.2 mm rms' {SIZE}"),
        ("width", "4.2 kV rms", f"'4.2 kV rms': 'kV' does not measure a bunch size; write '4.2 mm rms' {SIZE}"),
        ("width", "4.2 mm rsm", "'4.2 mm rsm': 'rsm' is neither a unit nor a word here; did you mean 'rms'?"),
        ("width", "4.2 MM rms", "'4.2 MM rms': 'MM' is neither a unit nor a word here; did you mean 'mm'?"),
        ("width", "4.2 mm rms full", "'4.2 mm rms full' says both rms and full; keep one"),
        (
            "width",
            "4 mm kinetic",
            "'4 mm kinetic': 'kinetic' does not describe a bunch size; choose from rms, semi, full, fwhm",
        ),
        ("width", "gamma 3", f"'gamma 3' is not a bunch size; write '3 mm rms' {SIZE}"),
        ("length", "60 mm rms", "'60 mm rms': 'rms' does not go with a length in mm; write '60 mm'"),
        ("energy", "160 MeV", "'160 MeV' does not say what it measures; write '160 MeV kinetic' (or total)"),
        (
            "energy",
            "160 mev kinetic",
            "'160 mev kinetic': 'mev' is neither a unit nor a word here; did you mean 'MeV'?",
        ),
        ("energy", "1.2 T m", "'1.2 T m' does not say what it measures; write 'rigidity 1.2 T m'"),
        (
            "energy",
            "0.57 GeV/c kinetic",
            "'0.57 GeV/c kinetic': 'kinetic' does not go with an energy in GeV/c; write '0.57 GeV/c'",
        ),
        (
            "intensity",
            "1.2",
            "'1.2' has no unit; write a charge such as '1.2 nC', a count such as '3e11 particles' or a current such as "
            "'1.2 A peak' (or mean)",
        ),
        ("intensity", "40 A", "'40 A' does not say what it measures; write '40 A peak' (or mean)"),
        ("intensity", "1.2 nC peak", "'1.2 nC peak': 'peak' does not go with an intensity in nC; write '1.2 nC'"),
        (
            "emittance",
            "2.5 um",
            "'2.5 um' does not say what it measures; write '2.5 um normalised rms' (or geometric; 95%, full)",
        ),
        (
            "emittance",
            "2.5 um rms",
            "'2.5 um rms' does not say what it measures; write '2.5 um normalised rms' (or geometric)",
        ),
        (
            "emittance",
            "2.5 ± 0.1 um geometric",
            "'2.5 ± 0.1 um geometric' does not say what it measures; write '2.5 ± 0.1 um geometric rms' (or 95%, full)",
        ),
        ("momentum spread", "1e-3", "'1e-3' does not say what it measures; write '1e-3 rms'"),
        ("angle", "90", "'90' has no unit; write '90 deg' or '90 rad'"),
        ("number", "1 mm", "'1 mm': 'mm' does not measure a plain number; write '1'"),
    ],
)
def test_the_way_out(kind, text, message):
    with pytest.raises(InputError) as caught:
        read(text, kind)
    assert str(caught.value) == message


@pytest.mark.parametrize("text", ["2.5 pi mm mrad normalised rms", "2.5 π mm mrad geometric 95%"])
def test_pi_is_refused_with_its_reason(text):
    with pytest.raises(InputError, match="pi may be a factor or a reminder"):
        read(text, "emittance")


@pytest.mark.parametrize("name", KINDS)
def test_every_unit_offered_is_understood(name):
    """Each way out that a message offers is itself read without complaint."""
    for form in KINDS[name].forms:
        for unit in form.units:
            words = [group[0] for group in form.groups]
            read(" ".join(part for part in (form.head, "1.5", unit, *words) if part), name)
