"""Rows of markers on a logarithmic axis, one or two to a row."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass

from plainodds.drawings.checks.along import Axis, draw_x_axis, x_axis_height
from plainodds.drawings.checks.board import Board
from plainodds.drawings.checks.rows import LaidRows, Row, draw_grid, draw_rows, laid_rows
from plainodds.drawings.furniture import Key
from plainodds.drawings.geometry import Margins
from plainodds.drawings.lettering import line_height
from plainodds.drawings.theme import Theme
from plainodds.phrases.numbers import quantity

__all__ = ["Lane", "draw_lanes", "lanes_height", "log_ticks"]

_STEPS = ((1.0, 2.0, 5.0), (1.0, 3.0), (1.0,))


@dataclass(frozen=True)
class Lane:
    """A row with its markers: where, and of which series. Beyond the axis they become arrows."""

    heading: str
    label: str
    figures: str
    marks: tuple[tuple[float, int], ...]


def log_ticks(lower: float, upper: float, most: int) -> tuple[float, ...]:
    """Round numbers on a logarithmic axis, at most so many where that can be."""
    first, last = math.floor(math.log10(lower)), math.ceil(math.log10(upper))
    ticks: tuple[float, ...] = ()
    for steps in _STEPS:
        ticks = tuple(
            each
            for power in range(first, last + 1)
            for each in (round(step * 10.0**power, 12) for step in steps)
            if lower * (1 - 1e-9) <= each <= upper * (1 + 1e-9)
        )
        if len(ticks) <= most:
            return ticks
    every = math.ceil(len(ticks) / max(1, most))
    return ticks[::every]


def _laid(lanes: Sequence[Lane], theme: Theme, width: float) -> LaidRows:
    return laid_rows([Row(each.heading, each.label, each.figures) for each in lanes], theme, width)


def _head(names: tuple[str, ...], heading: str, theme: Theme, width: float) -> float:
    key = Key.height(names, theme, width) + 0.3 * theme.font_size if names else 0.0
    return key + (line_height(theme.small) if heading else 0.0) + 0.4 * theme.font_size


def lanes_height(
    lanes: Sequence[Lane], names: tuple[str, ...], heading: str, title: str, theme: Theme,
    width: float,
) -> float:  # fmt: skip
    """Height in points of the key, the rows and their axis."""
    laid = _laid(lanes, theme, width)
    axis = x_axis_height(title, theme, laid.title_room(width))
    return _head(names, heading, theme, width) + laid.height + axis


def draw_lanes(
    board: Board, lanes: Sequence[Lane], names: tuple[str, ...], heading: str, title: str,
    ends: tuple[float, float], marks: Sequence[float], zero: float, width: float, height: float,
) -> Margins:  # fmt: skip
    """Draw rows of markers; give the room around the plot.

    Parameters
    ----------
    board : Board
        Its axes are logarithmic across.
    lanes : sequence of Lane
    names : tuple of str
        Of the series; empty where there is one only.
    heading : str
        Above the figures.
    title : str
        Of the axis.
    ends : tuple of float
        Of the axis, above 0.
    marks : sequence of float
        Where reference lines stand.
    zero : float
        Where lines to single markers begin.
    width, height : float
        Of the slot, in points.
    """
    theme, em = board.theme, board.theme.font_size
    laid, top = _laid(lanes, theme, width), _head(names, heading, theme, width)
    plot_width = width - laid.left - laid.right
    ticks = log_ticks(*ends, max(2, int(plot_width / (3.6 * theme.small))))
    axis = Axis(*ends, ticks, tuple(quantity(tick) for tick in ticks))
    draw_grid(board, laid, axis)
    _draw_marks(board, lanes, laid, ends, zero)
    board.strokes(
        "reference", [[(mark, -a), (mark, -b)] for a, b in laid.spans for mark in marks],
        transform=board.rows(), colors=theme.rule, linewidths=1.6 * theme.hairline,
        linestyles=(0, (3.0, 2.0)), zorder=2,
    )  # fmt: skip
    draw_rows(board, laid)
    draw_x_axis(board, axis, title, laid.title_room(width), 0.3 * em)
    board.axes.spines["bottom"].set_visible(False)
    if names:
        board.key(names, -laid.left, top - 0.1 * em, width)
    if heading:
        board.write(
            heading, laid.right, 0.2 * em, board.at(1, 1), across="right", down="bottom",
            colour=theme.faint,
        )  # fmt: skip
    return Margins(laid.left, laid.right, height - top - laid.height, top)


def _draw_marks(
    board: Board, lanes: Sequence[Lane], laid: LaidRows, ends: tuple[float, float], zero: float
) -> None:
    theme = board.theme
    low, high = ends
    inside: dict[int, list[tuple[float, float]]] = {}
    beyond: dict[tuple[int, str], list[tuple[float, float]]] = {}
    lines = []
    for lane, middle in zip(lanes, laid.middles, strict=True):
        reached = []
        for value, place in lane.marks:
            if math.isnan(value):
                continue
            reached.append(min(max(value, low), high))
            if low <= value <= high:
                inside.setdefault(place, []).append((value, -middle))
            else:
                side = "<" if value < low else ">"
                beyond.setdefault((place, side), []).append((reached[-1], -middle))
        if len(lane.marks) == 1:
            reached.append(zero)
        if len(reached) > 1:
            lines.append([(min(reached), -middle), (max(reached), -middle)])
    single = all(len(lane.marks) == 1 for lane in lanes)
    board.strokes(
        "joining", lines, transform=board.rows(),
        colors=theme.series(0).colour if single else theme.rule,
        linewidths=theme.line_width if single else 1.6 * theme.hairline, zorder=2.5,
    )  # fmt: skip
    for place, points in inside.items():
        board.marks(f"series {place}", points, place, transform=board.rows())
    for (place, side), points in beyond.items():
        board.marks(f"series {place} {side}", points, place, transform=board.rows(), marker=side)
