"""A finding told in words, where there is nothing to draw."""

from __future__ import annotations

from plainodds.drawings.checks.board import Board
from plainodds.drawings.checks.plate import Found, Plate
from plainodds.drawings.checks.tables import draw_paragraph, paragraph_height
from plainodds.drawings.geometry import Margins
from plainodds.drawings.theme import Theme
from plainodds.phrases.checks.finding_words import finding_words

__all__ = ["TOLD"]

_SMALL = 0.94


def _parts(found: Found) -> tuple[tuple[str, float, bool], ...]:
    words = finding_words(found.finding, found.subject, found.level)
    step = words.next_step.replace("`", "")
    return ((words.what, 1.0, False), (words.why, _SMALL, True), (step, _SMALL, False))


def _height(found: Found, theme: Theme, width: float) -> float:
    gaps = 0.55 * theme.font_size
    return sum(
        paragraph_height(words, theme, _measure(theme, width), size) + gaps
        for words, size, _ in _parts(found)
    )


def _measure(theme: Theme, width: float) -> float:
    """Lines of no more letters than are read with ease."""
    return min(width, 48 * theme.font_size)


def _paint(board: Board, found: Found, width: float, height: float) -> Margins:
    theme = board.theme
    y = 0.0
    for words, size, faint in _parts(found):
        y -= draw_paragraph(board, words, 0.0, y, _measure(theme, width), (0, 1), size, faint)
        y -= 0.55 * theme.font_size
    return Margins(0.0, 0.0, 0.0, 0.0)


TOLD = Plate("told", _height, _height, lambda found: [], _paint)
