"""Points around a held profile, as arrays: where some predictors move and the rest stay."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property
from typing import Any

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.population import Averages
from plainodds.model.design.design import Coded, Floats
from plainodds.model.fitted import FittedModel
from plainodds.model.predictors import PredictorFacts
from plainodds.scales import probability_from_linear_predictor, probability_slope
from plainodds.values import Pairs

__all__ = ["POINTS", "Around", "grid_along"]

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


@dataclass(frozen=True, eq=False)
class Around:
    """What a model says around one whole profile.

    Points are given by the predictors that move, as a mapping of name to coded array
    (n,); all others stay as the profile has them.
    """

    model: FittedModel
    profile: Pairs

    @cached_property
    def held(self) -> dict[str, NDArray[Any]]:
        """The profile as coded columns of one value each."""
        return self.model.coded([self.profile])

    @cached_property
    def row(self) -> Floats:
        """The profile's own design row, shape (1, k)."""
        return self.model.design.rows(self.held)

    def coded(self, moved: Coded) -> dict[str, NDArray[Any]]:
        """Every predictor at n points."""
        n = len(next(iter(moved.values())))
        return {name: np.repeat(code, n) for name, code in self.held.items()} | dict(moved)

    def rows(self, moved: Coded) -> Floats:
        """Design rows of n points, shape (n, k); only what moves is built for each."""
        n = len(next(iter(moved.values())))
        rows = np.repeat(self.row, n, axis=0)
        touched = self.model.design.touched(moved)
        rows[:, touched] = self.model.design.some_columns(touched, self.coded(moved), n)
        return rows

    def linear_predictors(self, moved: Coded) -> Floats:
        """η at n points, shape (n,)."""
        return np.asarray(self.rows(moved) @ self.model.coefficients + self.model.offset)

    def chances(self, moved: Coded) -> Averages:
        """The chance at n points with its gradient, as averages of one profile each would be."""
        rows = self.rows(moved)
        pi = probability_from_linear_predictor(rows @ self.model.coefficients + self.model.offset)
        return Averages(pi, probability_slope(pi)[:, None] * rows)
