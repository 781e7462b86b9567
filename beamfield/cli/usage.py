"""Words of a command line -> the name of a command and its options; or one line that says what may have been meant."""

import argparse
from dataclasses import dataclass

from beamfield.cli.output import emit
from beamfield.errors import InputError, did_you_mean

HELP = """\
beamfield: how strongly a bunch of charged particles pushes on itself

{commands}

  beamfield COMMAND --help     the options of a command
  beamfield --version          the version, and the constants it computes with

Start with      beamfield new > case.yaml && beamfield report case.yaml
Exit codes      0 done and met · 1 a fault of the program · 2 misread input or usage · 3 a limit broken
"""


@dataclass(frozen=True, slots=True)
class Command:
    """What follows the name in its usage line, what it does, and its arguments as argparse takes them."""

    usage: str
    summary: str
    arguments: tuple[tuple[tuple[str, ...], dict], ...] = ()


def _choice(*words):
    """An argparse type: one of a few words, case and near misses forgiven only in the message."""

    def check(word):
        if word not in words:
            raise argparse.ArgumentTypeError(f"{word!r} is not one of {', '.join(words)}{did_you_mean(word, words)}")
        return word

    return check


_CASES = (("cases",), {"nargs": "+", "metavar": "CASE", "help": "case files"})
_FORMAT = (
    ("--format",),
    {"type": _choice("text", "json"), "default": "text", "metavar": "text|json", "help": "kind of page"},
)
_METHOD = (
    ("--method",),
    {
        "type": _choice("superposition", "closed-form"),
        "metavar": "superposition|closed-form",
        "help": "the road to the values, over the one the case names",
    },
)
_OUTPUT = (
    ("-o", "--output"),
    {"metavar": "FILE", "help": "write there, whole or not at all, instead of to standard output"},
)
_NAME = (("name",), {"nargs": "?", "metavar": "NAME", "help": "a result, such as tune_shift_y; none: list them all"})
_KIND = (("kind",), {"nargs": "?", "metavar": "KIND", "help": "the kind of case; none: the plainest"})
_CASE = (("case",), {"metavar": "CASE", "help": "case file"})
_OVER = (
    ("--over",),
    {
        "action": "append",
        "metavar": "SPAN",
        "help": "an axis to go along, 'x' or 'x = -15 .. 15 mm, 201'; two of them for a plane, three for a box",
    },
)
_AT = (
    ("--at",),
    {"action": "append", "metavar": "PLACE", "help": "where to stay, 'y = 2 mm', on an axis not gone along; else 0"},
)
_MAP_FILE = (
    ("-o", "--output"),
    {"metavar": "FILE", "help": "FILE.csv, .npz, .h5, .vti or .png; without one, a table to standard output"},
)

COMMANDS = {
    "report": Command(
        "CASE…", "evaluate cases and print what their bunches do to themselves", (_CASES, _FORMAT, _METHOD, _OUTPUT)
    ),
    "check": Command(
        "CASE…",
        "hold cases against their limits: one line each, exit code 3 when one is broken",
        (_CASES, _FORMAT, _METHOD),
    ),
    "map": Command(
        "CASE",
        "field, force and potentials of a bunch on a line, plane or box",
        (_CASE, _OVER, _AT, _METHOD, _MAP_FILE),
    ),
    "explain": Command("[NAME]", "define a result: formula, domain, source", (_NAME,)),
    "new": Command("[KIND]", "print a commented case to start from", (_KIND, _OUTPUT)),
    "schema": Command("", "print the JSON Schema of a case, for editors"),
}


class Parser(argparse.ArgumentParser):
    """Complains in one line, and prints help where pages go."""

    def error(self, message):
        raise InputError(f"{self.prog}: {message} (see '{self.prog} --help')")

    def print_help(self, file=None):
        emit(self.format_help())


def parse(argv):
    """Name of the command and its options."""
    if argv[:1] in (["-h"], ["--help"]):
        emit(_help())
        raise SystemExit
    if argv[:1] == ["--version"]:
        return "version", None
    name = _known(argv[0] if argv else "")
    return name, _options(name, argv[1:])


def _help():
    return HELP.format(
        commands="\n".join(f"  {f'beamfield {name} {c.usage}':29}{c.summary}" for name, c in COMMANDS.items())
    )


def _known(word):
    if not word:
        raise InputError(f"beamfield: which command? One of {', '.join(COMMANDS)} (see 'beamfield --help')")
    if word not in COMMANDS:
        kind = "option" if word.startswith("-") else "command"
        hint = did_you_mean(word, [*COMMANDS, "--help", "--version"])
        raise InputError(f"beamfield: there is no {kind} {word!r}{hint} (see 'beamfield --help')")
    return word


def _options(name, words):
    parser = Parser(prog=f"beamfield {name}", description=COMMANDS[name].summary, allow_abbrev=False)
    for flags, settings in COMMANDS[name].arguments:
        parser.add_argument(*flags, **settings)
    options, left_over = parser.parse_known_args(words)
    if left_over:
        parser.error(_unknown(left_over[0], parser))
    return options


def _unknown(word, parser):
    if not word.startswith("-"):
        return f"{word!r} is one word too many"
    flags = [flag for action in parser._actions for flag in action.option_strings]
    return f"there is no option {word!r}{did_you_mean(word, flags)}"
