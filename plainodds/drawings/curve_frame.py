"""What a picture along a predictor has around its lines, whether that is a number or not.

The plot with its vertical axis, a row for each line beneath it that says where the data
are, and at the right the lines' own labels.
"""

from __future__ import annotations

from collections.abc import Callable, Sequence
from dataclasses import dataclass, replace

from matplotlib.axes import Axes
from matplotlib.collections import LineCollection
from matplotlib.transforms import Transform, blended_transform_factory

from plainodds.answers.curve import CurveAnswer, CurveLine
from plainodds.drawings.curve_scale import VerticalAxis, is_cut, vertical_axis
from plainodds.drawings.furniture import Notes, Title, marker_line
from plainodds.drawings.geometry import Margins, Room, apart, corner, slot_size
from plainodds.drawings.lettering import (
    elided,
    letter,
    line_height,
    text_width,
    tick_style,
    wrapped,
)
from plainodds.drawings.theme import Theme
from plainodds.drawings.ticks import bare, label_ticks
from plainodds.phrases.labels import (
    axis_title,
    predictor_label,
    scale_title,
    value_label,
    why_no_interval,
)
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import level_figures

__all__ = ["CurveFrame", "Rows"]

_WIDEST_LABELS, _WIDEST_CAPTIONS = 0.3, 0.42
_MOST_LINES = 3


@dataclass(frozen=True)
class Rows:
    """The rows beneath the plot: their captions, and height and step in points."""

    captions: tuple[str, ...]
    height: float
    step: float

    @property
    def depth(self) -> float:
        """Height in points of all rows."""
        return len(self.captions) * self.step + 0.25 * self.step


class CurveFrame:
    """Everything around the lines.

    Parameters
    ----------
    axes : Axes
    answer : CurveAnswer
    theme : Theme
    resized : callable
        Draws the answer anew when the slot has another size.

    Attributes
    ----------
    least : Margins
        Room to leave around the plot at least, so that it stands in line with another one.
    beside : tuple of CurveLine
        Lines of other panels, which the vertical axis has to have room for too.
    """

    def __init__(
        self, axes: Axes, answer: CurveAnswer, theme: Theme, resized: Callable[[], None]
    ) -> None:
        self.axes, self._theme = axes, theme
        self.room = Room(axes, resized)
        self.least = Margins(0.0, 0.0, 0.0, 0.0)
        self.beside: tuple[CurveLine, ...] = ()
        self.logarithmic = answer.question.scale == "odds"
        if self.logarithmic:
            axes.set_yscale("log")
        bare(axes)
        axes.set_axisbelow(True)
        axes.yaxis.grid(visible=True, color=theme.grid, linewidth=theme.hairline, linestyle="-")
        axes.tick_params(axis="y", labelleft=True, pad=0.4 * theme.font_size)
        self._floor = axes.spines["bottom"]
        self._floor.set(visible=True, linewidth=1.4 * theme.hairline)
        self.zero = axes.axhline(
            0.0 if not self.logarithmic else 1.0, color=theme.rule,
            linewidth=1.4 * theme.hairline, linestyle="-", zorder=2, visible=False,
        )  # fmt: skip
        self._title = Title(axes, theme)
        self._notes = Notes(axes, theme)
        self._x_title = letter(
            axes, theme, corner(axes, 0.5, 0), size=theme.small, across="center", down="top"
        )
        self._make_labels(answer)
        self._make_captions(answer)

    def _make_labels(self, answer: CurveAnswer) -> None:
        axes, theme = self.axes, self._theme
        count = len(answer.lines) if answer.question.by else 0
        self._beside: Transform = blended_transform_factory(corner(axes, 1, 0), axes.transAxes)
        self._label_heading = letter(
            axes, theme, self._beside, size=theme.small, colour=theme.faint
        )
        self.labels = [letter(axes, theme, self._beside) for _ in range(count)]
        self.label_marks = [
            marker_line(theme, theme.series(place), transform=self._beside)
            for place in range(count)
        ]
        self._leaders = LineCollection(
            [], colors=[theme.series(place).colour for place in range(count)] or theme.ink,
            linewidths=1.4 * theme.hairline, transform=self._beside, zorder=2,
        )  # fmt: skip
        axes.add_collection(self._leaders, autolim=False)
        for artist in (*self.label_marks, self._leaders):
            if artist is not self._leaders:
                axes.add_artist(artist)
            artist.set_clip_on(False)

    def _make_captions(self, answer: CurveAnswer) -> None:
        axes, theme = self.axes, self._theme
        below = corner(axes, 1, 0)
        several = len(answer.lines) > 1
        self.captions = [
            letter(axes, theme, below, size=theme.small, colour=theme.faint) for _ in answer.lines
        ]
        self.caption_marks = [
            marker_line(theme, theme.series(place), transform=below)
            for place in range(len(answer.lines) if several else 0)
        ]
        for line in self.caption_marks:
            axes.add_artist(line)
            line.set(clip_on=False, markersize=0.85 * line.get_markersize())

    @staticmethod
    def least_height(
        answer: CurveAnswer, rows: Rows, notes: Sequence[str], theme: Theme, width: float
    ) -> float:
        """Height in points below which the plot itself would vanish."""
        em = theme.font_size
        around = Title.height(scale_title(answer), theme, width) + rows.depth
        around += Notes.height(notes, theme, width) + 2 * line_height(theme.small) + 2 * em
        texts = _label_texts(answer, theme, _WIDEST_LABELS * width)
        labels = sum(line_height(em, text.count("\n") + 1) for text in texts)
        return around + max(7 * em, labels)

    def place(
        self,
        answer: CurveAnswer,
        rows: Rows,
        notes: Sequence[str],
        tick_lines: float,
        rows_from: float,
    ) -> VerticalAxis:
        """Set margins, title, vertical axis, rows and notes; give the axis.

        Parameters
        ----------
        answer : CurveAnswer
        rows : Rows
        notes : sequence of str
        tick_lines : float
            Height in points that the tick labels of the horizontal axis take.
        rows_from : float
            How many points beneath the plot the rows begin: beneath the tick labels, or
            above them.
        """
        theme, em, small = self._theme, self._theme.font_size, self._theme.small
        width, height = slot_size(self.axes)
        title = scale_title(answer)
        top = max(Title.height(title, theme, width) + 0.9 * em, self.least.top)
        x_title = line_height(small)
        title_top = rows.depth + 0.35 * em + tick_lines + 0.4 * em
        bottom = title_top + x_title + Notes.height(notes, theme, width)
        bottom = max(bottom, self.least.bottom)
        shared = replace(answer, lines=(*answer.lines, *self.beside))
        vertical = vertical_axis(shared, height - top - bottom, small)
        left = max((text_width(text, theme, small) for text in vertical.labels), default=0.0)
        left += 0.4 * em
        right = self.label_width(answer, rows, theme, width)
        self.room.margins = Margins(left, right, bottom, top)

        label_ticks(self.axes, "y", vertical.ticks, vertical.labels, tick_style(theme))
        self.axes.set_ylim(vertical.lower, vertical.upper)
        drawn = vertical.zero is not None and vertical.lower < vertical.zero
        self.zero.set_visible(drawn)
        # one line is the ground: zero where it is on the axis, else the axis itself
        self._floor.set_color(theme.grid if drawn else theme.rule)
        self._title.place(title, -left, top, width)
        self._x_title.set_text(
            wrapped(axis_title(answer.subject.predictor(answer.question.predictor)),
                    width - left - right, theme, small, 1)
        )  # fmt: skip
        self._x_title.set_position((0.0, -title_top))
        self._notes.place(notes, -left, -bottom, width)
        self._place_captions(rows, rows_from)
        return vertical

    @staticmethod
    def label_width(answer: CurveAnswer, rows: Rows, theme: Theme, width: float) -> float:
        """Width in points that labels and captions take at the right."""
        em = theme.font_size
        most = _WIDEST_LABELS * width
        texts = [text_width(text, theme, em) for text in _label_texts(answer, theme, most)]
        mark = 2.0 * em if len(answer.lines) > 1 else 0.7 * em
        captions = [mark + text_width(text, theme, theme.small) for text in rows.captions]
        if answer.question.by:
            heading = predictor_label(answer.subject.predictor(answer.question.by))
            texts.append(text_width(heading, theme, theme.small) - 0.9 * em)
        beneath = min(_WIDEST_CAPTIONS * width, max(captions, default=0.0))
        return max(min(most, max(texts, default=0.0) + 2.6 * em), beneath)

    def place_labels(self, answer: CurveAnswer, ends: Sequence[float], leaders: bool) -> None:
        """Set the lines' labels as near to their ends as they go without overlap.

        Parameters
        ----------
        answer : CurveAnswer
        ends : sequence of float
            How far up the plot each line ends, from 0 to 1.
        leaders : bool
            Whether a hairline leads from each end to its label.
        """
        if not self.labels or answer.question.by is None:
            return
        theme, em = self._theme, self._theme.font_size
        _, plot = self.room.plot_size()
        most = self.room.margins.right
        texts = _label_texts(answer, theme, most)
        sizes = [line_height(em, text.count("\n") + 1) for text in texts]
        above = self.room.margins.top
        title = Title.height(scale_title(answer), theme, slot_size(self.axes)[0])
        top = plot + min(0.35 * above, above - title) - line_height(theme.small)
        middles = apart([end * plot for end in ends], sizes, 0.0, max(top, 1.0))
        for label, mark, text, middle in zip(
            self.labels, self.label_marks, texts, middles, strict=True
        ):
            label.set_text(text)
            label.set_position((2.2 * em, middle / plot))
            mark.set_data([1.5 * em], [middle / plot])
        self._leaders.set_segments(
            [[(0.1 * em, end), (0.9 * em, middle / plot)]
             for end, middle in zip(ends, middles, strict=True) if leaders]
        )  # fmt: skip
        highest = max(middle + size / 2 for middle, size in zip(middles, sizes, strict=True))
        heading = predictor_label(answer.subject.predictor(answer.question.by))
        self._label_heading.set_text(wrapped(heading, most - em, theme, theme.small, 1))
        self._label_heading.set_position(
            (1.1 * em, (highest + 0.5 * line_height(theme.small)) / plot)
        )

    def _place_captions(self, rows: Rows, start: float) -> None:
        em = self._theme.font_size
        marked = 2.0 * em if self.caption_marks else 0.7 * em
        for place, (text, words) in enumerate(zip(self.captions, rows.captions, strict=True)):
            middle = -start - (place + 0.6) * rows.step
            size = min(self._theme.small, 0.95 * rows.step)
            room = max(self.room.margins.right - marked, em)
            text.set_text(elided(words, room, self._theme, size))
            text.set_position((marked, middle))
            text.set_fontsize(size)
        for place, mark in enumerate(self.caption_marks):
            mark.set_data([1.5 * em], [-start - (place + 0.6) * rows.step])

    @staticmethod
    def interval_note(answer: CurveAnswer, name: str) -> str:
        """Say what the intervals are, or why there are none."""
        if all(line.lower is None for line in answer.lines):
            return why_no_interval(answer.subject)
        level = level_figures(answer.question.level)
        if is_cut(answer):
            return message("{}: {}% interval, cut off where it leaves the axis.", name, level)
        return message("{}: {}% interval.", name, level)


def _label_texts(answer: CurveAnswer, theme: Theme, most: float) -> list[str]:
    by = answer.question.by
    if by is None:
        return []
    facts, em = answer.subject.predictor(by), theme.font_size
    return [
        wrapped(value_label(facts, line.by), most - 2.6 * em, theme, em, 2)
        for line in answer.lines
        if line.by is not None
    ]
