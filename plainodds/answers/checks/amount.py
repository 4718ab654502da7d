"""How much data there is: in all, for each level, and what was lost."""

from __future__ import annotations

import math
from typing import ClassVar

import numpy as np

from plainodds.answers.checks.finding import Concern, Evidence, Finding, Topic
from plainodds.answers.checks.smoothing import wilson
from plainodds.answers.estimate import Estimate
from plainodds.model.design.design import Floats
from plainodds.model.fitted import FittedModel
from plainodds.model.products import transposed_product
from plainodds.values import Pairs, Scalar, value

__all__ = [
    "AMOUNT_REASONS",
    "LEVELS_REASONS",
    "MISSING_REASONS",
    "AmountEvidence",
    "LevelCount",
    "LevelsEvidence",
    "MissingEvidence",
    "amount_of",
    "difference_of_shares",
    "levels_of",
    "missing_of",
]

AMOUNT_REASONS = ("few events",)
LEVELS_REASONS = ("one outcome only", "few events")
MISSING_REASONS = ("many", "differ")

# Events of the rarer outcome for each coefficient. From 10 on Peduzzi et al. 1996 (J Clin
# Epidemiol 49:1373) found no major trouble; between 5 and 10 Vittinghoff & McCulloch 2007 (Am J
# Epidemiol 165:710) found it seldom, below 5 often enough. What each weighs is ours.
_ENOUGH = 10.0
_TOO_FEW = 5.0
# Cases of one outcome at a level: common practice, no source.
_SPARSE = 5.0
# Share of rows left out above which Bennett 2001 (Aust N Z J Public Health 25:464) expects bias.
_MANY = 0.10
# Left-out rows may differ by chance or by too little to matter: this much, beyond a 95 %
# interval. Common practice, no source.
_MATTERS = 0.03
_SURE = 0.95
# Sums of shares times trials differ from whole numbers in the last digits.
_NONE = 1e-6


@value
class AmountEvidence(Evidence):
    """Events for each coefficient.

    Attributes
    ----------
    events, others : float
        Cases with the event and without it.
    parameters : int
        Coefficients without the intercept.
    events_per_parameter : float
        Of the rarer of the two outcomes.
    """

    topic: ClassVar[Topic] = "amount"

    events: float
    others: float
    parameters: int
    events_per_parameter: float


@value
class LevelCount:
    """One level's cases.

    Attributes
    ----------
    predictor : str
    level : scalar
    cases, events : float
    """

    predictor: str
    level: Scalar
    cases: float
    events: float


@value
class LevelsEvidence(Evidence):
    """The cases of every level, the sparse ones first.

    Attributes
    ----------
    counts : tuple of LevelCount
    sparse : int
        How many of them, from the start, are sparse.
    """

    topic: ClassVar[Topic] = "levels"

    counts: tuple[LevelCount, ...]
    sparse: int


@value
class MissingEvidence(Evidence):
    """Rows that the fit left out because something was missing.

    Attributes
    ----------
    used, dropped : int
    columns : pairs of (column, int)
        In how many of the dropped rows each column is missing, most first.
    known : int
        Dropped rows whose outcome is known.
    share_used, share_dropped : float
        Of events; the latter among the known, nan where there are none.
    difference : Estimate or None
        share_dropped − share_used, with Newcombe's interval (hybrid score, 1998).
    """

    topic: ClassVar[Topic] = "missing"

    used: int
    dropped: int
    columns: Pairs
    known: int
    share_used: float
    share_dropped: float
    difference: Estimate | None


def amount_of(model: FittedModel) -> Finding:
    """Events for each coefficient."""
    sample = model.sample
    if sample.outcome is None:
        return Finding("amount", "not known", unknown="no outcome")
    cases = np.ones(sample.rows) if sample.cases is None else sample.cases
    events = float(cases @ sample.outcome)
    others = float(cases.sum()) - events
    parameters = _parameters(model)
    each = min(events, others) / parameters
    concern: Concern = "nothing found"
    if each < _ENOUGH:
        concern = "keep in mind" if each >= _TOO_FEW else "don't explain yet"
    return Finding(
        "amount",
        concern,
        reasons=() if concern == "nothing found" else ("few events",),
        evidence=AmountEvidence(events, others, parameters, each),
    )


def levels_of(model: FittedModel) -> Finding:
    """Cases and events of every level that some row has."""
    outcome_known = model.sample.outcome is not None
    counts = [
        LevelCount(facts.name, level, cases, events)
        for facts in model.subject.predictors
        for level, cases, events in zip(
            facts.levels,
            facts.level_cases,
            facts.level_events or (math.nan,) * len(facts.levels),
            strict=True,
        )
        if cases > 0
    ]
    if not outcome_known:
        evidence = LevelsEvidence(tuple(counts), 0)
        return Finding("levels", "not known", evidence=evidence, unknown="no outcome")
    sparse = sorted((each for each in counts if _rarer(each) < _SPARSE), key=_rarer)
    alone = [each for each in sparse if _rarer(each) <= _NONE]
    rest = [each for each in counts if each not in sparse]
    concern: Concern = "nothing found"
    if sparse:
        concern = "don't explain yet" if alone else "keep in mind"
    reasons = (("one outcome only",) if alone else ()) + (
        ("few events",) if len(sparse) > len(alone) else ()
    )
    return Finding(
        "levels",
        concern,
        reasons=reasons,
        about=tuple(dict.fromkeys(each.predictor for each in sparse)),
        evidence=LevelsEvidence((*sparse, *rest), len(sparse)),
    )


def missing_of(model: FittedModel, level: float) -> Finding:
    """Rows left out for missing values, and whether events are as frequent among them."""
    sample, dropped = model.sample, model.record.dropped
    if dropped is None:
        return Finding("missing", "not known", unknown="not said by the fit")
    share_used = math.nan if sample.outcome is None else float(sample.outcome.mean())
    share_dropped, difference, differ = math.nan, None, False
    if dropped.known and sample.outcome is not None:
        share_dropped = dropped.events / dropped.known
        compared = (dropped.events, dropped.known, float(sample.outcome.sum()), sample.rows)
        difference = difference_of_shares(*compared, level)
        sure = difference_of_shares(*compared, _SURE)
        apart = sure.lower is not None and sure.upper is not None and sure.lower * sure.upper > 0
        differ = apart and abs(difference.estimate) > _MATTERS
    many = dropped.rows > _MANY * (dropped.rows + sample.rows)
    return Finding(
        "missing",
        "keep in mind" if many or differ else "nothing found",
        reasons=(("many",) if many else ()) + (("differ",) if differ else ()),
        evidence=MissingEvidence(
            used=sample.rows,
            dropped=dropped.rows,
            columns=dropped.columns,
            known=dropped.known,
            share_used=share_used,
            share_dropped=share_dropped,
            difference=difference,
        ),
        unknown="no outcome" if dropped.rows and difference is None else "",
    )


def difference_of_shares(
    events: float, cases: float, other_events: float, other_cases: float, level: float
) -> Estimate:
    """A difference of two shares, with Newcombe's hybrid score interval.

    Each end joins the distances of both shares to an end of their Wilson intervals. Source:
    Newcombe 1998 (Statistics in Medicine 17:873), method 10.
    """
    n = np.array([cases, other_cases], dtype=float)
    p = np.array([events, other_events], dtype=float) / n
    low, high = wilson(p, n, level)
    difference = float(p[0] - p[1])
    return Estimate(
        difference,
        math.sqrt(float((p * (1 - p) / n).sum())),
        difference - math.hypot(p[0] - low[0], high[1] - p[1]),
        difference + math.hypot(high[0] - p[0], p[1] - low[1]),
    )


def _rarer(count: LevelCount) -> float:
    return min(count.events, count.cases - count.events)


def _parameters(model: FittedModel) -> int:
    """Coefficients without the intercept, or without what stands for one."""
    columns = model.design.columns
    of_predictors = sum(bool(column.atoms) for column in columns)
    stands_for_one = of_predictors == len(columns) and _spans_a_constant(model.sample.matrix)
    return max(1, of_predictors - stands_for_one)


def _spans_a_constant(matrix: Floats) -> bool:
    """Whether some sum of columns is 1 in every row, as of a category's full dummies."""
    ones = np.ones((len(matrix), 1))
    products = transposed_product(matrix, np.concatenate([matrix, ones], axis=1))
    weights = np.linalg.pinv(products[:, :-1], hermitian=True) @ products[:, -1]
    return bool(np.allclose(np.einsum("ij,j->i", matrix, weights), 1.0, atol=1e-6))
