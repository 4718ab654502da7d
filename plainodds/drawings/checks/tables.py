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


def _columns(rows: Cells, theme: Theme, width: float) -> tuple[float, list[float]]:
    """Widths of the first column, which may be broken, and of those with figures."""
    columns = list(zip(*rows, strict=True))
    widths = [max(text_width(cell, theme, theme.small) for cell in column) for column in columns]
    rest = sum(widths[1:]) + _GAP * theme.font_size * len(widths[1:])
    return min(widths[0], max(width - rest, 0.3 * width)), widths[1:]


def _names(rows: Cells, theme: Theme, width: float) -> list[str]:
    first, _ = _columns(rows, theme, width)
    return [wrapped(row[0], first, theme, theme.small, 3) for row in rows]


def _height(name: str, theme: Theme) -> float:
    return line_height(theme.small, name.count("\n") + 1) + _AIR * theme.font_size


def table_height(rows: Cells, theme: Theme, width: float) -> float:
    """Height in points of a table, its heading counted; 0 of none."""
    return sum(_height(name, theme) for name in _names(rows, theme, width)) if rows else 0.0


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
    first, widths = _columns(rows, theme, width)
    ends, edge = [], x + first
    for each in widths:
        edge += _GAP * theme.font_size + each
        ends.append(edge)
    rules = []
    for place, (row, name) in enumerate(zip(rows, _names(rows, theme, width), strict=True)):
        height = _height(name, theme)
        colour = theme.ink if place else theme.faint
        board.write(name, x, y - height / 2, points, colour=colour)
        for cell, end in zip(row[1:], ends, strict=True):
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
