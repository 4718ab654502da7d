"""What a change of one predictor does as another one varies."""

from __future__ import annotations

from collections.abc import Sequence

import numpy as np
from matplotlib.axes import Axes
from matplotlib.lines import Line2D
from matplotlib.transforms import blended_transform_factory

from plainodds.answers.curve import CurveLine, Scale
from plainodds.answers.pair import PairAnswer
from plainodds.drawings.curve import LineArtists
from plainodds.drawings.curve_levels import LevelPoints, level_labels
from plainodds.drawings.curve_scale import VerticalAxis
from plainodds.drawings.furniture import Title
from plainodds.drawings.geometry import Margins, Room, apart, corner, slot_size
from plainodds.drawings.lettering import letter, line_height, text_width, tick_style, wrapped
from plainodds.drawings.pair_axis import effect_axis
from plainodds.drawings.pair_strip import Strip, StripPart
from plainodds.drawings.pair_words import effect_subtitle, no_effect, stretch_names, turn_name
from plainodds.drawings.theme import Theme
from plainodds.drawings.ticks import bare, label_ticks, round_ticks
from plainodds.model.predictors import PredictorFacts
from plainodds.phrases.labels import axis_title, value_label
from plainodds.phrases.numbers import quantity, wording
from plainodds.phrases.pair_labels import followed_label

__all__ = ["EffectPanel"]

_MOST_TURNS = 3
_LEAST_PLOT = 7.0  # letters
_SUBTITLE_LINES = 3


class EffectPanel:
    """The effect of the first predictor along the second, with its interval.

    A line with its band along a number, dots with intervals at levels; a line of no
    effect, named; beneath, a strip that says where the interval lies on which side of it.

    Parameters
    ----------
    axes : Axes
        The second predictor across, levels at 0, 1, 2 …; up, percentage points or odds
        ratios (logarithmic).
    answer : PairAnswer
    theme : Theme
    """

    def __init__(self, axes: Axes, answer: PairAnswer, theme: Theme) -> None:
        self.axes, self._theme = axes, theme
        self.room = Room(axes, lambda: None)
        self.logarithmic = answer.question.scale == "odds"
        self._is_number = _facts(answer).is_number
        if self.logarithmic:
            axes.set_yscale("log")
        bare(axes)
        axes.set_axisbelow(True)
        axes.yaxis.grid(visible=True, color=theme.grid, linewidth=theme.hairline, linestyle="-")
        axes.tick_params(axis="y", labelleft=True, pad=0.4 * theme.font_size)
        axes.tick_params(axis="x", labelbottom=True)
        self.none = axes.axhline(
            1.0 if self.logarithmic else 0.0, color=theme.rule, linewidth=2.0 * theme.hairline,
            linestyle="-", zorder=2,
        )  # fmt: skip
        small, faint = theme.small, theme.faint
        self._title = Title(axes, theme)
        self._subtitle = letter(
            axes, theme, corner(axes, 0, 1), size=small, colour=faint, down="top"
        )
        beside = blended_transform_factory(corner(axes, 1, 0), axes.transData)
        self.none_label = letter(axes, theme, beside, size=small, colour=faint)
        self._x_title = letter(
            axes, theme, corner(axes, 0.5, 0), size=small, across="center", down="top"
        )
        self.effect: LineArtists | LevelPoints = (
            LineArtists(axes, theme, 0, 1) if self._is_number else LevelPoints(axes, theme, 0, 1)
        )
        self.strip = Strip(axes, theme)
        self._unknown = letter(
            axes, theme, corner(axes, 0.5, 0.5), colour=faint, across="center", down="bottom"
        )
        self._make_turns()

    def _make_turns(self) -> None:
        axes, theme = self.axes, self._theme
        above = blended_transform_factory(axes.transData, corner(axes, 0, 1))
        self.turns = Line2D(
            [], [], linestyle="none", marker="D", markersize=0.95 * theme.marker_size,
            markerfacecolor=theme.paper, markeredgecolor=theme.colours[4],
            markeredgewidth=0.75 * theme.line_width, zorder=4.5,
        )  # fmt: skip
        self.turn_lines = Line2D(
            [], [], color=theme.colours[4], linewidth=1.4 * theme.hairline, zorder=2.5,
            dashes=theme.dashes[1],
            transform=blended_transform_factory(axes.transData, axes.transAxes),
        )  # fmt: skip
        for line in (self.turns, self.turn_lines):
            axes.add_line(line)
        self.turn_words = [
            letter(axes, theme, above, size=theme.small, across="center", down="bottom")
            for _ in range(_MOST_TURNS if self._is_number else 0)
        ]

    @classmethod
    def around(cls, answer: PairAnswer, theme: Theme, width: float) -> tuple[float, float]:
        """Height in points of what stands above and beneath the plot."""
        em = theme.font_size
        title = Title.height(followed_label(answer), theme, width) + 0.6 * em
        title += line_height(theme.small, _subtitle(answer, theme, width).count("\n") + 1)
        turns = 0.2 * em + line_height(theme.small) if _facts(answer).is_number else 0.0
        strip = Strip.height(theme) if answer.effect.stretches else 0.0
        return title + turns, strip + cls._labels(answer, theme, width)[1]

    @classmethod
    def least_height(cls, answer: PairAnswer, theme: Theme, width: float) -> float:
        """Height in points below which the plot itself would vanish."""
        return sum(cls.around(answer, theme, width)) + _LEAST_PLOT * theme.font_size

    @staticmethod
    def _labels(
        answer: PairAnswer, theme: Theme, width: float
    ) -> tuple[tuple[list[str], float, float, float] | None, float]:
        """Labels of levels, with size, rotation and depth; height of all beneath the strip."""
        em, facts = theme.font_size, _facts(answer)
        beneath = 0.8 * em + line_height(theme.small)
        if facts.is_number:
            return None, beneath + line_height(theme.small)
        names = [value_label(facts, each) for each in answer.effect.at]
        room = 0.92 * (width - _right(theme) - 3.5 * theme.small) / len(names)
        labels = level_labels(names, room, theme)
        return labels, beneath + labels[3]

    def update(self, answer: PairAnswer, least: Margins | None = None) -> None:
        """Show another answer of the same structure.

        Parameters
        ----------
        answer : PairAnswer
        least : Margins, optional
            Room above and beneath a plot at whose side this one stands in line.
        """
        theme, em, small = self._theme, self._theme.font_size, self._theme.small
        width, height = slot_size(self.axes)
        above, below = self.around(answer, theme, width)
        top = max(above, least.top if least else 0.0)
        bottom = max(below, least.bottom if least else 0.0)
        vertical = effect_axis(answer, height - top - bottom, small)
        left = max((text_width(text, theme, small) for text in vertical.labels), default=0.0)
        self.room.margins = margins = Margins(left + 0.4 * em, _right(theme), bottom, top)
        plot, _ = self.room.plot_size()
        label_ticks(self.axes, "y", vertical.ticks, vertical.labels, tick_style(theme))
        self.axes.set_ylim(vertical.lower, vertical.upper)
        title = self._title.place(followed_label(answer), -margins.left, top, width)
        self._subtitle.set_text(_subtitle(answer, theme, width))
        self._subtitle.set_position((-margins.left, top - title))
        self.none_label.set_text(no_effect())
        self.none_label.set_position((0.6 * em, vertical.zero or 0.0))
        strip = Strip.height(theme) if answer.effect.stretches else 0.0
        labels, _ = self._labels(answer, theme, width)
        if labels is None:
            lower, upper = self._along_number(answer, plot, strip)
            strip_top, title_top = 0.0, strip + 0.75 * em + line_height(small)
        else:
            lower, upper = self._at_levels(answer, labels)
            strip_top, title_top = -labels[3] - 0.35 * em, labels[3] + strip + 0.75 * em
        self._show_effect(answer)
        self.axes.set_xlim(lower, upper)
        self.strip.place(_parts(answer), strip_top, plot / (upper - lower))
        self._x_title.set_text(wrapped(axis_title(_facts(answer)), plot, theme, small, 1))
        self._x_title.set_position((0.0, -title_top))
        self._place_turns(answer, lower, upper, plot, vertical)

    def _along_number(self, answer: PairAnswer, plot: float, strip: float) -> tuple[float, float]:
        at = [float(each) for each in answer.effect.at]
        lower, upper = min(at), max(at)
        room = 0.012 * (upper - lower) or 0.5
        lower, upper = lower - room, upper + room
        theme = self._theme
        ticks = round_ticks(lower, upper, max(2, int(plot / (4.2 * theme.small))))
        label_ticks(self.axes, "x", ticks, [quantity(each) for each in ticks], tick_style(theme))
        self.axes.tick_params(axis="x", pad=strip + 0.35 * theme.font_size)
        return lower, upper

    def _at_levels(
        self, answer: PairAnswer, labels: tuple[list[str], float, float, float]
    ) -> tuple[float, float]:
        names, size, rotation, _ = labels
        style = tick_style(self._theme, size) | {"color": self._theme.ink, "rotation": rotation}
        label_ticks(self.axes, "x", range(len(names)), names, style)
        self.axes.tick_params(axis="x", pad=0.35 * self._theme.font_size)
        return -0.55, len(names) - 0.45

    def _show_effect(self, answer: PairAnswer) -> None:
        found = answer.effect
        line = CurveLine(
            None, found.at, found.estimate, found.se, found.lower, found.upper, found.supported
        )
        # a slope's axis is in percentage points, as this one is
        scale: Scale = "odds" if self.logarithmic else "slope"
        self.effect.update(line, scale)
        known = np.isfinite(np.asarray(found.estimate, dtype=float)).any()
        self._unknown.set_text("" if known else wording().not_known)
        self._unknown.set_position((0.0, 0.8 * self._theme.font_size))

    def _place_turns(
        self, answer: PairAnswer, lower: float, upper: float, plot: float, vertical: VerticalAxis
    ) -> None:
        theme, em = self._theme, self._theme.font_size
        turns = [each for each in answer.effect.turns if lower <= each <= upper]
        if not self._is_number or not turns:
            turns = []
        at = np.asarray(answer.effect.at if turns else (), dtype=float)
        unit = 1.0 if self.logarithmic else 100.0
        heights = [unit * float(np.interp(x, at, answer.effect.estimate)) for x in turns]
        self.turns.set_data(turns, heights)
        self.turn_lines.set_data(
            [x for each in turns for x in (each, each, np.nan)], [0.0, 1.0, np.nan] * len(turns)
        )
        named = turns[:_MOST_TURNS] if len(turns) <= _MOST_TURNS else []
        words = [wrapped(turn_name(answer, each), plot, theme, theme.small, 1) for each in named]
        sizes = [text_width(each, theme, theme.small) + 0.8 * em for each in words]
        per_unit = plot / (upper - lower)
        wanted = [(each - lower) * per_unit for each in named]
        fits = sum(sizes) <= plot + self.room.margins.right
        middles = apart(wanted, sizes, -self.room.margins.left, plot + self.room.margins.right)
        for text in self.turn_words:
            text.set_text("")
        for text, name, middle in zip(self.turn_words, words, middles, strict=False):
            text.set_text(name if fits else "")
            text.set_position((lower + middle / per_unit, 0.2 * em))


def _facts(answer: PairAnswer) -> PredictorFacts:
    return answer.subject.predictor(answer.question.b)


def _subtitle(answer: PairAnswer, theme: Theme, width: float) -> str:
    return wrapped(effect_subtitle(answer), width, theme, theme.small, _SUBTITLE_LINES)


def _right(theme: Theme) -> float:
    return text_width(no_effect(), theme, theme.small) + 0.7 * theme.font_size


def _parts(answer: PairAnswer) -> Sequence[StripPart]:
    places = {level: place for place, level in enumerate(answer.effect.at)}
    is_number = _facts(answer).is_number
    parts = []
    for each in answer.effect.stretches:
        names = stretch_names(answer, each)
        if is_number:
            start, end = float(each.start), float(each.end)
            parts.append(StripPart(start, end, each.sign, names, end - start))
        elif each.start in places:
            place = places[each.start]
            parts.append(StripPart(place - 0.42, place + 0.42, each.sign, names, 1.0))
    return parts
