"""Two predictors together on the odds scale in German, and why the two scales disagree."""

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
from plainodds.phrases.german.pair_labels import both_b, odds, opening
from plainodds.phrases.labels import predictor_name
from plainodds.phrases.numbers import quantity
from plainodds.phrases.parts import ratio_with_interval, say_level_once

__all__ = ["disagreement_sentences", "odds_sentences"]

_DISAGREEMENTS: dict[Disagreement, str] = {
    "differs": "In Wahrscheinlichkeiten unterscheidet es sich dennoch, denn",
    "may differ": "In Wahrscheinlichkeiten kann es sich dennoch unterscheiden, denn",
    "opposite": "Die beiden Skalen weisen in entgegengesetzte Richtungen, und beide haben recht:",
    "clear in chances": (
        "In Wahrscheinlichkeiten ist es also klar und auf der Skala der Odds offen, denn"
    ),
    "clear in odds": (
        "Auf der Skala der Odds ist es also klar und in Wahrscheinlichkeiten offen, denn"
    ),
}


def odds_sentences(answer: PairAnswer) -> list[str]:
    """What the change does to the odds at both values of the other, and their ratio."""
    level, found = answer.question.level, odds_ratios(answer)
    if not answer.interaction.joined:
        alone = odds_ratio_everywhere(answer) if found is None else found[0]
        if alone is None:
            return [_not_joined(answer)]
        factor = ratio_with_interval(alone, level)
        return [
            f"{_not_joined(answer)}: {opening(answer)} wird {odds(answer)} mit {factor} "
            "multipliziert"
        ]
    before, after = both_b(answer)
    both = answer.interaction.ratio
    if math.isnan(both.estimate):
        return []
    if found is None:
        return [
            f"auf der Skala der Odds ist, {opening(answer)}, der Faktor, mit dem die Chance (Odds) "
            f"multipliziert wird, bei {after} gleich dem bei {before} mal "
            f"{ratio_with_interval(both, level)} (das Verhältnis der Odds Ratios)"
        ]
    first, second, third = say_level_once(
        [ratio_with_interval(each, level) for each in (*found, both)], level
    )
    told = (
        f"auf der Skala der Odds wird, {opening(answer)}, {odds(answer)} bei {before} mit {first} "
        f"und bei {after} mit {second} multipliziert: das Verhältnis der Odds Ratios ist {third}"
    )
    if side_of(both, 1.0) == "open":
        told += "; offen bleibt, ob es über oder unter 1 liegt"
    return [told]


def _not_joined(answer: PairAnswer) -> str:
    subject, question = answer.subject, answer.question
    a, b = (predictor_name(subject.predictor(name)) for name in (question.a, question.b))
    return (
        f"das Modell hat keinen Term, der {a} und {b} verbindet; angenommen ist damit, dass ein "
        "Chancenverhältnis (Odds Ratio) des einen bei jedem Wert des anderen dasselbe ist"
    )


def disagreement_sentences(answer: PairAnswer) -> list[str]:
    """That, and why, the two scales tell different things; empty where they agree."""
    found = disagreement(answer)
    if found is None:
        return []
    return [
        f"{_DISAGREEMENTS[found]} derselbe Faktor auf der Chance (Odds) bewegt eine "
        f"Wahrscheinlichkeit nahe {quantity(50, '%')} um mehr Punkte als eine nahe an einem der "
        "beiden Enden"
    ]
