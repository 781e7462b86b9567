"""Keys that describe the other bunches: the train of ours, and a bunch that it meets."""

from dataclasses import replace

from beamfield.beam.encounter import DIRECTIONS
from beamfield.beam.shape import LONGITUDINAL
from beamfield.describe.key import Key
from beamfield.describe.words_beam import BEAM

MOST_BUNCHES = 1000
_PLACE = {"least": -1e3, "most": 1e3}
_BETA = {"least": 1e-6, "most": 1e6}
_SAYS = {
    "bunch": "Another bunch, opposing or beside ours; what it does to ours is in the results.",
    "bunch.shape": "How its charges are spread: a word, or a profile across and one along.",
    "bunch.intensity": "Particles, charge, peak current or mean current of that bunch. Of a charge or current the "
    "magnitude counts: the sign is the species'.",
    "bunch.repetition": "Bunches a second; turns a mean current into a charge.",
}
_NOT_SAID = ("bunch.shape.particles", "bunch.emittance", "bunch.momentum_spread")


def _other(key):
    """The same key of the other bunch, which is a density of given size."""
    found = {"path": f"other_{key.path}", "says": _SAYS.get(key.path, key.says)}
    if key.path == "bunch":
        found["required"] = False
    if key.path.startswith("bunch.size"):
        found["required"] = True
    if key.path == "bunch.shape.longitudinal":
        found["choices"] = tuple(word for word in LONGITUDINAL if word != "coasting")
    return replace(key, **found)


_TRAIN = (
    Key("bunch.train", "section", "Equal bunches before and behind this one, at equal distances."),
    Key("bunch.train.count", "whole", "Bunches in all.", "5", required=True, least=1, most=MOST_BUNCHES),
    Key(
        "bunch.train.spacing",
        "spacing",
        "From centre to centre, in metres or in seconds.",
        "3 ns",
        required=True,
        least=1e-9,
        most=1e6,
    ),
    Key(
        "bunch.train.place",
        "whole",
        "Which of them the results are about, 1 at the head; without: the middle one, the foremost of two.",
        "3",
        least=1,
        most=MOST_BUNCHES,
    ),
)
_ENCOUNTER = (
    Key(
        "other_bunch.direction",
        "word",
        "Whether it comes towards ours or goes the same way.",
        "opposing",
        required=True,
        choices=DIRECTIONS,
    ),
    Key("other_bunch.offset", "section", "Where its centre stands, seen from ours; nothing: on it."),
    *(Key(f"other_bunch.offset.{axis}", "length", f"Along {axis}.", "0.1 mm", **_PLACE) for axis in "xyz"),
    Key("other_bunch.beta", "section", "Beta functions of our ring where they meet; without: its mean ones."),
    Key("other_bunch.beta.x", "length", "Horizontal beta function.", "0.8 m", required=True, **_BETA),
    Key("other_bunch.beta.y", "length", "Vertical beta function.", "40 mm", required=True, **_BETA),
)

COMPANY = (
    *_TRAIN,
    *(_other(key) for key in BEAM if not key.path.startswith(_NOT_SAID)),
    *_ENCOUNTER,
)
