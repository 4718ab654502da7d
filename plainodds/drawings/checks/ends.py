"""Names at the right ends of lines, or above the plot where there is no room beside it."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

from plainodds.drawings.checks.board import Board
from plainodds.drawings.geometry import apart
from plainodds.drawings.lettering import line_height, text_width, wrapped
from plainodds.drawings.theme import Theme

__all__ = ["EndLabel", "above_height", "draw_above", "draw_ends", "ends_width"]

_WIDEST, _MOST = 0.28, 0.36
_INDENT = 2.3


@dataclass(frozen=True)
class EndLabel:
    """What a line is called, where it ends, and which series it is.

    `height` is how far up the plot it ends, from 0 to 1, `before` how many points left of the
    plot's right edge. A series of −1 is a reference line, which has no marker.
    """

    name: str
    height: float
    place: int
    before: float = 0.0


def ends_width(names: Sequence[str], theme: Theme, width: float) -> float:
    """Width in points that the names take."""
    em = theme.font_size
    longest = max(text_width(name, theme, em) for name in names)
    word = max(text_width(word, theme, em) for name in names for word in name.split(" "))
    indent = (_INDENT + 0.3) * em
    return min(max(_WIDEST * width, min(word + indent, _MOST * width)), longest + indent)


def draw_ends(board: Board, labels: Sequence[EndLabel], width: float, plot_height: float) -> None:
    """Write each name as near to its line's end as it goes without overlap.

    Parameters
    ----------
    board : Board
    labels : sequence of EndLabel
    width : float
        Room in points to the right of the plot.
    plot_height : float
        In points.
    """
    theme, em = board.theme, board.theme.font_size
    beside = board.at(1, 0)
    texts = [wrapped(each.name, width - _INDENT * em, theme, em, 4) for each in labels]
    sizes = [line_height(em, text.count("\n") + 1) for text in texts]
    ends = [each.height * plot_height for each in labels]
    middles = apart(ends, sizes, -0.5 * em, plot_height + 0.5 * em)
    for each, text, middle in zip(labels, texts, middles, strict=True):
        board.write(text, _INDENT * em, middle, beside, size=em)
        if each.place >= 0:
            series = theme.series(each.place)
            board.marks(
                f"end mark {each.place}", [(1.35 * em, middle)], each.place, transform=beside,
                hollow=each.place == 0,
            )  # fmt: skip
            colour = series.colour
        else:
            colour = theme.rule
        board.strokes(
            f"leader {each.place}",
            [[(-each.before + 0.15 * em, each.height * plot_height), (0.85 * em, middle)]],
            transform=beside, colors=colour, linewidths=1.4 * theme.hairline, zorder=2,
        )  # fmt: skip


def _places(names: Sequence[str], theme: Theme, width: float) -> list[tuple[int, float, str]]:
    """Line, place along it and words of each name above the plot."""
    em, line, x = theme.font_size, 0, 0.0
    places = []
    for name in names:
        words = wrapped(name, width - _INDENT * em, theme, theme.small, 1)
        needed = _INDENT * em + text_width(words, theme, theme.small)
        if x > 0 and x + needed > width:
            line, x = line + 1, 0.0
        places.append((line, x, words))
        x += needed + 1.4 * em
    return places


def above_height(names: Sequence[str], theme: Theme, width: float) -> float:
    """Height in points that names take above the plot."""
    return line_height(theme.small, 1 + _places(names, theme, width)[-1][0])


def draw_above(board: Board, labels: Sequence[EndLabel], x: float, y: float, width: float) -> None:
    """Write names above the plot, each with a piece of its line.

    Parameters
    ----------
    board : Board
    labels : sequence of EndLabel
        Of which only name and series are used.
    x, y : float
        In points from the upper left corner of the plot.
    width : float
        Of the slot, in points.
    """
    theme, em, points = board.theme, board.theme.font_size, board.at(0, 1)
    step = line_height(theme.small)
    places = _places([each.name for each in labels], theme, width)
    for each, (line, along, words) in zip(labels, places, strict=True):
        middle, start = y - (line + 0.5) * step, x + along
        reference = each.place < 0
        board.line(
            f"sample {each.place}", [start, start + 1.8 * em], [middle, middle], transform=points,
            clip=False, color=theme.rule if reference else theme.series(each.place).colour,
            linewidth=1.6 * theme.hairline if reference else theme.line_width,
            linestyle=(0, (4.0, 2.4)) if reference else "-",
        )  # fmt: skip
        if not reference:
            board.marks(
                f"sample mark {each.place}", [(start + 0.9 * em, middle)], each.place,
                transform=points, hollow=each.place == 0,
            )  # fmt: skip
        board.write(words, start + _INDENT * em, middle, points)
