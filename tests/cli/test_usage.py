"""A wrong word on the command line gets one clear line and exit code 2; help gets a page and 0."""

import pytest

from beamfield.cli.usage import COMMANDS

MISTAKES = {
    "": "which command? One of report, check, map, explain, new, schema",
    "reprot ring.yaml": "there is no command 'reprot'; did you mean 'report'?",
    "--verson": "there is no option '--verson'; did you mean '--version'?",
    "zzz": "there is no command 'zzz' (see",
    "report": "the following arguments are required: CASE",
    "report ring.yaml --fromat json": "there is no option '--fromat'; did you mean '--format'?",
    "report ring.yaml --format jsn": "'jsn' is not one of text, json; did you mean 'json'?",
    "report ring.yaml --format": "argument --format: expected one argument",
    "report ring.yaml --method close-form": "did you mean 'closed-form'?",
    "report ring.yaml --meth closed-form": "there is no option '--meth'; did you mean '--method'?",
    "check ring.yaml -o x": "there is no option '-o'",
    "explain tune_shift_x tune_shift_y": "'tune_shift_y' is one word too many",
    "explain tune_shft_y": "there is no result 'tune_shft_y'; did you mean 'tune_shift_y'?",
    "schema now": "'now' is one word too many",
}


@pytest.mark.parametrize(("line", "message"), MISTAKES.items())
def test_a_mistake_is_one_line_and_exit_2(run, line, message):
    code, out, err = run(*line.split())
    assert (code, out) == (2, "")
    assert err.startswith("beamfield")
    assert err.count("\n") == 1
    assert message in err
    assert err.rstrip().endswith(" --help')") or "'beamfield explain')" in err


def test_a_word_cannot_steer_the_terminal_or_break_the_line(run):
    code, _, err = run("rep\x1b[31mort\nall is well")
    assert code == 2
    assert err.count("\n") == 1
    assert "\x1b" not in err


@pytest.mark.parametrize("flag", ["-h", "--help"])
def test_help_names_every_command_and_exit_code(run, flag):
    code, out, err = run(flag)
    assert (code, err) == (0, "")
    assert all(f"beamfield {name} " in out for name in COMMANDS)
    assert all(f"{number} " in out for number in range(4))
    assert all(len(line) <= 110 for line in out.splitlines())


@pytest.mark.parametrize("name", COMMANDS)
def test_every_command_has_help(run, name):
    code, out, err = run(name, "--help")
    assert (code, err) == (0, "")
    assert out.startswith(f"usage: beamfield {name}")
    assert COMMANDS[name].summary in " ".join(out.split())


def test_version_names_the_constants(run):
    assert run("--version") == (0, "beamfield 0.1.0 (CODATA 2022)\n", "")
