"""Which predictors are behind which columns of the design."""

from __future__ import annotations

from collections.abc import Iterable

from plainodds.model.fitted import FittedModel

__all__ = ["owners_of"]


def owners_of(model: FittedModel, places: Iterable[int]) -> tuple[str, ...]:
    """The predictors behind some columns, in the order of the model; none for an intercept."""
    columns = model.design.columns
    behind = frozenset().union(*(model.design.variables_of(columns[place]) for place in places))
    return tuple(facts.name for facts in model.subject.predictors if facts.name in behind)
