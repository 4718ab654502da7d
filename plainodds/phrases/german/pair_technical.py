"""Two predictors together in technical German: estimates, standard errors, tests, method."""

from __future__ import annotations

from plainodds.answers.pair import PairAnswer
from plainodds.phrases.german.pair_labels import at_b, interaction, noun, per_additional
from plainodds.phrases.german.parts import covariance, drawn_method, event, level_intervals
from plainodds.phrases.joined_tests import joined_test
from plainodds.phrases.labels import listed, named_value
from plainodds.phrases.lexicon import lexicon
from plainodds.phrases.numbers import p_value, percentage_points
from plainodds.phrases.pair_corners import corners
from plainodds.phrases.parts import (
    chance_with_interval,
    points_with_interval,
    ratio_with_interval,
    rows_words,
    signed_with_interval,
    standard_error,
)

__all__ = ["corners_technical", "interaction_technical", "pair_method", "tested_technical"]


def corners_technical(answer: PairAnswer) -> list[str]:
    """The four chances with their standard errors; empty where there are none."""
    four, question, subject = corners(answer), answer.question, answer.subject
    if four is None:
        return []
    places = [(a, b) for b in answer.b_change for a in answer.a_change]
    told = [
        f"{chance_with_interval(each, question.level)}{_points_error(each.se)} mit "
        f"{listed([named_value(subject.predictor(question.a), a), at_b(answer, b)])}"
        for (a, b), each in zip(places, four.all, strict=True)
    ]
    what = noun(answer).removeprefix("die ")
    return [f"{what} für {event(subject.outcome)}: {'; '.join(told)}"]


def _points_error(se: float | None) -> str:
    return "" if se is None else lexicon().standard_error.format(percentage_points(se))


def interaction_technical(answer: PairAnswer) -> list[str]:
    """The interaction on both scales, with its tests."""
    kind = {0: "Kreuzdifferenz der Wahrscheinlichkeit", 1: "Differenz der Steigungen dπ/dx"}.get(
        len(answer.sloped), "gemischte Ableitung ∂²π/∂a∂b"
    )
    units = [per_additional(answer.subject.predictor(name)) for name in answer.sloped]
    if units:
        kind += f", {listed(units)},"
    found, level = answer.interaction, answer.question.level
    told = []
    for where, estimate, p in (
        ("am festgehaltenen Profil", found.at_profile, found.at_profile_p_value),
        ("gemittelt über die Zeilen", found.averaged, found.averaged_p_value),
    ):
        if estimate is None:
            continue
        text = f"{kind} {where} {points_with_interval(estimate, level)}{_points_error(estimate.se)}"
        told.append(text if p is None else f"{text}, p-Wert {p_value(p)} (Wald-Test auf 0)")
    if not found.joined:
        ratio = "genau 1, da kein Term die beiden Merkmale verbindet"
        return [*told, f"{interaction(answer, 'odds')} {ratio}"]
    return [
        *told,
        f"{interaction(answer, 'odds')} {ratio_with_interval(found.ratio, level)}"
        f"{standard_error(found.ratio)}; sein Logarithmus "
        f"{signed_with_interval(found.log_ratio, level)}{standard_error(found.log_ratio)}",
    ]


def tested_technical(answer: PairAnswer) -> list[str]:
    """The test of all terms that join the two, named; empty where there is none."""
    test, question = answer.interaction.test, answer.question
    if test is None:
        return []
    return [joined_test(answer.subject, (question.a, question.b), test)]


def pair_method(answer: PairAnswer) -> str:
    """From how many rows, and how the intervals are made."""
    method = f"Aus {rows_words(answer.subject)}"
    if answer.interaction.ratio.lower is None and answer.effect.lower is None:
        return method
    rows = ""
    if answer.interaction.averaged is not None:
        rows = f"; Zeilen gewichtet wie bei der Anpassung{drawn_method('fixed')}"
    return (
        f"{method}; {level_intervals(answer.question.level)} der Differenzen und Steigungen nach "
        "der Delta-Methode mit exakten Gradienten (Kreuzdifferenz und gemischte Ableitung nach Ai "
        "und Norton), der Verhältnisse auf der Log-Skala, der Wahrscheinlichkeiten auf der "
        f"Logit-Skala, mit {covariance(answer.subject)}{rows}"
    )
