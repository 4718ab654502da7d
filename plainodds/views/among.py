"""Among which rows an average is taken: all, or those with one level of one predictor."""

from __future__ import annotations

from dataclasses import replace
from typing import Any

from plainodds.model.predictors import Subject
from plainodds.phrases.averaged import rows_chosen
from plainodds.phrases.labels import given_label, sentence_case
from plainodds.phrases.numbers import count
from plainodds.views.controls import ChoiceControl
from plainodds.views.others import Bind
from plainodds.views.parts import block, fill

__all__ = ["AmongPart"]


class AmongPart:
    """The drop-down of rows, in the page while the others are as observed.

    Parameters
    ----------
    subject : Subject
    bind : callable

    Attributes
    ----------
    place : Box
    """

    def __init__(self, subject: Subject, bind: Bind) -> None:
        self._subject = subject
        self._options: list[tuple[str, Any]] = [(f"all {count(subject.rows)} rows", None)]
        for facts in subject.predictors:
            for level, rows in zip(facts.levels, facts.level_counts, strict=True):
                if rows:
                    where = ((facts.name, level),)
                    label = sentence_case(given_label(subject, where))
                    noun = "row" if rows == 1 else "rows"
                    self._options.append((f"{label} ({count(rows)} {noun})", where))
        self._choice = ChoiceControl("Averaged over", self._options, None)
        bind("where", self._choice, lambda question: question.where, _with_where)
        self.place = block(name="place")

    def arrange(self, question: Any) -> None:
        """Offer the rows where a question may choose among them."""
        if question.where not in [where for _, where in self._options]:
            # chosen from Python: by several values, a range or a mask
            label = rows_chosen(self._subject, question.where, 0).partition(" ")[2]
            self._choice.offer([*self._options, (label, question.where)], question.where)
        offered = question.others == "observed" and len(self._options) > 1
        fill(self.place, [self._choice.widget] if offered else [])


def _with_where(question: Any, where: Any) -> Any:
    return replace(question, where=where)
