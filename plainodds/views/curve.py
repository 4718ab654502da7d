"""CurveView: how the chance changes along a predictor."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import replace
from typing import Any

import ipywidgets as widgets

from plainodds.answers.curve import CurveAnswer, CurveLine, CurveQuestion, Scale
from plainodds.phrases.choices.curve import tabled_places
from plainodds.phrases.labels import (
    axis_title,
    line_label,
    predictor_label,
    scale_title,
    value_label,
)
from plainodds.phrases.numbers import (
    bare_points,
    bare_points_span,
    chance,
    count,
    quantity,
    ratio,
    ratio_interval,
    signed,
    span,
)
from plainodds.views import markup
from plainodds.views.controls import ChoiceControl, Control, slug
from plainodds.views.markup import Column, Markup, Row
from plainodds.views.others import OthersPart, without
from plainodds.views.parts import block, fill
from plainodds.views.several import values_control
from plainodds.views.sketched import SketchedView

__all__ = ["CurveView"]

_SCALES = (
    ("chance", "probability"),
    ("slope of the chance", "slope"),
    ("odds", "odds"),
    ("log odds", "linear_predictor"),
)
_MOST_LINES = 6


class CurveView(SketchedView):
    """How does the chance change along a predictor?

    Choose the predictor, a second one that gets a line for each of its values, what the
    others do, and the scale: chance, slope of the chance, odds or log odds.

    Parameters
    ----------
    result : statsmodels result or FittedLogit
    question : CurveQuestion, optional
        What is shown at the start; default: the first predictor that takes numbers, by a
        category that shares a term with it where there is one.

    Attributes
    ----------
    question : CurveQuestion
        May be set; ``view.question = fit.curve("age_years", others="observed").question``.
    answer : CurveAnswer
    is_exact : bool
        Whether `answer` is exact; by a sketch where rows are many and averaged over.

    Raises
    ------
    FitRefused
        If the result cannot be taken in.
    QuestionRefused
        If the question cannot be answered.

    Examples
    --------
    >>> import statsmodels.formula.api as smf
    >>> import plainodds as po
    >>> mains = po.demo.tessel_bay()
    >>> view = po.CurveView(smf.logit("burst ~ age_years * material", mains).fit(disp=0))
    >>> view.question.predictor, view.question.by
    ('age_years', 'material')
    """

    kind = "curve"
    asks = CurveQuestion
    exact_is_quick = False

    def __init__(self, result: Any, question: CurveQuestion | None = None) -> None:
        self._by_values: dict[str, Control] = {}
        super().__init__(result, question)

    def _first_question(self) -> CurveQuestion:
        predictors = self.subject.predictors
        facts = next((each for each in predictors if each.is_number), predictors[0])
        groups = map(self.subject.predictor, facts.modifiers)
        by = next((each for each in groups if 1 < len(each.levels) <= _MOST_LINES), None)
        return CurveQuestion(facts.name, by=None if by is None else by.name)

    def _make_controls(self) -> list[widgets.Widget]:
        subject, asked = self.subject, self._question
        named = [(predictor_label(each), each.name) for each in subject.predictors]
        self._predictor = ChoiceControl("Along", named, asked.predictor)
        self._by = ChoiceControl("A line for each value of", self._by_options(asked), asked.by)
        self._scale = ChoiceControl("Shown as", self._scale_options(asked), asked.scale)
        self._bind("predictor", self._predictor, lambda q: q.predictor, self._with_predictor)
        self._bind("by", self._by, lambda q: q.by, self._with_by)
        self._others = OthersPart(subject, self._bind)
        self._bind("scale", self._scale, lambda q: q.scale, lambda q, v: replace(q, scale=v))
        self._by_place = block(name="place")
        return [
            self._predictor.widget,
            self._by.widget,
            self._by_place,
            *self._others.widgets,
            self._scale.widget,
            self._level_control().widget,
        ]

    def _by_options(self, question: CurveQuestion) -> list[tuple[str, str | None]]:
        others = [each for each in self.subject.predictors if each.name != question.predictor]
        return [("one line only", None), *((predictor_label(each), each.name) for each in others)]

    def _scale_options(self, question: CurveQuestion) -> list[tuple[str, str]]:
        has_slope = self.subject.predictor(question.predictor).is_number
        return [each for each in _SCALES if has_slope or each[1] != "slope"]

    def _with_predictor(self, question: CurveQuestion, name: str) -> CurveQuestion:
        """Along another predictor: what would stand in its way goes."""
        changed = replace(question, predictor=name, at=(), others=without(question, name))
        if question.by == name:
            changed = replace(changed, by=None, by_values=())
        if question.scale == "slope" and not self.subject.predictor(name).is_number:
            changed = replace(changed, scale="probability")
        return changed

    def _with_by(self, question: CurveQuestion, name: str | None) -> CurveQuestion:
        return replace(question, by=name, by_values=(), others=without(question, name))

    def _arrange(self, question: CurveQuestion) -> None:
        self._by.offer(self._by_options(question), question.by)
        self._scale.offer(self._scale_options(question), question.scale)
        lines = [] if question.by is None else [self._by_values_control(question.by).widget]
        fill(self._by_place, lines)
        self._others.arrange(question, (question.predictor, question.by))

    def _by_values_control(self, name: str) -> Control:
        if name not in self._by_values:
            facts = self.subject.predictor(name)
            default = tuple(dict.fromkeys(facts.quartiles))
            self._by_values[name] = self._bind(
                "by_values",
                values_control(facts, lambda named: f"Values of {named}", default),
                lambda question: question.by_values if question.by == name else (),
                lambda question, values: replace(question, by_values=tuple(values)),
            )
        return self._by_values[name]

    def _stem(self) -> str:
        question = self._question
        by = f"-by-{slug(question.by)}" if question.by is not None else ""
        return f"curve-{slug(question.predictor)}{by}"

    def _exact_table_of(self, answer: CurveAnswer) -> Markup:
        return curve_table(answer)


_STACKED_FROM = 3


def curve_table(answer: CurveAnswer) -> Markup:
    """The curve's figures at a few points, one column for each line."""
    question, subject = answer.question, answer.subject
    facts = subject.predictor(question.predictor)
    at = answer.lines[0].at
    places = tabled_places(len(at))
    columns = [Column(axis_title(facts))]
    for line in answer.lines:
        title = "Estimate"
        if question.by is not None and line.by is not None:
            title = line_label(subject.predictor(question.by), line.by)
        columns.append(Column(title, is_number=True))
    rows = [
        Row(
            (
                quantity(float(at[place])) if facts.is_number else value_label(facts, at[place]),
                *(_cell(answer, line, place) for line in answer.lines),
            )
        )
        for place in places
    ]
    remarks = []
    if any(not line.supported[place] for line in answer.lines for place in places):
        remarks.append("* no rows of the data near by.")
    if len(places) < len(at):
        remarks.append(f"{len(places)} of {count(len(at))} points.")
    # many columns leave no room for an interval beside its estimate
    stacked = "plainodds-stacked" if len(answer.lines) >= _STACKED_FROM else None
    return markup.table(scale_title(answer), columns, rows, " ".join(remarks), stacked)


def _cell(answer: CurveAnswer, line: CurveLine, place: int) -> tuple[str, ...]:
    say, span_of = _WRITTEN[answer.question.scale]
    star = "" if line.supported[place] else " *"
    estimate = f"{say(line.estimate[place])}{star}"
    if line.lower is None or line.upper is None:
        return (estimate,)
    return estimate, f"({span_of(line.lower[place], line.upper[place])})"


def _signed_between(lower: float, upper: float) -> str:
    return span(lower, upper, signed)


_WRITTEN: dict[Scale, tuple[Callable[[float], str], Callable[[float, float], str]]] = {
    "probability": (chance, span),
    "odds": (ratio, ratio_interval),
    "linear_predictor": (signed, _signed_between),
    "slope": (bare_points, bare_points_span),
}
