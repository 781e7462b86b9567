"""The Python door: load a case, evaluate it, ask for fields; and the pages that the command line prints.

What is heavy is imported by the function that needs it, so that help, a schema and a misread case come quickly.
"""

from beamfield import __version__
from beamfield.constants import DATA_SET
from beamfield.errors import BeamfieldError, InputError

__all__ = ["BeamfieldError", "InputError", "check_page", "draw_map", "evaluate", "explain"]
__all__ += ["field_against_straight", "field_of_others", "force_of_others", "load", "load_all", "map_table"]
__all__ += ["on_compile", "on_progress"]
__all__ += ["report_page", "schema", "schema_page", "self_field", "starter", "superpose", "version_line"]


def load(path):
    """Case in the file at `path`, checked; InputError with every fault found."""
    from beamfield.describe import case

    return case.load(path)


def load_all(paths):
    """Cases in several files; InputError with the faults of all of them, in order."""
    cases, faults = [], []
    for path in paths:
        try:
            cases.append(load(path))
        except InputError as error:
            faults += error.faults
    if faults:
        raise InputError(*faults)
    return cases


def evaluate(case, method=None):
    """Outcome of a case: every result that applies, and the verdicts on its limits; method over the case's own."""
    from dataclasses import replace

    from beamfield.estimate.answer import answer, checks
    from beamfield.judge.limit import judge
    from beamfield.judge.outcome import Outcome

    numerics = replace(case.numerics, method=method) if method else case.numerics
    findings = answer(case.bunch, case.surroundings, case.ring, numerics)
    verdicts = tuple(judge(limit, findings[limit.result].value) for limit in case.limits)
    return Outcome(case.title, case.file, findings, verdicts, case.warnings, checks(case.bunch, findings), case.bunch)


def self_field(case, points):
    """The bunch's own Field at points (3, M) [m] about its centre: E [V/m], B [T], doubt, closed_form (E or None).

    Own alone: neither its train nor a bunch that it meets is in it, nor a chamber; before a cathode its mirror image
    is.
    """
    from beamfield.estimate import source, superposition

    return source.self_field(case.bunch, case.numerics, superposition.rows("points", points), case.surroundings.cathode)


def field_of_others(case, points):
    """Field, now, of all the other bunches of a case, its train's and the one it meets, at points as self_field.

    The bunch's own field is not in it: the two add up to the whole.
    """
    from beamfield.estimate import companions, superposition

    return companions.field_of_others(
        case.bunch, case.surroundings, case.numerics, superposition.rows("points", points)
    )


def force_of_others(case, points):
    """Force q (E + v x B) (3, M) [N] of the same on particles of the bunch, free of the difference of near equals."""
    from beamfield.estimate import companions, superposition

    return companions.force_of_others(
        case.bunch, case.surroundings, case.numerics, superposition.rows("points", points)
    )


def superpose(points, positions, charges, momenta, cloud=0.0, method="auto", tolerance=1e-4):
    """Lab-frame field, now, of N uniformly moving charges; see beamfield.estimate.superposition."""
    from beamfield.estimate import superposition

    return superposition.superpose(points, positions, charges, momenta, cloud, method, tolerance)


def draw_map(case, path, over=(), at=(), method=None):
    """Write the field, the force and the potentials of a case's bunch to a .csv, .npz, .h5, .vti or .png file.

    over, texts such as 'x' or 'z = -40 .. 40 mm, 401', one an axis: a line, a plane or a box; at, 'y = 2 mm' elsewhere.
    """
    from beamfield.study import case_map

    case_map.draw(case, path, over, at, method)


def map_table(case, over=(), at=(), method=None):
    """The same map as one CSV text."""
    from beamfield.study import case_map

    return case_map.table(case, over, at, method)


def field_against_straight(points, positions, charges, beta_gamma, past, lengths):
    """How the field settles with the length of straight flight out of a bend or from a cathode; see past_motion."""
    from beamfield.estimate import past_motion

    return past_motion.field_against_straight(points, positions, charges, beta_gamma, past, lengths)


def report_page(outcomes, form="text", colour=False):
    """Findings and verdicts of cases as one page; form: text or json."""
    from beamfield.report import pages

    return pages.report_page(outcomes, form, colour)


def check_page(outcomes, form="text", colour=False):
    """Verdicts of cases as one page; form: text or json."""
    from beamfield.report import pages

    return pages.check_page(outcomes, form, colour)


def explain(name=None):
    """Page on one result, or the list of all."""
    from beamfield.report.explain_page import explain_page

    return explain_page(name)


def starter(kind=None):
    """Text of a commented case to start from."""
    from beamfield.describe import starter

    return starter.starter(kind) if kind else starter.starter()


def schema():
    """JSON Schema of a case, as plain data."""
    from beamfield.describe.schema import schema

    return schema()


def schema_page():
    """JSON Schema of a case, as text."""
    from beamfield.report.json_page import dump

    return dump(schema())


def version_line():
    """Name, version and the set of constants."""
    return f"beamfield {__version__} ({DATA_SET})\n"


def on_progress(watcher):
    """Call watcher(what, fraction) now and then while something long is read or computed."""
    from beamfield import progress

    progress.watcher = watcher


def on_compile(tell):
    """Call tell() once, when machine code has to be made because none is kept."""
    from beamfield.kernels import notice

    notice.tell = tell
