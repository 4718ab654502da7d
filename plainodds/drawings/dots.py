"""Dots with intervals along rows: one series, with arrows where it leaves the axis."""

from __future__ import annotations

from collections.abc import Sequence

from matplotlib.axes import Axes
from matplotlib.collections import LineCollection
from matplotlib.lines import Line2D
from matplotlib.transforms import Transform

from plainodds.drawings.furniture import marker_line
from plainodds.drawings.theme import Theme

__all__ = ["Dots"]


class Dots:
    """The dots, intervals and arrows of one series.

    Parameters
    ----------
    axes : Axes
    theme : Theme
    place : int
        The series, from 0.
    transform : Transform
        From (estimate, height of the row) to the screen.
    """

    def __init__(self, axes: Axes, theme: Theme, place: int, transform: Transform) -> None:
        series = theme.series(place)
        self.intervals = LineCollection(
            [], colors=series.colour, linewidths=theme.line_width, capstyle="butt",
            transform=transform, zorder=3,
        )  # fmt: skip
        axes.add_collection(self.intervals, autolim=False)
        self.points = marker_line(theme, series, transform=transform)
        # small and without an edge, so that short intervals still show on either side
        self.points.set(markersize=0.72 * self.points.get_markersize(), markeredgewidth=0)
        self.arrows = [
            Line2D([], [], linestyle="none", marker=marker, markersize=0.8 * theme.marker_size,
                   markerfacecolor=series.colour, markeredgewidth=0, transform=transform, zorder=4)
            for marker in ("<", ">")
        ]  # fmt: skip
        self.intervals.set_clip_on(False)
        for line in (self.points, *self.arrows):
            axes.add_artist(line)
            line.set_clip_on(False)

    def update(
        self,
        triples: Sequence[tuple[float, float, float]],
        heights: Sequence[float],
        lower: float,
        upper: float,
    ) -> None:
        """Set dots and intervals; what lies beyond the axis becomes an arrow.

        Parameters
        ----------
        triples : sequence of (estimate, lower, upper)
            Thrice the same where there is no interval.
        heights : sequence of float
        lower, upper : float
            Ends of the axis.
        """
        segments, inside = [], []
        leaving: tuple[list[tuple[float, float]], list[tuple[float, float]]] = ([], [])
        for (middle, low, high), y in zip(triples, heights, strict=True):
            if lower <= middle <= upper:
                inside.append((middle, y))
            if min(low, middle) < lower:
                leaving[0].append((lower, y))
            if max(high, middle) > upper:
                leaving[1].append((upper, y))
            segments.append([(min(max(each, lower), upper), y) for each in (low, high)])
        self.intervals.set_segments(segments)
        for line, pairs in zip((self.points, *self.arrows), (inside, *leaving), strict=True):
            line.set_data([x for x, _ in pairs], [y for _, y in pairs])
