"""Points around a held profile, as arrays: where some predictors move and the rest stay."""

from __future__ import annotations

from typing import Any

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.population import Averages
from plainodds.model.design.design import Coded, Floats
from plainodds.model.fitted import FittedModel
from plainodds.model.predictors import PredictorFacts
from plainodds.scales import probability_from_linear_predictor, probability_slope
from plainodds.values import Pairs

__all__ = ["POINTS", "chances_at", "coded_at", "grid_along", "linear_predictors_at", "rows_at"]

POINTS = 101
"""How many points a line is drawn through."""


def grid_along(facts: PredictorFacts, points: int) -> Floats:
    """Increasing values of a number over what is offered and can be computed.

    Whole numbers stay whole, so that there may be fewer points.
    """
    low = max(facts.offered[0], facts.allowed[0])
    high = min(facts.offered[1], facts.allowed[1])
    grid = np.linspace(low, high, points)
    if facts.kind == "whole number":
        grid = np.unique(np.clip(np.round(grid), low, high))
    return grid


def coded_at(model: FittedModel, base: Pairs, moved: Coded) -> dict[str, NDArray[Any]]:
    """A whole profile at n points, where the moved predictors take n values each."""
    n = len(next(iter(moved.values())))
    held = model.coded([base])
    return {name: np.repeat(code, n) for name, code in held.items()} | dict(moved)


def rows_at(model: FittedModel, base: Pairs, moved: Coded) -> Floats:
    """Design rows of n points, shape (n, k); only what moves is built for each."""
    n = len(next(iter(moved.values())))
    rows = np.repeat(model.rows([base]), n, axis=0)
    touched = model.design.touched(moved)
    rows[:, touched] = model.design.some_columns(touched, coded_at(model, base, moved), n)
    return rows


def linear_predictors_at(model: FittedModel, base: Pairs, moved: Coded) -> Floats:
    """η at n points, shape (n,)."""
    n = len(next(iter(moved.values())))
    touched = model.design.touched(moved)
    still = model.rows([base])[0] * model.coefficients
    still[touched] = 0.0
    columns = model.design.some_columns(touched, coded_at(model, base, moved), n)
    return np.asarray(columns @ model.coefficients[touched] + still.sum() + model.offset)


def chances_at(model: FittedModel, base: Pairs, moved: Coded) -> Averages:
    """The chance at n points with its gradient, as averages of one profile each would be."""
    rows = rows_at(model, base, moved)
    pi = probability_from_linear_predictor(rows @ model.coefficients + model.offset)
    return Averages(pi, probability_slope(pi)[:, None] * rows)
