"""Odds ratios in words: chances first, every figure from the answer, nothing overstated."""

import math
from itertools import product

import pytest

from plainodds import scales
from plainodds.answers.estimate import Estimate
from plainodds.answers.odds import OddsQuestion
from plainodds.errors import QuestionRefused
from plainodds.model.predictors import Predictor, Setting
from plainodds.phrases import alternative, words
from tests.phrases.made import AGE, MATERIAL, level_facts, number_facts, odds_answer, odds_row
from tests.phrases.reading import faults, says, unaccounted

LOGS = (0.0, 0.003, -0.003, 0.7, -1.2, 4.0, 30.0, -30.0, 800.0, -800.0)
TYPICALS = (0.0003, 0.004, 0.08, 0.23, 0.6, 0.97, 0.9999)
GRID = list(product(LOGS, TYPICALS, (0.15, None)))


def rows_of(log, se):
    return (
        odds_row(log=log, se=se),
        odds_row(start=40.0, end=41.0, log=log / 10, se=se),
        odds_row("past_repairs", 0.0, 1.0, log=log, se=se, given=(("material", "PVC"),)),
        odds_row("material", "CI", "PVC", log=log, se=se),
        odds_row("material", "CI", "DI", log=-log, se=se),
        odds_row("lined", False, True, log=log, se=se),
    )


def numbers_of(answer):
    """Every number that a sentence about the answer may speak of."""
    known = [answer.question.level, 0.1, 1.0, 1000.0, 0.001, answer.subject.rows]
    chances = [answer.typical_probability]
    for row in answer.rows:
        for held in (row.start, row.end, *(value for _, value in row.given)):
            known.append(0.0 if isinstance(held, str) else float(held))
        for estimate in (row.odds_ratio, row.log_odds_ratio):
            parts = (estimate.estimate, estimate.se, estimate.lower, estimate.upper)
            known += [part for part in parts if part is not None and math.isfinite(part)]
        known.append(row.p_value or 0.0)
        if row.per_step:
            known.append(float(row.end) - float(row.start))
        moved = scales.linear_predictor_from_probability(answer.typical_probability)
        moved = moved + row.log_odds_ratio.estimate
        chances.append(float(scales.probability_from_linear_predictor(moved)))
    counts = [round(p * over) for p in chances for over in (100, 1_000, 10_000)]
    # "under 1 in 100" and "over 99 in 100" are limits
    limits = [1, 99, 999, 9_999, 100, 1_000, 10_000]
    return [*known, *chances, *counts, *limits]


@pytest.mark.parametrize(("log", "typical", "se"), GRID)
@pytest.mark.parametrize("audience", ["plain", "technical"])
def test_every_figure_is_the_answers_own(log, typical, se, audience):
    answer = odds_answer(*rows_of(log, se), typical=typical)
    known = numbers_of(answer)
    said = words(answer, audience)
    for sentence in said.sentences:
        assert unaccounted(sentence, known) == []
    assert unaccounted(alternative(answer), [*known, len(answer.rows)]) == []


@pytest.mark.parametrize(("log", "typical", "se"), GRID)
@pytest.mark.parametrize("audience", ["plain", "technical"])
def test_sentences_are_well_made(log, typical, se, audience):
    reason = "" if se else "The fit is penalised."
    answer = odds_answer(*rows_of(log, se), typical=typical, no_interval=reason)
    said = words(answer, audience)
    for sentence in (*said.sentences, *said.cautions, alternative(answer)):
        assert faults(sentence) == []


def test_each_row_says_its_odds_ratio_and_interval():
    for log in (0.7, -1.2, 0.05):
        row = odds_row(log=log, se=0.15)
        for audience in ("plain", "technical"):
            told = [
                s for s in words(odds_answer(row), audience).sentences if "pipe age" in s.lower()
            ]
            for part in (row.odds_ratio.estimate, row.odds_ratio.lower, row.odds_ratio.upper):
                assert says(told[0], part)


def test_the_chance_comes_before_the_ratio():
    told = words(odds_answer(odds_row(log=0.7), typical=0.23)).sentences
    assert told[0] == (
        "For a typical pipe, with every predictor at its median or most frequent level, the "
        "chance of burst this winter is 23%, that is 23 in 100."
    )
    assert told[1] == (
        "Per 10 years more of pipe age, the chance for a typical pipe is 38% rather than 23%, "
        "that is 38 rather than 23 in 100; the odds are higher, multiplied by 2.01 (95% interval "
        "1.66 to 2.45)."
    )


def test_a_lower_odds_ratio_is_said_to_be_lower():
    told = words(odds_answer(odds_row(log=-0.7))).sentences[1]
    assert "the odds are lower, multiplied by 0.50" in told


def test_an_interval_that_includes_one_leaves_the_direction_open():
    told = words(odds_answer(odds_row(log=0.05, se=0.1))).sentences[1]
    assert told.endswith("which leaves open whether they are higher or lower.")
    assert "odds are higher" not in told


def test_no_difference_at_all_reads_well():
    told = words(odds_answer(odds_row(log=0.0, se=None), typical=0.23)).sentences[1]
    assert told == (
        "Per 10 years more of pipe age, the chance for a typical pipe is 23% either way; the odds "
        "are multiplied by 1.00."
    )


def test_a_change_that_does_not_start_from_the_typical_profile_has_odds_only():
    row = odds_row("material", "DI", "PVC", log=0.7)
    told = words(odds_answer(row)).sentences[1]
    assert told.startswith(
        "For material PVC rather than ductile iron, the odds of burst this winter are higher"
    )


def test_chances_reach_another_reference_by_way_of_the_typical_level():
    to_typical = odds_row("material", "PVC", "CI", log=0.5)
    other = odds_row("material", "PVC", "DI", log=0.2)
    told = words(odds_answer(to_typical, other, typical=0.23)).sentences
    start = scales.linear_predictor_from_probability(0.23) - 0.5
    before = 100 * scales.probability_from_linear_predictor(start)
    after = 100 * scales.probability_from_linear_predictor(start + 0.2)
    assert f"is 23% rather than {before:.0f}%" in told[1]
    assert f"is {after:.0f}% rather than {before:.0f}%" in told[2]


def test_a_modifier_away_from_its_typical_value_has_odds_only():
    row = odds_row(given=(("material", "PVC"),))
    answer = odds_answer(row)
    told = words(answer)
    assert told.sentences[1].startswith(
        "Per 10 years more of pipe age, given material PVC, the odds of burst this winter are"
    )
    assert (
        "The odds ratio for pipe age depends on material, so it is stated at values of that "
        "predictor." in told.cautions
    )


@pytest.mark.parametrize("typical", [0.11, 0.23, 0.6])
def test_above_ten_percent_an_odds_ratio_is_not_read_as_a_ratio_of_chances(typical):
    for audience in ("plain", "technical"):
        cautions = words(odds_answer(odds_row(), typical=typical), audience).cautions
        assert cautions[0].startswith(
            "An odds ratio is not a ratio of chances: with a typical chance of "
            f"{100 * typical:.0f}%, above about 10%"
        )


def test_a_rare_outcome_needs_no_such_caution_unless_a_chance_grows_common():
    rare = words(odds_answer(odds_row(log=0.2), typical=0.02)).cautions
    grown = words(odds_answer(odds_row(log=2.5), typical=0.02)).cautions
    assert not any("ratio of chances" in caution for caution in rare)
    assert any("ratio of chances" in caution for caution in grown)


def test_no_caution_is_missing():
    curved = number_facts("age_years", linear=False)
    answer = odds_answer(
        odds_row(per_step=False, start=20.0, end=60.0, se=None),
        predictors=(curved, MATERIAL),
        no_interval="the fit is penalised",
        offset=1.5,
        notices=("The fit models burst = True.",),
    )
    for audience in ("plain", "technical"):
        cautions = words(answer, audience).cautions
        for expected in (
            "These figures say what goes with what in the data; they do not say what would follow "
            "if a value were changed on purpose.",
            "Equal steps of pipe age do not have equal odds ratios, so two values are compared.",
            "No intervals can be given here.",
            "The fit is penalised.",
            "The model has an offset, an amount that is taken as known; here it is held at 1.5.",
            "The fit models burst = True.",
        ):
            assert expected in cautions


@pytest.mark.parametrize("log", [8.0, -8.0, 800.0, -800.0])
def test_an_enormous_odds_ratio_is_called_into_doubt(log):
    answer = odds_answer(odds_row(log=log, se=0.5), typical=0.23)
    cautions = words(answer).cautions
    assert any(caution.startswith("An odds ratio beyond") for caution in cautions)
    told = words(answer).sentences[1]
    assert "over 1,000" in told if log > 0 else "under 0.001" in told


def test_numbers_that_are_not_known_are_said_to_be_so():
    unknown = Estimate(math.nan, math.nan, math.nan, math.nan)
    row = odds_row(odds_ratio=unknown, log_odds_ratio=unknown, p_value=math.nan)
    for audience in ("plain", "technical"):
        said = words(odds_answer(row, typical=math.nan), audience)
        for sentence in (*said.sentences, *said.cautions):
            assert faults(sentence) == []
        assert any("not known" in sentence for sentence in said.sentences)
    assert faults(alternative(odds_answer(row))) == []


def test_a_typical_value_of_the_analysts_own_is_not_called_a_median():
    setting = Setting(predictors=(("age_years", Predictor(typical=30.0)),))
    told = words(odds_answer(odds_row(), setting=setting)).sentences[0]
    assert told.startswith("For a typical pipe, with every predictor at its typical value, the")


def test_models_side_by_side_are_told_apart():
    rows = (odds_row(model="crude", log=0.7), odds_row(model="adjusted", log=0.3))
    answer = odds_answer(*rows, question=OddsQuestion(models=("crude", "adjusted")))
    told = words(answer).sentences
    assert told[0].endswith("that is 8 in 100, by the model “crude”.")
    assert told[1].startswith("In the model “crude”, per 10 years more of pipe age, the odds of")
    assert told[2].startswith("In the model “adjusted”, per 10 years more of pipe age, the odds of")
    assert "Model “adjusted”: Pipe age, per 10 years more: odds ratio 1.35" in str(
        words(answer, "technical")
    )
    assert "in the model “crude”" in alternative(answer)


@pytest.mark.parametrize(
    ("kind", "text"),
    [
        ("nonrobust", "the model-based covariance matrix"),
        ("HC1", "robust to heteroscedasticity (HC1)"),
        ("cluster", "a cluster-robust covariance matrix"),
        ("bootstrap", "of kind “bootstrap”"),
    ],
)
def test_technical_words_name_the_covariance(kind, text):
    answer = odds_answer(odds_row(), covariance_kind=kind)
    assert any(text in sentence for sentence in words(answer, "technical").sentences)
    assert not any("covariance" in sentence for sentence in words(answer).sentences)


def test_the_confidence_level_is_the_questions():
    answer = odds_answer(odds_row(), question=OddsQuestion(level=0.9))
    assert "90% interval" in str(words(answer))
    assert "90% intervals are Wald" in str(words(answer, "technical"))
    assert "95%" not in str(words(answer)) + str(words(answer, "technical"))


def test_the_picture_is_described_by_its_extremes():
    rows = (odds_row(log=0.7), odds_row("material", "CI", "PVC", log=-1.2))
    assert alternative(odds_answer(*rows)) == (
        "2 odds ratios for burst this winter as points on a logarithmic axis, with lines for their "
        "95% intervals. The largest is 2.01 (95% interval 1.66 to 2.45) for pipe age, per 10 years "
        "more; the smallest is 0.30 (95% interval 0.25 to 0.37) for material, PVC against cast "
        "iron."
    )
    assert "lines" not in alternative(odds_answer(odds_row(se=None)))
    assert faults(alternative(odds_answer())) == []


def test_labels_of_any_kind_keep_sentences_whole():
    strange = level_facts(
        label='<img src=x>\n"&', levels=("a\nb", "c."), level_labels=("a\nb", "c.")
    )
    answer = odds_answer(
        odds_row("material", "a\nb", "c.", log=0.5), predictors=(AGE, strange), typical=0.2
    )
    for audience in ("plain", "technical"):
        for sentence in words(answer, audience).sentences:
            assert sentence == " ".join(sentence.split())


def test_an_unknown_audience_is_refused():
    with pytest.raises(QuestionRefused, match="'plain' or 'technical'"):
        words(odds_answer(odds_row()), "loud")


def test_what_is_no_answer_has_no_words():
    with pytest.raises(TypeError, match="no words for str"):
        words("answer")
    with pytest.raises(TypeError, match="no picture of str"):
        alternative("answer")


def likelihood_answer(lower=0.2, upper=1.4, **stated):
    ends = {"lower": lower, "upper": upper}
    logs = Estimate(0.7, 0.3, **ends)
    ratio = Estimate(math.exp(0.7), 0.6, math.exp(lower), math.exp(upper))
    row = odds_row(odds_ratio=ratio, log_odds_ratio=logs)
    return odds_answer(row, question=OddsQuestion(interval="likelihood"), **stated)


@pytest.mark.parametrize("audience", ["plain", "technical"])
def test_likelihood_intervals_are_said_to_be_such(audience):
    said = words(likelihood_answer(), audience)
    assert any("2.01 (95% interval 1.22 to 4.06)" in sentence for sentence in said.sentences)
    assert any("are likelihood intervals" in caution for caution in said.cautions)
    assert not any("no upper end" in each for each in (*said.sentences, *said.cautions))
    wald = words(odds_answer(odds_row()), audience)
    assert "likelihood" not in str(wald)


def test_technical_words_name_the_likelihood_methods():
    told = words(likelihood_answer(), "technical").sentences[-1]
    assert "profile-likelihood intervals" in told
    assert "likelihood-ratio tests" in told
    assert "Wald" not in told


@pytest.mark.parametrize(
    ("lower", "upper", "told", "open_ends"),
    [
        (0.2, math.inf, "interval from 1.22, no upper end)", {"upper"}),
        (-math.inf, 1.4, "interval up to 4.06, no lower end)", {"lower"}),
        (-math.inf, math.inf, "interval without an end on either side)", {"lower", "upper"}),
    ],
)
def test_an_end_that_does_not_exist_is_said_to_be_open(lower, upper, told, open_ends):
    answer = likelihood_answer(lower, upper)
    meaning = {"upper": "any larger value", "lower": "any smaller value"}
    for audience in ("plain", "technical"):
        said = words(answer, audience)
        assert any(told in sentence for sentence in said.sentences)
        for end, rest in meaning.items():
            caution = f"There is no {end} end for pipe age: the data do not rule out {rest}."
            assert (caution in said.cautions) == (end in open_ends)
        for sentence in (*said.sentences, *said.cautions, alternative(answer)):
            assert faults(sentence) == []
    assert told in alternative(answer)


def test_a_wald_end_too_large_to_be_held_is_not_called_open():
    told = words(odds_answer(odds_row(log=800.0, se=1.0))).sentences[1]
    assert "no upper end" not in told


def test_a_case_control_sample_without_a_share_is_told_in_odds_only():
    answer = odds_answer(odds_row(log=0.7), typical=0.23, sampling="case-control")
    said = words(answer)
    assert said.sentences == (
        "Per 10 years more of pipe age, the odds of burst this winter are higher, multiplied by "
        "2.01 (95% interval 1.66 to 2.45).",
    )
    assert (
        "The sample was chosen by its outcome (case-control), so it tells odds ratios but no "
        "chances." in said.cautions
    )
    assert not any("23%" in caution for caution in words(answer, "technical").cautions)


def test_chances_corrected_to_a_populations_share_are_said_to_be():
    said = words(odds_answer(odds_row(), sampling="case-control", prevalence=0.02))
    assert said.sentences[0].startswith("For a typical pipe")
    assert any(
        "corrected to a stated share of burst this winter in the population of 2%" in caution
        for caution in said.cautions
    )
