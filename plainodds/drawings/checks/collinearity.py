"""By how much each predictor's standard errors are stretched by the others."""

from __future__ import annotations

import math

from plainodds.answers.checks.collinearity import CollinearityEvidence
from plainodds.drawings.checks.board import Board
from plainodds.drawings.checks.lanes import Lane, draw_lanes, lanes_height
from plainodds.drawings.checks.plate import Found, Plate
from plainodds.drawings.checks.tables import draw_paragraph, paragraph_height
from plainodds.drawings.geometry import Margins
from plainodds.drawings.theme import Theme
from plainodds.phrases.checks.headings import picture_axes
from plainodds.phrases.checks.parts import columns_named
from plainodds.phrases.labels import predictor_label
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import count, ratio

__all__ = ["COLLINEARITY"]

_MOST = 14
_MOST_TIES = 3
_LARGEST = 30.0
_MARKS = (2.0, 5.0)


def _ordered(found: Found) -> list[tuple[str, float]]:
    pairs = found.evidence(CollinearityEvidence).inflation
    return sorted(pairs, key=lambda pair: -pair[1])


def _lanes(found: Found) -> list[Lane]:
    return [
        Lane("", predictor_label(found.subject.predictor(name)),
             message("without an end") if math.isinf(size) else f"× {ratio(size)}", ((size, 0),))
        for name, size in _ordered(found)[:_MOST]
    ]  # fmt: skip


def _ties(found: Found) -> list[str]:
    """What is tied to what, in words."""
    tied = found.evidence(CollinearityEvidence).tied
    told = []
    for each in tied[:_MOST_TIES]:
        columns, index = columns_named(each.columns), each.condition_index
        if math.isinf(index):
            told.append(message("Tied: {}, exactly.", columns))
        else:
            told.append(message("Tied: {} (condition index {}).", columns, ratio(index)))
    left = len(tied) - _MOST_TIES
    return told + ([message("And {} more ties.", count(left))] if left > 0 else [])


def _ties_height(found: Found, theme: Theme, width: float) -> float:
    ties = _ties(found)
    heights = sum(paragraph_height(words, theme, width, 0.94) for words in ties)
    return heights + (0.7 * theme.font_size if ties else 0.0)


def _frame(found: Found) -> tuple[tuple[str, ...], str, str]:
    return (), "", picture_axes(found.finding, found.subject)[0]


def _height(found: Found, theme: Theme, width: float) -> float:
    rows = lanes_height(_lanes(found), *_frame(found), theme, width)
    return rows + _ties_height(found, theme, width)


def _notes(found: Found) -> list[str]:
    notes = [
        message(
            "1: as if the predictor were unrelated to the others; 2: as if only 1 row in 4 were "
            "there to tell it apart; 5: as if only 1 in 25."
        )
    ]
    left = len(found.evidence(CollinearityEvidence).inflation) - _MOST
    if left > 0:
        notes.append(message("Not shown: {} more predictors, with less.", count(left)))
    return notes


def _paint(board: Board, found: Found, width: float, height: float) -> Margins:
    sizes = [size for _, size in _ordered(found) if math.isfinite(size)]
    upper = min(max([6.0, *(1.2 * size for size in sizes)]), _LARGEST)
    ties = _ties_height(found, board.theme, width)
    margins = draw_lanes(
        board, _lanes(found), *_frame(found), (0.97, upper), _MARKS, 1.0, width, height
    )
    y = -margins.bottom + ties - 0.5 * board.theme.font_size
    for words in _ties(found):
        y -= draw_paragraph(board, words, -margins.left, y, width, (0, 0), 0.94)
    return margins


COLLINEARITY = Plate(
    "collinearity", _height, _height, _notes, _paint, across="log",
    has_picture=lambda found: bool(found.evidence(CollinearityEvidence).inflation),
)  # fmt: skip
