"""The section `limits` -> Limits, and whether the case can have the results they are about."""

from beamfield.describe import limit_text
from beamfield.describe.tree import Sequence
from beamfield.estimate.catalogue import CATALOGUE

_NEEDS = {  # what a result needs -> whether a bunch, what is round it and a ring or None have it; a way out
    "bunch": (lambda bunch, around, ring: not bunch.coasting, "a bunch; this beam is coasting"),
    "ring": (
        lambda bunch, around, ring: ring is not None,
        "a ring; add the section 'ring' with circumference and tune",
    ),
    "emittance": (lambda bunch, around, ring: bunch.emittance is not None, "emittances; add bunch.emittance"),
    "momentum_spread": (
        lambda bunch, around, ring: bunch.momentum_spread is not None,
        "a momentum spread; add bunch.momentum_spread",
    ),
    "density": (lambda bunch, around, ring: bunch.shape is not None, "a density; this bunch is known as particles"),
    "chamber": (lambda bunch, around, ring: around.chamber is not None, "a wall; add surroundings.chamber"),
    "chamber or ends": (
        lambda bunch, around, ring: around.chamber is not None or not bunch.coasting,
        "a wall where a beam has no ends; add surroundings.chamber",
    ),
    "chamber or slopes": (
        lambda bunch, around, ring: around.chamber is not None or not _level(bunch),
        "a wall where a line density is level; add surroundings.chamber",
    ),
    "cathode": (
        lambda bunch, around, ring: around.cathode_field is not None,
        "a cathode with a field; add surroundings.cathode.field",
    ),
    "rf": (lambda bunch, around, ring: ring is None or ring.rf is not None, "cavities; add ring.rf"),
}


def _level(bunch):
    return bunch.shape is not None and not bunch.shape.ellipsoid and bunch.shape.longitudinal in ("uniform", "coasting")


def limits(reading):
    """Limits that the reading describes, by their keys; those that could not be read have been said."""
    nodes = reading.nodes.get("limits")
    keys = [f"limits[{index}]" for index in range(len(nodes.nodes))] if isinstance(nodes, Sequence) else []
    read = {key: reading.attempt(key, limit_text.limit, reading.word(key), *reading.place(key)) for key in keys}
    return {key: limit for key, limit in read.items() if limit}


def check_needs(reading, found, bunch, surroundings, ring):
    """Complain of limits on results that this case cannot have."""
    for key, limit in found.items():
        for need in CATALOGUE[limit.result].needs:
            has, way = _NEEDS.get(need, (lambda *_: True, ""))
            if not has(bunch, surroundings, ring) and not (need == "ring" and "ring" in reading):
                reading.fault(key, f"{limit.result} needs {way}")
