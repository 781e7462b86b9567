"""An outcome is met when every limit is."""

from dataclasses import replace

import pytest

from beamfield.judge.limit import Limit, judge
from beamfield.judge.outcome import Outcome
from tests.report.made_outcomes import RING

LIMIT = Limit("tune_shift_y < 1", "tune_shift_y", False, "<", 1.0)
MET, BROKEN = judge(LIMIT, 0.5), judge(LIMIT, 1.5)


@pytest.mark.parametrize(
    ("verdicts", "met"), [((), True), ((MET,), True), ((MET, BROKEN), False), ((BROKEN, MET), False)]
)
def test_met(verdicts, met):
    assert Outcome("t", "f", {}, verdicts).met is met


def test_findings_by_name():
    assert RING["gamma"] is RING.findings["gamma"]
    assert "gamma" in RING
    assert "perveance" not in replace(RING, findings={})
