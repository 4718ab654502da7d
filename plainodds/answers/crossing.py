"""The interaction of two predictors on the probability scale, and on the log-odds scale.

On the probability scale it is the cross difference of four chances; for two slopes the
cross partial ∂²π/∂a∂b; for a slope and a change the difference of two slopes. With
π⁽ⁿ⁾ for the n-th derivative of π with respect to η,

    ∂²π/∂a∂b = π' η_ab + π'' η_a η_b

so that it may differ from 0 without any product term, and its sign may be opposite to
the product's. Source: Ai & Norton 2003 (Economics Letters 80:123).
"""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.averaging import Averager, averaged_own_slope
from plainodds.answers.pair_settled import Settled
from plainodds.answers.points import Around
from plainodds.answers.population import Averages, Population, block_of, rest_of, slices
from plainodds.model.design.cross import cross_derivatives
from plainodds.model.design.design import Coded, Floats
from plainodds.model.fitted import FittedModel
from plainodds.model.products import transposed_product
from plainodds.scales import (
    probability_curvature,
    probability_from_linear_predictor,
    probability_slope,
    probability_third_derivative,
)

__all__ = [
    "averaged_crossing",
    "corners",
    "crossing_at_profile",
    "double_contrast",
    "held_slopes",
]

_ROWS = 65_536
_FOUR = np.array([1.0, -1.0, -1.0, 1.0])
"""Both changed, only a, only b, neither."""


def corners(model: FittedModel, pair: Settled) -> dict[str, NDArray[np.generic]]:
    """The four combinations of both changes: both, only `a`, only `b`, neither."""
    a = model.coded_values(pair.a, pair.a_change)
    b = model.coded_values(pair.b, pair.b_change)
    return {pair.a.name: a[[1, 1, 0, 0]], pair.b.name: b[[1, 0, 1, 0]]}


def double_contrast(model: FittedModel, pair: Settled) -> Floats:
    """The row whose product with β is the log of the ratio of odds ratios, shape (k,)."""
    both, a, b, neither = pair.around.rows(corners(model, pair))
    # in this order a column without a part in the interaction cancels exactly
    return np.asarray((both - a) - (b - neither))


def crossing_at_profile(model: FittedModel, pair: Settled) -> Averages:
    """The interaction on the probability scale at the held profile, as one value.

    Slopes are taken at the typical values of their predictors.
    """
    if len(pair.sloped) == 2:
        a, b = pair.sloped
        return _partial_at_profile(pair.around, a, b)
    if len(pair.sloped) == 1:
        name, ends = _sloped_and_changed(model, pair)
        return _difference(held_slopes(pair.around, name, ends))
    return _contrasted(pair.around.chances(corners(model, pair)))


def averaged_crossing(model: FittedModel, pair: Settled, averager: Averager) -> Averages:
    """The same averaged over the rows, as one value.

    Every row keeps its own values of all but what is changed: a sloped predictor stays
    where it is in each row.
    """
    if len(pair.sloped) == 2:
        a, b = pair.sloped
        return _averaged_partial(model, a, b, averager.population)
    if len(pair.sloped) == 1:
        name, ends = _sloped_and_changed(model, pair)
        return _difference(averaged_own_slope(model, name, ends, averager.population))
    return _contrasted(averager.probability(corners(model, pair)))


def held_slopes(around: Around, name: str, moved: Coded) -> Averages:
    """dπ/d(name) at a held profile with another predictor moved to J values."""
    model, rows = around.model, around.rows(moved)
    slopes = model.design.row_derivatives(name, around.coded(moved))
    pi = probability_from_linear_predictor(rows @ model.coefficients + model.offset)
    steepness = slopes @ model.coefficients
    gradient = (
        probability_slope(pi)[:, None] * slopes
        + (probability_curvature(pi) * steepness)[:, None] * rows
    )
    return Averages(probability_slope(pi) * steepness, gradient)


def _sloped_and_changed(
    model: FittedModel, pair: Settled
) -> tuple[str, dict[str, NDArray[np.generic]]]:
    (name,) = pair.sloped
    changed, ends = (pair.b, pair.b_change) if name == pair.a.name else (pair.a, pair.a_change)
    return name, {changed.name: model.coded_values(changed, ends)}


def _difference(two: Averages) -> Averages:
    return Averages(two.value[1:] - two.value[:1], two.gradient[1:] - two.gradient[:1])


def _contrasted(four: Averages) -> Averages:
    return Averages(_FOUR[None] @ four.value, _FOUR[None] @ four.gradient)


def _partial_at_profile(around: Around, a: str, b: str) -> Averages:
    model, row = around.model, around.row
    eta = row @ model.coefficients + model.offset
    return _partials(model, a, b, row, around.held, eta, np.ones(1))


def _averaged_partial(model: FittedModel, a: str, b: str, population: Population) -> Averages:
    value, gradient = np.zeros(1), np.zeros((1, len(model.coefficients)))
    for block in slices(model.sample.rows, _ROWS):
        weights = population.weights[block]
        if not weights.any():
            continue
        X = model.sample.matrix[block]
        eta = rest_of(model, np.einsum("ij,j->i", X, model.coefficients), block)
        part = _partials(model, a, b, X, block_of(model, block), eta, weights)
        value += part.value
        gradient += part.gradient
    return Averages(value, gradient)


def _partials(
    model: FittedModel,
    a: str,
    b: str,
    X: Floats,
    coded: Coded,
    eta: Floats,
    weights: Floats,
) -> Averages:
    """The weighted sum of ∂²π/∂a∂b over some rows, with its exact gradient."""
    beta, design = model.coefficients, model.design
    of_a, slopes_a = design.touched_derivatives(a, coded)
    of_b, slopes_b = design.touched_derivatives(b, coded)
    of_both, crossed = cross_derivatives(design, a, b, coded)
    along_a = np.einsum("ij,j->i", slopes_a, beta[of_a])
    along_b = np.einsum("ij,j->i", slopes_b, beta[of_b])
    across = np.einsum("ij,j->i", crossed, beta[of_both])
    pi = probability_from_linear_predictor(eta)
    first, second = weights * probability_slope(pi), weights * probability_curvature(pi)
    third = weights * probability_third_derivative(pi)
    gradient = transposed_product((second * across + third * along_a * along_b)[:, None], X)
    gradient[:, of_a] += np.einsum("i,ij->j", second * along_b, slopes_a)
    gradient[:, of_b] += np.einsum("i,ij->j", second * along_a, slopes_b)
    gradient[:, of_both] += np.einsum("i,ij->j", first, crossed)
    value = first @ across + second @ (along_a * along_b)
    return Averages(np.array([value]), gradient)
