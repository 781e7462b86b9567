"""The page a physicist reads: what must be on it, and that it fits."""

from dataclasses import replace

import pytest

from beamfield.beam.species import Species
from beamfield.constants import ATOMIC_MASS, ELEMENTARY_CHARGE, SPEED_OF_LIGHT
from beamfield.estimate.finding import Finding
from beamfield.report.ink import Ink
from beamfield.report.text_page import text_page
from tests.report.made_outcomes import BARE, BUNCH, CLOSE, OVERFULL, RING, SUMMED


def lines_of(outcome, ink=None):
    return text_page(outcome, ink).splitlines()


def bare(finding):
    return replace(RING, findings={finding.name: finding}, verdicts=())


def line_with(outcome, word):
    (line,) = [line for line in lines_of(outcome) if line.split()[:1] == [word]]
    return line


@pytest.mark.parametrize("outcome", [RING, OVERFULL, BARE])
def test_it_fits_100_columns_and_leaves_no_blanks_behind(outcome):
    assert all(len(line) <= 100 and line == line.rstrip() for line in lines_of(outcome))


def test_it_fits_with_long_words_too():
    remark = "word " * 60
    finding = Finding(
        "memory_length_longitudinal", -1.23456e-111, 1e-116, -2.3e-111, SUMMED, (remark, "b"), valid=False
    )
    long = replace(bare(finding), title="title " * 40, file="folder/" * 12, warnings=(remark,))
    assert all(len(line) <= 100 for line in lines_of(long))


def test_superposed_and_textbook_stand_side_by_side_in_one_unit():
    assert line_with(RING, "field_gradient_x").split() == ["field_gradient_x", "412.346", "kV/m²", "412.346", "2e-7"]


def test_a_difference_beyond_the_doubt_is_flagged_and_explained():
    assert line_with(RING, "field_gradient_y").endswith("differs [1 2]")
    assert "  [1] field_gradient_y: superposed and textbook values differ by 0.39 %" in text_page(RING)


def test_a_difference_within_the_doubt_or_the_rounding_is_not():
    assert "differs" not in line_with(RING, "tune_shift_y")
    rounding = Finding("gamma", 1.0, 0.0, 1.0 + 0.9e-9, SUMMED)
    assert "differs" not in text_page(bare(rounding))
    beyond = replace(rounding, closed_form=1.0 + 1.1e-9)
    assert "differs" in text_page(bare(beyond))


def test_a_result_outside_its_domain_says_so_and_why():
    assert line_with(RING, "memory_length_longitudinal").endswith("invalid [4]")
    assert "[4] memory_length_longitudinal: longer than the ring has straights" in text_page(RING)


def test_one_remark_on_two_results_is_one_note():
    assert text_page(RING).count("no textbook value for this shape") == 1
    assert "[3] peak_field_x, peak_field_y: no textbook value" in text_page(RING)


def test_results_stand_under_their_questions_in_order():
    page = text_page(RING)
    marks = ["Verdict", "What is the bunch?", "gamma", "How strong is its own field?", "field_gradient_x"]
    marks += ["What does it do to the beam?", "tune_shift_y", "Where does the estimate hold?", "Notes", "Estimates for"]
    places = [page.index("\n" + mark if mark[0].isupper() else f"\n  {mark}") for mark in marks]
    assert places == sorted(places)


@pytest.mark.parametrize(
    ("outcome", "verdict"),
    [(RING, "the limit is met"), (OVERFULL, "2 of 3 limits broken"), (BARE, "no limits set")],
)
def test_the_verdict_comes_first_in_words(outcome, verdict):
    assert f"Verdict: {verdict}" in "\n".join(lines_of(outcome)[:6])


def test_limits_show_their_margin():
    page = text_page(OVERFULL)
    assert "met       |tune_shift_y| < 0.25                     0.243052   2.8 % to spare" in page
    assert "BROKEN    |tune_shift_x| < 0.2                      0.201346   0.67 % over" in page


def test_a_limit_too_close_to_call_says_so():
    (line,) = [line for line in lines_of(replace(RING, verdicts=(CLOSE,))) if CLOSE.limit.text in line]
    assert line.endswith("5e-8 short, within the doubt")


def test_warnings_and_self_checks_are_shown():
    assert "warning   the footprint reaches the half integer" in text_page(RING)
    assert "passed    self-check: kappa_x" in text_page(RING)
    assert "FAILED    self-check: a" in text_page(replace(RING, checks=(("a", False),)))


def test_the_caution_closes_the_page():
    end = " ".join(lines_of(BARE)[-2:])
    assert "no radiation-safety, machine-protection or licensing case" in end
    assert "the rules of the facility and its qualified people decide" in end


def test_colour_changes_no_word():
    plain, coloured = text_page(OVERFULL), text_page(OVERFULL, Ink(colour=True))
    assert "\x1b[" in coloured
    for code in ("0", "1", "2", "36", "1;35"):
        coloured = coloured.replace(f"\x1b[{code}m", "")
    assert coloured == plain


def test_a_title_cannot_steer_the_terminal():
    page = text_page(replace(RING, title="red \x1b[31m alert\nVerdict: all met"))
    assert "\x1b" not in page
    assert "red \\x1b[31m alert\\nVerdict: all met" in page


def test_the_bunch_in_two_lines():
    first, second = lines_of(RING)[2:4]
    assert first == "proton · 160 MeV kinetic · 3.5e12 particles (560.8 nC) · gaussian"
    assert second.startswith("6.1 mm × 4.9 mm × 18.7 m rms · emittance 2.5 µm × 2.5 µm normalised rms")
    coasting = replace(BUNCH, sigma=(6.1e-3, 4.9e-3, float("inf")), line_density=2e9, particles=None)
    first, second = lines_of(replace(RING, bunch=coasting))[2:4]
    assert "2e9 particles per metre" in first
    assert second.startswith("6.1 mm × 4.9 mm rms, no ends")


def test_ions_have_their_energy_per_nucleon():
    ion = Species("Ar-40 8+", 40 * ATOMIC_MASS, 8 * ELEMENTARY_CHARGE, nucleons=40)
    kinetic_per_u = 11.4e6 * ELEMENTARY_CHARGE / (ATOMIC_MASS * SPEED_OF_LIGHT**2)
    beta_gamma = (kinetic_per_u * (kinetic_per_u + 2.0)) ** 0.5
    first = lines_of(replace(RING, bunch=replace(BUNCH, species=ion, beta_gamma=beta_gamma)))[2]
    assert first.startswith("Ar-40 8+ · 11.4 MeV/u kinetic · ")
