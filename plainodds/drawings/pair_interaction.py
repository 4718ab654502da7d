"""The interaction itself, on both scales beside each other: dots, intervals and figures."""

from __future__ import annotations

import math

from matplotlib.axes import Axes
from matplotlib.lines import Line2D
from matplotlib.text import Text
from matplotlib.transforms import blended_transform_factory

from plainodds.answers.pair import PairAnswer
from plainodds.drawings.effects_axis import Limits
from plainodds.drawings.effects_panels import AxisArtists, point_ticks
from plainodds.drawings.furniture import Title
from plainodds.drawings.geometry import Margins, Room, corner, slot_size
from plainodds.drawings.lettering import Weight, letter, line_height, text_width
from plainodds.drawings.odds_rows import GAP, is_narrow
from plainodds.drawings.pair_interaction_rows import ScaleRows, scale_rows, ticks_height
from plainodds.drawings.theme import Theme
from plainodds.drawings.ticks import bare, fraction_ticks
from plainodds.phrases.lexicon import lexicon, message
from plainodds.phrases.numbers import simple_fraction

__all__ = ["InteractionPanel"]

_GUTTER = 1.0  # letters
_MOST_ROWS = 2


class InteractionPanel:
    """Both scales' interactions as rows, no interaction in one place for both.

    The scale that the rest of the picture shows has its name in bold, and a pointer.

    Parameters
    ----------
    axes : Axes
        The interaction on the probability scale runs along the x axis, as a difference of
        chances; the y axis is in points, downwards.
    answer : PairAnswer
    theme : Theme
    """

    def __init__(self, axes: Axes, answer: PairAnswer, theme: Theme) -> None:
        self.axes, self._theme = axes, theme
        self.room = Room(axes, lambda: None)
        bare(axes)
        axes.set_axisbelow(True)
        small, faint = theme.small, theme.faint
        beside = blended_transform_factory(corner(axes, 0, 0), axes.transData)
        figures = blended_transform_factory(corner(axes, 1, 0), axes.transData)
        shown = answer.question.scale
        self._title = Title(axes, theme)
        self.names = {
            scale: letter(axes, theme, beside, down="top",
                          weight="bold" if scale == shown else "normal")
            for scale in ("probability", "odds")
        }  # fmt: skip
        self._rests = [letter(axes, theme, beside, size=small, colour=faint, down="top")
                       for _ in range(2)]  # fmt: skip
        self.labels = [letter(axes, theme, beside) for _ in range(2 * _MOST_ROWS)]
        self.figures = [letter(axes, theme, figures) for _ in range(2 * _MOST_ROWS)]
        self._heading = letter(axes, theme, corner(axes, 1, 1), size=small, colour=faint,
                               down="bottom")  # fmt: skip
        self._unit = letter(axes, theme, beside, size=small, colour=faint, across="right",
                            down="top")  # fmt: skip
        above = blended_transform_factory(axes.transData, corner(axes, 0, 1))
        self.none = letter(axes, theme, above, size=small, colour=faint, across="center",
                           down="bottom")  # fmt: skip
        self.rows = [AxisArtists(axes, theme, 1) for _ in range(2)]
        self._pointer = Line2D(
            [], [], linestyle="none", marker=">", markersize=0.8 * theme.marker_size,
            markerfacecolor=theme.ink, markeredgewidth=0, transform=beside,
        )  # fmt: skip
        axes.add_artist(self._pointer)
        self._pointer.set_clip_on(False)

    @staticmethod
    def height(answer: PairAnswer, theme: Theme, width: float) -> float:
        """Height in points that the panel takes."""
        placed = scale_rows(answer, theme, width - _GUTTER * theme.font_size)
        width -= _GUTTER * theme.font_size
        return _above(placed, theme, width) + placed[1].bottom + ticks_height(theme, width)

    def update(self, answer: PairAnswer) -> None:
        """Show another answer of the same scale."""
        theme, em = self._theme, self._theme.font_size
        width, height = slot_size(self.axes)
        gutter = _GUTTER * em
        narrow = is_narrow(theme, width - gutter)
        beneath = ticks_height(theme, width - gutter)
        placed = scale_rows(answer, theme, width - gutter)
        left = gutter + max(each.layout.left for each in placed)
        gap, figures = GAP * em, placed[0].figures
        top = _above(placed, theme, width - gutter)
        depth = placed[1].bottom
        spare = max(0.0, height - top - depth - beneath)
        self.room.margins = Margins(left, figures.width + gap, beneath + spare, top)
        plot, tall = self.room.plot_size()
        first = placed[0].limits
        self.axes.set_xlim(first.lower, first.upper)
        self.axes.set_ylim(depth, 0.0)
        stretch = depth / tall if tall > 0 else 1.0
        self._place_names(placed, gutter - left, stretch)
        self._place_rows(placed, gutter - left, gap)
        self._pointer.set_data(
            [0.3 * em - left],
            [each.top + each.layout.heads[0][3] + 0.55 * em
             for each in placed if each.scale == answer.question.scale],
        )  # fmt: skip
        for artists, each in zip(self.rows, placed, strict=True):
            spans = [(each.top + a, each.top + b) for a, b in each.layout.spans]
            ticks = _ticks(each, plot, left, theme)
            if narrow:
                ticks = _with_none(ticks, plot / each.limits.span, theme)
            artists.set_axis(each.limits, first.span, spans, ticks, each.bottom)
            artists.dots[0].update(
                each.triples, each.heights[: len(each.triples)], each.limits.lower,
                each.limits.upper,
            )  # fmt: skip
        self.none.set_text("" if narrow else message("none"))
        self._unit.set_text(lexicon().points if placed[0].triples and not narrow else "")
        self._unit.set_position((-gap, placed[0].bottom + 0.15 * em))
        self.none.set_position((0.0, 0.1 * em))
        self._heading.set_text(figures.heading)
        self._heading.set_position((gap, 0.1 * em))
        self._title.place(_title(), -left, top, width)

    def _place_names(
        self, placed: tuple[ScaleRows, ScaleRows], start: float, stretch: float
    ) -> None:
        theme, em = self._theme, self._theme.font_size
        for each, rest in zip(placed, self._rests, strict=True):
            words, more, on_one_line, y = each.layout.heads[0]
            name = self.names[each.scale]
            name.set_text(words)
            top = each.top + y
            name.set_position((start, top))
            rest.set_text(more)
            if on_one_line:
                along, drop = (
                    text_width(words, theme, em, _weight(name)) + 0.5 * em,
                    0.12 * em * stretch,
                )
            else:
                along, drop = 0.0, line_height(em, words.count("\n") + 1) * stretch
            rest.set_position((start + along, top + drop))

    def _place_rows(self, placed: tuple[ScaleRows, ScaleRows], start: float, gap: float) -> None:
        for place, each in enumerate(placed):
            labels = self.labels[place * _MOST_ROWS : (place + 1) * _MOST_ROWS]
            figures = self.figures[place * _MOST_ROWS : (place + 1) * _MOST_ROWS]
            for text in (*labels, *figures):
                text.set_text("")
            for text, (words, y) in zip(labels, each.layout.slots, strict=False):
                text.set_text(words)
                text.set_position((start + 0.9 * self._theme.font_size, each.top + y))
            for text, words, y in zip(figures, each.figures.texts, each.heights, strict=False):
                text.set_text(words)
                text.set_position((gap, y))


def _title() -> str:
    return message("The interaction itself, on both scales")


def _weight(name: Text) -> Weight:
    return "bold" if name.get_fontweight() == "bold" else "normal"


def _above(placed: tuple[ScaleRows, ScaleRows], theme: Theme, width: float) -> float:
    heading = line_height(theme.small, placed[0].figures.heading.count("\n") + 1)
    return Title.height(_title(), theme, width) + 0.4 * theme.font_size + heading


def _ticks(rows: ScaleRows, plot: float, left: float, theme: Theme) -> list[tuple[float, str]]:
    if rows.scale == "probability":
        return point_ticks(rows.limits, plot, left, theme) if rows.triples else []
    return _ratio_ticks(rows.limits, plot, theme)


def _with_none(
    ticks: list[tuple[float, str]], per_unit: float, theme: Theme
) -> list[tuple[float, str]]:
    """Name no interaction among the ticks, and leave out what has no room beside the name."""
    half = text_width(message("none"), theme, theme.small) / 2 + 0.4 * theme.small
    return [
        (x, words if x else f"{words}\n{message('none')}")
        for x, words in ticks
        if not x or abs(x) * per_unit >= half + text_width(words, theme, theme.small) / 2
    ]


def _ratio_ticks(limits: Limits, plot: float, theme: Theme) -> list[tuple[float, str]]:
    lower, upper = (
        math.exp(min(max(each, -600.0), 600.0)) for each in (limits.lower, limits.upper)
    )
    apart = math.exp(limits.span * 2.6 * theme.small / max(plot, theme.small))
    places = [
        (math.log(each), simple_fraction(each)) for each in fraction_ticks(lower, upper, apart)
    ]
    return places[:9] or [(0.0, "1")]
