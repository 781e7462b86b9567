"""Every result can be looked up, in a line of the list or in full."""

import pytest

from beamfield.errors import Exit, InputError
from beamfield.estimate.catalogue import CATALOGUE, QUESTIONS
from beamfield.report.explain_page import explain_page, results_table


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


def test_the_table_has_a_row_for_each():
    rows = results_table().splitlines()[2:]
    assert [row.split("`")[1] for row in rows] == list(CATALOGUE)
    assert all(row.count("|") == 4 for row in rows)
