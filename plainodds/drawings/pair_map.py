"""The chance over two numbers, as a map with contours; nothing is drawn where nobody is."""

from __future__ import annotations

from collections.abc import Sequence
from itertools import pairwise

import numpy as np
from matplotlib.axes import Axes
from matplotlib.collections import LineCollection, PathCollection
from matplotlib.colors import to_hex, to_rgb
from matplotlib.lines import Line2D
from matplotlib.text import Text

from plainodds.answers.pair import PairAnswer
from plainodds.answers.surface import Surface
from plainodds.drawings.furniture import Title
from plainodds.drawings.geometry import Margins, Room, corner, slot_size
from plainodds.drawings.lettering import (
    Weight,
    letter,
    line_height,
    text_width,
    tick_style,
    wrapped,
)
from plainodds.drawings.pair_contours import (
    Box,
    Contours,
    Floats,
    contours_of,
    cut,
    label_place,
    levels_of,
    sign_lines,
)
from plainodds.drawings.pair_words import sign_turns, surface_title
from plainodds.drawings.theme import Theme
from plainodds.drawings.ticks import bare, label_ticks, round_ticks
from plainodds.phrases.labels import axis_title, cases_label
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import quantity, simple_fraction

__all__ = ["MapPanel", "compared_values", "tints"]

_LEAST_PLOT = 9.0  # letters
_PALEST, _DARKEST = 0.05, 0.44
_HATCH = 0.75  # letters between its lines


class MapPanel:
    """Contours of the chance, or of the odds, over two numbers.

    Darker is higher. Where no rows lie near, the map is hatched and empty; the edge of the
    rest is outlined. A broken line shows where the local interaction changes its sign, and
    a frame joins the four combinations that are compared.

    Parameters
    ----------
    axes : Axes
        The first predictor across, the second up.
    answer : PairAnswer
        With a surface.
    theme : Theme
    """

    def __init__(self, axes: Axes, answer: PairAnswer, theme: Theme) -> None:
        self.axes, self._theme = axes, theme
        self.room = Room(axes, lambda: None)
        bare(axes)
        axes.tick_params(
            labelleft=True, labelbottom=True, left=True, bottom=True, color=theme.rule,
            width=1.4 * theme.hairline, length=0.3 * theme.font_size, pad=0.2 * theme.font_size,
        )  # fmt: skip
        small = theme.small
        self._title = Title(axes, theme)
        self._x_title = letter(
            axes, theme, corner(axes, 0.5, 0), size=small, across="center", down="top"
        )
        self._y_title = letter(axes, theme, corner(axes, 0, 1), size=small, down="bottom")
        self._points = corner(axes, 0, 0)
        self.hatch = self._lines(theme.rule, 1.2 * theme.hairline, 0.5, self._points)
        self.hatch.set_alpha(0.35)
        self.areas = PathCollection([], linewidths=0, zorder=1)
        self.outline = PathCollection(
            [], facecolor="none", edgecolor=theme.rule, linewidths=1.4 * theme.hairline, zorder=1.6
        )
        for areas in (self.areas, self.outline):
            areas.set_transform(axes.transData)
            axes.add_collection(areas, autolim=False)
        self.contours = self._lines(theme.faint, 1.3 * theme.hairline, 2, axes.transData)
        self.sign = self._lines(theme.colours[4], 1.1 * theme.line_width, 3, axes.transData)
        self.sign.set_linestyle([(0, (3.2, 1.6))])
        self.frame = Line2D(
            [], [], color=theme.ink, linewidth=1.6 * theme.hairline, linestyle="-", zorder=3.4,
            marker="o", markersize=0.9 * theme.marker_size, markerfacecolor=theme.paper,
            markeredgecolor=theme.ink, markeredgewidth=0.7 * theme.line_width,
        )  # fmt: skip
        axes.add_line(self.frame)
        self.frame.set_clip_on(False)
        for spine in axes.spines.values():
            spine.set(visible=True, color=theme.rule, linewidth=1.4 * theme.hairline)
        self.labels: dict[str, Text] = {}
        self._empty = letter(axes, theme, self._points, size=small, colour=theme.faint)
        self._hatched: object = None

    def _lines(self, colour: str, width: float, order: float, transform: object) -> LineCollection:
        lines = LineCollection([], colors=colour, linewidths=width, linestyles="-", zorder=order)
        lines.set_transform(transform)  # type: ignore[arg-type]
        self.axes.add_collection(lines, autolim=False)
        return lines

    @staticmethod
    def around(answer: PairAnswer, theme: Theme, width: float) -> tuple[float, float]:
        """Height in points of what stands above and beneath the plot."""
        em, line = theme.font_size, line_height(theme.small)
        title = Title.height(surface_title(answer), theme, width)
        return title + line + 0.7 * em, 2 * line + 0.75 * em

    @classmethod
    def least_height(cls, answer: PairAnswer, theme: Theme, width: float) -> float:
        """Height in points below which the plot itself would vanish."""
        return sum(cls.around(answer, theme, width)) + _LEAST_PLOT * theme.font_size

    def update(self, answer: PairAnswer, least: float = 0.0) -> None:
        """Show another answer of the same structure.

        Parameters
        ----------
        answer : PairAnswer
        least : float
            Room in points above the plot at least, so that it is in line with another one.
        """
        surface = answer.surface
        assert surface is not None
        self._place_around(answer, surface, least)
        levels = levels_of(surface, answer.question.scale)
        found = contours_of(surface, levels)
        colours = tints(self._theme, len(levels) + 1)
        held = [
            (path, colour)
            for path, colour in zip((found.region, *found.areas), colours, strict=True)
            if path is not None
        ]
        self.areas.set_paths([path for path, _ in held])
        self.areas.set_facecolor([colour for _, colour in held])
        self.outline.set_paths([] if found.region is None else [found.region])
        corners = compared_values(answer)
        self.frame.set_data([x for x, _ in corners], [y for _, y in corners])
        self._draw_lines(answer, surface, found, corners)

    def _place_around(self, answer: PairAnswer, surface: Surface, least: float) -> None:
        theme, em, small = self._theme, self._theme.font_size, self._theme.small
        width, height = slot_size(self.axes)
        above, below = self.around(answer, theme, width)
        top, bottom = max(above, least), below
        b_ticks = round_ticks(
            surface.b_at[0], surface.b_at[-1], max(2, int((height - top - bottom) / (2.6 * small)))
        )
        b_labels = [quantity(each) for each in b_ticks]
        left = max((text_width(each, theme, small) for each in b_labels), default=0.0) + 0.6 * em
        self.room.margins = Margins(left, 1.2 * em, bottom, top)
        plot, _ = self.room.plot_size()
        a_ticks = round_ticks(surface.a_at[0], surface.a_at[-1], max(2, int(plot / (3.4 * small))))
        label_ticks(self.axes, "y", b_ticks, b_labels, tick_style(theme))
        label_ticks(self.axes, "x", a_ticks, [quantity(x) for x in a_ticks], tick_style(theme))
        self.axes.set_xlim(surface.a_at[0], surface.a_at[-1])
        self.axes.set_ylim(surface.b_at[0], surface.b_at[-1])
        a, b = (answer.subject.predictor(x) for x in (answer.question.a, answer.question.b))
        self._title.place(surface_title(answer), -left, top, width)
        self._y_title.set_text(wrapped(axis_title(b), width, theme, small, 1))
        self._y_title.set_position((-left, 0.35 * em))
        self._x_title.set_text(wrapped(axis_title(a), plot, theme, small, 1))
        self._x_title.set_position((0.0, -line_height(small) - 0.75 * em))

    def _draw_lines(
        self, answer: PairAnswer, surface: Surface, found: Contours,
        corners: Sequence[tuple[float, float]],
    ) -> None:  # fmt: skip
        em = self._theme.font_size
        width, height = self.room.plot_size()
        origin = np.array([surface.a_at[0], surface.b_at[0]])
        unit = np.array([width, height]) / (np.array([surface.a_at[-1], surface.b_at[-1]]) - origin)
        inner = (0.3 * em, 0.3 * em, width - 0.3 * em, height - 0.3 * em)
        taken = _frame_boxes([(np.array(each) - origin) * unit for each in corners], em)
        odds = answer.question.scale == "odds"
        told = [
            simple_fraction(x) if odds else quantity(round(100 * x, 9), "%") for x in found.levels
        ]
        sign = [(line - origin) * unit for line in sign_lines(surface)]
        lines = [[(line - origin) * unit for line in own] for own in found.lines]
        # the longest name first: it is the hardest to place
        named: list[tuple[tuple[str, ...], list[Floats]]] = [(sign_turns(), sign)] if sign else []
        named += [((name,), own) for name, own in zip(told, lines, strict=True)]
        for text in self.labels.values():
            text.set_visible(False)
        boxes: list[Box] = []
        for names, own in named:
            for name in names:
                box = label_place(own, self._size(name), inner, [*taken, *boxes])
                if box is not None:
                    boxes.append(box)
                    self._label(name, box)
                    break
        level_lines = [line for own in lines for line in own]
        self.contours.set_segments([each / unit + origin for each in cut(level_lines, boxes)])
        self.sign.set_segments([each / unit + origin for each in cut(sign, boxes)])
        self._draw_hatch(answer, surface, width, height)

    def _size(self, name: str) -> tuple[float, float]:
        """Width and height in points of a label."""
        theme, lines = self._theme, name.count("\n") + 1
        wide = text_width(name, theme, theme.small, _weight(name)) + 0.4 * theme.font_size
        return wide, line_height(theme.small, lines) - 0.2 * theme.small

    def _label(self, name: str, box: Box) -> None:
        theme = self._theme
        if name not in self.labels:
            self.labels[name] = letter(
                self.axes, theme, self._points, size=theme.small, across="center",
                colour=theme.colours[4] if name in sign_turns() else theme.ink,
                weight=_weight(name),
            )  # fmt: skip
        text = self.labels[name]
        text.set_text(name)
        text.set_position(((box[0] + box[2]) / 2, (box[1] + box[3]) / 2))
        text.set_visible(True)

    def _draw_hatch(
        self, answer: PairAnswer, surface: Surface, width: float, height: float
    ) -> None:
        """Hatch what is not supported, and say there why, where a corner has room."""
        key = (surface.supported, width, height, answer.subject.outcome.cases)
        if key == self._hatched:
            return
        self._hatched = key
        theme, em = self._theme, self._theme.font_size
        held = np.asarray(surface.supported, dtype=bool)
        self.hatch.set_segments([])
        self._empty.set_text("")
        if held.all():
            return
        step = _HATCH * em
        starts = np.arange(-height, width, step)
        share = np.linspace(0.0, 1.0, 60)[:, None] * [height, height]
        diagonals = [share + np.array([start, 0.0]) for start in starts]
        empty = message("no {} here", cases_label(answer.subject.outcome))
        words = wrapped(empty, 0.5 * width, theme, theme.small, 1)
        size = text_width(words, theme, theme.small) + 0.6 * em, 1.5 * theme.small
        box = _free_corner(held, size, width, height, 0.4 * em)
        if box is not None:
            self._empty.set_text(words)
            self._empty.set_position((box[0] + 0.3 * em, (box[1] + box[3]) / 2))
        self.hatch.set_segments(cut(diagonals, [] if box is None else [box]))


def _weight(name: str) -> Weight:
    return "bold" if name in sign_turns() else "normal"


def _frame_boxes(corners: Sequence[Floats], em: float) -> list[Box]:
    """What a frame takes, with its corners; labels keep clear of it."""
    boxes = [_around(x, y, x, y, 0.6 * em) for x, y in corners]
    for (x, y), (u, v) in pairwise(corners):
        boxes.append(_around(min(x, u), min(y, v), max(x, u), max(y, v), 0.1 * em))
    return boxes


def _around(left: float, low: float, right: float, high: float, pad: float) -> Box:
    return left - pad, low - pad, right + pad, high + pad


def _free_corner(
    held: np.ndarray, size: tuple[float, float], width: float, height: float, pad: float
) -> Box | None:
    """A box in a corner of the plot, with nothing supported beneath it."""
    rows, columns = held.shape
    for top in (True, False):
        for right in (False, True):
            left = width - size[0] - pad if right else pad
            low = height - size[1] - pad if top else pad
            across = slice(int(left / width * columns), int((left + size[0]) / width * columns) + 2)
            up = slice(int(low / height * rows), int((low + size[1]) / height * rows) + 2)
            if left >= 0 and low >= 0 and not held[up, across].any():
                return left, low, left + size[0], low + size[1]
    return None


def compared_values(answer: PairAnswer) -> list[tuple[float, float]]:
    """The combinations that are compared, as a closed frame; none where one is a slope."""
    if answer.sloped:
        return []
    (a0, a1), (b0, b1) = (
        tuple(float(each) for each in change) for change in (answer.a_change, answer.b_change)
    )
    return [(a0, b0), (a1, b0), (a1, b1), (a0, b1), (a0, b0)]


def tints(theme: Theme, count: int) -> list[str]:
    """So many tints of one colour on the theme's paper, from the palest to the darkest."""
    paper, colour = np.array(to_rgb(theme.paper)), np.array(to_rgb(theme.colours[2]))
    return [
        to_hex(paper + share * (colour - paper))
        for share in np.linspace(_PALEST, _DARKEST, max(count, 2))[:count]
    ]
