"""The map of a case: its bunch, where its words say."""

from dataclasses import replace

from beamfield.describe.map_words import grid_for
from beamfield.estimate.bunch_map import bunch_map
from beamfield.estimate.cathode import mapped
from beamfield.estimate.field_map import field_map
from beamfield.report.map_csv import lines
from beamfield.report.map_file import map_writer, write_map


def draw(case, path, overs=(), ats=(), method=None):
    """Write the map of a case to a file, whole or not at all; InputError for words, endings or places that do not fit.

    overs and ats as describe.map_words reads them; method over the case's own.
    """
    map_writer(path)  # a wrong ending is told before anything is computed
    write_map(path, case_map(case, overs, ats, method))


def table(case, overs=(), ats=(), method=None):
    """The map of a case as one CSV text."""
    return "".join(lines(case_map(case, overs, ats, method)))


def case_map(case, overs=(), ats=(), method=None):
    """FieldMap of a case."""
    grid = grid_for(case.bunch, overs, ats)
    numerics = replace(case.numerics, method=method) if method else case.numerics
    evaluate = mapped(bunch_map(case.bunch, numerics), case.bunch, case.surroundings.cathode)
    return field_map(case.title, evaluate, grid)
