"""Averaging over the sample at given values, fast, in one place.

Every row keeps its own values but for the predictors that are moved; the
probabilities (or their slopes) are averaged with the rows' weights, together with
their gradient with respect to the coefficients. Source: marginal standardisation,
Muller & MacLehose 2014 (Int J Epidemiol 43:962); Hanmer & Kalkan 2013 (AJPS 57:263).
"""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from typing import Protocol

import numpy as np

from plainodds.answers import rebuilding
from plainodds.answers.population import Averages, Population, block_of, rest_of, slices
from plainodds.model.design.design import Coded, Column, Floats
from plainodds.model.design.split import Split, split
from plainodds.model.fitted import FittedModel
from plainodds.model.products import product, transposed_product

__all__ = [
    "Averager",
    "Exact",
    "averaged_own_slope",
    "averaged_probability",
    "averaged_slope",
    "row_probabilities",
]

# Numbers worked on at once, rows of a block times points, so that they stay in the cache.
_CACHED = 131_072


class Averager(Protocol):
    """What averages over a population: exactly, or by a sketch of it."""

    @property
    def population(self) -> Population:
        """The rows averaged over."""

    def probability(self, moved: Coded) -> Averages:
        """The average probability at J moved points."""

    def slope(self, name: str, moved: Coded) -> Averages:
        """The average of dπ/d(name) at J moved points."""


@dataclass(frozen=True, eq=False)
class Exact:
    """Averages over each and every row."""

    model: FittedModel
    population: Population

    def probability(self, moved: Coded) -> Averages:
        """The average probability at J moved points."""
        return averaged_probability(self.model, moved, self.population)

    def slope(self, name: str, moved: Coded) -> Averages:
        """The average of dπ/d(name) at J moved points."""
        return averaged_slope(self.model, name, moved, self.population)


def averaged_probability(model: FittedModel, moved: Coded, population: Population) -> Averages:
    """The average probability when every row is given the moved values.

    Parameters
    ----------
    model : FittedModel
    moved : mapping of name to coded array (J,)
        Point j gives every row the j-th value of each moved predictor.
    population : Population
        The rows averaged over.
    """
    parts = split(model.design, moved)
    if parts is None:
        return rebuilding.averaged_probability(model, rebuilding.setters(moved), population)
    own = parts.own_values(moved)
    strength = _strength(model, parts, own)
    total = np.zeros(len(own))
    gradient = np.zeros((parts.width, len(own)))
    for still, carried, weights in _blocks(model, parts, len(own), population):
        pi = _probability(still, strength)
        total += np.einsum("i,ij->j", weights, pi)
        np.subtract(pi, pi * pi, out=pi)
        gradient += transposed_product(carried, pi)
    rest, staying = _untangled(parts, gradient)
    return Averages(total, _assembled(parts, rest, own * staying))


def averaged_slope(model: FittedModel, name: str, moved: Coded, population: Population) -> Averages:
    """The average of dπ/d(name) when every row is given the moved values.

    Parameters
    ----------
    model : FittedModel
    name : str
        A number among the moved predictors.
    moved : mapping of name to coded array (J,)
    population : Population
    """
    parts = split(model.design, moved)
    if parts is None:
        return rebuilding.averaged_slope(model, name, rebuilding.setters(moved), population)
    own, own_slope = parts.own_values(moved), parts.own_derivatives(name, moved)
    strength = _strength(model, parts, own)
    slope_strength = _strength(model, parts, own_slope)
    slope_strength[-1] = 0.0
    total = np.zeros(len(own))
    gradient = np.zeros((parts.width, 2 * len(own)))
    for still, carried, weights in _blocks(model, parts, len(own), population):
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


def averaged_own_slope(
    model: FittedModel, name: str, moved: Coded, population: Population
) -> Averages:
    """The average of dπ/d(name) at each row's own value of it, with other predictors moved.

    Parameters
    ----------
    model : FittedModel
    name : str
        A number that is not among the moved predictors.
    moved : mapping of name to coded array (J,)
    population : Population
    """
    parts = split(model.design, moved)
    if parts is None:
        return rebuilding.averaged_slope(model, name, rebuilding.setters(moved), population)
    own = parts.own_values(moved)
    strength = _strength(model, parts, own)
    resting = [model.design.columns[i] for i in parts.resting]
    staying = [Column("", atoms) for atoms in parts.still]
    total = np.zeros(len(own))
    gradient = np.zeros((parts.width, len(own)))
    for block in slices(model.sample.rows, _size(len(own))):
        weights = population.weights[block]
        if not weights.any():
            continue
        held, still = _staying(model, parts, block)
        derivatives = model.design.derivatives_of(
            [*resting, *staying], name, block_of(model, block)
        )
        # what the rest of η gains, as last column beside what each product that stays gains
        rest_slope = np.einsum(
            "ij,j->i", derivatives[:, : len(resting)], model.coefficients[parts.resting]
        )
        still_slope = np.column_stack([derivatives[:, len(resting) :], rest_slope])
        pi = _probability(still, strength)
        sloping = (pi - pi * pi) * weights[:, None]
        curving = sloping * product(still_slope, strength)
        total += curving.sum(axis=0)
        curving *= 1 - 2 * pi
        carried = np.concatenate([held, still[:, :-1]], axis=1)
        gradient += transposed_product(carried, curving) + transposed_product(derivatives, sloping)
    rest, moving = _untangled(parts, gradient)
    return Averages(total, _assembled(parts, rest, own * moving))


def row_probabilities(model: FittedModel, moved: Coded) -> Iterator[tuple[slice, Floats]]:
    """Each row's probability at each point, block by block: (rows, J)."""
    parts = split(model.design, moved)
    if parts is None:
        yield from rebuilding.row_probabilities(model, rebuilding.setters(moved))
        return
    own = parts.own_values(moved)
    strength = _strength(model, parts, own)
    for block in slices(model.sample.rows, _size(len(own))):
        yield block, _probability(_staying(model, parts, block)[1], strength)


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
    model: FittedModel, parts: Split, points: int, population: Population
) -> Iterator[tuple[Floats, Floats, Floats]]:
    """What is needed of the rows, block by block; blocks that nobody is counted in are skipped.

    Yields what stays, with the rest of η as last column; what carries the gradient,
    the resting columns and what stays, weighted; and the weights.
    """
    for block in slices(model.sample.rows, _size(points)):
        weights = population.weights[block]
        if not weights.any():
            continue
        resting, still = _staying(model, parts, block)
        carried = np.concatenate([resting, still[:, :-1]], axis=1) * weights[:, None]
        yield still, carried, weights


def _staying(model: FittedModel, parts: Split, block: slice) -> tuple[Floats, Floats]:
    """The resting columns; and what stays, with the rest of η as last column."""
    X = model.sample.matrix[block]
    resting, staying = X[:, parts.resting], parts.still_rows(X, block_of(model, block))
    eta = np.einsum("ij,j->i", resting, model.coefficients[parts.resting])
    return resting, np.column_stack([staying, rest_of(model, eta, block)])


def _size(points: int) -> int:
    return max(256, _CACHED // points)


def _probability(still: Floats, strength: Floats) -> Floats:
    """1 / (1 + exp(−η)) of η = still @ strength, in one piece of memory."""
    pi = product(still, -strength)
    # past 709 exp overflows to infinity, and the probability is 0 to every digit
    with np.errstate(over="ignore"):
        np.exp(pi, out=pi)
    pi += 1.0
    return np.reciprocal(pi, out=pi)
