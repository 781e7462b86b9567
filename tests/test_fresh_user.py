"""A newcomer's first hour, as one types it: a case is printed, reported, pushed over its limit, broken and repaired."""

import json
import os
import re
import subprocess
import sys
from pathlib import Path

import pytest

pytestmark = pytest.mark.large
ROOT = Path(__file__).parents[1]


@pytest.fixture
def typed(tmp_path):
    """typed(words) -> exit code, standard output, standard error of `beamfield WORDS` in an empty folder."""
    environment = os.environ | {"PYTHONPATH": str(ROOT), "PYTHONWARNINGS": "error", "COLUMNS": "80"}

    def go(words, into=None):
        command = [sys.executable, "-m", "beamfield", *words.split()]
        done = subprocess.run(command, cwd=tmp_path, env=environment, capture_output=True, text=True, encoding="utf-8")
        if into:
            (tmp_path / into).write_text(done.stdout, encoding="utf-8")
        return done.returncode, done.stdout, done.stderr

    return go


def edited(path, old, new):
    text = path.read_text(encoding="utf-8")
    assert text.count(old) == 1, old
    path.write_text(text.replace(old, new), encoding="utf-8")


def test_the_first_hour(typed, tmp_path):
    case = tmp_path / "case.yaml"
    assert typed("new ring", into="case.yaml") == (0, case.read_text(encoding="utf-8"), "")

    code, page, err = typed("report case.yaml")
    assert (code, err) == (0, "")
    assert "Verdict: all" in page
    shift = float(re.search(r"^ +tune_shift_y +(-0\.\d+)", page, re.MULTILINE)[1])
    assert -0.25 < shift < -0.1

    code, page, err = typed("check case.yaml")
    assert (code, err) == (0, "")
    assert "none broken" in page

    edited(case, "intensity: 6e11 ± 0.3e11 particles", "intensity: 9e11 particles")
    code, page, err = typed("check case.yaml")
    assert (code, err) == (3, "")
    assert re.search(r"BROKEN +\|tune_shift_y\| < 0\.25", page)

    code, page, err = typed("report case.yaml --format json")
    assert (code, err) == (3, "")
    data = json.loads(page)
    assert not data["met"]
    assert data["case"] == "Quillmoor ring, injection plateau"
    printed = 1e-5
    assert data["results"]["tune_shift_y"]["value"] == pytest.approx(1.5 * shift, rel=printed), "linear in the charge"

    edited(case, "energy: 120 MeV kinetic", "energy: 120 MeV")
    code, page, err = typed("report case.yaml -o page.txt")
    assert (code, page) == (2, "")
    line = case.read_text(encoding="utf-8").split("energy: 120")[0].count("\n") + 1
    assert err == (
        f"case.yaml:{line}:11: bunch.energy: '120 MeV' does not say what it measures; "
        "write '120 MeV kinetic' (or total)\n"
    )
    assert [path.name for path in tmp_path.iterdir()] == ["case.yaml"]

    edited(case, "energy: 120 MeV", "energy: 180 MeV kinetic")
    edited(case, "intensity: 9e11 particles", "intensity: 6e11 particles")
    assert typed("report case.yaml -o page.txt") == (0, "", "")
    assert "Verdict: all" in (tmp_path / "page.txt").read_text(encoding="utf-8")


def test_asking_for_words(typed):
    code, page, err = typed("explain tune_shift_y")
    assert (code, err) == (0, "")
    assert page.startswith("tune_shift_y")
    assert "r_0 N" in page
    code, page, err = typed("explain")
    assert (code, err) == (0, "")
    assert page.count("\n") > 20

    code, page, err = typed("schema")
    assert (code, err) == (0, "")
    assert {"bunch", "ring", "limits"} <= set(json.loads(page)["properties"])

    code, page, err = typed("reprot case.yaml")
    assert (code, page) == (2, "")
    assert "did you mean 'report'?" in err

    code, page, err = typed("report case.yaml")
    assert (code, page) == (2, "")
    assert err.startswith("case.yaml")
    assert err.count("\n") == 1


def test_two_cases_make_an_array_and_one_bad_one_stops_both(typed, tmp_path):
    typed("new linac", into="one.yaml")
    typed("new coasting", into="two.yaml")
    code, page, err = typed("report one.yaml two.yaml --format json --method closed-form")
    assert (code, err) == (0, "")
    assert [case["file"] for case in json.loads(page)] == ["one.yaml", "two.yaml"]
    edited(tmp_path / "two.yaml", "circumference: 96 m", "circumference: 96")
    code, page, err = typed("report one.yaml two.yaml --format json -o all.json")
    assert (code, page) == (2, "")
    assert err.startswith("two.yaml:")
    assert not (tmp_path / "all.json").exists()


def test_the_same_case_gives_the_same_bytes(typed):
    typed("new gun", into="gun.yaml")
    first, second = (typed("report gun.yaml --format json") for _ in range(2))
    assert first == second
    assert first[0] == 0
