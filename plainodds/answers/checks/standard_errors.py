"""Whether standard errors are there, and not absurd."""

from __future__ import annotations

import math
from typing import ClassVar

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.checks.columns import owners_of
from plainodds.answers.checks.finding import Concern, Evidence, Finding, Topic
from plainodds.model.fitted import FittedModel
from plainodds.model.products import transposed_product
from plainodds.values import value

__all__ = ["REASONS", "StandardErrorsEvidence", "WideCoefficient", "standard_errors_of"]

Floats = NDArray[np.float64]

REASONS = ("missing", "absurd")

# In log odds for one standard deviation of a column: an interval from 1/3,000 to 3,000 times
# the odds, and one for which there are no words. Common practice, no source.
_WIDE = 4.0
_ABSURD = 10.0


@value
class WideCoefficient:
    """A coefficient whose standard error says that it isn't known.

    Attributes
    ----------
    column : str
    predictors : tuple of str
    se : float
        nan where there is none.
    se_per_spread : float
        In log odds for a change of the column by one standard deviation.
    """

    column: str
    predictors: tuple[str, ...]
    se: float
    se_per_spread: float


@value
class StandardErrorsEvidence(Evidence):
    """The standard errors' sizes.

    Attributes
    ----------
    wide : tuple of WideCoefficient
    largest_per_spread : float
    """

    topic: ClassVar[Topic] = "standard errors"

    wide: tuple[WideCoefficient, ...]
    largest_per_spread: float


def standard_errors_of(model: FittedModel) -> Finding:
    """Whether every coefficient has a standard error, of a size that means something.

    A column counts as wide only if what its predictors add as a whole is wide too: x and x²
    may each be hardly known while the curve that they make together is known well.
    """
    without = model.record.without_standard_error
    if without:
        wide = tuple(
            WideCoefficient(column.name, owners_of(model, [place]), math.nan, math.nan)
            for place, column in enumerate(model.design.columns)
            if column.name in without
        )
        about = owners_of(
            model, [p for p, c in enumerate(model.design.columns) if c.name in without]
        )
        evidence = StandardErrorsEvidence(wide, math.nan)
        return Finding("standard errors", "don't explain yet", ("missing",), about, evidence)
    if model.covariance is None:
        return Finding("standard errors", "not known", unknown="no covariance")
    if not model.sample.rows:
        return Finding("standard errors", "not known", unknown="no rows")
    ses = np.sqrt(np.maximum(np.diag(model.covariance), 0.0))
    spread = _covariance_of_columns(model)
    per_spread = ses * np.sqrt(np.diag(spread))
    wide_places = [
        int(place)
        for place in np.flatnonzero(per_spread > _WIDE)
        if _joint(model, int(place), spread) > _WIDE
    ]
    wide_places.sort(key=lambda place: -per_spread[place])
    wide = tuple(
        WideCoefficient(
            model.design.columns[place].name,
            owners_of(model, [place]),
            float(ses[place]),
            float(per_spread[place]),
        )
        for place in wide_places
    )
    concern: Concern = "nothing found"
    if wide:
        concern = "don't explain yet" if wide[0].se_per_spread > _ABSURD else "keep in mind"
    return Finding(
        "standard errors",
        concern,
        ("absurd",) if wide else (),
        owners_of(model, wide_places),
        StandardErrorsEvidence(wide, float(per_spread.max(initial=0.0))),
    )


def _joint(model: FittedModel, place: int, spread: Floats) -> float:
    """The standard error of what a column's predictors add, in a typical row."""
    assert model.covariance is not None
    own = model.design.touched(model.design.variables_of(model.design.columns[place]))
    at = np.ix_(own, own)
    return math.sqrt(max(float(np.sum(model.covariance[at] * spread[at])), 0.0))


def _covariance_of_columns(model: FittedModel) -> Floats:
    """The columns' covariance over the rows, weighted as the fit weighs them."""
    sample = model.sample
    weights = np.ones(sample.rows) if sample.weights is None else sample.weights
    total = float(weights.sum())
    mean = np.einsum("i,ij->j", weights, sample.matrix) / total
    found = np.zeros((len(mean), len(mean)))
    for block in sample.blocks():
        X = sample.matrix[block] - mean
        found += transposed_product(X, X * weights[block, None])
    return found / total
