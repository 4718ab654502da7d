"""Two predictors together in technical words: estimates, standard errors, tests and method."""

from __future__ import annotations

from plainodds.answers.pair import PairAnswer
from plainodds.phrases.averaged import drawn_method
from plainodds.phrases.joined_tests import joined_test
from plainodds.phrases.labels import listed, sentence_case
from plainodds.phrases.numbers import confidence, p_value, percentage_points
from plainodds.phrases.pair_corners import corners
from plainodds.phrases.pair_labels import at_value, pair_noun, per_additional
from plainodds.phrases.parts import (
    chance_with_interval,
    covariance_words,
    points_with_interval,
    ratio_with_interval,
    rows_words,
    signed_with_interval,
    standard_error,
)
from plainodds.phrases.units import tidy

__all__ = [
    "corners_technical",
    "interaction_technical",
    "pair_method",
    "ratio_technical",
    "test_technical",
]


def corners_technical(answer: PairAnswer) -> list[str]:
    """The four chances with their standard errors; empty where there are none."""
    four, question = corners(answer), answer.question
    if four is None:
        return []
    places = [(a, b) for b in answer.b_change for a in answer.a_change]
    told = [
        f"{chance_with_interval(each, question.level)}{_points_error(each.se)} with "
        f"{at_value(answer.subject, question.a, a)} and {at_value(answer.subject, question.b, b)}"
        for (a, b), each in zip(places, four.all, strict=True)
    ]
    noun = sentence_case(pair_noun(answer))
    return [f"{noun} of {tidy(answer.subject.outcome.event)}: {'; '.join(told)}"]


def _points_error(se: float | None) -> str:
    return "" if se is None else f", standard error {percentage_points(se)}"


def interaction_technical(answer: PairAnswer) -> list[str]:
    """The interaction on the probability scale, at the profile and averaged, with its tests."""
    kind = {0: "Cross difference of the chance", 1: "Difference of slopes dπ/dx"}.get(
        len(answer.sloped), "Cross partial ∂²π/∂a∂b"
    )
    units = [per_additional(answer.subject.predictor(name)) for name in answer.sloped]
    if units:
        kind += f", {listed(units)},"
    found, level = answer.interaction, answer.question.level
    told = []
    for where, estimate, p in (
        ("at the held profile", found.at_profile, found.at_profile_p_value),
        ("averaged over the rows", found.averaged, found.averaged_p_value),
    ):
        if estimate is None:
            continue
        text = f"{kind} {where} {points_with_interval(estimate, level)}{_points_error(estimate.se)}"
        told.append(text if p is None else f"{text}, p-value {p_value(p)} (Wald test of 0)")
    return told


def ratio_technical(answer: PairAnswer) -> list[str]:
    """The ratio of odds ratios and its logarithm."""
    found, level = answer.interaction, answer.question.level
    if not found.joined:
        return ["Ratio of odds ratios exactly 1, since no term joins the two predictors"]
    return [
        f"Ratio of odds ratios {ratio_with_interval(found.ratio, level)}"
        f"{standard_error(found.ratio)}; its logarithm "
        f"{signed_with_interval(found.log_ratio, level)}{standard_error(found.log_ratio)}"
    ]


def test_technical(answer: PairAnswer) -> list[str]:
    """The test of all terms that join the two, named; empty where there is none."""
    test, question = answer.interaction.test, answer.question
    if test is None:
        return []
    return [joined_test(answer.subject, (question.a, question.b), test)]


def pair_method(answer: PairAnswer) -> str:
    """From how many rows, and how the intervals are made."""
    method = f"From {rows_words(answer.subject)}"
    if answer.interaction.ratio.lower is None and answer.effect.lower is None:
        return method
    level = confidence(answer.question.level)
    averaged = answer.interaction.averaged is not None
    rows = f"; rows weighted as fitted{drawn_method('fixed')}" if averaged else ""
    return (
        f"{method}; {level} intervals of differences and slopes by the delta method with exact "
        "gradients (cross difference and cross partial after Ai and Norton), of ratios on the log "
        f"scale, of chances on the logit scale, with {covariance_words(answer.subject)}{rows}"
    )
