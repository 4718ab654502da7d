"""PairView: how two predictors act together, on the scale of chances and on that of odds."""

from __future__ import annotations

from dataclasses import replace
from itertools import combinations
from typing import Any

import ipywidgets as widgets

from plainodds.answers.pair import PairAnswer, PairQuestion, answer_pair
from plainodds.answers.pair_settled import settled
from plainodds.answers.progress import Progress
from plainodds.errors import QuestionRefused
from plainodds.model.predictors import PredictorFacts, Subject
from plainodds.phrases.labels import predictor_label
from plainodds.values import Scalar
from plainodds.views import markup
from plainodds.views.controls import ChoiceControl, Control, slug
from plainodds.views.either import EitherControl
from plainodds.views.long_work import Work
from plainodds.views.markup import Markup
from plainodds.views.others import OthersPart, without
from plainodds.views.pair_table import pair_table
from plainodds.views.parts import block, fill, html, titled
from plainodds.views.sketched import MANY_ROWS, SketchedView
from plainodds.views.span import change_control

__all__ = ["PairView"]

_SCALES = (("chances", "probability"), ("odds", "odds"))
_SHAPES = (("lines", "lines"), ("a map", "map"))
_NUMBERS = (("between two values", "change"), ("its slope", "slope"))
_TESTS = (("Wald", "wald"), ("likelihood ratio", "likelihood_ratio"))
_MOST_LEVELS = 6
_ODDS_ONLY = (
    "Told in odds alone: the sample was chosen by its outcome, so it says nothing of chances. With "
    "the population's share of events stated, FittedLogit(…, prevalence=0.02), both can be seen."
)


class PairView(SketchedView):
    """How do two predictors act together, and does it depend on the scale?

    Choose whose effect is followed and along what, by two predictors that a button
    exchanges; from where to where each of them changes; what the remaining predictors
    do, with a slider for each where they are held; and the test of the terms that join
    the two. A switch goes from chances to odds and back and leaves everything else as it
    is. Two numbers can be seen as lines or as a map.

    Parameters
    ----------
    result : statsmodels result or FittedLogit
    question : PairQuestion, optional
        What is shown at the start; default: the first two predictors that share a term,
        a number and a category where there are such; else the first number and the first
        other predictor.

    Attributes
    ----------
    question : PairQuestion
        May be set; ``view.question = fit.pair("age_years", "soil", scale="odds").question``.
    answer : PairAnswer
    changes : dict of (role, predictor) to control
        The controls of two values, by "a" or "b" and the predictor's name.
    is_exact : bool
        Whether `answer` is exact; by a sketch where rows are many.

    Raises
    ------
    FitRefused
        If the result cannot be taken in.
    QuestionRefused
        If the question cannot be answered, or the model has a single predictor.

    Examples
    --------
    >>> import statsmodels.formula.api as smf
    >>> import plainodds as po
    >>> mains = po.demo.tessel_bay()
    >>> view = po.PairView(smf.logit("burst ~ age_years * material", mains).fit(disp=0))
    >>> view.question.a, view.question.b
    ('age_years', 'material')
    """

    kind = "pair"
    asks = PairQuestion
    exact_is_quick = False

    def __init__(self, result: Any, question: PairQuestion | None = None) -> None:
        self.changes: dict[tuple[str, str], Control] = {}
        self._titled: dict[tuple[str, str], widgets.Widget] = {}
        super().__init__(result, question)

    @property
    def _tells_chances(self) -> bool:
        subject = self.subject
        return subject.sampling != "case-control" or subject.prevalence is not None

    def _first_question(self) -> PairQuestion:
        a, b = _first_pair(self.subject)
        return PairQuestion(a.name, b.name, scale="probability" if self._tells_chances else "odds")

    # controls

    def _make_controls(self) -> list[widgets.Widget]:
        subject, asked = self.subject, self._question
        named = [(predictor_label(each), each.name) for each in subject.predictors]
        a = ChoiceControl("The effect of", named, asked.a)
        b = ChoiceControl("As this one varies", named, asked.b)
        self._bind("a", a, lambda question: question.a, self._with_a)
        self._bind("b", b, lambda question: question.b, self._with_b)
        self._exchange = self._button("Exchange the two", "exchange", _exchanged)
        self._changes_place = block(name="place")
        self._others = OthersPart(subject, self._bind)
        number = ChoiceControl("The effect of a number", _NUMBERS, "change")
        self._number = self._bind("number", number, self._kind_of_number, self._with_number)
        test = ChoiceControl("Test of the interaction", _TESTS, "wald")
        self._test = self._bind(
            "test", test, lambda question: question.test, lambda q, kind: replace(q, test=kind)
        )
        self._number_place, self._test_place = block(name="place"), block(name="place")
        self._switches = self._make_switches()
        return [
            a.widget,
            b.widget,
            block(self._exchange, name="place"),
            self._changes_place,
            self._number_place,
            *self._others.widgets,
            self._test_place,
            self._level_control().widget,
        ]

    def _make_switches(self) -> widgets.Widget:
        """The switches of scale and shape, above the picture that they turn."""
        self._shape = self._bind(
            "shape",
            EitherControl("Drawn as", _SHAPES, "lines"),
            lambda question: question.shape,
            lambda question, shape: replace(question, shape=shape),
        )
        self._shape_place = block(name="place")
        if not self._tells_chances:
            only = html("odds-only")
            only.value = markup.note(_ODDS_ONLY)
            return block(only, self._shape_place, name="switches")
        scale = self._bind(
            "scale",
            EitherControl("Told in", _SCALES, "probability"),
            lambda question: question.scale,
            lambda question, scale: replace(question, scale=scale),
        )
        return block(scale.widget, self._shape_place, name="switches")

    def _on_stage(self) -> list[widgets.Widget]:
        return [self._switches, *super()._on_stage()]

    def _arrange(self, question: PairQuestion) -> None:
        both = [self.subject.predictor(name) for name in (question.a, question.b)]
        sloped = _sloped(self.subject, question)
        roles = [(role, facts) for role, facts in zip("ab", both, strict=True)]
        fill(
            self._changes_place,
            [self._change(role, facts) for role, facts in roles if facts.name not in sloped],
        )
        numbers = sum(facts.is_number for facts in both)
        fill(self._number_place, [self._number.widget] if numbers else [])
        maps = numbers == 2 and self._tells_chances
        fill(self._shape_place, [self._shape.widget] if maps else [])
        testable = question.b in both[0].modifiers and not self.fit.model.no_likelihood
        fill(self._test_place, [self._test.widget] if testable else [])
        self._others.arrange(question, (question.a, question.b))

    def _change(self, role: str, facts: PredictorFacts) -> widgets.Widget:
        """The control of two values of one predictor, as the one or as the other."""
        key = role, facts.name
        if key not in self.changes:
            usual = self._usual(facts.name)
            control = self._bind(
                f"{role}_values",
                change_control(facts, usual),
                lambda question: _values(question, role, facts.name) or usual,
                lambda question, values: _with_values(question, role, facts.name, values, usual),
            )
            self.changes[key] = control
            self._titled[key] = titled(predictor_label(facts), control.widget, name="set")
        return self._titled[key]

    def _usual(self, name: str) -> tuple[Scalar, Scalar]:
        """Between which two values a predictor changes where nobody has said so."""
        other = next(each.name for each in self.subject.predictors if each.name != name)
        return settled(self.fit.model, PairQuestion(name, other, scale="odds")).a_change

    # what takes its time

    def _work_before(self, question: PairQuestion) -> Work | None:
        work = super()._work_before(question)
        if work is not None or self.subject.rows <= MANY_ROWS or self._has(question):
            return work
        averaged = question.others == "observed" and self._key(question) is None
        return self._exact_work(question) if averaged or self._tests_anew(question) else None

    def _exact_answer(self, question: PairQuestion, progress: Progress) -> PairAnswer:
        return answer_pair(self.fit.model, question, progress=progress)

    def _tests_anew(self, question: PairQuestion) -> bool:
        """Whether the model has to be fitted again, for a test that the last answer has not."""
        if question.test != "likelihood_ratio" or self.answer is None:
            return question.test == "likelihood_ratio"
        last = self.answer.question
        tested = {last.a, last.b} if last.test == "likelihood_ratio" else set()
        return tested != {question.a, question.b}

    # what is changed

    def _with_a(self, question: PairQuestion, name: str) -> PairQuestion:
        """Another predictor's effect: what would stand in its way goes."""
        if name == question.a:
            return question
        if name == question.b:
            return _exchanged(question)
        return self._fitting(replace(question, a=name, a_values=()), name)

    def _with_b(self, question: PairQuestion, name: str) -> PairQuestion:
        if name == question.b:
            return question
        if name == question.a:
            return _exchanged(question)
        return self._fitting(replace(question, b=name, b_values=()), name)

    def _fitting(self, question: PairQuestion, name: str) -> PairQuestion:
        numbers = sum(self.subject.predictor(n).is_number for n in (question.a, question.b))
        return replace(
            question,
            others=without(question, name),
            shape=question.shape if numbers == 2 else "lines",
            number=question.number if numbers else "change",
        )

    def _kind_of_number(self, question: PairQuestion) -> str:
        return "slope" if _sloped(self.subject, question) else "change"

    def _with_number(self, question: PairQuestion, kind: str) -> PairQuestion:
        """Numbers by their slope let go of their two values."""
        if kind == self._kind_of_number(question):
            return question
        if kind == "change":
            return replace(question, number="change")
        a, b = (self.subject.predictor(name) for name in (question.a, question.b))
        return replace(
            question,
            number="slope",
            a_values=() if a.is_number else question.a_values,
            b_values=() if b.is_number else question.b_values,
        )

    def _stem(self) -> str:
        question = self._question
        shape = "-map" if question.shape == "map" else ""
        return f"pair-{slug(question.a)}-{slug(question.b)}{shape}"

    def _exact_table_of(self, answer: PairAnswer) -> Markup:
        return pair_table(answer)


def _first_pair(subject: Subject) -> tuple[PredictorFacts, PredictorFacts]:
    """Two predictors that share a term, best a number and a category of few levels."""
    predictors = subject.predictors
    if len(predictors) < 2:
        raise QuestionRefused(
            "The model has a single predictor, and two act together. Ask for a curve of it: "
            "CurveView(result)."
        )
    joined = [
        (one, other) for one, other in combinations(predictors, 2) if other.name in one.modifiers
    ]
    mixed = [pair for pair in joined if sum(each.is_number for each in pair) == 1]
    few = [pair for pair in mixed if all(len(each.levels) <= _MOST_LEVELS for each in pair)]
    for found in (*few, *mixed, *joined):
        return _number_first(*found)
    number = next((each for each in predictors if each.is_number), predictors[0])
    return number, next(each for each in predictors if each is not number)


def _number_first(
    one: PredictorFacts, other: PredictorFacts
) -> tuple[PredictorFacts, PredictorFacts]:
    return (other, one) if other.is_number and not one.is_number else (one, other)


def _exchanged(question: PairQuestion) -> PairQuestion:
    return replace(
        question,
        a=question.b,
        b=question.a,
        a_values=question.b_values,
        b_values=question.a_values,
    )


def _sloped(subject: Subject, question: PairQuestion) -> list[str]:
    """Which of the two enter by their slope: numbers whose two values are not stated."""
    if question.number != "slope":
        return []
    stated = ((question.a, question.a_values), (question.b, question.b_values))
    return [name for name, values in stated if subject.predictor(name).is_number and not values]


def _values(question: PairQuestion, role: str, name: str) -> tuple[Scalar, ...]:
    """The two values that are stated of a predictor in its role; empty where there are none."""
    if role == "a":
        return question.a_values if question.a == name else ()
    return question.b_values if question.b == name else ()


def _with_values(
    question: PairQuestion,
    role: str,
    name: str,
    values: tuple[Scalar, ...],
    usual: tuple[Scalar, ...],
) -> PairQuestion:
    # an edit that arrives after another predictor was chosen is about nothing any more, and a
    # slider that finds its round place says nothing new
    is_another = (question.a if role == "a" else question.b) != name
    if is_another or values == (_values(question, role, name) or usual):
        return question
    if role == "a":
        return replace(question, a_values=tuple(values))
    return replace(question, b_values=tuple(values))
