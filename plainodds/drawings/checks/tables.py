"""Small tables and paragraphs within pictures."""

from __future__ import annotations

from collections.abc import Sequence

from plainodds.drawings.checks.board import Board
from plainodds.drawings.lettering import line_height, text_width, wrapped
from plainodds.drawings.theme import Theme

__all__ = ["draw_paragraph", "draw_table", "paragraph_height", "table_height"]

Cells = Sequence[tuple[str, ...]]

_MOST_LINES = 8
_GAP = 1.4
_AIR = 0.35
_FIGURES = 0.7
"""So much of the width the figures may take."""


def _laid(rows: Cells, theme: Theme, width: float) -> tuple[list[float], list[list[str]]]:
    """Widths of the columns, and the cells, broken where they would not fit otherwise."""
    small, gap = theme.small, _GAP * theme.font_size
    count = len(rows[0]) - 1
    most = (_FIGURES * width - gap * count) / count
    figures = [[wrapped(cell, most, theme, small, 3) for cell in row[1:]] for row in rows]
    widths = [max(text_width(cell, theme, small) for cell in column)
              for column in zip(*figures, strict=True)]  # fmt: skip
    longest = max(text_width(row[0], theme, small) for row in rows)
    first = min(longest, width - sum(widths) - gap * count)
    names = [wrapped(row[0], first, theme, small, 3) for row in rows]
    return [first, *widths], [[name, *cells] for name, cells in zip(names, figures, strict=True)]


def _height(cells: Sequence[str], theme: Theme) -> float:
    lines = max(cell.count("\n") for cell in cells) + 1
    return line_height(theme.small, lines) + _AIR * theme.font_size


def table_height(rows: Cells, theme: Theme, width: float) -> float:
    """Height in points of a table, its heading counted; 0 of none."""
    if not rows:
        return 0.0
    _, broken = _laid(rows, theme, width)
    return sum(_height(cells, theme) for cells in broken)


def draw_table(
    board: Board, rows: Cells, x: float, y: float, width: float, origin: tuple[float, float]
) -> None:
    """Write a table whose first row is its heading.

    Parameters
    ----------
    board : Board
    rows : sequence of tuple of str
        The first cell of each is set flush left, figures flush right.
    x, y : float
        Upper left corner, in points from `origin`.
    width : float
        The most it may take.
    origin : tuple of float
        A corner of the plot.
    """
    theme, points = board.theme, board.at(*origin)
    (first, *widths), broken = _laid(rows, theme, width)
    ends, edge = [], x + first
    for each in widths:
        edge += _GAP * theme.font_size + each
        ends.append(edge)
    rules = []
    for place, (name, *cells) in enumerate(broken):
        height = _height((name, *cells), theme)
        colour = theme.ink if place else theme.faint
        board.write(name, x, y - height / 2, points, colour=colour)
        for cell, end in zip(cells, ends, strict=True):
            board.write(cell, end, y - height / 2, points, colour=colour, across="right")
        y -= height
        rules.append([(x, y), (edge, y)])
    board.strokes(
        f"rules of {rows[0][0]}", rules, transform=points, colors=theme.grid,
        linewidths=1.4 * theme.hairline, zorder=1,
    )  # fmt: skip


def _broken(words: str, theme: Theme, width: float, size: float) -> str:
    return wrapped(words, width, theme, size, _MOST_LINES)


def paragraph_height(words: str, theme: Theme, width: float, size: float = 1.0) -> float:
    """Height in points of a paragraph; `size` is in letters of the theme."""
    broken = _broken(words, theme, width, size * theme.font_size)
    return line_height(size * theme.font_size, broken.count("\n") + 1) if words else 0.0


def draw_paragraph(
    board: Board, words: str, x: float, y: float, width: float, origin: tuple[float, float],
    size: float = 1.0, faint: bool = False,
) -> float:  # fmt: skip
    """Write a paragraph with its upper left corner at points from a corner; give its height."""
    theme = board.theme
    if not words:
        return 0.0
    board.write(
        _broken(words, theme, width, size * theme.font_size), x, y, board.at(*origin), down="top",
        size=size * theme.font_size, colour=theme.faint if faint else theme.ink,
    )  # fmt: skip
    return paragraph_height(words, theme, width, size)
