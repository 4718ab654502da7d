"""What the predictors that do not change are: as observed, typical, or held at chosen values."""

from __future__ import annotations

from collections.abc import Callable, Collection
from dataclasses import replace
from typing import Any, Protocol

import ipywidgets as widgets

from plainodds.model.predictors import PredictorFacts, Subject
from plainodds.values import Scalar
from plainodds.views.controls import ChoiceControl, Control, predictor_control, slug
from plainodds.views.parts import block, fill

__all__ = ["Bind", "OthersPart", "kind_of_others", "with_others", "without"]

_OTHERS = (
    ("held at typical values", "typical"),
    ("as observed, averaged", "observed"),
    ("held at values I choose", "held"),
)


class Bind(Protocol):
    """How a view lets a control edit a part of its question."""

    def __call__(
        self,
        field: str,
        control: Control,
        read: Callable[[Any], Any],
        write: Callable[[Any, Any], Any],
    ) -> Control:
        """Bind a control."""


class OthersPart:
    """The drop-down of what the others are, and a control for each value that is held.

    Parameters
    ----------
    subject : Subject
    bind : callable
    write : callable
        Puts a kind of others into a question: "typical", "observed" or "held".

    Attributes
    ----------
    held : dict of str to control
    place : Box
        Where the controls of held values stand.
    widgets : list of Widget
    """

    def __init__(
        self, subject: Subject, bind: Bind, write: Callable[[Any, Any], Any] | None = None
    ) -> None:
        self._subject, self._bind = subject, bind
        self.held: dict[str, Control] = {}
        choice = ChoiceControl("The other predictors are", _OTHERS, "typical")
        bind("others", choice, kind_of_others, write or with_others)
        self.place = block(name="place")
        self.widgets: list[widgets.Widget] = [choice.widget, self.place]

    def arrange(self, question: Any, moving: Collection[str | None]) -> None:
        """Offer a value for each predictor that does not move, where values are held."""
        held = []
        if kind_of_others(question) == "held":
            names = [each.name for each in self._subject.predictors if each.name not in moving]
            held = [self._control(name).widget for name in names]
        fill(self.place, held)

    def _control(self, name: str) -> Control:
        if name not in self.held:
            facts = self._subject.predictor(name)
            self.held[name] = self._bind(
                f"held-{slug(name)}",
                predictor_control(facts),
                lambda question: _stated(question).get(name, facts.typical),
                lambda question, value: _holding(question, facts, value),
            )
        return self.held[name]


def kind_of_others(question: Any) -> str:
    """Whether the others are "typical", "observed" or "held" at stated values."""
    return question.others if isinstance(question.others, str) else "held"


def with_others(question: Any, kind: Any) -> Any:
    """A question with others of another kind; of the same kind it stays what it is."""
    if kind == kind_of_others(question):
        return question
    return replace(question, others=() if kind == "held" else kind)


def without(question: Any, name: str | None) -> Any:
    """What a question holds, but for one predictor."""
    if isinstance(question.others, str):
        return question.others
    return tuple(pair for pair in question.others if pair[0] != name)


def _stated(question: Any) -> dict[str, Scalar]:
    return {} if isinstance(question.others, str) else dict(question.others)


def _holding(question: Any, facts: PredictorFacts, value: Scalar) -> Any:
    stated = _stated(question) | {facts.name: value}
    return replace(question, others=tuple(stated.items()))
