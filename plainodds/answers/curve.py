"""The chance, or its slope, along one predictor."""

from __future__ import annotations

from typing import ClassVar, Literal, TypeAlias

from plainodds.answers.questions import Answer, Question
from plainodds.model.predictors import Subject
from plainodds.values import Pairs, Scalar, value

__all__ = ["CurveAnswer", "CurveLine", "CurveQuestion", "Others", "Scale", "Support"]

Others: TypeAlias = Literal["typical", "observed"] | Pairs
Scale: TypeAlias = Literal["probability", "slope", "odds", "linear_predictor"]


@value
class CurveQuestion(Question):
    """How does the chance change along a predictor?

    Attributes
    ----------
    predictor : str
    by : str or None
        A second predictor: one line for each of its values.
    by_values : tuple of scalars
        Its values; empty for every level, or for a number's quartiles.
    others : "typical", "observed" or pairs of (predictor, value)
        What the remaining predictors do: held at the typical profile; each row keeps
        its own and the probabilities are averaged; held at stated values, the rest typical.
    scale : {"probability", "slope", "odds", "linear_predictor"}
        "slope" is the marginal effect dπ/dx.
    at : tuple of scalars
        The predictor's values; empty for a grid over the data's range, or every level.
    level : float
    """

    predictor: str
    by: str | None = None
    by_values: tuple[Scalar, ...] = ()
    others: Others = "typical"
    scale: Scale = "probability"
    at: tuple[Scalar, ...] = ()
    level: float = 0.95

    method: ClassVar[str] = "curve"
    positional: ClassVar[tuple[str, ...]] = ("predictor",)


@value
class CurveLine:
    """One line: estimates along the predictor for one value of `by`.

    Attributes
    ----------
    by : scalar or None
    at : tuple of scalars
        Values of the predictor.
    estimate : tuple of float
    se, lower, upper : tuple of float, or None where no interval can be had
    supported : tuple of bool
        Whether the data have rows near this point (for this value of `by`).
    """

    by: Scalar | None
    at: tuple[Scalar, ...]
    estimate: tuple[float, ...]
    se: tuple[float, ...] | None
    lower: tuple[float, ...] | None
    upper: tuple[float, ...] | None
    supported: tuple[bool, ...]


@value
class Support:
    """Where the data are along the predictor, for one value of `by`: counts, no rows.

    Attributes
    ----------
    by : scalar or None
    edges : tuple of float
        Bin edges, one more than counts; empty for levels.
    counts : tuple of int
        Rows in each bin, or of each level.
    """

    by: Scalar | None
    edges: tuple[float, ...]
    counts: tuple[int, ...]


@value
class CurveAnswer(Answer):
    """A curve with its uncertainty and the data's support.

    Attributes
    ----------
    question : CurveQuestion
    subject : Subject
    lines : tuple of CurveLine
    support : tuple of Support
        Parallel to `lines`.
    held : pairs of (predictor, value)
        At what the remaining predictors are held; empty where they are as observed.
    """

    question: CurveQuestion
    subject: Subject
    lines: tuple[CurveLine, ...]
    support: tuple[Support, ...]
    held: Pairs
