"""One profile on all three scales, against another, with its ledger."""

from __future__ import annotations

from typing import ClassVar, Literal

from plainodds.answers.estimate import Estimate
from plainodds.answers.questions import Answer, Question
from plainodds.model.predictors import Subject
from plainodds.values import Pairs, value

__all__ = [
    "Comparison",
    "Familiarity",
    "LedgerRow",
    "ProfileAnswer",
    "ProfilePoint",
    "ProfileQuestion",
]


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
class Familiarity:
    """How familiar a profile is to the data.

    Attributes
    ----------
    leverage : float
        x₀'(X'WX)⁻¹x₀ of the profile.
    common_leverage, largest_leverage : float
        99th percentile and largest leverage among the rows; nan where the model
        carries no rows.
    rows_alike : int
        Rows of the same levels, each number within half a standard deviation.
    beyond : tuple of str
        Predictors whose value lies outside the data's range.
    verdict : {"familiar", "rare", "beyond"}
        "beyond" where a value is outside the range or the leverage is larger than
        every row's; "rare" where no row is alike or the leverage is above the 99th
        percentile.
    """

    leverage: float
    common_leverage: float
    largest_leverage: float
    rows_alike: int
    beyond: tuple[str, ...]
    verdict: Literal["familiar", "rare", "beyond"]


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
    """

    values: Pairs
    linear_predictor: Estimate
    odds: Estimate
    probability: Estimate
    familiarity: Familiarity


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
class Comparison:
    """A profile compared with another: from `against` to `values`.

    Attributes
    ----------
    odds_ratio, risk_difference, risk_ratio : Estimate
        By one joint delta method; ratios on the log scale.
    """

    odds_ratio: Estimate
    risk_difference: Estimate
    risk_ratio: Estimate


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
