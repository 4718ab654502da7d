"""Averages in a few milliseconds: the distribution of what stays stands in for the rows.

When predictors are moved, a row's linear predictor is what stays, which differs from
row to row, plus what moves, which is the same for all rows with the same modifiers. So
for each pattern of modifiers the weighted distribution of what stays is all that an
average needs; it is kept on a fine grid, each row shared between the two points beside
it. The error is that of linear interpolation between points 1/250 apart: below 1e-6.

A sketch serves moving pictures; tables, code and saved figures use the exact average.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import Any

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.population import Averages, Population, rest_of
from plainodds.model.design.design import Coded, Floats
from plainodds.model.design.split import Split, split
from plainodds.model.fitted import FittedModel
from plainodds.scales import probability_from_linear_predictor

__all__ = ["Sketch", "patterns_of", "sketch_of"]

_SPACING = 0.004
_MOST_POINTS = 32_768
_MOST_PATTERNS = 64


@dataclass(frozen=True, eq=False)
class Sketch:
    """The distribution of what stays, for the predictors that may be moved.

    Attributes
    ----------
    model : FittedModel
    population : Population
        The rows sketched.
    parts : Split
    patterns : array (S, G)
        What stays of the touched columns, for each pattern of modifiers.
    grid : array (B,)
        Values of the rest of η.
    mass : array (S, B)
        Weight of the rows at each value; sums to 1.
    carried : array (S, B, U)
        Weighted sums of the resting columns there.
    """

    model: FittedModel
    population: Population
    parts: Split
    patterns: Floats
    grid: Floats
    mass: Floats
    carried: Floats

    def probability(self, moved: Coded) -> Averages:
        """The average probability at each of J moved points, with its gradient."""
        own = self.parts.own_values(moved)
        pi = self._probabilities(own)
        value = np.einsum("sb,sbj->j", self.mass, pi)
        pi -= pi * pi
        at_patterns = np.einsum("sb,sbj->sj", self.mass, pi)
        resting = np.einsum("sbu,sbj->ju", self.carried, pi, optimize=True)
        moving = own * (self.patterns.T @ at_patterns)[self.parts.group].T
        return Averages(value, self._assembled(resting, moving))

    def slope(self, name: str, moved: Coded) -> Averages:
        """The average of dπ/d(name) at each of J moved points, with its gradient."""
        own, own_slope = self.parts.own_values(moved), self.parts.own_derivatives(name, moved)
        steepness = self.patterns @ self._strength(own_slope)
        pi = self._probabilities(own)
        sloping = pi - pi * pi
        at_patterns = np.einsum("sb,sbj->sj", self.mass, sloping)
        value = np.einsum("sj,sj->j", at_patterns, steepness)
        curving = sloping * (1 - 2 * pi) * steepness[:, None]
        curving_at = np.einsum("sb,sbj->sj", self.mass, curving)
        resting = np.einsum("sbu,sbj->ju", self.carried, curving, optimize=True)
        group = self.parts.group
        moving = (
            own * (self.patterns.T @ curving_at)[group].T
            + own_slope * (self.patterns.T @ at_patterns)[group].T
        )
        return Averages(value, self._assembled(resting, moving))

    def _strength(self, own: Floats) -> Floats:
        weighted = own * self.model.coefficients[self.parts.touched]
        return np.asarray(self.parts.membership().T @ weighted.T)

    def _probabilities(self, own: Floats) -> Floats:
        moving = self.patterns @ self._strength(own)
        return probability_from_linear_predictor(self.grid[None, :, None] + moving[:, None])

    def _assembled(self, resting: Floats, moving: Floats) -> Floats:
        gradient = np.empty((len(moving), len(self.model.coefficients)))
        gradient[:, self.parts.resting] = resting
        gradient[:, self.parts.touched] = moving
        return gradient


def sketch_of(model: FittedModel, names: tuple[str, ...], population: Population) -> Sketch | None:
    """Sketch a population for predictors that may be moved.

    Returns
    -------
    Sketch or None
        None where the rows cannot be told apart by few patterns: a moved predictor
        shares a term with a number of many values, or a factor with a still predictor.
    """
    parts = split(model.design, names)
    if parts is None:
        return None
    found = patterns_of(model, parts)
    if found is None:
        return None
    patterns, pattern_of = found
    resting = model.sample.matrix[:, parts.resting]
    eta = rest_of(
        model,
        np.einsum("ij,j->i", resting, model.coefficients[parts.resting]),
        slice(0, model.sample.rows),
    )
    low, high = float(eta.min()), float(eta.max())
    points = int(np.clip(np.ceil((high - low) / _SPACING), 1, _MOST_POINTS)) + 1
    grid = np.linspace(low, high, points)
    spacing = (high - low) / (points - 1) or 1.0
    place = np.minimum(((eta - low) / spacing).astype(np.intp), points - 2 if points > 1 else 0)
    beyond = (eta - low) / spacing - place
    cell = pattern_of * points + place
    cells = len(patterns) * points

    def gathered(weights: Floats) -> Floats:
        left = np.bincount(cell, weights * (1 - beyond), minlength=cells)
        right = np.bincount(np.minimum(cell + 1, cells - 1), weights * beyond, minlength=cells)
        return np.asarray(left + right).reshape(len(patterns), points)

    carried = (
        np.stack(
            [gathered(population.weights * resting[:, u]) for u in range(resting.shape[1])], axis=2
        )
        if resting.shape[1]
        else np.zeros((len(patterns), points, 0))
    )
    return Sketch(model, population, parts, patterns, grid, gathered(population.weights), carried)


def patterns_of(model: FittedModel, parts: Split) -> tuple[Floats, NDArray[np.intp]] | None:
    """What stays for each distinct pattern of modifiers, and each row's pattern.

    None where there are more than a few.
    """
    factors = {at for atoms in parts.still for at, _ in atoms}
    names = sorted(frozenset().union(*(parts.design.factors[at].variables for at in factors)))
    code: NDArray[Any] = np.zeros(model.sample.rows, dtype=np.intp)
    for name in names:
        column = model.sample.columns[name]
        distinct, own = np.unique(column, return_inverse=True)
        if len(distinct) > _MOST_PATTERNS:
            return None
        code = code * len(distinct) + own
    distinct, first, pattern_of = np.unique(code, return_index=True, return_inverse=True)
    if len(distinct) > _MOST_PATTERNS:
        return None
    rows = {name: column[first] for name, column in model.sample.columns.items()}
    return parts.still_values(rows, len(first)), pattern_of
