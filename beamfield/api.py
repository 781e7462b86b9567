"""The Python door: load a case, evaluate it, ask for fields; and the pages that the command line prints.

What is heavy is imported by the function that needs it, so that help, a schema and a misread case come quickly.
"""

from beamfield import __version__
from beamfield.constants import DATA_SET
from beamfield.errors import BeamfieldError, InputError

__all__ = ["BeamfieldError", "InputError", "check_page", "evaluate", "explain", "load", "load_all", "on_compile"]
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
    """The bunch's own Field at points (3, M) [m] about its centre: E [V/m], B [T], doubt, closed_form (E or None)."""
    from beamfield.estimate import source, superposition

    return source.self_field(case.bunch, case.numerics, superposition.rows("points", points))


def superpose(points, positions, charges, momenta, cloud=0.0, method="auto", tolerance=1e-4):
    """Lab-frame field, now, of N uniformly moving charges; see beamfield.estimate.superposition."""
    from beamfield.estimate import superposition

    return superposition.superpose(points, positions, charges, momenta, cloud, method, tolerance)


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


def on_compile(tell):
    """Call tell() once, when machine code has to be made because none is kept."""
    from beamfield.kernels import notice

    notice.tell = tell
