"""Averaging over the sample, fast, in one place.

Every row keeps its own values but for the predictors that are moved; the
probabilities (or their slopes) are averaged with the rows' weights, together with
their gradient with respect to the coefficients. Source: marginal standardisation,
Muller & MacLehose 2014 (Int J Epidemiol 43:962); Hanmer & Kalkan 2013 (AJPS 57:263).
"""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from typing import Any

import numpy as np
from numpy.typing import NDArray

from plainodds.errors import QuestionRefused
from plainodds.model.design.design import Coded, Floats
from plainodds.model.design.split import Split, split
from plainodds.model.fitted import FittedModel

__all__ = ["Averages", "averaged_probability", "averaged_slope"]

# numbers held at once: rows of a block times points, so that they stay in the cache
_HELD = 131_072


@dataclass(frozen=True, eq=False)
class Averages:
    """Averages at J points.

    Attributes
    ----------
    value : array (J,)
    gradient : array (J, k)
    """

    value: Floats
    gradient: Floats


def averaged_probability(model: FittedModel, moved: Coded) -> Averages:
    """The average probability when every row is given the moved values.

    Parameters
    ----------
    model : FittedModel
    moved : mapping of name to coded array (J,)
        Point j gives every row the j-th value of each moved predictor.

    Raises
    ------
    QuestionRefused
        If the model has no rows to average over.
    """
    parts = _split(model, moved)
    if parts is None:
        return _probability_by_rebuilding(model, moved)
    own = parts.own_values(moved)
    strength = _strength(model, parts, own)
    total = np.zeros(len(own))
    rest_gradient = np.zeros((len(model.coefficients), len(own)))
    still_gradient = np.zeros((len(parts.still), len(own)))
    for X, still, rest, weights in _blocks(model, parts, len(own)):
        pi = _probability(still @ strength, rest)
        total += weights @ pi
        _times_one_minus(pi)
        pi *= weights[:, None]
        rest_gradient += X.T @ pi
        still_gradient += still.T @ pi
    return Averages(total, _assembled(parts, rest_gradient, own * still_gradient[parts.group].T))


def averaged_slope(model: FittedModel, name: str, moved: Coded) -> Averages:
    """The average of dπ/d(name) when every row is given the moved values.

    Parameters
    ----------
    model : FittedModel
    name : str
        A number among the moved predictors.
    moved : mapping of name to coded array (J,)
    """
    parts = _split(model, moved)
    if parts is None:
        return _slope_by_rebuilding(model, name, moved)
    own, own_slope = parts.own_values(moved), parts.own_derivatives(name, moved)
    strength, slope_strength = _strength(model, parts, own), _strength(model, parts, own_slope)
    total = np.zeros(len(own))
    rest_gradient = np.zeros((len(model.coefficients), len(own)))
    still_curving = np.zeros((len(parts.still), len(own)))
    still_sloping = np.zeros_like(still_curving)
    for X, still, rest, weights in _blocks(model, parts, len(own)):
        pi = _probability(still @ strength, rest)
        steepness = still @ slope_strength
        sloping = pi * (1 - pi) * weights[:, None]
        total += np.einsum("ij,ij->j", sloping, steepness)
        curving = sloping * (1 - 2 * pi) * steepness
        rest_gradient += X.T @ curving
        still_curving += still.T @ curving
        still_sloping += still.T @ sloping
    moving = own * still_curving[parts.group].T + own_slope * still_sloping[parts.group].T
    return Averages(total, _assembled(parts, rest_gradient, moving))


def _split(model: FittedModel, moved: Coded) -> Split | None:
    if not model.sample.rows:
        raise QuestionRefused("The model carries no rows to average over; ask others='typical'.")
    return split(model.design, moved)


def _strength(model: FittedModel, parts: Split, own: Floats) -> Floats:
    """Σ_{c in g} β_c own(j, c), shape (G, J)."""
    return np.asarray(parts.membership().T @ (own * model.coefficients[parts.touched]).T)


def _assembled(parts: Split, rest_gradient: Floats, moving: Floats) -> Floats:
    gradient = rest_gradient.T.copy()
    gradient[:, parts.touched] = moving
    return gradient


def _blocks(
    model: FittedModel, parts: Split, points: int
) -> Iterator[tuple[Floats, Floats, Floats, Floats]]:
    """Design rows, what stays, the rest of η, and normalised weights, block by block."""
    resting = model.coefficients.copy()
    resting[parts.touched] = 0.0
    for block in _slices(model.sample.rows, points):
        X = model.sample.matrix[block]
        coded = _block_of(model, block)
        yield (
            X,
            parts.still_values(coded, len(X)),
            _rest(model, X @ resting, block),
            _weights(model, block),
        )


def _slices(rows: int, points: int) -> Iterator[slice]:
    size = max(256, _HELD // max(points, 1))
    return (slice(start, min(start + size, rows)) for start in range(0, rows, size))


def _block_of(model: FittedModel, block: slice) -> dict[str, NDArray[Any]]:
    return {name: column[block] for name, column in model.sample.columns.items()}


def _rest(model: FittedModel, eta: Floats, block: slice) -> Floats:
    return eta if model.sample.offset is None else eta + model.sample.offset[block]


def _weights(model: FittedModel, block: slice) -> Floats:
    if model.sample.weights is None:
        return np.full(block.stop - block.start, 1.0 / model.sample.rows)
    return np.asarray(model.sample.weights[block] / model.sample.weights.sum())


def _probability(eta: Floats, rest: Floats) -> Floats:
    """1 / (1 + exp(−η − rest)), in the memory of η."""
    eta += rest[:, None]
    np.negative(eta, out=eta)
    # past 709 exp overflows to infinity, and the probability is 0 to every digit
    with np.errstate(over="ignore"):
        np.exp(eta, out=eta)
    eta += 1.0
    return np.reciprocal(eta, out=eta)


def _times_one_minus(pi: Floats) -> None:
    """Turn π into π(1 − π), in its own memory."""
    np.subtract(pi, pi * pi, out=pi)


def _rebuilt(
    model: FittedModel, moved: Coded, j: int
) -> Iterator[tuple[Floats, dict[str, NDArray[Any]], Floats, Floats]]:
    """Rows rebuilt with the moved values of point j: where the design cannot be split."""
    touched = model.design.touched(moved)
    for block in _slices(model.sample.rows, 1):
        X = model.sample.matrix[block].copy()
        coded = _block_of(model, block)
        coded |= {name: np.repeat(values[j : j + 1], len(X)) for name, values in moved.items()}
        X[:, touched] = model.design.some_columns(touched, coded, len(X))
        pi = _probability((X @ model.coefficients)[:, None], _rest(model, np.zeros(len(X)), block))
        yield X, coded, pi[:, 0], _weights(model, block)


def _probability_by_rebuilding(model: FittedModel, moved: Coded) -> Averages:
    points = _points(moved)
    value, gradient = np.zeros(points), np.zeros((points, len(model.coefficients)))
    for j in range(points):
        for X, _, pi, weights in _rebuilt(model, moved, j):
            value[j] += weights @ pi
            gradient[j] += X.T @ (weights * pi * (1 - pi))
    return Averages(value, gradient)


def _slope_by_rebuilding(model: FittedModel, name: str, moved: Coded) -> Averages:
    points = _points(moved)
    value, gradient = np.zeros(points), np.zeros((points, len(model.coefficients)))
    for j in range(points):
        for X, coded, pi, weights in _rebuilt(model, moved, j):
            row_slopes = model.design.row_derivatives(name, coded)
            steepness = row_slopes @ model.coefficients
            sloping = weights * pi * (1 - pi)
            value[j] += sloping @ steepness
            gradient[j] += X.T @ (sloping * (1 - 2 * pi) * steepness) + row_slopes.T @ sloping
    return Averages(value, gradient)


def _points(moved: Mapping[str, NDArray[Any]]) -> int:
    return len(next(iter(moved.values())))
