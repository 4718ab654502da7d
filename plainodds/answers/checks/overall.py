"""Overall tests and measures, reported with their known limits, never as a verdict."""

from __future__ import annotations

import math
from typing import ClassVar

import numpy as np
from scipy.stats import chi2

from plainodds.answers.checks.calibration import calibration_gap, grouped_by_chance
from plainodds.answers.checks.curvature import curvature
from plainodds.answers.checks.finding import Evidence, Finding, Topic
from plainodds.answers.checks.fitted_rows import (
    FEWEST,
    FittedRows,
    fitted_rows,
    has_score_tests,
    unknown_rows,
)
from plainodds.answers.checks.refitting import refitted
from plainodds.answers.checks.shape import bend_concern, partly_unknown
from plainodds.model.fitted import FittedModel
from plainodds.values import value

__all__ = ["REASONS", "OverallEvidence", "hosmer_lemeshow", "overall_of"]

REASONS = ("link test",)


@value
class OverallEvidence(Evidence):
    """Figures that journals ask for.

    Attributes
    ----------
    groups : int
        Of the Hosmer & Lemeshow test.
    statistic : float
    degrees_of_freedom : int
    p_value : float
        nan where the statistic has no χ² distribution.
    tjur, mcfadden : float
        Coefficients of discrimination (Tjur 2009) and McFadden's R² (1974), the latter
        by the likelihood of single cases, grouped or not.
    link_p_value : float
        Score test of η² added to the model (Pregibon 1980).
    """

    topic: ClassVar[Topic] = "overall"

    groups: int
    statistic: float
    degrees_of_freedom: int
    p_value: float
    tjur: float
    mcfadden: float
    link_p_value: float


def overall_of(model: FittedModel) -> Finding:
    """Hosmer & Lemeshow's statistic, two R² and the link test.

    Only the link test can raise a concern, and only where chances are off by an amount that
    matters: in a large sample every test of a model's fit fails.
    """
    unknown = unknown_rows(model, FEWEST)
    if unknown:
        return Finding("overall", "not known", unknown=unknown)
    rows, link = fitted_rows(model), curvature(model).link
    groups, statistic = hosmer_lemeshow(rows)
    tested, freedom = has_score_tests(model), max(groups - 2, 0)
    evidence = OverallEvidence(
        groups=groups,
        statistic=statistic,
        degrees_of_freedom=freedom,
        p_value=float(chi2.sf(statistic, freedom)) if tested and freedom else math.nan,
        tjur=_tjur(rows),
        mcfadden=_mcfadden(model, rows),
        link_p_value=link.p_value if tested else math.nan,
    )
    concern = bend_concern(model, link, calibration_gap(model))
    if concern == "don't explain yet":
        # a heavy miscalibration is told where it can be seen, at calibration
        concern = "keep in mind"
    reasons = REASONS if concern == "keep in mind" else ()
    return Finding("overall", concern, reasons, (), evidence, partly_unknown(model))


def hosmer_lemeshow(rows: FittedRows) -> tuple[int, float]:
    """How many groups there are, and the statistic over them.

    Rows of one chance stay in one group. Source: Hosmer & Lemeshow 1980 (Commun Stat
    A9:1043).
    """
    groups = grouped_by_chance(rows)
    expected = groups.expected
    with np.errstate(divide="ignore", invalid="ignore"):
        parts = groups.cases * (groups.observed - expected) ** 2 / (expected * (1 - expected))
    return len(parts), float(np.nansum(parts))


def _tjur(rows: FittedRows) -> float:
    events = rows.weights * rows.outcome
    others = rows.weights - events
    among_events = float(events @ rows.probability) / float(events.sum())
    return among_events - float(others @ rows.probability) / float(others.sum())


def _mcfadden(model: FittedModel, rows: FittedRows) -> float:
    eta, w, y = rows.linear_predictor, rows.weights, rows.outcome
    softplus = np.maximum(eta, 0.0) + np.log1p(np.exp(-np.abs(eta)))
    deviance = 2 * float(w @ (softplus - y * eta))
    ones = np.ones((len(eta), 1))
    start = np.array([math.log(rows.share / (1 - rows.share))])
    # the model that says nothing keeps the offset, which is known beforehand
    nothing = refitted(ones, y, w, start, model.sample.offset)
    return 1 - deviance / nothing.deviance
