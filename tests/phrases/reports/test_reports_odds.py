"""The report table of odds ratios: counts, references and tests beside the figures."""

import csv
import io
from dataclasses import replace

import pytest

import plainodds as po
from tests.drawings import made


def rows_of(answer, **options):
    table = po.report_table(answer, **options)
    return table, {row.cells[0]: row.cells[1:] for row in table.rows if row.kind != "heading"}


def test_events_and_cases_have_columns_before_the_figures():
    table, rows = rows_of(made.odds_printed())
    assert table.columns == ("Predictor", "Events", "Pipes", "Odds ratio (95% interval)", "p-value")
    assert rows["moderate"] == ("262", "2,350", "1.51 (1.17 to 1.94)", "0.010")
    assert rows["low"] == ("267", "2,410", "1 (reference)", "")
    assert rows["per 50 mm more"][:2] == ("", "")


def test_the_test_of_interaction_is_a_row_with_its_p_value():
    _, rows = rows_of(made.odds_printed())
    found = rows["Test of interaction with material, Wald test on 2 degrees of freedom"]
    assert found == ("", "", "", "0.031")


def test_with_several_models_the_p_value_stands_in_its_models_column():
    table, rows = rows_of(made.odds_printed(made.odds_of_models()))
    name = "Test of interaction with material, model “adjusted”, Wald test on 2 degrees of freedom"
    assert rows[name] == ("", "", "", "p-value 0.031")
    assert "Counts are of the model “crude”" in " ".join(table.notes)


def test_levels_by_a_number_are_told_in_full_beneath_their_counts():
    table, rows = rows_of(made.odds_printed(made.odds_by_level(), tests=False))
    assert table.rows[0].cells == ("Soil corrosivity, by pipe age",)
    assert rows["moderate"] == ("262", "2,350", "", "")
    assert rows["moderate; 41 years"][:2] == ("", "")
    assert rows["moderate; 41 years"][2].startswith("1.65 (")


def test_few_events_are_withheld_and_a_note_says_so():
    table, rows = rows_of(made.odds_printed(made.odds_nasty()))
    assert rows["$_"][:2] == ("–", "up to 10")
    assert rows["_$_"][:2] == ("–", "20")
    assert "– among the events: fewer than 10" in " ".join(table.notes)
    table, rows = rows_of(made.odds_printed(made.odds_nasty()), smallest_cell=1)
    assert rows["$_"][:2] == ("1", "10")
    assert "among the events" not in " ".join(table.notes)


def test_without_counts_the_columns_are_those_of_the_figures():
    table, _ = rows_of(made.odds_printed(counts=False))
    assert table.columns == ("Predictor", "Odds ratio (95% interval)", "p-value")


def test_with_cases_and_no_events_only_cases_are_shown():
    answer = made.odds_printed()
    facts = tuple(replace(each, level_events=()) for each in answer.subject.predictors)
    answer = replace(answer, subject=replace(answer.subject, predictors=facts))
    table, rows = rows_of(answer)
    assert table.columns[:3] == ("Predictor", "Pipes", "Odds ratio (95% interval)")
    assert rows["low"][0] == "2,410"


@pytest.mark.parametrize(
    "answer",
    [made.odds_printed(), made.odds_printed(made.odds_of_models()),
     made.odds_printed(made.odds_by_level()), made.odds_printed(made.odds_nasty())],
)  # fmt: skip
def test_every_row_has_as_many_cells_as_there_are_columns(answer):
    table = po.report_table(answer)
    assert {len(row.cells) for row in table.rows if row.kind != "heading"} == {len(table.columns)}
    read = list(csv.reader(io.StringIO(table.csv(), newline="")))
    assert "0.031" in table.csv() or not answer.interactions
    assert any(len(row) == len(table.columns) + 1 for row in read)
