"""What a quantity may measure: for each kind the units and the words that make it complete.

A kind has one or more forms. A form is told by its head and by the dimension of its first unit; from each of its groups
of words exactly one must stand behind the unit.
"""

from dataclasses import dataclass

from beamfield.describe import units

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
    Kind("spacing", "a distance between bunches", "'{} m' or '{} ns'", "m", (Form(_LENGTHS), Form(_TIMES))),
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
    Kind("electric field", "an electric field", "'{} MV/m'", "V/m", (Form(("MV/m", "kV/m", "V/m", "GV/m")),)),
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
    "spacing",
    "width",
    "bunch length",
    "energy",
    "intensity",
    "emittance",
    "mass",
)  # whose SI value needs more than the text
