"""From nothing to a report: a starting case is written, evaluated and held against its limits by the real house."""

import json
import os
import subprocess
import sys

import pytest

from beamfield.describe.starter import KINDS_OF_CASE

pytestmark = pytest.mark.large
WITH_OWN_FILE = {"particles"}  # names a particle file that the user has and we have not


@pytest.mark.parametrize("kind", sorted(set(KINDS_OF_CASE) - WITH_OWN_FILE))
def test_a_starting_case_is_reported(run, tmp_path, kind):
    case = str(tmp_path / "case.yaml")
    assert run("new", kind, "-o", case) == (0, "", "")
    code, page, err = run("report", case)
    assert (code, err) == (0, "")
    assert all(len(line) <= 100 for line in page.splitlines())
    assert "passed    self-check" in page
    assert "FAILED" not in page
    code, page, err = run("check", case, "--format", "json")
    assert (code, err, json.loads(page)["met"]) == (0, "", True)


@pytest.mark.parametrize("method", ["superposition", "closed-form"])
def test_values_agree_between_page_and_json_and_follow_the_method(run, tmp_path, method):
    case = str(tmp_path / "case.yaml")
    run("new", "coasting", "-o", case)
    results = json.loads(run("report", case, "--format", "json", "--method", method)[1])["results"]
    (row,) = [
        line.split() for line in run("report", case, "--method", method)[1].splitlines() if " tune_shift_y " in line
    ]
    half_a_printed_digit = 0.5e-5
    assert abs(float(row[1]) / results["tune_shift_y"]["value"] - 1.0) < half_a_printed_digit
    assert results["tune_shift_y"]["method"].startswith(method.replace("-", " "))


def test_the_same_bytes_on_one_thread_and_two(run, tmp_path):
    case = str(tmp_path / "case.yaml")
    run("new", "ring", "-o", case)
    words = [sys.executable, "-m", "beamfield", "report", case, "--format", "json"]
    one, two = (
        subprocess.run(words, check=True, capture_output=True, env=os.environ | {"NUMBA_NUM_THREADS": count}).stdout
        for count in "12"
    )
    assert one == two
    assert one


def test_a_misread_case_is_located_and_writes_nothing(run, tmp_path):
    case, page = tmp_path / "case.yaml", tmp_path / "page.txt"
    run("new", "ring", "-o", str(case))
    case.write_text(case.read_text(encoding="utf-8").replace("mm rms", "mm", 1), encoding="utf-8")
    code, out, err = run("report", str(case), "-o", str(page))
    assert (code, out) == (2, "")
    assert err.startswith(f"{case}:")
    assert "does not say what it measures; write" in err
    assert not page.exists()
