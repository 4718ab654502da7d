"""Two probabilities compared: difference, ratios and number needed, by one joint delta method.

Ratios have their intervals on the log scale, the difference on its own. Sources:
Localio, Margolis & Berlin 2007 (J Clin Epidemiol 60:874); Altman 1998 (BMJ 317:1309)
for the number needed.
"""

from __future__ import annotations

import math
from dataclasses import replace

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.delta import Intervals, mapped, wald
from plainodds.answers.estimate import Estimate
from plainodds.model.fitted import FittedModel
from plainodds.scales import linear_predictor_from_probability, probability_slope
from plainodds.values import value

__all__ = ["Comparison", "NumberNeeded", "compared", "number_needed"]

Floats = NDArray[np.float64]


@value
class Comparison:
    """One chance compared with another.

    Attributes
    ----------
    odds_ratio, risk_difference, risk_ratio : Estimate
        By one joint delta method; ratios on the log scale.
    """

    odds_ratio: Estimate
    risk_difference: Estimate
    risk_ratio: Estimate


@value
class NumberNeeded:
    """How many cases must change for one event more, or one fewer.

    Attributes
    ----------
    estimate : float
        1 / |risk difference|; infinite where there is no difference.
    more : bool
        Whether the estimate is of events more (else fewer).
    for_one_more, for_one_fewer : (float, float) or None
        The interval's pieces. Where the risk difference's interval includes 0 there are
        two, and each runs to infinity: from so many for one more, through infinity, to so
        many for one fewer. Both None where there is no interval.
    """

    estimate: float
    more: bool
    for_one_more: tuple[float, float] | None
    for_one_fewer: tuple[float, float] | None


def compared(
    model: FittedModel,
    probability: Floats,
    gradient: Floats,
    level: float,
    drawn: Floats | None = None,
) -> Comparison:
    """Compare the second of two probabilities with the first.

    Parameters
    ----------
    model : FittedModel
    probability : array (2,)
    gradient : array (2, k)
    level : float
    drawn : array (2, 2), optional
        Covariance from having drawn the rows.
    """
    pi = probability
    logit = linear_predictor_from_probability(pi)
    with np.errstate(divide="ignore"):
        logs = np.log(pi)
        by_log, by_logit = 1.0 / pi, 1.0 / probability_slope(pi)
    difference = _difference(model, pi, np.ones(2), gradient, level, drawn)
    risk_ratio = _difference(model, logs, by_log, gradient, level, drawn)
    odds_ratio = _difference(model, logit, by_logit, gradient, level, drawn)
    return Comparison(
        odds_ratio=mapped(odds_ratio, np.exp, np.exp).at(0),
        risk_difference=_possible(difference.at(0)),
        risk_ratio=mapped(risk_ratio, np.exp, np.exp).at(0),
    )


def _possible(difference: Estimate) -> Estimate:
    """A Wald interval's ends where a difference of two chances can be: within −1 and 1."""
    if difference.lower is None or difference.upper is None:
        return difference
    return replace(difference, lower=max(difference.lower, -1.0), upper=min(difference.upper, 1.0))


def _difference(
    model: FittedModel,
    transformed: Floats,
    slope: Floats,
    gradient: Floats,
    level: float,
    drawn: Floats | None,
) -> Intervals:
    """The difference of two transformed probabilities."""
    contrast = np.array([-slope[0], slope[1]])
    extra = None if drawn is None else np.array([contrast @ drawn @ contrast])
    moved = contrast @ gradient
    return wald(model, transformed[1:] - transformed[:1], moved[None], level, extra)


def number_needed(risk_difference: Estimate) -> NumberNeeded:
    """The number needed and its interval, in two pieces where 0 is within the difference's.

    Source: Altman 1998 (BMJ 317:1309).
    """
    estimate = _inverse(abs(risk_difference.estimate))
    more = risk_difference.estimate > 0
    lower, upper = risk_difference.lower, risk_difference.upper
    if lower is None or upper is None:
        return NumberNeeded(estimate, more, None, None)
    for_more = (_inverse(upper), _inverse(max(lower, 0.0))) if upper > 0 else None
    for_fewer = (_inverse(-lower), _inverse(max(-upper, 0.0))) if lower < 0 else None
    return NumberNeeded(estimate, more, for_more, for_fewer)


def _inverse(difference: float) -> float:
    return math.inf if difference <= 0 else 1.0 / difference
