"""What every view is: controls that edit one question, and what its answer looks like.

Widget messages may arrive on several threads at once, and whatever a callback prints or
raises shows nowhere. So one lock stands around editing, asking, drawing and showing, and
an error is shown in the view itself, above the last good picture.
"""

from __future__ import annotations

from collections.abc import Callable, Iterator
from contextlib import contextmanager
from dataclasses import dataclass, replace
from typing import Any, ClassVar

import ipywidgets as widgets
import traitlets
from IPython.display import display

from plainodds.answers.questions import Answer, Question
from plainodds.errors import FitRefused, QuestionRefused
from plainodds.fitted import FittedLogit
from plainodds.model.predictors import Subject
from plainodds.phrases import words
from plainodds.phrases.labels import chance_of
from plainodds.phrases.numbers import confidence
from plainodds.phrases.writing import kept_writing
from plainodds.views import markup
from plainodds.views.controls import ChoiceControl, Control
from plainodds.views.extras import Extras
from plainodds.views.lock import LOCK
from plainodds.views.markup import Markup
from plainodds.views.parts import block, html
from plainodds.views.stage import Stage
from plainodds.views.stills import bundle_of
from plainodds.views.style import KEYS, STYLE

__all__ = ["AnswerView", "Binding"]

_LEVELS = (0.8, 0.9, 0.95, 0.99)


@dataclass(frozen=True)
class Binding:
    """A control, and how to find and put its value in the question."""

    control: Control
    read: Callable[[Any], Any]
    write: Callable[[Any, Any], Any]


class AnswerView(widgets.VBox):
    """A widget that edits one question and shows its answer.

    Attributes
    ----------
    fit : FittedLogit
    answer : Answer
        A trait: observe it to follow what is shown.
    question : Question
        May be set.
    problem : Exception or None
        What the last change could not be carried out for.
    """

    kind: ClassVar[str]
    """The view's name in CSS classes and file names."""
    asks: ClassVar[type[Question]]
    """The kind of question that it edits."""
    looks: ClassVar[str] = STYLE
    """Its style sheet."""

    answer = traitlets.Any(read_only=True)

    def __init__(self, result: Any, question: Question | None = None) -> None:
        super().__init__()
        self.fit = result if isinstance(result, FittedLogit) else FittedLogit(result)
        self.problem: Exception | None = None
        self._quiet = False
        self._writing = kept_writing()
        self._bindings: dict[int, Binding] = {}
        self._question = self._checked(question or self._first_question())
        self._stage = Stage(self._resize)
        self._messages, self._words, self._table = map(html, ("problem", "words", "table"))
        self._extras = Extras(lambda: self.answer, self._exactly, self._stem, self._guarded)
        with LOCK, self._quietly():
            panel = block(*self._make_controls(), name="controls")
            style = html("style")
            style.value = markup.style_sheet(self.looks, KEYS)
            rest = block(*self._beneath(), name="rest")
            body = widgets.Box(self._in_order(block(*self._on_stage(), name="stage"), panel, rest))
            body.add_class("plainodds-body")
            self.children = [style, self._messages, body]
            self.add_class("plainodds-view")
            self.add_class(f"plainodds-{self.kind}")
            self._show(self._question)

    # what a view of one kind of question adds

    def _first_question(self) -> Question:
        """What is asked at the start."""
        return self.asks()

    def _make_controls(self) -> list[widgets.Widget]:
        """Make the controls and bind them."""
        raise NotImplementedError

    def _on_stage(self) -> list[widgets.Widget]:
        """What stands beside the controls, the picture among it."""
        return [self._stage.widget]

    def _beneath(self) -> list[widgets.Widget]:
        """What stands beneath the picture."""
        return [self._words, self._table, self._extras.widget]

    def _in_order(
        self, stage: widgets.Widget, panel: widgets.Widget, rest: widgets.Widget
    ) -> list[widgets.Widget]:
        """What follows what in the page."""
        return [stage, panel, rest]

    def _arrange(self, question: Any) -> None:
        """Let options and panels follow the question, before controls show their values."""

    def _table_of(self, answer: Any) -> Markup:
        """Write the answer's table."""
        raise NotImplementedError

    def _words_of(self, answer: Any) -> Markup:
        """Write the answer's words."""
        return markup.words_block(words(answer))

    def _stem(self) -> str:
        """Begin the names of figure files."""
        return self.kind

    def _shown(self, answer: Any) -> None:
        """Show what this kind of view shows besides."""

    def _ask(self, question: Any) -> Answer:
        """Find the answer that is shown."""
        return self.fit.ask(question)

    def _exactly(self, then: Callable[[Answer], None]) -> None:
        """Do something with the answer as it is given away."""
        then(self.answer)

    @property
    def _wanted(self) -> Any:
        """The question that controls show and edit."""
        return self._question

    def _set(self, question: Any) -> None:
        """Show a question that was set from Python."""
        self._show(question)

    # the question, from Python

    @property
    def subject(self) -> Subject:
        """What the answers are about."""
        return self.fit.subject

    @property
    def question(self) -> Any:
        """The question that is shown; set it to show another.

        Raises
        ------
        QuestionRefused
            If the new question is of another kind or cannot be answered; the view then
            keeps what it shows.
        """
        return self._question

    @question.setter
    def question(self, question: Question) -> None:
        with self._alone():
            self._set(self._checked(question))

    @property
    def picture_width(self) -> int:
        """Width of the picture in CSS pixels; it shrinks where there is less room."""
        return self._stage.width

    @picture_width.setter
    def picture_width(self, width: int) -> None:
        with self._alone():
            self._stage.width = width
            self._redraw(self._question)

    def _resize(self, width: int) -> None:
        with self._guarded():
            self.picture_width = width

    def _checked(self, question: Any) -> Any:
        if type(question) is not self.asks:
            raise QuestionRefused(
                f"A {type(self).__name__} edits a {self.asks.__name__}, not a "
                f"{type(question).__name__}."
            )
        return question

    # in a notebook

    def __repr__(self) -> str:
        """Name the view and what its answers are about."""
        return f"<{type(self).__name__}: {chance_of(self.subject.outcome)}>"

    def _repr_mimebundle_(self, **kwargs: Any) -> dict[str, Any]:
        """The live view, and its picture and words for whatever cannot show it."""
        with self._alone():
            still = bundle_of(self._stage.shot, words(self.answer))
        return {**super()._repr_mimebundle_(**kwargs), **still}

    def _left_in_notebook(self) -> tuple[dict[str, Any], dict[str, Any]]:
        """The view, and what waits beneath it until there is no kernel to move it."""
        data = self._repr_mimebundle_()
        return data, {"text/html": markup.waiting(data["text/html"]), "text/plain": ""}

    def _ipython_display_(self) -> None:
        for each in self._left_in_notebook():
            display(each, raw=True)

    # controls

    def _bind(
        self,
        field: str,
        control: Control,
        read: Callable[[Any], Any],
        write: Callable[[Any, Any], Any],
    ) -> Control:
        """Let a control edit a part of the question."""
        control.widget.add_class(f"plainodds-control-{field}")
        self._bindings[id(control)] = Binding(control, read, write)
        with self._quietly():
            control.show(read(self._question))
        control.on_edit(self._edited)
        return control

    def _level_control(self) -> Control:
        """The drop-down of confidence levels, the same in each view."""
        options = [(confidence(level), level) for level in _LEVELS]
        return self._bind(
            "level",
            ChoiceControl("Intervals", options, 0.95),
            lambda question: question.level,
            lambda question, level: replace(question, level=level),
        )

    def _edited(self, control: Control, source: widgets.Widget) -> None:
        with self._alone():
            if self._quiet:
                return
            binding = self._bindings[id(control)]
            with self._guarded(), self._putting_back(binding):
                with self._quietly():
                    remark = control.take(source)
                self._show(binding.write(self._wanted, control.value), remark, control)

    def _button(self, label: str, name: str, change: Callable[[Any], Any]) -> widgets.Button:
        """Make a button that changes the question."""
        button = widgets.Button(description=label)
        button.add_class(f"plainodds-{name}")

        def pressed(_: widgets.Button) -> None:
            with self._guarded():
                self._show(change(self._wanted))

        button.on_click(pressed)
        return button

    @contextmanager
    def _alone(self) -> Iterator[None]:
        """Hold the lock, and write as where the view was made: callbacks run elsewhere."""
        with LOCK, self._writing():
            yield

    @contextmanager
    def _quietly(self) -> Iterator[None]:
        """Change controls without being told so."""
        before, self._quiet = self._quiet, True
        try:
            yield
        finally:
            self._quiet = before

    @contextmanager
    def _putting_back(self, binding: Binding) -> Iterator[None]:
        """Where an edit fails let the control show again what the picture shows."""
        try:
            yield
        except Exception:
            with self._quietly():
                binding.control.show(binding.read(self._wanted))
            raise

    @contextmanager
    def _guarded(self) -> Iterator[None]:
        """Hold the lock, and show an error here, since it would show nowhere else."""
        with self._alone():
            before = self.problem
            try:
                yield
            except Exception as error:
                self.problem = error
                self._messages.value = markup.notice(_told(error), is_problem=True)
            else:
                # what has succeeded since makes an old message out of date
                if before is not None and self.problem is before:
                    self.problem = None
                    self._messages.value = ""

    # showing

    def _show(self, question: Any, remark: str = "", edited: Control | None = None) -> None:
        if question != self._question or self.problem is not None or self.answer is None:
            self._redraw(question, edited)
        self._messages.value = markup.notice(remark, is_problem=False)

    def _redraw(
        self, question: Any, edited: Control | None = None, before: Any | None = None
    ) -> None:
        """Show a question's answer, and set those controls that show something else.

        A control may have been changed that waits for its turn on another thread: so what
        controls show already (`before`; default: what is wanted) is not written to them.
        """
        before = self._wanted if before is None else before
        answer = self._ask(question)
        # everything that can fail comes before anything that can be seen
        shown = self._stage.taken(answer)
        said, listed = self._words_of(answer), self._table_of(answer)
        self._question = question
        with self._quietly():
            self._arrange(question)
            for binding in self._bindings.values():
                wanted = binding.read(question)
                if binding.control is not edited and wanted != binding.read(before):
                    binding.control.show(wanted)
        self._stage.show(shown)
        self._words.value, self._table.value = said, listed
        self._shown(answer)
        self.problem = None
        self.set_trait("answer", answer)
        self._extras.follow(answer)


def _told(error: Exception) -> str:
    if isinstance(error, QuestionRefused | FitRefused):
        return f"{error} What is shown is still the last answer."
    return (
        f"{type(error).__name__}: {error}. This should not happen; what is shown is still the "
        "last answer."
    )
