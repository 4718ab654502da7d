"""The headings of a printed table's columns, with the models' markers beside their names."""

from __future__ import annotations

from collections.abc import Sequence

from matplotlib.axes import Axes
from matplotlib.collections import LineCollection

from plainodds.drawings.furniture import Key, marker_line
from plainodds.drawings.geometry import corner
from plainodds.drawings.lettering import letter, line_height
from plainodds.drawings.odds_rows import GAP
from plainodds.drawings.odds_table_columns import Columns
from plainodds.drawings.theme import Theme

__all__ = ["TableHeads"]

_ABOVE_RULE, _BELOW_BASELINE = 0.35, 0.24  # letters


class TableHeads:
    """Headings above the columns, over a rule; a key where models share one column.

    Attributes
    ----------
    markers : list of Line2D
        One for each model that has a column of its own.
    rule : LineCollection
    """

    def __init__(self, axes: Axes, theme: Theme, models: Sequence[str]) -> None:
        self._theme = theme
        self._models = [name for name in models if name]
        small, faint = theme.small, theme.faint
        left, right = corner(axes, 0, 1), corner(axes, 1, 1)
        self.counts = letter(axes, theme, left, size=small, colour=faint, down="baseline")
        self.figures = [
            letter(axes, theme, right, size=small, colour=faint, down="baseline") for _ in models
        ]
        self.tests = [
            letter(axes, theme, right, size=small, colour=faint, across="right", down="baseline")
            for _ in models
        ]
        self.names = [letter(axes, theme, right, size=small, down="baseline") for _ in models]
        self.markers = [
            marker_line(theme, theme.series(place), transform=right) for place in range(len(models))
        ]
        for line in self.markers:
            axes.add_artist(line)
            line.set_clip_on(False)
        self.key = Key(axes, theme, self._models)
        self.rule = LineCollection(
            [], colors=theme.rule, linewidths=1.5 * theme.hairline, transform=left, zorder=2
        )
        axes.add_collection(self.rule, autolim=False)
        self.rule.set_clip_on(False)

    @staticmethod
    def height(columns: Columns, theme: Theme, width: float) -> float:
        """Height in points of the headings, of the models' names or key, and the rule."""
        em = theme.font_size
        return _headings(columns, theme) + _names(columns, theme, width) + _ABOVE_RULE * em

    def place(self, columns: Columns, left: float, plot_width: float, right: float) -> None:
        """Set the headings above a plot with so much room in points on either side."""
        theme, em = self._theme, self._theme.font_size
        gap, y = GAP * em, _ABOVE_RULE * em + _BELOW_BASELINE * theme.small
        self.rule.set_segments([[(-left, 0.0), (plot_width + right, 0.0)]])
        self.counts.set_text(columns.counts_heading)
        if columns.form.counts:
            self.counts.set_horizontalalignment("right")
            self.counts.set_position((-gap, y))
        else:
            self.counts.set_horizontalalignment("left")
            self.counts.set_position((-left, y))
        self._place_figures(columns, gap, y)
        shares = bool(self._models) and not columns.form.apart
        for artist in (*self.key.markers, *self.key.texts):
            artist.set_visible(shares)
        if shares:
            width = left + plot_width + right
            height = _headings(columns, theme) + _ABOVE_RULE * em
            self.key.place(-left, height + Key.height(self._models, theme, width) + 0.2 * em, width)

    def _place_figures(self, columns: Columns, gap: float, y: float) -> None:
        theme, em, x = self._theme, self._theme.font_size, gap
        top = _ABOVE_RULE * em + _headings(columns, theme)
        for i, figures in enumerate(self.figures):
            shown = columns.form.apart or i == 0
            name = columns.names[i] if shown and columns.names else ""
            figures.set_text(columns.figures_heading if shown else "")
            figures.set_position((x, y))
            middle = top + line_height(theme.small, name.count("\n") + 1) / 2 + 0.1 * em
            self.names[i].set_text(name)
            last = middle - line_height(theme.small, name.count("\n")) / 2
            self.names[i].set_position((x + 1.1 * em, last - 0.36 * theme.small))
            self.markers[i].set_data(*([[x + 0.4 * em], [middle]] if name else [[], []]))
            after = x + columns.figures_widths[i if columns.form.apart else 0] + gap
            self.tests[i].set_text(columns.tests_heading if shown else "")
            self.tests[i].set_position((after + columns.tests_width, y))
            if columns.form.apart:
                x = after + (columns.tests_width + gap if columns.form.tests else 0.0)


def _headings(columns: Columns, theme: Theme) -> float:
    headings = (columns.counts_heading, columns.figures_heading, columns.tests_heading)
    lines = max(each.count("\n") + 1 for each in headings if each)
    return line_height(theme.small, lines)


def _names(columns: Columns, theme: Theme, width: float) -> float:
    if columns.names:
        lines = max(name.count("\n") + 1 for name in columns.names)
        return line_height(theme.small, lines) + 0.2 * theme.font_size
    if columns.models:
        return Key.height(columns.models, theme, width) + 0.3 * theme.font_size
    return 0.0
