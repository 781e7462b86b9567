"""Texts of cases as they come out of unlucky hands: lines lost, doubled and swapped, other numbers, words and signs."""

import re
from pathlib import Path

from hypothesis import strategies as st

from beamfield.describe.starter import KINDS_OF_CASE, starter

FOLDER = Path(__file__).parents[1] / "configs"
QUICK = "\nnumerics: {charges_per_probe: 512, macro_particles: 1000}\n"
BASES = [
    *(path.read_text(encoding="utf-8") + QUICK for path in sorted(FOLDER.glob("*.yaml"))),
    *(re.sub(r"(?m)^numerics:\n( .*\n?)*", "", starter(kind)) + QUICK for kind in KINDS_OF_CASE),
]
NUMBER = re.compile(r"(?<![A-Za-z_.\d])[-+]?\d[\d.]*(?:e[-+]?\d+)?")
WORD = re.compile(r"[A-Za-z%][\w%./-]*")
NUMBERS = ["0", "-1", "1", "1e-300", "1e300", "1e308", "1e400", "5e-324", "1e-12", "1e9", "1e15", "1e6", "nan", "inf"]
NUMBERS += ["1,5", "1_000", "0x10", "1.2.3", "", "½", "१", "1e", "--1", "1e-6", "1e4", "0.999999999999", "1 2"]
WORDS = [
    "mm",
    "m",
    "um",
    "km",
    "ns",
    "MeV",
    "MeV/u",
    "GeV/c",
    "nC",
    "particles",
    "A",
    "%",
    "1/m2",
    "rms",
    "semi",
    "full",
]
WORDS += ["fwhm", "kinetic", "total", "normalised", "geometric", "95%", "peak", "mean", "gaussian", "kv", "parabolic"]
WORDS += ["uniform", "coasting", "uniform-ellipsoid", "parabolic-ellipsoid", "uniform-cylinder", "electron", "proton"]
WORDS += ["muon-", "H-", "gamma", "rigidity", "T m", "round", "plates", "elliptic", "mev", "pi mm mrad", "null", "~"]
WORDS += ["bunch", "ring", "beamline", "limits", "tune_shift_y", "{", "}", "[", "]", "&a", "*a", "!!int", "|", ">", "#"]


def _at(draw, text, pattern, replacement):
    """The text with one match of a pattern, wherever, replaced."""
    matches = list(pattern.finditer(text))
    if not matches:
        return text
    match = draw(st.sampled_from(matches))
    return text[: match.start()] + replacement + text[match.end() :]


def other_number(draw, text):
    scaled = st.floats(-25.0, 25.0).map(lambda power: f"{10.0**power:.6g}")
    return _at(draw, text, NUMBER, draw(st.sampled_from(NUMBERS) | scaled))


def other_word(draw, text):
    return _at(draw, text, WORD, draw(st.sampled_from(WORDS)))


def other_sign(draw, text):
    place = draw(st.integers(0, len(text)))
    return text[:place] + draw(st.text(max_size=3)) + text[place + draw(st.integers(0, 2)) :]


def _of_lines(change):
    def changed(draw, text):
        lines = text.splitlines(keepends=True) or [""]
        places = st.integers(0, len(lines) - 1)
        change(lines, draw(places), draw(places))
        return "".join(lines)

    return changed


@_of_lines
def line_lost(lines, one, _):
    del lines[one]


@_of_lines
def line_doubled(lines, one, other):
    lines.insert(other, lines[one])


@_of_lines
def lines_swapped(lines, one, other):
    lines[one], lines[other] = lines[other], lines[one]


CHANGES = (other_number, other_number, other_number, other_word, other_word, other_sign)
CHANGES += (line_lost, line_doubled, lines_swapped)


@st.composite
def mutated_cases(draw):
    text = draw(st.sampled_from(BASES))
    for change in draw(st.lists(st.sampled_from(CHANGES), min_size=1, max_size=4)):
        text = change(draw, text)
    return text
