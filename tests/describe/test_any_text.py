"""Whatever a file holds, it is a case or an InputError, every fault of which has a line; no other exception passes."""

import json

from hypothesis import given, settings
from hypothesis import strategies as st

from beamfield.describe.case import Case, parse
from beamfield.describe.tree import node_at
from beamfield.describe.vocabulary import KEYS
from tests.describe.ring_case import TEXT, case, complaints

TOKENS = [
    *"{}[]:,-|><&*!%@#'\"\n ±0",
    *[
        "\n  ",
        "nan",
        "inf",
        "1e999",
        "1e-999",
        "-1",
        "~",
        "null",
        "[]",
        "{}",
        "x: ",
        "rms",
        "full",
        "mm",
        "MeV/u",
        "T m",
    ],
    *["kinetic", "gamma 1", "1e15 particles", "coasting", "matched", "../x", "\x00", "é", "\u2028", "1_000", "4,2"],
    *["uniform-ellipsoid", "{particles: .}", "{isotope: Ar-40, charge_state: 8}", "9" * 400, "gamma 1e308", "1e-320 m"],
]
UNITS = ["", " mm rms", " ns fwhm", " MeV kinetic", " um geometric rms", " A peak", " particles", " m", " deg", " rms"]
KEY_NAMES = sorted(key for key in KEYS if "[]" not in key)
SCALARS = [key for key in case().places if not hasattr(node_at(case().tree, key), "pairs") and "[" not in key]
NAMES = st.sampled_from([*KEY_NAMES, *(key.rpartition(".")[2] for key in KEY_NAMES), "a"])


def judge(function, *arguments):
    """A Case, or faults that each have a line."""
    assert all(fault.line > 0 and fault.column > 0 for fault in complaints(function, *arguments))


@settings(max_examples=400, deadline=None)
@given(st.data())
def test_mutations(data):
    """One to four cuts of a case that loads, each with another text in its place."""
    text = TEXT
    for _ in range(data.draw(st.integers(1, 4))):
        start = data.draw(st.integers(0, len(text)))
        end = start + data.draw(st.integers(0, 12))
        text = text[:start] + data.draw(st.sampled_from(TOKENS) | st.text(max_size=4)) + text[end:]
    judge(parse, text)


@settings(max_examples=400, deadline=None)
@given(st.dictionaries(st.sampled_from(KEY_NAMES), st.sampled_from(TOKENS) | st.text(max_size=12), max_size=4))
def test_other_values(values):
    """Up to four keys of the vocabulary with any text; a key under a scalar leads nowhere, which has no line."""
    found = complaints(case().varied, values)
    assert all(fault.line > 0 or "leads to no place" in fault.message for fault in found)


@settings(max_examples=300, deadline=None)
@given(st.sampled_from(SCALARS), st.floats(allow_nan=False, allow_infinity=False), st.sampled_from(UNITS))
def test_any_number(key, number, unit):
    """Any float with any unit at any key."""
    judge(case().varied, {key: f"{number!r}{unit}"})


@settings(max_examples=200, deadline=None)
@given(st.text(max_size=300))
def test_any_text(text):
    judge(parse, text)


def _inside(inner):
    return st.lists(inner, max_size=3) | st.dictionaries(NAMES, inner, max_size=4)


@settings(max_examples=300, deadline=None)
@given(st.recursive(st.text("ab01.: ", max_size=6), _inside, max_leaves=12))
def test_any_structure(data):
    """Trees of any shape, as JSON, which is YAML."""
    judge(parse, json.dumps(data))


def test_the_case_itself_is_one():
    assert isinstance(parse(TEXT), Case)
