"""One scale for panels that show the same quantity, and one line for those in one row."""

from __future__ import annotations

from collections.abc import Hashable, Sequence
from typing import Any

from plainodds.answers.curve import CurveAnswer
from plainodds.answers.odds import OddsAnswer
from plainodds.answers.questions import Answer
from plainodds.drawings.drawing import Drawing
from plainodds.drawings.geometry import Margins, slot_size
from plainodds.phrases.labels import scale_title

__all__ = ["line_up", "share_scale"]

_LEAST_PLOT = 0.6
"""Of its height that a plot keeps at least where it is brought into line."""


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


def line_up(drawings: Sequence[Drawing[Any]], answers: Sequence[Answer]) -> None:
    """Bring the plots of curves into line that stand in one row and share their scale.

    All get the room above and beneath that one of them needs, so that a gridline goes on from
    panel to panel. A plot that would lose much of its height by that keeps it.

    Parameters
    ----------
    drawings : sequence of Drawing
        Of one row, of the same height, each showing its answer.
    answers : sequence of Answer
    """
    quantities = [_quantity(each) if isinstance(each, CurveAnswer) else None for each in answers]
    for quantity in dict.fromkeys(quantities):
        alike = [
            (drawing, answer)
            for drawing, answer, own in zip(drawings, answers, quantities, strict=True)
            if quantity is not None and own == quantity
        ]
        if len(alike) < 2:
            continue
        frames = [drawing.frame for drawing, _ in alike]  # type: ignore[attr-defined]
        margins = [frame.room.margins for frame in frames]
        least = Margins(
            0.0, 0.0, max(each.bottom for each in margins), max(each.top for each in margins)
        )
        height = slot_size(frames[0].axes)[1]
        lowest = min(height - each.bottom - each.top for each in margins)
        if height - least.bottom - least.top < _LEAST_PLOT * lowest:
            continue
        for frame, (drawing, answer) in zip(frames, alike, strict=True):
            frame.least = least
            drawing.update(answer)
            frame.least = Margins(0.0, 0.0, 0.0, 0.0)


def _quantity(answer: Answer) -> Hashable | None:
    """What an answer's scale measures; None where it has none to share."""
    if isinstance(answer, CurveAnswer):
        question = answer.question
        # slopes are per unit of their predictor, and share a scale with no other's
        return question.scale, scale_title(answer)
    return "odds ratio" if isinstance(answer, OddsAnswer) else None
