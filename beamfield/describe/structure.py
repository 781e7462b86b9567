"""A tree against the vocabulary: unknown keys, keys without a value, sections where values belong and the reverse."""

from beamfield.describe import vocabulary
from beamfield.describe.nearest import excerpt, hint, nearest
from beamfield.describe.reading import Reading
from beamfield.describe.tree import Mapping, Scalar, Sequence


def check(tree, file):
    """A Reading of the tree: its known keys with their nodes, and the faults of its structure."""
    reading = Reading(file, {"": tree})
    _visit(reading, "", tree)
    return reading


def _visit(reading, path, node):
    said, parts = vocabulary.key(path), vocabulary.parts(path)
    if isinstance(node, Scalar) and node.empty:
        _lose(reading, path, f"has no value; {_example(said, parts)}")
    elif isinstance(node, Mapping) and parts:
        _visit_section(reading, path, node, said, parts)
    elif isinstance(node, Sequence) and said.kind == "list":
        _visit_list(reading, path, node)
    elif not (isinstance(node, Scalar) and said.scalar):
        _lose(reading, path, _misplaced(node, said, parts))


def _lose(reading, path, message):
    reading.unread.add(path)
    reading.fault(path, message)


def _visit_list(reading, path, node):
    for index, item in enumerate(node.nodes):
        reading.nodes[f"{path}[{index}]"] = item
        _visit(reading, f"{path}[{index}]", item)


def _visit_section(reading, path, node, said, parts):
    for key, value in node.pairs:
        inner = f"{path}.{key.text}".removeprefix(".")
        if key.text in parts:
            reading.nodes[inner] = value
            _visit(reading, inner, value)
        else:
            reading.fault(path, _unknown(key.text, path, parts), (key.line, key.column))
    _check_complete(reading, path, node, said, parts)


def _check_complete(reading, path, node, said, parts):
    present = {key.text for key, _ in node.pairs}
    if said.kind == "one of" and len(present) != 1:
        reading.fault(path, f"is one of {', '.join(parts)}; here it is {', '.join(sorted(present)) or 'none'}")
    misspelt = {nearest(word, parts) for word in present - set(parts)} - {None} - present
    reading.unread.update(f"{path}.{name}".removeprefix(".") for name in misspelt)
    for name, part in parts.items():
        if part.required and name not in present | misspelt:
            inner = f"{path}.{name}".removeprefix(".")
            _lose(reading, inner, f"is missing; {_example(part, vocabulary.parts(inner))}")


def _example(said, parts):
    if said.example:
        return f"write one such as '{said.name}: {said.example}'" if "[" not in said.name else f"write {said.example}"
    return f"it has the keys {', '.join(parts)}" if parts else "it is a list"


def _misplaced(node, said, parts):
    if isinstance(node, Scalar):
        return f"{excerpt(node.text)} cannot stand here; {_example(said, parts)}"
    what = "a section" if isinstance(node, Mapping) else "a list"
    return f"{what} cannot stand here; {_example(said, parts)}"


def _unknown(word, path, parts):
    if word[:1].isdigit() and path:
        return f"{excerpt(word)} is no key; if a comma before it began decimals, write a point"
    where = f"'{path}'" if path else "a case"
    return f"{excerpt(word)} is no key of {where}" + (hint(word, parts) or "; it has " + ", ".join(parts))
