"""The four exit codes, one by one."""

import json

import pytest

from beamfield import api
from beamfield.errors import Exit


def test_the_codes_are_what_the_interface_promises():
    assert {kind.name: int(kind) for kind in Exit} == {"DONE": 0, "FAULT": 1, "MISREAD": 2, "BROKEN": 3}


@pytest.mark.usefixtures("made_up")
@pytest.mark.parametrize("command", ["report", "check"])
class TestEvaluating:
    @pytest.mark.parametrize("case", ["ring.yaml", "bare.yaml"])
    def test_met_is_0(self, run, command, case):
        code, out, err = run(command, case)
        assert (code, err) == (0, "")
        assert case in out

    def test_a_broken_limit_is_3_wherever_it_stands(self, run, command):
        for cases in (["overfull.yaml"], ["ring.yaml", "overfull.yaml"], ["overfull.yaml", "ring.yaml"]):
            assert run(command, *cases)[0] == 3

    def test_misread_files_are_2_all_of_them_in_order_and_nothing_else(self, run, command):
        code, out, err = run(command, "b.yaml", "ring.yaml", "a.yaml")
        assert (code, out) == (2, "")
        assert err.splitlines() == [
            "b.yaml:2:3: bunch: first fault",
            "b.yaml:4:1: ring: second fault",
            "a.yaml:2:3: bunch: first fault",
            "a.yaml:4:1: ring: second fault",
        ]

    def test_an_own_fault_is_1_in_one_line(self, run, command, monkeypatch):
        monkeypatch.setattr(api, "evaluate", lambda case, method: 1 / 0)
        code, out, err = run(command, "ring.yaml")
        assert (code, out) == (1, "")
        assert err.startswith(
            "beamfield: a fault of the program itself: ZeroDivisionError: division by zero; please report"
        )
        assert err.count("\n") == 1

    def test_an_own_fault_tells_where_on_demand(self, run, command, monkeypatch):
        monkeypatch.setenv("BEAMFIELD_DEBUG", "1")
        monkeypatch.setattr(api, "evaluate", lambda case, method: 1 / 0)
        code, _, err = run(command, "ring.yaml")
        assert code == 1
        assert "Traceback" in err

    def test_stopped_by_hand_is_130(self, run, command, monkeypatch):
        def stop(case, method):
            raise KeyboardInterrupt

        monkeypatch.setattr(api, "evaluate", stop)
        assert run(command, "ring.yaml") == (130, "", "beamfield: stopped\n")

    def test_the_method_is_passed_on(self, run, command, monkeypatch):
        seen, evaluate = [], api.evaluate
        monkeypatch.setattr(api, "evaluate", lambda case, method: seen.append(method) or evaluate(case))
        run(command, "ring.yaml")
        run(command, "ring.yaml", "--method", "closed-form")
        assert seen == [None, "closed-form"]


@pytest.mark.usefixtures("made_up")
def test_json_of_one_case_and_of_several(run):
    assert json.loads(run("report", "ring.yaml", "--format", "json")[1])["file"] == "ring.yaml"
    cases = json.loads(run("check", "ring.yaml", "overfull.yaml", "--format", "json")[1])
    assert [(case["file"], case["met"]) for case in cases] == [("ring.yaml", True), ("overfull.yaml", False)]


def test_explain(run):
    code, out, err = run("explain", "perveance")
    assert (code, err) == (0, "")
    assert out.startswith("perveance")
    assert "\n  perveance " in run("explain")[1]
