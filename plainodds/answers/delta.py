"""The delta method and Wald intervals, in one place.

A function of the coefficients with gradient g has variance g'Vg, V being the
result's own covariance. Source: Agresti, Categorical Data Analysis, ch. 16.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from functools import lru_cache

import numpy as np
from numpy.typing import NDArray
from scipy.stats import norm, t

from plainodds.answers.estimate import Estimate
from plainodds.errors import QuestionRefused
from plainodds.model.fitted import FittedModel

__all__ = ["Intervals", "checked_level", "interval_factor", "mapped", "p_values", "wald"]

Floats = NDArray[np.float64]


@dataclass(frozen=True, eq=False)
class Intervals:
    """Estimates with standard errors and intervals, as arrays of one shape (m,).

    `se`, `lower` and `upper` are None where the fit has no covariance.
    """

    estimate: Floats
    se: Floats | None
    lower: Floats | None
    upper: Floats | None

    def at(self, position: int) -> Estimate:
        """One of them as a value."""
        if self.se is None or self.lower is None or self.upper is None:
            return Estimate(float(self.estimate[position]), None, None, None)
        return Estimate(
            float(self.estimate[position]),
            float(self.se[position]),
            float(self.lower[position]),
            float(self.upper[position]),
        )


def checked_level(level: float) -> float:
    """A confidence level between 0 and 1.

    Raises
    ------
    QuestionRefused
    """
    if isinstance(level, bool) or not isinstance(level, int | float) or not 0 < level < 1:
        raise QuestionRefused(f"level={level!r}: a confidence level lies between 0 and 1, as 0.95.")
    return float(level)


def interval_factor(model: FittedModel, level: float) -> float:
    """How many standard errors an interval reaches: normal, or t where the result uses it."""
    return _quantile((1 + level) / 2, model.degrees_of_freedom)


@lru_cache
def _quantile(share: float, degrees_of_freedom: float | None) -> float:
    if degrees_of_freedom is None:
        return float(norm.ppf(share))
    return float(t.ppf(share, degrees_of_freedom))


def wald(
    model: FittedModel,
    estimate: Floats,
    gradients: Floats,
    level: float,
    extra: Floats | None = None,
) -> Intervals:
    """Wald intervals on the scale of the estimate.

    Parameters
    ----------
    model : FittedModel
    estimate : array (m,)
    gradients : array (m, k)
        Derivatives of each estimate with respect to the coefficients.
    level : float
    extra : array (m,), optional
        Variance from another source than the coefficients, to be added.

    Returns
    -------
    Intervals
        nan, all of it, for a quantity that the rows leave open: in a fit whose columns
        follow from each other, or of a combination that no row has.
    """
    estimate = np.asarray(estimate, dtype=float)
    if model.covariance is None:
        return Intervals(estimate, None, None, None)
    variance = np.einsum("ij,ij->i", gradients @ model.covariance, gradients)
    if extra is not None:
        variance = variance + extra
    # rounding can leave a variance of zero a hair below it
    se = np.sqrt(np.maximum(variance, 0.0))
    left_open = model.leaves_open(gradients)
    if left_open.any():
        # a generalised inverse gives a figure and an interval there; neither means anything
        estimate, se = np.where(left_open, np.nan, estimate), np.where(left_open, np.nan, se)
    reach = interval_factor(model, level) * se
    return Intervals(estimate, se, estimate - reach, estimate + reach)


def mapped(
    intervals: Intervals,
    function: Callable[[Floats], Floats],
    slope: Callable[[Floats], Floats],
) -> Intervals:
    """Carry estimates and interval ends over to another scale by an increasing function.

    Parameters
    ----------
    intervals : Intervals
    function : callable
        The increasing function.
    slope : callable
        Its derivative as a function of the original estimate, for the standard error.
    """
    with np.errstate(over="ignore", invalid="ignore"):
        estimate = function(intervals.estimate)
        if intervals.se is None or intervals.lower is None or intervals.upper is None:
            return Intervals(estimate, None, None, None)
        return Intervals(
            estimate,
            intervals.se * slope(intervals.estimate),
            function(intervals.lower),
            function(intervals.upper),
        )


def p_values(model: FittedModel, intervals: Intervals) -> tuple[float | None, ...]:
    """Two-sided Wald tests of 0; None where there is no standard error."""
    if intervals.se is None:
        return (None,) * len(intervals.estimate)
    with np.errstate(divide="ignore", invalid="ignore"):
        z = np.abs(intervals.estimate / intervals.se)
    freedom = model.degrees_of_freedom
    tails = 2 * (norm.sf(z) if freedom is None else t.sf(z, freedom))
    return tuple(None if np.isnan(p) else float(p) for p in tails)
