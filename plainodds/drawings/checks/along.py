"""Axes and strips that several pictures of checks share."""

from __future__ import annotations

import math
from collections.abc import Iterable, Sequence
from dataclasses import dataclass

import numpy as np

from plainodds.drawings.checks.board import Board
from plainodds.drawings.lettering import line_height, text_width, tick_style, wrapped
from plainodds.drawings.theme import Theme
from plainodds.drawings.ticks import label_ticks, round_ticks
from plainodds.phrases.numbers import quantity

__all__ = [
    "Axis",
    "chances_axis",
    "density",
    "draw_strip",
    "draw_x_axis",
    "draw_y_axis",
    "marked_places",
    "numbers_axis",
    "plot_room",
    "x_axis_height",
    "y_axis_width",
]

_MARKED = 5
_LEAST_PLOT = 0.5
_NARROWEST = 1 / 45


@dataclass(frozen=True)
class Axis:
    """Ends of an axis, its ticks and what is written at them."""

    lower: float
    upper: float
    ticks: tuple[float, ...]
    labels: tuple[str, ...]

    def share(self, at: float) -> float:
        """How far along the axis a value lies, from 0 to 1."""
        return min(1.0, max(0.0, (at - self.lower) / (self.upper - self.lower)))

    def of_whole_numbers(self) -> Axis:
        """The same axis without ticks between whole numbers."""
        kept = [place for place, tick in enumerate(self.ticks) if tick == round(tick)]
        return Axis(
            self.lower, self.upper, tuple(self.ticks[place] for place in kept),
            tuple(self.labels[place] for place in kept),
        )  # fmt: skip


def chances_axis(inner: Iterable[float], outer: Iterable[float], most: int) -> Axis:
    """An axis of chances in percent, cut to the range in use.

    Parameters
    ----------
    inner : iterable of float
        What has to be on it.
    outer : iterable of float
        Ends of intervals: on it as far as they don't squash the rest.
    most : int
        How many ticks there is room for.
    """
    low, high = _ends(inner)
    span = high - low or 0.02
    ends = [low, high, *(each for each in outer if math.isfinite(each))]
    lowest = max(min(ends), low - 0.6 * span, 0.0)
    highest = min(max(ends), high + 0.6 * span, 1.0)
    if highest <= lowest:
        lowest, highest = max(low - span, 0.0), min(low + span, 1.0)
    room = 0.05 * (highest - lowest)
    # the ends of the scale are shown where they cost little
    lower = lowest - room if lowest > 0.5 * (highest - lowest) else -0.4 * room
    upper = highest + room if 1 - highest > 0.12 * (highest - lowest) else 1 + 0.4 * room
    ticks = round_ticks(max(lower, 0.0), min(upper, 1.0), max(2, most))
    labels = tuple(quantity(round(100 * tick, 9), "%") for tick in ticks)
    return Axis(lower, upper, ticks, labels)


def numbers_axis(lower: float, upper: float, most: int) -> Axis:
    """An axis of plain numbers between two ends."""
    ticks = round_ticks(lower, upper, max(2, most))
    return Axis(lower, upper, ticks, tuple(quantity(tick) for tick in ticks))


def _ends(values: Iterable[float]) -> tuple[float, float]:
    finite = [each for each in values if math.isfinite(each)]
    return (min(finite), max(finite)) if finite else (0.0, 1.0)


def y_axis_width(axis: Axis, theme: Theme) -> float:
    """Width in points that the labels of a vertical axis take."""
    widest = max((text_width(label, theme, theme.small) for label in axis.labels), default=0.0)
    return widest + 0.4 * theme.font_size


def draw_y_axis(board: Board, axis: Axis) -> None:
    """Set the vertical axis with its grid."""
    axes, theme = board.axes, board.theme
    axes.yaxis.grid(visible=True, color=theme.grid, linewidth=theme.hairline, linestyle="-")
    axes.tick_params(axis="y", labelleft=True, length=0, pad=0.4 * theme.font_size)
    label_ticks(axes, "y", axis.ticks, axis.labels, tick_style(theme))
    axes.set_ylim(axis.lower, axis.upper)


def plot_room(width: float) -> float:
    """Room in points that a plot's own title has at least, whatever stands beside the plot."""
    return _LEAST_PLOT * width


def x_axis_height(title: str, theme: Theme, room: float) -> float:
    """Height in points of tick labels and a title for which there is so much room across."""
    lines = 1 if text_width(title, theme, theme.small) <= room else 2
    return line_height(theme.small, 1 + lines) + 0.5 * theme.font_size


def draw_x_axis(board: Board, axis: Axis, title: str, width: float, down: float) -> None:
    """Set the horizontal axis with its title.

    Parameters
    ----------
    board : Board
    axis : Axis
    title : str
    width : float
        That the title may take, in points.
    down : float
        How many points beneath the plot its tick labels begin.
    """
    axes, theme = board.axes, board.theme
    floor = axes.spines["bottom"]
    floor.set(visible=True, linewidth=1.4 * theme.hairline, color=theme.rule)
    axes.tick_params(axis="x", labelbottom=True, length=0, pad=down)
    label_ticks(axes, "x", axis.ticks, axis.labels, tick_style(theme))
    axes.set_xlim(axis.lower, axis.upper)
    words = wrapped(title, width, theme, theme.small, 2)
    beneath = -down - 1.25 * theme.small - 0.05 * theme.font_size
    board.write(words, 0.0, beneath, board.at(0.5, 0), across="center", down="top")


def marked_places(points: int, offset: float) -> list[int]:
    """Where a line carries markers: a few places, no two lines alike."""
    if points <= _MARKED:
        return list(range(points))
    steps = (np.arange(_MARKED) + offset) / _MARKED
    return [int(each) for each in np.unique(np.round(steps * (points - 1)))]


def density(
    lows: Sequence[float], highs: Sequence[float], cases: Sequence[float], span: float
) -> list[tuple[float, float, float]]:
    """Bars (from, to, height) whose areas are cases; the highest is 1.

    Bins of one value get a width of their own, and gaps between neighbours are shared.
    """
    least = _NARROWEST * span
    bars: list[tuple[float, float, float]] = []
    for place, (low, high, number) in enumerate(zip(lows, highs, cases, strict=True)):
        first, last = low, high
        if high > low:
            if place and highs[place - 1] < low < highs[place - 1] + least:
                first = (highs[place - 1] + low) / 2
            if place + 1 < len(lows) and high < lows[place + 1] < high + least:
                last = (high + lows[place + 1]) / 2
        if last - first < least:
            middle = (first + last) / 2
            first, last = middle - least / 2, middle + least / 2
        bars.append((first, last, number / (last - first)))
    highest = max((height for _, _, height in bars), default=0.0) or 1.0
    return [(first, last, height / highest) for first, last, height in bars]


def draw_strip(
    board: Board, name: str, bars: Sequence[tuple[float, float, float]], axis: Axis,
    plot_width: float, height: float,
) -> None:  # fmt: skip
    """Draw bars beneath the plot that say where the cases are.

    Parameters
    ----------
    board : Board
    name : str
    bars : sequence of (from, to, height)
        Along the horizontal axis; heights from 0 to 1.
    axis : Axis
    plot_width, height : float
        In points.
    """
    outline: list[tuple[float, float]] = []
    base = -1.25 * height
    for first, last, share in bars:
        if share > 0:
            left, right = (axis.share(each) * plot_width for each in (first, last))
            top = base + height * max(share, 0.1)
            outline += [(left, base), (left, top), (right, top), (right, base)]
    # all bars are one outline, so that neighbours that overlap are not darker there
    board.area(
        name, [outline] if outline else [], transform=board.at(0, 0),
        facecolor=board.theme.rule, alpha=0.6, zorder=2,
    )  # fmt: skip
