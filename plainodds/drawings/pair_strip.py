"""A strip along a predictor: where another one's effect lies on which side of none.

A block that stands on the line is an interval wholly above no effect, one that hangs from
it an interval wholly below; an open frame around it holds no effect. Each is named.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np
from matplotlib.axes import Axes
from matplotlib.collections import LineCollection, PolyCollection
from matplotlib.transforms import blended_transform_factory

from plainodds.drawings.geometry import corner
from plainodds.drawings.lettering import letter, line_height, text_width
from plainodds.drawings.theme import Theme

__all__ = ["Strip", "StripPart"]

_MOST_WORDS = 9
_REACH = 0.5  # height of a block over its line, in letters


@dataclass(frozen=True)
class StripPart:
    """A part of the strip: its ends along the axis, on which side it lies, its names.

    `names` are words for it, the longest first; `room` is how much of the axis they may take.
    """

    start: float
    end: float
    sign: str
    names: tuple[str, ...]
    room: float


class Strip:
    """The artists of a strip beneath a plot."""

    def __init__(self, axes: Axes, theme: Theme) -> None:
        self._axes, self._theme = axes, theme
        below = blended_transform_factory(axes.transData, corner(axes, 0, 0))
        self.blocks = PolyCollection(
            [], facecolor=theme.colours[0], linewidth=0, alpha=0.75, zorder=2
        )
        self.frames = PolyCollection(
            [], facecolor="none", edgecolor=theme.rule, linewidth=1.2 * theme.hairline,
            linestyle=[(0, (2.0, 2.0))], zorder=3,
        )  # fmt: skip
        self.line = LineCollection(
            [], colors=theme.ink, linewidths=2.0 * theme.hairline, linestyles="-", zorder=3
        )
        for collection in (self.blocks, self.frames, self.line):
            collection.set_transform(below)
            axes.add_collection(collection, autolim=False)
            collection.set_clip_on(False)
        self.words = [
            letter(axes, theme, below, size=theme.small, across="center")
            for _ in range(_MOST_WORDS)
        ]

    @staticmethod
    def height(theme: Theme) -> float:
        """Height in points that the strip takes with its words."""
        return 2 * _REACH * theme.font_size + 0.9 * theme.font_size + line_height(theme.small)

    def place(self, parts: Sequence[StripPart], top: float, per_unit: float) -> None:
        """Set the strip.

        Parameters
        ----------
        parts : sequence of StripPart
            Along the axis, in order; none leaves the strip empty.
        top : float
            Height in points where it begins, from the foot of the plot; negative.
        per_unit : float
            Points per unit of the axis.
        """
        em = self._theme.font_size
        middle = top - (_REACH + 0.3) * em
        self.blocks.set_verts(
            [_box(each, *_side(each.sign, middle, em)) for each in parts if each.sign != "open"]
        )
        self.frames.set_verts(
            [_box(each, middle - 0.22 * em, middle + 0.22 * em)
             for each in parts if each.sign == "open"]
        )  # fmt: skip
        self.line.set_segments([[(each.start, middle), (each.end, middle)] for each in parts])
        y = middle - (_REACH + 0.2) * em - 0.5 * line_height(self._theme.small)
        # where there are too many to be named, the longest are
        longest = sorted(parts, key=lambda each: each.start - each.end)[:_MOST_WORDS]
        for text in self.words[len(longest) :]:
            text.set_text("")
        for text, each in zip(self.words, longest, strict=False):
            text.set_text(self._name(each, each.room * per_unit))
            text.set_position(((each.start + each.end) / 2, y))

    def _name(self, part: StripPart, room: float) -> str:
        theme = self._theme
        for name in part.names:
            if text_width(name, theme, theme.small) <= room - 0.3 * theme.font_size:
                return name
        return ""


def _side(sign: str, middle: float, em: float) -> tuple[float, float]:
    return (middle, middle + _REACH * em) if sign == "above" else (middle - _REACH * em, middle)


def _box(part: StripPart, lower: float, upper: float) -> np.ndarray:
    left, right = part.start, part.end
    return np.array([(left, lower), (right, lower), (right, upper), (left, upper)])
