"""Keys that describe the bunch."""

from beamfield.beam.shape import LONGITUDINAL, SHAPES, TRANSVERSE
from beamfield.beam.species_table import NAMES
from beamfield.describe.key import Key

_SIZE = {"least": 1e-12, "most": 1e4}
_EMITTANCE = {"least": 1e-18, "most": 1.0}

BEAM = (
    Key("bunch", "section", "The bunch: its particles, their energy, number and spread.", required=True),
    Key(
        "bunch.species",
        "species",
        f"What it is made of: {', '.join(NAMES)}; or an isotope, or a mass, with a charge state.",
        "proton",
        required=True,
        choices=NAMES,
    ),
    Key("bunch.species.isotope", "text", "An element and its mass number.", "Ar-40"),
    Key(
        "bunch.species.mass",
        "mass",
        "Mass of one particle.",
        "938.272 MeV/c2",
        least=1e-36,
        most=1e-18,
    ),
    Key(
        "bunch.species.charge_state",
        "whole",
        "Charge of one particle in elementary charges, signed.",
        "8",
        least=-1000,
        most=1000,
    ),
    Key(
        "bunch.energy",
        "energy",
        "Kinetic or total energy, energy per nucleon, momentum, gamma or rigidity of one particle.",
        "160 MeV kinetic",
        required=True,
        least=1e-6,
        most=1e9,
    ),
    Key(
        "bunch.intensity",
        "intensity",
        "Particles, charge, peak current or mean current of one bunch (of the whole beam when coasting). "
        "Of a charge or current the magnitude counts: the sign is the species'.",
        "3.5e12 particles",
        required=True,
        least=1.0,
        below=1e15,
        reason="several times what any machine has held in one bunch",
    ),
    Key(
        "bunch.repetition",
        "frequency",
        "Bunches a second; turns a mean current into a charge where there is no ring.",
        "162.5 MHz",
        least=1e-6,
        most=1e12,
    ),
    Key(
        "bunch.shape",
        "word",
        "How the charges are spread: a word, or a profile across and one along, or a file of macro-particles.",
        "gaussian",
        required=True,
        choices=tuple(SHAPES),
    ),
    Key("bunch.shape.transverse", "word", "Profile across (kv: a uniform ellipse).", "gaussian", choices=TRANSVERSE),
    Key("bunch.shape.longitudinal", "word", "Line density along.", "parabolic", choices=LONGITUDINAL),
    Key(
        "bunch.shape.particles",
        "file",
        "CSV of macro-particles: columns x,y,z [m], optional ux,uy,uz [gamma beta] and weight.",
        "macro.csv",
    ),
    Key("bunch.size", "section", "Sizes of the bunch, each with the word that says which size it is."),
    Key("bunch.size.x", "width", "Horizontal size.", "6.1 mm rms", **_SIZE),
    Key("bunch.size.y", "width", "Vertical size.", "4.9 mm rms", **_SIZE),
    Key("bunch.size.z", "bunch length", "Length, in metres or in seconds.", "120 ns rms", **_SIZE),
    Key("bunch.emittance", "section", "Emittances; where optics are known they may replace the sizes x and y."),
    Key("bunch.emittance.x", "emittance", "Horizontal emittance.", "2.5 um normalised rms", **_EMITTANCE),
    Key("bunch.emittance.y", "emittance", "Vertical emittance.", "2.5 um normalised rms", **_EMITTANCE),
    Key(
        "bunch.momentum_spread",
        "momentum spread",
        "Relative spread of the momenta, dp/p.",
        "1.5e-3 rms",
        least=1e-9,
        most=0.5,
    ),
)
