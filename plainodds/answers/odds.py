"""Odds ratios for changes that mean something."""

from __future__ import annotations

from typing import ClassVar, Literal

from plainodds.answers.estimate import Estimate
from plainodds.answers.questions import Answer, Question
from plainodds.model.predictors import Subject
from plainodds.values import Pairs, Scalar, value

__all__ = ["OddsAnswer", "OddsQuestion", "OddsRow"]


@value
class OddsQuestion(Question):
    """By what are the odds multiplied when a predictor changes?

    Attributes
    ----------
    predictors : tuple of str
        Whose odds ratios; empty for all.
    steps : pairs of (predictor, float)
        The step of a number's row, where it is not the predictor's own.
    between : pairs of (predictor, (from, to))
        The two values that a predictor's row compares.
    references : pairs of (predictor, level)
        The level that a category's rows are compared with.
    given : pairs of (modifier, values)
        The modifiers' values at which an interacting predictor's rows are stated.
    order : {"model", "size"}
        Rows as the model mentions the predictors, or by the size of the odds ratio.
    level : float
        Confidence level of the intervals.
    models : tuple of str
        Names of the fitted models where several are set side by side; else empty.
    """

    predictors: tuple[str, ...] = ()
    steps: Pairs = ()
    between: Pairs = ()
    references: Pairs = ()
    given: Pairs = ()
    order: Literal["model", "size"] = "model"
    level: float = 0.95
    models: tuple[str, ...] = ()

    method: ClassVar[str] = "odds"


@value
class OddsRow:
    """One odds ratio and the change that it belongs to.

    Attributes
    ----------
    predictor : str
    start, end : scalar
        The change: from `start` to `end`. Where `per_step` is set only their
        difference matters.
    per_step : bool
        Whether the odds ratio is the same for every step of this size.
    given : pairs of (modifier, value)
        The modifiers' values for which the odds ratio holds; empty where there are none.
    odds_ratio : Estimate
        Its `se` is that of the odds ratio itself (delta method).
    log_odds_ratio : Estimate
    p_value : float or None
        Wald test of an odds ratio of 1.
    model : str
        The fitted model's name where several are set side by side; else empty.
    """

    predictor: str
    start: Scalar
    end: Scalar
    per_step: bool
    given: Pairs
    odds_ratio: Estimate
    log_odds_ratio: Estimate
    p_value: float | None
    model: str = ""


@value
class OddsAnswer(Answer):
    """Odds ratios, one row per change.

    Attributes
    ----------
    question : OddsQuestion
    subject : Subject
        Of the first model where there are several.
    rows : tuple of OddsRow
    typical_probability : float
        The chance at the typical profile: tells whether an odds ratio may be taken
        for a risk ratio (it may not above about 10 %).
    """

    question: OddsQuestion
    subject: Subject
    rows: tuple[OddsRow, ...]
    typical_probability: float
