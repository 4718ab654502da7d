"""Changes in words: absolute before relative, both framings, for whom, and nothing overstated."""

import math
from dataclasses import replace
from itertools import product

import pytest

from plainodds.answers.comparing import number_needed
from plainodds.answers.estimate import Estimate
from plainodds.answers.moves import Move, Shift
from plainodds.answers.where import Mask
from plainodds.phrases import alternative, words
from plainodds.phrases.moves import end_label, moves_label, shift_label, start_label
from tests.phrases.made import AGE as AGE_FACTS
from tests.phrases.made import PREDICTORS, number_facts, subject
from tests.phrases.made_changes import AGE, change_answer, difference
from tests.phrases.reading import faults, says, unaccounted

TOGETHER = (("age_years", Move(60.0, 0.0)), ("material", Move("CI", "PVC")))
YOUNGER = (("age_years", Shift(by=-10, lowest=0)),)
TENTH = (("age_years", Shift(times=1.1)), ("lined", Move(False, True)))
ETAS = [(-1.5, -2.4), (-2.4, -1.5), (0.0, 0.0), (-8.0, -7.9), (30.0, -30.0), (-1.0, -1.001)]
OTHERS = ("observed", "typical", (("lined", True),), (("past_repairs", 2.0),))
GRID = [
    (etas, moves, others, se)
    for etas, moves, others, se in product(
        ETAS, (AGE, TOGETHER, YOUNGER, TENTH), OTHERS, (0.2, None)
    )
    if not (moves == TENTH and others == OTHERS[2])
]


def numbers_of(answer):
    """Every number that a sentence about the answer may speak of."""
    known = [answer.question.level, answer.subject.rows, answer.counted, 0.1, 10, 1]
    known += [100, 1_000, 10_000, 99, 999, 9_999, 1_000_000]
    for estimate in (answer.start, answer.end):
        sides = [each for each in (estimate.estimate, estimate.lower, estimate.upper) if each]
        sides += [1 - each for each in sides]
        known += [*sides, *(round(each * over) for each in sides for over in (100, 1000, 10_000))]
        known.append(estimate.se)
    compared = answer.comparison
    for estimate in (compared.odds_ratio, compared.risk_ratio, compared.risk_difference):
        known += [estimate.estimate, estimate.se, estimate.lower, estimate.upper]
    apart = compared.risk_difference
    ends = [each for each in (apart.estimate, apart.lower, apart.upper) if each is not None]
    known += [each * over for each in ends for over in (100, 1000, 10_000)]
    known.append(answer.number_needed.estimate)
    for piece in (answer.number_needed.for_one_more, answer.number_needed.for_one_fewer):
        known += piece or ()
    for _, move in answer.question.moves:
        values = (move.start, move.end) if isinstance(move, Move) else (-move.by, 0, 30, 40, 44)
        known += [float(each) for each in values if not isinstance(each, str)]
    known += [float(held) for _, held in answer.held if not isinstance(held, str)]
    return [each for each in known if each is not None and math.isfinite(each)]


@pytest.mark.parametrize("audience", ["plain", "technical"])
@pytest.mark.parametrize(("etas", "moves", "others", "se"), GRID)
def test_every_figure_is_the_answers_own_and_sentences_are_well_made(
    etas, moves, others, se, audience
):
    answer = change_answer(*etas, moves, se, others=others)
    known, said = numbers_of(answer), words(answer, audience)
    for sentence in (*said.sentences, alternative(answer)):
        assert unaccounted(sentence, known) == []
    for sentence in (*said.sentences, *said.cautions, alternative(answer)):
        assert faults(sentence) == []
        assert "effect" not in sentence


def test_a_change_is_told_absolute_before_relative_and_from_both_sides():
    assert words(change_answer()).sentences == (
        "With pipe age 60 rather than 20 years and everything else as it is, the average chance of "
        "burst this winter among pipes like those in the data is 18% rather than 8.3%, that is 18 "
        "rather than 8 in 100.",
        "The 95% intervals of the two are 13% to 25% and 6% to 12%.",
        "That is 10 more in 100 (95% interval 8 to 12 more), or 9.9 percentage points higher (8.0 "
        "to 11.9 higher).",
        "The chance that this does not happen is 82% rather than 91.7%, that is 82 rather than 92 "
        "in 100.",
        "Put as ratios, the average chance is multiplied by 2.19 (95% interval 1.48 to 3.25) and "
        "the odds by 2.46 (95% interval 1.66 to 3.64).",
        "For every 10 pipes compared there is one event more (95% interval 8.4 to 13).",
        "Each pipe keeps its own values of the other predictors, and the chances are averaged over "
        "the 6,000 rows.",
    )


def test_a_fall_is_told_as_fewer_and_lower():
    told = words(change_answer(-2.4, -1.5, difference_se=0.03)).sentences
    assert told[2] == (
        "That is 10 fewer in 100 (95% interval 4 to 16 fewer), or 9.9 percentage points lower (4 "
        "to 16 lower)."
    )
    assert "there is one event fewer (95% interval 6.3 to 25)." in told[5]


def test_counts_are_told_over_a_thousand_where_a_hundred_would_hide_the_difference():
    told = words(change_answer(-2.35, -2.4)).sentences
    assert "that is 87 rather than 83 in 1,000." in told[0]
    assert told[2].startswith("That is 4 more in 1,000 (95% interval 16 fewer to 23 more)")


def test_counts_that_do_not_add_up_are_said_to_be_rounded():
    # 182 − 83 in 1,000 is 99, but 18 − 8 in 100 is 10
    assert not any("rounded" in caution for caution in words(change_answer()).cautions)
    uneven = change_answer(math.log(0.2449 / 0.7551), math.log(0.1451 / 0.8549))
    assert any("may differ by one" in caution for caution in words(uneven).cautions)


def test_an_interval_that_includes_no_difference_leaves_the_direction_open():
    told = words(change_answer(-2.3, -2.4, difference_se=0.02)).sentences
    assert told[2].endswith("which leaves open whether there are more or fewer.")


@pytest.mark.parametrize(
    ("apart", "told"),
    [
        (
            Estimate(0.05, 0.01, -0.02, 0.12),
            "For every 20 pipes compared there is one event more; the 95% interval includes no "
            "difference, so it goes from 8.3 for one more, through infinity (no difference), to 50 "
            "for one fewer.",
        ),
        (
            Estimate(-0.05, 0.01, -0.12, 0.02),
            "For every 20 pipes compared there is one event fewer; the 95% interval includes no "
            "difference, so it goes from 8.3 for one fewer, through infinity (no difference), to "
            "50 for one more.",
        ),
        (
            Estimate(0.05, 0.01, 0.0, 0.1),
            "For every 20 pipes compared there is one event more; the 95% interval goes from 10 "
            "for one more to infinity, which stands for no difference.",
        ),
        (
            Estimate(0.0, 0.01, -0.02, 0.02),
            "With no difference, no number of pipes shows one event more or fewer; the 95% "
            "interval includes no difference, so it goes from 50 for one fewer, through infinity "
            "(no difference), to 50 for one more.",
        ),
        (
            Estimate(0.05, None, None, None),
            "For every 20 pipes compared there is one event more.",
        ),
        (
            Estimate(1.0, None, None, None),
            "For every pipe compared there is one event more.",
        ),
    ],
)
def test_the_number_needed_is_told_in_one_piece_or_two(apart, told):
    answer = replace(change_answer(), number_needed=number_needed(apart))
    assert told in words(answer).sentences
    for sentence in words(answer).sentences:
        assert faults(sentence) == []


def test_technical_words_give_both_pieces_of_the_number_needed():
    apart = Estimate(0.05, 0.01, -0.02, 0.12)
    answer = replace(change_answer(), number_needed=number_needed(apart))
    assert (
        "Number needed 20 for one event more (95% interval in two pieces, 8.3 to infinity for one "
        "more and 50 to infinity for one fewer)." in words(answer, "technical").sentences
    )


@pytest.mark.parametrize(
    ("moves", "told"),
    [
        (TOGETHER, "With pipe age 0 rather than 60 years and material PVC rather than cast iron,"),
        (YOUNGER, "With pipe age 10 years less than it is (moved no lower than 0 years) and"),
        (TENTH, "With pipe age 10% more than it is and lined yes rather than no, and everything"),
        ((("age_years", Move(0.0, 1.0)),), "With pipe age 1 rather than 0 years and"),
        ((("age_years", Move(1.0, 5.0)),), "With pipe age 5 years rather than 1 year and"),
        ((("past_repairs", Move(0, 2)),), "With past repairs 2 rather than 0 and"),
    ],
)
def test_what_changes_is_said_first(moves, told):
    assert words(change_answer(moves=moves)).sentences[0].startswith(told)


@pytest.mark.parametrize(
    ("shift", "told"),
    [
        (Shift(by=1), "1 year more than it is"),
        (Shift(times=0.5), "50% less than it is"),
        (Shift(times=3), "multiplied by 3"),
        (Shift(times=1.1, by=-5), "10% more and then 5 years less than it is"),
        (
            Shift(by=5, lowest=0, highest=50),
            "5 years more than it is (moved no lower than 0 years and no higher than 50 years)",
        ),
    ],
)
def test_a_shift_is_told_from_each_ones_own_value(shift, told):
    assert shift_label(AGE_FACTS, shift) == told


def test_a_shift_in_percent_is_told_in_points_or_as_a_factor():
    share = number_facts(unit="%")
    assert shift_label(share, Shift(by=10)) == "10 percentage points more than it is"
    assert shift_label(share, Shift(by=-1)) == "1 percentage point less than it is"
    assert shift_label(share, Shift(times=1.1)) == "multiplied by 1.1"


def test_labels_say_the_change_its_start_and_its_end():
    about = subject()
    assert moves_label(about, TOGETHER) == (
        "Pipe age from 60 to 0 years; material PVC against cast iron"
    )
    assert start_label(about, TOGETHER) == "pipe age 60 years and material cast iron"
    assert end_label(about, TOGETHER) == "pipe age 0 years and material PVC"
    assert start_label(about, TENTH) == "pipe age as it is and lined no"
    assert end_label(about, TENTH) == "pipe age 10% more than it is and lined yes"


def test_at_a_profile_a_shift_is_a_change_between_two_values():
    told = words(change_answer(moves=YOUNGER, others="typical")).sentences
    assert told[0].startswith(
        "For a typical pipe, with pipe age 30 rather than 40 years, the chance of burst this winter"
    )
    assert "as it is" not in " ".join(told)


def test_a_held_profile_is_said_and_nothing_is_called_an_average():
    answer = change_answer(others=(("lined", True),))
    answer = replace(answer, held=(("past_repairs", 0.0), ("material", "CI"), ("lined", True)))
    told = words(answer).sentences
    assert told[0].startswith("For a pipe with lined yes, otherwise typical, with pipe age 60")
    assert told[-2:] == (
        "Held as stated: lined yes.",
        "The remaining predictors are held at their typical values: past repairs 0 and material "
        "cast iron.",
    )
    for audience in ("plain", "technical"):
        assert "average" not in str(words(answer, audience))


@pytest.mark.parametrize(
    ("where", "whom", "rows"),
    [
        (None, "among pipes like those in the data is", "the 120 rows."),
        ((("material", "PVC"),), "among pipes with material PVC is", "120 rows with material PVC."),
        (
            (("material", ("CI", "DI")), ("past_repairs", 0)),
            "among pipes with material cast iron or ductile iron and past repairs 0 is",
            "120 rows with material cast iron or ductile iron and past repairs 0.",
        ),
        (
            (("age_years", (40, 60)),),
            "among pipes with pipe age 40 to 60 years is",
            "120 rows with pipe age 40 to 60 years.",
        ),
        (
            (("age_years", (40, math.inf)),),
            "among pipes with pipe age 40 years or more is",
            "120 rows with pipe age 40 years or more.",
        ),
        (
            (("age_years", (-math.inf, 40)),),
            "among pipes with pipe age 40 years or less is",
            "120 rows with pipe age 40 years or less.",
        ),
        (Mask(120, "ab"), "among the pipes chosen (120 rows) is", "120 rows chosen by a mask."),
    ],
)
def test_for_whom_is_said(where, whom, rows):
    answer = change_answer(where=where, counted=120)
    assert whom in words(answer).sentences[0]
    assert words(answer).sentences[-1].endswith(rows)
    for sentence in (*words(answer).sentences, alternative(answer)):
        assert faults(sentence) == []


def test_with_nothing_else_in_the_model_nothing_is_averaged():
    alone = change_answer(predictors=(AGE_FACTS,))
    told = words(alone)
    assert told.sentences[0].startswith("With pipe age 60 rather than 20 years, the chance of")
    assert "average" not in str(told)
    shifted = words(change_answer(moves=YOUNGER, predictors=(AGE_FACTS,)))
    assert "the average chance" in shifted.sentences[0]
    assert "everything else" not in shifted.sentences[0]


@pytest.mark.parametrize("audience", ["plain", "technical"])
def test_the_odds_ratio_is_kept_apart_from_ratios_of_chances_and_from_conditional_ones(audience):
    common, rare = words(change_answer(), audience), words(change_answer(-4.0, -4.4), audience)
    assert any("An odds ratio is not a ratio of chances" in each for each in common.cautions)
    assert not any("not a ratio of chances" in each for each in rare.cautions)
    assert any("odds of two averages" in each for each in rare.cautions)
    held = words(change_answer(others="typical"), audience)
    assert not any("two averages" in each for each in held.cautions)


@pytest.mark.parametrize(
    ("moves", "beyond", "told"),
    [
        (
            (("age_years", Move(20.0, 150.0)),),
            ("age_years",),
            "pipe age 150 years (the data have 0 to 110 years)",
        ),
        (
            YOUNGER,
            ("age_years",),
            "pipe age of some pipes once shifted (the data have 0 to 110 years)",
        ),
    ],
)
def test_a_change_that_goes_beyond_the_data_is_warned_of_first(moves, beyond, told):
    for audience in ("plain", "technical"):
        cautions = words(change_answer(moves=moves, beyond=beyond), audience).cautions
        assert cautions[0] == (
            f"This change goes beyond the data: {told}; there the model speaks on its own."
        )


def test_a_level_that_no_row_has_is_beyond_the_data():
    unseen = replace(PREDICTORS[2], level_counts=(500, 300, 0))
    answer = change_answer(
        moves=(("material", Move("CI", "PVC")),),
        beyond=("material",),
        predictors=(*PREDICTORS[:2], unseen, PREDICTORS[3]),
    )
    assert (
        words(answer)
        .cautions[0]
        .startswith("This change goes beyond the data: material PVC, which no row has; there")
    )


def test_at_a_profile_within_the_data_other_rows_shifts_are_nobodys():
    answer = change_answer(moves=YOUNGER, others="typical", beyond=("age_years",))
    assert not any("beyond" in caution for caution in words(answer).cautions)


def test_rows_drawn_from_a_larger_number_are_said_to_be():
    drawn, fixed = change_answer(sample="drawn"), change_answer()
    assert words(drawn).sentences[-1] == (
        "The intervals also allow for these rows having been drawn from a larger number of pipes."
    )
    assert "drawn" not in str(words(fixed))
    assert "the squared share of a row in the average" in str(words(drawn, "technical"))
    assert "the rows are taken as fixed" in str(words(fixed, "technical"))
    without = change_answer(sample="drawn", se=None, no_interval="The fit is penalised.")
    assert "drawn" not in str(words(without))


def test_without_intervals_the_reason_is_said_and_no_interval_mentioned():
    answer = change_answer(se=None, no_interval="The fit is penalised.")
    for audience in ("plain", "technical"):
        said = words(answer, audience)
        assert "The fit is penalised." in said.cautions
        assert not any("interval" in sentence for sentence in said.sentences)
    assert "interval" not in alternative(answer)


def test_a_populations_share_is_said():
    answer = change_answer(sampling="case-control", prevalence=0.0005)
    caution = words(answer).cautions[-1]
    assert caution.startswith("The sample was chosen by its outcome (case-control), so every")
    assert says(caution, 0.0005, 100)
    assert faults(caution) == []


@pytest.mark.parametrize(("others", "told"), [("observed", "keeps its own"), ("typical", "at 2.5")])
def test_an_offset_is_said_to_be_held_only_where_it_is(others, told):
    cautions = words(change_answer(others=others, offset=2.5)).cautions
    assert any("The model has an offset" in each and told in each for each in cautions)


def test_figures_that_are_not_known_do_not_stop_the_words():
    unknown = Estimate(math.nan, math.nan, math.nan, math.nan)
    answer = change_answer()
    compared = replace(answer.comparison, risk_difference=unknown, risk_ratio=unknown)
    lost = replace(answer, end=unknown, comparison=compared, number_needed=number_needed(unknown))
    for audience in ("plain", "technical"):
        said = words(lost, audience)
        assert any("not known" in sentence for sentence in said.sentences)
        for sentence in (*said.sentences, *said.cautions, alternative(lost)):
            assert faults(sentence) == []


def test_technical_words_give_every_measure_per_hundred_and_per_thousand():
    answer = change_answer()
    told = words(answer, "technical").sentences
    assert told[0] == (
        "Pipe age from 20 to 60 years: average chance of burst this winter at the start 8.3% (95% "
        "interval 6% to 12%), standard error 1.5 percentage points; at the end 18% (95% interval "
        "13% to 25%), standard error 3.0 percentage points."
    )
    assert told[1] == (
        "Risk difference +9.9 percentage points (95% interval 8.0 to 11.9 percentage points), "
        "standard error 1.0 percentage points; that is 10 more in 100 (95% interval 8 to 12 more) "
        "and 99 more in 1,000 (95% interval 80 to 119 more)."
    )
    assert "marginal odds ratio (of the averages) 2.46" in told[2]
    assert "one joint delta method" in told[-1]


def test_the_picture_is_described_with_the_marks_that_the_words_speak_of():
    assert alternative(change_answer()) == (
        "Average chance of burst this winter among pipes like those in the data: 8.3% (95% "
        "interval 6% to 12%) with pipe age 20 years and 18% (13% to 25%) with pipe age 60 years. "
        "Beneath, the same as marks, 8 and 18 in 100, those that differ set apart by their shape."
    )


def test_differences_of_nought_read_well():
    answer = change_answer(-2.4, -2.4)
    answer = replace(
        answer, comparison=replace(answer.comparison, risk_difference=difference(0.0, 0.01))
    )
    assert words(answer).sentences[2] == (
        "That is no more and no fewer in 100 (95% interval 2 fewer to 2 more), or neither higher "
        "nor lower (2.0 lower to 2.0 higher), which leaves open whether there are more or fewer."
    )
