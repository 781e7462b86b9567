"""A commented case to start from: the texts of a starting case, with what the vocabulary says about each key."""

from textwrap import fill

from beamfield.describe import vocabulary
from beamfield.describe.nearest import excerpt, hint
from beamfield.describe.starting_cases import STARTING_CASES
from beamfield.errors import InputError

KINDS_OF_CASE = tuple(STARTING_CASES)
_WIDTH = 100
_HEAD = """\
# {says}
# The facility does not exist; change the values. A quantity says what it measures: a number, with
# a ± tolerance where there is one, a unit, and words such as rms or kinetic. 'beamfield report
# FILE' evaluates the case, 'beamfield check FILE' holds it against its limits.
"""


def starter(kind="ring"):
    """Text of a case of one of KINDS_OF_CASE; InputError for another kind."""
    if kind not in STARTING_CASES:
        way = hint(kind, KINDS_OF_CASE) or f"; choose from {', '.join(KINDS_OF_CASE)}"
        raise InputError(f"there is no starting case {excerpt(kind)}{way}")
    says, case = STARTING_CASES[kind]
    return _HEAD.format(says=says.replace("\n", "\n# ")) + "".join(_section(case, "", ""))


def _section(section, path, indent):
    """Lines of a section."""
    for name, value in section.items():
        inner = f"{path}.{name}".removeprefix(".")
        yield "" if path else "\n"
        yield _comment(vocabulary.key(inner).says, indent)
        yield from _entry(name, value, inner, indent)


def _entry(name, value, path, indent):
    if isinstance(value, str):
        yield f"{indent}{name}: {value}\n"
    elif isinstance(value, list):
        yield f"{indent}{name}:\n"
        yield from (f"{indent}  - {_item(item)}\n" for item in value)
    elif _short(value, path):
        yield f"{indent}{name}: {_flow(value)}\n"
    else:
        yield f"{indent}{name}:\n"
        yield from _section(value, path, f"{indent}  ")


def _short(section, path):
    """Whether a section of texts goes on one line: that of a bunch or a ring, not these themselves."""
    return "." in path and all(isinstance(value, str) for value in section.values())


def _flow(section):
    return "{" + ", ".join(f"{name}: {text}" for name, text in section.items()) + "}"


def _item(item):
    return item if isinstance(item, str) else f"{item[0]}: {_flow(item[1])}"


def _comment(says, indent):
    mark = f"{indent}# "
    return fill(says, _WIDTH, initial_indent=mark, subsequent_indent=mark, break_on_hyphens=False) + "\n"
