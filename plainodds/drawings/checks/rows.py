"""Rows of a picture: a label, a lane of the plot, and figures; stacked where it is narrow."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

from plainodds.drawings.checks.along import Axis
from plainodds.drawings.checks.board import Board
from plainodds.drawings.lettering import line_height, text_width, wrapped
from plainodds.drawings.odds_rows import is_narrow
from plainodds.drawings.theme import Theme

__all__ = ["LANE", "LaidRows", "Row", "draw_grid", "draw_rows", "laid_rows"]

_WIDEST_LABELS = 0.36
_WIDEST_FIGURES = 0.36
_GAP = 1.1
_INDENT = 0.9
LANE = 1.55
"""Height of a row at least, in letters."""
_MOST_LINES = 2


@dataclass(frozen=True)
class Row:
    """A row's label and figures; `heading` is written above the first of those that share it."""

    heading: str
    label: str
    figures: str


@dataclass(frozen=True)
class LaidRows:
    """Texts and heights in points, measured downwards from the top of the first row.

    `middles` are the heights of the rows' lanes, `spans` the heights between which the plot is
    free of labels; `left` and `right` are the room beside the plot.
    """

    heads: tuple[tuple[str, float], ...]
    labels: tuple[tuple[str, float, float], ...]  # text, indent, height
    figures: tuple[tuple[str, float], ...]
    middles: tuple[float, ...]
    spans: tuple[tuple[float, float], ...]
    left: float
    right: float
    height: float
    stacked: bool

    def title_room(self, width: float) -> float:
        """Room in points for the title of the axis, centred on the plot."""
        return width - self.left - self.right + 2 * min(self.left, self.right)


def laid_rows(rows: Sequence[Row], theme: Theme, width: float, lane: float = LANE) -> LaidRows:
    """Lay rows out for a width in points: beside the plot, or above their lanes if narrow.

    Parameters
    ----------
    rows : sequence of Row
    theme : Theme
    width : float
    lane : float
        Height of a row's lane at least, in letters.
    """
    lay = _stacked if is_narrow(theme, width) else _beside
    return lay(rows, theme, width, lane)


def _beside(rows: Sequence[Row], theme: Theme, width: float, lane: float) -> LaidRows:
    em, line = theme.font_size, line_height(theme.font_size)
    indents = [_INDENT * em if row.heading else 0.0 for row in rows]
    wanted = [
        indent + text_width(row.label, theme, em) for row, indent in zip(rows, indents, strict=True)
    ]
    wanted += [text_width(row.heading, theme, em, "bold") for row in rows]
    room = min(max(wanted), _WIDEST_LABELS * width)
    right = min(max(text_width(row.figures, theme, em) for row in rows), _WIDEST_FIGURES * width)
    heads, labels, figures, middles = [], [], [], []
    y, before = 0.0, ""
    for row, indent in zip(rows, indents, strict=True):
        if row.heading and row.heading != before:
            y += 0.35 * em if before else 0.0
            heads.append((wrapped(row.heading, room, theme, em, 1, "bold"), y + line / 2))
            y += line
        before = row.heading
        label = wrapped(row.label, room - indent, theme, em, _MOST_LINES)
        figure = wrapped(row.figures, right, theme, em, _MOST_LINES)
        lines = max(label.count("\n"), figure.count("\n")) + 1
        height = max(line * lines + 0.1 * em, lane * em)
        middle = y + height / 2
        labels.append((label, indent, middle))
        figures.append((figure, middle))
        middles.append(middle)
        y += height
    gap = _GAP * em
    return LaidRows(
        tuple(heads), tuple(labels), tuple(figures), tuple(middles), ((0.0, y),), room + gap,
        right + gap, y, False,
    )  # fmt: skip


def _stacked(rows: Sequence[Row], theme: Theme, width: float, lane: float) -> LaidRows:
    em, line = theme.font_size, line_height(theme.font_size)
    heads, labels, figures, middles, spans = [], [], [], [], []
    y, before = 0.0, ""
    for row in rows:
        if row.heading and row.heading != before:
            y += 0.35 * em if before else 0.0
            heads.append((wrapped(row.heading, width, theme, em, 1, "bold"), y + line / 2))
            y += line
        before = row.heading
        indent = _INDENT * em if row.heading else 0.0
        figure = wrapped(row.figures, width, theme, em, _MOST_LINES)
        beside = text_width(figure, theme, em) + _GAP * em
        own_line = width - beside - indent < text_width(row.label, theme, em)
        label = wrapped(
            row.label, width - indent - (0.0 if own_line else beside), theme, em, _MOST_LINES
        )
        labels.append((label, indent, y + line * (label.count("\n") + 1) / 2))
        y += line * (label.count("\n") + 1) if own_line else 0.0
        lines = figure.count("\n") + 1 if figure else (0 if own_line else 1)
        figures.append((figure, y + line * lines / 2))
        y += line * lines
        spans.append((y, y + lane * em))
        middles.append(y + lane * em / 2)
        y += (lane + 0.2) * em
    return LaidRows(
        tuple(heads), tuple(labels), tuple(figures), tuple(middles), tuple(spans), 0.8 * em,
        0.8 * em, y, True,
    )  # fmt: skip


def draw_rows(
    board: Board, laid: LaidRows, down: float = 0.0, outer: tuple[float, float] | None = None,
    up: float = 1.0,
) -> None:  # fmt: skip
    """Write labels and figures.

    Parameters
    ----------
    board : Board
    laid : LaidRows
    down : float
        How many points beneath the top of the plot (or its bottom) the first row begins.
    outer : tuple of float, optional
        Room beside the axes' own plot, where the rows are laid out for another one.
    up : float
        1 to measure from the top of the plot, 0 from its bottom.
    """
    em = board.theme.font_size
    left, right = board.at(0, up), board.at(1, up)
    first, last = (laid.left, laid.right) if outer is None else outer
    for words, y in laid.heads:
        board.write(words, -first, -down - y, left, size=em, weight="bold")
    for words, indent, y in laid.labels:
        board.write(words, indent - first, -down - y, left, size=em)
    for words, y in laid.figures:
        if laid.stacked:
            board.write(words, last, -down - y, right, size=em, across="right")
        else:
            board.write(words, last - laid.right + _GAP * em, -down - y, right, size=em)


def draw_grid(board: Board, laid: LaidRows, axis: Axis, zero: float | None = None) -> None:
    """Draw upright lines at the ticks where no labels are, and a stronger one at `zero`."""
    theme = board.theme
    ticks = [tick for tick in axis.ticks if tick != zero]
    board.strokes(
        "grid", [[(tick, -a), (tick, -b)] for a, b in laid.spans for tick in ticks],
        transform=board.rows(), colors=theme.grid, linewidths=theme.hairline, zorder=1,
    )  # fmt: skip
    board.strokes(
        "zero", [[(zero, -a), (zero, -b)] for a, b in laid.spans] if zero is not None else [],
        transform=board.rows(), colors=theme.rule, linewidths=1.6 * theme.hairline, zorder=2,
    )  # fmt: skip
