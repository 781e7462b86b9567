"""The section `limits` -> Limits, and whether the case can have the results they are about."""

from beamfield.describe import limit_text
from beamfield.describe.tree import Sequence
from beamfield.estimate.catalogue import CATALOGUE

_NEEDS = {  # what a result needs -> whether a bunch, in a ring or None and in its surroundings, has it; what else to do
    "bunch": (lambda bunch, ring, near: not bunch.coasting, "a bunch; this beam is coasting"),
    "ring": (lambda bunch, ring, near: ring is not None, "a ring; add the section 'ring' with circumference and tune"),
    "emittance": (lambda bunch, ring, near: bunch.emittance is not None, "emittances; add bunch.emittance"),
    "density": (lambda bunch, ring, near: bunch.shape is not None, "a density; this bunch is known as particles"),
    "walls": (
        lambda bunch, ring, near: near.chamber is not None or near.pole_half_gap is not None,
        "walls; add surroundings.chamber or surroundings.poles",
    ),
    "train": (
        lambda bunch, ring, near: near.train is not None and near.train.count > 1,
        "bunch.train, of two at least",
    ),
    "encounter": (lambda bunch, ring, near: near.encounter is not None, "another bunch; add the section 'other_bunch'"),
    "opposing": (
        lambda bunch, ring, near: near.encounter is not None and near.encounter.opposing,
        "an opposing bunch; add the section 'other_bunch' with 'direction: opposing'",
    ),
    "aside": (
        lambda bunch, ring, near: near.encounter is not None and near.encounter.aside,
        "a bunch that passes aside; add other_bunch.offset",
    ),
    "beta": (
        lambda bunch, ring, near: ring is not None or (near.encounter is not None and near.encounter.beta is not None),
        "beta functions where the bunches meet; add other_bunch.beta, or a ring",
    ),
    "momentum_spread": (
        lambda bunch, ring, near: bunch.momentum_spread is not None,
        "a momentum spread; add bunch.momentum_spread",
    ),
    "chamber": (lambda bunch, ring, near: near.chamber is not None, "a wall; add surroundings.chamber"),
    "chamber or ends": (
        lambda bunch, ring, near: near.chamber is not None or not bunch.coasting,
        "a wall where a beam has no ends; add surroundings.chamber",
    ),
    "chamber or slopes": (
        lambda bunch, ring, near: near.chamber is not None or not _level(bunch),
        "a wall where a line density is level; add surroundings.chamber",
    ),
    "cathode": (
        lambda bunch, ring, near: near.cathode_field is not None,
        "a cathode with a field; add surroundings.cathode.field",
    ),
    "rf": (lambda bunch, ring, near: ring is None or ring.rf is not None, "cavities; add ring.rf"),
}
_GIVES = {"ring": "ring", "rf": "ring", "train": "bunch.train", "walls": "surroundings"} | dict.fromkeys(
    ("encounter", "opposing", "aside", "beta"), "other_bunch"
)  # what is needed -> the section that says it


def _level(bunch):
    return bunch.shape is not None and not bunch.shape.ellipsoid and bunch.shape.longitudinal in ("uniform", "coasting")


def limits(reading):
    """Limits that the reading describes, by their keys; those that could not be read have been said."""
    nodes = reading.nodes.get("limits")
    keys = [f"limits[{index}]" for index in range(len(nodes.nodes))] if isinstance(nodes, Sequence) else []
    read = {key: reading.attempt(key, limit_text.limit, reading.word(key), *reading.place(key)) for key in keys}
    return {key: limit for key, limit in read.items() if limit}


def check_needs(reading, found, bunch, ring, surroundings):
    """Complain of limits on results that this case cannot have; not where a section with faults would give them."""
    unread = {
        "ring": ring is None and "ring" in reading,
        "bunch.train": surroundings.train is None and "bunch.train" in reading,
        "other_bunch": surroundings.encounter is None and "other_bunch" in reading,
    }
    for key, limit in found.items():
        for need in CATALOGUE[limit.result].needs:
            has, way = _NEEDS[need]
            if not has(bunch, ring, surroundings) and not unread.get(_GIVES.get(need)):
                reading.fault(key, f"{limit.result} needs {way}")
                break
