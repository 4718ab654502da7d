"""The parts of the ruler that stand on its scales: lanes, pointers, the move between them."""

from __future__ import annotations

import math
from collections.abc import Sequence
from typing import Any

from matplotlib.axes import Axes
from matplotlib.collections import LineCollection
from matplotlib.lines import Line2D
from matplotlib.text import Text
from matplotlib.transforms import Transform, blended_transform_factory

from plainodds.answers.estimate import Estimate
from plainodds.answers.profile import ProfilePoint
from plainodds.drawings.furniture import marker_line
from plainodds.drawings.geometry import corner
from plainodds.drawings.lettering import letter, text_width
from plainodds.drawings.ruler_scales import ScaleTicks
from plainodds.drawings.theme import Theme
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import ratio

__all__ = ["Lane", "Move", "Pointer", "inside", "lane_names"]


def lane_names() -> tuple[str, str, str]:
    """The scales from top to bottom: what everybody understands comes first."""
    return message("Chance"), message("Odds"), message("Log odds η")


def inside(number: float, lower: float, upper: float) -> float:
    """A number, or the end of the range beyond which it lies."""
    return min(max(number, lower), upper) if not math.isnan(number) else lower


class Lane:
    """One scale: its name, its ticks and their names."""

    def __init__(self, axes: Axes, theme: Theme, place: int) -> None:
        self._theme, self._top = theme, 3.0 - place
        self._axes = axes
        first = place == 0
        self.size = theme.font_size if first else theme.small
        self.colour = theme.ink if first else theme.faint
        self.name = letter(
            axes, theme, blended_transform_factory(corner(axes, 0, 0), axes.transData),
            size=self.size, weight="bold" if first else "normal",
        )  # fmt: skip
        self.name.set_text(lane_names()[place])
        style: dict[str, Any] = {"linewidths": 1.2 * theme.hairline, "zorder": 2}
        self.ticks = LineCollection([], colors=theme.rule, **style)
        self.edge = LineCollection([], colors=theme.rule, **style)
        for lines in (self.ticks, self.edge):
            axes.add_collection(lines, autolim=False)
        self.labels: list[Text] = []
        # a name that a pointer crosses is set on a plate, so that both can be read
        self._plate: dict[str, Any] = {
            "boxstyle": "square,pad=0.08", "facecolor": theme.paper, "edgecolor": "none",
        }  # fmt: skip

    def update(
        self,
        ticks: ScaleTicks,
        left: float,
        height: float,
        covered: Sequence[float],
        per_unit: float,
    ) -> None:
        """Set ticks and names for a lane of a height in points; names stay clear of pointers."""
        top, size = self._top, self.size
        long, short = 0.6 * size / height, 0.32 * size / height
        self.ticks.set_segments(
            [[(x, top), (x, top - long)] for x in ticks.named]
            + [[(x, top), (x, top - short)] for x in ticks.unnamed]
        )
        lower, upper = self._axes.get_xlim()
        self.edge.set_segments([[(lower, top), (upper, top)]])
        self.name.set_position((left, top - 0.5))
        while len(self.labels) < len(ticks.named):
            self.labels.append(
                letter(self._axes, self._theme, self._axes.transData, size=size,
                       colour=self.colour, across="center")
            )  # fmt: skip
        middle = top - (long + 1.0) / 2
        for place, label in enumerate(self.labels):
            if place >= len(ticks.named):
                label.set_visible(False)
                continue
            at, name = ticks.named[place], ticks.names[place]
            half = text_width(name, self._theme, size) / 2 + 0.2 * size
            crossed = any(abs(at - each) * per_unit < half for each in covered)
            label.set_visible(True)
            label.set_bbox(self._plate if crossed else None)
            label.set_text(name)
            label.set_position((at, middle))


class Pointer:
    """A profile's pointer, its band, its mark and its name."""

    def __init__(self, axes: Axes, theme: Theme, place: int, above: Transform) -> None:
        series = theme.series(place)
        self._theme, self._series = theme, series
        self.band = axes.axvspan(
            0.0, 1.0, facecolor=series.colour, alpha=1.3 * theme.band_opacity, linewidth=0, zorder=1
        )
        self.line = Line2D(
            [], [], color=series.colour, linewidth=1.15 * theme.line_width, zorder=3 - 0.1 * place,
            dash_capstyle="butt",
        )  # fmt: skip
        axes.add_line(self.line)
        self.mark = marker_line(theme, series, transform=above)
        self.mark.set_markersize(1.2 * self.mark.get_markersize())
        self.arrows = [
            Line2D([], [], linestyle="none", marker=marker, markersize=0.9 * theme.marker_size,
                   markerfacecolor=series.colour, markeredgewidth=0, zorder=4)
            for marker in ("<", ">")
        ]  # fmt: skip
        axes.add_artist(self.mark)
        for line in self.arrows:
            axes.add_line(line)
        for line in (self.mark, *self.arrows):
            line.set_clip_on(False)
        self.name = letter(
            axes, theme, above, size=theme.small, across="center",
            colour=theme.ink if place == 0 else theme.faint,
        )  # fmt: skip

    def update(self, point: ProfilePoint, lower: float, upper: float) -> None:
        """Move to a profile; a profile that the data hardly know is broken and hollow."""
        held, theme = point.linear_predictor, self._theme
        at = inside(held.estimate, lower, upper)
        self.line.set_data([at, at], [0.0, 3.0])
        self.mark.set_data([at], [0.45 * theme.font_size])
        known = point.familiarity.verdict == "familiar"
        self.line.set_linestyle("-" if known else (0, (3.0, 1.4)))
        self.mark.set_markerfacecolor(self._series.colour if known else theme.paper)
        self.mark.set_markeredgecolor(theme.paper if known else self._series.colour)
        low, high = held.lower, held.upper
        self.band.set_visible(low is not None)
        ends = (held.estimate, held.estimate) if low is None or high is None else (low, high)
        first, last = (inside(each, lower, upper) for each in ends)
        self.band.set_x(first)
        self.band.set_width(last - first)
        leaving = (min(ends) < lower, max(ends) > upper)
        for line, edge, leaves in zip(self.arrows, (lower, upper), leaving, strict=True):
            line.set_data([edge] * 3 if leaves else [], [0.5, 1.5, 2.5] if leaves else [])


class Move:
    """The arrow from the profile compared with to this one, and the odds ratio that it is."""

    def __init__(self, axes: Axes, theme: Theme, above: Transform) -> None:
        self._theme = theme
        style: dict[str, Any] = {"color": theme.faint, "transform": above, "zorder": 3}
        self.line = Line2D([], [], linewidth=0.8 * theme.line_width, linestyle="-", **style)
        self.head = Line2D([], [], linestyle="none", markersize=0.75 * theme.marker_size, **style)
        self.words = letter(axes, theme, above, size=theme.small, across="center")
        for line in (self.line, self.head):
            axes.add_artist(line)
            line.set_clip_on(False)

    def update(self, start: float, end: float, odds_ratio: Estimate, per_unit: float) -> None:
        """Draw from one value of the linear predictor to another."""
        em = self._theme.font_size
        distance = (end - start) * per_unit
        y = 2.75 * em
        far = abs(distance) > 1.2 * em
        tip = end - math.copysign(0.3 * em / per_unit, distance)
        self.line.set_data([start, tip] if far else [], [y, y] if far else [])
        self.head.set_data([tip] if far else [], [y] if far else [])
        self.head.set_marker(">" if distance > 0 else "<")
        self.words.set_text(message("odds × {}", ratio(odds_ratio.estimate)))
        self.words.set_position(((start + end) / 2, y + 0.85 * em))
