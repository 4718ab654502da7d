"""Marginal effects drawn: dots with intervals in percentage points, an axis for each unit."""

from __future__ import annotations

from collections.abc import Hashable, Sequence

from matplotlib.axes import Axes
from matplotlib.collections import LineCollection
from matplotlib.transforms import blended_transform_factory

from plainodds.answers.effects import EffectsAnswer
from plainodds.drawings.effects_axis import Limits
from plainodds.drawings.effects_notes import effects_notes
from plainodds.drawings.effects_panels import (
    PanelArtists,
    PlacedPanel,
    height_of,
    placed_panels,
)
from plainodds.drawings.effects_rows import panels_of
from plainodds.drawings.furniture import Key, Notes, Title
from plainodds.drawings.geometry import Margins, Room, corner, slot_size
from plainodds.drawings.lettering import letter, line_height, text_width
from plainodds.drawings.odds_rows import GAP
from plainodds.drawings.theme import Theme
from plainodds.drawings.ticks import bare
from plainodds.phrases.labels import effects_title, line_label
from plainodds.phrases.lexicon import lexicon, message

__all__ = ["EffectsDrawing"]

_MOST_STRETCH = 1.5


class EffectsDrawing:
    """The picture of an effects answer.

    Rows are grouped by predictor; several values of `by` stand under each other in a row,
    told apart by colour and marker. Effects in percentage points share an axis; each slope
    has one of its own, because units cannot be compared by length. All have 0 in one place.

    Parameters
    ----------
    axes : Axes
        Effects of the first panel run along its x axis, as differences of chances; its y
        axis is in points, downwards.
    answer : EffectsAnswer
    theme : Theme
    """

    def __init__(self, axes: Axes, answer: EffectsAnswer, theme: Theme) -> None:
        self.axes, self._theme = axes, theme
        self._answer = answer
        self._room = Room(axes, lambda: self.update(self._answer))
        bare(axes)
        axes.set_axisbelow(True)
        small, faint = theme.small, theme.faint
        beside = blended_transform_factory(corner(axes, 0, 0), axes.transData)
        figures = blended_transform_factory(corner(axes, 1, 0), axes.transData)
        panels = panels_of(answer)
        groups = [group for panel in panels for group in panel.groups]

        self._title = Title(axes, theme)
        self._notes = Notes(axes, theme)
        self._key = Key(axes, theme, _series_names(answer))
        self._names = [letter(axes, theme, beside, weight="bold", down="top") for _ in groups]
        self._rests = [
            letter(axes, theme, beside, size=small, colour=faint, down="top") for _ in groups
        ]
        self._labels = [letter(axes, theme, beside) for group in groups for _ in group.slots]
        self._figures = [letter(axes, theme, figures) for _ in answer.rows]
        self._heading = letter(
            axes, theme, corner(axes, 1, 1), size=small, colour=faint, down="bottom"
        )
        self._sides = [
            letter(axes, theme, corner(axes, 0, 1), size=small, colour=faint, across=across,
                   down="bottom")
            for across in ("right", "left")
        ]  # fmt: skip
        self._axis_title = letter(
            axes, theme, corner(axes, 0.5, 0), size=small, colour=faint, across="center", down="top"
        )
        self._rules = LineCollection(
            [], colors=theme.grid, linewidths=theme.hairline, transform=beside, zorder=1
        )
        axes.add_collection(self._rules, autolim=False)
        self._rules.set_clip_on(False)
        series = len(_series(answer))
        self.panels = [PanelArtists(axes, theme, series) for _ in panels]
        self.update(answer)

    @staticmethod
    def title(answer: EffectsAnswer) -> str:
        """The chance that changes."""
        return effects_title(answer)

    @staticmethod
    def structure(answer: EffectsAnswer) -> Hashable:
        """Panels, predictors, changes and series; not the figures."""
        return (
            tuple(_series_names(answer)),
            tuple(
                (
                    panel.is_slope,
                    tuple(
                        (group.slots[0].rows[0].predictor, tuple(len(s.rows) for s in group.slots))
                        for group in panel.groups
                    ),
                )
                for panel in panels_of(answer)
            ),
        )

    @staticmethod
    def natural_height(answer: EffectsAnswer, theme: Theme, width: float) -> float:
        """Height in points that the rows and their axes need."""
        placed = placed_panels(answer, theme, width)
        return _above(answer, placed, theme, width) + height_of(placed, theme) + _below(
            answer, placed, theme, width
        )  # fmt: skip

    @staticmethod
    def least_height(answer: EffectsAnswer, theme: Theme, width: float) -> float:
        """The same: rows have no air to lose."""
        return EffectsDrawing.natural_height(answer, theme, width)

    def update(self, answer: EffectsAnswer) -> None:
        """Show another answer of the same structure."""
        self._answer = answer
        theme, em = self._theme, self._theme.font_size
        width, height = slot_size(self.axes)
        placed = placed_panels(answer, theme, width)
        rows_height = height_of(placed, theme)
        gap, first = GAP * em, placed[0]
        above, below = (part(answer, placed, theme, width) for part in (_above, _below))
        spare = height - above - below - _MOST_STRETCH * rows_height
        left = max(each.layout.left for each in placed)
        self._room.margins = Margins(
            left=left, right=first.figures.width + gap, bottom=below + max(0.0, spare), top=above
        )
        plot_width, plot_height = self._room.plot_size()
        self.axes.set_xlim(first.limits.lower, first.limits.upper)
        self.axes.set_ylim(rows_height, 0.0)
        stretch = rows_height / plot_height if plot_height > 0 else 1.0

        self._place_labels(placed, left, stretch)
        self._place_figures(placed, gap)
        edges = (-left, plot_width + gap + first.figures.width)
        between = [each.top - 0.35 * em for each in placed[1:]]
        within = [each.top + y for each in placed for y in each.layout.rules]
        self._rules.set_segments([[(x, y) for x in edges] for y in (*between, *within)])
        series = _series(answer)
        for artists, each in zip(self.panels, placed, strict=True):
            artists.update(each, series, first.limits.span, plot_width)
        self._place_sides(first.limits, plot_width, gap)
        self._place_around(answer, placed, left, width, below)

    def _place_labels(self, placed: Sequence[PlacedPanel], left: float, stretch: float) -> None:
        em = self._theme.font_size
        heads = [(*head[:3], each.top + head[3]) for each in placed for head in each.layout.heads]
        for name, rest, (words, more, on_one_line, y) in zip(
            self._names, self._rests, heads, strict=True
        ):
            name.set_text(words)
            # centred where it would be centred without stretch
            top = y + line_height(em) / 2 * (1.0 - stretch)
            name.set_position((-left, top))
            rest.set_text(more)
            if on_one_line:
                along = text_width(words, self._theme, em, "bold") + 0.5 * em
                drop = 0.12 * em * stretch
            else:
                along, drop = 0.0, line_height(em, words.count("\n") + 1) * stretch
            rest.set_position((-left + along, top + drop))
        slots = [(words, each.top + y) for each in placed for words, y in each.layout.slots]
        for text, (words, y) in zip(self._labels, slots, strict=True):
            text.set_text(words)
            text.set_position((-left + 0.9 * em, y))

    def _place_figures(self, placed: Sequence[PlacedPanel], gap: float) -> None:
        words = [text for each in placed for text in each.figures.texts]
        heights = [y for each in placed for y in each.heights]
        for text, figures, y in zip(self._figures, words, heights, strict=True):
            text.set_text(figures)
            text.set_position((gap, y))
        self._heading.set_text(placed[0].figures.heading)
        self._heading.set_position((gap, 0.2 * self._theme.font_size))

    def _place_sides(self, limits: Limits, plot_width: float, gap: float) -> None:
        theme, em = self._theme, self._theme.font_size
        at_zero = plot_width * -limits.lower / limits.span
        rooms = (at_zero + gap, plot_width - at_zero + 0.2 * em)
        fits = all(
            room >= text_width(words, theme, theme.small) + 0.6 * em
            for room, words in zip(rooms, _sides(), strict=True)
        )
        for text, words, side in zip(self._sides, _sides(), (-1, 1), strict=True):
            text.set_text(words if fits else "")
            text.set_position((at_zero + side * 0.6 * em, 0.2 * em))

    def _place_around(
        self, answer: EffectsAnswer, placed: Sequence[PlacedPanel], left: float, width: float,
        below: float,
    ) -> None:  # fmt: skip
        theme, em = self._theme, self._theme.font_size
        y = self._room.margins.top
        y -= self._title.place(self.title(answer), -left, y, width)
        self._key.place(-left, y - 0.35 * em, width)
        plot_width, _ = self._room.plot_size()
        room = text_width(lexicon().points, theme, theme.small)
        self._axis_title.set_text(lexicon().points)
        # centred on the plot, unless that would push it out of the slot
        self._axis_title.set_position((max(0.0, (room - plot_width) / 2 - left), -0.2 * em))
        self._notes.place(effects_notes(answer, _leaves(placed)), -left, -below, width)


def _sides() -> tuple[str, str]:
    return message("← lower chance"), message("higher chance →")


def _series(answer: EffectsAnswer) -> tuple[object, ...]:
    return tuple(dict.fromkeys(row.by for row in answer.rows))


def _series_names(answer: EffectsAnswer) -> list[str]:
    by = answer.question.by
    if by is None:
        return []
    facts = answer.subject.predictor(by)
    levels = dict.fromkeys(row.by for row in answer.rows if row.by is not None)
    return [line_label(facts, level) for level in levels]


def _leaves(placed: Sequence[PlacedPanel]) -> bool:
    return any(each.limits.leaves for each in placed)


def _above(
    answer: EffectsAnswer, placed: Sequence[PlacedPanel], theme: Theme, width: float
) -> float:
    em, names = theme.font_size, _series_names(answer)
    title = Title.height(effects_title(answer), theme, width)
    key = Key.height(names, theme, width) + 0.35 * em if names else 0.0
    heading = line_height(theme.small, placed[0].figures.heading.count("\n") + 1)
    return title + key + 0.5 * em + heading + 0.3 * em


def _below(
    answer: EffectsAnswer, placed: Sequence[PlacedPanel], theme: Theme, width: float
) -> float:
    axis = 0.2 * theme.font_size + line_height(theme.small)
    return axis + Notes.height(effects_notes(answer, _leaves(placed)), theme, width)
