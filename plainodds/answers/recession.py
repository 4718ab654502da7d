"""Directions in which the likelihood never falls: which estimates have run away to infinity.

A direction d recedes if x'd ≥ 0 in every row with the event and x'd ≤ 0 in every row
without it (so x'd = 0 where a covariate pattern has both). If some row has x'd ≠ 0, the data
are separated and the likelihood has no maximum at finite coefficients: Albert & Anderson
1984 (Biometrika 71:1). Directions are found by linear programmes (Konis 2007, Computational
Algorithms for Detecting Separation, D.Phil. thesis, University of Oxford).
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import Literal

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.kept import kept
from plainodds.answers.programme import (
    farthest,
    normalised,
    null_space,
    spanned,
    strictly_inside,
)
from plainodds.model.fitted import FittedModel
from plainodds.model.patterns import Patterns, patterns_of
from plainodds.model.products import product

__all__ = ["Recession", "recession_of"]

Floats = NDArray[np.float64]
Flags = NDArray[np.bool_]

_BOTH_OUTCOMES = 1e-9
_INVOLVED = 1e-6


@dataclass(frozen=True, eq=False)
class Recession:
    """All receding directions of a fit's rows.

    Attributes
    ----------
    kind : {"none", "quasi-complete", "complete"}
    patterns : Patterns
    separated : array (p,) of bool
        Patterns whose outcome some receding direction tells strictly.
    estimable : array (k, r)
        Orthonormal basis of the contrasts (of scaled coefficients) that the rows tell at
        all; r is the design's rank.
    to_coordinates : array (k, r)
        Carries a contrast of scaled coefficients into the coordinates of directions.
    scales : array (k,)
        Of the columns.
    span : array (r, q)
        Orthonormal basis of what receding directions span.
    signed : array (s, q)
        The strictly separated patterns, signed so that no receding direction has a negative
        product with one, in the span's coordinates.
    interior : array (q,)
        A receding direction that separates strictly whatever can be.
    """

    kind: Literal["none", "quasi-complete", "complete"]
    patterns: Patterns
    separated: Flags
    estimable: Floats
    to_coordinates: Floats
    scales: Floats
    span: Floats
    signed: Floats
    interior: Floats

    def limits(self, contrasts: Floats) -> Floats:
        """Where the maximum of the likelihood takes each c'β.

        Parameters
        ----------
        contrasts : array (m, k)

        Returns
        -------
        array (m,)
            0 for a finite value, +inf or −inf, nan where the data leave it undetermined.
        """
        return np.array([self._limit(contrast) for contrast in contrasts / self.scales])

    def _limit(self, contrast: Floats) -> float:
        size = float(np.linalg.norm(contrast))
        untold = contrast - self.estimable @ (self.estimable.T @ contrast)
        if np.linalg.norm(untold) > _INVOLVED * size:
            return math.nan
        told = self.to_coordinates.T @ contrast
        along = self.span.T @ told
        size = float(np.linalg.norm(told))
        if not size or np.linalg.norm(along) <= _INVOLVED * size:
            return 0.0
        along /= np.linalg.norm(along)
        inside = float(along @ self.interior)
        # in the interior of the cone: nought there means that both signs are near
        if abs(inside) <= _INVOLVED * float(np.linalg.norm(self.interior)):
            return math.nan
        side = math.copysign(1.0, inside)
        other_way = farthest(self.signed, -side * along)
        if -side * float(along @ other_way) > _INVOLVED:
            return math.nan
        return side * math.inf


@kept
def recession_of(model: FittedModel) -> Recession:
    """Find the receding directions by linear programmes.

    Raises
    ------
    ValueError
        If the sample has no outcome.
    """
    patterns = patterns_of(model)
    matrix = model.sample.matrix[patterns.first]
    scales = np.abs(matrix).max(axis=0, initial=0.0)
    scales[scales == 0] = 1.0
    matrix /= scales
    estimable, to_coordinates = spanned(matrix)
    rows = normalised(product(matrix, to_coordinates))
    signs = _signs(patterns)

    # patterns with both outcomes leave only what is orthogonal to them
    left = null_space(rows[signs == 0], _BOTH_OUTCOMES)
    one_sided = np.abs(signs) == 1
    signed = _carried(rows[one_sided] * signs[one_sided, None], left)
    lengths = np.linalg.norm(signed, axis=1)
    signed /= np.where(lengths > _BOTH_OUTCOMES, lengths, math.inf)[:, None]
    fitted = left.T @ (estimable.T @ (model.coefficients * scales) * _stretch(to_coordinates))
    interior, strict = strictly_inside(signed, fitted)
    separated = np.zeros(len(signs), dtype=bool)
    separated[np.flatnonzero(one_sided)[strict]] = True

    kind: Literal["none", "quasi-complete", "complete"] = "none"
    inner = np.zeros((left.shape[1], 0))
    if strict.any():
        kind = "complete" if separated[np.isfinite(signs)].all() else "quasi-complete"
        inner = null_space(signed[~strict], _INVOLVED)
    return Recession(
        kind=kind,
        patterns=patterns,
        separated=separated,
        estimable=estimable,
        to_coordinates=to_coordinates,
        scales=scales,
        span=left @ inner,
        signed=_carried(signed[strict], inner),
        interior=inner.T @ interior,
    )


def _carried(rows: Floats, basis: Floats) -> Floats:
    return product(rows, basis) if basis.size else np.zeros((len(rows), basis.shape[1]))


def _stretch(to_coordinates: Floats) -> Floats:
    # its columns are orthogonal: divided by singular values, of which these are the inverse
    return np.asarray(1.0 / np.linalg.norm(to_coordinates, axis=0))


def _signs(patterns: Patterns) -> Floats:
    """1 where every case has the event, −1 where none has, 0 where some have, nan without any."""
    weights, events = patterns.weights, patterns.weighted_events
    if events is None:
        raise ValueError("separation needs an outcome")
    signs = np.zeros(len(weights))
    signs[events >= weights * (1 - 1e-12)] = 1.0
    signs[events <= 0] = -1.0
    signs[weights <= 0] = math.nan
    return signs
