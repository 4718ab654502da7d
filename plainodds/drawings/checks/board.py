"""What the pictures of checks are drawn on: artists that are kept by name and moved.

A picture names each of its artists and draws all of it anew for every answer; an artist of a
name that is there already is moved, and one that a new answer has no use for goes out of sight.
"""

from __future__ import annotations

from collections.abc import Sequence
from typing import Any, Literal

import numpy as np
from matplotlib.axes import Axes
from matplotlib.collections import LineCollection, PathCollection, PolyCollection
from matplotlib.lines import Line2D
from matplotlib.text import Text
from matplotlib.transforms import Transform, blended_transform_factory

from plainodds.drawings.furniture import Key, marker_line
from plainodds.drawings.geometry import corner
from plainodds.drawings.lettering import Weight, letter
from plainodds.drawings.theme import Theme

__all__ = ["Board"]

Point = tuple[float, float]
Across = Literal["left", "center", "right"]
Down = Literal["top", "center", "baseline", "bottom"]


class Board:
    """Axes with artists kept by name.

    Attributes
    ----------
    lines : dict of str to Line2D
        Lines and markers.
    segments : dict of str to LineCollection
    areas : dict of str to PolyCollection
    discs : dict of str to PathCollection
        Markers of different sizes.
    texts : list of Text
    """

    def __init__(self, axes: Axes, theme: Theme) -> None:
        self.axes, self.theme = axes, theme
        self.lines: dict[str, Line2D] = {}
        self.segments: dict[str, LineCollection] = {}
        self.areas: dict[str, PolyCollection] = {}
        self.discs: dict[str, PathCollection] = {}
        self.texts: list[Text] = []
        self._keys: dict[tuple[str, ...], Key] = {}
        self._written = 0
        self._idle: set[Any] = set()

    def begin(self) -> None:
        """Take all artists for idle until they are drawn again."""
        self._written = 0
        kept: tuple[dict[str, Any], ...] = (self.lines, self.segments, self.areas, self.discs)
        self._idle = {artist for held in kept for artist in held.values()}

    def end(self) -> None:
        """Put out of sight what was not drawn."""
        for artist in self._idle:
            artist.set_visible(False)
        for text in self.texts[self._written :]:
            text.set_text("")

    def at(self, across: float, up: float) -> Transform:
        """Points from a corner of the plot, as in ``at(0, 1)`` for the upper left one."""
        return corner(self.axes, across, up)

    def rows(self) -> Transform:
        """Data coordinates across; up in points from the top of the plot."""
        return blended_transform_factory(self.axes.transData, self.at(0, 1))

    def key(self, names: tuple[str, ...], x: float, y: float, width: float) -> float:
        """Set the key to the series at points from the upper left corner; give its height."""
        if names not in self._keys:
            self._keys[names] = Key(self.axes, self.theme, names)
        return self._keys[names].place(x, y, width)

    def _shown(self, artist: Any, transform: Transform | None, clip: bool) -> Any:
        self._idle.discard(artist)
        artist.set_visible(True)
        artist.set_transform(self.axes.transData if transform is None else transform)
        artist.set_clip_on(clip)
        if clip:
            artist.set_clip_path(self.axes.patch)
        return artist

    def line(
        self, name: str, x: Sequence[float], y: Sequence[float], *,
        transform: Transform | None = None, clip: bool = True, **style: Any,
    ) -> Line2D:  # fmt: skip
        """Draw a line, in data coordinates if nothing else is said."""
        if name not in self.lines:
            self.lines[name] = Line2D([], [], **{"linestyle": "-", **style})
            self.axes.add_artist(self.lines[name])
        line: Line2D = self._shown(self.lines[name], transform, clip)
        line.set_data(list(x), list(y))
        return line

    def marks(
        self, name: str, points: Sequence[Point], place: int, *,
        transform: Transform | None = None, hollow: bool = False, marker: str = "",
        scale: float = 1.0, clip: bool = False,
    ) -> Line2D:  # fmt: skip
        """Draw markers of a series, or of its colour in a shape of their own."""
        theme = self.theme
        if name not in self.lines:
            series = theme.series(place)
            line = marker_line(theme, series)
            if marker:
                line.set_marker(marker)
            if hollow:
                line.set(markerfacecolor=theme.paper, markeredgecolor=series.colour,
                         markeredgewidth=0.75 * theme.line_width)  # fmt: skip
            line.set_markersize(scale * line.get_markersize())
            self.lines[name] = line
            self.axes.add_artist(line)
        held: Line2D = self._shown(self.lines[name], transform, clip)
        held.set_data([x for x, _ in points], [y for _, y in points])
        return held

    def strokes(
        self, name: str, segments: Sequence[Sequence[Point]], *,
        transform: Transform | None = None, clip: bool = False, **style: Any,
    ) -> LineCollection:  # fmt: skip
        """Draw separate lines of one look."""
        if name not in self.segments:
            self.segments[name] = LineCollection([], **{"capstyle": "butt", **style})
            self.axes.add_collection(self.segments[name], autolim=False)
        held: LineCollection = self._shown(self.segments[name], transform, clip)
        held.set_segments(list(segments))
        return held

    def area(
        self, name: str, polygons: Sequence[Any], *,
        transform: Transform | None = None, clip: bool = False, **style: Any,
    ) -> PolyCollection:  # fmt: skip
        """Draw filled outlines of one look."""
        if name not in self.areas:
            self.areas[name] = PolyCollection([], **{"linewidth": 0, **style})
            self.axes.add_collection(self.areas[name], autolim=False)
        held: PolyCollection = self._shown(self.areas[name], transform, clip)
        held.set_verts(list(polygons))
        return held

    def circles(
        self, name: str, points: Sequence[Point], sizes: Sequence[float], **style: Any
    ) -> PathCollection:
        """Draw markers whose areas, in square points, are given one by one."""
        if name not in self.discs:
            self.discs[name] = self.axes.scatter([], [], **style)
        held = self.discs[name]
        self._idle.discard(held)
        held.set_visible(True)
        held.set_offsets(np.asarray(points, dtype=float).reshape(-1, 2))
        held.set_sizes(np.asarray(sizes, dtype=float))
        return held

    def write(
        self, words: str, x: float, y: float, transform: Transform, *, size: float | None = None,
        colour: str | None = None, weight: Weight = "normal", across: Across = "left",
        down: Down = "center",
    ) -> Text:  # fmt: skip
        """Write a text; its size is the theme's small one if nothing else is said."""
        if self._written == len(self.texts):
            self.texts.append(letter(self.axes, self.theme, transform))
        text = self.texts[self._written]
        self._written += 1
        text.set(
            text=words, position=(x, y), fontsize=self.theme.small if size is None else size,
            color=self.theme.ink if colour is None else colour, fontweight=weight,
            horizontalalignment=across, verticalalignment=down, transform=transform,
        )  # fmt: skip
        return text
