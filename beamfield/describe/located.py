"""YAML text -> located tree, with no guessing: scalars stay text, and what YAML offers beyond plain data is refused.

No anchors, aliases, merge keys, tags, repeated keys or further documents; bounded size and depth.
"""

import re
from itertools import accumulate

from beamfield.describe.nearest import excerpt
from beamfield.describe.tree import Mapping, Scalar, Sequence
from beamfield.errors import Fault, InputError

MOST_BYTES = 1_000_000
MOST_DEPTH = 12
_EMPTY = "is empty; 'beamfield new' prints a case to start from"
_EXPLAINED = 30_000  # characters up to which a broken text is read a second time for a better message
_MOST_BRACKETS = 200  # open at once, those in words included: a parser may take the square of it
_CONTROL = re.compile("[^\t\n\r\x20-\x7e\x85\xa0-\ud7ff\ue000-\ufefe\uff00-\ufffd\U00010000-\U0010ffff]")
_TAB = re.compile(r"^[^#\t\n]*\t", re.MULTILINE)


def decode(data, file):
    """Bytes of a file as text; InputError, located, where they are no plain UTF-8 of reasonable size."""
    if len(data) > MOST_BYTES:
        _refuse(f"is larger than {MOST_BYTES} bytes, which no case needs", file)
    if data[:2] in (b"\xff\xfe", b"\xfe\xff"):
        _refuse("this is UTF-16; save it as UTF-8", file)
    if data[:3] == b"\xef\xbb\xbf":
        _refuse("begins with a byte-order mark; save it as UTF-8 without one", file)
    try:
        return data.decode("utf-8")
    except UnicodeDecodeError as error:
        before = data[: error.start]
        column = len(before.rpartition(b"\n")[2].decode("utf-8")) + 1
        _refuse("this is not UTF-8 text", file, before.count(b"\n") + 1, column)


def read(text, file="<text>"):
    """The located tree of a YAML text; InputError with one or more located faults where it is none."""
    _check_signs(text, file)
    faults = []
    tree = _Composer(_events(text, file), file, faults).document()
    if faults:
        raise InputError(*faults)
    return tree


def _refuse(message, file, line=1, column=1):
    raise InputError(Fault(message, "", line, column, file))


def _check_signs(text, file):
    if len(text) > MOST_BYTES:
        _refuse(f"is larger than {MOST_BYTES} bytes, which no case needs", file)
    if not text.strip():
        _refuse(_EMPTY, file)
    strange = _CONTROL.search(text)
    if strange:
        _refuse(f"the character U+{ord(strange[0]):04X} has no place in a case", file, *_place(text, strange.start()))
    tab = _TAB.search(text)
    if tab:
        _refuse("a tab; indent and separate with spaces", file, *_place(text, tab.end() - 1))
    deep = _too_deep(text)
    if deep is not None:
        _refuse("deeper than any case is", file, *_place(text, deep))


def _too_deep(text):
    """Offset of the bracket with which more are open than any case needs, or None."""
    depths = accumulate((sign in "[{") - (sign in "]}") for sign in text)
    return next((offset for offset, depth in enumerate(depths) if depth > _MOST_BRACKETS), None)


def _place(text, offset):
    return text.count("\n", 0, offset) + 1, offset - text.rfind("\n", 0, offset)


def _events(text, file):
    """The parser's events; InputError at the place where it gives up."""
    import yaml

    loader = getattr(yaml, "CSafeLoader", yaml.SafeLoader)
    try:
        yield from yaml.parse(text, Loader=loader)
    except yaml.YAMLError as error:
        error = _plainer(yaml, text, error)
        mark = getattr(error, "problem_mark", None)
        line, column = (mark.line + 1, mark.column + 1) if mark else (1, 1)
        _refuse(_explained(error, text, line), file, line, column)


def _plainer(yaml, text, error):
    """The same error from the pure Python parser, whose words do not depend on how yaml was built."""
    if len(text) <= _EXPLAINED:
        try:
            for _ in yaml.parse(text, Loader=yaml.SafeLoader):
                pass
        except yaml.YAMLError as same:
            return same
    return error


def _explained(error, text, line):
    lines = text.splitlines()
    here = lines[line - 1] if line <= len(lines) else ""
    if re.search(r"(^|[-:,\[{])\s*\|[a-z]", here):
        return 'text with a bar begins a block in YAML; write the limit in quotes: "|tune_shift_y| < 0.25"'
    if re.search(r"\s%|^%", here):
        return "a text that begins with '%' goes in quotes"
    problem = getattr(error, "problem", None) or "it cannot be read"
    return f"not YAML: {problem}"


class _Composer:
    """Nodes from events; faults that leave the structure readable are collected, others end the reading."""

    def __init__(self, events, file, faults):
        self.events, self.file, self.faults = events, file, faults

    def document(self):
        self.next()
        if type(self.next()).__name__ == "StreamEndEvent":
            _refuse(_EMPTY, self.file)
        tree = self.node(self.next(), 0)
        self.next()
        further = self.next()
        if type(further).__name__ != "StreamEndEvent":
            self.fault("a second document; a file holds one case", further)
        return tree

    def next(self):
        return next(self.events)

    def fault(self, message, event):
        mark = event.start_mark
        self.faults.append(Fault(message, "", mark.line + 1, mark.column + 1, self.file))

    def node(self, event, depth):
        self.check(event, depth)
        place = event.start_mark.line + 1, event.start_mark.column + 1
        match type(event).__name__:
            case "ScalarEvent":
                return Scalar(" ".join(event.value.split()), *place, not event.style)
            case "MappingStartEvent":
                return Mapping(self.pairs(depth), *place)
            case "SequenceStartEvent":
                return Sequence(tuple(self.nodes(depth)), *place)
        return Scalar("", *place)

    def check(self, event, depth):
        """Complain of what a case does without; end where the text is deeper than any case."""
        if type(event).__name__ == "AliasEvent":
            return self.fault(f"'*{event.anchor}': aliases are not read; write the value again", event)
        if getattr(event, "anchor", None):
            self.fault(f"'&{event.anchor}': anchors are not read; write the value where it is needed", event)
        if getattr(event, "tag", None):
            tag = event.tag.replace("tag:yaml.org,2002:", "!!")
            self.fault(f"{excerpt(tag)}: tags are not read; write the value alone", event)
        if depth > MOST_DEPTH:
            self.fault("deeper than any case is", event)
            raise InputError(*self.faults)
        return None

    def nodes(self, depth):
        while type(event := self.next()).__name__ != "SequenceEndEvent":
            yield self.node(event, depth + 1)

    def pairs(self, depth):
        found = {}
        while type(event := self.next()).__name__ != "MappingEndEvent":
            key = self.node(event, depth + 1)
            value = self.node(self.next(), depth + 1)
            if self.is_key(key, event, found):
                found[key.text] = (key, value)
        return tuple(found.values())

    def is_key(self, key, event, found):
        if not isinstance(key, Scalar):
            return self.fault("a key is one word", event)
        if key.plain and key.text == "<<":
            return self.fault("merge keys are not read; write the values where they are needed", event)
        if key.text in found:
            return self.fault(f"{excerpt(key.text)} is said twice; first in line {found[key.text][0].line}", event)
        return True
