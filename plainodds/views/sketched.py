"""A view whose picture moves although there are a million rows.

Where rows are many the moving picture and its words come from a sketch of them, to about
1e-6 of the exact average. The table, the code and saved figures are exact: the exact
answer is computed when one of them is asked for.
"""

from __future__ import annotations

from collections.abc import Callable, Hashable
from typing import Any, ClassVar

import ipywidgets as widgets

from plainodds.answers.progress import Progress
from plainodds.answers.questions import Answer, Question
from plainodds.answers.quick import answer_by_sketch, sketch_for, sketched
from plainodds.answers.sketch import Sketch
from plainodds.phrases.numbers import count
from plainodds.views import markup
from plainodds.views.long_work import Work
from plainodds.views.markup import Markup
from plainodds.views.patient import PatientView

__all__ = ["MANY_ROWS", "SketchedView"]

MANY_ROWS = 20_000
"""More rows than these are sketched."""

_KEPT = 4


class SketchedView(PatientView):
    """A view that answers by a sketch where rows are many.

    Attributes
    ----------
    is_exact : bool
        Whether `answer` is exact, and not by a sketch.
    """

    exact_is_quick: ClassVar[bool]
    """Whether the exact answer is quick enough to be moved where there is no sketch."""

    def __init__(self, result: Any, question: Question | None = None) -> None:
        self._sketches: dict[Hashable, Sketch | None] = {}
        self._by_sketch: Answer | None = None
        self._exact_button = widgets.Button(description="Compute the exact table")
        self._exact_button.add_class("plainodds-exact")
        self._exact_button.on_click(self._on_exact)
        super().__init__(result, question)
        self._extras.widget.children = (self._exact_button, *self._extras.widget.children)

    @property
    def is_exact(self) -> bool:
        """Whether `answer` is exact."""
        return self.answer is not self._by_sketch

    def _key(self, question: Any) -> Hashable | None:
        """By which sketch a question can be answered; None where it is answered exactly."""
        return sketched(question) if self.subject.rows > MANY_ROWS else None

    def _work_before(self, question: Any) -> Work | None:
        key = self._key(question)
        if key is None or self._has(question):
            return None
        if key not in self._sketches:
            return Work(
                ("sketch", key),
                f"Looking at all {count(self.subject.rows)} rows once",
                lambda progress: sketch_for(self.fit.model, question),
                lambda sketch: self._keep(key, sketch),
            )
        if self._sketches[key] is None and not self.exact_is_quick:
            return self._exact_work(question)
        return None

    def _keep(self, key: Hashable, sketch: Sketch | None) -> None:
        while len(self._sketches) >= _KEPT:
            self._sketches.pop(next(iter(self._sketches)))
        self._sketches[key] = sketch

    def _ask(self, question: Any) -> Answer:
        sketch = self._sketches.get(self._key(question))
        if sketch is None or self._has(question):
            return super()._ask(question)
        self._by_sketch = answer_by_sketch(self.fit.model, question, sketch)
        return self._by_sketch

    def _exact_work(self, question: Any) -> Work:
        return self._answering(
            question,
            f"Averaging over all {count(self.subject.rows)} rows, parts done",
            lambda progress: self._exact_answer(question, progress),
        )

    def _exact_answer(self, question: Any, progress: Progress) -> Answer:
        """Answer from every row, telling how far that is where it may take long."""
        return self.fit.ask(question)

    # the exact answer, at the press of a button

    def _table_of(self, answer: Any) -> Markup:
        if answer is self._by_sketch:
            rows = count(self.subject.rows)
            return markup.note(
                f"Picture and words come from a summary of the {rows} rows, which answers at once "
                "and agrees with the exact average to about one in a million. The table, and a "
                "picture that is saved, are computed from every row."
            )
        return self._exact_table_of(answer)

    def _exact_table_of(self, answer: Any) -> Markup:
        """Write the table of an exact answer."""
        raise NotImplementedError

    def _shown(self, answer: Any) -> None:
        super()._shown(answer)
        self._exact_button.layout.display = None if answer is self._by_sketch else "none"

    def _on_exact(self, _: widgets.Button) -> None:
        with self._guarded():
            self._exactly(lambda answer: None)

    def _exactly(self, then: Callable[[Answer], None]) -> None:
        if self.is_exact:
            then(self.answer)
            return
        question = self._question

        def keep(answer: Answer) -> None:
            self._table.value = self._table_of(answer)
            self._shown(answer)
            self.set_trait("answer", answer)
            then(answer)

        work = self._exact_work(question)
        self._aside(Work(("exact", question), work.said, work.run, keep))
