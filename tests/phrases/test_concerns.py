"""Odds ratios that hang on few cases say so: in words, and beside their row."""

import math
from dataclasses import replace

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf

import plainodds as po
from plainodds.answers.estimate import Estimate
from plainodds.answers.odds import OddsQuestion
from plainodds.phrases import words
from plainodds.phrases.concerns import (
    counted_rows,
    level_cautions,
    sparse_cautions,
    sparse_row,
    unseen_cautions,
)
from tests.answers.checks.fits import invented
from tests.phrases.made import AGE, LINED, MATERIAL, level_facts, odds_answer, odds_row
from tests.phrases.reading import faults

HANGS = (
    "Odds ratios that speak of material PVC (3 events in 14 pipes) hang on few cases of one "
    "outcome."
)


def material(cases=(311.0, 200.0, 14.0), events=(87.0, 50.0, 3.0)):
    return replace(MATERIAL, level_cases=cases, level_events=events)


def answer_of(*rows, facts=None, **more):
    return odds_answer(*rows, predictors=(AGE, facts or material(), LINED), **more)


PVC = odds_row("material", "CI", "PVC", log=0.7)
DUCTILE = odds_row("material", "CI", "DI", log=0.7)


def test_a_row_of_few_events_is_marked_with_its_level():
    subject = answer_of().subject
    assert sparse_row(subject, PVC) == "PVC: 3 events in 14"
    assert sparse_row(subject, DUCTILE) == ""


@pytest.mark.parametrize(
    ("events", "cases", "mark"),
    [
        (5.0, 14.0, ""),
        (4.0, 14.0, "PVC: 4 events in 14"),
        (10.0, 14.0, "PVC: 10 events in 14"),
        (9.0, 14.0, ""),
        (1.0, 1.0, "PVC: 1 event in 1"),
        (0.0, 400.0, "PVC: 0 events in 400"),
        (2.5, 30.0, "PVC: 2.5 events in 30"),
    ],
)
def test_either_outcome_can_be_the_rare_one(events, cases, mark):
    facts = material((311.0, 200.0, cases), (87.0, 50.0, events))
    answer = answer_of(PVC, facts=facts)
    assert sparse_row(answer.subject, PVC) == mark
    assert bool(sparse_cautions(answer)) == bool(mark)


def test_a_reference_of_few_cases_is_marked_too():
    facts = material((9.0, 200.0, 14.0), (2.0, 50.0, 3.0))
    subject = answer_of(facts=facts).subject
    assert sparse_row(subject, PVC) == "PVC: 3 events in 14, cast iron: 2 events in 9"
    assert sparse_row(subject, DUCTILE) == "cast iron: 2 events in 9"


def test_levels_that_nobody_has_counted_and_numbers_are_not_marked():
    subject = answer_of(facts=MATERIAL).subject
    assert sparse_row(subject, PVC) == ""
    assert sparse_row(subject, odds_row()) == ""
    without_rows = material((311.0, 200.0, 0.0), (87.0, 50.0, 0.0))
    assert sparse_row(answer_of(facts=without_rows).subject, PVC) == ""


@pytest.mark.parametrize("audience", ["plain", "technical"])
def test_words_of_odds_say_which_levels_have_few_cases(audience):
    assert HANGS in words(answer_of(PVC, DUCTILE), audience).cautions
    assert HANGS not in words(answer_of(DUCTILE), audience).cautions


def test_a_level_that_a_row_is_given_counts_too():
    row = odds_row(given=(("material", "PVC"), ("lined", False)))
    assert sparse_cautions(answer_of(row)) == (HANGS,)
    assert sparse_row(answer_of(row).subject, row) == ""


def test_each_level_is_named_once_and_many_are_cut_short():
    levels = tuple("abcdefg")
    facts = level_facts(
        levels=levels,
        level_labels=levels,
        level_counts=(100,) * 7,
        level_cases=(100.0,) * 7,
        level_events=(50.0, 1.0, 1.0, 1.0, 1.0, 1.0, 1.0),
    )
    rows = [odds_row("material", "a", level) for level in levels[1:]]
    (caution,) = sparse_cautions(answer_of(*rows, *rows, facts=facts))
    assert caution.count("material b ") == 1
    assert "and 2 more" in caution
    assert faults(caution) == []


def test_where_there_is_no_finite_odds_ratio_its_reason_is_told_instead():
    facts = material((311.0, 200.0, 14.0), (87.0, 50.0, 0.0))
    endless = Estimate(0.0, None, 0.0, 0.42)
    row = replace(PVC, log_odds_ratio=Estimate(-math.inf, None, None, -0.87), odds_ratio=endless)
    answer = answer_of(row, facts=facts)
    assert sparse_cautions(answer) == ()
    assert sparse_row(answer.subject, row) == "PVC: 0 events in 14"
    assert any("no finite odds ratio" in each for each in words(answer).cautions)


def test_of_several_models_only_the_first_ones_rows_are_counted():
    rows = [replace(PVC, model=name) for name in ("crude", "adjusted")]
    question = OddsQuestion(models=("crude", "adjusted"))
    answer = answer_of(*rows, question=question)
    assert counted_rows(answer) == (rows[0],)
    assert sparse_cautions(replace(answer, rows=(rows[1],))) == ()
    assert sparse_cautions(answer) == (HANGS,)


def test_values_that_no_row_has_are_said_to_lie_beyond_the_data():
    row = odds_row(start=40.0, end=150.0, per_step=False)
    told = (
        "Some odds ratios go beyond the data: pipe age 150 years (the data have 0 to 110 years); "
        "there the model speaks on its own."
    )
    assert unseen_cautions(answer_of(row)) == (told,)
    for audience in ("plain", "technical"):
        assert told in words(answer_of(row, row), audience).cautions


def test_a_given_value_can_lie_beyond_the_data_too():
    row = odds_row("material", "CI", "PVC", given=(("age_years", -5.0),))
    assert "pipe age −5 years" in unseen_cautions(answer_of(row))[0]


def test_of_equal_steps_only_the_size_can_go_beyond_the_data():
    assert unseen_cautions(answer_of(odds_row(start=105.0, end=115.0))) == ()
    (told,) = unseen_cautions(answer_of(odds_row(start=0.0, end=200.0)))
    assert "pipe age per 200 years more (the data have 0 to 110 years)" in told
    assert faults(told) == []


def test_without_a_known_range_nothing_is_claimed():
    age = replace(AGE, minimum=math.nan, maximum=math.nan)
    row = odds_row(start=40.0, end=150.0, per_step=False)
    assert unseen_cautions(odds_answer(row, odds_row(end=900.0), predictors=(age,))) == ()


def test_values_within_the_data_are_not_remarked_upon():
    within = odds_row(start=0.0, end=110.0, per_step=False, given=(("material", "PVC"),))
    assert unseen_cautions(answer_of(within, PVC)) == ()


FIGURES_HANG = HANGS.replace("Odds ratios", "Figures")


@pytest.mark.parametrize(
    ("cases", "events", "told"),
    [
        (14.0, 3.0, FIGURES_HANG),
        (14.0, 14.0, "All 14 pipes with material PVC had the event: take"),
        (14.0, 0.0, "None of the 14 pipes with material PVC had the event: take"),
        (1.0, 1.0, "The only pipe with material PVC had the event: take"),
        (14.0, 7.0, ""),
    ],
)
def test_figures_of_a_level_say_what_is_behind_it(cases, events, told):
    facts = material((311.0, 200.0, cases), (87.0, 50.0, events))
    subject = answer_of(facts=facts).subject
    spoken_of = [("material", "PVC"), ("material", "CI"), ("age_years", 40.0), (None, None)]
    cautions = level_cautions(subject, spoken_of * 2)
    assert len(cautions) == bool(told)
    for caution in cautions:
        assert caution.startswith(told)
        assert faults(caution) == []


def test_levels_of_one_outcome_and_levels_of_few_cases_are_told_apart():
    facts = material((311.0, 9.0, 14.0), (87.0, 2.0, 0.0))
    subject = answer_of(facts=facts).subject
    first, second = level_cautions(subject, [("material", "PVC"), ("material", "DI")])
    assert first == (
        "None of the 14 pipes with material PVC had the event: take what the model says of such "
        "pipes with care, intervals most of all."
    )
    assert second == (
        "Figures that speak of material ductile iron (2 events in 9 pipes) hang on few cases of "
        "one outcome."
    )


@pytest.fixture(scope="module")
def alarmed():
    data = invented(300)
    data["alarm"] = data.index < 6
    data.loc[data.alarm, "y"] = 1
    family = sm.families.Binomial()
    return po.FittedLogit(smf.glm("y ~ x + w + alarm", data, family=family).fit())


@pytest.mark.parametrize("audience", ["plain", "technical"])
@pytest.mark.parametrize(
    "ask",
    [
        lambda fit: fit.curve("x", by="alarm"),
        lambda fit: fit.curve("alarm"),
        lambda fit: fit.effects(),
        lambda fit: fit.effects(others="typical"),
        lambda fit: fit.effects(predictors=("x",), by="alarm"),
        lambda fit: fit.change("alarm", False, True, others="typical"),
        lambda fit: fit.change("alarm", False, True),
    ],
)
def test_every_answer_that_speaks_of_a_level_with_one_outcome_says_so(alarmed, ask, audience):
    told = [each for each in words(ask(alarmed), audience).cautions if "alarm yes had" in each]
    assert told == [
        "All 6 cases with alarm yes had the event: take what the model says of such cases with "
        "care, intervals most of all."
    ]


@pytest.mark.parametrize("ask", [lambda fit: fit.curve("x"), lambda fit: fit.change("x", 40, 60)])
def test_an_answer_that_does_not_speak_of_that_level_does_not(alarmed, ask):
    assert not any("alarm yes" in each for each in words(ask(alarmed)).cautions)


def test_a_real_fit_counts_its_own_cases():
    rng = np.random.default_rng(4)
    data = pd.DataFrame({"x": rng.normal(size=400), "site": ["a"] * 380 + ["b"] * 20})
    data["y"] = (rng.uniform(size=400) < 0.4).astype(int)
    data.loc[data.site == "b", "y"] = [1, 1, 1] + [0] * 17
    answer = po.FittedLogit(smf.logit("y ~ x + site", data).fit(disp=0)).odds()
    marks = {row.predictor: sparse_row(answer.subject, row) for row in answer.rows}
    assert marks == {"x": "", "site": "b: 3 events in 20"}
    assert any("site b (3 events in 20 cases)" in each for each in words(answer).cautions)
