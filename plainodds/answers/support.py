"""Where the data are along a predictor: counts per bin, no rows."""

from __future__ import annotations

import math

import numpy as np
from numpy.typing import NDArray

from plainodds.model.fitted import FittedModel
from plainodds.model.predictors import PredictorFacts
from plainodds.values import Scalar, value

__all__ = ["Support", "is_supported", "support_of"]

_BINS = 30


@value
class Support:
    """Where the data are along the predictor, for one value of `by`: counts, no rows.

    Attributes
    ----------
    by : scalar or None
    edges : tuple of float
        Bin edges, one more than counts; empty for levels.
    counts : tuple of int
        Rows in each bin, or of each level.
    """

    by: Scalar | None
    edges: tuple[float, ...]
    counts: tuple[int, ...]


def support_of(
    model: FittedModel,
    facts: PredictorFacts,
    by: PredictorFacts | None,
    values: tuple[Scalar | None, ...],
) -> tuple[Support, ...]:
    """Count the rows along a predictor, for each value of `by`.

    A row of a numeric `by` counts for the nearest of its values.
    """
    column = model.sample.columns[facts.name]
    edges: tuple[float, ...] = ()
    if facts.is_number:
        edges = _edges(facts)
        width = edges[1] - edges[0]
        # the highest value belongs to the last bin
        places = np.minimum(((column - edges[0]) / width).astype(np.intp), len(edges) - 2)
        size = len(edges) - 1
    else:
        places, size = column.astype(np.intp), len(facts.levels)
    lines = _nearest(model, by, values)
    counts = np.bincount(lines * size + places, minlength=len(values) * size)
    shaped = counts[: len(values) * size].reshape(len(values), size)
    return tuple(
        Support(b, edges, tuple(counted.tolist()))
        for b, counted in zip(values, shaped, strict=True)
    )


def is_supported(facts: PredictorFacts, support: Support, x: Scalar) -> bool:
    """Whether rows lie in the bin of a value or in one beside it."""
    if not facts.is_number:
        return support.counts[facts.levels.index(x)] > 0
    number, edges = float(x), support.edges
    if not edges[0] <= number <= edges[-1]:
        return False
    place = min(int((number - edges[0]) / (edges[1] - edges[0])), len(support.counts) - 1)
    return any(support.counts[max(place - 1, 0) : place + 2])


def _edges(facts: PredictorFacts) -> tuple[float, ...]:
    low, high = facts.minimum, facts.maximum
    if facts.kind == "whole number":
        # each bin holds equally many whole numbers, of which none lies on an edge
        width = math.ceil((high - low + 1) / _BINS)
        count = math.ceil((high - low + 1) / width)
        return tuple(low - 0.5 + width * place for place in range(count + 1))
    return tuple(np.linspace(low, high if high > low else low + 1.0, _BINS + 1).tolist())


def _nearest(
    model: FittedModel, by: PredictorFacts | None, values: tuple[Scalar | None, ...]
) -> NDArray[np.intp]:
    """For each row the position of its line; len(values) where it belongs to none."""
    if by is None:
        return np.zeros(model.sample.rows, dtype=np.intp)
    column = model.sample.columns[by.name]
    if by.is_number:
        order = np.argsort([float(v) for v in values if v is not None])
        ordered = np.array([float(v) for v in values if v is not None])[order]
        middles = (ordered[1:] + ordered[:-1]) / 2
        return np.asarray(order[np.searchsorted(middles, column)])
    line_of = np.full(len(by.levels), len(values), dtype=np.intp)
    for position, level in enumerate(values):
        if level is not None:
            line_of[by.levels.index(level)] = position
    return np.asarray(line_of[column])
