"""A view that computes beside the page: some questions take their time."""

from __future__ import annotations

from collections.abc import Callable
from typing import Any

import ipywidgets as widgets

from plainodds.answers.progress import Progress
from plainodds.answers.questions import Answer, Question
from plainodds.errors import QuestionRefused
from plainodds.views import markup
from plainodds.views.base import AnswerView
from plainodds.views.controls import Control
from plainodds.views.long_work import LongWork, Work

__all__ = ["PatientView"]

_STOPPED = "Stopped. What is shown is still the last answer."


class PatientView(AnswerView):
    """A view some of whose questions need work that takes its time.

    Such work runs in a thread of its own. Meanwhile the last picture stays, the controls
    show what is wanted and may be changed again, and a button stops it. A question that
    is set from Python is waited for.
    """

    def __init__(self, result: Any, question: Question | None = None) -> None:
        self._work = LongWork(self._on_stop)
        self._waiting: Any = None
        self._prepared: Answer | None = None
        self._is_open = False
        super().__init__(result, question)
        self._is_open = True

    def _work_before(self, question: Any) -> Work | None:
        """What has to be computed before a question can be answered."""
        return None

    def _answering(self, question: Any, said: str, run: Callable[[Progress], Answer]) -> Work:
        """Work whose result is the answer itself."""

        def keep(answer: Answer) -> None:
            self._prepared = answer

        return Work(question, said, run, keep)

    def _has(self, question: Any) -> bool:
        """Whether the question is answered already."""
        return any(
            each is not None and each.question == question for each in (self._prepared, self.answer)
        )

    def _ask(self, question: Any) -> Answer:
        for each in (self._prepared, self.answer):
            if each is not None and each.question == question:
                return each
        return super()._ask(question)

    def _on_stage(self) -> list[widgets.Widget]:
        return [*super()._on_stage(), self._work.widget]

    @property
    def _wanted(self) -> Any:
        return self._question if self._waiting is None else self._waiting

    def _set(self, question: Any) -> None:
        if self._waiting is not None:
            self._forget()
            self._put_back()
        while (work := self._work_before(question)) is not None:
            work.keep(self._work.run_here(work))
        super()._show(question)

    def _show(self, question: Any, remark: str = "", edited: Control | None = None) -> None:
        if not self._is_open:
            self._set(question)
            return
        work = self._work_before(question)
        if work is None:
            super()._show(question, remark, edited)
            self._forget()
            return
        self._waiting = question
        self._messages.value = markup.notice(remark, is_problem=False)
        if work.key != self._work.key:
            self._work.start(work, lambda outcome: self._take_up(work, outcome))

    def _aside(self, work: Work) -> None:
        """Do work for the question that is shown."""
        if self._waiting is not None:
            raise QuestionRefused("Something else is being computed; wait for it or stop it first.")
        self._waiting = self._question
        self._work.start(work, lambda outcome: self._take_up(work, outcome))

    def _take_up(self, work: Work, outcome: Any) -> None:
        """Show what is wanted by now, once the work for it is done."""
        with self._guarded():
            if self._work.key != work.key or self._waiting is None:
                return
            wanted = self._waiting
            try:
                work.keep(outcome())
                self._show(wanted)
            except BaseException:
                self._forget()
                self._put_back()
                raise

    def _forget(self) -> None:
        """Want nothing but what is shown."""
        self._waiting = None
        self._work.abandon()

    def _on_stop(self) -> None:
        if self._waiting is None:
            return
        with self._guarded():
            self._forget()
            self._put_back()
            self._messages.value = markup.notice(_STOPPED, is_problem=False)

    def _put_back(self) -> None:
        """Let every control show again what the picture shows."""
        with self._quietly():
            self._arrange(self._question)
            for binding in self._bindings.values():
                binding.control.show(binding.read(self._question))
