"""Every result there is: its unit, the question it answers, its definition, formula, domain and source.

The one list that evaluation, limits, pages, `explain` and the README are made from.
"""

from dataclasses import dataclass

QUESTIONS = {
    "bunch": "What is the bunch?",
    "strength": "How strong is its own field?",
    "effect": "What does it do to the beam?",
    "domain": "Where does the estimate hold?",
}


@dataclass(frozen=True, slots=True)
class Entry:
    """name and unit of a result; question, a key of QUESTIONS; definition, one sentence; formula, plain text; domain,
    where the formula holds; source, author, title, year, equation; needs, the parts of a case without which it is absent
    ("bunch", i.e. not coasting; "ring"; "emittance"; "density", i.e. not a particle file)."""

    name: str
    unit: str
    question: str
    definition: str
    formula: str
    domain: str
    source: str
    needs: tuple[str, ...] = ()


_ENTRIES = (
    Entry("gamma", "1", "bunch", "Total energy over rest energy.", "gamma = E / (m c^2)", "always", "special relativity"),
)

CATALOGUE = {entry.name: entry for entry in _ENTRIES}
