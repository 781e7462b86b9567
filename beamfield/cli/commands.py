"""What each command does: read, ask, write, return."""

from beamfield import api
from beamfield.cli.output import colour, emit, notice, watched
from beamfield.cli.watch import Watch
from beamfield.errors import Exit

COMPILING = "compiling the kernels, once for this machine: up to 20 seconds"


def report(options):
    _watch()
    cases = api.load_all(options.cases)
    outcomes = _evaluate(cases, options)
    emit(api.report_page(outcomes, options.format, colour(options)), options.output)
    return _ending(outcomes)


def check(options):
    _watch()
    cases = api.load_all(options.cases)
    outcomes = _evaluate(cases, options)
    emit(api.check_page(outcomes, options.format, colour(options)))
    return _ending(outcomes)


def map(options):
    _watch()
    case = api.load(options.case)
    if options.output:
        api.draw_map(case, options.output, options.over or (), options.at or (), options.method)
    else:
        emit(api.map_table(case, options.over or (), options.at or (), options.method))
    return Exit.DONE


def explain(options):
    emit(api.explain(options.name))
    return Exit.DONE


def new(options):
    emit(api.starter(options.kind), options.output, fresh=True)
    return Exit.DONE


def schema(_):
    emit(api.schema_page())
    return Exit.DONE


def version(_):
    emit(api.version_line())
    return Exit.DONE


def _watch():
    api.on_compile(lambda: notice(COMPILING))
    if watched():
        api.on_progress(Watch())


def _evaluate(cases, options):
    return [api.evaluate(case, options.method) for case in cases]


def _ending(outcomes):
    return Exit.DONE if all(outcome.met for outcome in outcomes) else Exit.BROKEN
