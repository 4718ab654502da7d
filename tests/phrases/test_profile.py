"""Profiles in words: the chance, both its sides, what differs, and how familiar it is."""

import math
from dataclasses import replace
from itertools import product

import pytest

from plainodds.answers.estimate import Estimate
from plainodds.answers.familiarity import Familiarity
from plainodds.phrases import alternative, words
from tests.phrases.made import FAMILIAR, PREDICTORS, profile_answer
from tests.phrases.reading import faults, says, unaccounted

PAIRS = [(-1.5, -2.4), (-2.4, -1.5), (0.0, 0.0), (-8.0, -7.9), (30.0, -30.0), (-1.0, -1.001)]
AGAINST = (None, (("age_years", 20.0), ("material", "PVC")))


def numbers_of(answer):
    known = [answer.question.level, 0.1, answer.subject.rows, 0.99, len(answer.ledger)]
    known += [1, 99, 999, 9_999, 100, 1_000, 10_000]
    estimates = []
    for point in (answer.point, answer.start):
        estimates += [point.linear_predictor, point.odds, point.probability]
        known += [float(value) for _, value in point.values if isinstance(value, float)]
        known.append(point.familiarity.rows_alike)
        p = point.probability
        sides = [each for each in (p.estimate, p.lower, p.upper) if each is not None]
        sides += [1 - each for each in sides]
        known += sides
        known += [round(each * over) for each in sides for over in (100, 1_000, 10_000)]
    if answer.comparison:
        compared = answer.comparison
        estimates += [compared.odds_ratio, compared.risk_difference, compared.risk_ratio]
    for row in answer.ledger:
        estimates += [row.adds, row.multiplies]
    for each in estimates:
        parts = (each.estimate, each.se, each.lower, each.upper)
        known += [part for part in parts if part is not None]
    for facts in answer.subject.predictors:
        known += [facts.minimum, facts.maximum]
    return known


GRID = list(product(PAIRS, AGAINST, (0.2, None)))


@pytest.mark.parametrize("audience", ["plain", "technical"])
@pytest.mark.parametrize(("etas", "against", "se"), GRID)
def test_every_figure_is_the_answers_own(etas, against, se, audience):
    answer = profile_answer(eta=etas[0], start=etas[1], against=against, se=se)
    known = numbers_of(answer)
    for sentence in words(answer, audience).sentences:
        assert unaccounted(sentence, known) == []
    assert unaccounted(alternative(answer), known) == []


@pytest.mark.parametrize("audience", ["plain", "technical"])
@pytest.mark.parametrize(("etas", "against", "se"), GRID)
def test_sentences_are_well_made(etas, against, se, audience):
    answer = profile_answer(eta=etas[0], start=etas[1], against=against, se=se)
    said = words(answer, audience)
    for sentence in (*said.sentences, *said.cautions, alternative(answer)):
        assert faults(sentence) == []


def test_a_profile_says_its_chance_from_both_sides():
    assert words(profile_answer()).sentences == (
        "For a pipe with pipe age 60 years, otherwise typical, the chance of burst this winter is "
        "18% (95% interval 13% to 25%), that is 18 in 100, with a range of 13 to 25 in 100.",
        "The chance that this does not happen is 82%, that is 82 in 100.",
        "Starting from a typical pipe, with a chance of 8.3%, the rise in the odds goes with pipe "
        "age (60 years), multiplied by 2.46 (95% interval 1.66 to 3.64).",
        "There are 120 rows much like this profile among the 6,000 rows.",
    )


def test_the_typical_profile_is_called_typical():
    answer = profile_answer(values=(), eta=-2.4, start=-2.4)
    assert words(answer).sentences[0].startswith("For a typical pipe, the chance of burst")
    assert not any("Starting from" in sentence for sentence in words(answer).sentences)


def test_a_profile_stated_in_full_is_not_called_typical():
    values = tuple((facts.name, facts.typical) for facts in PREDICTORS)
    told = words(profile_answer(values=values)).sentences[0]
    assert "otherwise typical" not in told
    assert "past repairs 0, material cast iron and lined no, the chance" in told


def test_a_comparison_is_told_in_chances_differences_and_ratios():
    answer = profile_answer(against=(("age_years", 20.0),))
    told = words(answer).sentences
    assert told[1:5] == (
        "Compared with a pipe with pipe age 20 years, otherwise typical, the chance is 18% rather "
        "than 8.3%, that is 18 rather than 8 in 100.",
        "It is 9.9 percentage points higher (95% interval 8.0 to 11.9 higher).",
        "The chance that this does not happen is 82% rather than 91.7%, that is 82 rather than 92 "
        "in 100.",
        "Put as ratios, the chance is multiplied by 2.19 (95% interval 1.48 to 3.25) and the odds "
        "by 2.46 (95% interval 1.66 to 3.64).",
    )
    compared = answer.comparison
    assert says(told[2], compared.risk_difference.estimate, 100)
    assert says(told[4], compared.risk_ratio.estimate)
    assert says(told[4], compared.odds_ratio.estimate)


def test_a_comparison_downwards_says_lower():
    told = words(profile_answer(eta=-2.4, start=-1.5, against=(("age_years", 80.0),))).sentences
    assert told[2] == "It is 9.9 percentage points lower (95% interval 8.0 to 11.9 lower)."


def test_the_ledger_names_the_largest_rise_and_the_largest_fall():
    adds = [
        (("age_years",), 0.5),
        (("past_repairs",), 0.9),
        (("material", "lined"), -1.1),
    ]
    values = (("age_years", 60.0), ("past_repairs", 3.0), ("material", "PVC"), ("lined", True))
    answer = profile_answer(values=values, eta=-2.1, start=-2.4, adds=adds, se=None)
    assert (
        "Starting from a typical pipe, with a chance of 8.3%, the largest fall in the odds goes "
        "with material (PVC) and lined (yes) together, multiplied by 0.33; the largest rise in the "
        "odds goes with past repairs (3), multiplied by 2.46." in words(answer).sentences
    )


def test_of_predictors_that_share_terms_only_those_that_differ_are_named():
    adds = [(("age_years", "material"), 0.9)]
    answer = profile_answer(adds=adds)
    told = str(words(answer))
    assert "goes with pipe age (60 years), multiplied" in told
    assert "cast iron" not in told


def test_a_single_difference_is_said_to_be_the_whole():
    answer = profile_answer(against=(("age_years", 20.0),))
    assert "The whole difference goes with pipe age (60 years)." in words(answer).sentences


@pytest.mark.parametrize(("eta", "start"), [(-1.5, -2.4), (0.0, -4.0)])
def test_where_chances_are_common_odds_ratios_are_not_read_as_ratios_of_chances(eta, start):
    answer = profile_answer(eta=eta, start=start, against=(("age_years", 20.0),))
    for audience in ("plain", "technical"):
        cautions = words(answer, audience).cautions
        assert any("An odds ratio is not a ratio of chances" in caution for caution in cautions)
    rare = profile_answer(eta=-4.0, start=-4.4, against=(("age_years", 20.0),))
    assert not any("ratio of chances" in caution for caution in words(rare).cautions)


@pytest.mark.parametrize(
    ("familiarity", "told"),
    [
        (
            Familiarity(0.2, 0.01, 0.05, 0, ("age_years",), "beyond"),
            "This profile lies beyond the data: pipe age 60 years (the data have 0 to 110 years); "
            "there the model speaks on its own.",
        ),
        (
            Familiarity(0.2, 0.01, 0.05, 0, ("material",), "beyond"),
            "This profile lies beyond the data: material cast iron; there the model speaks on its "
            "own.",
        ),
        (
            Familiarity(0.2, 0.01, 0.05, 0, (), "beyond"),
            "This profile lies beyond the data: each value has been seen, but no row combines "
            "values as unusually; there the model speaks on its own.",
        ),
        (
            Familiarity(0.002, 0.01, 0.05, 0, (), "rare"),
            "None of the 6,000 rows is much like this profile, so take its chance with care.",
        ),
        (
            Familiarity(0.02, 0.01, 0.05, 1, (), "rare"),
            "Only 1 row is much like this profile, and its values are combined more unusually than "
            "in 99% of rows.",
        ),
        (
            Familiarity(0.02, 0.01, 0.05, 7, (), "rare"),
            "Only 7 rows are much like this profile, and its values are combined more unusually "
            "than in 99% of rows.",
        ),
        (
            Familiarity(0.02, math.nan, math.nan, 0, (), "rare"),
            "The model carries no rows any more, so nobody can tell how familiar it is.",
        ),
    ],
)
def test_an_unfamiliar_profile_is_warned_of_first(familiarity, told):
    for audience in ("plain", "technical"):
        said = words(profile_answer(familiarity=familiarity), audience)
        assert said.cautions[0] == told
        assert not any("much like this profile among" in sentence for sentence in said.sentences)


def test_a_comparison_beyond_saying_is_called_into_doubt():
    answer = profile_answer(eta=2.0, start=-12.0, against=(("age_years", 20.0),))
    doubt = [each for each in words(answer).cautions if each.startswith("An odds ratio beyond")]
    assert len(doubt) == 1
    assert "as for this comparison" in doubt[0]
    near = words(profile_answer(against=(("age_years", 20.0),))).cautions
    assert not any(caution.startswith("An odds ratio beyond") for caution in near)


def test_the_profile_compared_with_is_warned_of_too():
    start = Familiarity(0.2, 0.01, 0.05, 0, ("age_years",), "beyond")
    answer = profile_answer(against=(("age_years", 20.0),), start_familiarity=start)
    assert (
        words(answer)
        .cautions[0]
        .startswith("The profile compared with lies beyond the data: pipe age 20 years")
    )
    alone = profile_answer(start_familiarity=start)
    assert not any("beyond" in caution for caution in words(alone).cautions)


def test_one_row_alike_is_a_row():
    one = replace(FAMILIAR, rows_alike=1)
    assert (
        "There is 1 row much like this profile among the 6,000 rows."
        in words(profile_answer(familiarity=one)).sentences
    )


def test_without_intervals_the_reason_is_said_and_no_interval_mentioned():
    answer = profile_answer(se=None, no_interval="The fit is penalised.", against=AGAINST[1])
    for audience in ("plain", "technical"):
        said = words(answer, audience)
        assert "The fit is penalised." in said.cautions
        assert not any("interval" in sentence for sentence in said.sentences)
        assert not any("range of" in sentence for sentence in said.sentences)


def test_figures_that_are_not_known_do_not_stop_the_words():
    unknown = Estimate(math.nan, math.nan, math.nan, math.nan)
    answer = profile_answer(against=AGAINST[1])
    lost = replace(
        answer,
        comparison=replace(answer.comparison, risk_ratio=unknown, risk_difference=unknown),
        ledger=tuple(replace(row, adds=unknown, multiplies=unknown) for row in answer.ledger),
    )
    for audience in ("plain", "technical"):
        said = words(lost, audience)
        assert any("not known" in sentence for sentence in said.sentences)
        for sentence in (*said.sentences, *said.cautions):
            assert faults(sentence) == []


def test_technical_words_give_all_three_scales():
    told = words(profile_answer(), "technical").sentences[0]
    assert told == (
        "For a pipe with pipe age 60 years, otherwise typical: linear predictor −1.50 (95% "
        "interval −1.89 to −1.11), standard error 0.20; odds 0.22 (95% interval 0.15 to 0.33); "
        "chance 18% (95% interval 13% to 25%)."
    )


def test_the_picture_is_described_on_its_three_scales():
    assert alternative(profile_answer()) == (
        "Chance of burst this winter for a pipe with pipe age 60 years, otherwise typical, read on "
        "three aligned scales: linear predictor −1.50, odds 0.22, chance 18% (95% interval 13% to "
        "25%). A ledger leads there in 1 step from the typical profile, with a chance of 8.3%."
    )
    assert "in 1 step from the profile compared with" in alternative(
        profile_answer(against=AGAINST[1])
    )


@pytest.mark.parametrize(
    ("limit", "share"), [(math.inf, "certainty"), (-math.inf, "no chance at all")]
)
def test_a_chance_without_an_estimate_short_of_certainty_is_cautioned_against(limit, share):
    answer = profile_answer(eta=22.0 if limit > 0 else -22.0)
    answer = replace(answer, point=replace(answer.point, limit=limit))
    for audience in ("plain", "technical"):
        first = words(answer, audience).cautions[0]
        assert f"so that {share} would explain them best" in first
        assert faults(first) == []


def test_a_chance_that_the_data_leave_open_is_cautioned_against():
    answer = profile_answer(against=AGAINST[1])
    answer = replace(answer, start=replace(answer.start, limit=math.nan))
    first = words(answer).cautions[0]
    assert "leave the chance" in first
    assert "the profile compared with open" in first
    assert faults(first) == []


def test_of_finite_estimates_nothing_of_the_kind_is_said():
    for caution in words(profile_answer(against=AGAINST[1])).cautions:
        assert "happened to stop" not in caution


@pytest.mark.parametrize(
    ("odds_ratio", "told"),
    [
        (Estimate(math.inf, None, 2.28, math.inf), "no finite value (95% interval from 2.28, no"),
        (Estimate(0.0, None, 0.0, 0.42), "no value above 0 (95% interval up to 0.42, from 0)"),
        (Estimate(math.inf, None, None, None), "no finite value"),
        (Estimate(0.0, None, None, None), "no value above 0"),
    ],
)
def test_a_comparison_without_a_finite_odds_ratio_says_so(odds_ratio, told):
    answer = profile_answer(against=AGAINST[1])
    compared = replace(answer.comparison, odds_ratio=odds_ratio)
    for audience in ("plain", "technical"):
        said = words(replace(answer, comparison=compared), audience)
        assert any(told in sentence for sentence in said.sentences)
        for sentence in (*said.sentences, *said.cautions):
            assert faults(sentence) == []
