"""Two predictors together on the odds scale, and why the two scales need not agree."""

from __future__ import annotations

import math

from plainodds.answers.pair import PairAnswer
from plainodds.phrases.choices.pair import (
    Disagreement,
    disagreement,
    odds_ratio_everywhere,
    odds_ratios,
    side_of,
)
from plainodds.phrases.labels import predictor_name
from plainodds.phrases.pair_labels import at_value, odds_opening
from plainodds.phrases.parts import ratio_with_interval, say_level_once
from plainodds.phrases.units import tidy

__all__ = ["disagreement_words", "odds_words"]

_WHY = (
    "the same factor on the odds moves a chance near 50% by more points than a chance near "
    "either end"
)
_DISAGREEMENTS: dict[Disagreement, str] = {
    "differs": "In chances it still differs, since",
    "may differ": "In chances it may still differ, since",
    "opposite": "The two scales point in opposite directions, and both are right:",
    "clear in chances": "So it is clear in chances and open on the odds scale, since",
    "clear in odds": "So it is clear on the odds scale and open in chances, since",
}


def odds_words(answer: PairAnswer) -> list[str]:
    """Say what the change of `a` does to the odds at both values of `b`, and their ratio."""
    subject, question = answer.subject, answer.question
    opening, found = odds_opening(answer), odds_ratios(answer)
    odds = f"the odds of {tidy(subject.outcome.event)}"
    if not answer.interaction.joined:
        names = [predictor_name(subject.predictor(name)) for name in (question.a, question.b)]
        told = (
            f"the model has no term that joins {names[0]} and {names[1]}, so by assumption an odds "
            "ratio of the one is the same at every value of the other"
        )
        alone = odds_ratio_everywhere(answer) if found is None else found[0]
        if alone is None:
            return [told]
        factor = ratio_with_interval(alone, question.level)
        return [f"{told}: {opening}, {odds} are multiplied by {factor}"]
    before, after = (at_value(subject, question.b, value) for value in answer.b_change)
    both = answer.interaction.ratio
    if math.isnan(both.estimate):
        return []
    if found is None:
        factor = ratio_with_interval(both, question.level)
        return [
            f"on the odds scale, {opening}, what the odds are multiplied by is {factor} times as "
            f"large with {after} as with {before} (the ratio of odds ratios)"
        ]
    first, second, third = say_level_once(
        [ratio_with_interval(each, question.level) for each in (*found, both)], question.level
    )
    told = (
        f"on the odds scale, {opening}, {odds} are multiplied by {first} with {before} and by "
        f"{second} with {after}: the ratio of odds ratios is {third}"
    )
    if side_of(both, 1.0) == "open":
        told += ", which leaves open whether it is above or below 1"
    return [told]


def disagreement_words(answer: PairAnswer) -> list[str]:
    """Say that, and why, the two scales tell different things; empty where they agree."""
    found = disagreement(answer)
    return [f"{_DISAGREEMENTS[found]} {_WHY}"] if found else []
