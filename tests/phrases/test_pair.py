"""Two predictors together in words: chances first, both scales, nothing overstated."""

import math
from dataclasses import replace
from itertools import product

import pytest
from hypothesis import given
from hypothesis import strategies as st

from plainodds.answers.estimate import Estimate
from plainodds.answers.joint import AdditiveInteraction
from plainodds.answers.stretches import EffectAlong, Stretch
from plainodds.answers.surface import Surface
from plainodds.errors import QuestionRefused
from plainodds.phrases import alternative, code, words
from plainodds.phrases.pair_corners import corners
from plainodds.phrases.pair_joint import joint_words
from plainodds.phrases.pair_labels import (
    combination_label,
    effect_axis_title,
    followed_label,
    interaction_label,
    pair_title,
    place_label,
    rows_label,
    share_label,
    stretch_label,
)
from plainodds.values import from_json, to_json
from tests.phrases.made import AGE as AGE_FACTS
from tests.phrases.made import LINED, MATERIAL, NAN, PREDICTORS, REPAIRS, number_facts
from tests.phrases.made_pairs import effect_along, pair_answer
from tests.phrases.reading import faults, says, unaccounted

PAIRS = (
    ("material", "lined"),
    ("age_years", "material"),
    ("lined", "age_years"),
    ("age_years", "past_repairs"),
)
SHAPES = (
    {},
    {"times": 0.0},
    {"times": -2.5},
    {"alone": (-1.0, 1.0), "times": 0.8},
    {"alone": (0.0, 0.0), "times": 0.0},
    {"base": -8.0, "apart_se": 0.0001},
    {"base": 3.0, "apart_se": 0.3},
    {"se": None, "no_interval": "The fit has no covariance matrix"},
)
GRID = list(
    product(
        PAIRS,
        SHAPES,
        ("typical", "observed", (("lined", True),)),
        ("change", "slope"),
        ("probability", "odds"),
    )
)


def sensible(case):
    """Held values are not of the two themselves."""
    pair, _, others, *_ = case
    return isinstance(others, str) or not set(pair) & {name for name, _ in others}


GRID = [case for case in GRID if sensible(case)]


def parts_of(estimate):
    if estimate is None:
        return []
    return [estimate.estimate, estimate.se, estimate.lower, estimate.upper]


def numbers_of(answer):
    """Every number that a sentence about the answer may speak of."""
    found, effect = answer.interaction, answer.effect
    known = [answer.question.level, answer.subject.rows, answer.counted, 0.5, 0.1, 0, 1, 8]
    known += [100, 1_000, 10_000, 99, 999, 9_999, 1_000_000, 1_000, 0.001]
    for each in (found.at_profile, found.averaged, found.ratio, found.log_ratio):
        known += parts_of(each)
        known += [side * over for side in parts_of(each) if side for over in (100, 1_000, 10_000)]
    four = corners(answer)
    if four is not None:
        for each in four.all:
            known += parts_of(each)
            known += [round(each.estimate * over) for over in (100, 1_000, 10_000)]
        known += [apart * over for apart in four.differences for over in (100, 1_000, 10_000)]
        if all(0 < each.estimate < 1 for each in four.all):
            odds = [each.estimate / (1 - each.estimate) for each in four.all]
            known += [odds[1] / odds[0], odds[3] / odds[2]]
    for numbers in (effect.estimate, effect.se, effect.lower, effect.upper, effect.turns):
        known += numbers or ()
    for each in effect.stretches:
        known += [each.share, *(x for x in (each.start, each.end) if not isinstance(x, str))]
    if answer.joint is not None:
        known += numbers_of_table(answer.joint)
    for values in (answer.a_change, answer.b_change, (x for _, x in answer.held)):
        known += [float(each) for each in values if not isinstance(each, str)]
    known += [answer.a_change[1] - answer.a_change[0]] if "age" in answer.question.a else []
    for facts in (AGE_FACTS, REPAIRS):
        known += [facts.typical, *facts.quartiles]
    if found.test is not None:
        known += [found.test.statistic, found.test.degrees_of_freedom, found.test.p_value]
        known.append(found.test.denominator)
    known += [found.at_profile_p_value, found.averaged_p_value]
    return [each for each in known if each is not None and math.isfinite(each)]


def numbers_of_table(table):
    known = [*parts_of(table.multiplicative)]
    for cell in table.cells:
        known += [*parts_of(cell.chance), *parts_of(cell.odds_ratio), cell.rows, cell.events]
    for each in table.strata:
        ratio = parts_of(each.odds_ratio)
        known += [*ratio, *parts_of(each.risk_difference)]
        known += [1 / side for side in ratio if side]
    for measures in (table.additive_by_odds, table.additive_by_chances):
        if measures is not None:
            known += parts_of(measures.relative_excess_risk)
            known += parts_of(measures.attributable_proportion)
            known += parts_of(measures.synergy_index)
    return known


def made(pair, shape, others, number, scale):
    return pair_answer(*pair, others=others, number=number, scale=scale, **shape)


@pytest.mark.parametrize("audience", ["plain", "technical"])
@pytest.mark.parametrize(("pair", "shape", "others", "number", "scale"), GRID)
def test_every_figure_is_the_answers_own_and_sentences_are_well_made(
    pair, shape, others, number, scale, audience
):
    answer = made(pair, shape, others, number, scale)
    known, said = numbers_of(answer), words(answer, audience)
    assert said.sentences
    for sentence in (*said.sentences, alternative(answer)):
        assert unaccounted(sentence, known) == []
    for sentence in (*said.sentences, *said.cautions, alternative(answer)):
        assert faults(sentence) == []
        assert "coefficient" not in sentence
    assert len(said.sentences) <= 11 or audience == "technical"


@pytest.mark.parametrize("scale", ["probability", "odds"])
@pytest.mark.parametrize("shape", SHAPES)
def test_the_joint_tables_figures_are_its_own(shape, scale):
    answer = pair_answer(scale=scale, **shape)
    known, said = numbers_of(answer), joint_words(answer)
    for sentence in said.sentences:
        assert unaccounted(sentence, known) == []
    for sentence in (*said.sentences, *said.cautions):
        assert faults(sentence) == []


def test_two_predictors_are_told_chances_first_then_differences_then_odds():
    assert words(pair_answer()).sentences == (
        "For a typical pipe, with lined no, the chance of burst this winter is 8.3% with material "
        "cast iron and 18% with material PVC, that is 8 and 18 in 100; with lined yes, it is 23% "
        "and 53%, that is 23 and 53 in 100.",
        "With material PVC rather than cast iron, that is 10 more in 100 with lined no and 30 more "
        "with lined yes: 20 more in 100 with lined yes than with no (95% interval 16 to 24 more).",
        "Averaged over the 6,000 rows, each pipe with its own values of everything else, the same "
        "comparison gives 14 percentage points higher (95% interval 10 to 18 higher).",
        "On the odds scale, with material PVC rather than cast iron, the odds of burst this winter "
        "are multiplied by 2.46 (95% interval 1.66 to 3.64) with lined no and by 3.79 (2.56 to "
        "5.61) with lined yes: the ratio of odds ratios is 1.54 (1.04 to 2.28).",
        "With lined no (25% of the pipes) and yes (25%), the chance is higher with material PVC "
        "than with cast iron, the interval lying wholly above no difference.",
        "Counted in multiples of the chance with material cast iron and lined no, material PVC and "
        "lined yes together add more than the two apart would: RERI +2.43 (95% interval +2.04 to "
        "+2.82).",
        "The other predictors are held at their typical values: pipe age 40 years and past repairs "
        "0.",
        "The 95% intervals of the four chances are, in their order, 6% to 12%, 13% to 25%, 17% to "
        "31% and 44% to 63%.",
    )


def test_fewer_is_told_as_fewer_and_counted_from_the_first_difference():
    told = words(pair_answer(alone=(-1.0, 1.0), times=0.8)).sentences[1]
    assert told == (
        "With material PVC rather than cast iron, that is 48 fewer in 1,000 with lined no and 182 "
        "fewer with lined yes: 135 fewer in 1,000 with lined yes than with no (95% interval 96 to "
        "174 fewer)."
    )


@pytest.mark.parametrize(("apart_se", "told"), [(0.02, False), (0.2, True)])
def test_an_interval_that_holds_no_difference_leaves_the_direction_open(apart_se, told):
    sentences = words(pair_answer(apart_se=apart_se)).sentences
    assert sentences[1].endswith("leaves open whether there are more or fewer.") is told
    assert sentences[2].endswith("leaves open whether it is higher or lower.") is told


def test_a_ratio_of_odds_ratios_whose_interval_holds_1_is_left_open():
    assert "leaves open whether it is above or below 1" not in str(words(pair_answer()))
    assert "leaves open whether it is above or below 1" in str(words(pair_answer(se=0.5)))


def test_without_a_shared_term_the_odds_are_said_to_be_alike_by_assumption_and_chances_not():
    told = words(pair_answer(times=0.0)).sentences
    assert told[3] == (
        "The model has no term that joins material and lined, so by assumption an odds ratio of "
        "the one is the same at every value of the other: with material PVC rather than cast iron, "
        "the odds of burst this winter are multiplied by 2.46 (95% interval 1.66 to 3.64)."
    )
    assert told[4].startswith("In chances it still differs, since the same factor on the odds")
    vague = words(pair_answer(times=0.0, apart_se=0.3)).sentences
    assert vague[4].startswith("In chances it may still differ, since the same factor")
    assert (
        "ratio of odds ratios exactly 1" in str(words(pair_answer(times=0.0), "technical")).lower()
    )


@pytest.mark.parametrize(
    ("ratio", "apart", "told"),
    [
        ((0.8, 0.5, 0.9), (0.1, 0.05, 0.15), "The two scales point in opposite directions"),
        ((1.5, 1.2, 1.9), (-0.1, -0.15, -0.05), "The two scales point in opposite directions"),
        ((1.5, 0.9, 2.5), (0.1, 0.05, 0.15), "So it is clear in chances and open on the odds"),
        ((1.5, 1.2, 1.9), (0.1, -0.05, 0.25), "So it is clear on the odds scale and open in"),
        ((1.5, 1.2, 1.9), (0.1, 0.05, 0.15), ""),
        ((0.8, 0.5, 0.9), (-0.1, -0.15, -0.05), ""),
        ((1.5, 0.9, 2.5), (-0.1, -0.25, 0.05), ""),
        ((1.5, None, None), (-0.1, None, None), ""),
    ],
)
@pytest.mark.parametrize("others", ["typical", "observed"])
def test_scales_that_tell_different_things_are_said_to_and_why(ratio, apart, told, others):
    found = [Estimate(each[0], None, *each[1:]) for each in (ratio, apart)]
    answer = pair_answer(others=others)
    mine = "averaged" if others == "observed" else "at_profile"
    interaction = replace(answer.interaction, ratio=found[0], **{mine: found[1]})
    said = [
        sentence
        for sentence in words(replace(answer, interaction=interaction)).sentences
        if "the same factor on the odds" in sentence
    ]
    assert [sentence.startswith(told) for sentence in said] == ([True] if told else [])


def with_stretches(answer, *stretches, turns=()):
    return replace(answer, effect=replace(answer.effect, stretches=stretches, turns=turns))


ALONG_AGE = {"a": "material", "b": "age_years"}


def test_stretches_are_told_with_their_share_and_without_the_word_nobody_reads_rightly():
    answer = with_stretches(
        pair_answer(**ALONG_AGE),
        Stretch(0.0, 12.2, "open", 0.2),
        Stretch(12.2, 68.4, "above", 0.71),
        Stretch(68.4, 90.0, "open", 0.06),
        Stretch(90.0, 110.0, "below", 0.0),
    )
    told = words(answer).sentences
    assert (
        "With pipe age from 12 to 68 years (71% of the pipes), the chance is higher with material "
        "PVC than with cast iron, the interval lying wholly above no difference; with pipe age "
        "from 90 to 110 years (no pipes), it is lower, the interval lying wholly below no "
        "difference; with pipe age from 0 to 12 years (20% of the pipes) and from 68 to 90 years "
        "(6.0%), the interval includes no difference, so the data leave the direction open."
    ) in told


def test_many_stretches_are_cut_short_and_the_technical_words_tell_all():
    ends = [float(x) for x in range(0, 110, 10)]
    signs = ["above", "open"] * 5
    stretches = [
        Stretch(x, x + 10, sign, 0.01 * (x + 1) / 10) for x, sign in zip(ends, signs, strict=False)
    ]
    answer = with_stretches(pair_answer(**ALONG_AGE), *stretches)
    plain = next(each for each in words(answer).sentences if "no difference" in each)
    assert plain.count(" to ") == 6
    assert plain.count("and 2 more places") == 2
    assert "from 80 to 90 years" in plain
    assert "from 0 to 10 years" not in plain
    technical = next(each for each in words(answer, "technical").sentences if "rom 0 to 10" in each)
    assert technical.count(" to ") == 10


@pytest.mark.parametrize(
    ("share", "told"),
    [(NAN, ""), (0.0, "no pipes"), (1.0, "all pipes"), (0.0004, "under 0.1% of the pipes")],
)
def test_a_share_is_told_in_words_where_figures_would_mislead(share, told):
    answer = pair_answer()
    assert share_label(answer, share) == told
    stretch = Stretch("PVC", "PVC", "below", share)
    label = stretch_label(pair_answer("lined", "material"), stretch)
    assert label == f"material PVC: lower{f' ({told})' if told else ''}"


@pytest.mark.parametrize(
    ("effects", "turns", "told"),
    [
        ((1, 3, 5, 4, 2), (50.0,), "first rises and from 50 years on falls"),
        ((-1, -3, -5, -4, -2), (50.0,), "first falls and from 50 years on rises"),
        ((1, 3, 1, 3, 5), (25.0, 50.0), "first rises, from 25 years on falls and from 50 years on"),
    ],
)
@pytest.mark.parametrize(
    ("number", "scale", "what"),
    [
        ("change", "probability", "this difference"),
        ("slope", "probability", "this figure"),
        ("change", "odds", "this odds ratio"),
    ],
)
def test_where_the_effect_turns_is_told_with_its_direction(
    effects, turns, told, number, scale, what
):
    at = (0.0, 25.0, 50.0, 75.0, 110.0)
    nothing = 1.0 if scale == "odds" else 0.0
    each = [
        Estimate(nothing + x / 100, 0.001, nothing + x / 101, nothing + x / 99) for x in effects
    ]
    b = number_facts("depth_m", label="depth", unit="years")
    answer = pair_answer("age_years", "past_repairs", number=number, scale=scale)
    answer = replace(
        answer,
        question=replace(answer.question, b="depth_m"),
        subject=replace(answer.subject, predictors=(*PREDICTORS, b)),
        effect=effect_along(at, each, nothing, turns=turns),
        b_change=(25.0, 75.0),
        lines=None,
        sloped=("age_years",) if number == "slope" else (),
    )
    said = str(words(answer))
    assert f"Along depth, {what} {told}" in said
    assert "where it turns, the interaction changes its sign." in said


def test_turns_of_an_effect_that_is_nowhere_clear_are_left_to_technical_words():
    answer = with_stretches(
        pair_answer(**ALONG_AGE), Stretch(0.0, 110.0, "open", 1.0), turns=(50.0,)
    )
    assert "changes its sign" not in str(words(answer))
    assert "changes its sign" in str(words(answer, "technical"))


def test_slopes_are_told_per_unit_with_the_place_where_they_are_taken():
    told = words(pair_answer("age_years", "material", number="slope", apart_se=0.0005)).sentences
    assert told[0].startswith(
        "For a typical pipe, per additional year of pipe age, taken at 40 years, the chance of "
        "burst this winter is about 0.23 percentage points higher (95% interval 0.13 to 0.32 "
        "higher) with material cast iron and about 0.58 percentage points higher ("
    )
    assert told[1].startswith("With material PVC, this figure lies 0.35 percentage points higher")
    averaged = words(pair_answer("age_years", "material", number="slope", others="observed"))
    assert "taken at each pipe's own value, the average chance" in averaged.sentences[0]
    assert "For a typical pipe, the same comparison gives" in averaged.sentences[2]


def test_two_slopes_are_told_per_unit_of_both():
    answer = pair_answer("age_years", "past_repairs", number="slope")
    plain, technical = (words(answer, audience).sentences for audience in ("plain", "technical"))
    assert plain[1].startswith(
        "Per additional unit of past repairs, taken at 0, this figure lies 0.18 percentage points "
    )
    assert technical[0].startswith(
        "Cross partial ∂²π/∂a∂b, per additional year of pipe age and per additional unit of past "
        "repairs, at the held profile +0.18 percentage points"
    )


def test_chances_that_the_lines_do_not_hold_are_told_as_differences():
    answer = replace(pair_answer("age_years", "material", table=False), lines=None)
    told = words(answer).sentences
    assert told[0].startswith(
        "For a typical pipe, with pipe age 60 rather than 20 years, the chance of burst this "
        "winter is 8.5 percentage points higher (95% interval 5 to 12 higher) with material cast "
        "iron and"
    )
    assert told[1].startswith("With material PVC, this difference lies 13 percentage points higher")
    assert "times as large with material PVC as with material cast iron" in str(words(answer))


def test_the_four_chances_are_found_wherever_the_answer_holds_them():
    one, other = pair_answer(), pair_answer(table=False)
    assert corners(one) == corners(other)
    assert corners(one).neither.estimate == pytest.approx(1 / (1 + math.exp(2.4)))
    along, across = (
        corners(pair_answer(*names)) for names in (("material", "lined"), ("lined", "material"))
    )
    assert along.a_alone.estimate == pytest.approx(across.b_alone.estimate, rel=1e-12)
    assert along.both.estimate == pytest.approx(across.both.estimate, rel=1e-12)
    assert (along.both.lower, along.both.upper) == pytest.approx(
        (across.both.lower, across.both.upper), rel=1e-12
    )
    line = pair_answer("age_years", "material").lines
    odds = replace(line, question=replace(line.question, scale="odds"))
    odds = replace(
        odds,
        lines=tuple(
            replace(
                each,
                estimate=tuple(p / (1 - p) for p in each.estimate),
                lower=tuple(p / (1 - p) for p in each.lower),
                upper=tuple(p / (1 - p) for p in each.upper),
            )
            for each in line.lines
        ),
    )
    answer = pair_answer("age_years", "material")
    carried = corners(replace(answer, lines=odds))
    for found, wanted in zip(carried.all, corners(answer).all, strict=True):
        assert found.estimate == pytest.approx(wanted.estimate)
        assert found.upper == pytest.approx(wanted.upper)


def test_a_sample_that_tells_no_chances_is_told_in_odds_alone():
    for audience in ("plain", "technical"):
        said = words(pair_answer(scale="odds", sampling="case-control"), audience)
        told = " ".join(said.sentences)
        assert "chance" not in told.replace("of chances on the logit scale", "")
        assert "the odds are higher with material PVC than with cast iron" in told
        assert any("odds ratios but no chances" in caution for caution in said.cautions)
        assert any("stand for ratios of chances only where" in each for each in said.cautions)
    assert "Counted in multiples of the odds with" in str(
        words(pair_answer(scale="odds", sampling="case-control"))
    )


def test_odds_ratios_of_averages_are_told_apart_from_those_at_typical_values():
    answer = pair_answer("age_years", "material", others="observed", scale="odds")
    said = words(answer)
    assert "times as large with material PVC as with material cast iron" in str(said)
    assert "the odds matching the average chance are higher with pipe age 60 years" in str(said)
    assert any(each.startswith("Odds ratios along material compare") for each in said.cautions)
    assert effect_axis_title(answer) == "Odds ratio of burst this winter, of averages"
    held = pair_answer("age_years", "material", scale="odds")
    assert "are multiplied by 2.23 (95% interval 1.50 to 3.29) with" in str(words(held))
    assert "average" not in " ".join(words(held).cautions)
    alone = pair_answer("age_years", "material", others="observed", times=0.0, scale="odds")
    assert "same at every value of the other." in str(words(alone))
    chances = words(pair_answer("age_years", "material", others="observed"))
    assert any(each.startswith("Odds ratios here hold with") for each in chances.cautions)


def test_two_predictors_alone_have_no_others_to_speak_of():
    both = tuple(facts for facts in PREDICTORS if facts.name in ("material", "lined"))

    def alone(**stated):
        answer = pair_answer(predictors=both, **stated)
        return replace(answer, held=())

    for others in ("typical", "observed"):
        told = words(alone(others=others)).sentences
        assert told[0].startswith("With lined no, the chance of burst this winter is 8.3% with")
        assert not any("average" in each or "same comparison" in each for each in told)
        assert not any("other predictors" in each for each in told)
    told = words(alone(others="observed", offset=0.3))
    assert told.sentences[0].startswith("With lined no, the average chance of burst this winter")
    assert any("the same comparison gives" in each for each in told.sentences)
    assert "Odds ratios here hold at typical values; they" in str(told)


def test_an_answer_without_intervals_says_why_and_leaves_nothing_open():
    answer = pair_answer(se=None, no_interval="The fit has no covariance matrix")
    for audience in ("plain", "technical"):
        said = words(answer, audience)
        assert "interval" not in " ".join(said.sentences)
        assert "No intervals can be given here." in said.cautions
        assert "open" not in " ".join(said.sentences)


def test_what_the_rows_leave_open_altogether_is_said_to_be():
    answer = pair_answer()
    unknown = Estimate(NAN, None, None, None)
    cells = tuple(
        replace(cell, chance=unknown, odds_ratio=unknown, rows=0.0, events=0.0)
        if (cell.a, cell.b) == ("PVC", True)
        else cell
        for cell in answer.joint.cells
    )
    measures = AdditiveInteraction(unknown, unknown, None)
    answer = replace(
        answer,
        joint=replace(
            answer.joint,
            cells=cells,
            multiplicative=unknown,
            additive_by_odds=measures,
            additive_by_chances=measures,
        ),
        interaction=replace(
            answer.interaction, at_profile=unknown, ratio=unknown, log_ratio=unknown
        ),
    )
    for said in (words(answer), words(answer, "technical"), joint_words(answer)):
        for sentence in (*said.sentences, *said.cautions):
            assert faults(sentence) == []
        assert any(
            caution.startswith("The data have no pipes with material PVC and lined yes;")
            for caution in said.cautions
        )
    assert "data leave open altogether" in str(words(answer))
    assert "the chance is not known and the odds ratio is not known" in str(joint_words(answer))


def test_a_recoded_reference_is_told_with_its_reason_and_odds_ratios_keep_their_direction():
    answer = pair_answer(alone=(-1.0, 1.0), times=0.8)
    assert answer.joint.recoded == ("material",)
    said = words(answer)
    assert (
        "The joint table counts from material PVC and lined no, since that combination has the "
        "lowest odds: measures of adding up can be read only where both factors raise the odds."
    ) in said.cautions
    odds = next(each for each in said.sentences if each.startswith("On the odds scale"))
    assert says(odds, math.exp(-0.9))
    assert says(odds, math.exp(-0.9 - 0.8 * 0.9 * 1.2 * -1.0 * -1.0))
    assert "multiplied by 0.41 (95% interval 0.27 to 0.60) with lined no" in odds
    assert not any("lowest odds" in caution for caution in words(pair_answer()).cautions)


def test_cells_without_rows_or_events_are_named():
    said = words(pair_answer(rows=(300.0, 200.0, 0.0, 5.0)))
    assert any(
        each.startswith("The data have no pipes with material cast iron and lined yes;")
        for each in said.cautions
    )
    assert any(
        each.startswith("Among the pipes with material PVC and lined yes there is no event")
        for each in said.cautions
    )
    empty = pair_answer(rows=(None, None, None, None))
    assert not any("no pipes" in each or "no event" in each for each in words(empty).cautions)
    cell = pair_answer().joint.cells[3]
    for rows, events, told in (
        (80.0, 8.0, "8 of 80 pipes"),
        (1.0, 0.0, "0 of 1 pipe"),
        (0.0, 0.0, "no pipes"),
        (None, None, ""),
        (2.5, 1.25, "1.25 of 2.5 pipes"),
    ):
        assert rows_label(empty, replace(cell, rows=rows, events=events)) == told


def test_a_missing_synergy_index_is_missed_with_its_reason():
    answer = pair_answer(alone=(0.0, 0.0), times=0.0)
    assert answer.joint.additive_by_chances.synergy_index is None
    assert any(each.startswith("There is no synergy index:") for each in words(answer).cautions)
    assert "synergy index undefined" in str(words(answer, "technical"))
    assert not any("synergy" in each for each in words(pair_answer()).cautions)


def test_the_joint_table_is_refused_where_there_is_none_with_the_way_out():
    with pytest.raises(QuestionRefused, match=r"a_values=\(from, to\)"):
        joint_words(pair_answer("age_years", "material"))


@pytest.mark.parametrize(
    ("parts", "told"),
    [
        ({}, "Wald test that no term joins material and lined: χ² = 7.25 on 1 degree of freedom"),
        ({"freedom": 2}, "χ² = 7.25 on 2 degrees of freedom, p-value 0.007."),
        ({"denominator": 5990.0}, "F = 7.25 on 1 and 5,990 degrees of freedom, p-value 0.007."),
        ({"test": "likelihood_ratio"}, "Likelihood-ratio test that no term joins material and"),
    ],
)
def test_the_test_is_named_with_its_degrees_of_freedom(parts, told):
    assert told in str(words(pair_answer(**parts), "technical"))
    assert "degree" not in " ".join(words(pair_answer(**parts)).sentences)


def test_beyond_the_data_is_said_of_lines_of_the_map_and_of_the_effect():
    answer = pair_answer("age_years", "past_repairs")
    surface = Surface(
        (0.0, 1.0), (0.0, 1.0), ((0.1, 0.2),) * 2, ((0.0, 0.0),) * 2, ((True,) * 2,) * 2
    )
    assert "no rows near by" not in str(words(replace(answer, surface=surface)))
    hatched = replace(surface, supported=((True, False), (True, True)))
    assert "Where the map is hatched the data have no rows near by" in str(
        words(replace(answer, surface=hatched))
    )
    assert alternative(replace(answer, surface=hatched)).split(". ")[1] == (
        "A map of Pipe age (years) against Past repairs with labelled contours, hatched where no "
        "row lies near"
    )
    beyond = (*(True,) * 7, False, False)
    odds = pair_answer(
        "age_years", "past_repairs", scale="odds", sampling="case-control", supported=beyond
    )
    assert "the model speaks on its own: past repairs above 6." in str(words(odds))
    levels = pair_answer(
        scale="odds", sampling="case-control", supported=(True, False), table=False
    )
    assert "the model speaks on its own: lined yes." in str(words(levels))


def test_titles_and_labels_name_both_predictors_and_what_is_followed():
    answer = pair_answer()
    assert pair_title(answer) == "Chance of burst this winter: material and lined together"
    assert pair_title(pair_answer(others="observed")).startswith("Average chance of burst")
    assert pair_title(pair_answer(scale="odds")).startswith("Odds of burst this winter:")
    assert followed_label(answer) == "Material PVC against cast iron"
    assert followed_label(pair_answer("age_years")) == "Pipe age from 20 to 60 years"
    sloped = {"a": "age_years", "b": "past_repairs", "number": "slope"}
    assert followed_label(pair_answer(**sloped)) == "Per additional year of pipe age"
    odds = pair_answer(**sloped, scale="odds")
    assert followed_label(odds) == "Per 10 years more of pipe age"
    bent = replace(odds.subject, predictors=(replace(AGE_FACTS, linear=False), *PREDICTORS[1:]))
    assert followed_label(replace(odds, subject=bent)) == "Pipe age from 40 to 50 years"
    assert effect_axis_title(answer) == (
        "Change of the chance of burst this winter (percentage points)"
    )
    assert effect_axis_title(pair_answer(**sloped)).endswith("(percentage points per year more)")
    assert effect_axis_title(odds) == "Odds ratio of burst this winter"
    assert combination_label(answer, answer.joint.cells[3]) == "material PVC and lined yes"


@pytest.mark.parametrize(
    ("names", "number", "told"),
    [
        (("material", "lined"), "slope", "Difference of differences"),
        (("age_years", "lined"), "slope", "Difference of slopes"),
        (("age_years", "lined"), "change", "Difference of differences"),
        (
            ("lined", "age_years"),
            "slope",
            "Change of the difference per additional year of pipe age",
        ),
        (
            ("past_repairs", "age_years"),
            "slope",
            "Change of the slope per additional year of pipe age",
        ),
    ],
)
def test_the_interaction_is_called_by_what_it_is(names, number, told):
    answer = pair_answer(*names, number=number)
    assert interaction_label(answer, "probability") == told
    assert interaction_label(answer, "odds") == "Ratio of odds ratios"


@pytest.mark.parametrize(
    ("facts", "place", "told"),
    [
        (AGE_FACTS, 74.1623, "74 years"),
        (REPAIRS, 6.115, "6"),
        (number_facts(minimum=0.0, maximum=0.5, unit="km"), 0.123456, "0.123 km"),
        (number_facts(minimum=NAN, maximum=NAN), 74.1623, "74.1623 years"),
        (number_facts(minimum=3.0, maximum=3.0), 3.0, "3 years"),
        (MATERIAL, "PVC", "PVC"),
        (LINED, True, "yes"),
    ],
)
def test_places_between_anybodys_values_are_told_no_finer_than_a_hundredth_of_the_range(
    facts, place, told
):
    assert place_label(facts, place) == told


def odd_subject(text, answer):
    """The answer with labels that nobody would wish for."""
    predictors = tuple(
        replace(
            facts,
            label=f"{text} {facts.name}",
            level_labels=tuple(f"{text}{place}" for place, _ in enumerate(facts.levels)),
        )
        for facts in answer.subject.predictors
    )
    lines = answer.lines
    subject = replace(answer.subject, predictors=predictors)
    return replace(
        answer, subject=subject, lines=None if lines is None else replace(lines, subject=subject)
    )


@pytest.mark.parametrize("text", ["<b>&", "  two\nlines ", "½ “q”", "$x_1$", "ÄÖ"])
@pytest.mark.parametrize("names", PAIRS)
def test_labels_of_any_letters_stay_on_one_line(text, names):
    answer = odd_subject(text, pair_answer(*names, turns=()))
    for audience in ("plain", "technical"):
        said = words(answer, audience)
        for sentence in (*said.sentences, *said.cautions, alternative(answer)):
            assert set(faults(sentence)) <= {"no capital"}


@given(
    st.floats(-6, 6), st.floats(-6, 6), st.floats(-4, 4), st.floats(-12, 12), st.floats(0.001, 5)
)
def test_sentences_are_well_made_whatever_the_sizes(one, other, times, base, se):
    answer = pair_answer(alone=(one, other), times=times, base=base, se=se, apart_se=se / 10)
    known = numbers_of(answer)
    for said in (words(answer), words(answer, "technical"), joint_words(answer)):
        for sentence in (*said.sentences, *said.cautions):
            assert faults(sentence) == []
    for sentence in words(answer).sentences[:2]:
        assert unaccounted(sentence, known) == []


def test_an_effect_along_nothing_is_no_reason_to_fail():
    answer = replace(pair_answer(), effect=EffectAlong((), (), None, None, None, (), (), ()))
    assert words(answer).sentences == tuple(
        each for each in words(pair_answer()).sentences if "no difference" not in each
    )


@pytest.mark.parametrize(
    ("stated", "told"),
    [
        ({}, 'answer = fit.pair("material", "lined")'),
        ({"a_values": ("CI", "PVC")}, 'fit.pair("material", "lined", a_values=("CI", "PVC"))'),
        ({"b_values": (False, True)}, 'fit.pair("material", "lined", b_values=(False, True))'),
        ({"others": (("age_years", 60.0),)}, 'others={"age_years": 60.0})'),
        ({"others": "observed"}, 'others="observed")'),
        ({"scale": "odds", "test": "likelihood_ratio"}, 'scale="odds",'),
        ({"number": "slope", "shape": "map"}, 'number="slope", shape="map")'),
        ({"level": 0.9}, "level=0.9)"),
    ],
)
def test_the_code_asks_the_question_again(stated, told):
    answer = pair_answer()
    asked = replace(answer, question=replace(answer.question, **stated))
    assert told in " ".join(code(asked).split())
    assert from_json(to_json(asked)) == asked
