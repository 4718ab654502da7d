"""Odds ratios drawn: one row per change on a logarithmic axis, the figures beside it."""

from __future__ import annotations

import math
from collections.abc import Hashable, Sequence

from matplotlib.axes import Axes
from matplotlib.collections import LineCollection
from matplotlib.transforms import blended_transform_factory

from plainodds.answers.odds import OddsAnswer, OddsRow
from plainodds.drawings.dots import Dots
from plainodds.drawings.furniture import Key, Notes, Title
from plainodds.drawings.geometry import Margins, Room, corner, slot_size
from plainodds.drawings.lettering import letter, line_height, text_width, tick_style
from plainodds.drawings.odds_axis import axis_range, axis_title, shown, sides
from plainodds.drawings.odds_rows import (
    GAP,
    Group,
    Layout,
    figures_of,
    groups_of,
    laid_out,
    rows_of,
)
from plainodds.drawings.theme import Theme
from plainodds.drawings.ticks import bare, fraction_ticks, label_ticks
from plainodds.phrases.labels import odds_of_event, why_no_interval
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import simple_fraction
from plainodds.phrases.unbounded import has_finite_estimate, unbounded_note

__all__ = ["OddsDrawing"]

_MOST_STRETCH = 1.5


class OddsDrawing:
    """The forest plot of an odds answer.

    Rows are grouped by predictor; several models stand under each other in a row, told
    apart by colour and marker. What leaves the axis ends in an arrow.

    Parameters
    ----------
    axes : Axes
        Odds ratios run along its logarithmic x axis; its y axis is in points, downwards.
    answer : OddsAnswer
    theme : Theme

    Attributes
    ----------
    beside : tuple of tuples of OddsRow
        The rows of other panels, which the axis has to have room for too.
    """

    def __init__(self, axes: Axes, answer: OddsAnswer, theme: Theme) -> None:
        self.axes, self._theme = axes, theme
        self.beside: tuple[tuple[OddsRow, ...], ...] = ()
        self._models = _models(answer)
        groups = groups_of(answer)
        self._answer = answer
        self._room = Room(axes, lambda: self.update(self._answer))
        axes.set_xscale("log")
        bare(axes)
        axes.set_axisbelow(True)
        axes.tick_params(axis="x", labelbottom=True, pad=0.3 * theme.font_size)

        beside = blended_transform_factory(corner(axes, 0, 0), axes.transData)
        figures = blended_transform_factory(corner(axes, 1, 0), axes.transData)
        above, over_figures = corner(axes, 0, 1), corner(axes, 1, 1)
        small, faint = theme.small, theme.faint

        self._title = Title(axes, theme)
        self._notes = Notes(axes, theme)
        self._key = Key(axes, theme, [name for name in self._models if name])
        self._names = [letter(axes, theme, beside, weight="bold", down="top") for _ in groups]
        self._rests = [
            letter(axes, theme, beside, size=small, colour=faint, down="top") for _ in groups
        ]
        self._labels = [letter(axes, theme, beside) for group in groups for _ in group.slots]
        self._sparse = [
            letter(axes, theme, beside, size=small, colour=faint, down="top") for _ in self._labels
        ]
        self._figures = [letter(axes, theme, figures) for _ in answer.rows]
        self._heading = letter(axes, theme, over_figures, size=small, colour=faint, down="bottom")
        self._sides = [
            letter(axes, theme, above, size=small, colour=faint, across=across, down="bottom")
            for across in ("right", "left")
        ]
        self._axis_title = letter(
            axes, theme, corner(axes, 0.5, 0), size=small, colour=faint, across="center", down="top"
        )

        self._rules = LineCollection(
            [], colors=theme.grid, linewidths=theme.hairline, transform=beside, zorder=1
        )
        # both are drawn in pieces where labels stand between the rows
        self.grid = LineCollection([], colors=theme.grid, linewidths=theme.hairline, zorder=1)
        self.reference = LineCollection(
            [], colors=theme.rule, linewidths=1.6 * theme.hairline, zorder=2
        )
        for lines in (self._rules, self.grid, self.reference):
            axes.add_collection(lines, autolim=False)
            lines.set_clip_on(False)
        self.marks = [
            Dots(axes, theme, place, axes.transData) for place in range(len(self._models))
        ]
        self.update(answer)

    @staticmethod
    def title(answer: OddsAnswer) -> str:
        """The odds that are multiplied."""
        return odds_of_event(answer.subject.outcome)

    @staticmethod
    def structure(answer: OddsAnswer) -> Hashable:
        """Predictors, slots and models; not the figures and not the words."""
        return (
            _models(answer),
            tuple(
                (group.slots[0].rows[0].predictor, tuple(len(slot.rows) for slot in group.slots))
                for group in groups_of(answer)
            ),
        )

    @staticmethod
    def natural_height(answer: OddsAnswer, theme: Theme, width: float) -> float:
        """Height in points that the rows need."""
        layout = laid_out(groups_of(answer), figures_of(answer, theme, width), theme, width)
        above, below = _above(answer, theme, width), _below(answer, theme, width)
        return above + layout.height + below

    @staticmethod
    def least_height(answer: OddsAnswer, theme: Theme, width: float) -> float:
        """The same: rows have no air to lose."""
        return OddsDrawing.natural_height(answer, theme, width)

    def update(self, answer: OddsAnswer) -> None:
        """Show another answer of the same structure."""
        self._answer = answer
        theme, em = self._theme, self._theme.font_size
        width, height = slot_size(self.axes)
        groups = groups_of(answer)
        rows = rows_of(groups)
        figures = figures_of(answer, theme, width)
        layout = laid_out(groups, figures, theme, width)
        gap = GAP * em
        above, below = _above(answer, theme, width), _below(answer, theme, width)
        spare = height - above - below - _MOST_STRETCH * layout.height
        self._room.margins = Margins(
            left=layout.left,
            right=figures.width + gap,
            bottom=below + max(0.0, spare),
            top=above,
        )
        plot_width, plot_height = self._room.plot_size()
        self.axes.set_ylim(layout.height, 0.0)
        # a slot higher than needed stretches the rows; text keeps its place in them
        stretch = layout.height / plot_height if plot_height > 0 else 1.0

        self._place_labels(groups, layout, stretch)
        places = [each for slot in layout.rows for each in slot]
        for text, words, y in zip(self._figures, figures.texts, places, strict=True):
            text.set_text(words)
            text.set_position((gap, y))
        lower, upper = self._place_axis(rows, layout, plot_width, gap)
        edges = (-layout.left, plot_width + gap + figures.width)
        self._rules.set_segments([[(x, y) for x in edges] for y in layout.rules])
        heights = {id(row): y for row, y in zip(rows, places, strict=True)}
        for name, marks in zip(self._models, self.marks, strict=True):
            own = [
                row for row in rows if row.model == name and not math.isnan(row.odds_ratio.estimate)
            ]
            triples = [shown(row) for row in own]
            marks.update(triples, [heights[id(row)] for row in own], lower, upper)
        self._heading.set_text(figures.heading)
        self._heading.set_position((gap, 0.2 * em))
        self._place_around(answer, layout.left, width, below)

    def _place_labels(self, groups: Sequence[Group], layout: Layout, stretch: float) -> None:
        em, left = self._theme.font_size, self._room.margins.left
        for name, rest, head in zip(self._names, self._rests, layout.heads, strict=True):
            words, more, on_one_line, y = head
            name.set_text(words)
            # centred where it would be centred without stretch
            y += line_height(em) / 2 * (1.0 - stretch)
            name.set_position((-left, y))
            rest.set_text(more)
            if on_one_line:
                along = text_width(words, self._theme, em, "bold") + 0.5 * em
                drop = 0.12 * em * stretch
            else:
                along, drop = 0.0, line_height(em, words.count("\n") + 1) * stretch
            rest.set_position((-left + along, y + drop))
        for text, (words, y) in zip(self._labels, layout.slots, strict=True):
            text.set_text(words)
            text.set_position((-left + 0.9 * em, y))
        for text, (words, y, beneath) in zip(self._sparse, layout.marks, strict=True):
            text.set_text(words)
            text.set_position((-left + 0.9 * em, y + beneath * stretch))

    def _place_axis(
        self, rows: Sequence[OddsRow], layout: Layout, plot_width: float, gap: float
    ) -> tuple[float, float]:
        theme, em = self._theme, self._theme.font_size
        ranges = [axis_range(each) for each in (rows, *self.beside)]
        lower, upper = min(low for low, _ in ranges), max(high for _, high in ranges)
        pad = (upper / lower) ** 0.05
        lower, upper = lower / pad, upper * pad
        apart = (upper / lower) ** (2.9 * theme.small / plot_width)
        ticks = fraction_ticks(lower, upper, apart)
        label_ticks(self.axes, "x", ticks, [simple_fraction(t) for t in ticks], tick_style(theme))
        self.axes.set_xlim(lower, upper)
        self.grid.set_segments([[(x, a), (x, b)] for a, b in layout.spans for x in ticks])
        self.reference.set_segments([[(1.0, a), (1.0, b)] for a, b in layout.spans])
        at_one = plot_width * -math.log(lower) / math.log(upper / lower)
        rooms = (at_one + gap, plot_width - at_one + 0.2 * em)
        fits = all(
            room >= text_width(words, theme, theme.small) + 0.6 * em
            for room, words in zip(rooms, sides(), strict=True)
        )
        for text, words, side in zip(self._sides, sides(), (-1, 1), strict=True):
            text.set_text(words if fits else "")
            text.set_position((at_one + side * 0.6 * em, 0.2 * em))
        return lower, upper

    def _place_around(self, answer: OddsAnswer, left: float, width: float, below: float) -> None:
        theme, em, margins = self._theme, self._theme.font_size, self._room.margins
        y = margins.top
        y -= self._title.place(self.title(answer), -left, y, width)
        self._key.place(-left, y - 0.35 * em, width)
        plot_width, _ = self._room.plot_size()
        title = axis_title()
        room = text_width(title, theme, theme.small)
        self._axis_title.set_text(title)
        # centred on the plot, unless that would push it out of the slot
        self._axis_title.set_position(
            (max(0.0, (room - plot_width) / 2 - left), -0.6 * em - line_height(theme.small))
        )
        notes = _notes(answer)
        self._notes.place(notes, -left, -below, width)


def _models(answer: OddsAnswer) -> tuple[str, ...]:
    return tuple(dict.fromkeys(row.model for row in answer.rows))


def _notes(answer: OddsAnswer) -> list[str]:
    lower, upper = axis_range(answer.rows)
    notes = []
    if any(min(shown(row)) < lower or max(shown(row)) > upper for row in answer.rows):
        notes.append(message("Arrow: it goes on beyond the axis; its figures stand at the right."))
    if any(math.isinf(row.log_odds_ratio.estimate) for row in answer.rows):
        notes.append(unbounded_note())
    if any(row.odds_ratio.lower is None and has_finite_estimate(row) for row in answer.rows):
        notes.append(why_no_interval(answer.subject))
    return notes


def _above(answer: OddsAnswer, theme: Theme, width: float) -> float:
    em = theme.font_size
    names = [name for name in _models(answer) if name]
    title = Title.height(OddsDrawing.title(answer), theme, width)
    key = Key.height(names, theme, width) + 0.35 * em if names else 0.0
    lines = figures_of(answer, theme, width).heading.count("\n") + 1
    heading = line_height(theme.small, lines)
    return title + key + 0.5 * em + heading + 0.3 * em


def _below(answer: OddsAnswer, theme: Theme, width: float) -> float:
    axis = 0.6 * theme.font_size + 2 * line_height(theme.small)
    return axis + Notes.height(_notes(answer), theme, width)
