"""Averages where each row's design is built anew.

For predictors that are shifted by each row's own value, for slopes at each row's own
value, and where the design's columns cannot be split into what moves and what stays.
"""

from __future__ import annotations

from collections.abc import Callable, Iterator, Sequence
from dataclasses import dataclass
from typing import TypeAlias

import numpy as np

from plainodds.answers.population import Averages, Population, block_of, rest_of, slices
from plainodds.model.design.design import Coded, Floats
from plainodds.model.fitted import FittedModel
from plainodds.model.products import transposed_product
from plainodds.scales import probability_from_linear_predictor

__all__ = [
    "Mover",
    "as_they_are",
    "averaged_own_slopes",
    "averaged_probability",
    "averaged_slope",
    "row_own_slopes",
    "row_probabilities",
    "setters",
    "shifter",
]

_ROWS = 65_536


@dataclass(frozen=True, eq=False)
class Mover:
    """One way to move predictors, row by row.

    Attributes
    ----------
    names : tuple of str
        The predictors moved; none for rows as they are.
    move : callable
        Coded columns of some rows to the moved predictors' new columns.
    """

    names: tuple[str, ...]
    move: Callable[[Coded], Coded]


Movers: TypeAlias = Sequence[Mover]


def setters(moved: Coded) -> tuple[Mover, ...]:
    """Movers that give every row the j-th value of each moved predictor."""
    points = len(next(iter(moved.values())))

    def setter(j: int) -> Mover:
        def move(coded: Coded) -> Coded:
            n = len(next(iter(coded.values())))
            return {name: np.repeat(values[j : j + 1], n) for name, values in moved.items()}

        return Mover(tuple(moved), move)

    return tuple(setter(j) for j in range(points))


def as_they_are() -> Mover:
    """The mover that leaves every row as it is."""
    return Mover((), lambda coded: {})


def shifter(name: str, step: float) -> Mover:
    """The mover that adds a step to each row's own value of a number."""
    return Mover((name,), lambda coded: {name: coded[name] + step})


def averaged_probability(model: FittedModel, movers: Movers, population: Population) -> Averages:
    """The average probability under each mover."""
    value = np.zeros(len(movers))
    gradient = np.zeros((len(movers), len(model.coefficients)))
    for block, weights in _counted(model, population):
        for j, mover in enumerate(movers):
            X, _, pi = _moved(model, mover, block)
            value[j] += weights @ pi
            gradient[j] += np.einsum("i,ij->j", weights * pi * (1 - pi), X)
    return Averages(value, gradient)


def averaged_slope(
    model: FittedModel, name: str, movers: Movers, population: Population
) -> Averages:
    """The average of dπ/d(name) under each mover."""
    value = np.zeros(len(movers))
    gradient = np.zeros((len(movers), len(model.coefficients)))
    for block, weights in _counted(model, population):
        for j, mover in enumerate(movers):
            X, coded, pi = _moved(model, mover, block)
            slope, slope_gradient = _slopes(model, (name,), X, coded, pi, weights)
            value[j] += slope[0]
            gradient[j] += slope_gradient[0]
    return Averages(value, gradient)


def averaged_own_slopes(
    model: FittedModel, names: Sequence[str], population: Population
) -> Averages:
    """The average of dπ/d(name) at each row's own values, for several numbers in one pass."""
    value = np.zeros(len(names))
    gradient = np.zeros((len(names), len(model.coefficients)))
    for block, weights in _counted(model, population):
        X, coded, pi = _own(model, block)
        slopes, slope_gradients = _slopes(model, names, X, coded, pi, weights)
        value += slopes
        gradient += slope_gradients
    return Averages(value, gradient)


def row_probabilities(model: FittedModel, movers: Movers) -> Iterator[tuple[slice, Floats]]:
    """Each row's probability under each mover, block by block: (rows, J)."""
    for block in slices(model.sample.rows, _ROWS):
        yield block, np.column_stack([_moved(model, mover, block)[2] for mover in movers])


def row_own_slopes(model: FittedModel, names: Sequence[str]) -> Iterator[tuple[slice, Floats]]:
    """Each row's dπ/d(name) at its own values, block by block: (rows, names)."""
    for block in slices(model.sample.rows, _ROWS):
        _, coded, pi = _own(model, block)
        slopes = []
        for name in names:
            touched, derivatives = model.design.touched_derivatives(name, coded)
            steepness = np.einsum("ij,j->i", derivatives, model.coefficients[touched])
            slopes.append(pi * (1 - pi) * steepness)
        yield block, np.column_stack(slopes)


def _counted(model: FittedModel, population: Population) -> Iterator[tuple[slice, Floats]]:
    for block in slices(model.sample.rows, _ROWS):
        weights = population.weights[block]
        if weights.any():
            yield block, weights


def _own(model: FittedModel, block: slice) -> tuple[Floats, dict[str, Floats], Floats]:
    X = model.sample.matrix[block]
    eta = rest_of(model, np.einsum("ij,j->i", X, model.coefficients), block)
    return X, block_of(model, block), probability_from_linear_predictor(eta)


def _moved(
    model: FittedModel, mover: Mover, block: slice
) -> tuple[Floats, dict[str, Floats], Floats]:
    if not mover.names:
        return _own(model, block)
    touched = model.design.touched(mover.names)
    X = model.sample.matrix[block].copy()
    coded = block_of(model, block)
    coded |= mover.move(coded)
    X[:, touched] = model.design.some_columns(touched, coded, len(X))
    eta = rest_of(model, np.einsum("ij,j->i", X, model.coefficients), block)
    return X, coded, probability_from_linear_predictor(eta)


def _slopes(
    model: FittedModel,
    names: Sequence[str],
    X: Floats,
    coded: Coded,
    pi: Floats,
    weights: Floats,
) -> tuple[Floats, Floats]:
    """Weighted sums of dπ/d(name) over some rows, and of their gradients."""
    sloping = weights * pi * (1 - pi)
    curving = np.empty((len(pi), len(names)))
    gradient = np.zeros((len(names), len(model.coefficients)))
    value = np.empty(len(names))
    for place, name in enumerate(names):
        touched, derivatives = model.design.touched_derivatives(name, coded)
        steepness = np.einsum("ij,j->i", derivatives, model.coefficients[touched])
        value[place] = np.einsum("i,i->", sloping, steepness)
        curving[:, place] = sloping * (1 - 2 * pi) * steepness
        gradient[place, touched] = np.einsum("i,ij->j", sloping, derivatives)
    return value, gradient + transposed_product(curving, X)
