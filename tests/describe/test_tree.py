"""Paths into a tree, and trees with one text changed."""

import pytest

from beamfield.describe.located import read
from beamfield.describe.tree import joined, node_at, steps, with_value
from beamfield.errors import InputError

TREE = read("bunch:\n  size: {x: 1 mm rms}\nbeamline:\n  elements:\n    - drift: {length: 1 m}\nring:\n")


@pytest.mark.parametrize("path", ["a", "a.b", "a.b[3].c", "a[0]", "a-b.c d"])
def test_steps_and_back(path):
    assert joined(steps(path)) == path


@pytest.mark.parametrize("path", ["", ".", "a.", ".a", "a..b", "a[", "a[x]", "a[-1]", "a]"])
def test_no_path(path):
    with pytest.raises(InputError, match="is no key"):
        steps(path)


def test_node_at():
    assert node_at(TREE, "bunch.size.x").text == "1 mm rms"
    assert node_at(TREE, "beamline.elements[0].drift.length").text == "1 m"
    assert node_at(TREE, "beamline.elements[1].drift") is None
    assert node_at(TREE, "bunch.size.x.deeper") is None


def test_another_text_at_the_same_place():
    tree = with_value(TREE, "bunch.size.x", "2 mm rms")
    node = node_at(tree, "bunch.size.x")
    assert (node.text, node.line, node.column) == ("2 mm rms", 2, 13)
    assert node_at(TREE, "bunch.size.x").text == "1 mm rms"
    assert node_at(tree, "beamline") is node_at(TREE, "beamline"), "what does not change is shared"


@pytest.mark.parametrize("path", ["bunch.size.z", "numerics.method", "ring.tune.x", "beamline.elements[0].drift.field"])
def test_a_new_key_is_added(path):
    assert node_at(with_value(TREE, path, "7"), path).text == "7"


@pytest.mark.parametrize(
    "path", ["bunch.size.x.y", "beamline.elements[1].drift", "bunch[0]", "beamline.elements.drift", "new[0]"]
)
def test_a_path_that_leads_nowhere(path):
    with pytest.raises(InputError, match="leads to no place"):
        with_value(TREE, path, "7")
