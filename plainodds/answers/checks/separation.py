"""Whether some combination of predictors tells events from non-events without fail."""

from __future__ import annotations

from typing import ClassVar, Literal

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.checks.columns import owners_of
from plainodds.answers.checks.finding import Concern, Evidence, Finding, Topic
from plainodds.answers.optimum import optimum_of
from plainodds.answers.recession import Recession, recession_of
from plainodds.model.fitted import FittedModel
from plainodds.model.patterns import patterns_of
from plainodds.model.products import product
from plainodds.values import Pairs, Scalar, value

__all__ = ["REASONS", "SeparationEvidence", "separation_of"]

Floats = NDArray[np.float64]

REASONS = ("complete", "quasi-complete")

_INVOLVED = 1e-6


@value
class SeparationEvidence(Evidence):
    """The linear programme's verdict.

    Attributes
    ----------
    kind : {"none", "quasi-complete", "complete"}
        Overlap, Albert & Anderson's other two.
    unbounded : tuple of (column, float)
        Coefficients without a finite estimate: +inf, −inf, or nan where only a
        combination with others is unbounded.
    predictors : tuple of str
        Responsible predictors.
    levels : pairs of (predictor, level)
        Levels all of whose rows have the same outcome, where that is the cause.
    rows, patterns : int
        Rows, and distinct covariate patterns, whose outcome is told without fail.
    all_rows, all_patterns : int
    """

    topic: ClassVar[Topic] = "separation"

    kind: Literal["none", "quasi-complete", "complete"]
    unbounded: Pairs
    predictors: tuple[str, ...]
    levels: Pairs
    rows: int
    patterns: int
    all_rows: int
    all_patterns: int


def separation_of(model: FittedModel) -> Finding:
    """Whether the data are separated, by linear programme, and what separates them.

    Where overlap is proved by the curvature at the optimum, no programme is run. A fit that
    is penalised or under constraints has finite coefficients all the same; that they are
    finite is its doing alone, which is to be kept in mind.
    """
    if not model.sample.rows:
        return Finding("separation", "not known", unknown="no rows")
    if model.sample.outcome is None:
        return Finding("separation", "not known", unknown="no outcome")
    patterns = patterns_of(model)
    weights = model.sample.weights
    weighty = np.ones(model.sample.rows, dtype=bool) if weights is None else weights > 0
    totals = (int(weighty.sum()), int((patterns.weights > 0).sum()))
    optimum = optimum_of(model)
    if optimum is not None and optimum.overlap:
        return Finding("separation", "nothing found", evidence=_overlap(*totals))
    recession = recession_of(model)
    if recession.kind == "none":
        return Finding("separation", "nothing found", evidence=_overlap(*totals))
    involved = _involved(recession)
    limits = recession.limits(np.eye(len(model.coefficients))[involved])
    restrained = model.record.method == "penalised" or model.record.constrained
    concern: Concern = "keep in mind" if restrained else "don't explain yet"
    owners = owners_of(model, involved)
    evidence = SeparationEvidence(
        kind=recession.kind,
        unbounded=tuple(
            (model.design.columns[place].name, float(limit))
            for place, limit in zip(involved, limits, strict=True)
        ),
        predictors=owners,
        levels=_levels_to_blame(model, recession, owners),
        rows=int((recession.separated[patterns.of_row] & weighty).sum()),
        patterns=int(recession.separated.sum()),
        all_rows=totals[0],
        all_patterns=totals[1],
    )
    return Finding("separation", concern, (recession.kind,), owners, evidence)


def _overlap(rows: int, patterns: int) -> SeparationEvidence:
    return SeparationEvidence("none", (), (), (), 0, 0, rows, patterns)


def _involved(recession: Recession) -> list[int]:
    """Columns whose coefficients change along some receding direction."""
    directions = recession.to_coordinates @ recession.span
    sizes = np.linalg.norm(directions, axis=1)
    return [int(place) for place in np.flatnonzero(sizes > _INVOLVED * sizes.max())]


def _levels_to_blame(
    model: FittedModel, recession: Recession, predictors: tuple[str, ...]
) -> Pairs:
    """Levels all of whose rows have the same outcome, and which the model can set apart.

    A level can be set apart if its indicator is a combination of the design's columns: then
    its own coefficient goes on to infinity, whatever the others do.
    """
    patterns, sample = recession.patterns, model.sample
    found: list[tuple[str, Scalar]] = []
    for name in predictors:
        facts = model.subject.predictor(name)
        codes = sample.columns[name][patterns.first] if not facts.is_number else np.array([])
        for place, level in enumerate(facts.levels):
            rows = (codes == place) & (patterns.weights > 0)
            told = rows.any() and recession.separated[rows].all()
            if (
                told
                and _is_one_sided(recession, rows)
                and _is_combination(model, recession, codes == place)
            ):
                found.append((name, level))
    return tuple(found)


def _is_one_sided(recession: Recession, rows: NDArray[np.bool_]) -> bool:
    patterns = recession.patterns
    if patterns.weighted_events is None:
        return False
    events, cases = patterns.weighted_events[rows].sum(), patterns.weights[rows].sum()
    return bool(events <= 0 or events >= cases * (1 - 1e-12))


def _is_combination(model: FittedModel, recession: Recession, indicator: NDArray[np.bool_]) -> bool:
    matrix = model.sample.matrix[recession.patterns.first] / recession.scales
    coordinates = product(matrix, recession.to_coordinates)
    projected = coordinates @ (coordinates.T @ indicator)
    missed = float(np.linalg.norm(indicator - projected))
    return missed <= _INVOLVED * float(np.linalg.norm(indicator))
