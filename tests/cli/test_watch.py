"""The line that tells how far a long piece of work has come."""

import pytest

from beamfield import progress
from beamfield.cli.watch import Watch
from beamfield.describe import file_word


@pytest.fixture
def seconds():
    """A clock that goes when it is pushed."""
    return [0.0]


def test_patience_then_time_left_then_nothing(seconds, capsys):
    watch = Watch(lambda: seconds[0])
    for moment, fraction in ((0.0, 0.0), (1.0, 0.1), (4.0, 0.25), (4.1, 0.26), (16.0, 1.0)):
        seconds[0] = moment
        watch("reading macro.csv", fraction)
    shown = capsys.readouterr().err
    assert shown == "\r\x1b[Kbeamfield: reading macro.csv:  25%, 12 s left\r\x1b[K"


def test_quick_work_shows_nothing(seconds, capsys):
    watch = Watch(lambda: seconds[0])
    for fraction in (0.2, 0.9, 1.0):
        watch("map", fraction)
    assert capsys.readouterr().err == ""


def test_reading_particles_is_told(tmp_path, monkeypatch):
    told = []
    monkeypatch.setattr(progress, "watcher", lambda what, fraction: told.append((what, fraction)))
    rows = "\n".join(f"{0.001 * (i % 7)},{0.002 * (i % 5)},{0.001 * (i % 3)}" for i in range(200))
    (tmp_path / "macro.csv").write_text(f"x,y,z\n{rows}\n", encoding="utf-8")
    file_word.read_particles("macro.csv", tmp_path)
    assert told
    assert told[-1] == ("reading macro.csv", 1.0)
