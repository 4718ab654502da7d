"""Where the likelihood stands at the fit's coefficients: slope, curvature, what is left to go."""

from __future__ import annotations

import math
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.kept import kept
from plainodds.model.fitted import FittedModel
from plainodds.model.products import product, transposed_product
from plainodds.scales import probability_from_linear_predictor

__all__ = ["Optimum", "optimum_of"]

Floats = NDArray[np.float64]

# of the information scaled to a diagonal of ones: below it, inverting loses too many digits
_SMALLEST_EIGENVALUE = 1e-9
# the proof needs a product below 1; half of it is left to rounding
_PROVED = 0.5


@dataclass(frozen=True, eq=False)
class Optimum:
    """The likelihood at the fit's coefficients.

    Attributes
    ----------
    score : array (k,)
    information : array (k, k)
        X'WX, whatever covariance the result carries.
    inverse : array (k, k) or None
        None where the information can't be inverted with confidence.
    step : array (k,)
        What one more Newton iteration would add to each coefficient, in standard errors;
        where the information is nearly singular, as far as it can be told.
    overlap : bool
        Whether it is proved that every coefficient has a finite estimate; False says
        nothing.
    """

    score: Floats
    information: Floats
    inverse: Floats | None
    step: Floats
    overlap: bool


@kept
def optimum_of(model: FittedModel) -> Optimum | None:
    """The likelihood at the fit's coefficients; None without rows or outcome.

    Overlap is proved by what the curvature cannot do. Along a line η moves by tx'd, and
    with M the largest |x'd| among the rows, the curvature g'' of minus the log likelihood
    falls no faster than exp(−Mt), since |g'''| ≤ M g'' (Bach 2010, Electronic Journal of
    Statistics 4:384). So g' rises by at least g''(0)/M in the end. Where in every direction
    that is more than the slope's size now, minus the log likelihood rises at last whichever
    way one goes, and has a finite minimum. With the slope measured by Newton's decrement
    ν = √(s'H⁻¹s) and rows by R² = max x'H⁻¹x, νR < 1 is enough.
    """
    sample = model.sample
    if sample.outcome is None or not sample.rows:
        return None
    k = len(model.coefficients)
    score, information, largest = np.zeros(k), np.zeros((k, k)), np.zeros(k)
    for block in sample.blocks():
        X, outcome = sample.matrix[block], sample.outcome[block]
        eta = np.einsum("ij,j->i", X, model.coefficients)
        if sample.offset is not None:
            eta = eta + sample.offset[block]
        weights = 1.0 if sample.weights is None else sample.weights[block]
        chance, other = (probability_from_linear_predictor(each) for each in (eta, -eta))
        # both tails keep their digits, so that slope and curvature of a run-away fit agree
        residual = weights * (outcome * other - (1.0 - outcome) * chance)
        score += np.einsum("i,ij->j", residual, X)
        information += transposed_product(X, X * (weights * chance * other)[:, None])
        largest = np.maximum(largest, np.abs(X).max(axis=0))
    inverse, step = _inverted(information), _step(information, score)
    overlap = inverse is not None and _overlaps(model, score, inverse, largest)
    return Optimum(score, information, inverse, step, overlap)


def _inverted(information: Floats) -> Floats | None:
    diagonal = np.diag(information)
    if not (np.isfinite(information).all() and (diagonal > 0).all()):
        return None
    scales = np.sqrt(diagonal)
    values, vectors = np.linalg.eigh(information / np.outer(scales, scales))
    if values[0] < _SMALLEST_EIGENVALUE:
        return None
    return np.asarray((vectors / values) @ vectors.T / np.outer(scales, scales))


def _step(information: Floats, score: Floats) -> Floats:
    scales = np.sqrt(np.diag(information))
    scales = np.where(scales > 0, scales, 1.0)
    scaled = information / np.outer(scales, scales)
    if not np.isfinite(scaled).all():
        return np.full(len(score), math.nan)
    inverse = np.linalg.pinv(scaled, rcond=1e-12, hermitian=True)
    variances = np.diag(inverse)
    with np.errstate(divide="ignore", invalid="ignore"):
        steps = inverse @ (score / scales) / np.sqrt(variances)
    return np.asarray(np.where(variances > 0, steps, math.nan))


def _overlaps(model: FittedModel, score: Floats, inverse: Floats, largest: Floats) -> bool:
    decrement = math.sqrt(max(float(score @ inverse @ score), 0.0))
    # x'H⁻¹x is at most (Σ |x| se)²: mostly enough, and free
    if decrement * float(largest @ np.sqrt(np.diag(inverse))) < _PROVED:
        return True
    reach = 0.0
    for block in model.sample.blocks():
        X = model.sample.matrix[block]
        lengths = np.einsum("ij,ij->i", product(X, inverse), X)
        if model.sample.weights is not None:
            lengths = lengths[model.sample.weights[block] > 0]
        reach = max(reach, float(lengths.max(initial=0.0)))
    return decrement * math.sqrt(reach) < _PROVED
