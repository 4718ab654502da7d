"""What is told of two predictors together."""

from __future__ import annotations

import math
from typing import Literal, TypeAlias

from plainodds import scales
from plainodds.answers.estimate import Estimate
from plainodds.answers.joint import AdditiveInteraction, JointCell, JointTable, StratumEffect
from plainodds.answers.pair import PairAnswer
from plainodds.phrases.choices.stretches import effect_at, effect_estimate
from plainodds.phrases.numbers import span
from plainodds.phrases.pair_corners import Corners, corners, denominator_of_corners
from plainodds.phrases.pair_labels import has_others, is_averaged
from plainodds.values import Scalar

__all__ = [
    "Disagreement",
    "additive_of",
    "cells_without_events",
    "cells_without_rows",
    "chances_spoken_of",
    "corner_intervals",
    "disagreement",
    "is_unknown",
    "leaves_open",
    "main_interaction",
    "misses_one",
    "odds_ratio_everywhere",
    "odds_ratios",
    "other_interaction",
    "side_of",
]

Side: TypeAlias = Literal["above", "below", "open", "not known"]
Disagreement: TypeAlias = Literal[
    "differs", "may differ", "opposite", "clear in chances", "clear in odds"
]


def main_interaction(answer: PairAnswer) -> Estimate | None:
    """The interaction on the probability scale that goes with the answer's own chances."""
    found = answer.interaction
    return found.averaged if answer.question.others == "observed" else found.at_profile


def other_interaction(answer: PairAnswer) -> Estimate | None:
    """The one that does not, where it is known and another figure."""
    observed = answer.question.others == "observed"
    found = answer.interaction.at_profile if observed else answer.interaction.averaged
    alike = not has_others(answer) and not answer.sloped and answer.subject.offset is None
    return None if found is None or math.isnan(found.estimate) or alike else found


def is_unknown(four: Corners) -> bool:
    """Whether one of the four chances is not known."""
    return any(math.isnan(each.estimate) for each in four.all)


def leaves_open(apart: Estimate) -> bool:
    """Whether an interval holds differences in both directions."""
    return apart.lower is not None and apart.upper is not None and apart.lower < 0 < apart.upper


def misses_one(answer: PairAnswer) -> bool:
    """Whether counts, as they are written, do not add up to their differences."""
    apart, four = main_interaction(answer), corners(answer)
    if apart is None or four is None or is_unknown(four) or math.isnan(apart.estimate):
        return False
    over = denominator_of_corners(four, apart.estimate)
    neither, a_alone, b_alone, both = (round(each.estimate * over) for each in four.all)
    first, second = (round(each * over) for each in four.differences)
    adds_up = (a_alone - neither, both - b_alone) == (first, second)
    return not (adds_up and second - first == round(apart.estimate * over))


def corner_intervals(answer: PairAnswer) -> list[str]:
    """The intervals of the four chances, in the order in which these are told; else empty."""
    four = corners(answer)
    if four is None or is_unknown(four) or main_interaction(answer) is None:
        return []
    ends = [
        span(each.lower, each.upper)
        for each in four.all
        if each.lower is not None and each.upper is not None
    ]
    return ends if len(ends) == len(four.all) else []


def chances_spoken_of(answer: PairAnswer) -> list[float]:
    """The chances that the answer speaks of."""
    four = corners(answer)
    if four is not None:
        return [each.estimate for each in four.all]
    if answer.lines is None or answer.lines.question.scale != "probability":
        return []
    return [each for line in answer.lines.lines for each in line.estimate]


def side_of(estimate: Estimate | None, nothing: float) -> Side:
    """On which side of no effect the whole interval lies."""
    if estimate is None or estimate.lower is None or estimate.upper is None:
        return "not known"
    if estimate.lower > nothing:
        return "above"
    if estimate.upper < nothing:
        return "below"
    return "open" if estimate.lower <= nothing <= estimate.upper else "not known"


def odds_ratios(answer: PairAnswer) -> tuple[Estimate, Estimate] | None:
    """The odds ratio of `a` at both values of `b`, wherever the answer holds them."""
    before, after = (_odds_ratio(answer, value) for value in answer.b_change)
    if before is not None and after is not None:
        return before, after
    return _from_chances(answer)


def odds_ratio_everywhere(answer: PairAnswer) -> Estimate | None:
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


def disagreement(answer: PairAnswer) -> Disagreement | None:
    """How the two scales tell different things; None where they agree or one is not known."""
    apart, ratio = main_interaction(answer), answer.interaction.ratio
    if apart is None:
        return None
    chance, odds = side_of(apart, 0.0), side_of(ratio, 1.0)
    clear = ("above", "below")
    if not answer.interaction.joined:
        return "differs" if chance in clear else "may differ"
    if {chance, odds} == {"above", "below"}:
        return "opposite"
    if chance in clear and odds == "open":
        return "clear in chances"
    return "clear in odds" if odds in clear and chance == "open" else None


def additive_of(table: JointTable) -> AdditiveInteraction:
    """The measures of adding up by chances where there are such, else by odds."""
    if table.additive_by_chances is not None:
        return table.additive_by_chances
    return table.additive_by_odds


def cells_without_rows(table: JointTable) -> list[JointCell]:
    """The combinations that no row has."""
    return [cell for cell in table.cells if cell.rows == 0]


def cells_without_events(table: JointTable) -> list[JointCell]:
    """The combinations whose rows all lack the event."""
    return [cell for cell in table.cells if cell.rows and cell.events == 0]
