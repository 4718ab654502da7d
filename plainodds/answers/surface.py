"""The chance over two numbers, and where the data are."""

from __future__ import annotations

from typing import Any

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.averaged_values import affordable_points, averaged_values
from plainodds.answers.averaging import Averager
from plainodds.answers.pair_settled import Settled
from plainodds.answers.points import grid_along
from plainodds.answers.progress import Progress, silent
from plainodds.model.design.design import Floats
from plainodds.model.fitted import FittedModel
from plainodds.model.predictors import PredictorFacts
from plainodds.scales import (
    linear_predictor_from_probability,
    odds_from_linear_predictor,
    probability_from_linear_predictor,
)
from plainodds.values import value

__all__ = ["Surface", "surface_of"]

_POINTS = 60
_CELLS = 30


@value
class Surface:
    """The chance (or log odds) over a grid of two numbers.

    Attributes
    ----------
    a_at, b_at : tuple of float
        Increasing values of the two predictors.
    estimate : tuple (len(b_at)) of tuples (len(a_at)) of float
        On the question's scale: chances, or odds.
    crossing : tuple of tuples of float
        The local interaction ∂²/∂a∂b of the chance (of log odds on the odds scale), by
        differences over the grid; only its sign is meant to be read.
    supported : tuple of tuples of bool
        Whether rows lie near each point.
    """

    a_at: tuple[float, ...]
    b_at: tuple[float, ...]
    estimate: tuple[tuple[float, ...], ...]
    crossing: tuple[tuple[float, ...], ...]
    supported: tuple[tuple[bool, ...], ...]


def surface_of(
    model: FittedModel,
    pair: Settled,
    scale: str,
    averager: Averager | None,
    progress: Progress = silent,
) -> Surface:
    """The chance, or the odds, over both numbers.

    Parameters
    ----------
    model : FittedModel
    pair : Settled
        Of two numbers.
    scale : {"probability", "odds"}
    averager : Averager or None
        What averages over the rows; None at the held profile.
    progress : callable, optional
        Told how far the averages are; may raise to stop.
    """
    names = pair.a.name, pair.b.name
    points = _POINTS if averager is None else affordable_points(model, names, _POINTS)
    a_at, b_at = grid_along(pair.a, points), grid_along(pair.b, points)
    shape = len(b_at), len(a_at)
    moved = {pair.a.name: np.tile(a_at, len(b_at)), pair.b.name: np.repeat(b_at, len(a_at))}
    if averager is None:
        eta = pair.around.linear_predictors(moved).reshape(shape)
        chance = probability_from_linear_predictor(eta)
    else:
        chance = averaged_values(model, moved, averager.population, progress).reshape(shape)
        eta = linear_predictor_from_probability(chance)
    estimate = odds_from_linear_predictor(eta) if scale == "odds" else chance
    crossing = _crossing(eta if scale == "odds" else chance, a_at, b_at)
    return Surface(
        tuple(a_at.tolist()),
        tuple(b_at.tolist()),
        _nested(estimate),
        _nested(crossing),
        _nested(_supported(model, pair, a_at, b_at)),
    )


def _crossing(values: Floats, a_at: Floats, b_at: Floats) -> Floats:
    """∂²/∂a∂b by differences; rounding is set to 0, so that no sign is read from it."""
    if min(values.shape) < 2:
        return np.zeros(values.shape)
    found = np.gradient(np.gradient(values, a_at, axis=1), b_at, axis=0)
    finest = np.diff(a_at).min() * np.diff(b_at).min()
    rounding = 16 * np.finfo(float).eps * np.abs(values).max() / finest
    return np.where(np.abs(found) > rounding, found, 0.0)


def _supported(model: FittedModel, pair: Settled, a_at: Floats, b_at: Floats) -> NDArray[np.bool_]:
    """Whether rows lie in the cell of each point or in one of the eight around it."""
    if not model.sample.rows:
        return np.zeros((len(b_at), len(a_at)), dtype=bool)
    rows_a, rows_b = model.sample.columns[pair.a.name], model.sample.columns[pair.b.name]
    counts = np.bincount(
        _cells(pair.b, rows_b) * _CELLS + _cells(pair.a, rows_a), minlength=_CELLS**2
    ).reshape(_CELLS, _CELLS)
    wide = np.pad(counts > 0, 1)
    near = np.zeros((_CELLS, _CELLS), dtype=bool)
    for i in range(3):
        for j in range(3):
            near |= wide[i : i + _CELLS, j : j + _CELLS]
    inside_a = (a_at >= pair.a.minimum) & (a_at <= pair.a.maximum)
    inside_b = (b_at >= pair.b.minimum) & (b_at <= pair.b.maximum)
    return np.asarray(
        near[np.ix_(_cells(pair.b, b_at), _cells(pair.a, a_at))] & np.outer(inside_b, inside_a)
    )


def _cells(facts: PredictorFacts, x: Floats) -> NDArray[np.intp]:
    width = (facts.maximum - facts.minimum) or 1.0
    return np.clip(((x - facts.minimum) / width * _CELLS).astype(np.intp), 0, _CELLS - 1)


def _nested(grid: NDArray[Any]) -> tuple[tuple[Any, ...], ...]:
    return tuple(tuple(line) for line in grid.tolist())
