"""What each command does: read, ask, write, return."""

from beamfield import api
from beamfield.cli.output import colour, emit, notice
from beamfield.errors import Exit

COMPILING = "compiling the kernels, once for this machine: up to 20 seconds"


def report(options):
    cases = api.load_all(options.cases)
    outcomes = _evaluate(cases, options)
    emit(api.report_page(outcomes, options.format, colour(options)), options.output)
    return _ending(outcomes)


def check(options):
    cases = api.load_all(options.cases)
    outcomes = _evaluate(cases, options)
    emit(api.check_page(outcomes, options.format, colour(options)))
    return _ending(outcomes)


def map(options):
    case = api.load(options.case)
    api.on_compile(lambda: notice(COMPILING))
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


def _evaluate(cases, options):
    api.on_compile(lambda: notice(COMPILING))
    return [api.evaluate(case, options.method) for case in cases]


def _ending(outcomes):
    return Exit.DONE if all(outcome.met for outcome in outcomes) else Exit.BROKEN
