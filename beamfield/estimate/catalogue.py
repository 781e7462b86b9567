"""Every result there is: its unit, the question it answers, its definition, formula, domain and source.

The one list that evaluation, limits, pages, `explain` and the README are made from; its order is theirs.
"""

from beamfield.estimate.catalogue_entry import QUESTIONS, Entry
from beamfield.estimate.entries_bunch import BUNCH
from beamfield.estimate.entries_company import COMPANY
from beamfield.estimate.entries_domain import DOMAIN
from beamfield.estimate.entries_effect import EFFECT
from beamfield.estimate.entries_longitudinal import LONGITUDINAL_EFFECT, LONGITUDINAL_STRENGTH
from beamfield.estimate.entries_strength import STRENGTH
from beamfield.estimate.entries_walls import WALLS

__all__ = ["CATALOGUE", "QUESTIONS", "Entry"]

_ENTRIES = (*BUNCH, *STRENGTH, *LONGITUDINAL_STRENGTH, *EFFECT, *LONGITUDINAL_EFFECT, *WALLS, *COMPANY, *DOMAIN)
CATALOGUE = {entry.name: entry for entry in _ENTRIES}
