"""Curves in words: where the chance goes, on what it rests, and where the data end."""

import math
from itertools import product

import numpy as np
import pytest

from plainodds import scales
from plainodds.phrases import alternative, words
from tests.phrases.made import PREDICTORS, curve_answer, number_facts, subject
from tests.phrases.reading import faults, figures, unaccounted

SHAPES = {
    "rising": lambda x, b: -3 + 0.03 * x,
    "falling": lambda x, b: 1 - 0.03 * x,
    "flat": lambda x, b: -2.0,
    "arched": lambda x, b: -1 - ((x - 50) / 30) ** 2,
    "hanging": lambda x, b: -3 + ((x - 50) / 30) ** 2,
    "enormous": lambda x, b: 20 * (x - 50),
    "rare": lambda x, b: -9 + 0.01 * x,
    "overflowing": lambda x, b: 900.0 + x,
}
SLOPES = {
    "rising": lambda x, b: 0.004 + x / 1e5,
    "turning": lambda x, b: (x - 50) / 1e4,
    "flat": lambda x, b: 0.0,
    "tiny": lambda x, b: 1e-7,
}
LEVELS = ("CI", "DI", "PVC")


def _log(numbers):
    with np.errstate(divide="ignore"):
        return np.log(numbers)


def numbers_of(answer):
    known = [answer.question.level, 0.1, answer.subject.rows, 100, 1_000, 10_000]
    known += [1, 99, 999, 9_999, len(answer.lines)]
    for line in answer.lines:
        known += [float(x) for x in line.at if not isinstance(x, str)]
        if isinstance(line.by, float):
            known.append(line.by)
        scale, estimates = answer.question.scale, np.array(line.estimate)
        parts = [part for part in (line.estimate, line.se, line.lower, line.upper) if part]
        known += [number for part in parts for number in part]
        chances = estimates
        if scale == "odds":
            # odds too large to be held are a chance of 1
            chances = scales.probability_from_linear_predictor(_log(estimates))
        elif scale == "linear_predictor":
            chances = scales.probability_from_linear_predictor(estimates)
        if scale != "slope":
            known += chances.tolist()
            known += [round(p * over) for p in chances for over in (100, 1_000, 10_000)]
        for ends in (line.lower, line.upper):
            if ends and scale in ("odds", "linear_predictor"):
                eta = _log(ends) if scale == "odds" else np.array(ends)
                known += scales.probability_from_linear_predictor(eta).tolist()
    for name, held in answer.held:
        if answer.subject.predictor(name).is_number:
            known.append(float(held))
    return known


def answers():
    for (name, eta), scale, se in product(
        SHAPES.items(), ("probability", "odds", "linear_predictor"), (0.2, None)
    ):
        yield f"{name} {scale} {se}", curve_answer(eta, scale=scale, se=se)
    for (name, slope), se in product(SLOPES.items(), (0.0005, None)):
        yield f"{name} slope {se}", curve_answer(slope, scale="slope", se=se)
    by = {"by": "material", "by_values": LEVELS, "held": (("past_repairs", 0.0),)}
    yield "by a category", curve_answer(lambda x, b: -3 + 0.02 * x * (b == "CI"), **by)
    yield "by a yes/no", curve_answer(by="lined", by_values=(False, True))
    yield "by a number", curve_answer(by="past_repairs", by_values=(0.0, 1.0))
    yield (
        "along levels",
        curve_answer(lambda x, b: {"CI": -1.0, "DI": -2.0, "PVC": -4.0}[x], "material", LEVELS),
    )
    yield (
        "along levels in odds",
        curve_answer(
            lambda x, b: {"CI": -1.0, "DI": -2.0, "PVC": -4.0}[x], "material", LEVELS, scale="odds"
        ),
    )
    yield "along yes/no", curve_answer(lambda x, b: -2.0 + x, "lined", (False, True))
    yield "at one value", curve_answer(at=(40.0,))
    yield "averaged", curve_answer(others="observed", offset=2.0)
    yield "averaged odds", curve_answer(others="observed", scale="odds")
    yield "averaged slope", curve_answer(SLOPES["rising"], others="observed", scale="slope")
    yield "beyond the data", curve_answer(unsupported=(0.0, 10.0, 50.0, 110.0))


ANSWERS = dict(answers())


@pytest.mark.parametrize("audience", ["plain", "technical"])
@pytest.mark.parametrize("name", ANSWERS)
def test_every_figure_is_the_answers_own(name, audience):
    answer = ANSWERS[name]
    known = numbers_of(answer)
    for sentence in words(answer, audience).sentences:
        assert unaccounted(sentence, known) == []
    assert unaccounted(alternative(answer), known) == []


@pytest.mark.parametrize("audience", ["plain", "technical"])
@pytest.mark.parametrize("name", ANSWERS)
def test_sentences_are_well_made(name, audience):
    said = words(ANSWERS[name], audience)
    assert said.sentences
    for sentence in (*said.sentences, *said.cautions, alternative(ANSWERS[name])):
        assert faults(sentence) == []


def test_a_rising_chance_is_told_from_end_to_end():
    assert words(curve_answer()).sentences == (
        "With pipe age going from 0 to 110 years, the chance of burst this winter rises from 4.7% "
        "(95% interval 3.3% to 6.9%) to 57% (48% to 67%), that is 47 and 574 in 1,000.",
        "The other predictors are held at their typical values: past repairs 0 and lined no.",
    )


def test_directions_and_turning_points_are_told():
    def told(shape):
        return words(curve_answer(SHAPES[shape], se=None)).sentences[0]

    assert "falls from 73% to 9.1%" in told("falling")
    assert "starts at 12% and ends at 12%, that is" in told("flat")
    assert "it is highest at 50 years, 27%" in told("arched")
    assert "it is lowest at 50 years, 4.7%" in told("hanging")


def test_levels_are_listed():
    assert words(ANSWERS["along levels"]).sentences[0] == (
        "By material, the chance of burst this winter is 27% (95% interval 20% to 35%) for cast "
        "iron, 12% (8% to 17%) for ductile iron and 1.8% (1.2% to 2.6%) for PVC, that is 269, 119 "
        "and 18 in 1,000."
    )


def test_many_levels_are_told_by_their_extremes():
    levels = tuple("abcdefgh")
    facts = PREDICTORS[2].__class__(
        **{**vars(PREDICTORS[2]), "levels": levels, "level_labels": levels, "typical": "a"}
    )
    answer = curve_answer(
        lambda x, b: -3.0 + levels.index(x),
        "material",
        levels,
        se=None,
        predictors=(facts,),
        held=(),
    )
    assert words(answer).sentences[0] == (
        "Over 8 values of material, the chance of burst this winter is lowest for a, 4.7%, and "
        "highest for h, 98.2%, that is 47 and 982 in 1,000."
    )


def test_each_line_has_its_own_sentence():
    told = words(ANSWERS["by a category"]).sentences
    assert told[0].startswith("For material cast iron, with pipe age going from 0 to 110 years")
    assert told[2].startswith("For material PVC, with pipe age")
    assert words(ANSWERS["by a yes/no"]).sentences[1].startswith("For lined yes, with")
    assert words(ANSWERS["by a number"]).sentences[1].startswith("For past repairs 1, with")


def test_all_lines_count_over_one_denominator():
    answer = curve_answer(
        lambda x, b: -7 + 0.03 * x if b == "PVC" else -1.0, by="material", by_values=LEVELS
    )
    told = [sentence for sentence in words(answer).sentences if "that is" in sentence]
    assert len(told) == 3
    assert all(sentence.endswith(" in 10,000.") for sentence in told)


def test_a_slope_is_told_per_unit_in_percentage_points():
    told = words(curve_answer(SLOPES["rising"], scale="slope", se=0.0005)).sentences[0]
    assert told == (
        "Per additional year of pipe age, the chance of burst this winter is about 0.42 percentage "
        "points higher (95% interval 0.32 to 0.52 higher) at 20 years, about 0.44 percentage "
        "points higher (0.34 to 0.54 higher) at 40 years and about 0.46 percentage points higher "
        "(0.36 to 0.56 higher) at 60 years."
    )


def test_a_slope_that_turns_says_lower_and_higher():
    told = words(curve_answer(SLOPES["turning"], scale="slope", se=None)).sentences[0]
    assert "about 0.30 percentage points lower at 20 years" in told
    assert "about 0.10 percentage points higher at 60 years" in told


def test_odds_are_told_after_the_chances_that_they_stand_for():
    told = words(curve_answer(scale="odds")).sentences
    assert "the chance of burst this winter rises from 4.7%" in told[0]
    assert told[1].startswith(
        "With pipe age going from 0 to 110 years, the odds of burst this winter rise from 0.050 "
        "(95% interval 0.034 to 0.074) to 1.35"
    )


def test_an_average_says_whose():
    answer = ANSWERS["averaged"]
    told = words(answer).sentences
    assert "the average chance of burst this winter rises" in told[0]
    assert told[1] == (
        "Each pipe keeps its own values of the other predictors, and the chances are averaged over "
        "the 6,000 rows."
    )
    assert "delta-method intervals on the logit of the averaged chance" in str(
        words(answer, "technical")
    )
    assert (
        "The model has an offset, an amount that is taken as known; here each row keeps its own."
        in words(answer).cautions
    )


def test_stated_and_typical_values_are_told_apart():
    others = (("lined", True),)
    answer = curve_answer(others=others, held=(("past_repairs", 0.0), ("lined", True)))
    assert words(answer).sentences[1:] == (
        "Held as stated: lined yes.",
        "The remaining predictor is held at its typical value: past repairs 0.",
    )


def test_a_model_of_one_predictor_holds_nothing():
    for others in ("typical", "observed"):
        answer = curve_answer(others=others, predictors=PREDICTORS[:1], held=())
        assert len(words(answer).sentences) == 1


def test_many_held_values_are_cut_short_for_plain_readers_only():
    facts = [number_facts(f"x{i}", label=f"x{i}") for i in range(12)]
    answer = curve_answer(
        predictors=(PREDICTORS[0], *facts), held=tuple((each.name, 40.0) for each in facts)
    )
    assert words(answer).sentences[1].endswith("x7 40 years and 4 more.")
    assert "x11 40 years" in str(words(answer, "technical"))


def test_what_lies_beyond_the_data_is_said():
    caution = words(ANSWERS["beyond the data"]).cautions[0]
    assert caution == (
        "Where a line is dashed the data have no rows near by and the model speaks on its own: "
        "pipe age below 20 years, between 40 years and 60 years and above 100 years."
    )
    told = words(ANSWERS["beyond the data"]).sentences[0]
    assert told.startswith("With pipe age going from 20 to 100 years")


def test_lines_that_end_at_different_places_are_told_apart():
    answer = curve_answer(
        by="material",
        by_values=LEVELS,
        unsupported=(("PVC", 100.0), ("PVC", 110.0), ("DI", 0.0), ("CI", 0.0)),
    )
    assert (
        words(answer)
        .cautions[0]
        .endswith(
            ": for material cast iron and material ductile iron, pipe age below 10 years; for "
            "material PVC, pipe age above 90 years."
        )
    )


def test_a_line_without_any_rows_is_said_to_have_none():
    answer = curve_answer(
        by="material", by_values=LEVELS, unsupported=tuple(("PVC", 10.0 * i) for i in range(12))
    )
    caution = words(answer).cautions[0]
    assert caution.endswith("for material PVC, along all values of pipe age.")


def test_levels_without_rows_are_named():
    answer = curve_answer(lambda x, b: -1.0, "material", LEVELS, unsupported=("PVC",))
    assert words(answer).cautions[0] == (
        "The data have no rows here and the model speaks on its own: material PVC."
    )


def test_a_curve_within_the_data_has_no_such_caution():
    assert not any("on its own" in caution for caution in words(curve_answer()).cautions)


def test_a_curve_without_intervals_says_why():
    answer = curve_answer(se=None, no_interval="The fit is penalised.")
    for audience in ("plain", "technical"):
        said = words(answer, audience)
        assert said.cautions[-2:] == ("No intervals can be given here.", "The fit is penalised.")
        assert not any("interval" in sentence for sentence in said.sentences)
    assert "interval" not in alternative(answer)


def test_the_picture_is_described_by_its_lowest_and_highest_point():
    assert alternative(curve_answer()) == (
        "Chance of burst this winter, along pipe age, as a curve with its interval band. The "
        "lowest is 4.7% at 0 years; the highest is 57% at 110 years."
    )
    told = alternative(ANSWERS["by a category"])
    assert "one for material cast iron, material ductile iron and material PVC" in told
    assert told.endswith("the highest is 31% at 110 years, material cast iron.")


def test_odds_that_overflow_are_near_certain_chances():
    answer = ANSWERS["overflowing odds None"]
    assert all(math.isinf(number) for number in answer.lines[0].estimate)
    told = words(answer).sentences
    assert "over 99.9%" in told[0]
    assert "over 1,000" in told[1]


def test_a_chance_that_is_not_known_is_said_to_be_so():
    for scale in ("probability", "odds", "linear_predictor", "slope"):
        answer = curve_answer(lambda x, b: math.nan, scale=scale)
        for audience in ("plain", "technical"):
            said = words(answer, audience)
            assert any("not known" in sentence for sentence in said.sentences)
            for sentence in (*said.sentences, *said.cautions, alternative(answer)):
                assert faults(sentence) == []


def test_technical_words_give_standard_errors():
    line = curve_answer().lines[0]
    told = words(curve_answer(), "technical").sentences[1]
    assert "standard error" in told
    read = [value for value, _ in figures(told)]
    assert any(abs(value - 100 * line.se[0]) < 0.005 for value in read)


def test_the_subject_is_the_answers():
    answer = curve_answer(notices=("Rows were dropped.",))
    assert answer.subject == subject(notices=("Rows were dropped.",))
    assert words(answer).cautions[-1] == "Rows were dropped."
