"""Which rows carry the result."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Any, ClassVar

import numpy as np
from numpy.typing import NDArray
from scipy.stats import norm

from plainodds.answers.bounded import limits_of
from plainodds.answers.changes import OddsQuestion, OddsRow, changes_asked, contrasts_of
from plainodds.answers.checks.finding import Concern, Evidence, Finding, Topic
from plainodds.answers.checks.fitted_rows import unknown_rows
from plainodds.answers.checks.leaving_out import LeavingOut, leaving_out
from plainodds.answers.optimum import optimum_of
from plainodds.model.design.design import Floats
from plainodds.model.fitted import FittedModel
from plainodds.model.patterns import Patterns, patterns_of
from plainodds.scales import odds_from_linear_predictor
from plainodds.values import Pairs, Scalar, value

__all__ = ["REASONS", "InfluenceEvidence", "InfluentialPattern", "Moved", "influence_of"]

REASONS = ("moves an odds ratio", "turns an odds ratio")

# A log odds ratio moved by more than its standard error: after the cutoff of 1 for DFBETAS in
# small samples (Belsley, Kuh & Welsch 1980), which in large ones cries no wolf either.
_MOVES = 1.0
# An odds ratio turns where 95 % intervals lie on one side of 1 with the pattern and on the other
# without it: a change of sign alone is no more than an odds ratio near 1.
_SURE = float(norm.ppf(0.975))
# A pattern that many cases share carries the result rightly; only one of few cases raises
# concern: two, or one in a hundred. Common practice, no source.
_FEW_CASES = 2.0
_FEW_SHARE = 0.01
# The measures are those of the likelihood's maximum: within a tenth of a standard error.
_AT_MAXIMUM = 0.1

_STANDING_OUT = 10
_MOVED = 3
_LABELS = 10
_PICTURED = 2_000
# Patterns among which those that move an odds ratio most are looked for, by Δβ: it bounds them.
_CANDIDATES = 500


@value
class Moved:
    """What one odds ratio would be without a covariate pattern.

    Attributes
    ----------
    predictor : str
    start, end : scalar
        The change that the odds ratio belongs to, as in an odds question.
    given : pairs
    odds_ratio, one_step, refitted : float
        With all rows; without the pattern by one Newton step; by a new fit (nan where it
        fails).
    """

    predictor: str
    start: Scalar
    end: Scalar
    given: Pairs
    odds_ratio: float
    one_step: float
    refitted: float


@value
class InfluentialPattern:
    """A covariate pattern that stands out.

    Attributes
    ----------
    labels : tuple of str
        Index labels of its rows, at most ten of them.
    cases, events : float
    values : pairs of (predictor, value)
    probability, leverage, delta_chi2, delta_deviance, delta_beta : float
        Pregibon 1981, as Hosmer & Lemeshow define them for covariate patterns.
    moved : tuple of Moved
        The odds ratios that it moves most, at most three.
    """

    labels: tuple[str, ...]
    cases: float
    events: float
    values: Pairs
    probability: float
    leverage: float
    delta_chi2: float
    delta_deviance: float
    delta_beta: float
    moved: tuple[Moved, ...]


@value
class InfluenceEvidence(Evidence):
    """Leverage and what leaving a pattern out would do.

    Attributes
    ----------
    patterns : int
    standing_out : tuple of InfluentialPattern
        The most influential first, at most ten.
    probability, delta_chi2, delta_beta : tuple of float
        For a picture: up to 2,000 patterns, those that stand out always among them.
    thinned : bool
        Whether there are more patterns than pictured.
    """

    topic: ClassVar[Topic] = "influence"

    patterns: int
    standing_out: tuple[InfluentialPattern, ...]
    probability: tuple[float, ...]
    delta_chi2: tuple[float, ...]
    delta_beta: tuple[float, ...]
    thinned: bool


@dataclass(frozen=True, eq=False)
class _Contrasts:
    """The odds ratios that are watched: (C, k) contrasts, with the model's standard errors."""

    changes: list[OddsRow]
    rows: Floats
    se: Floats


@dataclass(frozen=True, eq=False)
class _Without:
    """One pattern left out: by how much the watched log odds ratios move, (C,) each."""

    pattern: int
    step: Floats
    refitted: Floats
    turned: NDArray[np.bool_]


def influence_of(model: FittedModel) -> Finding:
    """Leverage, ΔX², ΔD and Δβ of every covariate pattern, and odds ratios without it.

    The odds ratios are those of a default odds question. Each pattern's one-step move of
    each of them is bounded by its Δβ, so that only patterns of large Δβ are looked at
    closely; refitted are the ten that move one most. Source: Pregibon 1981 (Annals of
    Statistics 9:705); Hosmer, Lemeshow & Sturdivant, Applied Logistic Regression, ch. 5.
    """
    why = unknown_rows(model)
    if why:
        return Finding("influence", "not known", unknown=why)
    if not _at_maximum(model):
        return Finding("influence", "not known", unknown="no likelihood")
    fit = leaving_out(model)
    if not fit.weights.any():
        # with every outcome told without fail, nothing has a finite estimate
        return Finding("influence", "not known", unknown="no likelihood")
    patterns = patterns_of(model)
    few = patterns.cases <= max(_FEW_CASES, _FEW_SHARE * float(patterns.cases.sum()))
    watched = _watched(model, fit)
    left_out = [_left_out(fit, watched, at) for at in _most_moving(fit, patterns, few, watched)]
    moving = [each for each in left_out if few[each.pattern]]
    moved = [_moved(each, watched) > _MOVES for each in moving]
    turned = [each.turned for each in moving]
    concern: Concern = "nothing found"
    if np.any(moved):
        concern = "don't explain yet" if np.any(turned) else "keep in mind"
    about = [
        change.predictor
        for at, change in enumerate(watched.changes)
        if any(each[at] for each in (*moved, *turned))
    ]
    return Finding(
        "influence",
        concern,
        reasons=(("turns an odds ratio",) if np.any(turned) else ())
        + (("moves an odds ratio",) if np.any(moved) else ()),
        about=tuple(dict.fromkeys(about)),
        evidence=_evidence(model, fit, patterns, watched, left_out),
    )


def _at_maximum(model: FittedModel) -> bool:
    """Whether the coefficients are where the likelihood is highest, or rises for ever."""
    optimum = optimum_of(model)
    if optimum is None or model.record.method == "penalised":
        return False
    return not float(np.nanmax(np.abs(optimum.step), initial=0.0)) > _AT_MAXIMUM


def _watched(model: FittedModel, fit: LeavingOut) -> _Contrasts:
    """The changes of a default odds question, but for those without a finite odds ratio."""
    changes = list(changes_asked(model, OddsQuestion()))
    rows = contrasts_of(model, changes)
    finite = limits_of(model, rows) == 0
    changes = [change for change, is_finite in zip(changes, finite, strict=True) if is_finite]
    rows = rows[finite]
    variance = np.einsum("ij,ij->i", rows @ fit.inverse, rows)
    return _Contrasts(changes, rows, np.sqrt(np.maximum(variance, 0.0)))


def _most_moving(
    fit: LeavingOut, patterns: Patterns, few: NDArray[np.bool_], watched: _Contrasts
) -> NDArray[np.intp]:
    """Patterns of one row or few cases by how far they move some odds ratio, the farthest first."""
    single = np.bincount(patterns.of_row, minlength=patterns.count) == 1
    eligible = np.nonzero((single | few) & ~fit.measures.alone & (fit.weights > 0))[0]
    far = np.argsort(-fit.measures.delta_beta[eligible], kind="stable")[:_CANDIDATES]
    candidates = eligible[far]
    if not len(candidates) or not len(watched.changes):
        return candidates[:0]
    steps = fit.steps(candidates) @ watched.rows.T
    strongest = _in_standard_errors(steps, watched).max(axis=1)
    return np.asarray(candidates[np.argsort(-strongest, kind="stable")[:_STANDING_OUT]])


def _in_standard_errors(moves: Floats, watched: _Contrasts) -> Floats:
    with np.errstate(divide="ignore", invalid="ignore"):
        moved = np.abs(moves) / watched.se
    return np.where(watched.se > 0, moved, 0.0)


def _left_out(fit: LeavingOut, watched: _Contrasts, pattern: int) -> _Without:
    step = watched.rows @ fit.steps(np.array([pattern]))[0]
    estimate = watched.rows @ fit.coefficients
    coefficients = fit.refitted(pattern)
    if coefficients is None:
        nothing = np.full(len(step), np.nan)
        return _Without(pattern, step, nothing, np.zeros(len(step), dtype=bool))
    refitted = watched.rows @ coefficients
    turned = (np.abs(estimate) > _SURE * watched.se) & (estimate * refitted < 0)
    if turned.any():
        inverse = fit.inverse_without(pattern, coefficients)
        variance = np.einsum("ij,ij->i", watched.rows @ inverse, watched.rows)
        turned &= refitted**2 > _SURE**2 * variance
    return _Without(pattern, step, refitted - estimate, turned)


def _moved(without: _Without, watched: _Contrasts) -> Floats:
    """By how many standard errors each odds ratio moves: refitted, or else by one step."""
    moves = np.where(np.isnan(without.refitted), without.step, without.refitted)
    return _in_standard_errors(moves, watched)


def _evidence(
    model: FittedModel,
    fit: LeavingOut,
    patterns: Patterns,
    watched: _Contrasts,
    left_out: list[_Without],
) -> InfluenceEvidence:
    measures = fit.measures
    pictured = _pictured(fit, np.array([each.pattern for each in left_out], dtype=np.intp))
    return InfluenceEvidence(
        patterns=patterns.count,
        standing_out=tuple(
            _pattern(model, fit, patterns, _odds_ratios(fit, watched, each), each.pattern)
            for each in left_out
        ),
        probability=tuple(fit.probability[pictured].tolist()),
        delta_chi2=tuple(measures.delta_chi2[pictured].tolist()),
        delta_beta=tuple(measures.delta_beta[pictured].tolist()),
        thinned=len(pictured) < patterns.count,
    )


def _pictured(fit: LeavingOut, standing_out: NDArray[np.intp]) -> NDArray[np.intp]:
    """Up to 2,000 patterns: those that stand out, the extremes, and others along the chance."""
    count = len(fit.probability)
    if count <= _PICTURED:
        return np.arange(count)
    extreme = _PICTURED // 4
    chosen = np.zeros(count, dtype=bool)
    chosen[standing_out] = True
    for measure in (fit.measures.delta_beta, fit.measures.delta_chi2):
        chosen[np.argpartition(-measure, extreme)[:extreme]] = True
    others = np.nonzero(~chosen)[0]
    others = others[np.argsort(fit.probability[others], kind="stable")]
    room = _PICTURED - int(chosen.sum())
    chosen[others[np.linspace(0, len(others) - 1, room).astype(int)]] = True
    return np.nonzero(chosen)[0]


def _odds_ratios(fit: LeavingOut, watched: _Contrasts, without: _Without) -> tuple[Moved, ...]:
    estimate = watched.rows @ fit.coefficients
    farthest = np.argsort(-_moved(without, watched), kind="stable")[:_MOVED]
    before, step, refitted = (
        odds_from_linear_predictor(each)
        for each in (estimate, estimate + without.step, estimate + without.refitted)
    )
    return tuple(
        Moved(
            predictor=watched.changes[at].predictor,
            start=watched.changes[at].start,
            end=watched.changes[at].end,
            given=watched.changes[at].given,
            odds_ratio=float(before[at]),
            one_step=float(step[at]),
            refitted=float(refitted[at]),
        )
        for at in farthest
    )


def _pattern(
    model: FittedModel,
    fit: LeavingOut,
    patterns: Patterns,
    moved: tuple[Moved, ...],
    at: int,
) -> InfluentialPattern:
    measures, rows = fit.measures, patterns.rows_of(at)[:_LABELS]
    labels: Any = rows if model.sample.labels is None else model.sample.labels[rows]
    events = patterns.events
    return InfluentialPattern(
        labels=tuple(str(label) for label in labels),
        cases=float(patterns.cases[at]),
        events=float("nan") if events is None else float(events[at]),
        values=_values(model, int(patterns.first[at])),
        probability=float(fit.probability[at]),
        leverage=float(measures.leverage[at]),
        delta_chi2=float(measures.delta_chi2[at]),
        delta_deviance=float(measures.delta_deviance[at]),
        delta_beta=float(measures.delta_beta[at]),
        moved=moved,
    )


def _values(model: FittedModel, row: int) -> Pairs:
    """What the predictors are in a row."""
    found: list[tuple[str, Scalar]] = []
    for facts in model.subject.predictors:
        held = model.sample.columns[facts.name][row].item()
        if facts.levels:
            held = facts.levels[int(held)]
        elif facts.kind == "whole number":
            held = int(held)
        found.append((facts.name, held))
    return tuple(found)
