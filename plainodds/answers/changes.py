"""Which changes an odds question asks about, and at which values of their modifiers."""

from __future__ import annotations

import math
from collections.abc import Iterator, Mapping, Sequence
from itertools import product
from typing import Any, ClassVar, Literal

from plainodds.answers.estimate import Estimate
from plainodds.answers.questions import Question
from plainodds.errors import QuestionRefused
from plainodds.model.design.design import Floats
from plainodds.model.fitted import FittedModel, checked
from plainodds.model.predictors import PredictorFacts, Subject
from plainodds.values import Pairs, Scalar, value

__all__ = ["OddsQuestion", "OddsRow", "changes_asked", "contrasts_of"]


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
    interval : {"wald", "likelihood"}
        Estimate plus and minus standard errors, or the values that the likelihood allows.
    level : float
        Confidence level of the intervals.
    models : tuple of str
        Names of the fitted models where several are set side by side; else empty.
    layout : {"changes", "table"}
        How it is drawn: a row for each change, or as journals print it, with reference
        levels, counts, and tests of interaction as rows of their own.
    """

    predictors: tuple[str, ...] = ()
    steps: Pairs = ()
    between: Pairs = ()
    references: Pairs = ()
    given: Pairs = ()
    order: Literal["model", "size"] = "model"
    interval: Literal["wald", "likelihood"] = "wald"
    level: float = 0.95
    models: tuple[str, ...] = ()
    layout: Literal["changes", "table"] = "changes"

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
        Its `se` is that of the odds ratio itself (delta method). Infinite or 0, without
        `se`, where there is no finite estimate; nan where the data leave it undetermined.
    log_odds_ratio : Estimate
    p_value : float or None
        Wald test of an odds ratio of 1; the likelihood-ratio test where that was asked or
        the odds ratio has no finite estimate.
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


_UNKNOWN = Estimate(math.nan, None, None, None)


def changes_asked(model: FittedModel, question: OddsQuestion) -> Iterator[OddsRow]:
    """The rows to fill: every change at every stated combination of its modifiers."""
    subject = model.subject
    names = question.predictors or tuple(facts.name for facts in subject.predictors)
    steps, between = dict(question.steps), dict(question.between)
    references, given = dict(question.references), dict(question.given)
    for name in (*names, *steps, *between, *references, *given):
        subject.predictor(name)
    _refuse_idle_given(subject, names, given)
    for name in names:
        facts = subject.predictor(name)
        if facts.is_number:
            if name in references:
                raise QuestionRefused(
                    f"{name} is a number and has no reference level; name two values: "
                    f"between={{{name!r}: (from, to)}}."
                )
            compared = [_number_change(facts, steps.get(name), between.get(name))]
        else:
            compared = list(_level_changes(model, facts, steps, between, references))
        for start, end, per_step in compared:
            for held in _combinations(subject, facts, given):
                yield OddsRow(name, start, end, per_step, held, _UNKNOWN, _UNKNOWN, None)


def contrasts_of(model: FittedModel, changes: Sequence[OddsRow]) -> Floats:
    """x₁ − x₀ of every change, shape (len(changes), k)."""
    starts = [model.completed((*row.given, (row.predictor, row.start))) for row in changes]
    ends = [model.completed((*row.given, (row.predictor, row.end))) for row in changes]
    return model.rows(ends) - model.rows(starts)


def _number_change(facts: PredictorFacts, step: Any, between: Any) -> tuple[Scalar, Scalar, bool]:
    if step is not None and between is not None:
        raise QuestionRefused(f"{facts.name}: name a step or two values, not both.")
    if between is not None:
        start, end = _two_values(facts, between)
        return start, end, False
    if facts.linear:
        size = facts.step if step is None else step
        if isinstance(size, str) or not math.isfinite(size) or size == 0:
            raise QuestionRefused(f"{facts.name}: step={size!r} is not a number other than 0.")
        start = checked(facts, facts.typical)
        return start, checked(facts, float(start) + float(size)), True
    if step is not None:
        low, _, high = facts.quartiles
        raise QuestionRefused(
            f"{facts.name} enters the model along a curve, so a step of {step!r} multiplies the "
            f"odds differently at each value. Name two values: between={{{facts.name!r}: "
            f"({low:g}, {high:g})}}."
        )
    low, _, high = facts.quartiles
    if low == high:
        low, high = facts.minimum, facts.maximum
    return checked(facts, low), checked(facts, high), False


def _two_values(facts: PredictorFacts, stated: Any) -> tuple[Scalar, Scalar]:
    if isinstance(stated, str) or not isinstance(stated, tuple | list) or len(stated) != 2:
        raise QuestionRefused(f"{facts.name}: between={stated!r} is not two values, (from, to).")
    start, end = checked(facts, stated[0]), checked(facts, stated[1])
    if start == end:
        raise QuestionRefused(f"{facts.name}: from {start!r} to {end!r} is no change.")
    return start, end


def _level_changes(
    model: FittedModel,
    facts: PredictorFacts,
    steps: Mapping[str, Any],
    between: Mapping[str, Any],
    references: Mapping[str, Any],
) -> Iterator[tuple[Scalar, Scalar, bool]]:
    if facts.name in steps:
        raise QuestionRefused(
            f"{facts.name} has levels and no step; choose a reference: "
            f"references={{{facts.name!r}: {facts.levels[0]!r}}}."
        )
    if facts.name in between:
        start, end = _two_values(facts, between[facts.name])
        yield start, end, False
        return
    if facts.name in references:
        reference = checked(facts, references[facts.name])
    else:
        reference = facts.levels[model.coded_reference(facts)]
    for level in facts.levels:
        if level != reference and level in facts.levels_with_rows:
            yield reference, level, False


def _combinations(
    subject: Subject, facts: PredictorFacts, given: Mapping[str, Any]
) -> Iterator[Pairs]:
    modifiers = [subject.predictor(name) for name in facts.modifiers]
    choices = [
        _modifier_values(modifier, given.get(modifier.name), alone=len(modifiers) == 1)
        for modifier in modifiers
    ]
    for chosen in product(*choices):
        yield tuple((m.name, v) for m, v in zip(modifiers, chosen, strict=True))


def _modifier_values(facts: PredictorFacts, stated: Any, alone: bool) -> tuple[Scalar, ...]:
    if stated is not None:
        listed = stated if isinstance(stated, tuple | list) else (stated,)
        return tuple(dict.fromkeys(checked(facts, each) for each in listed))
    if facts.levels:
        return facts.levels
    # beside other modifiers one value keeps the rows few enough to read
    chosen = facts.quartiles if alone else (facts.typical,)
    return tuple(dict.fromkeys(checked(facts, each) for each in chosen))


def _refuse_idle_given(subject: Subject, names: tuple[str, ...], given: Mapping[str, Any]) -> None:
    modifiers = {m for name in names for m in subject.predictor(name).modifiers}
    for name in given:
        if name not in modifiers:
            raise QuestionRefused(
                f"given={{{name!r}: …}}: {name} shares no term with the predictors asked for, so "
                "their odds ratios are the same at each of its values."
            )
