"""Every result can be looked up, and the README lists what the catalogue lists."""

from pathlib import Path

import pytest

from beamfield.errors import Exit, InputError
from beamfield.estimate.catalogue import CATALOGUE, QUESTIONS
from beamfield.report.explain_page import explain_page, results_table

README = Path(__file__).parents[2] / "README.md"


def test_the_list_names_all_and_fits():
    page = explain_page()
    assert all(f"\n  {name} " in page for name in CATALOGUE)
    assert all(question in page for question in QUESTIONS.values())
    assert all(len(line) <= 100 for line in page.splitlines())


@pytest.mark.parametrize("name", CATALOGUE)
def test_one_in_full(name):
    entry, page = CATALOGUE[name], explain_page(name)
    said = " ".join(page.split())
    for text in (entry.name, entry.definition, entry.formula, entry.domain, entry.source):
        assert " ".join(text.split()) in said
    assert all(len(line) <= 100 for line in page.splitlines())


def test_a_near_miss_gets_a_hint():
    with pytest.raises(InputError, match=r"no result 'tuneshift_y'; did you mean 'tune_shift_y'\?") as caught:
        explain_page("tuneshift_y")
    assert caught.value.exit is Exit.MISREAD


def test_the_readme_lists_the_catalogue():
    """Renew it with: python -c "from beamfield.report.explain_page import results_table as t; print(t())"."""
    text = README.read_text(encoding="utf-8")
    _, _, rest = text.partition("<!-- results -->\n")
    assert rest.partition("\n<!-- end of results -->")[0] == results_table()
