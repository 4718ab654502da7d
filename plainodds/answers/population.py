"""The rows that an average is taken over, with their weights."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from typing import Any

import numpy as np
from numpy.typing import NDArray

from plainodds.errors import QuestionRefused
from plainodds.model.fitted import FittedModel

__all__ = [
    "Averages",
    "Population",
    "block_of",
    "everyone",
    "rest_of",
    "slices",
]

Floats = NDArray[np.float64]


@dataclass(frozen=True, eq=False)
class Averages:
    """Averages of J quantities over a population.

    Attributes
    ----------
    value : array (J,)
    gradient : array (J, k)
        Derivatives with respect to the coefficients.
    """

    value: Floats
    gradient: Floats


@dataclass(frozen=True, eq=False)
class Population:
    """Rows with weights.

    Attributes
    ----------
    weights : array (n,)
        Sum to 1; 0 for a row left out.
    counted : int
        Rows that are not left out.
    """

    weights: Floats
    counted: int

    def among(self, mask: NDArray[np.bool_], what: str) -> Population:
        """Only some of the rows.

        Raises
        ------
        QuestionRefused
            If there are none of them.
        """
        weights = np.where(mask, self.weights, 0.0)
        total = float(weights.sum())
        if not total > 0:
            raise QuestionRefused(f"No row has {what}; there is nobody to average over.")
        return Population(weights / total, int((weights > 0).sum()))


def everyone(model: FittedModel) -> Population:
    """All rows that the fit used, with the fit's own weights.

    Frequency weights count cases, variance weights count as they stand. In a case-control
    sample with a stated prevalence, events and non-events are weighed to the population's
    share, so that an average is over the population and not over the sample.

    Raises
    ------
    QuestionRefused
        If the model carries no rows.
    """
    n = model.sample.rows
    if not n:
        raise QuestionRefused("The model carries no rows to average over; ask others='typical'.")
    weights = np.ones(n) if model.sample.weights is None else model.sample.weights
    if model.subject.prevalence is not None and model.sample.outcome is not None:
        # cases were sampled more often than others: weigh them back to the population's share
        share, found = model.subject.prevalence, model.subject.outcome.share
        events = model.sample.outcome
        weights = weights * (events * share / found + (1 - events) * (1 - share) / (1 - found))
    return Population(np.asarray(weights / weights.sum()), n)


def slices(rows: int, size: int) -> Iterator[slice]:
    """Slices of at most `size` that cover the rows."""
    return (slice(start, min(start + size, rows)) for start in range(0, rows, size))


def block_of(model: FittedModel, block: slice) -> dict[str, NDArray[Any]]:
    """Some rows' coded predictors."""
    return {name: column[block] for name, column in model.sample.columns.items()}


def rest_of(model: FittedModel, eta: Floats, block: slice) -> Floats:
    """η with each row's own offset and the intercept's shift added."""
    if model.sample.offset is not None:
        eta = eta + model.sample.offset[block]
    return eta + model.intercept_shift if model.intercept_shift else eta
