"""Two predictors together on the probability scale: what one does at values of the other."""

from __future__ import annotations

import math

from plainodds.answers.estimate import Estimate
from plainodds.answers.pair import PairAnswer
from plainodds.phrases.averaged import rows_chosen
from plainodds.phrases.choices.pair import (
    corner_intervals,
    is_unknown,
    leaves_open,
    main_interaction,
    misses_one,
    other_interaction,
)
from plainodds.phrases.choices.stretches import effect_estimate, places_told
from plainodds.phrases.held import held_case
from plainodds.phrases.labels import listed, value_label
from plainodds.phrases.numbers import (
    NOT_KNOWN,
    cases_apart,
    cases_apart_in,
    cases_on_sides,
    confidence,
    frequencies,
    told_apart,
)
from plainodds.phrases.pair_corners import Corners, corners, denominator_of_corners
from plainodds.phrases.pair_labels import (
    at_value,
    change_words,
    pair_noun,
    per_additional,
)
from plainodds.phrases.parts import difference_with_interval, interval, say_level_once, typical_case
from plainodds.phrases.units import tidy

__all__ = [
    "averaged_words",
    "chances_words",
    "intervals_words",
    "rounding_words",
]


_UNTOLD = "how much these differ the data leave open altogether"


def chances_words(answer: PairAnswer) -> list[str]:
    """The chances, what lies between them, and the difference between the differences.

    Empty where the sample tells no chances.
    """
    apart, four = main_interaction(answer), corners(answer)
    if apart is None:
        return []
    if four is None or is_unknown(four):
        along = _along(answer)
        return [*along, *_apart_in_points(answer, apart, follows=bool(along))]
    over = denominator_of_corners(four, apart.estimate)
    return [_four(answer, four, over), _differences(answer, four, apart, over)]


def _whose(answer: PairAnswer) -> str:
    """Of whom the chances are, to open a sentence; empty where there is nothing to say."""
    if answer.question.others == "observed" or not answer.held:
        return ""
    return f"for {held_case(answer.subject, answer.held, answer.question.others)}, "


def _noun(answer: PairAnswer) -> str:
    return f"the {pair_noun(answer)} of {tidy(answer.subject.outcome.event)}"


def _b_values(answer: PairAnswer) -> tuple[str, str]:
    before, after = (
        at_value(answer.subject, answer.question.b, value) for value in answer.b_change
    )
    return before, after


def _than(answer: PairAnswer) -> tuple[str, str]:
    """Both values of `b` for "with {after} than with {before}", its name said once."""
    facts, (start, end) = answer.subject.predictor(answer.question.b), answer.b_change
    return value_label(facts, start), at_value(answer.subject, facts.name, end)


def _four(answer: PairAnswer, four: Corners, over: int) -> str:
    before, after = _b_values(answer)
    start, end = (at_value(answer.subject, answer.question.a, value) for value in answer.a_change)
    first = told_apart(four.neither.estimate, four.a_alone.estimate)
    second = told_apart(four.b_alone.estimate, four.both.estimate)
    counts = [
        frequencies((one.estimate, other.estimate), over)
        for one, other in ((four.neither, four.a_alone), (four.b_alone, four.both))
    ]
    return (
        f"{_whose(answer)}with {before}, {_noun(answer)} is {first[0]} with {start} and {first[1]} "
        f"with {end}, that is {counts[0]}; with {after}, it is {second[0]} and {second[1]}, that "
        f"is {counts[1]}"
    )


def _differences(answer: PairAnswer, four: Corners, apart: Estimate, over: int) -> str:
    before, after = _b_values(answer)
    first, second = four.differences
    return (
        f"With {change_words(answer)}, that is {cases_apart_in(first, over)} with {before} and "
        f"{cases_apart(second, over)} with "
        f"{after}{_apart_in_cases(answer, apart, over)}"
    )


def _apart_in_cases(answer: PairAnswer, apart: Estimate, over: int) -> str:
    if math.isnan(apart.estimate):
        return f"; {_UNTOLD}"
    before, after = _than(answer)

    def ends(lower: float, upper: float) -> str:
        return cases_on_sides(lower, upper, over)

    open_end = _left_open(apart, "there are more or fewer")
    return (
        f": {cases_apart_in(apart.estimate, over)} with {after} than with {before}"
        f"{interval(apart, ends, answer.question.level)}{open_end}"
    )


def _left_open(apart: Estimate, which: str) -> str:
    return f", which leaves open whether {which}" if leaves_open(apart) else ""


def _along(answer: PairAnswer) -> list[str]:
    """The effect of `a` at a few values of `b`, where the four chances are not to be had."""
    subject, question = answer.subject, answer.question
    if question.scale != "probability" or not answer.effect.at:
        return []
    facts = subject.predictor(question.a)
    sloped = question.a in answer.sloped
    opening = per_additional(facts) if sloped else f"with {change_words(answer)}"
    told = say_level_once(
        [
            _or_not_known(effect_estimate(answer.effect, place), question.level)
            for place in places_told(answer)
        ],
        question.level,
    )
    about = "about " if sloped else ""
    items = [
        f"{about if text[0].isdigit() else ''}{text} with "
        f"{at_value(subject, question.b, answer.effect.at[place])}"
        for text, place in zip(told, places_told(answer), strict=True)
    ]
    opening += _taken_at(answer, question.a)
    return [f"{_whose(answer)}{opening}, {_noun(answer)} is {listed(items)}"]


def _or_not_known(estimate: Estimate, level: float) -> str:
    if math.isnan(estimate.estimate):
        return NOT_KNOWN
    return difference_with_interval(estimate, level)


def _taken_at(answer: PairAnswer, name: str) -> str:
    """Where a slope is taken, which may differ from place to place."""
    if name not in answer.sloped:
        return ""
    facts = answer.subject.predictor(name)
    if answer.question.others == "observed":
        return f", taken at each {tidy(answer.subject.outcome.case)}'s own value"
    return f", taken at {value_label(facts, facts.typical)}"


def _apart_in_points(answer: PairAnswer, apart: Estimate, *, follows: bool) -> list[str]:
    """The difference between differences or slopes; `follows` where these were just told."""
    if math.isnan(apart.estimate):
        return [_UNTOLD]
    question, noun = answer.question, _noun(answer)
    what = "this difference" if follows else f"the difference in {noun} with {change_words(answer)}"
    if question.a in answer.sloped:
        slope = per_additional(answer.subject.predictor(question.a))
        what = "this figure" if follows else f"the change in {noun} {slope}"
    points = difference_with_interval(apart, question.level)
    if question.b in answer.sloped:
        rate = per_additional(answer.subject.predictor(question.b))
        taken = _taken_at(answer, question.b)
        return [
            f"{rate}{taken}, {what} lies {points}{_left_open(apart, 'it lies higher or lower')}"
        ]
    before, after = _than(answer)
    open_end = _left_open(apart, "it lies higher or lower there")
    return [f"with {after}, {what} lies {points} than with {before}{open_end}"]


def averaged_words(answer: PairAnswer) -> list[str]:
    """The same interaction once more, averaged or at a profile, whichever was not told yet."""
    found = other_interaction(answer)
    if found is None:
        return []
    case = tidy(answer.subject.outcome.case)
    whose = f"for {typical_case(answer.subject.outcome)}"
    if answer.question.others != "observed":
        rows = rows_chosen(answer.subject, None, answer.counted)
        own = "its own values of everything else" if not answer.sloped else "its own values"
        whose = f"averaged over the {rows}, each {case} with {own}"
    points = difference_with_interval(found, answer.question.level)
    open_end = _left_open(found, "it is higher or lower")
    return [f"{whose}, the same comparison gives {points}{open_end}"]


def rounding_words(answer: PairAnswer) -> list[str]:
    """That counts need not add up as they are written; empty where they do."""
    if not misses_one(answer):
        return []
    return ["Each figure is rounded on its own, so counts may differ by one from their difference"]


def intervals_words(answer: PairAnswer) -> list[str]:
    """The intervals of the four chances, in the order in which these are told."""
    ends = corner_intervals(answer)
    if not ends:
        return []
    level = confidence(answer.question.level)
    return [f"The {level} intervals of the four chances are, in their order, {listed(ends)}"]
