"""A text against the kind of quantity that is wanted, and the way out for whoever wrote another."""

from functools import lru_cache

from beamfield.describe import units
from beamfield.describe.kinds import KINDS
from beamfield.describe.nearest import excerpt, hint
from beamfield.describe.quantity import parse
from beamfield.errors import InputError


@lru_cache(maxsize=4096)
def read(text, kind_name):
    """Quantity of a kind that a text says; InputError, with a way out, where it says something else or too little."""
    kind = KINDS[kind_name]
    quantity = parse(text)
    if quantity.unit is None:
        raise InputError(_unknown(quantity, kind))
    form = _form(quantity, kind)
    if form is None:
        raise InputError(_misfit(quantity, kind))
    _check_words(quantity, form, kind)
    return quantity


def _form(quantity, kind):
    fitting = (form for form in kind.forms if form.head == quantity.head)
    return next((form for form in fitting if form.dimension == quantity.unit.dimension), None)


def _ways(quantity, kind):
    return kind.ways.replace("{}", quantity.number_text)


def _unknown(quantity, kind):
    said, parts = excerpt(quantity.text), quantity.unit_text.split()
    if "pi" in parts or "π" in parts:
        return (
            f"{said}: the pi may be a factor or a reminder of an area; write the emittance as "
            f"'{quantity.number_text} mm mrad …', multiplied by pi if it is a factor"
        )
    strange = next((part for part in parts if units.unit(part) is None), quantity.unit_text)
    near = hint(strange, kind.units + kind.words)
    return f"{said}: {excerpt(strange)} is neither a unit nor a word here{near or f'; write {_ways(quantity, kind)}'}"


def _misfit(quantity, kind):
    said = excerpt(quantity.text)
    if quantity.head:
        return f"{said} is not {kind.says}; write {_ways(quantity, kind)}"
    if not quantity.unit_text:
        return f"{said} has no unit; write {_ways(quantity, kind)}"
    if quantity.unit.dimension == units.unit("T m").dimension and "T m" in kind.units:
        return f"{said} does not say what it measures; write 'rigidity {said[1:]}"
    return f"{said}: {excerpt(quantity.unit_text)} does not measure {kind.says}; write {_ways(quantity, kind)}"


def _check_words(quantity, form, kind):
    chosen = [[word for word in quantity.words if word in group] for group in form.groups]
    left_over = [word for word in quantity.words if not any(word in group for group in form.groups)]
    if left_over:
        raise InputError(_superfluous(quantity, left_over, form, kind))
    if any(len(words) > 1 for words in chosen):
        raise InputError(f"{excerpt(quantity.text)} says both {' and '.join(max(chosen, key=len))}; keep one")
    if not all(chosen):
        raise InputError(_incomplete(quantity, chosen, form))


def _superfluous(quantity, left_over, form, kind):
    said, words = excerpt(quantity.text), " ".join(left_over)
    if form.groups:
        choices = "; ".join(", ".join(group) for group in form.groups)
        return f"{said}: '{words}' does not describe {kind.says}; choose from {choices}"
    bare = quantity.text.removesuffix(" ".join(quantity.words)).strip()
    return f"{said}: '{words}' does not go with {kind.says} in {quantity.unit_text or 'this form'}; write '{bare}'"


def _incomplete(quantity, chosen, form):
    words = [words[0] if words else group[0] for words, group in zip(chosen, form.groups)]
    missing = [group for words, group in zip(chosen, form.groups) if not words]
    bare = quantity.text.removesuffix(" ".join(quantity.words)).strip()
    others = "; ".join(", ".join(group[1:]) for group in missing)
    whole = " ".join([bare, *words])
    choice = f" (or {others})" if others else ""
    return f"{excerpt(quantity.text)} does not say what it measures; write '{whole}'{choice}"
