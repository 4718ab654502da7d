"""Whether the model bends where the data bend, along each number."""

from __future__ import annotations

from typing import ClassVar

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.checks.curvature import curvature
from plainodds.answers.checks.finding import Concern, Evidence, Finding, Topic, Unknown
from plainodds.answers.checks.fitted_rows import FEWEST, fitted_rows, has_score_tests, unknown_rows
from plainodds.answers.checks.score_tests import ScoreTest
from plainodds.answers.checks.smoothing import Binned, Smoother, smoother_of, wilson
from plainodds.model.fitted import FittedModel
from plainodds.values import value

__all__ = [
    "REASONS",
    "Bin",
    "ShapeEvidence",
    "bend_concern",
    "bins_shown",
    "gap_that_matters",
    "largest_gap",
    "partly_unknown",
    "shape_of",
]

Floats = NDArray[np.float64]

REASONS = ("bends",)

# Common practice, no source, both: 5 % for each number of a model would cry wolf in every
# second one, and in a large sample bends are found that change no explanation. 3 points is
# what a rounded sentence shows; where the event is rarer, a quarter of its share is.
_P_VALUE, _GAP, _SHARE = 0.01, 0.03, 0.25
_P_VALUE_HEAVY, _GAP_HEAVY, _SHARE_HEAVY = 0.001, 0.10, 0.5


@value
class Bin:
    """Rows of neighbouring values, model against data.

    Attributes
    ----------
    low, high, centre : float
        Of the predictor (or of the fitted chance).
    cases, events : float
    observed, expected : float
        Shares of events in the data and by the model.
    lower, upper : float
        Interval of the observed share (Wilson).
    """

    low: float
    high: float
    centre: float
    cases: float
    events: float
    observed: float
    expected: float
    lower: float
    upper: float


@value
class ShapeEvidence(Evidence):
    """Model against data along one number.

    Attributes
    ----------
    predictor : str
    bins : tuple of Bin
        Of about equally many rows.
    at : tuple of float
    observed, lower, upper : tuple of float
        Smoothed share of events with a pointwise band.
    expected : tuple of float
        The model's chances, smoothed in the same way.
    statistic : float
        χ² of a score test for curvature added on the logit scale (restricted cubic spline
        in place of, or added to, the model's own shape).
    degrees_of_freedom : int
    p_value : float
    largest_gap : float
        Largest |observed − expected| of the smoothed curves within the middle 90 % of rows.
    """

    topic: ClassVar[Topic] = "shape"

    predictor: str
    bins: tuple[Bin, ...]
    at: tuple[float, ...]
    observed: tuple[float, ...]
    lower: tuple[float, ...]
    upper: tuple[float, ...]
    expected: tuple[float, ...]
    statistic: float
    degrees_of_freedom: int
    p_value: float
    largest_gap: float


def shape_of(model: FittedModel, level: float) -> tuple[Finding, ...]:
    """Model against data along each predictor that takes more than two numbers.

    Parameters
    ----------
    model : FittedModel
    level : float
        Of the band and the bins' intervals.
    """
    numbers = [facts.name for facts in model.subject.predictors if facts.is_number]
    unknown = unknown_rows(model, FEWEST)
    if unknown:
        return tuple(
            Finding("shape", "not known", about=(name,), unknown=unknown) for name in numbers
        )
    return tuple(_along(model, name, level) for name in curvature(model).bins)


def _along(model: FittedModel, name: str, level: float) -> Finding:
    found = curvature(model)
    bins, by_level = found.bins[name], name in found.by_level
    tested = has_score_tests(model)
    test = found.along[name] if tested else ScoreTest(np.nan, 0, np.nan)
    smoother = smoother_of(bins, by_level)
    observed, expected = smoother.curve(bins.observed), smoother.curve(bins.expected)
    lower, upper = wilson(observed, smoother.worth, level)
    gap = largest_gap(bins, smoother, observed, expected)
    concern = bend_concern(model, test, gap)
    return Finding(
        "shape",
        concern,
        reasons=("bends",) if concern in ("keep in mind", "don't explain yet") else (),
        about=(name,),
        evidence=ShapeEvidence(
            predictor=name,
            bins=bins_shown(bins if by_level else bins.coarser(_how_many(bins)), level),
            at=_plain(smoother.at),
            observed=_plain(observed),
            lower=_plain(lower),
            upper=_plain(upper),
            expected=_plain(expected),
            statistic=test.statistic,
            degrees_of_freedom=test.degrees_of_freedom,
            p_value=test.p_value,
            largest_gap=gap,
        ),
        unknown=partly_unknown(model),
    )


def bend_concern(model: FittedModel, test: ScoreTest, gap: float) -> Concern:
    """What a bend weighs: it has to be more than chance, and large enough to matter."""
    rows = fitted_rows(model)
    if gap <= gap_that_matters(rows.share):
        return "nothing found"
    if not has_score_tests(model):
        return "not known"
    # nan where the model leaves nothing to bend
    if not test.p_value < _P_VALUE:
        return "nothing found"
    heavy = min(_GAP_HEAVY, _SHARE_HEAVY * min(rows.share, 1 - rows.share))
    return "don't explain yet" if test.p_value < _P_VALUE_HEAVY and gap > heavy else "keep in mind"


def partly_unknown(model: FittedModel) -> Unknown:
    """Why not everything can be known of shares and their test; empty where it can."""
    if model.subject.sampling == "case-control":
        return "rows chosen by outcome"
    return "" if has_score_tests(model) else "no likelihood"


def gap_that_matters(share: float) -> float:
    """How far a chance may be off before an explanation is wrong, where the share is this."""
    return min(_GAP, _SHARE * min(share, 1 - share))


def largest_gap(bins: Binned, smoother: Smoother, one: Floats, other: Floats) -> float:
    """Largest difference of two smooth curves within the middle 90 % of cases."""
    low, high = bins.middle
    within = (smoother.at >= low) & (smoother.at <= high)
    if not within.any():
        within = np.ones_like(within)
    return float(np.abs(one - other)[within].max())


def bins_shown(bins: Binned, level: float) -> tuple[Bin, ...]:
    """Bins as values, with Wilson intervals."""
    lower, upper = wilson(bins.observed, bins.cases, level)
    columns = np.column_stack(
        [
            bins.low,
            bins.high,
            bins.centre,
            bins.cases,
            bins.events,
            bins.observed,
            bins.expected,
            lower,
            upper,
        ]
    )
    return tuple(Bin(*each) for each in columns.tolist())


def _how_many(bins: Binned) -> int:
    return int(np.clip(bins.cases.sum() / 50, 10, 20))


def _plain(curve: Floats) -> tuple[float, ...]:
    return tuple(curve.tolist())
