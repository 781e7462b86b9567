"""Every demo case: it meets its limits by both roads, agrees with the textbook, with itself and with sums by hand,
comes out the same on one thread and two, and speaks of the invented facility alone.
"""

import importlib.util
import json
import os
import re
import subprocess
import sys
from functools import lru_cache
from pathlib import Path

import jsonschema
import pytest

from beamfield import api
from beamfield.cli.entry import main
from tests.reference.results_format import CASE, CASES

pytestmark = pytest.mark.large
ROOT = Path(__file__).parents[1]
CONFIGS = sorted((ROOT / "configs").glob("*.yaml"))
SURE = 3.0  # times the doubt that a difference may come to
ROUNDING = 1e-9  # relative
all_of_them = pytest.mark.parametrize("path", CONFIGS, ids=lambda path: path.stem)


@lru_cache
def outcome(path, method="superposition", evaluate=api.evaluate):
    return evaluate(api.load(path), method)


@pytest.fixture(autouse=True)
def _evaluated_once(monkeypatch):
    monkeypatch.setattr(api, "evaluate", lambda case, method=None: outcome(Path(case.file), method or "superposition"))


def test_there_is_one_of_each_kind():
    bunches = [api.load(path).bunch for path in CONFIGS]
    assert len(bunches) >= 7
    assert any(bunch.coasting for bunch in bunches)
    assert any(bunch.macro for bunch in bunches)
    assert {bunch.species.charge > 0.0 for bunch in bunches} == {True, False}
    assert len({bunch.species.name for bunch in bunches}) >= 6
    assert len({bunch.shape for bunch in bunches}) >= 6
    assert min(bunch.aspect for bunch in bunches) < 0.2
    assert max(bunch.aspect for bunch in bunches if not bunch.coasting) > 1000.0


@all_of_them
@pytest.mark.parametrize("method", ["superposition", "closed-form"])
def test_check_ends_with_0(path, method, capsys):
    assert main(["check", str(path), "--method", method]) == 0
    out, err = capsys.readouterr()
    assert "none broken" in out
    assert not err


@all_of_them
@pytest.mark.parametrize("method", ["superposition", "closed-form"])
def test_sum_and_textbook_agree_within_the_doubt(path, method):
    pairs = [found for found in outcome(path, method).findings.values() if found.closed_form is not None]
    assert pairs or api.load(path).bunch.macro
    for found in pairs:
        off = abs(found.value - found.closed_form)
        assert off <= SURE * found.doubt + ROUNDING * abs(found.value), found.name


@all_of_them
def test_both_roads_agree_within_their_doubts(path):
    one, other = outcome(path).findings, outcome(path, "closed-form").findings
    assert list(one) == list(other)
    for name, found in one.items():
        allowed = SURE * (found.doubt + other[name].doubt) + ROUNDING * abs(found.value)
        assert abs(found.value - other[name].value) <= allowed, name


@all_of_them
def test_self_checks_pass_and_limits_have_room_but_not_too_much(path):
    assert all(passed for _, passed in outcome(path).checks)
    margins = [verdict.margin for verdict in outcome(path).verdicts]
    assert len(margins) >= 3
    assert 0.0 < min(margins) < 0.35, "one limit at least is near enough to matter"


@all_of_them
def test_only_formulas_of_long_beams_may_be_out_of_their_domain(path):
    of_long_beams = {"perveance", "geometry_factor", "limiting_current"}
    assert {found.name for found in outcome(path).findings.values() if not found.valid} <= of_long_beams


def test_json_keeps_the_promised_form(capsys):
    for path in CONFIGS:
        assert main(["report", str(path), "--format", "json", "--method", "closed-form"]) == 0
        jsonschema.validate(json.loads(capsys.readouterr().out), CASE)
    assert main(["report", *map(str, CONFIGS), "--format", "json", "--method", "closed-form"]) == 0
    jsonschema.validate(cases := json.loads(capsys.readouterr().out), CASES)
    assert [case["file"] for case in cases] == list(map(str, CONFIGS))


def test_the_form_has_teeth(capsys):
    main(["report", str(CONFIGS[0]), "--format", "json", "--method", "closed-form"])
    page = json.loads(capsys.readouterr().out)
    gamma = page["results"]["gamma"]
    for broken in (
        page | {"met": "yes"},
        page | {"results": page["results"] | {"gama": gamma}},
        page | {"results": page["results"] | {"gamma": gamma | {"unit": "MeV"}}},
        page | {"results": page["results"] | {"gamma": {k: v for k, v in gamma.items() if k != "doubt"}}},
        page | {"results": page["results"] | {"gamma": gamma | {"valid": False, "remarks": []}}},
    ):
        with pytest.raises(jsonschema.ValidationError):
            jsonschema.validate(broken, CASE)


def test_one_thread_and_two_give_the_same_bytes():
    words = [sys.executable, "-m", "beamfield", "report", *map(str, CONFIGS), "--format", "json"]
    one, two = (
        subprocess.run(
            words, check=True, capture_output=True, cwd=ROOT, env=os.environ | {"NUMBA_NUM_THREADS": count}
        ).stdout
        for count in "12"
    )
    assert len(one) > 1000 * len(CONFIGS)
    assert one == two


@all_of_them
def test_words_of_one_invented_facility(path):
    """Names begin with a capital: within a sentence only that of the facility, of an element and of units do."""
    text = path.read_text(encoding="utf-8")
    assert re.search(r"^title: Quillmoor ", text, re.MULTILINE)
    assert "Everything about Quillmoor is invented" in text
    prose = " ".join(re.findall(r"^title: (.*)$|#(.*)$", text, re.MULTILINE)[0]) + " ".join(re.findall(r"#(.*)", text))
    named = set(re.findall(r"(?<=[\w,;:] )[A-Z]\w*", prose))
    assert named <= {"Quillmoor", "Ar", "H", "GeV", "R"}


def test_the_tables_are_those_that_their_maker_writes(tmp_path, monkeypatch):
    spec = importlib.util.spec_from_file_location("make_tables", ROOT / "configs" / "make_tables.py")
    maker = importlib.util.module_from_spec(spec)
    spec.loader.exec_module(maker)
    monkeypatch.setattr(maker, "HERE", tmp_path)
    maker.write_all()
    for table in (ROOT / "configs").glob("*.csv"):
        assert (tmp_path / table.name).read_bytes() == table.read_bytes()
        assert table.stat().st_size <= 300_000


def test_the_ring_of_the_table_has_the_tunes_of_its_case():
    """Fact of optics: the phase advances by ds / beta. Tolerance: the rows stand up to 0.3 m apart."""
    ring = api.load(ROOT / "configs" / "ring_injection.yaml").ring
    coarse = 1e-3
    for tune, beta in zip(ring.tune, (ring.optics.beta_x, ring.optics.beta_y)):
        assert (ring.optics.weights @ (1.0 / beta)) * ring.circumference / 6.283185307 == pytest.approx(
            tune, rel=coarse
        )
