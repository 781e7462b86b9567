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
}
_GIVES = {"ring": "ring", "train": "bunch.train", "walls": "surroundings"} | dict.fromkeys(
    ("encounter", "opposing", "aside", "beta"), "other_bunch"
)  # what is needed -> the section that says it


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
