"""Average chances at very many points, without gradients: what a map needs."""

from __future__ import annotations

import numpy as np
from numpy.polynomial.chebyshev import chebpts1, chebval, chebvander
from numpy.typing import NDArray

from plainodds.answers import rebuilding
from plainodds.answers.population import Population, rest_of, slices
from plainodds.answers.progress import Progress, silent
from plainodds.answers.sketch import patterns_of
from plainodds.model.design.design import Coded, Floats
from plainodds.model.design.split import Split, split
from plainodds.model.fitted import FittedModel
from plainodds.model.products import product
from plainodds.scales import probability_from_linear_predictor

__all__ = ["affordable_points", "averaged_values"]

_ROWS = 4_096
_MOST = 40_000_000
_REBUILT = 2_000_000
# up to this exp, and the product of two of them, is still a number
_FAR = 350.0


def affordable_points(model: FittedModel, names: tuple[str, str], wanted: int) -> int:
    """How many values of each of two numbers a map can take without a long wait.

    Parameters
    ----------
    model : FittedModel
    names : (str, str)
        The two numbers.
    wanted : int
        No more than these.
    """
    parts = split(model.design, names)
    if parts is not None and patterns_of(model, parts) is not None:
        return wanted
    points = (_REBUILT if parts is None else _MOST) // model.sample.rows
    return int(np.clip(np.sqrt(points), 12, wanted))


def averaged_values(
    model: FittedModel, moved: Coded, population: Population, progress: Progress = silent
) -> Floats:
    """The average chance when every row is given the moved values, shape (J,).

    Where rows differ in few patterns of modifiers, the average of a pattern's rows is a
    smooth function of one number, by how much the moved predictors shift η. It is computed
    exactly at Chebyshev points and read off the polynomial through them, of a degree at
    which its error is below 1e-10: 1/(1 + e^−η) has its nearest poles at η = ±iπ. Source:
    Trefethen, Approximation Theory and Approximation Practice, ch. 8.

    Parameters
    ----------
    model : FittedModel
    moved : mapping of name to coded array (J,)
        Point j gives every row the j-th value of each moved predictor.
    population : Population
    progress : callable, optional
        Told how many of how many parts are done; may raise to stop.
    """
    parts = split(model.design, moved)
    if parts is None:
        return _rebuilt(model, moved, population, progress)
    own = parts.own_values(moved) * model.coefficients[parts.touched]
    strength = own @ parts.membership()
    found = patterns_of(model, parts)
    if found is None:
        return _at_each_point(model, parts, strength, population, progress)
    patterns, pattern_of = found
    rest = _rest(model, parts)
    total = np.zeros(len(strength))
    for place, pattern in enumerate(patterns):
        rows = pattern_of == place
        total += _by_polynomial(rest[rows], population.weights[rows], strength @ pattern)
        progress(place + 1, len(patterns))
    return total


def _rebuilt(
    model: FittedModel, moved: Coded, population: Population, progress: Progress
) -> Floats:
    """Point by point, with each row's design built anew."""
    movers = rebuilding.setters(moved)
    found = np.empty(len(movers))
    for j, mover in enumerate(movers):
        found[j] = rebuilding.averaged_probability(model, [mover], population).value[0]
        progress(j + 1, len(movers))
    return found


def _rest(model: FittedModel, parts: Split) -> Floats:
    """What stays of each row's η beside the moved columns."""
    resting = model.sample.matrix[:, parts.resting]
    eta = np.einsum("ij,j->i", resting, model.coefficients[parts.resting])
    return rest_of(model, eta, slice(0, model.sample.rows))


def _by_polynomial(rest: Floats, weights: Floats, shifts: Floats) -> Floats:
    low, high = float(shifts.min()), float(shifts.max())
    half = (high - low) / 2
    # the largest ellipse around the interval without a pole, and twelve digits by its size
    reach = np.pi / half if half > 0 else np.inf
    degree = int(np.ceil(30 / np.log(reach + np.hypot(reach, 1.0)))) + 2 if half > 0 else 0
    if degree >= len(shifts):
        return _averages(rest, weights, shifts)
    nodes = chebpts1(degree + 1)
    values = _averages(rest, weights, low + half * (nodes + 1))
    vander = chebvander(nodes, degree)
    coefficients = vander.T @ values * (2 / (degree + 1))
    coefficients[0] /= 2
    scaled = (shifts - low) / half - 1 if half > 0 else np.zeros(len(shifts))
    return np.asarray(chebval(scaled, coefficients))


def _averages(rest: Floats, weights: Floats, shifts: Floats) -> Floats:
    """Σᵢ wᵢ / (1 + exp(−restᵢ) exp(−shift)): mostly a product for each pair, no exp."""
    middle = (float(shifts.min()) + float(shifts.max())) / 2
    rest, shifts = rest + middle, shifts - middle
    moderate = max(np.abs(rest).max(initial=0.0), np.abs(shifts).max()) < _FAR
    of_rows, of_shifts = (np.exp(-rest), np.exp(-shifts)) if moderate else (rest, shifts)
    total = np.zeros(len(shifts))
    for block in slices(len(rest), _ROWS):
        if moderate:
            chances = np.multiply.outer(of_rows[block], of_shifts)
            chances += 1.0
            np.reciprocal(chances, out=chances)
        else:
            chances = probability_from_linear_predictor(np.add.outer(rest[block], shifts))
        total += np.einsum("i,ij->j", weights[block], chances)
    return total


def _at_each_point(
    model: FittedModel, parts: Split, strength: Floats, population: Population, progress: Progress
) -> Floats:
    """Row by row and point by point, where a modifier has many values."""
    total = np.zeros(len(strength))
    rest = _rest(model, parts)
    still = parts.still_rows(model.sample.matrix, model.sample.columns)
    size = max(16, _MOST // 100 // len(strength))
    for block in slices(model.sample.rows, size):
        eta = product(still[block], np.ascontiguousarray(strength.T)) + rest[block, None]
        chances: NDArray[np.float64] = probability_from_linear_predictor(eta)
        total += np.einsum("i,ij->j", population.weights[block], chances)
        progress(block.stop, model.sample.rows)
    return total
