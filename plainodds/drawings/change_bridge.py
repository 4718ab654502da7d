"""Two chances on one axis, and the bridge from the first to the second."""

from __future__ import annotations

from itertools import pairwise
from typing import Any

from matplotlib.axes import Axes
from matplotlib.collections import LineCollection, PolyCollection
from matplotlib.lines import Line2D
from matplotlib.transforms import blended_transform_factory

from plainodds.answers.change import ChangeAnswer
from plainodds.drawings.change_layout import (
    GAP,
    BridgeLayout,
    BridgeRow,
    axis_limits,
    beyond,
    reached,
)
from plainodds.drawings.furniture import marker_line
from plainodds.drawings.geometry import corner
from plainodds.drawings.lettering import letter, line_height, text_width, tick_style
from plainodds.drawings.theme import Theme
from plainodds.drawings.ticks import label_ticks, round_ticks
from plainodds.phrases.numbers import quantity

__all__ = ["Bridge"]


class Bridge:
    """The artists of the two chances and of what lies between them.

    The axes' x axis is the chance, their y axis is in points, downwards.
    """

    def __init__(self, axes: Axes, theme: Theme) -> None:
        self.axes, self._theme = axes, theme
        stays, changes = theme.series(0), theme.series(1)
        axes.tick_params(axis="x", labelbottom=True, pad=0.3 * theme.font_size)
        self._floor = axes.spines["bottom"]
        self._floor.set(visible=True, linewidth=1.4 * theme.hairline, color=theme.rule)
        style: dict[str, Any] = {
            "colors": stays.colour,
            "linewidths": theme.line_width,
            "zorder": 3,
        }
        self.intervals = LineCollection([], linestyles="-", **style)
        self.loose_intervals = LineCollection([], linestyles=[(0, (3.2, 1.6))], **style)
        # in pieces where texts stand between the marks
        self.grid = LineCollection([], colors=theme.grid, linewidths=theme.hairline, zorder=1)
        self.posts = LineCollection(
            [], colors=theme.rule, linewidths=1.2 * theme.hairline, linestyles=[(0, (2.0, 2.0))],
            zorder=2,
        )  # fmt: skip
        self.band = PolyCollection(
            [], facecolor=changes.colour, alpha=1.6 * theme.band_opacity, linewidth=0, zorder=1.5
        )
        self.head = PolyCollection([], facecolor=changes.colour, linewidth=0, zorder=4)
        for collection in (
            self.grid, self.intervals, self.loose_intervals, self.posts, self.band, self.head
        ):  # fmt: skip
            axes.add_collection(collection, autolim=False)
            collection.set_clip_on(False)
        self.shaft = Line2D(
            [], [], color=changes.colour, linewidth=1.5 * theme.line_width, linestyle="-",
            solid_capstyle="butt", zorder=3.5,
        )  # fmt: skip
        axes.add_line(self.shaft)
        self.points = marker_line(theme, stays)
        self.loose_points = marker_line(theme, stays)
        self.loose_points.set(
            markerfacecolor=theme.paper, markeredgecolor=stays.colour,
            markeredgewidth=0.75 * theme.line_width,
        )  # fmt: skip
        # without an edge, so that short intervals still show on either side
        self.points.set(markeredgewidth=0)
        for line in (self.points, self.loose_points):
            axes.add_line(line)
            line.set(clip_on=False, markersize=0.85 * line.get_markersize())
        beside = blended_transform_factory(corner(axes, 0, 0), axes.transData)
        figures = blended_transform_factory(corner(axes, 1, 0), axes.transData)
        self._transforms = (beside, figures)
        self.labels = [letter(axes, theme, beside) for _ in range(3)]
        self.figures = [letter(axes, theme, figures, weight="bold") for _ in range(3)]
        self.spans = [
            letter(axes, theme, figures, size=theme.small, colour=theme.faint) for _ in range(3)
        ]

    def update(
        self, answer: ChangeAnswer, layout: BridgeLayout, plot_width: float, plot_height: float
    ) -> None:
        """Show an answer; the margins of the axes are those of the layout already."""
        theme = self._theme
        lower, upper = axis_limits(answer)
        self.axes.set_xlim(lower, upper)
        self.axes.set_ylim(layout.height, 0.0)
        ticks, names = _ticks(lower, upper, plot_width, theme)
        label_ticks(self.axes, "x", ticks, names, tick_style(theme))
        self.grid.set_segments([[(x, a), (x, b)] for a, b in layout.spans for x in ticks])
        self._place_marks(answer, layout, (upper - lower) / max(plot_width, 1.0))
        stretch = layout.height / plot_height if plot_height > 0 else 1.0
        for place, (row, y) in enumerate(zip(layout.rows, layout.texts, strict=True)):
            self._write(place, row, y, layout, stretch)

    def _place_marks(self, answer: ChangeAnswer, layout: BridgeLayout, point: float) -> None:
        """Set the marks; `point` is the width of a point in chances."""
        em = self._theme.font_size
        start, end = answer.start.estimate, answer.end.estimate
        first, middle, last = layout.marks
        held = [not each for each in beyond(answer)]
        dots = list(zip((start, end), (first, last), (answer.start, answer.end), held, strict=True))
        for line, segments, wanted in (
            (self.points, self.intervals, True),
            (self.loose_points, self.loose_intervals, False),
        ):
            own = [each for each in dots if each[3] is wanted]
            line.set_data([x for x, _, _, _ in own], [y for _, y, _, _ in own])
            segments.set_segments(
                [[(e.lower, y), (e.upper, y)] for _, y, e, _ in own
                 if e.lower is not None and e.upper is not None]
            )  # fmt: skip
        # the start's post goes on past the arrow: there is no difference on it
        wanted_posts = ((start, first, middle + 0.75 * em), (end, middle, last))
        self.posts.set_segments(
            [[(x, max(a, low)), (x, min(b, high))] for x, a, b in wanted_posts
             for low, high in layout.spans if max(a, low) < min(b, high)]
        )  # fmt: skip
        self.band.set_verts(_band(answer, middle, 0.55 * em, 0.5 * em * point))
        length = min(0.85 * em * point, abs(end - start))
        back = end - length if end > start else end + length
        self.shaft.set_data([start, back], [middle, middle])
        self.head.set_verts(
            [[(end, middle), (back, middle - 0.4 * em), (back, middle + 0.4 * em)]]
            if end != start else []
        )  # fmt: skip

    def _write(
        self, place: int, row: BridgeRow, y: float, layout: BridgeLayout, stretch: float
    ) -> None:
        theme, em, small = self._theme, self._theme.font_size, self._theme.small
        label, figure, between = self.labels[place], self.figures[place], self.spans[place]
        label.set_text(row.label)
        figure.set_text(row.figure)
        between.set_text(row.interval)
        if layout.stacked:
            lines = row.label.count("\n") + 1
            middle = y - line_height(em) / 2 * stretch
            label.set_position((-layout.left, middle))
            under = y + line_height(em, lines) / 2 * stretch
            for text in (figure, between):
                text.set_transform(self._transforms[0])
            along = text_width(row.figure, theme, em, "bold") + 0.6 * em - layout.left
            figure.set_position((-layout.left, under))
            between.set_position((along, under))
            return
        label.set_position((-layout.left, y))
        gap = GAP * em
        apart = (line_height(small) / 2 if row.interval else 0.0) * stretch
        figure.set_position((gap, y - apart))
        between.set_position((gap, y + line_height(em) / 2 * stretch))


def _ticks(
    lower: float, upper: float, plot_width: float, theme: Theme
) -> tuple[tuple[float, ...], list[str]]:
    """As many round chances as there is room for, with their labels."""
    ticks: tuple[float, ...] = ()
    names: list[str] = []
    for most in range(8, 0, -1):
        ticks = round_ticks(max(lower, 0.0), min(upper, 1.0), most)
        names = [quantity(round(100 * tick, 9), "%") for tick in ticks]
        widest = max((text_width(name, theme, theme.small) for name in names), default=0.0)
        steps = [after - before for before, after in pairwise(ticks)]
        room = min(steps, default=upper - lower) / (upper - lower) * plot_width
        if room >= widest + 0.8 * theme.small:
            break
    return ticks, names


def _band(
    answer: ChangeAnswer, middle: float, half: float, tip: float
) -> list[list[tuple[float, float]]]:
    """The difference's interval as a bar, pointed where it would go on to what is no chance."""
    reach = reached(answer)
    if not reach:
        return []
    low, high = (min(max(each, 0.0), 1.0) for each in reach)
    left = [(low, middle + half), (low, middle - half)]
    right = [(high, middle - half), (high, middle + half)]
    if reach[0] < 0.0:
        left = [(low + tip, middle + half), (low, middle), (low + tip, middle - half)]
    if reach[1] > 1.0:
        right = [(high - tip, middle - half), (high, middle), (high - tip, middle + half)]
    return [[*left, *right]]
