"""How pictures look: inks, series, letters and lines, as one frozen value.

The series colours were searched for, not picked: of six colours they are those whose
smallest CIEDE2000 difference is largest under normal sight, protanopia, deuteranopia,
tritanopia (Machado, Oliveira & Fernandes 2009, severity 1.0) and in grey, both as they
stand on white and as they come out on a dark notebook, where the widgets show the
"screen" picture through the filter ``invert(1) hue-rotate(180deg)``. The tests measure it.
"""

from __future__ import annotations

from dataclasses import replace
from typing import TypeAlias

from plainodds.values import value

__all__ = ["THEMES", "Dash", "Series", "Theme", "theme_of"]

Dash: TypeAlias = tuple[float, ...]
"""On and off lengths in line widths; empty for a solid line."""


@value
class Series:
    """What tells one series from another: colour, marker and dash, all three."""

    colour: str
    marker: str
    dash: Dash


@value
class Theme:
    """How a picture looks.

    Attributes
    ----------
    name : str
    ink, faint : str
        Colour of what is read first, and of what is read second; both are text colours.
    rule, grid : str
        Colour of axes and reference lines, and of the lines behind the data.
    paper : str
        The colour that the picture stands on, or is expected to stand on.
    transparent : bool
        Whether the paper is left unpainted.
    colours : tuple of str
        Series colours.
    markers : tuple of str
        Series markers, in matplotlib's codes.
    dashes : tuple of tuples of float
        Series dashes: on and off lengths in line widths.
    font : str
    font_size : float
        Of the body text, in points; everything else is measured by it.
    line_width, hairline : float
        Of the data's lines, and of axes and grid, in points.
    band_opacity : float

    Examples
    --------
    >>> theme_of("page").paper
    '#ffffff'
    >>> larger = theme_of("page").scaled(2.0)
    >>> larger.font_size / theme_of("page").font_size
    2.0
    """

    name: str
    ink: str
    faint: str
    rule: str
    grid: str
    paper: str
    transparent: bool
    colours: tuple[str, ...]
    markers: tuple[str, ...]
    dashes: tuple[Dash, ...]
    font: str = "DejaVu Sans"
    font_size: float = 9.0
    line_width: float = 1.7
    hairline: float = 0.6
    band_opacity: float = 0.17

    @property
    def background(self) -> str:
        """The face colour of the figure: the paper, or none."""
        return "none" if self.transparent else self.paper

    @property
    def small(self) -> float:
        """Size in points of what is read second."""
        return 0.88 * self.font_size

    @property
    def marker_size(self) -> float:
        """Diameter of a marker in points."""
        return 0.68 * self.font_size

    def series(self, place: int) -> Series:
        """Colour, marker and dash of a series; no two of the first 42 share all three.

        Parameters
        ----------
        place : int
            From 0.
        """
        return Series(
            self.colours[place % len(self.colours)],
            self.markers[place % len(self.markers)],
            self.dashes[place % len(self.dashes)],
        )

    def scaled(self, factor: float) -> Theme:
        """The same theme with letters and lines larger or smaller."""
        return replace(
            self,
            font_size=self.font_size * factor,
            line_width=self.line_width * factor,
            hairline=self.hairline * factor,
        )


_COLOURS = ("#013857", "#b08256", "#4550c8", "#4d8778", "#84343e", "#787100")
# what the filter makes of them, for pictures that stand on dark paper without it
_COLOURS_ON_DARK = ("#a2daf9", "#9d7044", "#98a2ff", "#589383", "#f7a8b1", "#a39b2a")
# seven markers against six colours: a series beyond the sixth is a pair of its own
_MARKERS = ("o", "D", "s", "^", "v", "P", "X")
_DASHES: tuple[Dash, ...] = (
    (3.2, 1.6),
    (1.1, 1.3),
    (5.5, 1.6, 1.1, 1.6),
    (1.9, 2.4),
    (6.5, 2.2),
    (3.2, 1.4, 1.1, 1.4, 1.1, 1.4),
)

_page = Theme(
    name="page",
    ink="#14232e",
    faint="#4d5b66",
    rule="#5c6a75",
    grid="#d5dce0",
    paper="#ffffff",
    transparent=False,
    colours=_COLOURS,
    markers=_MARKERS,
    dashes=_DASHES,
)
# a CSS pixel is 0.75 pt: 10.2 pt is a letter of 13.6 px
_screen = replace(_page, name="screen", transparent=True).scaled(10.2 / 9.0)
_screen_dark = replace(
    _screen,
    name="screen dark",
    ink="#e3edf4",
    faint="#a9b6c0",
    rule="#8d9aa5",
    grid="#2c353b",
    paper="#111111",
    colours=_COLOURS_ON_DARK,
)

# seen from the back of a room: everything larger, lines still heavier, rules darker
_slide = replace(_page, name="slide", line_width=2.0, hairline=0.8, grid="#c9d2d8").scaled(2.0)

THEMES = {theme.name: theme for theme in (_page, _screen, _screen_dark, _slide)}
"""The named themes: "page" for print, "screen" for widgets, "screen dark" for dark pages,
"slide" for a slide. A theme of one's own is one of them with something replaced."""


def theme_of(theme: str | Theme) -> Theme:
    """Give the theme that a name stands for, or the theme itself.

    Raises
    ------
    ValueError
        If no theme has that name.

    Examples
    --------
    >>> theme_of("screen").transparent
    True
    """
    if isinstance(theme, Theme):
        return theme
    if theme not in THEMES:
        known = ", ".join(f'"{name}"' for name in THEMES)
        raise ValueError(f"No theme is named {theme!r}. There are {known}; or pass a Theme.")
    return THEMES[theme]
