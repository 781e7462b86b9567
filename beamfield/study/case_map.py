"""The map of a case: where its words say, of the field that it is given."""

from beamfield.describe.map_words import grid_for
from beamfield.estimate.field_map import co_moving, field_map
from beamfield.report.map_csv import lines
from beamfield.report.map_file import map_writer, write_map


def draw(case, path, field, overs=(), ats=(), potential=None):
    """Write the map of a case to a file, whole or not at all; InputError for words, endings or places that do not fit.

    field(points (3, K)) -> .E, .B; potential(points) -> phi (K,) [V], or None where it is not known; overs and ats as
    describe.map_words reads them.
    """
    map_writer(path)  # a wrong ending is told before anything is computed
    write_map(path, case_map(case, field, overs, ats, potential))


def table(case, field, overs=(), ats=(), potential=None):
    """The map of a case as one CSV text."""
    return "".join(lines(case_map(case, field, overs, ats, potential)))


def case_map(case, field, overs=(), ats=(), potential=None):
    """FieldMap of a case."""
    bunch = case.bunch

    def evaluate(points):
        phi = potential(points) if potential else None
        return co_moving(field(points), bunch.species.charge, bunch.beta_gamma, phi)

    return field_map(case.title, evaluate, grid_for(bunch, overs, ats))
