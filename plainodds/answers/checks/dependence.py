"""Whether rows that belong together were counted as if they were strangers."""

from __future__ import annotations

import math
from typing import ClassVar

import numpy as np

from plainodds.answers.checks.finding import Concern, Evidence, Finding, Topic
from plainodds.answers.checks.fitted_rows import fitted_rows, unknown_rows
from plainodds.answers.groups import Grouping
from plainodds.model.design.design import Floats
from plainodds.model.fitted import FittedModel
from plainodds.model.products import product
from plainodds.values import value

__all__ = [
    "REASONS",
    "DependenceEvidence",
    "StandardErrorPair",
    "covariance_by_groups",
    "dependence_of",
]

REASONS = ("standard errors differ", "repeated rows", "few groups")

# By groups a standard error is this many times, or less than one in so many of, the one that
# takes rows as strangers. Common practice, no source.
_DIFFER = 1.25
# Chance alone makes it vary, the more the fewer groups there are and the more it hangs on some of
# them: so many of its own standard deviations, for several coefficients are looked at.
_BY_CHANCE = 3.0
# Intervals told half as wide as they should be.
_DOUBLE = 2.0
# Below this many groups the covariance by groups is itself too small and uncertain; Cameron,
# Gelbach & Miller 2008 (Rev Econ Stat 90:414) look at 5 to 30.
_FEW_GROUPS = 30
# Covariances of a result that count rows of a group together; those of a GEE have the first three.
_BY_GROUPS = ("robust", "naive", "bias_reduced", "cluster", "hac-groupsum", "hac-panel")


@value
class StandardErrorPair:
    """One coefficient's standard error, as if rows were strangers and by groups.

    Attributes
    ----------
    column : str
    predictors : tuple of str
    model_based, by_groups : float
    """

    column: str
    predictors: tuple[str, ...]
    model_based: float
    by_groups: float


@value
class DependenceEvidence(Evidence):
    """Groups of rows, and what they do to standard errors.

    Attributes
    ----------
    name : str
        The column that says which rows belong together; empty where only the fit knows.
    groups, largest : int
        How many, and the rows of the largest; 0 where only the fit knows.
    rows : int
    standard_errors : tuple of StandardErrorPair
        By groups: the cluster-robust covariance of Liang & Zeger 1986, with the usual
        G/(G−1) correction; the fit's own where only the fit knows the groups. Empty without
        outcome, and for fits without a covariance.
    already : bool
        Whether the fit's own covariance takes groups into account.
    """

    topic: ClassVar[Topic] = "dependence"

    name: str
    groups: int
    largest: int
    rows: int
    standard_errors: tuple[StandardErrorPair, ...]
    already: bool


def dependence_of(model: FittedModel, groups: Grouping | None) -> Finding:
    """What groups of rows do to standard errors.

    Parameters
    ----------
    model : FittedModel
    groups : Grouping or None
        Which rows belong together; None where nobody said.
    """
    already = model.subject.covariance_kind in _BY_GROUPS
    if groups is None:
        if not already or model.covariance is None:
            return Finding("dependence", "not known", unknown="no groups named")
        own = DependenceEvidence("", 0, 0, model.sample.rows, _pairs(model, model.covariance), True)
        return Finding("dependence", "nothing found", evidence=own)
    repeated = groups.largest > 1
    why = unknown_rows(model) or ("no covariance" if model.covariance is None else "")
    moves = np.zeros((0, 0)) if why else _moves(model, groups)
    pairs = () if why else _pairs(model, _covariance(moves))
    evidence = DependenceEvidence(
        groups.name, groups.count, groups.largest, model.sample.rows, pairs, already
    )
    if why and repeated and not already:
        return Finding("dependence", "keep in mind", ("repeated rows",), (), evidence, why)
    few = repeated and groups.count < _FEW_GROUPS
    # with as many groups as rows, standard errors differ for other reasons than groups
    apart = [] if already or why or not repeated else _apart(moves, pairs)
    concern: Concern = "keep in mind" if apart or few else "nothing found"
    if not few and any(pair.by_groups > _DOUBLE * pair.model_based for pair in apart):
        concern = "don't explain yet"
    return Finding(
        "dependence",
        concern,
        reasons=(("standard errors differ",) if apart else ()) + (("few groups",) if few else ()),
        about=tuple(dict.fromkeys(name for pair in apart for name in pair.predictors)),
        evidence=evidence,
        unknown=why,
    )


def covariance_by_groups(model: FittedModel, groups: Grouping) -> Floats:
    """The covariance of Liang & Zeger 1986 (Biometrika 73:13), times G/(G−1).

    A⁻¹ (Σ_g s_g s_g') A⁻¹, with A the model-based information and s_g the sum of a group's
    score contributions.

    Raises
    ------
    ValueError
        Where the outcome is not known.
    """
    return _covariance(_moves(model, groups))


def _covariance(moves: Floats) -> Floats:
    return moves.T @ moves * (len(moves) / (len(moves) - 1))


def _moves(model: FittedModel, groups: Grouping) -> Floats:
    """A⁻¹ s_g for each group, shape (G, k): about how far it moves the coefficients."""
    residual = fitted_rows(model).residual
    scores = [
        np.bincount(groups.of_row, weights=residual * column, minlength=groups.count)
        for column in model.sample.matrix.T
    ]
    return product(np.column_stack(scores), model.information_inverse)


def _apart(moves: Floats, pairs: tuple[StandardErrorPair, ...]) -> list[StandardErrorPair]:
    """Standard errors that differ by more than matters, and by more than chance does."""
    groups, squares = len(moves), moves**2
    total = squares.sum(axis=0)
    with np.errstate(divide="ignore", invalid="ignore"):
        # the sampling variance of a sum of squares, relative to it; half of it on the root's scale
        relative = (squares**2).sum(axis=0) / total**2 - 1 / groups
        by_chance = _BY_CHANCE * np.sqrt(np.maximum(relative, 2 / (groups - 1))) / 2
    differ = np.maximum(math.log(_DIFFER), np.nan_to_num(by_chance, nan=np.inf))
    return [pair for pair, far in zip(pairs, differ, strict=True) if _change(pair) > far]


def _pairs(model: FittedModel, by_groups: Floats) -> tuple[StandardErrorPair, ...]:
    with np.errstate(invalid="ignore"):
        model_based = np.sqrt(np.diag(model.information_inverse))
        robust = np.sqrt(np.diag(by_groups))
    return tuple(
        StandardErrorPair(
            column.name, tuple(sorted(model.design.variables_of(column))), float(one), float(other)
        )
        for column, one, other in zip(model.design.columns, model_based, robust, strict=True)
    )


def _change(pair: StandardErrorPair) -> float:
    """By what a standard error differs, as |log ratio|; 0 where one is not known."""
    if not (pair.model_based > 0 and pair.by_groups > 0):
        return 0.0
    return abs(math.log(pair.by_groups / pair.model_based))
