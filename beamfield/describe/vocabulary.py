"""Every key of a case, once: the table that checking, the JSON Schema and the starting cases are made from."""

import re

from beamfield.describe.key import Key
from beamfield.describe.words_beam import BEAM
from beamfield.describe.words_company import COMPANY
from beamfield.describe.words_machine import MACHINE
from beamfield.describe.words_task import TASK

KEYS = {key.path: key for key in (*TASK, *BEAM, *MACHINE, *COMPANY)}
ROOT = Key("", "section", "A case: a bunch, what stands round it, and what is asked of it.")


def key(path):
    """What the vocabulary says about a key such as 'beamline.elements[3].drift', or None where it has no such key."""
    return KEYS.get(re.sub(r"\[[0-9]+\]", "[]", path)) if path else ROOT


def parts(path):
    """The keys that a section may have, by their last name, in order."""
    return _PARTS.get(re.sub(r"\[[0-9]+\]", "[]", path), {})


def _by_section():
    sections = {}
    for each in (key for key in KEYS.values() if not key.name.endswith("[]")):
        sections.setdefault(each.path.rpartition(".")[0], {})[each.name] = each
    return sections


_PARTS = _by_section()
