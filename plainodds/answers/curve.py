"""The chance, or its slope, along one predictor."""

from __future__ import annotations

from itertools import product
from typing import ClassVar, Literal, TypeAlias

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.averaging import Averager, Exact
from plainodds.answers.delta import Intervals, checked_level, mapped, wald
from plainodds.answers.points import POINTS, grid_along
from plainodds.answers.population import everyone
from plainodds.answers.questions import Answer, Question
from plainodds.answers.support import Support, is_supported, support_of
from plainodds.errors import QuestionRefused
from plainodds.model.fitted import FittedModel, checked, code_values
from plainodds.model.predictors import PredictorFacts, Subject
from plainodds.scales import (
    linear_predictor_from_probability,
    odds_from_linear_predictor,
    probability_curvature,
    probability_from_linear_predictor,
    probability_slope,
)
from plainodds.values import Pairs, Scalar, value

__all__ = [
    "CurveAnswer",
    "CurveLine",
    "CurveQuestion",
    "Others",
    "Scale",
    "Support",
    "answer_curve",
]

Floats = NDArray[np.float64]

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


def answer_curve(
    model: FittedModel, question: CurveQuestion, averager: Averager | None = None
) -> CurveAnswer:
    """The chance, its slope, the odds or η along a predictor, with intervals.

    With the others held, Wald intervals on η are carried over to the scale asked for
    (Hosmer, Lemeshow & Sturdivant), so that a chance stays within 0 and 1. With the
    others as observed, the delta method works on the logit of the averaged chance
    (Muller & MacLehose 2014). Slopes have Wald intervals on their own scale, with the
    exact gradient (Greene, Econometric Analysis).

    Parameters
    ----------
    model : FittedModel
    question : CurveQuestion
    averager : Averager, optional
        What averages over the rows; exactly over every row when left out.

    Raises
    ------
    QuestionRefused
        For an unknown predictor, level or value, a slope along levels, or `by` being
        the predictor itself.
    """
    level = checked_level(question.level)
    model.refuse_case_control()
    facts = model.subject.predictor(question.predictor)
    by = _by_facts(model, question)
    if question.scale not in ("probability", "slope", "odds", "linear_predictor"):
        raise QuestionRefused(
            f"scale={question.scale!r}: choose probability, slope, odds or linear_predictor."
        )
    if question.scale == "slope" and not facts.is_number:
        raise QuestionRefused(
            f"{facts.name} has levels and no slope between them; ask for scale='probability' and "
            "compare the levels' chances."
        )
    at = _points_along(facts, question.at)
    values = _by_values(by, question.by_values) if by is not None else (None,)
    if question.others == "observed":
        held: Pairs = ()
        averager = averager or Exact(model, everyone(model))
        found = _observed(model, averager, question, facts, by, at, values, level)
    else:
        profile = model.completed({} if question.others == "typical" else _stated(question))
        moving = {facts.name} | ({by.name} if by is not None else set())
        held = tuple((name, v) for name, v in profile if name not in moving)
        found = _held(model, question, profile, at, values, level)
    support = support_of(model, facts, by, values)
    lines = tuple(
        _line(found, facts, b, at, place * len(at), support[place])
        for place, b in enumerate(values)
    )
    return CurveAnswer(question, model.subject, lines, support, held)


def _by_facts(model: FittedModel, question: CurveQuestion) -> PredictorFacts | None:
    if question.by is None:
        if question.by_values:
            raise QuestionRefused("by_values= names values, but by= names no predictor.")
        return None
    if question.by == question.predictor:
        raise QuestionRefused(f"{question.by!r} cannot be drawn along itself; choose another by=.")
    return model.subject.predictor(question.by)


def _stated(question: CurveQuestion) -> dict[str, Scalar]:
    if isinstance(question.others, str):
        raise QuestionRefused(
            f"others={question.others!r}: choose 'typical', 'observed' or a mapping of values."
        )
    stated = dict(question.others)
    for name in (question.predictor, question.by):
        if name in stated:
            raise QuestionRefused(f"others= holds {name!r}, which the curve itself moves.")
    return stated


def _points_along(facts: PredictorFacts, stated: tuple[Scalar, ...]) -> tuple[Scalar, ...]:
    if stated:
        return tuple(checked(facts, each) for each in stated)
    if not facts.is_number:
        return facts.levels
    return tuple(checked(facts, float(x)) for x in grid_along(facts, POINTS))


def _by_values(by: PredictorFacts, stated: tuple[Scalar, ...]) -> tuple[Scalar, ...]:
    if stated:
        return tuple(dict.fromkeys(checked(by, each) for each in stated))
    return by.levels or tuple(dict.fromkeys(checked(by, each) for each in by.quartiles))


def _held(
    model: FittedModel,
    question: CurveQuestion,
    profile: Pairs,
    at: tuple[Scalar, ...],
    values: tuple[Scalar | None, ...],
    level: float,
) -> Intervals:
    """Estimates at a held profile, the lines one after the other."""
    base = dict(profile)
    profiles = []
    for b, x in product(values, at):
        moved = {question.predictor: x} | ({} if question.by is None else {question.by: b})
        profiles.append(tuple({**base, **moved}.items()))
    rows = model.rows(profiles)
    eta = rows @ model.coefficients + model.offset
    if question.scale == "slope":
        row_slopes = model.design.row_derivatives(question.predictor, model.coded(profiles))
        pi = probability_from_linear_predictor(eta)
        steepness = row_slopes @ model.coefficients
        gradients = (
            probability_slope(pi)[:, None] * row_slopes
            + (probability_curvature(pi) * steepness)[:, None] * rows
        )
        return wald(model, probability_slope(pi) * steepness, gradients, level)
    return _on_scale(wald(model, eta, rows, level), question.scale)


def _observed(
    model: FittedModel,
    averager: Averager,
    question: CurveQuestion,
    facts: PredictorFacts,
    by: PredictorFacts | None,
    at: tuple[Scalar, ...],
    values: tuple[Scalar | None, ...],
    level: float,
) -> Intervals:
    """Averages over the rows, the lines one after the other."""
    points = list(product(values, at))
    moved = {facts.name: code_values(facts, [x for _, x in points])}
    if by is not None:
        moved[by.name] = code_values(by, [b for b, _ in points if b is not None])
    if question.scale == "slope":
        slopes = averager.slope(facts.name, moved)
        return wald(model, slopes.value, slopes.gradient, level)
    averages = averager.probability(moved)
    eta = linear_predictor_from_probability(averages.value)
    with np.errstate(divide="ignore", invalid="ignore"):
        gradients = averages.gradient / probability_slope(averages.value)[:, None]
    return _on_scale(wald(model, eta, gradients, level), question.scale)


def _on_scale(intervals: Intervals, scale: Scale) -> Intervals:
    if scale == "linear_predictor":
        return intervals
    if scale == "odds":
        return mapped(intervals, odds_from_linear_predictor, odds_from_linear_predictor)
    return mapped(
        intervals,
        probability_from_linear_predictor,
        lambda eta: probability_slope(probability_from_linear_predictor(eta)),
    )


def _line(
    found: Intervals,
    facts: PredictorFacts,
    by: Scalar | None,
    at: tuple[Scalar, ...],
    start: int,
    support: Support,
) -> CurveLine:
    def part(values: Floats) -> tuple[float, ...]:
        return tuple(values[start : start + len(at)].tolist())

    supported = tuple(is_supported(facts, support, x) for x in at)
    if found.se is None or found.lower is None or found.upper is None:
        return CurveLine(by, at, part(found.estimate), None, None, None, supported)
    ends = part(found.lower), part(found.upper)
    return CurveLine(by, at, part(found.estimate), part(found.se), *ends, supported)
