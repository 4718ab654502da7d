"""The three scales of a logit model: linear predictor, odds, probability.

    η = ln(π / (1 − π)),   odds = exp(η),   π = 1 / (1 + exp(−η))

Source: Agresti, Categorical Data Analysis. All functions are vectorised.
"""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike, NDArray

__all__ = [
    "linear_predictor_from_odds",
    "linear_predictor_from_probability",
    "odds_from_linear_predictor",
    "odds_from_probability",
    "probability_curvature",
    "probability_from_linear_predictor",
    "probability_from_odds",
    "probability_slope",
    "probability_third_derivative",
]

Floats = NDArray[np.float64]


def probability_from_linear_predictor(linear_predictor: ArrayLike) -> Floats:
    """π = 1 / (1 + exp(−η)), without overflow at either end.

    Examples
    --------
    >>> float(probability_from_linear_predictor(0.0))
    0.5
    """
    eta = np.asarray(linear_predictor, dtype=float)
    # exp of a negative number never overflows, and tiny chances keep their digits
    small = np.exp(-np.abs(eta))
    return np.asarray(np.where(eta >= 0, 1.0, small) / (1.0 + small))


def probability_slope(probability: ArrayLike) -> Floats:
    """dπ/dη = π(1 − π)."""
    pi = np.asarray(probability, dtype=float)
    return np.asarray(pi * (1.0 - pi))


def probability_curvature(probability: ArrayLike) -> Floats:
    """d²π/dη² = π(1 − π)(1 − 2π)."""
    pi = np.asarray(probability, dtype=float)
    return np.asarray(pi * (1.0 - pi) * (1.0 - 2.0 * pi))


def linear_predictor_from_probability(probability: ArrayLike) -> Floats:
    """η = ln(π / (1 − π)); −∞ at 0 and +∞ at 1."""
    pi = np.asarray(probability, dtype=float)
    with np.errstate(divide="ignore"):
        return np.asarray(np.log(pi) - np.log1p(-pi))


def probability_third_derivative(probability: ArrayLike) -> Floats:
    """d³π/dη³ = π(1 − π)(1 − 6π(1 − π))."""
    pi = np.asarray(probability, dtype=float)
    slope = pi * (1.0 - pi)
    return np.asarray(slope * (1.0 - 6.0 * slope))


def odds_from_linear_predictor(linear_predictor: ArrayLike) -> Floats:
    """odds = exp(η)."""
    with np.errstate(over="ignore"):
        return np.asarray(np.exp(np.asarray(linear_predictor, dtype=float)))


def linear_predictor_from_odds(odds: ArrayLike) -> Floats:
    """η = ln(odds)."""
    with np.errstate(divide="ignore"):
        return np.asarray(np.log(np.asarray(odds, dtype=float)))


def odds_from_probability(probability: ArrayLike) -> Floats:
    """odds = π / (1 − π)."""
    pi = np.asarray(probability, dtype=float)
    with np.errstate(divide="ignore"):
        return np.asarray(pi / (1.0 - pi))


def probability_from_odds(odds: ArrayLike) -> Floats:
    """π = odds / (1 + odds)."""
    ratio = np.asarray(odds, dtype=float)
    return np.asarray(ratio / (1.0 + ratio))
