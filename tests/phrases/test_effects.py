"""Effects in words: one sentence for each predictor, in percentage points, for whom."""

import math
from dataclasses import replace
from itertools import product

import pytest

from plainodds.answers.estimate import Estimate
from plainodds.answers.where import Mask
from plainodds.phrases import alternative, words
from plainodds.phrases.labels import effect_label, effects_title
from tests.phrases.made import AGE, MATERIAL
from tests.phrases.made_changes import effect_row, effects_answer, level_row
from tests.phrases.reading import faults, says, unaccounted

VALUES = (0.0, 0.0014, -0.0014, 0.03, -0.2, 0.7, 3e-7, -3e-7)
OTHERS = ("observed", "typical", (("lined", True),))
GRID = list(product(VALUES, (0.01, 0.0002, None), OTHERS, (None, "lined")))


def rows_of(value, se, by=None):
    groups = (None,) if by is None else (False, True)
    rows = []
    for group in groups:
        rows += [
            effect_row(value=value, se=se, by=group),
            effect_row("past_repairs", value, se, step=1.0, by=group),
            level_row("DI", value, se, by=group),
            level_row("PVC", -value, se, by=group),
            level_row(True, value, se, "lined", start=False, by=group),
        ]
    return rows


def numbers_of(answer):
    """Every number that a sentence about the answer may speak of."""
    known = [answer.question.level, answer.subject.rows, answer.subject.outcome.share]
    known += [*answer.counted, sum(answer.counted), len(answer.rows), 10, 100, 1_000]
    # what is too small to be written has its limits: "under 0.001", "between −0.001 and 0"
    known += [0.001, 0.01, 0.0]
    for row in answer.rows:
        effect = row.effect
        known += [effect.estimate, effect.se, effect.lower, effect.upper, row.p_value, row.step]
    known += [float(held) for _, held in answer.held if not isinstance(held, str)]
    return [each for each in known if each is not None]


@pytest.mark.parametrize("audience", ["plain", "technical"])
@pytest.mark.parametrize(("value", "se", "others", "by"), GRID)
def test_every_figure_is_the_answers_own_and_sentences_are_well_made(
    value, se, others, by, audience
):
    counted = (6000,) if by is None else (3600, 2400)
    answer = effects_answer(*rows_of(value, se, by), others=others, by=by, counted=counted)
    known, said = numbers_of(answer), words(answer, audience)
    for sentence in (*said.sentences, alternative(answer)):
        assert unaccounted(sentence, known) == []
    for sentence in (*said.sentences, *said.cautions, alternative(answer)):
        assert faults(sentence) == []


def test_each_predictor_has_its_sentence():
    answer = effects_answer(
        effect_row(),
        effect_row("past_repairs", 0.02, 0.005),
        level_row("DI", -0.002, 0.003),
        level_row("PVC"),
        level_row(True, -0.01, 0.004, "lined", start=False),
    )
    assert words(answer).sentences == (
        "In the data as a whole, the share of burst this winter is 10%, that is 10 in 100.",
        "Per additional year of pipe age, the average chance of burst this winter is about 0.14 "
        "percentage points higher (95% interval 0.10 to 0.18 higher).",
        "Per additional unit of past repairs, the average chance is about 2.0 percentage points "
        "higher (95% interval 1.0 to 3.0 higher).",
        "Compared with material cast iron, the average chance is 0.20 percentage points lower (95% "
        "interval 0.8 lower to 0.4 higher) for ductile iron and 0.50 percentage points lower "
        "(0.1 to 0.9 lower) for PVC.",
        "For lined yes rather than no, the average chance is 1.0 percentage points lower (95% "
        "interval 0.2 to 1.8 lower).",
        "Each pipe keeps its own values of everything else, and the changes in the chance are "
        "averaged over the 6,000 rows.",
    )


def test_plain_words_speak_of_no_effects():
    for others in OTHERS:
        answer = effects_answer(*rows_of(0.01, 0.002), others=others)
        assert "effect" not in str(words(answer))
        assert "effect" not in alternative(answer)


def test_a_step_is_told_as_a_step_and_not_as_a_rate():
    said = words(effects_answer(effect_row(value=0.014, se=0.002, step=10.0)))
    assert said.sentences[1] == (
        "Per 10 years more of pipe age, the average chance of burst this winter is 1.4 percentage "
        "points higher (95% interval 1.0 to 1.8 higher)."
    )
    assert not any("rate" in caution for caution in said.cautions)
    slope = words(effects_answer(effect_row()))
    assert (
        "A figure per unit is the rate at each pipe's own value; over a larger change the chance "
        "need not keep to it." in slope.cautions
    )


def test_a_slope_too_small_to_be_written_out_asks_for_a_step():
    small = words(effects_answer(effect_row(value=3e-7, se=1e-8)))
    assert "about under 0.001 percentage points" not in str(small)
    assert any("ask for a whole step" in caution for caution in small.cautions)
    assert not any("whole step" in each for each in words(effects_answer(effect_row())).cautions)


def test_groups_are_told_side_by_side():
    rows = [level_row("PVC", value, by=lined) for lined, value in ((False, -0.005), (True, -0.01))]
    answer = effects_answer(*rows, by="lined", counted=(3600, 2400))
    told = words(answer).sentences
    assert told[1] == (
        "For material PVC rather than cast iron, the average chance of burst this winter is 0.50 "
        "percentage points lower (95% interval 0.1 to 0.9 lower) among pipes with lined no and "
        "1.0 percentage points lower (0.6 to 1.4 lower) with lined yes."
    )
    assert told[-1].endswith(
        "averaged over the 6,000 rows: 3,600 rows with lined no and 2,400 rows with lined yes."
    )
    assert "Material, PVC against cast iron; lined yes: average discrete change" in str(
        words(answer, "technical")
    )


@pytest.mark.parametrize(
    ("where", "whom", "rows"),
    [
        ((("lined", True),), " among pipes with lined yes is", "the 120 rows with lined yes."),
        (Mask(120, "ab"), " among the pipes chosen (120 rows) is", "120 rows chosen by a mask."),
    ],
)
def test_for_whom_is_said(where, whom, rows):
    told = words(effects_answer(effect_row(), where=where, counted=(120,))).sentences
    assert whom in told[1]
    assert told[-1].endswith(rows)


def test_at_a_profile_its_values_are_said_before_what_changes():
    typical = words(effects_answer(effect_row(), others="typical")).sentences
    assert typical[1:] == (
        "Each predictor is looked at while the others are held at pipe age 40 years, past repairs "
        "0, material cast iron and lined no.",
        "Per additional year of pipe age, the chance of burst this winter for a typical pipe is "
        "about 0.14 percentage points higher (95% interval 0.10 to 0.18 higher).",
    )
    stated = effects_answer(effect_row(), effect_row("past_repairs"), others=(("lined", False),))
    told = words(stated).sentences
    assert "for a pipe with lined no, otherwise typical, is about 0.14" in told[2]
    assert "the chance for that pipe is about 0.14" in told[3]
    assert "average" not in str(words(stated))


@pytest.mark.parametrize(
    ("others", "named"),
    [
        ("observed", "Average marginal effects (AME): dπ/dx of numbers"),
        ("typical", "Marginal effects at the typical profile (medians and most frequent levels):"),
        ((("lined", True),), "Marginal effects at a stated profile (MER), what is not stated"),
    ],
)
def test_technical_words_name_the_kind_of_effect_and_the_method(others, named):
    told = words(effects_answer(effect_row(), others=others), "technical").sentences
    assert named in told[-1]
    assert "delta method with exact gradients, with the model-based covariance matrix" in told[-1]
    average = "average " if others == "observed" else ""
    assert told[0] == (
        f"Pipe age, per additional year: {average}marginal effect dπ/dx +0.14 percentage points "
        "(95% interval 0.10 to 0.18 percentage points), standard error 0.020 percentage points, "
        "p-value under 0.001."
    )


def test_rows_drawn_from_a_larger_number_are_said_to_be():
    drawn = effects_answer(effect_row(), sample="drawn")
    assert any("drawn from a larger number of pipes" in each for each in words(drawn).sentences)
    assert "squared distance of its own value from the average" in str(words(drawn, "technical"))
    assert "drawn" not in str(words(effects_answer(effect_row())))


def test_where_an_interval_goes_both_ways_the_direction_is_left_open():
    answer = effects_answer(effect_row(se=0.01), level_row("PVC"))
    assert (
        "Where an interval goes from lower to higher, as for pipe age, the data leave open which "
        "way the chance differs." in words(answer).cautions
    )
    assert not any("leave open" in each for each in words(effects_answer(level_row())).cautions)


def test_without_intervals_the_reason_is_said_and_no_interval_mentioned():
    answer = effects_answer(*rows_of(0.01, None), no_interval="The fit is penalised.")
    for audience in ("plain", "technical"):
        said = words(answer, audience)
        assert "The fit is penalised." in said.cautions
        assert not any("interval" in sentence for sentence in said.sentences)
    assert "interval" not in alternative(answer)


def test_a_populations_share_stands_for_the_samples():
    said = words(effects_answer(effect_row(), sampling="case-control", prevalence=0.02))
    assert not any("In the data as a whole" in sentence for sentence in said.sentences)
    assert any(says(caution, 0.02, 100) for caution in said.cautions)


def test_figures_that_are_not_known_do_not_stop_the_words():
    lost = effects_answer(replace(effect_row(), effect=Estimate(*[math.nan] * 4), p_value=math.nan))
    for audience in ("plain", "technical"):
        said = words(lost, audience)
        assert any("not known" in sentence for sentence in said.sentences)
        for sentence in (*said.sentences, *said.cautions, alternative(lost)):
            assert faults(sentence) == []


def test_labels_say_the_change():
    assert effect_label(AGE, effect_row()) == "per additional year"
    assert effect_label(AGE, effect_row(step=10.0)) == "per 10 years more"
    assert effect_label(MATERIAL, level_row()) == "PVC against cast iron"
    assert effects_title(effects_answer(effect_row())) == (
        "Change of the average chance of burst this winter (percentage points)"
    )
    assert effects_title(effects_answer(effect_row(), others="typical")) == (
        "Change of the chance of burst this winter (percentage points)"
    )


def test_the_picture_is_described_by_its_ends():
    answer = effects_answer(effect_row(), level_row("PVC"))
    assert alternative(answer) == (
        "2 changes of the average chance of burst this winter as points on an axis of percentage "
        "points, with lines for their 95% intervals. The highest is +0.14 percentage points (95% "
        "interval 0.10 to 0.18 percentage points) for pipe age, per additional year; the lowest is "
        "−0.50 percentage points (95% interval −0.9 to −0.1 percentage points) for material, PVC "
        "against cast iron."
    )
    assert alternative(effects_answer(effect_row())).startswith("1 change of the average chance")
