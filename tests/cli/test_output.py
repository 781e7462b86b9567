"""Pages reach a file whole or not at all, a pipe as UTF-8, and a terminal as it can show them."""

import os
import subprocess
import sys

import pytest

from beamfield.cli import output
from beamfield.cli.output import emit
from beamfield.errors import InputError

ROOT = os.path.dirname(os.path.dirname(os.path.dirname(__file__)))
PAGE = "1.2 µC ± 3 % — β = 0.5\n"
EMIT = f"from beamfield.cli.output import emit; emit({PAGE!a})"


def python(code, **environment):
    """Arguments for a fresh interpreter that runs some code from the root of the project."""
    return {
        "args": [sys.executable, "-W", "error", "-c", code],
        "env": {k: v for k, v in os.environ.items() if k != "PYTHONIOENCODING"} | environment,
        "cwd": ROOT,
    }


def on_a_terminal(code, **environment):
    """What a terminal receives from some code: a pseudo terminal stands in for one."""
    pty = pytest.importorskip("pty")
    ours, theirs = pty.openpty()
    with subprocess.Popen(**python(code, **environment), stdout=theirs, stderr=theirs) as process:
        os.close(theirs)
        chunks = []
        try:
            while chunk := os.read(ours, 4096):
                chunks.append(chunk)
        except OSError:  # how a pseudo terminal says that the other end has gone
            pass
    os.close(ours)
    assert process.returncode == 0
    return b"".join(chunks).replace(b"\r\n", b"\n")


class TestFiles:
    def test_written_whole_and_nothing_beside_it(self, tmp_path):
        emit(PAGE, tmp_path / "page.txt")
        assert (tmp_path / "page.txt").read_bytes() == PAGE.encode()
        assert os.listdir(tmp_path) == ["page.txt"]

    def test_replaced_on_a_second_run(self, tmp_path):
        for page in ("old\n", "new\n"):
            emit(page, tmp_path / "page.txt")
        assert (tmp_path / "page.txt").read_text() == "new\n"

    @pytest.mark.parametrize("trouble", [OSError(28, "No space left on device"), KeyboardInterrupt()])
    def test_what_stood_there_stays_when_writing_fails(self, tmp_path, monkeypatch, trouble):
        (tmp_path / "page.txt").write_text("old\n")

        def half(page, path):
            path.write_text(page[:3])
            raise trouble

        monkeypatch.setattr(output, "_write", half)
        with pytest.raises((InputError, KeyboardInterrupt)):
            emit(PAGE, tmp_path / "page.txt")
        assert (tmp_path / "page.txt").read_text() == "old\n"
        assert os.listdir(tmp_path) == ["page.txt"]

    def test_a_missing_folder_is_a_misread_word(self, tmp_path):
        with pytest.raises(InputError, match="cannot be written: No such file or directory"):
            emit(PAGE, tmp_path / "no" / "page.txt")

    def test_a_folder_is_no_file(self, tmp_path):
        with pytest.raises(InputError, match="cannot be written: Is a directory"):
            emit(PAGE, tmp_path)

    def test_a_link_goes_on_pointing(self, tmp_path):
        (tmp_path / "link").symlink_to(tmp_path / "page.txt")
        emit(PAGE, tmp_path / "link")
        assert (tmp_path / "link").is_symlink()
        assert (tmp_path / "page.txt").read_text(encoding="utf-8") == PAGE

    def test_a_device_is_written_to_not_replaced(self):
        emit(PAGE, os.devnull)
        assert not os.path.isfile(os.devnull)

    def test_a_fresh_file_never_overwrites(self, tmp_path):
        emit(PAGE, tmp_path / "case.yaml", fresh=True)
        with pytest.raises(InputError, match="exists already"):
            emit("other\n", tmp_path / "case.yaml", fresh=True)
        assert (tmp_path / "case.yaml").read_text(encoding="utf-8") == PAGE

    @pytest.mark.usefixtures("made_up")
    def test_the_command_line_writes_there_and_says_nothing(self, run, tmp_path):
        path = tmp_path / "page.txt"
        assert run("report", "ring.yaml", "-o", str(path)) == (0, "", "")
        assert path.read_text(encoding="utf-8") == run("report", "ring.yaml")[1]
        code, out, err = run("report", "ring.yaml", "-o", str(tmp_path))
        assert (code, out, err.count("\n")) == (2, "", 1)


class TestStreams:
    @pytest.mark.parametrize("environment", [{}, {"PYTHONIOENCODING": "ascii"}, {"LC_ALL": "C", "PYTHONUTF8": "0"}])
    def test_a_pipe_gets_utf8_whatever_the_locale(self, environment):
        result = subprocess.run(**python(EMIT, **environment), capture_output=True, check=True)
        assert (result.stdout, result.stderr) == (PAGE.encode(), b"")

    def test_a_terminal_gets_letters_it_can_show(self):
        assert on_a_terminal(EMIT, PYTHONIOENCODING="utf-8") == PAGE.encode()
        assert on_a_terminal(EMIT, PYTHONIOENCODING="ascii") == b"1.2 uC +- 3 % - beta = 0.5\n"

    def test_a_name_that_is_no_text_becomes_an_escape(self, tmp_path, capsysbinary):
        emit("bad \udcff\n", tmp_path / "page.txt")
        emit("bad \udcff\n")
        assert (tmp_path / "page.txt").read_bytes() == capsysbinary.readouterr().out == b"bad \\udcff\n"

    def test_a_reader_that_leaves_early_is_no_fault(self):
        code = "from beamfield.cli.output import emit\nfor _ in range(3): emit('x' * 1_000_000)"
        with subprocess.Popen(**python(code), stdout=subprocess.PIPE, stderr=subprocess.PIPE) as process:
            process.stdout.read(10)
            process.stdout.close()
            assert process.stderr.read() == b""
        assert process.returncode == 0

    @pytest.mark.skipif(not os.path.exists("/dev/full"), reason="no device that is always full")
    def test_a_full_disk_is_one_line_and_2(self):
        code = "from beamfield.cli.entry import main; raise SystemExit(main(['--version']))"
        with open("/dev/full", "wb") as full:
            result = subprocess.run(**python(code), stdout=full, stderr=subprocess.PIPE)
        assert result.returncode == 2
        assert result.stderr == b"beamfield: standard output cannot be written: No space left on device\n"

    def test_closed_standard_output_is_one_line_and_2(self):
        code = (
            "import sys; sys.stdout = None\nfrom beamfield.cli.entry import main; raise SystemExit(main(['--version']))"
        )
        result = subprocess.run(**python(code), capture_output=True)
        assert result.returncode == 2
        assert result.stderr == b"beamfield: standard output is closed\n"


class TestColour:
    ASK = "import sys; from beamfield.cli.output import colour; sys.stdout.write(str(colour({options})))"

    def ask(self, options="None", **environment):
        plain = {"NO_COLOR": "", "TERM": "xterm"}
        return on_a_terminal(self.ASK.format(options=options), **(plain | environment)) == b"True"

    def test_on_a_terminal_only_and_only_where_nobody_says_no(self):
        assert self.ask()
        assert not self.ask(NO_COLOR="1")
        assert not self.ask(TERM="dumb")
        assert not self.ask(options="__import__('argparse').Namespace(output='page.txt')")

    @pytest.mark.usefixtures("made_up")
    def test_never_in_a_pipe(self, run):
        assert "\x1b" not in run("report", "overfull.yaml")[1]


class TestNotice:
    NOTE = "from beamfield.cli.output import notice; notice('this takes a while')"

    def test_a_terminal_is_told(self):
        assert on_a_terminal(self.NOTE) == b"beamfield: this takes a while\n"

    def test_a_pipe_is_not(self):
        result = subprocess.run(**python(self.NOTE), capture_output=True, check=True)
        assert (result.stdout, result.stderr) == (b"", b"")
