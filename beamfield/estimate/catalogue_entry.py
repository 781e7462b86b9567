"""What the catalogue says about one result, and how a family along x, y and z is made from one template."""

from dataclasses import dataclass, replace

QUESTIONS = {
    "bunch": "What is the bunch?",
    "strength": "How strong is its own field?",
    "effect": "What does it do to the beam?",
    "company": "What do other bunches do to it?",
    "domain": "Where does the estimate hold?",
}


@dataclass(frozen=True, slots=True)
class Entry:
    """name and unit of a result; question, a key of QUESTIONS; definition, one sentence; formula, plain text; domain,
    where the formula holds; source, author, title, year, equation; needs, the parts of a case without which it is
    absent ("bunch", i.e. not coasting; "ring"; "emittance"; "walls", i.e. chamber or poles; "density", i.e. not a
    particle file; "train"; "encounter", i.e. another bunch; "opposing", one that comes towards us; "aside", one whose
    centre passes beside ours; "beta", where they meet)."""

    name: str
    unit: str
    question: str
    definition: str
    formula: str
    domain: str
    source: str
    needs: tuple[str, ...] = ()


def along(axes, template):
    """One entry for each letter of `axes`, which takes the place of {i}; along z a result needs a bunch."""
    texts = ("name", "definition", "formula", "domain", "source")
    return tuple(
        replace(
            template,
            **{text: getattr(template, text).format(i=axis) for text in texts},
            needs=template.needs + (("bunch",) if axis == "z" else ()),
        )
        for axis in axes
    )
