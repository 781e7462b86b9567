"""Cases to start from: each loads, says what every key is, and is held by its own vocabulary."""

import pytest

from beamfield.describe.case import parse
from beamfield.describe.starter import KINDS_OF_CASE, starter
from beamfield.describe.vocabulary import KEYS
from beamfield.errors import InputError

MACRO = "x,y,z,ux,uy,uz\n1e-3,0,0,0,0,0.6\n-1e-3,1e-3,0,0,0,0.6\n0,-1e-3,1e-2,0,0,0.6\n0,0,-1e-2,0,0,0.6\n"


@pytest.mark.parametrize("kind", KINDS_OF_CASE)
def test_loads(kind, tmp_path):
    (tmp_path / "macro.csv").write_text(MACRO)
    case = parse(starter(kind), folder=tmp_path)
    assert case.limits
    assert not [warning for warning in case.warnings if "read and checked" not in warning]


@pytest.mark.parametrize("kind", KINDS_OF_CASE)
def test_legible(kind):
    lines = starter(kind).splitlines()
    assert max(map(len, lines)) <= 100
    assert lines[0].startswith("# ")
    assert not [line for line in lines if line != line.rstrip()]


def test_comments_are_those_of_the_vocabulary():
    assert f"  # {KEYS['bunch.momentum_spread'].says}\n  momentum_spread:" in starter("ring")


def test_the_plainest_is_the_ring():
    assert starter() == starter("ring")


@pytest.mark.parametrize(("word", "said"), [("rign", "did you mean 'ring'?"), ("zebra", "choose from ring, linac")])
def test_no_such_kind(word, said):
    with pytest.raises(InputError) as caught:
        starter(word)
    assert said in str(caught.value)
