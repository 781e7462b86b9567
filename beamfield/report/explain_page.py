"""What the results are: the list, one in full, and the table of the README, all from the catalogue."""

from beamfield.errors import InputError, did_you_mean
from beamfield.estimate.catalogue import CATALOGUE, QUESTIONS
from beamfield.report.paragraph import COLUMNS, hanging

NEEDS = {
    "bunch": "a bunch, not a coasting beam",
    "ring": "the section `ring`",
    "emittance": "`bunch.emittance`",
    "walls": "a chamber or poles in `surroundings`",
    "density": "a shape, not a particle file",
    "train": "`bunch.train`",
    "encounter": "the section `other_bunch`",
    "opposing": "an opposing bunch in `other_bunch`",
    "aside": "`other_bunch.offset` in x or y",
    "beta": "`other_bunch.beta` or `ring`",
    "momentum_spread": "`bunch.momentum_spread`",
    "chamber": "`surroundings.chamber`",
    "chamber or ends": "`surroundings.chamber` where the beam is coasting",
    "chamber or slopes": "`surroundings.chamber` where the line density is level",
    "cathode": "`surroundings.cathode.field`",
    "rf": "`ring.rf`",
}


def explain_page(name=None):
    """One result in full, or the list of all; InputError for a name that is none."""
    return _list() if name is None else _entry(_known(name))


def results_table():
    """All results as a Markdown table."""
    rows = [f"| `{e.name}` | {e.unit} | {e.definition.replace('|', '&#124;')} |" for e in CATALOGUE.values()]
    return "\n".join(["| result | unit | definition |", "|---|---|---|", *rows])


def _known(name):
    if name not in CATALOGUE:
        hint = did_you_mean(name, CATALOGUE)
        raise InputError(f"beamfield explain: there is no result {name!r}{hint} (see 'beamfield explain')")
    return CATALOGUE[name]


def _list():
    width = max(map(len, CATALOGUE)) + 2
    blocks = [
        "\n".join([question, *(_brief(e, width) for e in CATALOGUE.values() if e.question == key)])
        for key, question in QUESTIONS.items()
    ]
    return "\n\n".join([*blocks, "beamfield explain NAME: one of them in full"]) + "\n"


def _brief(entry, width):
    """Name, unit and the definition up to where the line ends."""
    head = f"  {entry.name:{width}}{entry.unit:7}"
    room = COLUMNS - len(head)
    text = entry.definition
    return head + (text if len(text) <= room else text[: text.rindex(" ", 0, room - 1)].rstrip(" ,;:") + " …")


def _entry(entry):
    facts = {
        "formula": entry.formula,
        "domain": entry.domain,
        "source": entry.source,
        "needs": "; ".join(NEEDS[part] for part in entry.needs),
    }
    lines = [f"{entry.name}   [{entry.unit}]", "", *hanging("  ", entry.definition), ""]
    for label, text in facts.items():
        lines += hanging(f"  {label:10}", text)
    return "\n".join(lines) + "\n"
