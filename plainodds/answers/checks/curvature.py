"""Bends that a fit may have missed: score tests along each number, and along η itself."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.checks.fitted_rows import fitted_rows
from plainodds.answers.checks.score_tests import AddedColumns, ScoreTest, score_tests
from plainodds.answers.checks.smoothing import Binned, binned
from plainodds.answers.kept import kept
from plainodds.model.fitted import FittedModel

__all__ = ["Curvature", "curvature", "knots_of", "level_columns", "spline_columns"]

Floats = NDArray[np.float64]

# Harrell, Regression Modeling Strategies, section 2.4.6: where four knots are put
_KNOTS = (0.05, 0.35, 0.65, 0.95)
# with so few values each is a level of its own
_LEVELS = 5


@dataclass(frozen=True, eq=False)
class Curvature:
    """What was found along each number with more than two values, and along η.

    Attributes
    ----------
    bins : dict of name to Binned
    by_level : frozenset of str
        Numbers with a handful of values, each of which is a level.
    along : dict of name to ScoreTest
        Of a restricted cubic spline of the number, or of its levels, added to the model.
    along_eta : ScoreTest
        Of a constant and a restricted cubic spline of η: of what a model without an
        intercept, or with an offset, may have missed there, too.
    link : ScoreTest
        Of η² (Pregibon 1980, Applied Statistics 29:15).
    """

    bins: dict[str, Binned]
    by_level: frozenset[str]
    along: dict[str, ScoreTest]
    along_eta: ScoreTest
    link: ScoreTest


@kept
def curvature(model: FittedModel) -> Curvature:
    """Look for bends, all in one pass over the rows."""
    rows = fitted_rows(model)
    bins = {name: binned(values, rows) for name, values in _numbers(model).items()}
    bins = {name: each for name, each in bins.items() if len(each.centre) > 2}
    by_level = frozenset(
        name
        for name, each in bins.items()
        if bool((each.low == each.high).all()) and len(each.centre) <= _LEVELS
    )
    added = [
        level_columns(model.sample.columns[name], each.centre)
        if name in by_level
        else spline_columns(model.sample.columns[name], knots_of(each))
        for name, each in bins.items()
    ]
    eta = rows.linear_predictor
    bent = spline_columns(eta, knots_of(binned(eta, rows)))
    *along, along_eta, link = score_tests(
        model, rows, [*added, _with_constant(bent), _squared(eta)]
    )
    return Curvature(bins, by_level, dict(zip(bins, along, strict=True)), along_eta, link)


def _numbers(model: FittedModel) -> dict[str, Floats]:
    """The values of each predictor that takes numbers."""
    return {
        facts.name: np.asarray(model.sample.columns[facts.name], dtype=float)
        for facts in model.subject.predictors
        if facts.is_number
    }


def knots_of(bins: Binned) -> Floats:
    """Four knots among the cases; where many cases share a value, among the distinct values."""
    share = np.cumsum(bins.cases) / bins.cases.sum()
    knots = bins.centre[np.searchsorted(share, _KNOTS)]
    if len(np.unique(knots)) < len(_KNOTS):
        knots = np.quantile(bins.centre, _KNOTS)
    return np.unique(knots)


def spline_columns(values: Floats, knots: Floats) -> AddedColumns:
    """The number itself and its restricted cubic spline terms, one fewer than knots.

    Source: Stone & Koo 1985; Harrell, Regression Modeling Strategies, section 2.4.5.
    """
    first, last, before = knots[0], knots[-1], knots[-2]
    span = (last - first) or 1.0

    def columns(block: slice) -> Floats:
        x = (values[block] - first) / span
        found = np.empty((max(len(knots) - 1, 1), len(x)))
        found[0] = x
        if len(knots) > 2:
            u, v = (before - first) / span, 1.0
            end, end_before = _cubed(x - v), _cubed(x - u)
            for place, knot in enumerate(knots[:-2]):
                t = (knot - first) / span
                bend = _cubed(x - t)
                bend -= end_before * ((v - t) / (v - u))
                bend += end * ((u - t) / (v - u))
                found[place + 1] = bend
        return found

    return columns


def level_columns(values: Floats, levels: Floats) -> AddedColumns:
    """An indicator of each level but the first."""

    def columns(block: slice) -> Floats:
        return np.asarray(values[block] == levels[1:, None], dtype=float)

    return columns


def _with_constant(added: AddedColumns) -> AddedColumns:
    def columns(block: slice) -> Floats:
        found = added(block)
        return np.concatenate([np.ones((1, found.shape[1])), found])

    return columns


def _squared(eta: Floats) -> AddedColumns:
    def columns(block: slice) -> Floats:
        return np.asarray(eta[block] ** 2)[None]

    return columns


def _cubed(x: Floats) -> Floats:
    positive = np.maximum(x, 0.0)
    return np.asarray(positive * positive * positive)
