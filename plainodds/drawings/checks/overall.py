"""Overall tests and measures, as a small table with their limits."""

from __future__ import annotations

from plainodds.drawings.checks.board import Board
from plainodds.drawings.checks.plate import Found, Plate
from plainodds.drawings.checks.tables import (
    draw_paragraph,
    draw_table,
    paragraph_height,
    table_height,
)
from plainodds.drawings.geometry import Margins
from plainodds.drawings.theme import Theme
from plainodds.phrases.checks.finding_words import finding_figures
from plainodds.phrases.checks.overall import overall_limits
from plainodds.phrases.lexicon import message

__all__ = ["OVERALL"]


def _table(found: Found) -> list[tuple[str, ...]]:
    heading = message("Test or measure"), message("figure")
    return [heading, *finding_figures(found.finding, found.subject, found.level)]


def _limits(theme: Theme, width: float) -> float:
    gap = 0.4 * theme.font_size
    return sum(paragraph_height(each, theme, width, 0.88) + gap for each in overall_limits())


def _height(found: Found, theme: Theme, width: float) -> float:
    return table_height(_table(found), theme, width) + 0.9 * theme.font_size + _limits(theme, width)


def _paint(board: Board, found: Found, width: float, height: float) -> Margins:
    theme, em = board.theme, board.theme.font_size
    rows = _table(found)
    draw_table(board, rows, 0.0, 0.0, width, (0, 1))
    y = -table_height(rows, theme, width) - 0.9 * em
    for words in overall_limits():
        y -= draw_paragraph(board, words, 0.0, y, width, (0, 1), 0.88, faint=True) + 0.4 * em
    return Margins(0.0, 0.0, 0.0, 0.0)


OVERALL = Plate("overall", _height, _height, lambda found: [], _paint)
