"""ChangeView: what becomes of the chance when one thing changes?"""

from __future__ import annotations

from dataclasses import replace
from typing import Any

import ipywidgets as widgets

from plainodds.answers.change import ChangeAnswer, ChangeQuestion
from plainodds.answers.moves import Move, Shift
from plainodds.phrases.labels import predictor_label
from plainodds.phrases.moves import moves_label
from plainodds.values import Scalar
from plainodds.views.among import AmongPart
from plainodds.views.change_table import change_table
from plainodds.views.controls import ChoiceControl, Control, slug
from plainodds.views.markup import Markup
from plainodds.views.others import OthersPart, with_others, without
from plainodds.views.parts import block, fill
from plainodds.views.sketched import SketchedView
from plainodds.views.span import change_control, usual_change

__all__ = ["ChangeView"]

_Moves = tuple[tuple[str, Move | Shift], ...]


class ChangeView(SketchedView):
    """What becomes of the chance when something changes, and for how many?

    Choose what changes and from where to where, by two handles, two numbers or two
    levels; what the other predictors do meanwhile; and among which rows. The picture
    shows both chances, the difference, and the same as marks, one for each case.

    Parameters
    ----------
    result : statsmodels result or FittedLogit
    question : ChangeQuestion, optional
        What is shown at the start; default: the first predictor that takes numbers, from
        its lower to its upper quartile, the others as observed. Changes of several
        predictors together, and shifts, can be shown although no control makes them.

    Attributes
    ----------
    question : ChangeQuestion
        May be set; ``view.question = fit.change("age_years", 60, 20).question``.
    answer : ChangeAnswer
    is_exact : bool
        Whether `answer` is exact; by a sketch where rows are many.

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
    >>> view = po.ChangeView(smf.logit("burst ~ age_years * material", mains).fit(disp=0))
    >>> view.question = view.fit.change("material", "cast iron", "PVC").question
    >>> view.answer.comparison.risk_difference.estimate < 0
    True
    """

    kind = "change"
    asks = ChangeQuestion
    exact_is_quick = True

    def __init__(self, result: Any, question: ChangeQuestion | None = None) -> None:
        self._ends: dict[str, Control] = {}
        super().__init__(result, question)

    def _first_question(self) -> ChangeQuestion:
        predictors = self.subject.predictors
        facts = next((each for each in predictors if each.is_number), predictors[0])
        return ChangeQuestion(self._usual(facts.name))

    def _usual(self, name: str) -> _Moves:
        return ((name, Move(*usual_change(self.subject.predictor(name)))),)

    def _make_controls(self) -> list[widgets.Widget]:
        subject = self.subject
        self._named = [(predictor_label(each), each.name) for each in subject.predictors]
        self._predictor = ChoiceControl("What changes", self._named, subject.predictors[0].name)
        self._bind("predictor", self._predictor, _what, self._with_what)
        self._ends_place = block(name="place")
        self._swap = self._button("Swap from and to", "swap", _swapped)
        self._others = OthersPart(subject, self._bind, _with_others)
        self._among = AmongPart(subject, self._bind)
        return [
            self._predictor.widget,
            self._ends_place,
            *self._others.widgets,
            self._among.place,
            self._level_control().widget,
        ]

    def _with_what(self, question: ChangeQuestion, what: Any) -> ChangeQuestion:
        """Another predictor changes: what would stand in its way goes."""
        if not isinstance(what, str):
            return replace(question, moves=what)
        return replace(question, moves=self._usual(what), others=without(question, what))

    def _arrange(self, question: ChangeQuestion) -> None:
        what = _what(question)
        if not isinstance(what, str):
            label = moves_label(self.subject, question.moves)
            self._predictor.offer([*self._named, (label, what)], what)
        ends = [self._ends_control(what).widget] if isinstance(what, str) else []
        movable = all(isinstance(move, Move) for _, move in question.moves)
        fill(self._ends_place, [*ends, *([self._swap] if movable else [])])
        self._others.arrange(question, [name for name, _ in question.moves])
        self._among.arrange(question)

    def _ends_control(self, name: str) -> Control:
        if name not in self._ends:
            facts = self.subject.predictor(name)
            usual = usual_change(facts)
            self._ends[name] = self._bind(
                "ends",
                change_control(facts, usual),
                lambda question: _ends_of(question, name, usual),
                lambda question, ends: replace(question, moves=((name, Move(*ends)),)),
            )
        return self._ends[name]

    def _stem(self) -> str:
        return "-".join(["change", *(slug(name) for name, _ in self._question.moves)])

    def _exact_table_of(self, answer: ChangeAnswer) -> Markup:
        return change_table(answer)


def _what(question: ChangeQuestion) -> str | _Moves:
    """The predictor that changes; where there is no single one, all that moves."""
    if len(question.moves) == 1 and isinstance(question.moves[0][1], Move):
        return question.moves[0][0]
    return question.moves


def _ends_of(
    question: ChangeQuestion, name: str, usual: tuple[Scalar, Scalar]
) -> tuple[Scalar, Scalar]:
    move = dict(question.moves).get(name)
    return (move.start, move.end) if isinstance(move, Move) else usual


def _swapped(question: ChangeQuestion) -> ChangeQuestion:
    moves = tuple(
        (name, Move(move.end, move.start) if isinstance(move, Move) else move)
        for name, move in question.moves
    )
    return replace(question, moves=moves)


def _with_others(question: ChangeQuestion, kind: Any) -> Any:
    """Others of another kind; where there is no average there are no rows to choose."""
    changed = with_others(question, kind)
    return changed if kind == "observed" else replace(changed, where=None, sample="fixed")
