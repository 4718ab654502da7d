"""Whether columns of the design nearly repeat each other."""

from __future__ import annotations

import math
from typing import ClassVar

import numpy as np
from numpy.typing import NDArray
from scipy.linalg import qr
from scipy.sparse.csgraph import connected_components

from plainodds.answers.checks.columns import owners_of
from plainodds.answers.checks.finding import Concern, Evidence, Finding, Topic
from plainodds.answers.optimum import optimum_of
from plainodds.answers.programme import spanned
from plainodds.answers.sharing_terms import joined_predictors
from plainodds.model.fitted import FittedModel
from plainodds.model.products import transposed_product
from plainodds.scales import probability_from_linear_predictor, probability_slope
from plainodds.values import value

__all__ = ["REASONS", "CollinearityEvidence", "TiedColumns", "collinearity_of"]

Floats = NDArray[np.float64]
Places = NDArray[np.intp]

REASONS = ("rank", "tied")

# Standard errors stretched by more than √10, that is a variance inflation factor of 10: common
# practice, no source.
_STRETCHED = math.sqrt(10.0)
# Belsley, Kuh & Welsch 1980, Regression Diagnostics, ch. 3: weak dependencies have indices of 5
# to 10, strong ones from 30; a column takes part with more than half of its variance.
_WEAK = 5.0
_TAKES_PART = 0.5
_INVOLVED = 1e-6


@value
class TiedColumns:
    """Columns that nearly (or exactly) follow from each other.

    Attributes
    ----------
    columns, predictors : tuple of str
    condition_index : float
    """

    columns: tuple[str, ...]
    predictors: tuple[str, ...]
    condition_index: float


@value
class CollinearityEvidence(Evidence):
    """The weighted design's condition.

    Attributes
    ----------
    rank, columns : int
    condition_number : float
        Of the weighted design with columns scaled to unit length (Belsley, Kuh & Welsch);
        beside an intercept taken from their means, so that numbers far from 0, such as
        years, are not called tied to it. Infinite below full rank.
    tied : tuple of TiedColumns
        Groups by variance-decomposition proportions, the worst first.
    inflation : tuple of (predictor, float)
        By how much each predictor's standard errors are stretched by the others:
        GVIF^(1/(2·df)), Fox & Monette 1992.
    """

    topic: ClassVar[Topic] = "collinearity"

    rank: int
    columns: int
    condition_number: float
    tied: tuple[TiedColumns, ...]
    inflation: tuple[tuple[str, float], ...]


def collinearity_of(model: FittedModel) -> Finding:
    """Whether columns of the design follow from each other, exactly or nearly.

    Only ties between predictors count, not those within one (x and x²) or within predictors
    that share terms (x, z and x·z): these are told of together anyway.
    """
    if not model.sample.rows:
        return Finding("collinearity", "not known", unknown="no rows")
    k = len(model.coefficients)
    rank, exact = _exact_ties(model)
    correlation, places = _weighted_correlation(model)
    bound = sorted({place for tie in exact for place in tie})
    free = np.flatnonzero(~np.isin(places, bound))
    values, vectors = np.linalg.eigh(correlation[np.ix_(free, free)])
    full = math.sqrt(values[-1] / max(values[0], 1e-300)) if len(values) else 1.0
    inflation = _inflation(model, correlation, places, exact)
    tied = [TiedColumns(_names(model, tie), owners_of(model, tie), math.inf) for tie in exact] + [
        TiedColumns(_names(model, tie), owners_of(model, tie), index)
        for tie, index in _near_ties(values, vectors, places[free])
        if _joins_strangers(model, tie) and _is_stretched(owners_of(model, tie), inflation)
    ]
    concern: Concern = "nothing found"
    if rank < k:
        concern = "don't explain yet"
    elif _is_stretched(inflation, inflation):
        concern = "keep in mind"
    reasons = (("rank",) if rank < k else ()) + (
        ("tied",) if len(tied) > len(exact) or concern == "keep in mind" else ()
    )
    named = {name for tie in tied for name in tie.predictors}
    named |= {name for name, stretch in inflation.items() if stretch > _STRETCHED}
    return Finding(
        "collinearity",
        concern,
        reasons,
        tuple(facts.name for facts in model.subject.predictors if facts.name in named),
        CollinearityEvidence(
            rank, k, math.inf if rank < k else full, tuple(tied), tuple(inflation.items())
        ),
    )


def _names(model: FittedModel, places: tuple[int, ...]) -> tuple[str, ...]:
    return tuple(model.design.columns[place].name for place in places)


def _exact_ties(model: FittedModel) -> tuple[int, list[tuple[int, ...]]]:
    """The design's rank, and groups of columns that follow from each other."""
    matrix, optimum = model.sample.matrix, optimum_of(model)
    if optimum is not None and optimum.inverse is not None:
        # an information that can be inverted has no columns to spare
        return matrix.shape[1], []
    scales = np.abs(matrix).max(axis=0)
    scales[scales == 0] = 1.0
    basis, _ = spanned(matrix / scales)
    left = np.eye(len(scales)) - basis @ basis.T
    if basis.shape[1] == len(scales):
        return len(scales), []
    linked = np.abs(left) > _INVOLVED
    count, group = connected_components(linked, directed=False)
    ties = [
        tuple(map(int, np.flatnonzero((group == g) & linked.any(axis=1)))) for g in range(count)
    ]
    return basis.shape[1], [tie for tie in ties if tie]


def _weighted_correlation(model: FittedModel) -> tuple[Floats, Places]:
    """Correlation of the columns weighted as in the information, and which columns these are."""
    sample, matrix = model.sample, model.sample.matrix
    eta = np.einsum("ij,j->i", matrix, model.coefficients)
    if sample.offset is not None:
        eta += sample.offset
    weights = probability_slope(probability_from_linear_predictor(eta))
    if sample.weights is not None:
        weights *= sample.weights
    total = float(weights.sum())
    varies = np.ptp(matrix, axis=0) > 0
    centre = np.zeros(matrix.shape[1])
    if not varies.all() and total > 0:
        centre = np.einsum("i,ij->j", weights, matrix) / total
    else:
        varies[:] = True
    found = np.zeros((len(centre), len(centre)))
    for block in sample.blocks():
        X = matrix[block] - centre
        found += transposed_product(X, X * weights[block, None])
    lengths = np.sqrt(np.diag(found))
    # a column that varies only where the weights have vanished counts as one that doesn't
    places = np.flatnonzero(varies & (lengths > 0))
    lengths = lengths[places]
    return found[np.ix_(places, places)] / np.outer(lengths, lengths), places


def _near_ties(
    values: Floats, vectors: Floats, places: Places
) -> list[tuple[tuple[int, ...], float]]:
    """Columns that share a small eigenvalue with most of their variance, the worst first."""
    if not len(values):
        return []
    values = np.maximum(values, values[-1] * 1e-15)
    parts = vectors**2 / values
    parts /= parts.sum(axis=1, keepdims=True)
    ties = []
    for place, index in enumerate(np.sqrt(values[-1] / values)):
        members = np.flatnonzero(parts[:, place] > _TAKES_PART)
        if index > _WEAK and len(members) > 1:
            ties.append((tuple(map(int, places[members])), float(index)))
    return ties


def _joins_strangers(model: FittedModel, tie: tuple[int, ...]) -> bool:
    """Whether columns of predictors that share no term are tied."""
    owners = set(owners_of(model, tie))
    return sum(bool(owners & set(group)) for group in joined_predictors(model)) > 1


def _is_stretched(names: tuple[str, ...] | dict[str, float], inflation: dict[str, float]) -> bool:
    return any(inflation.get(name, 1.0) > _STRETCHED for name in names)


def _inflation(
    model: FittedModel, correlation: Floats, places: Places, exact: list[tuple[int, ...]]
) -> dict[str, float]:
    """GVIF^(1/(2·df)) of each predictor, with those that it shares terms with."""
    chosen = np.arange(len(places))
    if exact and len(places):
        # of columns that follow from each other as many as do not
        triangle, order = qr(correlation, pivoting=True, mode="r")
        independent = np.abs(np.diag(triangle)) > 1e-10
        chosen = np.sort(order[independent])
    spoiled = {
        name for tie in exact if _joins_strangers(model, tie) for name in owners_of(model, tie)
    }
    found: dict[str, float] = {}
    for group in joined_predictors(model):
        touched = np.isin(places[chosen], model.design.touched(group))
        own, rest = chosen[touched], chosen[~touched]
        log = sum(_log_determinant(correlation, part) for part in (own, rest))
        log -= _log_determinant(correlation, chosen)
        # rounding can take a factor of 1 below it
        stretch = math.exp(max(log, 0.0) / (2 * len(own))) if len(own) else 1.0
        found |= {name: math.inf if name in spoiled else stretch for name in group}
    return {facts.name: found[facts.name] for facts in model.subject.predictors}


def _log_determinant(correlation: Floats, places: Places) -> float:
    if not len(places):
        return 0.0
    sign, log = np.linalg.slogdet(correlation[np.ix_(places, places)])
    return float(log) if sign > 0 else -80.0
