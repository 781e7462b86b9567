"""The JSON Schema (draft-07) of a case, made from the vocabulary, for editors that complete and check as one types."""

from math import isfinite

from beamfield.describe import vocabulary
from beamfield.describe.kinds import KINDS

DRAFT = "http://json-schema.org/draft-07/schema#"
_NUMBER = r"[+-]?([0-9]+\.?[0-9]*|\.[0-9]+)([eE][+-]?[0-9]+)?"


def schema():
    """The schema as a dict of plain JSON values.

    It knows the keys, their values' words and units in outline; `beamfield check` knows the rest.
    """
    return {"$schema": DRAFT, "title": "beamfield case", **_node(vocabulary.ROOT)}


def _node(said):
    """Schema of one key: what it may be as a scalar, as a section, or as either."""
    ways = [_scalar(said)] if said.scalar else []
    if vocabulary.parts(said.path):
        ways.append(_section(said))
    elif said.kind == "list":
        ways.append({"type": "array", "items": _node(vocabulary.key(f"{said.path}[]"))})
    way = ways[0] if len(ways) == 1 else {"oneOf": ways}
    return {"description": said.says, **way}


def _section(said):
    parts = vocabulary.parts(said.path)
    found = {
        "type": "object",
        "properties": {name: _node(part) for name, part in parts.items()},
        "additionalProperties": False,
    }
    required = [name for name, part in parts.items() if part.required]
    if said.kind == "one of":
        found |= {"minProperties": 1, "maxProperties": 1}
    return found | ({"required": required} if required else {})


def _scalar(said):
    found = {"examples": [_as_json(said)]} if said.example else {}
    if said.quantity:
        return found | _quantity(KINDS[said.kind])
    if said.kind == "whole":
        span = {"minimum": said.least, "maximum": said.most}
        return found | {"type": "integer"} | {word: int(value) for word, value in span.items() if isfinite(value)}
    return found | ({"enum": list(said.choices)} if said.kind == "word" else {"type": "string", "minLength": 1})


def _as_json(said):
    """The example as an editor's YAML reader would give it."""
    if said.kind == "whole":
        return int(said.example)
    return float(said.example) if said.kind == "number" else said.example.strip('"')


def _quantity(kind):
    """A text: number, perhaps a tolerance, unit and words; a plain number may stand without quotes."""
    ways = "|".join(_form(form) for form in kind.forms)
    pattern = {"type": "string", "pattern": f"^\\s*({ways})\\s*$"}
    bare = any(form.units[0] == "" and not form.groups and not form.head for form in kind.forms)
    return {"anyOf": [pattern, {"type": "number"}]} if bare else pattern


def _form(form):
    head = rf"{form.head}\s+" if form.head else ""
    units = "|".join(_spellings(unit) for unit in form.units if unit)
    unit = rf"(\s*({units}))" + ("?" if "" in form.units else "") if units else ""
    words = "|".join(word for group in form.groups for word in group)
    words = rf"(\s+({words}|normalized)){{{len(form.groups)}}}" if words else ""
    return rf"{head}{_NUMBER}(\s*(±|\+/?-)\s*{_NUMBER})?{unit}{words}"


def _spellings(unit):
    """A unit with each of the letters that people write for micro, and any space between factors."""
    micro = "[uµμ]" + unit[1:] if unit[0] == "u" and len(unit) > 1 else unit
    return micro.replace(" ", r"\s+")
