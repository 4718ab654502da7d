"""Cases with the event and without it, as rows of two lines each that end in a marker."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import replace

from plainodds.answers.checks.amount import LevelCount
from plainodds.drawings.checks.along import Axis, draw_x_axis, numbers_axis
from plainodds.drawings.checks.board import Board
from plainodds.drawings.checks.rows import LaidRows, Row, draw_grid, draw_rows, laid_rows
from plainodds.drawings.furniture import Key
from plainodds.drawings.lettering import line_height, wrapped
from plainodds.drawings.theme import Theme
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.parts import amount, part_of
from plainodds.phrases.labels import predictor_label, value_label
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import count

__all__ = ["MOST_LEVELS", "count_rows", "draw_counts", "head_height", "laid_counts"]

MOST_LEVELS = 12
"""So many levels a picture shows."""

_HALF = 0.3
_LANE = 1.75
_NONE = 1e-6


def count_rows(counts: Sequence[LevelCount], subject: Subject) -> list[Row]:
    """The rows of levels, with their events in words: "none of 14"."""
    rows = []
    for each in counts:
        facts = subject.predictor(each.predictor)
        rows.append(Row(predictor_label(facts), value_label(facts, each.level), _told(each)))
    return rows


def _told(held: LevelCount) -> str:
    whole = amount(held.cases)
    if held.events <= _NONE:
        return message("none of {cases}", cases=whole)
    if held.events >= held.cases - _NONE:
        if held.cases > 1 + _NONE:
            return message("all of {cases}", cases=whole)
        return message("the only one")
    return part_of(amount(held.events), whole)


def laid_counts(
    counts: Sequence[LevelCount], subject: Subject, theme: Theme, width: float
) -> LaidRows:
    """Lay the rows of levels out."""
    return laid_rows(count_rows(counts, subject), theme, width, _LANE)


def head_height(legend: tuple[str, str], theme: Theme, width: float) -> float:
    """Height in points of the key and the heading of figures above the rows."""
    return Key.height(legend, theme, width) + line_height(theme.small) + 0.7 * theme.font_size


def draw_counts(
    board: Board, counts: Sequence[LevelCount], laid: LaidRows, legend: tuple[str, str],
    title: str, width: float,
) -> None:  # fmt: skip
    """Draw key, rows, lines and the axis of counts.

    Parameters
    ----------
    board : Board
    counts : sequence of LevelCount
    laid : LaidRows
        Of these counts, in this order.
    legend : tuple of str
        What cases with the event are called, and cases without it.
    title : str
        Of the axis.
    width : float
        Of the slot, in points.
    """
    theme, em = board.theme, board.theme.font_size
    plot_width = width - laid.left - laid.right
    sides = [(each.events, each.cases - each.events) for each in counts]
    highest = max(max(side) for side in sides)
    axis = _axis(highest, int(plot_width / (4.2 * theme.small)))
    draw_grid(board, laid, axis, 0.0)
    draw_rows(board, laid)
    for place, name in enumerate(("events", "others")):
        # others are drawn beneath events, a little lower in their lane
        heights = [-middle + (1 - 2 * place) * _HALF * em for middle in laid.middles]
        ends = [max(side[place], 0.0) for side in sides]
        board.strokes(
            name, [[(0.0, y), (end, y)] for end, y in zip(ends, heights, strict=True)],
            transform=board.rows(), colors=theme.series(place).colour,
            linewidths=theme.line_width, zorder=3,
        )  # fmt: skip
        board.marks(
            f"{name} marks", list(zip(ends, heights, strict=True)), place,
            transform=board.rows(), scale=0.78,
        )  # fmt: skip
    top = head_height(legend, theme, width) - 0.1 * em
    board.key(legend, -laid.left, top, width)
    board.write(
        wrapped(legend[0], laid.right + 0.5 * plot_width, theme, theme.small, 1), laid.right,
        0.25 * em, board.at(1, 1), across="right", down="bottom", colour=theme.faint,
    )  # fmt: skip
    draw_x_axis(board, axis, title, laid.title_room(width), 0.3 * em)
    board.axes.spines["bottom"].set_visible(False)


def _axis(highest: float, most: int) -> Axis:
    axis = numbers_axis(0.0, highest, most).of_whole_numbers()
    labels = tuple(count(round(tick)) for tick in axis.ticks)
    return replace(axis, upper=1.02 * highest or 1.0, labels=labels)
