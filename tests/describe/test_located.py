"""YAML without its surprises: text stays text, places are kept, and what is more than plain data is refused."""

from time import perf_counter

import pytest
import yaml
from hypothesis import given
from hypothesis import strategies as st

from beamfield.describe.located import MOST_BYTES, decode, read
from beamfield.describe.tree import Mapping, Scalar, Sequence
from beamfield.errors import InputError
from tests.describe.ring_case import complaints


def faults(text):
    with pytest.raises(InputError) as caught:
        read(text, "f")
    return [str(fault) for fault in caught.value.faults]


def plain(node):
    """A tree as dicts, lists and texts."""
    if isinstance(node, Mapping):
        return {key.text: plain(value) for key, value in node.pairs}
    return [plain(item) for item in node.nodes] if isinstance(node, Sequence) else node.text


@pytest.mark.parametrize(
    "word", ["1e9", "12:30", "no", "yes", "0777", "1_000", "2024-01-01", "1.0", "null", "~", ".inf"]
)
def test_scalars_stay_text(word):
    assert plain(read(f"a: {word}")) == {"a": word}


def test_places_count_from_one():
    tree = read("a: 1\nb: {x: 6.1 mm rms, é: 'q'}\nc:\n  - one\n")
    (_, a), (_, b), (_, c) = tree.pairs
    assert (a.line, a.column) == (1, 4)
    assert [(key.line, key.column, value.line, value.column) for key, value in b.pairs] == [
        (2, 5, 2, 8),
        (2, 20, 2, 23),
    ]
    assert c.nodes[0] == Scalar("one", 4, 5)
    assert not b.pairs[1][1].plain


@pytest.mark.parametrize(
    ("text", "line"),
    [
        ("a: &x 1", "f:1:4: '&x': anchors are not read; write the value where it is needed"),
        ("a: *x", "f:1:4: '*x': aliases are not read; write the value again"),
        ("<<: {a: 1}", "f:1:1: merge keys are not read; write the values where they are needed"),
        ("b: 1\nb: 2", "f:2:1: 'b' is said twice; first in line 1"),
        ("a: !thing 1", "f:1:4: '!thing': tags are not read; write the value alone"),
        ("a: !!float 1", "f:1:4: '!!float': tags are not read; write the value alone"),
        (
            "a: !!python/object:os.system x",
            "f:1:4: '!!python/object:os.system': tags are not read; write the value alone",
        ),
        ("a: 1\n---\nb: 2", "f:2:1: a second document; a file holds one case"),
        ("a:\n\tb: 1", "f:2:1: a tab; indent and separate with spaces"),
        ("a:\tb", "f:1:3: a tab; indent and separate with spaces"),
        ("? [a]\n: 1", "f:1:3: a key is one word"),
        ("", "f:1:1: is empty; 'beamfield new' prints a case to start from"),
        ("# nothing\n", "f:1:1: is empty; 'beamfield new' prints a case to start from"),
        ("a: \x00", "f:1:4: the character U+0000 has no place in a case"),
        ("a: \ud800", "f:1:4: the character U+D800 has no place in a case"),
        ("a: b: c", "f:1:5: not YAML: mapping values are not allowed here"),
        ("a: [1, 2", "f:1:9: not YAML: expected ',' or ']', but got '<stream end>'"),
        (
            "- |x| < 1",
            'f:1:4: text with a bar begins a block in YAML; write the limit in quotes: "|tune_shift_y| < 0.25"',
        ),
        ("[" * 40, "f:1:14: deeper than any case is"),
        ("x" * (MOST_BYTES + 1), "f:1:1: 1000001 characters; a case has at most 1000000"),
    ],
)
def test_refused(text, line):
    assert faults(text) == [line]


def test_a_tab_in_a_comment_harms_nobody():
    assert plain(read("a: 1 # one\ttwo")) == {"a": "1"}


def test_all_are_said_together():
    assert len(faults("a: &x 1\nb: *x\nb: 2\nc: !t 3")) == 4


@pytest.mark.parametrize(
    ("data", "line"),
    [
        (b"\xff\xfea\x00", "f:1:1: this is UTF-16; save it as UTF-8"),
        (b"\xef\xbb\xbfa: 1", "f:1:1: begins with a byte-order mark; save it as UTF-8 without one"),
        (b"a: 1\nb: \xb5m", "f:2:4: this is not UTF-8 text"),
        (b" " * (MOST_BYTES + 1), "f:1:1: 1000001 bytes; a case has at most 1000000"),
    ],
)
def test_bytes(data, line):
    with pytest.raises(InputError) as caught:
        decode(data, "f")
    assert str(caught.value) == line


@pytest.mark.parametrize(
    "text", ["a: b: c", "a: 'x", "{a: [}", 'a: "\\xZZ"', "...\n", "a: 1\n b: 2", "- a\nb: 1", "@", "`"]
)
def test_the_same_words_without_the_c_parser(text, monkeypatch):
    fast = faults(text)
    monkeypatch.delattr(yaml, "CSafeLoader", raising=False)
    assert faults(text) == fast


@pytest.mark.parametrize(
    "text",
    ["[" * 900_000, "a" * 900_000, "'" + "a\n" * 400_000, "{" + "a" * 400_000, "#" * 900_000, "a: b: c\n" * 100_000],
)
def test_hostile_texts_are_refused_in_reasonable_time(text):
    """Bounds, not benchmarks: a quadratic search over a megabyte would take minutes."""
    start = perf_counter()
    complaints(read, text)
    assert perf_counter() - start < 10.0


@given(st.text(max_size=200))
def test_any_text_is_a_tree_or_located_faults(text):
    assert all(fault.line > 0 and fault.column > 0 for fault in complaints(read, text))


@given(st.binary(max_size=200))
def test_any_bytes_are_text_or_one_located_fault(data):
    assert [fault.line > 0 for fault in complaints(decode, data, "f")] in ([], [True])


def test_agrees_with_the_plain_loader():
    """On texts without surprises the tree says what yaml.safe_load does."""
    text = "a: one\nb: {c: two words, d: 'three'}\ne:\n  - four\n  - f: |\n      five\n"
    theirs = yaml.safe_load(text)
    theirs["e"][1]["f"] = theirs["e"][1]["f"].strip()
    assert plain(read(text)) == theirs
