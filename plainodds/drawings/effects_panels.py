"""The panels of a picture of effects: their places, their own axes, their artists."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass, replace

from matplotlib.axes import Axes
from matplotlib.collections import LineCollection
from matplotlib.transforms import Affine2D, blended_transform_factory

from plainodds.answers.effects import EffectsAnswer
from plainodds.drawings.dots import Dots
from plainodds.drawings.effects_axis import Limits, limits_of, shown
from plainodds.drawings.effects_rows import Panel, figures_of, panels_of
from plainodds.drawings.lettering import letter, line_height, text_width
from plainodds.drawings.odds_rows import GAP, Figures, Layout, laid_out
from plainodds.drawings.theme import Theme
from plainodds.drawings.ticks import round_ticks
from plainodds.phrases.numbers import quantity

__all__ = [
    "AxisArtists",
    "PanelArtists",
    "PlacedPanel",
    "height_of",
    "placed_panels",
    "point_ticks",
]

_MOST_TICKS = 9


@dataclass(frozen=True)
class PlacedPanel:
    """A panel set into the picture; heights in points, downwards from the top of the plot."""

    panel: Panel
    figures: Figures
    layout: Layout
    limits: Limits
    top: float

    @property
    def bottom(self) -> float:
        """Where its rows end and its tick labels begin."""
        return self.top + self.layout.height

    @property
    def heights(self) -> list[float]:
        """Heights of its rows, in the order in which they are drawn."""
        return [self.top + y for slot in self.layout.rows for y in slot]


class AxisArtists:
    """Grid, line of no effect, tick labels and dots of rows that have an axis of their own.

    Parameters
    ----------
    axes : Axes
        Their horizontal axis is one of several, all of which have 0 in one place.
    theme : Theme
    series : int
        How many series of dots there are.
    """

    def __init__(self, axes: Axes, theme: Theme, series: int) -> None:
        self._theme = theme
        self._scale = Affine2D()
        transform = self._scale + axes.transData
        self.grid = LineCollection([], colors=theme.grid, linewidths=theme.hairline, zorder=1)
        self.zero = LineCollection([], colors=theme.rule, linewidths=1.6 * theme.hairline, zorder=2)
        for lines in (self.grid, self.zero):
            lines.set_transform(transform)
            axes.add_collection(lines, autolim=False)
            lines.set_clip_on(False)
        across = blended_transform_factory(axes.transAxes, axes.transData)
        self.ticks = [
            letter(axes, theme, across, size=theme.small, colour=theme.faint, across="center",
                   down="top")
            for _ in range(_MOST_TICKS)
        ]  # fmt: skip
        self.dots = [Dots(axes, theme, place, transform) for place in range(series)]
        self.limits = Limits(-1.0, 1.0, False)

    def set_axis(
        self,
        limits: Limits,
        first_span: float,
        spans: Sequence[tuple[float, float]],
        ticks: Sequence[tuple[float, str]],
        bottom: float,
    ) -> None:
        """Set the axis and what belongs to it.

        Parameters
        ----------
        limits : Limits
        first_span : float
            Length of the axis that the axes themselves have.
        spans : sequence of (float, float)
            Heights between which grid lines run.
        ticks : sequence of (float, str)
            Places, within the limits, and labels.
        bottom : float
            Height beneath which the tick labels stand.
        """
        self.limits = limits
        self._scale.clear().scale(first_span / limits.span, 1.0)
        self.grid.set_segments([[(x, a), (x, b)] for a, b in spans for x, _ in ticks])
        self.zero.set_segments([[(0.0, a), (0.0, b)] for a, b in spans])
        for text in self.ticks[len(ticks) :]:
            text.set_text("")
        for text, (x, words) in zip(self.ticks, ticks, strict=False):
            text.set_text(words)
            text.set_position(
                ((x - limits.lower) / limits.span, bottom + 0.15 * self._theme.font_size)
            )


class PanelArtists(AxisArtists):
    """The artists of one panel."""

    def update(
        self, placed: PlacedPanel, series: Sequence[object], first_span: float, plot_width: float
    ) -> None:
        """Show a panel on its own axis, which may be another than the picture's first."""
        limits = placed.limits
        spans = [(placed.top + a, placed.top + b) for a, b in placed.layout.spans]
        ticks = point_ticks(limits, plot_width, placed.layout.left, self._theme)
        self.set_axis(limits, first_span, spans, ticks, placed.bottom)
        heights = dict(zip(map(id, placed.panel.rows), placed.heights, strict=True))
        for name, dots in zip(series, self.dots, strict=True):
            own = [row for row in placed.panel.rows if row.by == name]
            dots.update(
                [shown(row) for row in own], [heights[id(row)] for row in own], limits.lower,
                limits.upper,
            )  # fmt: skip


def placed_panels(answer: EffectsAnswer, theme: Theme, width: float) -> list[PlacedPanel]:
    """Set the panels of an answer under each other, in a slot of a width in points."""
    panels = panels_of(answer)
    columns = figures_of(answer, panels, theme, width)
    limits = limits_of([panel.rows for panel in panels])
    placed, top = [], 0.0
    for panel, figures, own in zip(panels, columns, limits, strict=True):
        layout = laid_out(panel.groups, figures, theme, width)
        placed.append(PlacedPanel(panel, figures, layout, own, top))
        top += layout.height + _ticks_height(theme) + 0.7 * theme.font_size
    left = max(each.layout.left for each in placed)
    return [replace(each, layout=replace(each.layout, left=left)) for each in placed]


def _ticks_height(theme: Theme) -> float:
    return 0.15 * theme.font_size + line_height(theme.small)


def height_of(placed: Sequence[PlacedPanel], theme: Theme) -> float:
    """Height in points of all panels with their tick labels."""
    return placed[-1].bottom + _ticks_height(theme)


def point_ticks(
    limits: Limits, plot_width: float, left: float, theme: Theme
) -> list[tuple[float, str]]:
    """Round numbers of percentage points, as differences of chances, with their labels."""
    most = max(2, min(_MOST_TICKS - 2, int(plot_width / (4.2 * theme.small))))
    ticks = []
    for points in round_ticks(100.0 * limits.lower, 100.0 * limits.upper, most):
        words = f"+{quantity(points)}" if points > 0 else quantity(points)
        middle = plot_width * (points / 100.0 - limits.lower) / limits.span
        half = text_width(words, theme, theme.small) / 2
        # no label leaves the picture, or meets the figures
        if -left <= middle - half and middle + half <= plot_width + 0.9 * GAP * theme.font_size:
            ticks.append((points / 100.0, words))
    return ticks
