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
from plainodds.model.products import product, transposed_product
from plainodds.scales import probability_from_linear_predictor

__all__ = ["Averages", "averaged_probability", "averaged_slope"]

# Numbers worked on at once, rows of a block times points, so that they stay in the cache.
_CACHED = 131_072


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
    gradient = np.zeros((parts.width, len(own)))
    for still, carried, weights in _blocks(model, parts, len(own)):
        pi = _probability(still, strength)
        total += np.einsum("i,ij->j", weights, pi)
        np.subtract(pi, pi * pi, out=pi)
        gradient += transposed_product(carried, pi)
    rest, staying = _untangled(parts, gradient)
    return Averages(total, _assembled(parts, rest, own * staying))


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
    strength = _strength(model, parts, own)
    slope_strength = _strength(model, parts, own_slope)
    slope_strength[-1] = 0.0
    total = np.zeros(len(own))
    gradient = np.zeros((parts.width, 2 * len(own)))
    for still, carried, weights in _blocks(model, parts, len(own)):
        pi = _probability(still, strength)
        # curving π(1−π)(1−2π)·dη/dx and sloping π(1−π), side by side for one product
        both = np.empty((len(still), 2, len(own)))
        sloping = np.subtract(pi, pi * pi, out=both[:, 1])
        curving = np.multiply(sloping, product(still, slope_strength), out=both[:, 0])
        total += np.einsum("i,ij->j", weights, curving)
        curving *= 1 - 2 * pi
        gradient += transposed_product(carried, both.reshape(len(still), -1))
    rest, curving_still = _untangled(parts, gradient[:, : len(own)])
    _, sloping_still = _untangled(parts, gradient[:, len(own) :])
    moving = own * curving_still + own_slope * sloping_still
    return Averages(total, _assembled(parts, rest, moving))


def _split(model: FittedModel, moved: Coded) -> Split | None:
    if not model.sample.rows:
        raise QuestionRefused("The model carries no rows to average over; ask others='typical'.")
    return split(model.design, moved)


def _strength(model: FittedModel, parts: Split, own: Floats) -> Floats:
    """Σ_{c in g} β_c own(j, c), and 1 for the rest of η: shape (G + 1, J)."""
    moving = parts.membership().T @ (own * model.coefficients[parts.touched]).T
    return np.vstack([moving, np.ones(len(own))])


def _untangled(parts: Split, gradient: Floats) -> tuple[Floats, Floats]:
    """The gradient's parts: of the columns that rest, and of what each moving column stays as."""
    resting = len(parts.resting)
    return gradient[:resting].T, gradient[resting:][parts.group].T


def _assembled(parts: Split, rest: Floats, moving: Floats) -> Floats:
    gradient = np.empty((len(moving), len(parts.design.columns)))
    gradient[:, parts.resting] = rest
    gradient[:, parts.touched] = moving
    return gradient


def _blocks(
    model: FittedModel, parts: Split, points: int
) -> Iterator[tuple[Floats, Floats, Floats]]:
    """What is needed of the rows, block by block.

    Yields what stays, with the rest of η as last column; what carries the gradient,
    the resting columns and what stays, weighted; and the weights.
    """
    weights = _normalised_weights(model)
    for block in _slices(model.sample.rows, points):
        resting = model.sample.matrix[block][:, parts.resting]
        staying = parts.still_values(_block_of(model, block), len(resting))
        eta = np.einsum("ij,j->i", resting, model.coefficients[parts.resting])
        w = weights[block]
        carried = np.concatenate([resting, staying], axis=1) * w[:, None]
        yield np.column_stack([staying, _rest(model, eta, block)]), carried, w


def _slices(rows: int, points: int) -> Iterator[slice]:
    size = max(256, _CACHED // points)
    return (slice(start, min(start + size, rows)) for start in range(0, rows, size))


def _normalised_weights(model: FittedModel) -> Floats:
    if model.sample.weights is None:
        return np.full(model.sample.rows, 1.0 / model.sample.rows)
    return np.asarray(model.sample.weights / model.sample.weights.sum())


def _block_of(model: FittedModel, block: slice) -> dict[str, NDArray[Any]]:
    return {name: column[block] for name, column in model.sample.columns.items()}


def _rest(model: FittedModel, eta: Floats, block: slice) -> Floats:
    return eta if model.sample.offset is None else eta + model.sample.offset[block]


def _probability(still: Floats, strength: Floats) -> Floats:
    """1 / (1 + exp(−η)) of η = still @ strength, in one piece of memory."""
    pi = product(still, -strength)
    # past 709 exp overflows to infinity, and the probability is 0 to every digit
    with np.errstate(over="ignore"):
        np.exp(pi, out=pi)
    pi += 1.0
    return np.reciprocal(pi, out=pi)


def _rebuilt(
    model: FittedModel, moved: Coded, j: int
) -> Iterator[tuple[Floats, dict[str, NDArray[Any]], Floats, Floats]]:
    """Rows rebuilt with the moved values of point j: where the design cannot be split."""
    touched = model.design.touched(moved)
    weights = _normalised_weights(model)
    for block in _slices(model.sample.rows, 1):
        X = model.sample.matrix[block].copy()
        coded = _block_of(model, block)
        coded |= {name: np.repeat(values[j : j + 1], len(X)) for name, values in moved.items()}
        X[:, touched] = model.design.some_columns(touched, coded, len(X))
        eta = _rest(model, X @ model.coefficients, block)
        yield X, coded, probability_from_linear_predictor(eta), weights[block]


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
