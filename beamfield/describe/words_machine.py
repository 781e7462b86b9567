"""Keys that describe what stands round the bunch: chamber, ring, beamline."""

from beamfield.beam.surroundings import CHAMBERS
from beamfield.describe.key import Key

_GAP = {"least": 1e-9, "most": 1e3}
_BETA = {"least": 1e-6, "most": 1e6}
_ALPHA = {"least": -1e6, "most": 1e6}
_TUNE = {"least": 1e-3, "most": 1e4}
_LENGTH = {"least": 1e-6, "most": 1e6}

_SURROUNDINGS = (
    Key("surroundings", "section", "What stands round the bunch; free space without it."),
    Key("surroundings.chamber", "section", "The conducting wall of the vacuum chamber."),
    Key("surroundings.chamber.shape", "word", "Its cross-section.", "round", required=True, choices=CHAMBERS),
    Key("surroundings.chamber.radius", "length", "Inner radius of a round one.", "60 mm", **_GAP),
    Key("surroundings.chamber.half_width", "length", "Half the inner width, elliptic or rectangular.", "70 mm", **_GAP),
    Key("surroundings.chamber.half_height", "length", "Half the inner height of the same.", "35 mm", **_GAP),
    Key("surroundings.chamber.half_gap", "length", "Half the distance between parallel plates.", "30 mm", **_GAP),
    Key("surroundings.poles", "section", "Iron poles above and below, for the magnetic image terms."),
    Key("surroundings.poles.half_gap", "length", "Half the gap between them.", "70 mm", required=True, **_GAP),
    Key("surroundings.cathode", "section", "A conducting plane across the axis behind the bunch."),
    Key("surroundings.cathode.at", "length", "Its distance behind the centre.", "2 mm", required=True, **_GAP),
    Key(
        "surroundings.cathode.field",
        "electric field",
        "The field that draws from it.",
        "40 MV/m",
        least=1e-3,
        most=1e11,
    ),
    Key(
        "surroundings.neutralisation",
        "number",
        "Charge at rest in the beam that cancels its own, as a fraction of it.",
        "0",
        least=0.0,
        most=1.0,
    ),
)
_RING = (
    Key("ring", "section", "The ring in which the bunch goes round."),
    Key("ring.circumference", "length", "Length of the closed orbit.", "158 m", required=True, **_LENGTH),
    Key("ring.tune", "section", "Betatron oscillations a turn, with the integer part.", required=True),
    Key("ring.tune.x", "number", "Horizontal tune.", "4.2", required=True, **_TUNE),
    Key("ring.tune.y", "number", "Vertical tune.", "4.3", required=True, **_TUNE),
    Key(
        "ring.bunches",
        "whole",
        "Equal bunches in the ring; the intensity is that of one.",
        "1",
        least=1,
        most=1_000_000,
    ),
    Key(
        "ring.optics",
        "file",
        "CSV with columns s,beta_x,beta_y,dispersion_x [m], or mean values; without: beta = R/Q, no dispersion.",
        "optics.csv",
    ),
    Key("ring.optics.beta_x", "length", "Mean horizontal beta function.", "16 m", required=True, **_BETA),
    Key("ring.optics.beta_y", "length", "Mean vertical beta function.", "16 m", required=True, **_BETA),
    Key(
        "ring.optics.dispersion_x",
        "length",
        "Mean horizontal dispersion.",
        "2.7 m",
        least=-1e4,
        most=1e4,
    ),
    Key("ring.rf", "section", "The cavities that bunch the beam; a stationary bucket, no acceleration."),
    Key("ring.rf.voltage", "voltage", "Amplitude of a turn.", "8 kV", required=True, least=1e-3, most=1e10),
    Key(
        "ring.rf.harmonic",
        "whole",
        "Its frequency over that of a turn.",
        "2",
        required=True,
        least=1,
        most=1_000_000,
    ),
    Key(
        "ring.rf.transition_gamma",
        "number",
        "Gamma at which a turn takes the same time for all momenta.",
        "4.1",
        required=True,
        least=1e-3,
        most=1e4,
    ),
)
_LINE = (
    Key("beamline", "section", "A beamline that the bunch passes, or one cell of a periodic one."),
    Key(
        "beamline.start",
        "word",
        "Optics at its start, or 'matched' for the periodic beam; beta left out: from the size.",
        "matched",
        choices=("matched",),
    ),
    Key("beamline.start.beta_x", "length", "Horizontal beta function.", "8 m", **_BETA),
    Key("beamline.start.alpha_x", "number", "Horizontal alpha, positive where the beam converges.", "0", **_ALPHA),
    Key("beamline.start.beta_y", "length", "Vertical beta function.", "6 m", **_BETA),
    Key("beamline.start.alpha_y", "number", "Vertical alpha.", "0", **_ALPHA),
    Key("beamline.elements", "list", "Elements in the order in which the bunch meets them.", required=True),
    Key("beamline.elements[]", "one of", "One element."),
    Key("beamline.repeat", "whole", "Times that the elements are passed.", "20", least=1, most=100_000),
)
_PARTS = (  # name, what it is; then key, kind, what it says, example, what it may be
    (
        ("drift", "Free flight."),
        ("length", "length", "Its length.", "0.5 m", _LENGTH),
    ),
    (
        ("quadrupole", "A quadrupole magnet."),
        ("length", "length", "Its magnetic length.", "0.1 m", _LENGTH),
        (
            "gradient",
            "gradient",
            "Its gradient; positive focuses x for a positive charge moving forward.",
            "12 T/m",
            {"least": -1e6, "most": 1e6},
        ),
    ),
    (
        ("solenoid", "A solenoid."),
        ("length", "length", "Its magnetic length.", "0.2 m", _LENGTH),
        ("field", "field", "Its field on the axis.", "0.15 T", {"least": -100.0, "most": 100.0}),
    ),
    (
        ("gap", "A thin RF gap."),
        ("voltage", "voltage", "Its effective voltage.", "120 kV", {"least": -1e10, "most": 1e10}),
        ("frequency", "frequency", "Its frequency.", "200 MHz", {"least": 1e-3, "most": 1e12}),
        ("phase", "angle", "Its phase at the passage of the centre.", "-90 deg", {"least": -100.0, "most": 100.0}),
    ),
)
_ELEMENTS = tuple(
    key
    for (name, says), *parts in _PARTS
    for key in (
        Key(f"beamline.elements[].{name}", "section", says),
        *(
            Key(f"beamline.elements[].{name}.{part}", kind, text, example, required=True, **span)
            for part, kind, text, example, span in parts
        ),
    )
)

MACHINE = (*_SURROUNDINGS, *_RING, *_LINE, *_ELEMENTS)
