"""The axis beneath a printed table of odds ratios, visibly broken where something is cut."""

from __future__ import annotations

import math
from collections.abc import Callable, Sequence
from dataclasses import dataclass

from matplotlib.axes import Axes
from matplotlib.collections import LineCollection

from plainodds.answers.odds import OddsRow
from plainodds.drawings.geometry import corner
from plainodds.drawings.lettering import letter, line_height, text_width, tick_style
from plainodds.drawings.odds_axis import axis_range, axis_title, shown, sides
from plainodds.drawings.theme import Theme
from plainodds.drawings.ticks import fraction_ticks, label_ticks
from plainodds.phrases.numbers import simple_fraction

__all__ = ["Extent", "TableAxis", "extent_of"]

_TICK = 0.32  # letters
_APART = (1.6, 1.9, 2.3, 2.8, 3.4)  # ticks, in small letters
_BETWEEN_LABELS = 0.35  # letters
_HALF_GAP, _SLANT, _RISE = 0.2, 0.17, 0.42  # of the break, in letters
_ROUNDING = 1e-9


@dataclass(frozen=True)
class Extent:
    """The odds ratios that an axis shows, and on which sides it is broken.

    Attributes
    ----------
    lower, upper : float
        What lies beyond them is cut.
    low, high : float
        The ends of the axis.
    broken_left, broken_right : bool
    """

    lower: float
    upper: float
    low: float
    high: float
    broken_left: bool
    broken_right: bool

    def triple(self, row: OddsRow) -> tuple[float, float, float]:
        """Estimate and interval of a row; what is cut lies infinitely far off."""
        middle, low, high = shown(row)
        return self._cut(middle), self._cut(low), self._cut(high)

    def _cut(self, number: float) -> float:
        if number < self.lower * (1 - _ROUNDING):
            return 0.0
        return math.inf if number > self.upper * (1 + _ROUNDING) else number


def extent_of(panels: Sequence[Sequence[OddsRow]]) -> Extent:
    """The extent for the rows of one panel, or of several that share their scale."""
    ranges = [axis_range(rows) for rows in panels]
    lower, upper = min(low for low, _ in ranges), max(high for _, high in ranges)
    bare = Extent(lower, upper, lower, upper, False, False)
    cut = [each for rows in panels for row in rows for each in bare.triple(row)]
    left, right = 0.0 in cut, math.inf in cut
    # a break needs room beside the last tick
    share = {False: 0.05, True: 0.12}
    return Extent(
        lower,
        upper,
        lower / (upper / lower) ** share[left],
        upper * (upper / lower) ** share[right],
        left,
        right,
    )


class TableAxis:
    """Axis line with ticks and breaks, the line at 1, and what both sides mean.

    Attributes
    ----------
    line, breaks, ticks : LineCollection
        In points from the lower left of the plot.
    reference, grid : LineCollection
        At 1, and at the other ticks; in pieces where text stands between the lines.
    """

    def __init__(self, axes: Axes, theme: Theme) -> None:
        self._axes, self._theme = axes, theme
        points = corner(axes, 0, 0)
        thin, dark = 1.5 * theme.hairline, theme.rule
        self.line = LineCollection([], colors=dark, linewidths=thin, transform=points, zorder=2)
        self.breaks = LineCollection(
            [], colors=theme.ink, linewidths=thin, transform=points, zorder=2
        )
        self.ticks = LineCollection([], colors=dark, linewidths=thin, transform=points, zorder=2)
        self.grid = LineCollection([], colors=theme.grid, linewidths=theme.hairline, zorder=1)
        self.reference = LineCollection([], colors=dark, linewidths=thin, zorder=2)
        for lines in (self.line, self.breaks, self.ticks, self.grid, self.reference):
            axes.add_collection(lines, autolim=False)
            lines.set_clip_on(False)
        self.sides = [
            letter(axes, theme, points, size=theme.small, colour=theme.faint, across=across,
                   down="baseline")
            for across in ("right", "left")
        ]  # fmt: skip
        self.title = letter(
            axes,
            theme,
            points,
            size=theme.small,
            colour=theme.faint,
            across="center",
            down="baseline",
        )
        axes.tick_params(axis="x", labelbottom=True, pad=(_TICK + 0.1) * theme.font_size)

    @staticmethod
    def height(theme: Theme) -> float:
        """Height in points beneath the plot: ticks, sides and title."""
        return (_TICK + 0.45) * theme.font_size + 3.1 * line_height(theme.small)

    def place(
        self, extent: Extent, spans: Sequence[tuple[float, float]], plot_width: float,
        left: float, right: float,
    ) -> None:  # fmt: skip
        """Set the axis for a plot of a width in points, with so much room on either side."""
        theme, em = self._theme, self._theme.font_size
        low, high = extent.low, extent.high
        self._axes.set_xlim(low, high)

        def along(x: float) -> float:
            return plot_width * math.log(x / low) / math.log(high / low)

        ticks, labels = _ticks_of(extent, along, theme)
        label_ticks(self._axes, "x", ticks, labels, tick_style(theme))
        self.grid.set_segments([[(x, a), (x, b)] for a, b in spans for x in ticks])
        self.reference.set_segments([[(1.0, a), (1.0, b)] for a, b in spans])
        drop = _TICK * em
        self.ticks.set_segments([[(along(x), 0.0), (along(x), -drop)] for x in ticks])
        self._place_line(extent, plot_width)
        at_one, beneath = along(1.0), -drop - 0.25 * em - 1.9 * line_height(theme.small)
        rooms = (at_one + left, plot_width - at_one + right)
        for text, words, side, room in zip(self.sides, sides(), (-1, 1), rooms, strict=True):
            fits = room >= text_width(words, theme, theme.small) + 0.5 * em
            text.set_text(words if fits else "")
            text.set_position((at_one + side * 0.5 * em, beneath))
        title = axis_title()
        wide = text_width(title, theme, theme.small)
        middle = min(max(plot_width / 2, wide / 2 - left), plot_width + right - wide / 2)
        self.title.set_text(title)
        self.title.set_position((middle, beneath - 1.1 * line_height(theme.small)))

    def _place_line(self, extent: Extent, plot_width: float) -> None:
        """The line, with a gap between two slanted strokes on each side that is broken."""
        em = self._theme.font_size
        gap, slant, rise = _HALF_GAP * em, _SLANT * em, _RISE * em
        # halfway between the last odds ratio shown and the end of the axis
        share = 0.5 * math.log(extent.lower / extent.low) / math.log(extent.high / extent.low)
        centres = [share * plot_width] if extent.broken_left else []
        share = 0.5 * math.log(extent.high / extent.upper) / math.log(extent.high / extent.low)
        centres += [(1.0 - share) * plot_width] if extent.broken_right else []
        edges = [0.0, *(x + side * gap for x in centres for side in (-1, 1)), plot_width]
        self.line.set_segments(
            [[(a, 0.0), (b, 0.0)] for a, b in zip(edges[::2], edges[1::2], strict=True)]
        )
        self.breaks.set_segments(
            [
                [(x + side * gap - slant, -rise), (x + side * gap + slant, rise)]
                for x in centres
                for side in (-1, 1)
            ]
        )


def _ticks_of(
    extent: Extent, along: Callable[[float], float], theme: Theme
) -> tuple[tuple[float, ...], list[str]]:
    """Ticks as close as their labels allow; where only a few had room, some go without."""
    for apart in _APART:
        ratio = math.exp(apart * theme.small / (along(math.e) - along(1.0)))
        ticks = fraction_ticks(extent.lower, extent.upper, ratio)
        labels = _labels_of(ticks, along, theme)
        if len(ticks) > 2 and all(labels):
            return ticks, labels
    ratio = math.exp(_APART[0] * theme.small / (along(math.e) - along(1.0)))
    ticks = fraction_ticks(extent.lower, extent.upper, ratio)
    return ticks, _labels_of(ticks, along, theme)


def _labels_of(ticks: Sequence[float], along: Callable[[float], float], theme: Theme) -> list[str]:
    """Labels of ticks, from 1 outwards, as far as they don't meet."""
    labels = [""] * len(ticks)
    taken: list[tuple[float, float]] = []
    gap = _BETWEEN_LABELS * theme.font_size
    for i in sorted(range(len(ticks)), key=lambda i: abs(math.log(ticks[i]))):
        written, x = simple_fraction(ticks[i]), along(ticks[i])
        half = text_width(written, theme, theme.small) / 2
        if all(x + half + gap <= low or x - half - gap >= high for low, high in taken):
            labels[i] = written
            taken.append((x - half, x + half))
    return labels
