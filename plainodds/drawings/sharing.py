"""One scale for panels that show the same quantity."""

from __future__ import annotations

from collections.abc import Hashable, Sequence
from typing import Any

from plainodds.answers.curve import CurveAnswer
from plainodds.answers.odds import OddsAnswer
from plainodds.answers.questions import Answer
from plainodds.drawings.drawing import Drawing
from plainodds.phrases.labels import scale_title

__all__ = ["share_scale"]


def share_scale(drawings: Sequence[Drawing[Any]], answers: Sequence[Answer]) -> None:
    """Tell each drawing of a curve or of odds ratios what stands beside it on the same scale.

    A drawing follows at its next update.
    """
    for drawing, answer in zip(drawings, answers, strict=True):
        quantity = _quantity(answer)
        if quantity is None:
            continue
        alike = [each for each in answers if each is not answer and _quantity(each) == quantity]
        if isinstance(answer, CurveAnswer):
            drawing.frame.beside = tuple(  # type: ignore[attr-defined]
                line for each in alike if isinstance(each, CurveAnswer) for line in each.lines
            )
        else:
            drawing.beside = tuple(  # type: ignore[attr-defined]
                each.rows for each in alike if isinstance(each, OddsAnswer)
            )


def _quantity(answer: Answer) -> Hashable | None:
    """What an answer's scale measures; None where it has none to share."""
    if isinstance(answer, CurveAnswer):
        question = answer.question
        # slopes are per unit of their predictor, and share a scale with no other's
        return question.scale, scale_title(answer)
    return "odds ratio" if isinstance(answer, OddsAnswer) else None
