"""Text in pictures: measured, wrapped, elided, and never read as mathematics.

Labels come from data and may hold anything: "$", "_", a whole sentence. So every text is
created here, with `parse_math` off and with its own font, whatever the user's settings are.
"""

from __future__ import annotations

from collections.abc import Sequence
from functools import lru_cache
from typing import Any, Literal

from matplotlib.axes import Axes
from matplotlib.font_manager import FontProperties
from matplotlib.text import Text
from matplotlib.textpath import text_to_path
from matplotlib.transforms import Transform

from plainodds.drawings.stamps import StampedText
from plainodds.drawings.theme import Theme
from plainodds.phrases.numbers import marks_now

__all__ = [
    "FIGURE_SPACE",
    "LINE_SPACING",
    "Weight",
    "align_decimals",
    "elided",
    "letter",
    "line_height",
    "text_width",
    "tick_style",
    "wrapped",
]

Weight = Literal["normal", "bold"]

LINE_SPACING = 1.25
FIGURE_SPACE = "\u2007"
_POINT_SPACE = "\u2008"
_ELLIPSIS = "…"
# at low resolution letters advance by whole pixels, and a line comes out a little wider
_HINTED = 1.04
# a width that was made from a text's own is to hold that text
_ROUNDING = 1e-6


@lru_cache(maxsize=4096)
def _width(text: str, font: str, size: float, weight: Weight) -> float:
    properties = FontProperties(family=font, size=size, weight=weight)
    return _HINTED * float(text_to_path.get_text_width_height_descent(text, properties, False)[0])


def text_width(text: str, theme: Theme, size: float, weight: Weight = "normal") -> float:
    """Width in points of the longest line of a text."""
    return max((_width(line, theme.font, size, weight) for line in text.split("\n")), default=0.0)


def line_height(size: float, lines: int = 1) -> float:
    """Height in points that so many lines of text need."""
    return size * LINE_SPACING * lines


def elided(text: str, width: float, theme: Theme, size: float, weight: Weight = "normal") -> str:
    """Cut a line so that it fits into a width in points, and mark the cut with "…"."""
    width += _ROUNDING
    if text_width(text, theme, size, weight) <= width:
        return text
    low, high = 0, len(text)
    while low < high:
        middle = (low + high + 1) // 2
        cut = text[:middle].rstrip() + _ELLIPSIS
        if text_width(cut, theme, size, weight) <= width:
            low = middle
        else:
            high = middle - 1
    return text[:low].rstrip() + _ELLIPSIS


def wrapped(
    text: str, width: float, theme: Theme, size: float, lines: int = 2, weight: Weight = "normal"
) -> str:
    """Break a text into at most so many lines of a width in points; the last may be elided.

    Lines are broken at spaces; a single word that is too long is elided where it stands.
    """
    width += _ROUNDING
    done: list[str] = []
    words = text.split(" ")
    while words and len(done) < lines - 1:
        taken = 1
        while (
            taken < len(words)
            and text_width(" ".join(words[: taken + 1]), theme, size, weight) <= width
        ):
            taken += 1
        done.append(elided(" ".join(words[:taken]), width, theme, size, weight))
        words = words[taken:]
    if words:
        done.append(elided(" ".join(words), width, theme, size, weight))
    return "\n".join(done)


def letter(
    axes: Axes,
    theme: Theme,
    transform: Transform,
    *,
    size: float | None = None,
    colour: str | None = None,
    weight: Weight = "normal",
    across: Literal["left", "center", "right"] = "left",
    down: Literal["top", "center", "baseline", "bottom"] = "center",
) -> Text:
    """Create an empty text on the axes; its place and words are set when it is updated."""
    text = StampedText(
        0.0,
        0.0,
        "",
        color=theme.ink if colour is None else colour,
        fontproperties=FontProperties(
            family=theme.font, size=theme.font_size if size is None else size, weight=weight
        ),
        horizontalalignment=across,
        verticalalignment=down,
        linespacing=LINE_SPACING - 0.05,
        parse_math=False,
        usetex=False,
        transform=transform,
        clip_on=False,
    )
    axes.add_artist(text)
    text.set_clip_on(False)
    text.set_zorder(5)
    return text


def tick_style(theme: Theme, size: float | None = None) -> dict[str, Any]:
    """Properties of tick labels, for `set_xticks` and `set_yticks`."""
    return {
        "color": theme.faint,
        "fontfamily": theme.font,
        "fontsize": theme.small if size is None else size,
        "parse_math": False,
        "usetex": False,
    }


def align_decimals(numbers: Sequence[str]) -> list[str]:
    """Pad written numbers so that, set flush right, their decimal points stand in one column.

    Padding is by spaces as wide as a figure and as a point.

    Examples
    --------
    >>> [len(text) for text in align_decimals(["2.02", "12.3", "105"])]
    [4, 5, 6]
    """
    after = [
        len(text.partition(marks_now().decimal)[2]) if _is_number(text) else 0 for text in numbers
    ]
    most = max(after, default=0)
    padded = []
    for text, places in zip(numbers, after, strict=True):
        missing = FIGURE_SPACE * (most - places)
        point = _POINT_SPACE if most and not places else ""
        padded.append(text + point + missing)
    return padded


def _is_number(text: str) -> bool:
    marks, bare = marks_now(), text.lstrip("+−")
    return bare.replace(marks.thousands, "").replace(marks.decimal, "").isdigit()
