"""One figure on a logarithmic line whose zones are told in words."""

from __future__ import annotations

import math
from dataclasses import dataclass

from plainodds.drawings.checks.along import Axis, draw_x_axis, x_axis_height
from plainodds.drawings.checks.board import Board
from plainodds.drawings.geometry import Margins
from plainodds.drawings.lettering import line_height, text_width, wrapped
from plainodds.drawings.theme import Theme

__all__ = ["Gauge", "draw_gauge", "gauge_height", "gauge_margins"]

_ZONE_LINES = 4
_LANE = 2.6


@dataclass(frozen=True)
class Gauge:
    """What a gauge shows.

    Attributes
    ----------
    value : float
        Above 0; beyond the ends it becomes an arrow.
    figure : str
        The value in words.
    lower, upper : float
        Ends of the line, above 0.
    marks : tuple of float
        Where zones meet.
    zones : tuple of str
        One more than marks.
    ticks : tuple of (float, str)
    title : str
    """

    value: float
    figure: str
    lower: float
    upper: float
    marks: tuple[float, ...]
    zones: tuple[str, ...]
    ticks: tuple[tuple[float, str], ...]
    title: str

    def share(self, at: float) -> float:
        """How far along the line a value lies, from 0 to 1."""
        low, high = math.log(self.lower), math.log(self.upper)
        inside = math.log(min(max(at, self.lower), self.upper))
        return (inside - low) / (high - low)


def gauge_margins(theme: Theme) -> float:
    """Room in points on either side of the line."""
    return 1.2 * theme.font_size


def _zones(gauge: Gauge, theme: Theme, width: float) -> list[tuple[str, float]]:
    """Each zone's words, broken, and where they are centred along a line of this width."""
    ends = [0.0, *(gauge.share(mark) * width for mark in gauge.marks), width]
    zones = []
    for words, first, last in zip(gauge.zones, ends[:-1], ends[1:], strict=True):
        room = last - first - 0.5 * theme.font_size
        widest = max(text_width(word, theme, theme.small) for word in words.split(" "))
        # a zone too narrow for its words goes without
        broken = wrapped(words, room, theme, theme.small, _ZONE_LINES) if widest <= room else ""
        zones.append((broken, (first + last) / 2))
    return zones


def gauge_height(gauge: Gauge, theme: Theme, width: float) -> float:
    """Height in points for a slot of a width: zones, lane, ticks and title."""
    inner = width - 2 * gauge_margins(theme)
    return (
        _above(gauge, theme, inner)
        + _LANE * theme.font_size
        + x_axis_height(gauge.title, theme, width)
    )


def _above(gauge: Gauge, theme: Theme, inner: float) -> float:
    lines = max(words.count("\n") for words, _ in _zones(gauge, theme, inner)) + 1
    return line_height(theme.small, lines) + 0.4 * theme.font_size


def draw_gauge(board: Board, gauge: Gauge, width: float, height: float) -> Margins:
    """Draw the line with its zones; give the room around the plot, which is the lane.

    Parameters
    ----------
    board : Board
        Its axes are logarithmic across.
    gauge : Gauge
    width, height : float
        Of the slot, in points; the gauge stands at its upper end.
    """
    theme, em = board.theme, board.theme.font_size
    side = gauge_margins(theme)
    inner = width - 2 * side
    above = _above(gauge, theme, inner)
    lane = _LANE * em
    axis = Axis(
        gauge.lower, gauge.upper, tuple(at for at, _ in gauge.ticks),
        tuple(words for _, words in gauge.ticks),
    )  # fmt: skip
    draw_x_axis(board, axis, gauge.title, width, 0.3 * em)
    top = board.at(0, 1)
    for words, middle in _zones(gauge, theme, inner):
        board.write(
            words, middle, 0.3 * em, top, across="center", down="bottom", colour=theme.faint
        )
    _draw_value(board, gauge, inner, lane, above)
    return Margins(side, side, height - above - lane, above)


def _draw_value(board: Board, gauge: Gauge, inner: float, lane: float, above: float) -> None:
    theme, em = board.theme, board.theme.font_size
    share = gauge.share(gauge.value)
    beyond = "" if gauge.lower <= gauge.value <= gauge.upper else "<" if share < 0.5 else ">"
    place = min(max(gauge.value, gauge.lower), gauge.upper)
    y = -0.52 * lane
    name = {"": "value", "<": "value below", ">": "value above"}[beyond]
    board.marks(name, [(place, y)], 0, transform=board.rows(), marker=beyond, scale=1.25)
    wide = text_width(gauge.figure, theme, em, "bold")
    left = share * inner + wide + 1.2 * em > inner + gauge_margins(theme)
    x = share * inner + (-0.9 * em if left else 0.9 * em)
    board.write(
        gauge.figure, x, y, board.at(0, 1), size=em, weight="bold",
        across="right" if left else "left",
    )  # fmt: skip
    first = x - wide if left else x
    lines = []
    for mark in gauge.marks:
        at, top, foot = gauge.share(mark) * inner, above - 0.1 * em, -lane
        if first - 0.3 * em < at < first + wide + 0.3 * em:
            # a mark gives way to the figure
            half = 0.5 * line_height(em)
            lines += [[(mark, top), (mark, y + half)], [(mark, y - half), (mark, foot)]]
        else:
            lines.append([(mark, top), (mark, foot)])
    board.strokes(
        "marks", lines, transform=board.rows(), colors=theme.rule,
        linewidths=1.6 * theme.hairline, linestyles=(0, (3.0, 2.0)), zorder=2,
    )  # fmt: skip
