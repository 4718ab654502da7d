"""Two predictors together on the probability scale, in German."""

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
from plainodds.phrases.german.pair_labels import (
    at_b,
    both_b,
    change,
    noun,
    per_additional,
    taken_at,
)
from plainodds.phrases.german.parts import (
    ROUNDED_APART,
    case,
    event,
    held_whom,
    level_intervals,
)
from plainodds.phrases.labels import listed, named_value, value_label
from plainodds.phrases.lexicon import lexicon
from plainodds.phrases.numbers import (
    cases_apart,
    cases_apart_in,
    cases_on_sides,
    frequencies,
    told_apart,
)
from plainodds.phrases.pair_corners import Corners, corners, denominator_of_corners
from plainodds.phrases.parts import difference_with_interval, interval, say_level_once

__all__ = ["averaged_sentences", "chances_sentences", "interval_sentences", "rounding_sentences"]

_UNTOLD = "wie weit diese auseinanderliegen, lassen die Daten ganz offen"


def chances_sentences(answer: PairAnswer) -> list[str]:
    """The chances, what lies between them, and the difference between the differences."""
    apart, four = main_interaction(answer), corners(answer)
    if apart is None:
        return []
    if four is None or is_unknown(four):
        along = _along(answer)
        return [*along, *_apart_in_points(answer, apart, follows=bool(along))]
    over = denominator_of_corners(four, apart.estimate)
    return [_four(answer, four, over), _differences(answer, four, apart, over)]


def _whose(answer: PairAnswer) -> str:
    if answer.question.others == "observed" or not answer.held:
        return ""
    return f"für {held_whom(answer.subject, answer.held, answer.question.others)}: "


def _noun(answer: PairAnswer) -> str:
    return f"{noun(answer)} für {event(answer.subject.outcome)}"


def _four(answer: PairAnswer, four: Corners, over: int) -> str:
    before, after = both_b(answer)
    facts = answer.subject.predictor(answer.question.a)
    start, end = (named_value(facts, value) for value in answer.a_change)
    pairs = ((four.neither, four.a_alone), (four.b_alone, four.both))
    first, second = (told_apart(one.estimate, other.estimate) for one, other in pairs)
    counts = [frequencies((one.estimate, other.estimate), over) for one, other in pairs]
    return (
        f"{_whose(answer)}bei {before} beträgt {_noun(answer)} {first[0]} mit {start} und "
        f"{first[1]} mit {end}, das sind {counts[0]}; bei {after} beträgt sie {second[0]} und "
        f"{second[1]}, das sind {counts[1]}"
    )


def _differences(answer: PairAnswer, four: Corners, apart: Estimate, over: int) -> str:
    before, after = both_b(answer)
    first, second = four.differences
    return (
        f"mit {change(answer)} sind das {cases_apart_in(first, over)} bei {before} und "
        f"{cases_apart(second, over)} bei {after}{_apart_in_cases(answer, apart, over)}"
    )


def _apart_in_cases(answer: PairAnswer, apart: Estimate, over: int) -> str:
    if math.isnan(apart.estimate):
        return f"; {_UNTOLD}"

    def ends(lower: float, upper: float) -> str:
        return cases_on_sides(lower, upper, over)

    between = interval(apart, ends, answer.question.level)
    return (
        f": bei {both_b(answer)[1]} {cases_apart_in(apart.estimate, over)} als bei "
        f"{_start(answer)}{between}{_left_open(apart, 'es mehr oder weniger sind')}"
    )


def _start(answer: PairAnswer) -> str:
    """The value that the other predictor starts at, its name said before."""
    return value_label(answer.subject.predictor(answer.question.b), answer.b_change[0])


def _left_open(apart: Estimate, which: str) -> str:
    return f"; offen bleibt, ob {which}" if leaves_open(apart) else ""


def _along(answer: PairAnswer) -> list[str]:
    """The effect at a few values of the other, where the four chances are not to be had."""
    subject, question = answer.subject, answer.question
    if question.scale != "probability" or not answer.effect.at:
        return []
    sloped = question.a in answer.sloped
    opens = f"mit {change(answer)}"
    if sloped:
        opens = f"{per_additional(subject.predictor(question.a))}{taken_at(answer, question.a)}"
    places = places_told(answer)
    told = say_level_once(
        [_points(effect_estimate(answer.effect, place), question.level) for place in places],
        question.level,
    )
    items = [
        f"{'etwa ' if sloped and text[0].isdigit() else ''}{text} bei "
        f"{at_b(answer, answer.effect.at[place])}"
        for text, place in zip(told, places, strict=True)
    ]
    return [f"{_whose(answer)}{opens} liegt {_noun(answer)} {listed(items)}"]


def _points(estimate: Estimate, level: float) -> str:
    if math.isnan(estimate.estimate):
        return lexicon().points_not_known
    return difference_with_interval(estimate, level)


def _apart_in_points(answer: PairAnswer, apart: Estimate, *, follows: bool) -> list[str]:
    """The difference between differences or slopes; `follows` where these were just told."""
    if math.isnan(apart.estimate):
        return [_UNTOLD]
    question, subject = answer.question, answer.subject
    what = "dieser Unterschied"
    if not follows:
        what = f"der Unterschied, den {_noun(answer)} mit {change(answer)} hat,"
    if question.a in answer.sloped:
        slope = per_additional(subject.predictor(question.a))
        what = "diese Zahl" if follows else f"die Änderung, die {_noun(answer)} {slope} hat,"
    points = difference_with_interval(apart, question.level)
    left_open = _left_open(apart, "mehr oder weniger")
    if question.b in answer.sloped:
        rate = per_additional(subject.predictor(question.b))
        return [f"{rate}{taken_at(answer, question.b)} liegt {what} {points}{left_open}"]
    return [f"bei {both_b(answer)[1]} liegt {what} {points} als bei {_start(answer)}{left_open}"]


def averaged_sentences(answer: PairAnswer) -> list[str]:
    """The same interaction once more, averaged or at a profile, whichever was not told yet."""
    found = other_interaction(answer)
    if found is None:
        return []
    outcome = answer.subject.outcome
    whose = f"für einen typischen {case(outcome)}"
    if answer.question.others != "observed":
        rows = rows_chosen(answer.subject, None, answer.counted)
        own = "seinen eigenen Werten" if answer.sloped else "seinen eigenen Werten in allem anderen"
        whose = f"gemittelt über {rows}, jeder {case(outcome)} mit {own},"
    points = difference_with_interval(found, answer.question.level)
    left_open = _left_open(found, "mehr oder weniger")
    return [f"{whose} ergibt derselbe Vergleich: {points}{left_open}"]


def rounding_sentences(answer: PairAnswer) -> list[str]:
    """That counts need not add up as they are written; empty where they do."""
    return [ROUNDED_APART] if misses_one(answer) else []


def interval_sentences(answer: PairAnswer) -> list[str]:
    """The intervals of the four chances, in the order in which these are told."""
    ends = corner_intervals(answer)
    if not ends:
        return []
    return [
        f"Die {level_intervals(answer.question.level)} der vier Wahrscheinlichkeiten sind, in "
        f"derselben Reihenfolge, {listed(ends)}"
    ]
