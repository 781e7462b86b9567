"""What a quantity may measure: for each kind the units and the words that make it complete.

A kind has one or more forms. A form is told by its head and by the dimension of its first unit; from each of its groups
of words exactly one must stand behind the unit.
"""

from dataclasses import dataclass
from functools import lru_cache

from beamfield.describe import units
from beamfield.describe.nearest import excerpt, hint
from beamfield.describe.quantity import parse
from beamfield.errors import InputError

SIZE_WORDS = ("rms", "semi", "full", "fwhm")
_ENERGY_WORDS = ("kinetic", "total")


@dataclass(frozen=True, slots=True)
class Form:
    """units, the usual ones first; groups of words; head, the word before the number."""

    units: tuple[str, ...]
    groups: tuple[tuple[str, ...], ...] = ()
    head: str = ""

    @property
    def dimension(self):
        return units.unit(self.units[0]).dimension


@dataclass(frozen=True, slots=True)
class Kind:
    """name; says, what it is in a sentence; ways, how to write one, {} standing for the number; base, the unit of what
    it comes to; forms."""

    name: str
    says: str
    ways: str
    base: str
    forms: tuple[Form, ...]

    @property
    def units(self):
        return [unit for form in self.forms for unit in form.units if unit]

    @property
    def words(self):
        return [word for form in self.forms for group in form.groups for word in group]


_LENGTHS = ("mm", "m", "um", "cm", "nm", "km")
_TIMES = ("ns", "ps", "us", "fs", "ms", "s")
_EV = ("MeV", "GeV", "keV", "eV", "TeV")
_EVU = ("MeV/u", "GeV/u", "keV/u", "eV/u", "TeV/u")
_EVC = ("GeV/c", "MeV/c", "keV/c", "eV/c", "TeV/c")
_MASSES = ("MeV/c2", "GeV/c2", "keV/c2", "eV/c2")
_CHARGES = ("nC", "pC", "C", "fC", "uC")
_CURRENTS = ("A", "mA", "kA", "uA", "nA", "MA")
_EMITTANCE_WORDS = (("normalised", "geometric"), ("rms", "95%", "full"))

_KINDS = (
    Kind("number", "a plain number", "'{}'", "", (Form(("",)), Form(("%",)))),
    Kind("length", "a length", "'{} mm' or '{} m'", "m", (Form(_LENGTHS),)),
    Kind("width", "a bunch size", "'{} mm rms' (or semi, full, fwhm)", "m", (Form(_LENGTHS, (SIZE_WORDS,)),)),
    Kind(
        "bunch length",
        "a bunch length",
        "'{} mm rms' or '{} ns rms' (or semi, full, fwhm)",
        "m",
        (Form(_LENGTHS, (SIZE_WORDS,)), Form(_TIMES, (SIZE_WORDS,))),
    ),
    Kind(
        "energy",
        "an energy",
        "'{} MeV kinetic' (or total), '{} MeV/u kinetic' of an ion, '{} GeV/c', 'gamma {}' or 'rigidity {} T m'",
        "m c",
        (
            Form(_EV, (_ENERGY_WORDS,)),
            Form(_EVU, (_ENERGY_WORDS,)),
            Form(_EVC),
            Form(("",), head="gamma"),
            Form(("T m", "kG cm", "G cm"), head="rigidity"),
        ),
    ),
    Kind(
        "intensity",
        "an intensity",
        "a charge such as '{} nC', a count such as '3e11 particles' or a current such as '{} A peak' (or mean)",
        "particles",
        (Form(("particles",)), Form(_CHARGES), Form(_CURRENTS, (("peak", "mean"),))),
    ),
    Kind(
        "emittance",
        "an emittance",
        "'{} um normalised rms' (or geometric; 95%, full)",
        "m",
        (
            Form(("um", "mm", "nm", "pm", "m"), _EMITTANCE_WORDS),
            Form(("mm mrad", "um rad", "nm rad", "m rad"), _EMITTANCE_WORDS),
        ),
    ),
    Kind(
        "momentum spread",
        "a momentum spread",
        "'{} rms' (of dp/p)",
        "",
        (Form(("", "%"), (("rms",),)),),
    ),
    Kind("frequency", "a frequency", "'{} MHz'", "Hz", (Form(("MHz", "kHz", "GHz", "Hz", "THz")),)),
    Kind("voltage", "a voltage", "'{} kV'", "V", (Form(("kV", "MV", "V", "GV")),)),
    Kind("angle", "an angle", "'{} deg' or '{} rad'", "rad", (Form(("deg", "rad", "mrad")),)),
    Kind("field", "a magnetic field", "'{} T'", "T", (Form(("T", "mT", "uT", "kG", "G")),)),
    Kind("gradient", "a field gradient", "'{} T/m'", "T/m", (Form(("T/m", "mT/m", "T/mm", "T/cm", "G/cm", "kG/cm")),)),
    Kind(
        "mass",
        "a mass",
        "'{} MeV/c2' or '{} u' or '{} kg'",
        "kg",
        (Form(_MASSES + ("kg", "g")), Form(("u",))),
    ),
)
KINDS = {kind.name: kind for kind in _KINDS}
CONVERTED = (
    "width",
    "bunch length",
    "energy",
    "intensity",
    "emittance",
    "mass",
)  # whose SI value needs more than the text


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
