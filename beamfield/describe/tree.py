"""A text as a tree of nodes that know their places: nothing interpreted, every scalar its own text."""

import re
from dataclasses import dataclass, replace

from beamfield.errors import InputError

_STEP = re.compile(r"([^.\[\]]+)|\[([0-9]{1,6})\]")


@dataclass(frozen=True, slots=True)
class Scalar:
    """A text; line and column count from 1. `plain` where it stood without quotes."""

    text: str
    line: int
    column: int
    plain: bool = True

    @property
    def empty(self):
        return self.plain and self.text in ("", "~", "null")


@dataclass(frozen=True, slots=True)
class Mapping:
    """Pairs of a key (a Scalar) and a node, in the order of the text."""

    pairs: tuple
    line: int
    column: int


@dataclass(frozen=True, slots=True)
class Sequence:
    """Nodes in the order of the text."""

    nodes: tuple
    line: int
    column: int


def steps(path):
    """'beamline.elements[3].drift' as ('beamline', 'elements', 3, 'drift'); InputError for a text that is no path."""
    parts = [(found[1], found[2]) for found in _STEP.finditer(path)]
    found = tuple(name or int(index) for name, index in parts)
    if not found or joined(found) != path:
        raise InputError(
            f"{path!r} is no key; write one such as 'bunch.intensity' or 'beamline.elements[0].drift.length'"
        )
    return found


def joined(found):
    """The inverse of `steps`."""
    return "".join(f"[{step}]" if isinstance(step, int) else f".{step}" for step in found).removeprefix(".")


def node_at(tree, path):
    """The node at a path, or None where the tree has none."""
    for step in steps(path):
        tree = _child(tree, step)
    return tree


def with_value(tree, path, text):
    """The same tree with another text for the scalar at a path; a key that was not there is added to its section.

    Only what stands above the scalar is made anew, so thousands of variants share all the rest. InputError where the
    path leads through something that has no such part.
    """
    return _with(tree, steps(path), Scalar(str(text), *_place(node_at(tree, path) or tree)), path)


def _place(node):
    return (node.line, node.column) if node else (1, 1)


def _child(node, step):
    if isinstance(node, Mapping):
        return next((value for key, value in node.pairs if key.text == step), None)
    if isinstance(node, Sequence) and isinstance(step, int) and step < len(node.nodes):
        return node.nodes[step]
    return None


def _with(node, path, leaf, whole):
    if not path:
        return leaf
    step, *rest = path
    if isinstance(node, Sequence) and isinstance(step, int) and step < len(node.nodes):
        nodes = (*node.nodes[:step], _with(node.nodes[step], rest, leaf, whole), *node.nodes[step + 1 :])
        return replace(node, nodes=nodes)
    if isinstance(step, int) or (node is not None and not _takes_keys(node)):
        raise InputError(f"{whole!r} leads to no place of this case")
    return _with_pair(node or Mapping((), leaf.line, leaf.column), step, rest, leaf, whole)


def _takes_keys(node):
    return isinstance(node, Mapping) or (isinstance(node, Scalar) and node.empty)


def _with_pair(node, step, rest, leaf, whole):
    pairs = node.pairs if isinstance(node, Mapping) else ()
    value = _with(_child(node, step), rest, leaf, whole)
    if _child(node, step) is None:
        pairs = (*pairs, (Scalar(step, leaf.line, leaf.column), value))
    else:
        pairs = tuple((key, value if key.text == step else old) for key, old in pairs)
    return Mapping(pairs, node.line, node.column)
