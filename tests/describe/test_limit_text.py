"""Limits: what they say, in the unit of their result, and every way of writing them wrong."""

import pytest

from beamfield.describe.limit_text import limit
from beamfield.errors import InputError
from tests.describe.ring_case import TEXT, case, fault, faults

ROUNDING = 1e-15


@pytest.mark.parametrize(
    ("text", "result", "absolute", "comparison", "bound"),
    [
        ("|tune_shift_y| < 0.25", "tune_shift_y", True, "<", 0.25),
        ("| tune_shift_y |<=0.25", "tune_shift_y", True, "<=", 0.25),
        ("tune_shift_y > -0.25", "tune_shift_y", False, ">", -0.25),
        ("tune_shift_y ≥ −25 %", "tune_shift_y", False, ">=", -0.25),
        ("defocusing_x < 0.02 1/m2", "defocusing_x", False, "<", 0.02),
        ("defocusing_x < 0.02 1/mm^2", "defocusing_x", False, "<", 2e4),
        ("peak_current < 40 kA", "peak_current", False, "<", 4e4),
        ("field_gradient_x < 1 MV/m2", "field_gradient_x", False, "<", 1e6),
        ("momentum > 3 GeV/c", "momentum", False, ">", 3e9),
        ("rigidity < 5 T m", "rigidity", False, "<", 5.0),
        ("|bunch_charge| < 2 nC", "bunch_charge", True, "<", 2e-9),
        ("peak_kick_x < 1 mrad/m", "peak_kick_x", False, "<", 1e-3),
        ("peak_energy_change_z < 2 MeV/m", "peak_energy_change_z", False, "<", 2e6),
        ("plasma_wavelength > 1 km", "plasma_wavelength", False, ">", 1e3),
        ("gamma < 1e3", "gamma", False, "<", 1e3),
    ],
)
def test_read(text, result, absolute, comparison, bound):
    found = limit(text, 3, 5)
    assert (found.result, found.absolute, found.comparison) == (result, absolute, comparison)
    assert found.bound == pytest.approx(bound, rel=ROUNDING)
    assert (found.text, found.line, found.column) == (text, 3, 5)


@pytest.mark.parametrize(
    ("text", "said"),
    [
        ("tune_shft_y < 0.25", "there is no result 'tune_shft_y'; did you mean 'tune_shift_y'?"),
        ("zebra < 1", "there is no result 'zebra'; 'beamfield explain' lists them"),
        ("Gamma < 1", "did you mean 'gamma'?"),
        ("0 < tune_shift_y < 0.25", "compares more than once; write one limit for each comparison"),
        ("tune_shift_y", "compares nothing"),
        ("", "compares nothing"),
        ("tune_shift_y == 0.25", "'==' is no limit; choose from <, <=, >, >="),
        ("tune_shift_y = 0.25", "'=' is no limit"),
        ("tune_shift_y != 0.25", "'!=' is no limit"),
        ("0.25 > tune_shift_y", "'0.25' is no result"),
        ("abs(tune_shift_y) < 0.25", "'abs(tune_shift_y)' is no result"),
        ("__import__('os').system('true') < 1", "is no result"),
        ("tune_shift_y + 1 < 2", "is no result"),
        ("|tune_shift_y < 0.25", "is no result"),
        ("|| < 0.25", "is no result"),
        ("| < 0.25", "is no result"),
        ("defocusing_x < 0.02", "has no unit; write 'defocusing_x < 0.02 1/m2'"),
        ("defocusing_x < 0.02 kV", "'kV' does not measure it; defocusing_x is in 1/m2"),
        ("defocusing_x < 0.02 1/m2 rms", "is not understood in a limit"),
        ("defocusing_x < 0.02 parsec", "'parsec' is not understood in a limit; defocusing_x is in 1/m2"),
        ("tune_shift_y < 0.25 m", "tune_shift_y is a plain number"),
        ("tune_shift_y < gamma 3", "'gamma' is not understood in a limit"),
        ("tune_shift_y < 0.25 ± 0.1", "a limit has no tolerance"),
        ("tune_shift_y < 0,25", "point here, not with a comma"),
        ("tune_shift_y < nan", "finite"),
        ("tune_shift_y < 2 * 3", "'* 3' is not understood in a limit"),
        ("tune_shift_y < tune_shift_x", "does not begin with a number"),
        ("tune_shift_y <", "does not begin with a number"),
    ],
)
def test_refused(text, said):
    with pytest.raises(InputError) as caught:
        limit(text)
    assert said in str(caught.value)


def test_faults_stand_at_their_limit():
    lines = faults(('"|tune_shift_y| < 0.25"', "tune_shift < 1"), ("0.02 1/m2", "0.02"))
    assert [line.split(": ")[0:2] for line in lines] == [
        ["ring.yaml:28:5", "limits[0]"],
        ["ring.yaml:29:5", "limits[1]"],
    ]


RING = (TEXT[TEXT.index("ring:\n") : TEXT.index("beamline:\n")], "")
EMITTANCE = ("  emittance: {x: 2.5 um normalised rms, y: 2.5 um normalised rms}\n", "")
COASTING = ("shape: gaussian", "shape: {transverse: kv, longitudinal: coasting}"), (", z: 120 ns rms", "")


@pytest.mark.parametrize(
    ("changes", "result", "said"),
    [
        ([RING], "tune_shift_y < 1", "tune_shift_y needs a ring; add the section 'ring' with circumference and tune"),
        ([EMITTANCE], "space_charge_ratio_x < 1", "space_charge_ratio_x needs emittances; add bunch.emittance"),
        (COASTING, "peak_field_z < 1 V/m", "peak_field_z needs a bunch; this beam is coasting"),
    ],
)
def test_a_limit_on_what_the_case_does_not_have(changes, result, said):
    line = fault(('"|tune_shift_y| < 0.25"', result), *changes)
    assert line == f"ring.yaml:{line.split(':')[1]}:5: limits[0]: {said}"


def test_a_list_is_a_list():
    limits = TEXT[TEXT.index('  - "|tune') : TEXT.index("numerics")]
    assert case((f"limits:\n{limits}", "limits: []\n")).limits == ()
    assert fault((f"limits:\n{limits}", "limits: tune_shift_y < 1\n")).endswith("cannot stand here; it is a list")
    assert fault(('limits:\n  - "|tune_shift_y| < 0.25"\n', "limits:\n  - {a: b}\n")).endswith(
        'write "|tune_shift_y| < 0.25"'
    )
