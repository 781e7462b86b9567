"""The grammar NUMBER [± NUMBER] UNIT WORD…, and every number that is refused."""

import pytest
from hypothesis import given
from hypothesis import strategies as st

from beamfield.describe.number_text import whole_number
from beamfield.describe.quantity import parse
from beamfield.errors import InputError
from tests.describe.ring_case import complaints


@pytest.mark.parametrize(
    ("text", "number", "tolerance", "unit", "words", "head"),
    [
        ("4.2 mm rms", 4.2, None, "mm", ("rms",), ""),
        ("  4.2   mm   rms ", 4.2, None, "mm", ("rms",), ""),
        ("4.2mm rms", 4.2, None, "mm", ("rms",), ""),
        ("1.2 ± 0.1 nC", 1.2, 0.1, "nC", (), ""),
        ("1.2±0.1 nC", 1.2, 0.1, "nC", (), ""),
        ("1.2 +- 0.1 nC", 1.2, 0.1, "nC", (), ""),
        ("1.2 +/- 0.1 nC", 1.2, 0.1, "nC", (), ""),
        ("−90 deg", -90.0, None, "deg", (), ""),
        ("+.5e-3 rms", 0.5e-3, None, "", ("rms",), ""),
        ("gamma 12.5", 12.5, None, "", (), "gamma"),
        ("gamma 12.5 ± 0.5", 12.5, 0.5, "", (), "gamma"),
        ("rigidity 1.2 T m", 1.2, None, "T m", (), "rigidity"),
        ("14 um geometric 95%", 14.0, None, "um", ("geometric", "95%"), ""),
        ("14 um geometric 95 %", 14.0, None, "um", ("geometric", "95%"), ""),
        ("0.15% rms", 0.15, None, "%", ("rms",), ""),
        ("2.5 um normalized RMS", 2.5, None, "um", ("normalised", "rms"), ""),
        ("1e9", 1e9, None, "", (), ""),
        ("2eV", 2.0, None, "eV", (), ""),
    ],
)
def test_parts(text, number, tolerance, unit, words, head):
    found = parse(text)
    assert (found.number, found.tolerance, found.unit_text) == (number, tolerance, unit)
    assert (found.words, found.head) == (words, head)


@pytest.mark.parametrize(
    ("text", "said"),
    [
        ("4,2 mm rms", "point"),
        ("1,000 mm", "write '1000'"),
        ("1,234,567 particles", "write '1234567'"),
        ("1 000 mm", "two numbers in a row"),
        ("1_000 mm", "without separators"),
        ("1'000 mm", "without separators"),
        ("nan mm", "finite"),
        (".inf", "finite"),
        ("-inf m", "finite"),
        ("Infinity m", "finite"),
        ("0x10 mm", "decimal"),
        ("0b1 mm", "decimal"),
        ("3.5x10^12 particles", "3.5e12"),
        ("3.5 · 10^12 particles", "3.5e12"),
        ("2**3 m", "3.5e12"),
        ("1.2.3 m", "one decimal point"),
        ("1e999 m", "check the exponent"),
        ("rms 4 mm", "begin with a number"),
        ("", "begin with a number"),
        ("--5 m", "begin with a number"),
        ("1.2 ± -0.1 nC", "not negative"),
        ("1.2 nC ± 0.1 nC", "follows the number"),
        ("1.2 ± nC", "begin with a number"),
    ],
)
def test_refused(text, said):
    with pytest.raises(InputError, match=r"^'") as caught:
        parse(text)
    assert said in str(caught.value)
    assert "\n" not in str(caught.value)


@given(st.floats(allow_nan=False, allow_infinity=False))
def test_any_float_comes_back_to_the_last_digit(number):
    assert parse(f"{number!r} mm rms").number == number
    assert parse(parse("4.2 ± 0.1 mm rms").written(number)).number == number


def test_written_keeps_head_unit_and_words():
    assert parse("gamma 12.5 ± 1").written(3.0) == "gamma 3.0"
    assert parse("14 um geometric 95 %").written(0.5) == "0.5 um geometric 95%"


def test_si():
    """1.2 ± 0.1 nC."""
    assert parse("1.2 ± 0.1 nC").si == 1.2e-9
    assert parse("1.2 ± 0.1 nC").si_tolerance == 1e-10
    assert parse("1.2 nC").si_tolerance is None


@given(st.text(max_size=40))
def test_any_text_is_a_quantity_or_an_input_error(text):
    assert len(complaints(parse, text)) <= 1


@pytest.mark.parametrize(("text", "number"), [("1024", 1024), ("1e5", 100000), ("-1", -1), ("2.0", 2)])
def test_whole_numbers(text, number):
    assert whole_number(text) == number


@pytest.mark.parametrize("text", ["1.5", "1_000", "one", "1 2", "1024 bytes", "", "nan", "9" * 5000])
def test_not_whole(text):
    with pytest.raises(InputError):
        whole_number(text)
