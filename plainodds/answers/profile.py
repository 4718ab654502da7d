"""One profile on all three scales, against another, with its ledger."""

from __future__ import annotations

from dataclasses import replace
from typing import ClassVar

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.bounded import as_ratio, limits_of, unbounded_estimate
from plainodds.answers.comparing import Comparison, compared
from plainodds.answers.delta import Intervals, checked_level, mapped, wald
from plainodds.answers.estimate import Estimate
from plainodds.answers.familiarity import Familiarity, familiarity_of
from plainodds.answers.questions import Answer, Question
from plainodds.answers.sharing_terms import joined_predictors
from plainodds.model.fitted import FittedModel
from plainodds.model.predictors import Subject
from plainodds.scales import (
    odds_from_linear_predictor,
    probability_from_linear_predictor,
    probability_slope,
)
from plainodds.values import Pairs, value

__all__ = [
    "Comparison",
    "Familiarity",
    "LedgerRow",
    "ProfileAnswer",
    "ProfilePoint",
    "ProfileQuestion",
    "answer_profile",
]

Floats = NDArray[np.float64]


@value
class ProfileQuestion(Question):
    """What is the chance for this profile, and what makes it so?

    Attributes
    ----------
    values : pairs of (predictor, value)
        Stated values; the remaining predictors are typical.
    against : pairs of (predictor, value), or None
        A second profile to compare with; its remaining predictors are typical too.
    level : float
    """

    values: Pairs = ()
    against: Pairs | None = None
    level: float = 0.95

    method: ClassVar[str] = "profile"
    positional: ClassVar[tuple[str, ...]] = ("values",)


@value
class ProfilePoint:
    """A profile on the three scales.

    Attributes
    ----------
    values : pairs of (predictor, value)
        Every predictor's value.
    linear_predictor, odds, probability : Estimate
        The intervals of odds and probability are that of η, carried over.
    familiarity : Familiarity
    limit : float
        Where the maximum of the likelihood takes η: 0 for a finite value, +inf or −inf
        where the data are separated and η has no finite estimate, nan where they leave it
        undetermined. Where it is not 0 the figures are where the fit happened to stop.
    """

    values: Pairs
    linear_predictor: Estimate
    odds: Estimate
    probability: Estimate
    familiarity: Familiarity
    limit: float = 0.0


@value
class LedgerRow:
    """What one group of predictors adds.

    Attributes
    ----------
    predictors : tuple of str
        A predictor, or predictors that share a term.
    adds : Estimate
        What moving the group from the start's values adds to η.
    multiplies : Estimate
        By what that multiplies the odds.
    running_linear_predictor, running_probability : float
        η and π after this row.
    """

    predictors: tuple[str, ...]
    adds: Estimate
    multiplies: Estimate
    running_linear_predictor: float
    running_probability: float


@value
class ProfileAnswer(Answer):
    """One profile explained.

    Attributes
    ----------
    question : ProfileQuestion
    subject : Subject
    point : ProfilePoint
    start : ProfilePoint
        Where the ledger starts: the profile compared with, or the typical one.
    comparison : Comparison or None
        None where nothing was asked to compare with.
    ledger : tuple of LedgerRow
        Adds up from `start` to `point`.
    """

    question: ProfileQuestion
    subject: Subject
    point: ProfilePoint
    start: ProfilePoint
    comparison: Comparison | None
    ledger: tuple[LedgerRow, ...]


def answer_profile(model: FittedModel, question: ProfileQuestion) -> ProfileAnswer:
    """η, odds and π of a profile, its comparison with another, and the ledger.

    Intervals are Wald on η, carried over to odds and probability (Agresti). The
    comparison's differences and ratios come from one joint delta method, ratios on the
    log scale (Localio 2007).

    Raises
    ------
    QuestionRefused
        For an unknown predictor or level, or a value that cannot be computed.
    """
    level = checked_level(question.level)
    model.refuse_case_control()
    values = model.completed(question.values)
    against = None if question.against is None else model.completed(question.against)
    start_values = model.typical if against is None else against
    rows = model.rows([values, start_values])
    eta = wald(model, rows @ model.coefficients + model.offset, rows, level)
    limits = limits_of(model, np.vstack([rows, rows[:1] - rows[1:]]))
    point, start = (
        _point(model, each, rows[i], eta, i, float(limits[i]))
        for i, each in enumerate((values, start_values))
    )
    return ProfileAnswer(
        question=question,
        subject=model.subject,
        point=point,
        start=start,
        comparison=None
        if against is None
        else _comparison(model, rows, eta.estimate, float(limits[2]), level),
        ledger=_ledger(model, rows[0] - rows[1], float(eta.estimate[1]), level),
    )


def _point(
    model: FittedModel,
    values: Pairs,
    row: Floats,
    eta: Intervals,
    position: int,
    limit: float,
) -> ProfilePoint:
    odds = mapped(eta, odds_from_linear_predictor, odds_from_linear_predictor)
    probability = mapped(
        eta,
        probability_from_linear_predictor,
        lambda x: probability_slope(probability_from_linear_predictor(x)),
    )
    return ProfilePoint(
        values,
        eta.at(position),
        odds.at(position),
        probability.at(position),
        familiarity_of(model, values, row),
        limit,
    )


def _comparison(
    model: FittedModel, rows: Floats, eta: Floats, limit: float, level: float
) -> Comparison:
    pi = probability_from_linear_predictor(eta)
    gradient = probability_slope(pi)[:, None] * rows
    # from η itself, so that an odds ratio survives chances that round to 0 or 1
    log_odds_ratio = wald(model, eta[:1] - eta[1:], rows[:1] - rows[1:], level)
    odds_ratio = mapped(log_odds_ratio, np.exp, np.exp).at(0)
    if limit != 0:
        odds_ratio = as_ratio(unbounded_estimate(model, rows[0] - rows[1], limit, level))
    return replace(compared(model, pi[::-1], gradient[::-1], level), odds_ratio=odds_ratio)


def _ledger(
    model: FittedModel, contrast: Floats, start: float, level: float
) -> tuple[LedgerRow, ...]:
    """One row per group of predictors that share terms: so no order matters."""
    groups = joined_predictors(model)
    parts = np.zeros((len(groups), len(contrast)))
    for place, group in enumerate(groups):
        touched = model.design.touched(group)
        parts[place, touched] = contrast[touched]
    adds = wald(model, parts @ model.coefficients, parts, level)
    multiplies = mapped(adds, odds_from_linear_predictor, odds_from_linear_predictor)
    running = start + np.cumsum(adds.estimate)
    chances = probability_from_linear_predictor(running)
    return tuple(
        LedgerRow(group, adds.at(i), multiplies.at(i), float(running[i]), float(chances[i]))
        for i, group in enumerate(groups)
    )
