"""What is told of effects on the chance."""

from __future__ import annotations

import math
from collections.abc import Iterable

from plainodds.answers.effects import EffectRow, EffectsAnswer
from plainodds.phrases.labels import predictor_name
from plainodds.values import Scalar

__all__ = [
    "effects_averaged",
    "groups_counted",
    "has_slopes",
    "has_tiny_slopes",
    "highest_and_lowest",
    "is_slope",
    "open_names",
    "rows_together",
    "share_is_known",
]

_TOO_SMALL = 1e-5


def effects_averaged(answer: EffectsAnswer) -> bool:
    """Whether the effects are averages over rows."""
    return answer.question.others == "observed"


def share_is_known(answer: EffectsAnswer) -> bool:
    """Whether the rows' share of the event says how common it is."""
    subject = answer.subject
    return subject.sampling != "case-control" and not math.isnan(subject.outcome.share)


def is_slope(row: EffectRow) -> bool:
    """Whether an effect is a rate per unit."""
    return row.start is None and row.step is None


def has_slopes(answer: EffectsAnswer) -> bool:
    """Whether any effect is a rate per unit."""
    return any(map(is_slope, answer.rows))


def has_tiny_slopes(answer: EffectsAnswer) -> bool:
    """Whether a rate per unit is too small to be written out."""
    return any(is_slope(row) and 0 < abs(row.effect.estimate) < _TOO_SMALL for row in answer.rows)


def rows_together(answer: EffectsAnswer) -> Iterable[list[EffectRow]]:
    """Rows of one sentence: a predictor's levels, or one change in each of the groups."""
    sentences: dict[tuple[str, Scalar | None], list[EffectRow]] = {}
    for row in answer.rows:
        change = None if answer.question.by is None else row.end
        sentences.setdefault((row.predictor, change), []).append(row)
    return sentences.values()


def groups_counted(answer: EffectsAnswer) -> list[tuple[Scalar, int]]:
    """The groups' levels with the rows averaged over in each; empty without groups."""
    if answer.question.by is None:
        return []
    groups = dict.fromkeys(row.by for row in answer.rows if row.by is not None)
    return list(zip(groups, answer.counted, strict=True))


def open_names(answer: EffectsAnswer) -> list[str]:
    """The predictors of which an interval holds changes in both directions."""
    found = (
        predictor_name(answer.subject.predictor(row.predictor))
        for row in answer.rows
        if row.effect.lower is not None
        and row.effect.upper is not None
        and row.effect.lower < 0 < row.effect.upper
    )
    return list(dict.fromkeys(found))


def highest_and_lowest(answer: EffectsAnswer) -> tuple[EffectRow, ...]:
    """The rows of the highest and the lowest effect; one where they are the same."""
    known = [row for row in answer.rows if not math.isnan(row.effect.estimate)]
    if not known:
        return ()
    highest = max(known, key=lambda row: row.effect.estimate)
    lowest = min(known, key=lambda row: row.effect.estimate)
    return (highest,) if lowest is highest else (highest, lowest)
