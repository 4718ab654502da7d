"""Score tests of columns added to a fit: one pass over the rows, and no new fit.

With score s and information I at the fitted coefficients, 1 the model's columns and 2 the
added ones, the statistic is u'V⁻¹u with u = s₂ − I₂₁I₁₁⁻¹s₁ and V = I₂₂ − I₂₁I₁₁⁻¹I₁₂, of
χ² distribution with V's rank as degrees of freedom. Source: Rao 1948 (Proc Camb Phil Soc
44:50); Pregibon 1982 (GLIM 82, 87) for generalised linear models.
"""

from __future__ import annotations

from collections.abc import Callable, Sequence
from dataclasses import dataclass
from typing import TypeAlias

import numpy as np
from numpy.typing import NDArray
from scipy.stats import chi2

from plainodds.answers.checks.fitted_rows import FittedRows
from plainodds.answers.population import slices
from plainodds.model.fitted import FittedModel
from plainodds.model.products import transposed_product

__all__ = ["AddedColumns", "ScoreTest", "score_tests"]

Floats = NDArray[np.float64]

AddedColumns: TypeAlias = Callable[[slice], Floats]
"""A block's rows of the added columns, shape (width, rows of the block)."""

_BLOCK = 8_192
# What is left of an added column of unit length, squared, when it is taken to be in the span.
_NOTHING_LEFT = 1e-7


@dataclass(frozen=True, eq=False)
class ScoreTest:
    """χ², its degrees of freedom and p; nan, 0 and nan where nothing was left to test."""

    statistic: float
    degrees_of_freedom: int
    p_value: float


def score_tests(
    model: FittedModel, rows: FittedRows, added: Sequence[AddedColumns]
) -> tuple[ScoreTest, ...]:
    """Test several sets of added columns, each by itself.

    Parameters
    ----------
    model : FittedModel
    rows : FittedRows
    added : sequence of callable
        Each gives its columns for a block of rows, on a scale near their own spread;
        columns that follow from the model's own are projected out.
    """
    centre, spread = _centre_and_spread(model.sample.matrix)
    k = len(model.coefficients)
    widths = [len(columns(slice(0, 1))) for columns in added]
    ends = np.cumsum(widths)
    own, score = np.zeros((k, k)), np.zeros(k)
    crossed, added_score = np.zeros((k, int(ends[-1]))), np.zeros(int(ends[-1]))
    inner = [np.zeros((width, width)) for width in widths]
    curvature = rows.weights * rows.probability * (1 - rows.probability)
    residual = rows.residual
    for block in slices(model.sample.rows, _BLOCK):
        X = (model.sample.matrix[block] - centre) / spread
        w, r = curvature[block], residual[block]
        Z = [columns(block) for columns in added]
        stacked = np.concatenate(Z)
        weighted = stacked * w
        own += transposed_product(X, X * w[:, None])
        score += r @ X
        crossed += transposed_product(X, np.ascontiguousarray(weighted.T))
        added_score += stacked @ r
        for number, (one, end) in enumerate(zip(Z, ends, strict=True)):
            inner[number] += one @ weighted[end - len(one) : end].T
    projected = np.linalg.pinv(own, hermitian=True) @ np.column_stack([crossed, score])
    tests = []
    for I22, end in zip(inner, ends, strict=True):
        place = slice(end - len(I22), end)
        u = added_score[place] - crossed[:, place].T @ projected[:, -1]
        tests.append(_tested(u, I22, I22 - crossed[:, place].T @ projected[:, place]))
    return tuple(tests)


def _tested(u: Floats, whole: Floats, left: Floats) -> ScoreTest:
    length = np.sqrt(np.diag(whole))
    length[length == 0] = 1.0
    values, vectors = np.linalg.eigh((left + left.T) / 2 / np.outer(length, length))
    kept = values > _NOTHING_LEFT
    if not kept.any():
        return ScoreTest(np.nan, 0, np.nan)
    along = vectors[:, kept].T @ (u / length)
    statistic, freedom = float(np.sum(along**2 / values[kept])), int(kept.sum())
    return ScoreTest(statistic, freedom, float(chi2.sf(statistic, freedom)))


def _centre_and_spread(X: Floats) -> tuple[Floats, Floats]:
    """What makes the columns comparable: centred only where a constant among them allows it."""
    centre, spread = X.mean(axis=0), X.std(axis=0)
    constant = spread <= 1e-12 * np.abs(centre)
    if not (constant & (centre != 0)).any():
        centre = np.zeros_like(centre)
    spread[constant | (spread == 0)] = 1.0
    centre[constant] = 0.0
    return centre, spread
