"""What questions and answers have in common."""

from __future__ import annotations

from typing import ClassVar

from plainodds.model.predictors import Subject

__all__ = ["Answer", "Question"]


class Question:
    """What was asked: an immutable value whose fields are the asking method's arguments.

    `method` names the method of FittedLogit that asks it; `positional` names the
    fields that are written without their name.
    """

    method: ClassVar[str]
    positional: ClassVar[tuple[str, ...]] = ()


class Answer:
    """What was found: its question, its numbers, and what it is about."""

    question: Question
    subject: Subject
