"""Names at the right ends of lines."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

from plainodds.drawings.checks.board import Board
from plainodds.drawings.geometry import apart
from plainodds.drawings.lettering import line_height, text_width, wrapped
from plainodds.drawings.theme import Theme

__all__ = ["EndLabel", "draw_ends", "ends_width"]

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
