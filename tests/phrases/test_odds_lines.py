"""The lines of a printed table of odds ratios."""

from dataclasses import replace

import pytest

import plainodds as po
from plainodds.phrases.joined_tests import joined_test, statistic_words
from plainodds.phrases.numbers import Marks, marking
from plainodds.phrases.odds_lines import Counts, odds_lines
from tests.drawings import made


def told(answer):
    return [(line.kind, line.depth, line.name, line.rest) for line in odds_lines(answer)]


def test_levels_stand_beneath_their_predictor_with_the_reference_first():
    rows = [row for row in made.odds_rows() if row.predictor == "soil"]
    assert told(made.odds_answer(rows)) == [
        ("heading", 0, "Soil corrosivity", ""),
        ("reference", 1, "low", ""),
        ("entry", 1, "moderate", ""),
        ("entry", 1, "high", ""),
    ]


def test_a_number_is_one_line_with_its_change():
    rows = [row for row in made.odds_rows() if row.predictor == "pressure_m"]
    assert told(made.odds_answer(rows)) == [("entry", 0, "Pressure", "from 38 to 58 m")]


def test_a_number_by_a_modifier_has_a_line_for_each_of_its_values():
    answer = made.odds_printed(made.odds_answer(made.odds_rows()[:3]))
    assert told(answer) == [
        ("heading", 0, "Pipe age", "per 10 years more, by material"),
        ("entry", 1, "cast iron", ""),
        ("entry", 1, "ductile iron", ""),
        ("entry", 1, "PVC", ""),
        ("test", 1, "Test of interaction with material, Wald test on 2 degrees of freedom", ""),
    ]
    counts = [line.counts for line in odds_lines(answer)]
    assert counts[1:4] == [Counts(301.0, 2714.0), Counts(201.0, 1806.0), Counts(166.0, 1480.0)]


def test_levels_by_a_number_name_the_level_and_its_counts_once():
    lines = odds_lines(made.odds_printed(made.odds_by_level(), tests=False))
    assert [(line.kind, line.name) for line in lines] == [
        ("heading", "Soil corrosivity"), ("reference", "low"),
        ("level", "moderate"), ("entry", "18 years"), ("entry", "41 years"), ("entry", "63 years"),
        ("level", "high"), ("entry", "18 years"), ("entry", "41 years"), ("entry", "63 years"),
    ]  # fmt: skip
    assert lines[0].rest == "by pipe age"
    assert {line.level for line in lines if line.depth == 2} == {"moderate", "high"}
    with_counts = [line.name for line in lines if line.counts is not None]
    assert with_counts == ["low", "moderate", "high"]


def test_one_value_of_a_modifier_is_said_in_the_heading():
    rows = [row for row in made.odds_rows() if row.predictor == "material"]
    heading, reference, *entries = odds_lines(made.odds_printed(made.odds_answer(rows)))
    assert (heading.name, heading.rest) == ("Material", "given pipe age 41 years")
    assert [line.kind for line in entries] == ["entry", "entry", "test"]
    assert reference.counts == Counts(301.0, 2714.0)


def test_every_row_stands_in_exactly_one_line_in_any_order():
    answer = made.odds_of_models()
    shuffled = replace(answer, rows=answer.rows[::-1])
    for each in (answer, shuffled):
        shown = [row for line in odds_lines(each) for row in line.rows]
        assert sorted(map(id, shown)) == sorted(map(id, each.rows))
        named = [line.predictor for line in odds_lines(each) if line.depth == 0]
        assert len(named) == len(set(named))


def test_a_model_without_the_interaction_has_a_line_for_every_value():
    rows = list(made.odds_rows("joined")[:3])
    rows.append(made.odds_row("age_years", 41.0, 51.0, 0.2, 0.1, per_step=True, model="plain"))
    answer = made.odds_answer(rows, models=("joined", "plain"))
    names = [line.name for line in odds_lines(answer) if line.kind == "entry"]
    assert names == ["cast iron", "ductile iron", "PVC", "at every value"]


def test_values_of_two_modifiers_are_named_in_full():
    rows = [
        made.odds_row("age_years", 41.0, 51.0, 0.2, 0.1, per_step=True,
                      given=(("material", material), ("soil", soil)))
        for material in ("PVC", "cast iron") for soil in ("low", "high")
    ]  # fmt: skip
    lines = odds_lines(made.odds_printed(made.odds_answer(rows), tests=False))
    assert lines[0].rest == "per 10 years more"
    assert lines[1].name == "material PVC, soil corrosivity low"
    assert all(line.counts is None for line in lines), "no level has the counts of a combination"


def test_two_values_against_different_starts_have_no_reference():
    rows = [made.odds_row("soil", "low", "high", 0.2, 0.1),
            made.odds_row("soil", "high", "moderate", 0.2, 0.1)]  # fmt: skip
    lines = odds_lines(made.odds_answer(rows))
    assert [line.kind for line in lines] == ["heading", "entry", "entry"]
    assert lines[1].name == "high against low"


def test_without_the_outcome_cases_are_known_and_events_are_not():
    answer = made.odds_printed()
    facts = tuple(replace(each, level_events=()) for each in answer.subject.predictors)
    answer = replace(answer, subject=replace(answer.subject, predictors=facts))
    counts = [line.counts for line in odds_lines(answer) if line.counts is not None]
    assert counts
    assert all(each.events is None and each.cases > 0 for each in counts)


@pytest.mark.parametrize(
    ("changed", "words"),
    [
        ({}, "χ² = 6.93 on 2 degrees of freedom, p-value 0.031"),
        ({"degrees_of_freedom": 1}, "χ² = 6.93 on 1 degree of freedom, p-value 0.031"),
        ({"denominator": 1240.0}, "F = 6.93 on 2 and 1,240 degrees of freedom, p-value 0.031"),
    ],
)
def test_a_test_is_told_with_its_degrees_of_freedom(changed, words):
    (found, *_) = made.odds_printed().interactions
    assert statistic_words(replace(found.test, **changed)) == words


def test_a_test_is_named_and_follows_the_marks_of_numbers():
    answer = made.odds_printed()
    test = answer.interactions[0].test
    names = "age_years", "material"
    told = joined_test(answer.subject, names, replace(test, kind="likelihood_ratio"))
    assert told.startswith("Likelihood-ratio test that no term joins pipe age and material: χ²")
    with marking(Marks(",", ".")):
        assert "χ² = 6,93" in joined_test(answer.subject, names, test)


def test_the_caption_says_what_the_printed_table_has_more_of():
    answer = made.odds_printed()
    told = po.caption(answer)
    assert "Counted beside each level: events and pipes." in told
    assert "Tests of interaction are of all terms that the two predictors share." in told
    assert "Counted" not in po.caption(made.odds_answer())
    assert "Counted" not in po.caption(made.odds_printed(counts=False))
    with po.writing("de"):
        assert "Neben jeder Stufe gezählt: Ereignisse und pipes." in po.caption(answer)


@pytest.mark.parametrize(
    ("language", "words"),
    [
        ("en", "Wald test that no term joins pipe age and material: χ² = 6.93 on 2 degrees of "
               "freedom, p-value 0.031"),
        ("de", "χ² = 6,93 bei 2 Freiheitsgraden, p-Wert 0,031"),
    ],
)  # fmt: skip
def test_technical_words_tell_the_test_with_its_statistic(language, words):
    answer, models = made.odds_printed(), made.odds_printed(made.odds_of_models())
    with po.writing(language):
        assert words in str(po.words(answer, "technical"))
        assert words not in str(po.words(answer))
        assert str(po.words(models, "technical")).count("χ²") == 2
