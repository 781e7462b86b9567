"""The README tells the truth: its outputs are what its commands print, its table is the catalogue, its Python runs.

Renew outputs and table after a change that is meant with: python -m tests.test_readme
"""

import io
import re
from contextlib import redirect_stdout
from pathlib import Path

import pytest

from beamfield.cli.entry import main
from beamfield.report.explain_page import results_table

ROOT = Path(__file__).parents[1]
README = ROOT / "README.md"
OUTPUT = re.compile(
    r"(?<=<!-- output of: beamfield )(?P<words>.+)(?P<open> -->\n```text\n)(?P<text>.*?)(?=```\n)", re.DOTALL
)
TABLE = re.compile(r"(?<=<!-- results -->\n)(?P<table>.*?)(?=<!-- end of results -->)", re.DOTALL)
PYTHON = re.compile(r"```python\n(.*?)```\n", re.DOTALL)


def printed(words):
    """What `beamfield WORDS` prints in the root of the project."""
    stream = io.TextIOWrapper(io.BytesIO(), encoding="utf-8")
    with redirect_stdout(stream):
        assert main(words.split()) == 0
    return stream.buffer.getvalue().decode()


def renewed(text):
    text = OUTPUT.sub(lambda found: found["words"] + found["open"] + printed(found["words"]), text)
    return TABLE.sub(lambda _: results_table() + "\n", text)


@pytest.fixture
def text(monkeypatch):
    monkeypatch.chdir(ROOT)
    return README.read_text(encoding="utf-8")


def test_shown_outputs_are_what_the_commands_print(text):
    shown = list(OUTPUT.finditer(text))
    assert shown
    for found in shown:
        assert found["text"] == printed(found["words"]), "renew it with: python -m tests.test_readme"


def test_the_table_is_the_catalogue(text):
    assert TABLE.search(text)["table"] == results_table() + "\n", "renew it with: python -m tests.test_readme"


def test_its_python_runs(text):
    blocks = PYTHON.findall(text)
    assert blocks
    scope = {}
    for block in blocks:
        exec(compile(block, "README.md", "exec"), scope)  # noqa: S102 - our own page


def test_its_cases_exist_and_its_commands_are_two(text):
    assert text.count("<!-- first command -->\n```sh\n") == text.count("<!-- second command -->\n```sh\n") == 1
    assert all((ROOT / case).is_file() for case in re.findall(r"configs/[\w.]+", text))


if __name__ == "__main__":
    README.write_text(renewed(README.read_text(encoding="utf-8")), encoding="utf-8")
