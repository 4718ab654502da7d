"""Chances with their intervals, which stay within 0 and 1."""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.delta import Intervals, mapped, wald
from plainodds.answers.population import Averages
from plainodds.model.fitted import FittedModel
from plainodds.scales import (
    linear_predictor_from_probability,
    probability_from_linear_predictor,
    probability_slope,
)

__all__ = ["chances"]

Floats = NDArray[np.float64]


def chances(
    model: FittedModel, averages: Averages, level: float, drawn: Floats | None = None
) -> Intervals:
    """Probabilities with intervals on the logit of each, so that they stay within 0 and 1.

    Parameters
    ----------
    model : FittedModel
    averages : Averages
        J probabilities with their gradients, averaged or held.
    level : float
    drawn : array (J, J), optional
        Covariance from having drawn the rows.
    """
    pi = averages.value
    with np.errstate(divide="ignore", invalid="ignore"):
        by_logit = 1.0 / probability_slope(pi)
    extra = None if drawn is None else by_logit**2 * np.diag(drawn)
    eta = linear_predictor_from_probability(pi)
    return mapped(
        wald(model, eta, by_logit[:, None] * averages.gradient, level, extra),
        probability_from_linear_predictor,
        lambda x: probability_slope(probability_from_linear_predictor(x)),
    )
