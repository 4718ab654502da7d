"""What is told of profiles."""

from __future__ import annotations

import math

from plainodds.answers.profile import LedgerRow, ProfileAnswer, ProfilePoint
from plainodds.model.predictors import PredictorFacts
from plainodds.phrases.numbers import denominator
from plainodds.values import Pairs

__all__ = [
    "chosen_values",
    "largest_adds",
    "moved_predictors",
    "profile_denominator",
    "sorted_adds",
]

_NOTHING = 1e-9


def chosen_values(point: ProfilePoint, stated: Pairs) -> tuple[Pairs, bool]:
    """The values of a profile that were stated, in its order, and whether these are all."""
    names = {name for name, _ in stated}
    chosen = tuple(pair for pair in point.values if pair[0] in names)
    return chosen, len(chosen) == len(point.values)


def profile_denominator(answer: ProfileAnswer) -> int:
    """The one denominator over which all chances of the answer are told."""
    spoken = [answer.point.probability.estimate]
    if answer.comparison is not None:
        spoken.append(answer.start.probability.estimate)
    return denominator(spoken)


def sorted_adds(answer: ProfileAnswer) -> list[LedgerRow]:
    """The ledger's rows that add anything, the largest first."""
    rows = [row for row in answer.ledger if not abs(row.adds.estimate) <= _NOTHING]
    known = [row for row in rows if not math.isnan(row.adds.estimate)]
    return sorted(known, key=lambda row: -abs(row.adds.estimate))


def largest_adds(answer: ProfileAnswer) -> list[LedgerRow]:
    """With what the odds rise most and fall most, the larger of the two first."""
    largest: dict[bool, LedgerRow] = {}
    for row in sorted_adds(answer):
        largest.setdefault(row.adds.estimate > 0, row)
    return list(largest.values())


def moved_predictors(answer: ProfileAnswer, row: LedgerRow) -> list[PredictorFacts]:
    """The predictors of a ledger's row whose values differ from the start's."""
    values, before = dict(answer.point.values), dict(answer.start.values)
    found = map(answer.subject.predictor, row.predictors)
    return [facts for facts in found if values[facts.name] != before[facts.name]]
