"""The section `limits` -> Limits, and whether the case can have the results they are about."""

from beamfield.describe import limit_text
from beamfield.describe.tree import Sequence
from beamfield.estimate.catalogue import CATALOGUE

_NEEDS = {  # what a result needs -> whether a bunch, in a ring or None, has it; what to do where it has not
    "bunch": (lambda bunch, ring: not bunch.coasting, "a bunch; this beam is coasting"),
    "ring": (lambda bunch, ring: ring is not None, "a ring; add the section 'ring' with circumference and tune"),
    "emittance": (lambda bunch, ring: bunch.emittance is not None, "emittances; add bunch.emittance"),
    "density": (lambda bunch, ring: bunch.shape is not None, "a density; this bunch is known as particles"),
}


def limits(reading):
    """Limits that the reading describes, by their keys; those that could not be read have been said."""
    nodes = reading.nodes.get("limits")
    keys = [f"limits[{index}]" for index in range(len(nodes.nodes))] if isinstance(nodes, Sequence) else []
    read = {key: reading.attempt(key, limit_text.limit, reading.word(key), *reading.place(key)) for key in keys}
    return {key: limit for key, limit in read.items() if limit}


def check_needs(reading, found, bunch, ring):
    """Complain of limits on results that this case cannot have."""
    for key, limit in found.items():
        for need in CATALOGUE[limit.result].needs:
            has, way = _NEEDS.get(need, (lambda bunch, ring: True, ""))
            if not has(bunch, ring) and not (need == "ring" and "ring" in reading):
                reading.fault(key, f"{limit.result} needs {way}")
