"""Two predictors together on the odds scale, and why the two scales need not agree."""

from __future__ import annotations

import math
from typing import Literal

from plainodds import scales
from plainodds.answers.estimate import Estimate
from plainodds.answers.joint import StratumEffect
from plainodds.answers.pair import PairAnswer
from plainodds.phrases.labels import predictor_name
from plainodds.phrases.pair_chances import main_interaction
from plainodds.phrases.pair_corners import corners
from plainodds.phrases.pair_labels import at_value, is_averaged, odds_opening
from plainodds.phrases.parts import ratio_with_interval, say_level_once
from plainodds.phrases.stretches import effect_at, effect_estimate
from plainodds.phrases.units import tidy
from plainodds.values import Scalar

__all__ = ["disagreement_words", "odds_words", "side_of"]

Side = Literal["above", "below", "open", "not known"]

_WHY = (
    "the same factor on the odds moves a chance near 50% by more points than a chance near "
    "either end"
)


def side_of(estimate: Estimate | None, nothing: float) -> Side:
    """On which side of no effect the whole interval lies."""
    if estimate is None or estimate.lower is None or estimate.upper is None:
        return "not known"
    if estimate.lower > nothing:
        return "above"
    if estimate.upper < nothing:
        return "below"
    return "open" if estimate.lower <= nothing <= estimate.upper else "not known"


def odds_words(answer: PairAnswer) -> list[str]:
    """Say what the change of `a` does to the odds at both values of `b`, and their ratio."""
    subject, question = answer.subject, answer.question
    opening, found = odds_opening(answer), _odds_ratios(answer)
    odds = f"the odds of {tidy(subject.outcome.event)}"
    if not answer.interaction.joined:
        names = [predictor_name(subject.predictor(name)) for name in (question.a, question.b)]
        told = (
            f"the model has no term that joins {names[0]} and {names[1]}, so by assumption an odds "
            "ratio of the one is the same at every value of the other"
        )
        alone = _everywhere(answer) if found is None else found[0]
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


def _odds_ratios(answer: PairAnswer) -> tuple[Estimate, Estimate] | None:
    """The odds ratio of `a` at both values of `b`, wherever the answer holds them."""
    before, after = (_odds_ratio(answer, value) for value in answer.b_change)
    if before is not None and after is not None:
        return before, after
    return _from_chances(answer)


def _everywhere(answer: PairAnswer) -> Estimate | None:
    """The odds ratio of `a` where it is the same along `b`."""
    if not _along_is_held(answer) or not answer.effect.at:
        return None
    return effect_estimate(answer.effect, 0)


def _odds_ratio(answer: PairAnswer, within: Scalar) -> Estimate | None:
    if answer.joint is not None:
        for each in answer.joint.strata:
            if each.predictor == answer.question.a and each.within == within:
                return _as_stated(answer, each)
    return effect_at(answer.effect, within) if _along_is_held(answer) else None


def _along_is_held(answer: PairAnswer) -> bool:
    """Whether the odds ratios along `b` are those at the profile, and not of averages."""
    return answer.question.scale == "odds" and not is_averaged(answer)


def _as_stated(answer: PairAnswer, each: StratumEffect) -> Estimate:
    """An odds ratio in the direction that was asked for: recoding may have turned it round."""
    found = each.odds_ratio
    if (each.start, each.end) == answer.a_change or found.estimate == 0:
        return found
    if found.se is None or not found.lower or not found.upper:
        return Estimate(1 / found.estimate, None, None, None)
    turned = 1 / found.estimate
    return Estimate(turned, found.se * turned**2, 1 / found.upper, 1 / found.lower)


def _from_chances(answer: PairAnswer) -> tuple[Estimate, Estimate] | None:
    """Odds ratios from the four chances of one profile; without intervals."""
    four = corners(answer)
    if four is None or is_averaged(answer):
        # odds of averages are another figure
        return None
    odds = scales.odds_from_probability([each.estimate for each in four.all])
    if not all(0 < each < math.inf for each in odds):
        return None
    return tuple(  # type: ignore[return-value]
        Estimate(float(odds[place + 1] / odds[place]), None, None, None) for place in (0, 2)
    )


def disagreement_words(answer: PairAnswer) -> list[str]:
    """Say that, and why, the two scales tell different things; empty where they agree."""
    apart, ratio = main_interaction(answer), answer.interaction.ratio
    if apart is None:
        return []
    chance, odds = side_of(apart, 0.0), side_of(ratio, 1.0)
    clear = ("above", "below")
    told = ""
    if not answer.interaction.joined:
        told = f"In chances it {'still differs' if chance in clear else 'may still differ'}, since"
    elif {chance, odds} == {"above", "below"}:
        told = "The two scales point in opposite directions, and both are right:"
    elif chance in clear and odds == "open":
        told = "So it is clear in chances and open on the odds scale, since"
    elif odds in clear and chance == "open":
        told = "So it is clear on the odds scale and open in chances, since"
    return [f"{told} {_WHY}"] if told else []
