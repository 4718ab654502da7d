"""Odds ratios as journals print them: a table with the plot as one of its columns."""

from __future__ import annotations

import math
from collections.abc import Hashable, Sequence

from matplotlib.axes import Axes
from matplotlib.collections import LineCollection
from matplotlib.transforms import blended_transform_factory

from plainodds.answers.odds import OddsAnswer, OddsRow
from plainodds.drawings.dots import Dots
from plainodds.drawings.furniture import Title
from plainodds.drawings.geometry import Margins, Room, corner, slot_size
from plainodds.drawings.lettering import letter
from plainodds.drawings.odds_rows import GAP
from plainodds.drawings.odds_table_axis import Extent, TableAxis, extent_of
from plainodds.drawings.odds_table_columns import Columns, columns_of, models_of
from plainodds.drawings.odds_table_heads import TableHeads
from plainodds.drawings.odds_table_layout import Place, TableLayout, laid_out
from plainodds.drawings.odds_table_notes import TableNotes, notes_of
from plainodds.drawings.odds_table_text import write
from plainodds.drawings.theme import Theme
from plainodds.drawings.ticks import bare
from plainodds.phrases.labels import odds_of_event
from plainodds.phrases.odds_lines import OddsLine, odds_lines

__all__ = ["OddsTableDrawing"]

_MOST_AIR = 0.55  # letters for each line
_REFERENCE_TICK = 0.42  # letters above and below a reference's middle


class OddsTableDrawing:
    """The printed forest plot of an odds answer.

    Beneath each predictor stand its levels, the reference among them, with events and
    cases; odds ratios with intervals are a plot and a column of figures; the test of an
    interaction ends the lines of its predictor. Several models share the plot, told apart
    by colour and marker, and have a column of figures each where there is room.

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
    axis : TableAxis
    marks : list of Dots
        For each model.
    references : LineCollection
        A tick at 1 for each reference level.
    """

    def __init__(self, axes: Axes, answer: OddsAnswer, theme: Theme) -> None:
        self.axes, self._theme = axes, theme
        self.beside: tuple[tuple[OddsRow, ...], ...] = ()
        self._answer, self._models = answer, models_of(answer)
        lines = odds_lines(answer)
        self._room = Room(axes, lambda: self.update(self._answer))
        axes.set_xscale("log")
        bare(axes)
        axes.set_axisbelow(True)

        left = blended_transform_factory(corner(axes, 0, 0), axes.transData)
        right = blended_transform_factory(corner(axes, 1, 0), axes.transData)
        small, faint = theme.small, theme.faint
        self._title, self._notes = Title(axes, theme), TableNotes(axes, theme)
        self._heads = TableHeads(axes, theme, self._models)
        self._names = [
            letter(axes, theme, left, down="baseline", weight="normal" if line.depth else "bold")
            for line in lines
        ]
        self._rests = [
            letter(axes, theme, left, size=small, colour=faint, down="baseline") for _ in lines
        ]
        self._counts = [letter(axes, theme, left, across="right", down="baseline") for _ in lines]
        self._beneath = [
            letter(axes, theme, left, size=small, colour=faint, down="baseline") for _ in lines
        ]
        self._figures = [
            [letter(axes, theme, right, down="baseline") for _ in self._models] for _ in lines
        ]
        self._tests = [
            [letter(axes, theme, right, across="right", down="baseline") for _ in self._models]
            for _ in lines
        ]
        self.rules = LineCollection(
            [], colors=theme.grid, linewidths=theme.hairline, transform=left, zorder=1
        )
        self.references = LineCollection(
            [], colors=theme.ink, linewidths=theme.line_width, zorder=3
        )
        for collection in (self.rules, self.references):
            axes.add_collection(collection, autolim=False)
            collection.set_clip_on(False)
        self.axis = TableAxis(axes, theme)
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
        """Lines and models; not the figures and not the words."""
        lines = odds_lines(answer)
        return models_of(answer), tuple((line.predictor, line.kind, line.depth) for line in lines)

    @staticmethod
    def natural_height(answer: OddsAnswer, theme: Theme, width: float) -> float:
        """Height in points that the lines need."""
        lines, columns = _made(answer, theme, width)
        above, below = _around(answer, columns, theme, width)
        return above + laid_out(lines, columns, theme, width).height + below

    @staticmethod
    def least_height(answer: OddsAnswer, theme: Theme, width: float) -> float:
        """The same: lines have no air to lose."""
        return OddsTableDrawing.natural_height(answer, theme, width)

    def update(self, answer: OddsAnswer) -> None:
        """Show another answer of the same structure."""
        self._answer = answer
        theme = self._theme
        width, height = slot_size(self.axes)
        lines, columns = _made(answer, theme, width)
        above, below = _around(answer, columns, theme, width)
        layout = laid_out(lines, columns, theme, width)
        spare = height - above - below - layout.height
        if spare > 0:
            air = min(spare / len(lines), _MOST_AIR * theme.font_size)
            layout = laid_out(lines, columns, theme, width, air)
        left, right = columns.left(theme), columns.right(theme)
        rest = max(0.0, height - above - below - layout.height)
        self._room.margins = Margins(left=left, right=right, bottom=below + rest, top=above)
        plot_width, _ = self._room.plot_size()
        self.axes.set_ylim(layout.height, 0.0)

        extent = extent_of((answer.rows, *self.beside))
        self.axis.place(extent, layout.spans, plot_width, left, right)
        self.rules.set_segments([[(x, y) for x in (-left, plot_width + right)]
                                 for y in layout.rules])  # fmt: skip
        for place, put in enumerate(layout.places):
            self._write_label(place, put, left, columns)
            self._write_figures(place, put, columns)
        self._mark(lines, layout, extent)
        self._heads.place(columns, left, plot_width, right)
        self._title.place(self.title(answer), -left, above, width)
        self._notes.place(notes_of(answer, extent, columns), -left, -below, width)

    def _write_label(self, place: int, put: Place, left: float, columns: Columns) -> None:
        write(self._names[place], put.name, -left + put.indent, put.name_y)
        write(self._rests[place], put.rest, -left + put.along, put.rest_y)
        if put.name and put.rest_y == put.name_y:
            # letters of another size beside the name, on its baseline
            baseline = self._names[place].get_position()[1]
            self._rests[place].set_position((-left + put.along, baseline))
        write(self._beneath[place], put.counts, -left + put.indent, put.counts_y)
        counts = columns.counts[place] if columns.form.counts else ""
        write(self._counts[place], counts, -GAP * self._theme.font_size, put.middle)

    def _write_figures(self, place: int, put: Place, columns: Columns) -> None:
        x = gap = GAP * self._theme.font_size
        for i, (figure, test) in enumerate(
            zip(self._figures[place], self._tests[place], strict=True)
        ):
            y = put.stacked[i] if put.stacked else put.middle
            write(figure, columns.figures[place][i], x, y)
            after = x + columns.figures_widths[i if columns.form.apart else 0] + gap
            told = columns.tests[place][i] if columns.form.tests else ""
            write(test, told, after + columns.tests_width, y)
            if columns.form.apart:
                x = after + (columns.tests_width + gap if columns.form.tests else 0.0)

    def _mark(self, lines: Sequence[OddsLine], layout: TableLayout, extent: Extent) -> None:
        """Markers, intervals and arrows of each model, and the ticks of references."""
        half = _REFERENCE_TICK * self._theme.font_size
        pairs = list(zip(lines, layout.places, strict=True))
        self.references.set_segments(
            [[(1.0, put.middle - half), (1.0, put.middle + half)]
             for line, put in pairs if line.kind == "reference"]
        )  # fmt: skip
        for i, (name, marks) in enumerate(zip(self._models, self.marks, strict=True)):
            held = [
                (extent.triple(row), put.marks[i])
                for line, put in pairs
                for row in line.rows
                if row.model == name and not math.isnan(row.odds_ratio.estimate)
            ]
            marks.update([t for t, _ in held], [y for _, y in held], extent.low, extent.high)


def _made(answer: OddsAnswer, theme: Theme, width: float) -> tuple[tuple[OddsLine, ...], Columns]:
    lines = odds_lines(answer)
    return lines, columns_of(answer, lines, theme, width)


def _around(
    answer: OddsAnswer, columns: Columns, theme: Theme, width: float
) -> tuple[float, float]:
    """Heights above and below the lines."""
    title = Title.height(OddsTableDrawing.title(answer), theme, width)
    above = title + 0.5 * theme.font_size + TableHeads.height(columns, theme, width)
    notes = notes_of(answer, extent_of((answer.rows,)), columns)
    return above, TableAxis.height(theme) + TableNotes.height(notes, theme, width)
