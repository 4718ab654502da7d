"""The variance that comes of having drawn the rows from a larger population.

An average θ̂ = Σ wᵢ θᵢ(β̂) varies because β̂ does, with the variance g'Vg, and because
other rows could have been drawn. Where the model is right, the two do not covary, and

    Var(θ̂) = g'Vg + Σ (wᵢ² / fᵢ) (θᵢ − θ̂)²

with wᵢ the normalised weights and fᵢ how many cases a row stands for. The sum is the
variance of a mean of independent rows; clusters in the sampling are not known here.
Source: Dowd, Greene & Norton 2014 (Health Serv Res 49:731); Terza 2016 (Stata J 16:38).
"""

from __future__ import annotations

from collections.abc import Callable, Iterable
from typing import Literal, TypeAlias

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.population import Population
from plainodds.errors import QuestionRefused
from plainodds.model.fitted import FittedModel

__all__ = ["Rows", "Sampling", "Spread", "drawn_covariance", "spread_of"]

Floats = NDArray[np.float64]
Rows: TypeAlias = Iterable[tuple[slice, Floats]]
"""Each row's own value of J quantities, block by block."""
Sampling: TypeAlias = Literal["fixed", "drawn"]
Spread: TypeAlias = Callable[[Rows, int], Floats]
"""Rows and J to the covariance of the J averages from drawing the rows, (J, J)."""


def spread_of(sample: Sampling, model: FittedModel, population: Population) -> Spread:
    """How the rows' having been drawn adds to a variance: not at all, or as above.

    Raises
    ------
    QuestionRefused
        If `sample` is neither "fixed" nor "drawn".
    """
    if sample == "fixed":
        # the rows are never looked at
        return lambda rows, quantities: np.zeros((quantities, quantities))
    if sample == "drawn":
        return lambda rows, quantities: drawn_covariance(model, rows, population)
    raise QuestionRefused(f"sample={sample!r}: choose 'fixed' or 'drawn'.")


def drawn_covariance(model: FittedModel, rows: Rows, population: Population) -> Floats:
    """Covariance of J averages from drawing the rows, shape (J, J).

    Parameters
    ----------
    model : FittedModel
    rows : iterable of (slice, array (rows, J))
        Each row's own value of each quantity, block by block.
    population : Population
        The rows averaged over.
    """
    weights = population.weights
    share = weights**2
    if model.sample.frequencies is not None:
        share = share / model.sample.frequencies
    first: Floats | float = 0.0
    second: Floats | float = 0.0
    mean: Floats | float = 0.0
    for block, values in rows:
        first = first + np.einsum("i,ij->j", share[block], values)
        second = second + np.einsum("i,ij,ik->jk", share[block], values, values)
        mean = mean + np.einsum("i,ij->j", weights[block], values)
    cross = np.multiply.outer(mean, first)
    total = float(share.sum())
    return np.asarray(second - cross - cross.T + total * np.multiply.outer(mean, mean))
