"""Whether a chance of 20 % comes true 20 times in 100."""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import ClassVar, Literal

import numpy as np
from numpy.typing import NDArray
from scipy.stats import norm

from plainodds.answers.checks.curvature import curvature
from plainodds.answers.checks.finding import CONCERNS, Concern, Evidence, Finding, Topic
from plainodds.answers.checks.fitted_rows import (
    FEWEST,
    FittedRows,
    fitted_rows,
    rows_are_strangers,
    unknown_rows,
)
from plainodds.answers.checks.refitting import Refit, refitted
from plainodds.answers.checks.shape import (
    Bin,
    bend_concern,
    bins_shown,
    largest_gap,
    partly_unknown,
)
from plainodds.answers.checks.smoothing import Binned, Smoother, binned, smoother_of, wilson
from plainodds.answers.estimate import Estimate
from plainodds.answers.kept import kept
from plainodds.model.fitted import FittedModel
from plainodds.values import value

__all__ = [
    "GROUPS",
    "REASONS",
    "CalibrationEvidence",
    "Optimism",
    "calibration_gap",
    "calibration_of",
    "grouped_by_chance",
]

Floats = NDArray[np.float64]

REASONS = ("curve", "optimism")

GROUPS = 10
"""Groups by fitted chance, as Hosmer & Lemeshow 1980 (Commun Stat A9:1043)."""

# A shrinkage of at least 0.9 is what samples are planned for (Riley et al. 2019, Stat Med
# 38:1276); 0.7 is common practice, no source.
_SLOPE, _SLOPE_HEAVY = 0.9, 0.7


@value
class Optimism:
    """How much better the fit looks on its own data than on others.

    Attributes
    ----------
    way : {"bootstrap", "cross-validation"}
    repeats : int
        Those that could be fitted.
    failed : int
        Those that could not.
    slope, brier, c : float
        Calibration slope, Brier score and c, corrected for optimism (Harrell, Lee & Mark
        1996).
    """

    way: Literal["bootstrap", "cross-validation"]
    repeats: int
    failed: int
    slope: float
    brier: float
    c: float


@value
class CalibrationEvidence(Evidence):
    """Fitted chances against what happened.

    Attributes
    ----------
    bins : tuple of Bin
        Groups by fitted chance.
    at, smoothed, lower, upper : tuple of float
        Smoothed share of events along the fitted chance, with a pointwise band.
    intercept, slope : Estimate
        Of the outcome's logit on the fitted η: the intercept with η as it is ("in the
        large"), the slope beside an intercept of its own. On the fit's own data a
        maximum-likelihood fit with an intercept has 0 and 1 exactly: then they only say
        something with optimism. nan where they do not exist.
    brier, brier_of_share : float
        Brier score, and that of the overall share for everyone.
    largest_gap : float
        Largest |smoothed − chance| within the middle 90 % of rows.
    optimism : Optimism or None
    """

    topic: ClassVar[Topic] = "calibration"

    bins: tuple[Bin, ...]
    at: tuple[float, ...]
    smoothed: tuple[float, ...]
    lower: tuple[float, ...]
    upper: tuple[float, ...]
    intercept: Estimate
    slope: Estimate
    brier: float
    brier_of_share: float
    largest_gap: float
    optimism: Optimism | None


@dataclass(frozen=True, eq=False)
class _Curve:
    """Fine bins of the fitted chance, and the smooth curve through them."""

    bins: Binned
    smoother: Smoother
    smoothed: Floats
    gap: float


def calibration_of(model: FittedModel, level: float, optimism: Optimism | None = None) -> Finding:
    """Fitted chances against what happened, in the sample.

    In a case-control sample, too, chances are those of the sample: whether the shifted ones
    hold in the population no row can tell.

    Parameters
    ----------
    model : FittedModel
    level : float
        Of the band and the intervals.
    optimism : Optimism or None
        What `optimism_of` found.
    """
    unknown = unknown_rows(model, FEWEST)
    if unknown:
        return Finding("calibration", "not known", unknown=unknown)
    rows, curve = fitted_rows(model), _curve(model)
    lower, upper = wilson(curve.smoothed, curve.smoother.worth, level)
    intercept, slope = _recalibrated(model, rows, level)
    w, y, pi = rows.weights, rows.outcome, rows.probability
    evidence = CalibrationEvidence(
        bins=bins_shown(grouped_by_chance(rows), level),
        at=tuple(curve.smoother.at.tolist()),
        smoothed=tuple(curve.smoothed.tolist()),
        lower=tuple(lower.tolist()),
        upper=tuple(upper.tolist()),
        intercept=intercept,
        slope=slope,
        brier=float(w @ (y * (1 - pi) ** 2 + (1 - y) * pi**2)) / float(w.sum()),
        brier_of_share=rows.share * (1 - rows.share),
        largest_gap=curve.gap,
        optimism=optimism,
    )
    bends = bend_concern(model, curvature(model).along_eta, curve.gap)
    shrinks = _optimism_concern(optimism)
    reasons = tuple(
        reason
        for reason, concern in zip(REASONS, (bends, shrinks), strict=True)
        if concern in ("keep in mind", "don't explain yet")
    )
    heavier = max(bends, shrinks, key=CONCERNS.index)
    return Finding("calibration", heavier, reasons, (), evidence, partly_unknown(model))


def calibration_gap(model: FittedModel) -> float:
    """Largest |smoothed share − chance| within the middle 90 % of rows."""
    return _curve(model).gap


def grouped_by_chance(rows: FittedRows) -> Binned:
    """Ten groups of about equally many cases; rows of one chance stay together."""
    order, starts = rows.ranked
    ends = np.append(starts[1:], len(order)) - 1
    pi = rows.probability[order]

    def total(each: Floats) -> Floats:
        return np.asarray(np.add.reduceat(each[order], starts))

    weights, cases, events = total(rows.weights), total(rows.cases), total(rows.events)
    observed, expected = total(rows.weights * rows.outcome), total(rows.weights * rows.probability)
    kept = (weights > 0) & (cases > 0)
    weights, expected = weights[kept], expected[kept] / weights[kept]
    single = Binned(
        low=pi[starts][kept],
        high=pi[ends][kept],
        centre=expected,
        cases=cases[kept],
        events=events[kept],
        observed=observed[kept] / weights,
        expected=expected,
        weights=weights,
    )
    return single.coarser(GROUPS)


@kept
def _curve(model: FittedModel) -> _Curve:
    rows = fitted_rows(model)
    bins = binned(rows.probability, rows)
    smoother = smoother_of(bins)
    smoothed = smoother.curve(bins.observed)
    # a local line through the chances themselves is the chance
    gap = largest_gap(bins, smoother, smoothed, smoother.curve(bins.expected))
    return _Curve(bins, smoother, smoothed, gap)


def _recalibrated(model: FittedModel, rows: FittedRows, level: float) -> tuple[Estimate, Estimate]:
    eta, ones = rows.linear_predictor, np.ones(len(rows.linear_predictor))
    large = refitted(ones[:, None], rows.outcome, rows.weights, np.zeros(1), eta)
    both = refitted(np.column_stack([ones, eta]), rows.outcome, rows.weights, np.array([0.0, 1.0]))
    strangers = rows_are_strangers(model)
    return _estimate(large, level, strangers), _estimate(both, level, strangers)


def _estimate(refit: Refit, level: float, strangers: bool) -> Estimate:
    """The last coefficient with its interval; η is taken as it is, without its own error."""
    if not refit.converged or refit.rank < len(refit.coefficients):
        return Estimate(math.nan, None, None, None)
    found = float(refit.coefficients[-1])
    if not strangers:
        return Estimate(found, None, None, None)
    se = math.sqrt(refit.covariance[-1, -1])
    reach = float(norm.ppf((1 + level) / 2)) * se
    return Estimate(found, se, found - reach, found + reach)


def _optimism_concern(optimism: Optimism | None) -> Concern:
    if optimism is None:
        return "nothing found"
    # where no resample could be fitted, the fit hangs by a few rows
    if math.isnan(optimism.slope) or optimism.slope >= _SLOPE:
        return "keep in mind" if not optimism.repeats else "nothing found"
    return "keep in mind" if optimism.slope >= _SLOPE_HEAVY else "don't explain yet"
