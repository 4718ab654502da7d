"""Small and repeated binomial fits by Newton's method, from a start that is nearly right."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.population import slices
from plainodds.model.products import product, transposed_product
from plainodds.scales import probability_from_linear_predictor

__all__ = ["Refit", "refitted"]

Floats = NDArray[np.float64]

_BLOCK = 65_536
# From nearby Newton's method takes about six steps. Where outcomes are separated each step
# gains a little for ever: that it is not done after so many tells it from a fit.
_STEPS = 15
_DONE = 1e-9
_HALVINGS = 12
_SINGULAR = 1e-13


@dataclass(frozen=True, eq=False)
class Refit:
    """Where Newton's method ended.

    Attributes
    ----------
    coefficients : array (k,)
    covariance : array (k, k)
        Inverse of the information there.
    rank : int
        Of the information: below k where columns follow from each other.
    deviance : float
    converged : bool
        False where it did not end, as with separated outcomes.
    """

    coefficients: Floats
    covariance: Floats
    rank: int
    deviance: float
    converged: bool


def refitted(
    X: Floats, outcome: Floats, weights: Floats, start: Floats, offset: Floats | None = None
) -> Refit:
    """Fit a binomial logit model.

    Parameters
    ----------
    X : array (n, k)
    outcome : array (n,)
        Share of events.
    weights : array (n,)
        Rows of weight 0 take no part.
    start : array (k,)
    offset : array (n,), optional
    """
    coefficients = start
    deviance, score, information = _parts(X, outcome, weights, coefficients, offset)
    inverse, rank = _inverted(information)
    for _ in range(_STEPS):
        step = inverse @ score
        # the decrement: twice what the deviance has yet to fall
        if not abs(float(score @ step)) > _DONE:
            return Refit(coefficients + step, inverse, rank, deviance, True)
        for _ in range(_HALVINGS):
            found = _parts(X, outcome, weights, coefficients + step, offset)
            if found[0] <= deviance * (1 + 1e-12):
                break
            step = step / 2
        coefficients = coefficients + step
        deviance, score, information = found
        inverse, rank = _inverted(information)
    return Refit(coefficients, inverse, rank, deviance, False)


def _parts(
    X: Floats, outcome: Floats, weights: Floats, coefficients: Floats, offset: Floats | None
) -> tuple[float, Floats, Floats]:
    """Deviance of single cases, score and information."""
    k = len(coefficients)
    deviance, score, information = 0.0, np.zeros(k), np.zeros((k, k))
    for block in slices(len(X), _BLOCK):
        rows, w, y = X[block], weights[block], outcome[block]
        eta = product(rows, coefficients[:, None])[:, 0]
        if offset is not None:
            eta += offset[block]
        pi = probability_from_linear_predictor(eta)
        # ln(1 + e^η) without overflow
        softplus = np.maximum(eta, 0.0) + np.log1p(np.exp(-np.abs(eta)))
        deviance += 2.0 * float(w @ (softplus - y * eta))
        score += (w * (y - pi)) @ rows
        information += transposed_product(rows, rows * (w * pi * (1 - pi))[:, None])
    return deviance, score, information


def _inverted(information: Floats) -> tuple[Floats, int]:
    length = np.sqrt(np.diag(information))
    length[length == 0] = 1.0
    # scaled, so that the units of the columns are no matter
    values, vectors = np.linalg.eigh(information / np.outer(length, length))
    kept = values > _SINGULAR * values[-1]
    along = vectors[:, kept] / length[:, None]
    return np.asarray(along / values[kept] @ along.T), int(kept.sum())
