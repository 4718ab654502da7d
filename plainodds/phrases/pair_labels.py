"""What two predictors together are called: titles, axes, stretches and combinations.

Used by sentences, drawings and views alike, so that all say the same.
"""

from __future__ import annotations

import math
from typing import Literal

from plainodds.answers.joint import JointCell
from plainodds.answers.moves import Move
from plainodds.answers.pair import PairAnswer
from plainodds.answers.stretches import Stretch
from plainodds.model.predictors import PredictorFacts, Subject
from plainodds.phrases.labels import (
    average_chance_of,
    cases_label,
    chance_of,
    from_to,
    odds_of_event,
    predictor_name,
    sentence_case,
    step_label,
    value_label,
    values_range,
)
from plainodds.phrases.lexicon import message
from plainodds.phrases.moves import moves_label, moves_words
from plainodds.phrases.numbers import chance, count, quantity
from plainodds.phrases.units import per_unit, tidy
from plainodds.values import Scalar

__all__ = [
    "Sign",
    "at_value",
    "change_words",
    "combination_label",
    "effect_axis_title",
    "followed_label",
    "has_others",
    "interaction_label",
    "is_averaged",
    "left_out",
    "levels_left_out",
    "odds_opening",
    "pair_noun",
    "pair_title",
    "per_additional",
    "place_label",
    "rows_label",
    "share_label",
    "stretch_label",
    "stretch_span",
]

Sign = Literal["above", "below", "open"]


def has_others(answer: PairAnswer) -> bool:
    """Whether the model has predictors besides the two."""
    both = {answer.question.a, answer.question.b}
    return any(facts.name not in both for facts in answer.subject.predictors)


def is_averaged(answer: PairAnswer) -> bool:
    """Whether the answer's chances are averages over rows that differ in something."""
    if answer.question.others != "observed":
        return False
    return has_others(answer) or bool(answer.sloped) or answer.subject.offset is not None


def left_out(answer: PairAnswer) -> list[str]:
    """How many levels of a category with very many are told; empty where all are."""
    return [
        message(
            "Of {} values of {}, those compared and the most frequent.",
            count(known),
            predictor_name(facts),
        )
        for facts, known in levels_left_out(answer)
    ]


def levels_left_out(answer: PairAnswer) -> list[tuple[PredictorFacts, int]]:
    """Categories of which not all levels are told, and how many have rows."""
    subject, question = answer.subject, answer.question
    told: dict[str, int] = {}
    if answer.lines is not None:
        asked = answer.lines.question
        told[asked.predictor] = len(answer.lines.lines[0].at)
        if asked.by is not None:
            told[asked.by] = len(answer.lines.lines)
    told[question.b] = min(len(answer.effect.at), told.get(question.b, len(answer.effect.at)))
    known = [(subject.predictor(name), number) for name, number in told.items()]
    return [
        (facts, len(facts.levels_with_rows))
        for facts, number in known
        if not facts.is_number and number < len(facts.levels_with_rows)
    ]


def pair_noun(answer: PairAnswer) -> str:
    """What is averaged or not: "average chance" or "chance"."""
    return "average chance" if is_averaged(answer) else "chance"


def pair_title(answer: PairAnswer) -> str:
    """The title of everything about two predictors.

    Returns
    -------
    str
        As in "Chance of burst this winter: pipe age and material together".
    """
    subject, question = answer.subject, answer.question
    if question.scale == "odds":
        of = odds_of_event(subject.outcome)
    else:
        of = (average_chance_of if is_averaged(answer) else chance_of)(subject.outcome)
    a, b = (predictor_name(subject.predictor(name)) for name in (question.a, question.b))
    return message("{}: {} and {} together", of, a, b)


def at_value(subject: Subject, name: str, value: Scalar) -> str:
    """A predictor at a value, to follow "with": "soil high", "pipe age 20 years"."""
    facts = subject.predictor(name)
    return f"{predictor_name(facts)} {value_label(facts, value)}"


def per_additional(facts: PredictorFacts) -> str:
    """What a slope is stated for: "per additional year of pipe age"."""
    return message("per additional {} of {}", per_unit(facts.unit), predictor_name(facts))


def change_words(answer: PairAnswer) -> str:
    """The change of `a`, to follow "with": "material PVC rather than cast iron"."""
    return moves_words(answer.subject, ((answer.question.a, Move(*answer.a_change)),))


def followed_label(answer: PairAnswer) -> str:
    """What of `a` is followed along `b`, as a heading.

    Returns
    -------
    str
        "Material PVC against cast iron", "Pipe age from 20 to 60 years"; for slopes "Per
        additional year of pipe age", and on the odds scale "Per 10 years more of pipe age".
    """
    facts = answer.subject.predictor(answer.question.a)
    if facts.name not in answer.sloped:
        return moves_label(answer.subject, ((facts.name, Move(*answer.a_change)),))
    if answer.question.scale == "probability":
        return sentence_case(per_additional(facts))
    return sentence_case(odds_opening(answer).removeprefix("with "))


def odds_opening(answer: PairAnswer) -> str:
    """The change of `a` that its odds ratio belongs to, as a sentence starts.

    Returns
    -------
    str
        "with material PVC rather than cast iron"; for slopes "per 10 years more of pipe
        age", or "with pipe age from 40 to 50 years" where steps differ.
    """
    facts = answer.subject.predictor(answer.question.a)
    if facts.name not in answer.sloped:
        return f"with {change_words(answer)}"
    start, end = answer.a_change
    if not facts.linear:
        return f"with {predictor_name(facts)} {from_to(facts, start, end)}"
    step = step_label(facts, float(end) - float(start))
    return message("{} of {}", step, predictor_name(facts))


def effect_axis_title(answer: PairAnswer) -> str:
    """The title of the axis along which the effect of `a` is drawn.

    Returns
    -------
    str
        On the probability scale figures are percentage points, that is 100 times the
        answer's; on the odds scale they are odds ratios.
    """
    event, question = tidy(answer.subject.outcome.event), answer.question
    if question.scale == "odds":
        if is_averaged(answer):
            return message("Odds ratio of {}, of averages", event)
        return message("Odds ratio of {}", event)
    per = ""
    if question.a in answer.sloped:
        unit = answer.subject.predictor(question.a).unit
        per = f" per {per_unit(unit)} more"
    return f"Change of the {pair_noun(answer)} of {event} (percentage points{per})"


def interaction_label(answer: PairAnswer, scale: Literal["probability", "odds"]) -> str:
    """What the interaction is called on a scale.

    Returns
    -------
    str
        "Ratio of odds ratios" on the odds scale. On the probability scale "Difference of
        differences", or for slopes "Difference of slopes", "Change of the difference per
        additional year of pipe age" and "Change of the slope per additional metre".
    """
    if scale == "odds":
        return message("Ratio of odds ratios")
    question = answer.question
    a_sloped, b_sloped = question.a in answer.sloped, question.b in answer.sloped
    if not b_sloped:
        return message("Difference of slopes") if a_sloped else message("Difference of differences")
    per = per_additional(answer.subject.predictor(question.b))
    if a_sloped:
        return message("Change of the slope {}", per)
    return message("Change of the difference {}", per)


def stretch_span(answer: PairAnswer, stretch: Stretch) -> str:
    """Where a stretch lies along `b`: "12 to 68 years", "soil high"."""
    facts = answer.subject.predictor(answer.question.b)
    if not facts.is_number:
        return at_value(answer.subject, facts.name, stretch.start)
    low, high = _placed(facts, stretch.start), _placed(facts, stretch.end)
    if value_label(facts, low) == value_label(facts, high):
        return value_label(facts, low)
    return values_range(facts, low, high)


def place_label(facts: PredictorFacts, place: Scalar) -> str:
    """A place along a number, as coarse as a hundredth of the data's range.

    Ends of stretches and turns fall between values that anybody has, and their further
    figures say nothing: "74 years" for 74.1623.
    """
    return value_label(facts, _placed(facts, place))


def _placed(facts: PredictorFacts, place: Scalar) -> Scalar:
    width = facts.maximum - facts.minimum
    if isinstance(place, str) or not (math.isfinite(width) and width > 0):
        return place
    unit = 10.0 ** math.floor(math.log10(width / 100))
    if facts.kind == "whole number":
        unit = max(unit, 1.0)
    return round(float(place) / unit) * unit


def share_label(answer: PairAnswer, share: float) -> str:
    """How many of the rows: "71% of the pipes"; empty where nobody knows."""
    cases = cases_label(answer.subject.outcome)
    if math.isnan(share):
        return ""
    if share <= 0:
        return message("no {}", cases)
    if share >= 1:
        return message("all {}", cases)
    return message("{} of the {}", chance(share), cases)


def stretch_label(answer: PairAnswer, stretch: Stretch) -> str:
    """A stretch with its verdict and share, beside a drawing.

    Returns
    -------
    str
        As in "12 to 68 years: higher (71% of the pipes)".
    """
    told = {"above": "higher", "below": "lower", "open": "left open"}[stretch.sign]
    share = share_label(answer, stretch.share)
    return f"{stretch_span(answer, stretch)}: {told}{f' ({share})' if share else ''}"


def rows_label(answer: PairAnswer, cell: JointCell) -> str:
    """The data behind one combination: "31 of 300 pipes"; empty where the model has no rows."""
    cases = cases_label(answer.subject.outcome)
    if cell.rows is None:
        return ""
    if cell.rows == 0:
        return f"no {cases}"
    of = f"{quantity(cell.rows)} {tidy(answer.subject.outcome.case) if cell.rows == 1 else cases}"
    return of if cell.events is None else f"{quantity(cell.events)} of {of}"


def combination_label(answer: PairAnswer, cell: JointCell) -> str:
    """One combination of both: "soil low and material PVC"."""
    subject, question = answer.subject, answer.question
    return f"{at_value(subject, question.a, cell.a)} and {at_value(subject, question.b, cell.b)}"
