"""Keys that say what a case is called, what it must meet and how it is computed."""

from beamfield.beam.numerics import METHODS
from beamfield.describe.key import Key

TASK = (
    Key(
        "title", "text", "What the case is about; stands at the head of every page.", "Injection plateau, nominal fill"
    ),
    Key("limits", "list", "What the results must meet: 'beamfield check' ends with exit code 3 when one is broken."),
    Key(
        "limits[]",
        "limit",
        "A result, one of < <= > >=, a number and the unit; bars for the absolute value, then in quotes.",
        '"|tune_shift_y| < 0.25"',
    ),
    Key("numerics", "section", "How to compute."),
    Key(
        "numerics.charges_per_probe",
        "whole",
        "Charges summed for each place at which a field is asked for; more are slower and more accurate.",
        "32768",
        least=512,
        most=1048576,
    ),
    Key(
        "numerics.macro_particles",
        "whole",
        "Macro-particles drawn where a sample of the bunch is needed.",
        "131072",
        least=1000,
        most=10_000_000,
        reason="more would not fit into the memory of a small computer",
    ),
    Key("numerics.seed", "whole", "Seed of every sample.", "1", least=0, most=2**32 - 1),
    Key(
        "numerics.method",
        "word",
        "The road to the values: summing moving charges, or the textbook formula where the shape has one.",
        "superposition",
        choices=METHODS,
    ),
)
