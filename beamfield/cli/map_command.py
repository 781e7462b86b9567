"""The command that draws maps."""

from beamfield import api
from beamfield.cli.output import emit, notice
from beamfield.errors import Exit


def map_(options):
    case = api.load(options.case)
    api.on_compile(notice)
    if options.output:
        api.draw_map(case, options.output, options.over, options.at)
    else:
        emit(api.map_table(case, options.over, options.at))
    return Exit.DONE
