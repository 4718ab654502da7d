"""What stands around a plot: its title, its notes, the key to its series."""

from __future__ import annotations

from collections.abc import Sequence

from matplotlib.axes import Axes
from matplotlib.lines import Line2D
from matplotlib.text import Text

from plainodds.drawings.geometry import corner
from plainodds.drawings.lettering import letter, line_height, text_width, wrapped
from plainodds.drawings.theme import Series, Theme
from plainodds.phrases.units import tidy

__all__ = ["Key", "Notes", "Title", "marker_line"]

# so that all markers weigh alike
_SIZES = {"D": 0.86, "s": 0.9, "^": 1.15, "v": 1.15, "P": 1.3, "X": 1.25}


class Title:
    """What the picture is about, at the upper left of the slot."""

    _lines = 3

    def __init__(self, axes: Axes, theme: Theme, size: float = 1.0) -> None:
        self._theme, self._size = theme, size
        self.artist: Text = letter(
            axes, theme, corner(axes, 0, 1), size=size * theme.font_size, weight="bold", down="top"
        )

    @classmethod
    def height(cls, text: str, theme: Theme, width: float, size: float = 1.0) -> float:
        """Height in points that the title takes; `size` is in letters of the theme."""
        broken = cls._broken(text, theme, width, size)
        return line_height(size * theme.font_size, broken.count("\n") + 1) if broken else 0.0

    @classmethod
    def _broken(cls, text: str, theme: Theme, width: float, size: float) -> str:
        return wrapped(text, width, theme, size * theme.font_size, cls._lines, "bold")

    def place(self, text: str, x: float, y: float, width: float) -> float:
        """Write the title at points from the plot's upper left corner; give its height."""
        self.artist.set_text(self._broken(text, self._theme, width, self._size))
        self.artist.set_position((x, y))
        return self.height(text, self._theme, width, self._size)


class Notes:
    """Small print at the lower left of the slot, one note after the other."""

    _lines = 4

    def __init__(self, axes: Axes, theme: Theme) -> None:
        self._theme = theme
        self.artist: Text = letter(
            axes, theme, corner(axes, 0, 0), size=theme.small, colour=theme.faint, down="bottom"
        )

    @classmethod
    def _broken(cls, notes: Sequence[str], theme: Theme, width: float) -> str:
        return wrapped(" ".join(notes), width, theme, theme.small, cls._lines) if notes else ""

    @classmethod
    def height(cls, notes: Sequence[str], theme: Theme, width: float) -> float:
        """Height in points that the notes take, with the gap above them."""
        broken = cls._broken(notes, theme, width)
        if not broken:
            return 0.0
        return line_height(theme.small, broken.count("\n") + 1) + 0.5 * theme.font_size

    def place(self, notes: Sequence[str], x: float, y: float, width: float) -> None:
        """Write the notes at points from the plot's lower left corner."""
        self.artist.set_text(self._broken(notes, self._theme, width))
        self.artist.set_position((x, y))


class Key:
    """Markers with their names, in lines; for series that have no line end to stand at."""

    def __init__(self, axes: Axes, theme: Theme, names: Sequence[str]) -> None:
        self._theme = theme
        self._names = tuple(names)
        points = corner(axes, 0, 1)
        self.markers = [
            marker_line(theme, theme.series(place), transform=points) for place in range(len(names))
        ]
        self.texts = [letter(axes, theme, points, size=theme.small) for _ in names]
        for line in self.markers:
            axes.add_artist(line)
            line.set_clip_on(False)

    @classmethod
    def _places(
        cls, names: Sequence[str], theme: Theme, width: float
    ) -> list[tuple[int, float, str]]:
        em = theme.font_size
        places, line, x = [], 0, 0.0
        for name in names:
            text = wrapped(tidy(name), 0.5 * width, theme, theme.small, 1)
            needed = 1.1 * em + text_width(text, theme, theme.small)
            if x > 0 and x + needed > width:
                line, x = line + 1, 0.0
            places.append((line, x, text))
            x += needed + 1.6 * em
        return places

    @classmethod
    def height(cls, names: Sequence[str], theme: Theme, width: float) -> float:
        """Height in points that the key takes."""
        places = cls._places(names, theme, width)
        return line_height(theme.small * 1.12, places[-1][0] + 1) if places else 0.0

    def place(self, x: float, y: float, width: float) -> float:
        """Set the key at points from the plot's upper left corner; give its height."""
        em, step = self._theme.font_size, line_height(self._theme.small * 1.12)
        places = self._places(self._names, self._theme, width)
        for (line, along, text), marker, name in zip(places, self.markers, self.texts, strict=True):
            middle = y - (line + 0.5) * step
            marker.set_data([x + along + 0.4 * em], [middle])
            name.set_text(text)
            name.set_position((x + along + 1.1 * em, middle))
        return self.height(self._names, self._theme, width)


def marker_line(theme: Theme, series: Series, **properties: object) -> Line2D:
    """An empty line of markers that stand off from whatever they lie on."""
    return Line2D(
        [],
        [],
        linestyle="none",
        marker=series.marker,
        markersize=theme.marker_size * _SIZES.get(series.marker, 1.0),
        markerfacecolor=series.colour,
        markeredgecolor=theme.paper,
        markeredgewidth=0.4 * theme.line_width,
        zorder=4,
        **properties,  # type: ignore[arg-type]
    )
