"""What every check needs of the rows that a fit used, computed once for each model."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.checks.finding import Unknown
from plainodds.answers.kept import kept
from plainodds.model.fitted import FittedModel
from plainodds.scales import probability_from_linear_predictor

__all__ = [
    "FEWEST",
    "FittedRows",
    "fitted_rows",
    "has_score_tests",
    "ranked",
    "rows_are_strangers",
    "unknown_rows",
]

Floats = NDArray[np.float64]

FEWEST = 5
"""Cases of the rarer outcome below which no curve is drawn; common practice, no source."""

# Rows of one covariate pattern may differ in the last digits of η.
_SAME = 1e-12


@dataclass(frozen=True, eq=False)
class FittedRows:
    """The rows with what the fit says of each; chances are those of the sample.

    Attributes
    ----------
    linear_predictor : array (n,)
        η with the row's own offset, without an intercept shift for the population.
    probability, outcome : array (n,)
        Chance and share of events.
    cases : array (n,)
        How many cases a row stands for.
    weights : array (n,)
        What the fit weighed the row by: cases times variance weight. The same array as
        `cases` where there are no variance weights.
    """

    linear_predictor: Floats
    probability: Floats
    outcome: Floats
    cases: Floats
    weights: Floats

    @property
    def events(self) -> Floats:
        """Cases with the event in each row."""
        return self.cases * self.outcome

    @property
    def rarer(self) -> float:
        """Cases of the rarer outcome."""
        events = float(self.cases @ self.outcome)
        return min(events, float(self.cases.sum()) - events)

    @property
    def share(self) -> float:
        """Share of events, by the fit's weights."""
        return float(self.weights @ self.outcome) / float(self.weights.sum())

    @property
    def residual(self) -> Floats:
        """Weighted outcome − probability: what a row adds to the score of a column of ones."""
        return self.weights * (self.outcome - self.probability)

    @cached_property
    def ranked(self) -> tuple[NDArray[np.intp], NDArray[np.intp]]:
        """Rows in order of η, and where in that order each distinct η begins."""
        return ranked(self.linear_predictor)


def ranked(values: Floats) -> tuple[NDArray[np.intp], NDArray[np.intp]]:
    """The order of values, and where in that order each distinct value begins."""
    order = np.argsort(values)
    ordered = values[order]
    new = np.diff(ordered) > _SAME * (1 + np.abs(ordered[1:]))
    return order, np.concatenate([[0], np.nonzero(new)[0] + 1])


@kept
def fitted_rows(model: FittedModel) -> FittedRows:
    """What the fit says of each of its rows, in one pass.

    Raises
    ------
    ValueError
        Where `unknown_rows` says why there is nothing.
    """
    sample = model.sample
    if sample.outcome is None:
        raise ValueError("the outcome is not known")
    eta = np.empty(sample.rows)
    for block in sample.blocks():
        eta[block] = np.einsum("ij,j->i", sample.matrix[block], model.coefficients)
    if sample.offset is not None:
        eta += sample.offset
    outcome = sample.outcome
    weights = np.ones(sample.rows) if sample.weights is None else sample.weights
    cases = np.ones(sample.rows) if sample.cases is None else sample.cases
    if np.array_equal(cases, weights):
        cases = weights
    return FittedRows(eta, probability_from_linear_predictor(eta), outcome, cases, weights)


def unknown_rows(model: FittedModel, fewest: float = 0.0) -> Unknown:
    """Why nothing can be said that takes rows and their outcome; empty where it can.

    Parameters
    ----------
    model : FittedModel
    fewest : float
        Cases of the rarer outcome that it takes.
    """
    if not model.sample.rows:
        return "no rows"
    if model.sample.outcome is None:
        return "no outcome"
    return "too few rows" if fitted_rows(model).rarer < fewest else ""


def rows_are_strangers(model: FittedModel) -> bool:
    """Whether rows count as independent cases with binomial variance.

    With a heteroscedasticity-consistent covariance single cases still do: where chances are
    right, so is a binomial variance. Counts and weights then don't: that covariance may be
    there because cases of one row belong together, or weights count no cases.
    """
    kind = model.subject.covariance_kind
    single = kind.startswith("HC") and model.sample.weights is None
    return not model.no_likelihood or kind == "none" or single


def has_score_tests(model: FittedModel) -> bool:
    """Whether the score of added columns has its usual distribution.

    A penalised fit is not where the score is 0.
    """
    return rows_are_strangers(model) and model.subject.covariance_kind != "none"
