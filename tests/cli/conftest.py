"""A command line whose evaluation is made up, so that only the way in and out is tested."""

import pytest

from beamfield import api
from beamfield.cli.entry import main
from beamfield.errors import Fault, InputError
from tests.report.made_outcomes import BARE, OVERFULL, RING

OUTCOMES = {"ring.yaml": RING, "overfull.yaml": OVERFULL, "bare.yaml": BARE}


def _load(path):
    if path not in OUTCOMES:
        raise InputError(Fault("first fault", "bunch", 2, 3, path), Fault("second fault", "ring", 4, 1, path))
    return path


@pytest.fixture
def made_up(monkeypatch):
    """Cases ring.yaml, overfull.yaml and bare.yaml exist; any other has two faults."""
    monkeypatch.setattr(api, "load", _load)
    monkeypatch.setattr(api, "evaluate", lambda case, method=None: OUTCOMES[case], raising=False)
    monkeypatch.setattr(api, "on_compile", lambda tell: None)


@pytest.fixture
def run(capsys):
    """run(words...) -> exit code, standard output, standard error."""

    def go(*words):
        code = main(words)
        out, err = capsys.readouterr()
        return code, out, err

    return go
