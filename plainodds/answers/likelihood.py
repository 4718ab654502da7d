"""Profile-likelihood intervals for any contrast of the coefficients.

The interval of c'β holds the values δ for which the deviance, minimised over all β
with c'β = δ, exceeds its minimum by no more than χ²₁. Source: Venzon & Moolgavkar
1988 (Applied Statistics 37:87).

At a constrained minimum the score is λc, so the deviance's slope along δ is −2λ: the
ends are found by Newton's method within a bracket, each refit starting from the last.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import cached_property

import numpy as np
from numpy.typing import NDArray
from scipy.stats import chi2

from plainodds.errors import QuestionRefused
from plainodds.model.fitted import FittedModel
from plainodds.model.products import transposed_product
from plainodds.scales import probability_from_linear_predictor

__all__ = ["Likelihood", "likelihood_of"]

Floats = NDArray[np.float64]

_TOLERANCE = 1e-9
_REFITS = 60
_STEPS = 200
_DOUBLINGS = 60
# Changes of η: a first step, and one after which every chance has become 0 or 1.
_MODEST = 4.0
_SATURATED = 1_000.0


@dataclass(frozen=True, eq=False)
class _Refit:
    """A minimum under the constraint: coefficients, deviance, and its slope along δ."""

    coefficients: Floats
    deviance: float
    slope: float


@dataclass(frozen=True, eq=False)
class Likelihood:
    """The binomial likelihood of a fitted model's rows.

    Attributes
    ----------
    X : array (n, k)
    outcome : array (n,)
        Share of events.
    weights : array (n,)
    offset : array (n,)
    coefficients : array (k,)
        Where the fit ended.
    """

    X: Floats
    outcome: Floats
    weights: Floats
    offset: Floats
    coefficients: Floats

    def interval(self, contrast: Floats, level: float) -> tuple[float, float]:
        """Both ends of the interval of c'β; infinite where an end does not exist.

        Parameters
        ----------
        contrast : array (k,)
        level : float
        """
        return self.end(contrast, level, -1.0), self.end(contrast, level, 1.0)

    def end(self, contrast: Floats, level: float, side: float) -> float:
        """One end of the interval of c'β, the lower (side −1) or the upper (side 1)."""
        return self._end(contrast, float(chi2.ppf(level, 1)), side)

    def p_value(self, contrast: Floats) -> float:
        """Likelihood-ratio test of c'β = 0."""
        refit = self.refit(contrast, 0.0, self._best.coefficients)
        return float(chi2.sf(max(refit.deviance - self._best.deviance, 0.0), 1))

    def excess(self, contrast: Floats, at: float) -> float:
        """By how much the refitted deviance at c'β = at exceeds the minimum."""
        refit = self.refit(contrast, at, self._best.coefficients)
        return refit.deviance - self._best.deviance

    def excess_without(self, contrasts: Floats) -> float:
        """By how much the deviance exceeds its minimum when every contrast Lβ is held at 0.

        Parameters
        ----------
        contrasts : array (q, k)
            L, of rank q.
        """
        _, _, directions = np.linalg.svd(contrasts, full_matrices=True)
        free = directions[len(contrasts) :].T
        start = free @ (free.T @ self._best.coefficients)
        _, deviance, _ = self._minimised(start, free)
        return max(deviance - self._best.deviance, 0.0)

    @cached_property
    def _best(self) -> _Refit:
        """The unconstrained minimum, polished from where the fit ended."""
        # of singular columns a fit can end anywhere, worse than where it began: there η is so
        # large that rounding hides every descent
        nought = np.zeros_like(self.coefficients)
        start = min((self.coefficients, nought), key=lambda each: self._parts(each)[0])
        coefficients, deviance, _ = self._minimised(start, np.eye(len(start)))
        return _Refit(coefficients, deviance, 0.0)

    @cached_property
    def _steepest(self) -> float:
        """Bound of the information's largest eigenvalue: no chance varies more than 1/4."""
        return 0.25 * float(self.weights @ np.einsum("ij,ij->i", self.X, self.X))

    @cached_property
    def _inverse(self) -> Floats:
        return np.asarray(np.linalg.pinv(self._information, hermitian=True))

    @cached_property
    def _information(self) -> Floats:
        return self._parts(self._best.coefficients)[2]

    def _solves(self, along: Floats, contrast: Floats) -> bool:
        # the inverse leaves out where the information is nought to rounding
        missed = self._information @ along - contrast
        return float(np.linalg.norm(missed)) < 0.1 * float(np.linalg.norm(contrast))

    def refit(self, contrast: Floats, at: float, start: Floats) -> _Refit:
        """Minimise the deviance under c'β = at."""
        length = float(contrast @ contrast)
        moved = start + contrast * ((at - contrast @ start) / length)
        # columns of the other right singular vectors leave c'β as it is
        free = np.linalg.svd(contrast[None], full_matrices=True)[2][1:].T
        coefficients, deviance, score = self._minimised(moved, free)
        return _Refit(coefficients, deviance, -2.0 * float(contrast @ score) / length)

    def _end(self, contrast: Floats, excess: float, side: float) -> float:
        """One end: step outwards until the deviance is too high, then Newton in the bracket."""
        estimate = float(contrast @ self._best.coefficients)
        along = self._inverse @ contrast
        variance = float(contrast @ along)
        direction = contrast / float(contrast @ contrast)
        if variance > 0 and self._solves(along, contrast):
            direction = along / variance
        fastest = float(np.abs(np.einsum("ij,j->i", self.X, direction)).max())
        # where a fit has run away its standard errors are absurd: start with a modest step
        reach = min(math.sqrt(excess * max(variance, 0.0)), _MODEST / fastest)
        inside, here = estimate, self._best
        for _ in range(_DOUBLINGS):
            at = estimate + side * reach
            start = here.coefficients + direction * (at - contrast @ here.coefficients)
            there = self.refit(contrast, at, start)
            over = there.deviance - self._best.deviance - excess
            if over >= 0:
                return self._root(contrast, excess, inside, at, there)
            # the deviance is convex: flat after so long a way, it stays flat, and there is no end
            if over + excess < 1e-6 and reach * fastest > _SATURATED:
                break
            inside, here, reach = at, there, 2 * reach
        return side * math.inf

    def _root(
        self, contrast: Floats, excess: float, inside: float, outside: float, there: _Refit
    ) -> float:
        at = outside
        for _ in range(_REFITS):
            over = there.deviance - self._best.deviance - excess
            if abs(over) <= _TOLERANCE * (1 + excess):
                break
            if over > 0:
                outside = at
            else:
                inside = at
            proposed = at - over / there.slope if there.slope else math.nan
            low, high = min(inside, outside), max(inside, outside)
            at = proposed if low < proposed < high else (inside + outside) / 2
            there = self.refit(contrast, at, there.coefficients)
        return at

    def _minimised(self, start: Floats, free: Floats) -> tuple[Floats, float, Floats]:
        """Newton's method along the free directions, damped where a step does not descend.

        Damping as in Levenberg (1944) and Marquardt (1963): far out, where every chance is
        0 or 1, the information vanishes and a plain Newton step means nothing.
        """
        coefficients, damping = start, 0.0
        deviance, score, information = self._parts(coefficients)
        for _ in range(_STEPS):
            gradient = free.T @ score
            curvature = free.T @ information @ free
            damped = curvature + damping * self._steepest * np.eye(len(curvature))
            step = free @ _solved(damped, gradient)
            newton, bound = float(score @ step), float(gradient @ gradient) / self._steepest
            if max(newton, bound) < 1e-13 * (1 + abs(deviance)):
                break
            # no step should promise less than the steepest one; a vanished information lets it
            if newton < bound / 2:
                damping = max(10 * damping, 1e-6)
                continue
            found = self._parts(coefficients + step)
            # also no progress is progress enough at a minimum that rounding hides
            if found[0] <= deviance + 1e-14 * abs(deviance):
                coefficients = coefficients + step
                deviance, score, information = found
                damping = 0.0 if damping < 1e-6 else damping / 100
            else:
                damping = max(10 * damping, 1e-6)
        return coefficients, deviance, score

    def _parts(self, coefficients: Floats) -> tuple[float, Floats, Floats]:
        """Deviance (up to a constant), score and information."""
        eta = np.einsum("ij,j->i", self.X, coefficients) + self.offset
        pi = probability_from_linear_predictor(eta)
        # ln(1 + e^η) without overflow
        softplus = np.maximum(eta, 0.0) + np.log1p(np.exp(-np.abs(eta)))
        deviance = 2.0 * float(self.weights @ (softplus - self.outcome * eta))
        score = np.einsum("i,ij->j", self.weights * (self.outcome - pi), self.X)
        information = transposed_product(self.X, self.X * (self.weights * pi * (1 - pi))[:, None])
        return deviance, score, information


def _solved(curvature: Floats, gradient: Floats) -> Floats:
    try:
        return np.asarray(np.linalg.solve(curvature, gradient))
    except np.linalg.LinAlgError:
        return np.asarray(np.linalg.pinv(curvature, hermitian=True) @ gradient)


def likelihood_of(
    model: FittedModel, asked: str = "interval='likelihood'", instead: str = "interval='wald'"
) -> Likelihood:
    """The likelihood of a fitted model's rows.

    Parameters
    ----------
    model : FittedModel
    asked, instead : str
        What was asked and what can be asked in its place, as a refusal words it.

    Raises
    ------
    QuestionRefused
        Where the fit was not by maximum likelihood or its covariance is another one.
    """
    if model.no_likelihood:
        reason = model.no_likelihood.replace("interval='wald'", instead)
        raise QuestionRefused(f"{asked}: {reason}")
    sample = model.sample
    n = sample.rows
    if sample.outcome is None or not n:
        raise QuestionRefused(
            f"{asked} refits the model, and the result no longer carries its outcome. "
            f"Ask {instead}, or fit again and keep the data."
        )
    return Likelihood(
        sample.matrix,
        sample.outcome,
        np.ones(n) if sample.weights is None else sample.weights,
        np.zeros(n) if sample.offset is None else sample.offset,
        model.coefficients,
    )
