"""Which levels two predictors together are told for, where a category has very many."""

from __future__ import annotations

from plainodds.model.predictors import PredictorFacts
from plainodds.values import Scalar

__all__ = ["MOST_LEVELS", "MOST_LINES", "levels_told"]

MOST_LINES = 8
"""More lines than these cannot be told apart, nor their labels read: common practice, no source."""
MOST_LEVELS = 16
"""More levels than these have no room beside each other along an axis."""


def levels_told(
    facts: PredictorFacts, compared: tuple[Scalar, ...], most: int
) -> tuple[Scalar, ...]:
    """The levels with rows, in their order; of very many those compared and the most frequent.

    Parameters
    ----------
    facts : PredictorFacts
        Of a category or a yes/no.
    compared : tuple of scalars
        Levels that are told in any case.
    most : int
    """
    known = facts.levels_with_rows
    if len(known) <= most:
        return known
    counts = dict(zip(facts.levels, facts.level_counts, strict=True))
    # sorted is stable: of levels equally frequent the first ones are taken
    frequent = sorted(known, key=lambda level: (level not in compared, -counts[level]))
    kept = set(frequent[:most])
    return tuple(level for level in known if level in kept)
