"""What a fit would be without one of its covariate patterns: at once, by a step, by a refit."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property

import numpy as np
from numpy.typing import NDArray
from scipy.special import xlogy

from plainodds.answers.checks.fitted_rows import fitted_rows
from plainodds.answers.optimum import optimum_of
from plainodds.answers.recession import recession_of
from plainodds.model.fitted import FittedModel
from plainodds.model.patterns import patterns_of
from plainodds.model.products import product, transposed_product
from plainodds.scales import probability_from_linear_predictor, probability_slope

__all__ = ["LeavingOut", "Measures", "leaving_out"]

Floats = NDArray[np.float64]

# 1 − leverage below which a pattern alone carries a coefficient, and cannot be left out.
_ALONE = 1e-8
# Eigenvalue of the information, scaled to a diagonal of ones, below which there is nothing.
_NOTHING = 1e-10
# Numbers worked on at once, so that they stay in the processor's cache.
_CACHED = 131_072
# A refit's steps with the known information, then with its own; the change of η that ends it, and
# that after which it goes nowhere, as where a pattern's outcome kept a coefficient finite.
_QUICK_STEPS = 6
_NEWTON_STEPS = 8
_STEPS = 20
_SETTLED = 1e-7
_RUNS_AWAY = 0.5


@dataclass(frozen=True, eq=False)
class Measures:
    """Pregibon's measures, one for each covariate pattern.

    Attributes
    ----------
    residual : array (p,)
        Weighted events − expected events.
    leverage : array (p,)
        h = m π(1−π) x'(X'WX)⁻¹x.
    delta_chi2 : array (p,)
        By how much X² falls without the pattern: r²/(1−h), r the Pearson residual.
    delta_deviance : array (p,)
        By how much the deviance falls: d² + r²h/(1−h), d the deviance residual.
    delta_beta : array (p,)
        How far the coefficients move, in their own covariance: r²h/(1−h)². It is the
        square of the largest move that any contrast makes, in standard errors.
    alone : array (p,) of bool
        Patterns that alone carry a coefficient: without them there is none. Their
        measures are 0.
    """

    residual: Floats
    leverage: Floats
    delta_chi2: Floats
    delta_deviance: Floats
    delta_beta: Floats
    alone: NDArray[np.bool_]


@dataclass(frozen=True, eq=False)
class LeavingOut:
    """A fit by covariate patterns, of which any one may be left out.

    Attributes
    ----------
    X : array (p, k)
    weights, events : array (p,)
        Sums of the fit's weights, and of weights times outcome; 0 for patterns whose
        outcome is told without fail, which have no say in what has a finite estimate.
    offset : array (p,) or float
    probability : array (p,)
    coefficients : array (k,)
    inverse : array (k, k)
        (X'WX)⁻¹.
    """

    X: Floats
    weights: Floats
    events: Floats
    offset: Floats | float
    probability: Floats
    coefficients: Floats
    inverse: Floats

    @cached_property
    def variance(self) -> Floats:
        """Of each pattern's weighted events: m π(1−π)."""
        return self.weights * probability_slope(self.probability)

    @cached_property
    def measures(self) -> Measures:
        """Leverage and what leaving each pattern out does; source: Pregibon 1981.

        As Hosmer, Lemeshow & Sturdivant define them for covariate patterns (Applied
        Logistic Regression, ch. 5).
        """
        leverage = np.empty(len(self.X))
        size = max(256, _CACHED // self.X.shape[1])
        for block in (slice(at, at + size) for at in range(0, len(self.X), size)):
            X = self.X[block]
            leverage[block] = np.einsum("ij,ij->i", product(X, self.inverse), X)
        leverage *= self.variance
        alone = 1.0 - leverage < _ALONE
        spare = np.where(alone, 1.0, 1.0 - leverage)
        expected = self.weights * self.probability
        residual = self.events - expected
        others = self.weights - self.events
        with np.errstate(divide="ignore", invalid="ignore"):
            r2 = np.where(self.variance > 0, residual**2 / self.variance, 0.0)
            d2 = 2 * (
                xlogy(self.events, self.events / expected)
                + xlogy(others, others / (self.weights - expected))
            )
        d2 = np.where(np.isfinite(d2), np.maximum(d2, 0.0), 0.0)
        r2, d2 = np.where(alone, 0.0, r2), np.where(alone, 0.0, d2)
        return Measures(
            residual=residual,
            leverage=np.minimum(leverage, 1.0),
            delta_chi2=r2 / spare,
            delta_deviance=d2 + r2 * leverage / spare,
            delta_beta=r2 * leverage / spare**2,
            alone=alone,
        )

    def steps(self, patterns: NDArray[np.intp]) -> Floats:
        """How the coefficients move when each of some patterns is left out, (len, k).

        One Newton step: −(X'WX)⁻¹ x (y − mπ)/(1−h).
        """
        held = self.measures
        scale = held.residual[patterns] / (1.0 - held.leverage[patterns])
        return -product(self.X[patterns], self.inverse) * scale[:, None]

    def refitted(self, pattern: int) -> Floats | None:
        """Coefficients of the fit without a pattern; None where there is no such fit.

        Newton's method from the single step; first with the information that is known
        (Sherman & Morrison 1950 take one pattern out of its inverse), which is enough
        where little moves, then with the information at the point reached.
        """
        weights, events = self.weights.copy(), self.events.copy()
        weights[pattern] = events[pattern] = 0.0
        along = self.inverse @ self.X[pattern]
        spare = 1.0 - self.measures.leverage[pattern]
        inverse = self.inverse + np.outer(along, along) * self.variance[pattern] / spare
        coefficients: Floats = self.coefficients + self.steps(np.array([pattern]))[0]
        eta = self._linear_predictor(coefficients)
        for done in range(_STEPS):
            pi = probability_from_linear_predictor(eta)
            if done >= _QUICK_STEPS:
                inverse = _inverse(self.X, weights * probability_slope(pi))
            coefficients = coefficients + inverse @ np.einsum(
                "i,ij->j", events - weights * pi, self.X
            )
            before, eta = eta, self._linear_predictor(coefficients)
            moved = float(np.abs(eta - before).max())
            if not np.isfinite(moved) or (
                done > _QUICK_STEPS + _NEWTON_STEPS and moved > _RUNS_AWAY
            ):
                return None
            if moved < _SETTLED:
                return coefficients
        return None

    def inverse_without(self, pattern: int, coefficients: Floats) -> Floats:
        """(X'WX)⁻¹ without a pattern, at the coefficients of that fit."""
        pi = probability_from_linear_predictor(self._linear_predictor(coefficients))
        variance = self.weights * probability_slope(pi)
        variance[pattern] = 0.0
        return _inverse(self.X, variance)

    def _linear_predictor(self, coefficients: Floats) -> Floats:
        return np.asarray(np.einsum("ij,j->i", self.X, coefficients) + self.offset)


def _inverse(X: Floats, variance: Floats) -> Floats:
    """(X'WX)⁻¹ of whatever the rows tell."""
    information = transposed_product(X, X * variance[:, None])
    if not np.isfinite(information).all():
        return np.full_like(information, np.nan)
    scales = np.sqrt(np.diag(information))
    scales = np.outer(scales, scales)
    scales[scales == 0] = 1.0
    return np.asarray(np.linalg.pinv(information / scales, rcond=_NOTHING, hermitian=True) / scales)


def leaving_out(model: FittedModel) -> LeavingOut:
    """A fitted model by its covariate patterns.

    Raises
    ------
    ValueError
        Where the outcome is not carried.
    """
    patterns, optimum = patterns_of(model), optimum_of(model)
    if patterns.weighted_events is None or optimum is None:
        raise ValueError("the outcome is not known")
    sample, first = model.sample, patterns.first
    # where no two rows are alike the rows are the patterns, and need no copy
    X = sample.matrix if patterns.count == sample.rows else sample.matrix[first]
    weights, events, inverse = patterns.weights, patterns.weighted_events, optimum.inverse
    probability = fitted_rows(model).probability[first]
    if not optimum.overlap or inverse is None:
        telling = ~recession_of(model).separated
        weights, events = weights * telling, events * telling
        inverse = _inverse(X, weights * probability_slope(probability))
    return LeavingOut(
        X=X,
        weights=weights,
        events=events,
        offset=0.0 if sample.offset is None else sample.offset[first],
        probability=probability,
        coefficients=model.coefficients,
        inverse=inverse,
    )
