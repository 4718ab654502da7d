"""Where the lines of a printed table of odds ratios stand, before anything is drawn."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

from plainodds.drawings.lettering import FIGURE_SPACE, line_height, text_width, wrapped
from plainodds.drawings.odds_rows import GAP
from plainodds.drawings.odds_table_columns import DASH, INDENT, Columns
from plainodds.drawings.theme import Theme
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import p_value
from plainodds.phrases.odds_lines import OddsLine

__all__ = ["Place", "TableLayout", "laid_out"]

_LABEL_LINES, _TEST_LINES = 3, 4
_BETWEEN_GROUPS, _BETWEEN_ROWS, _BETWEEN_LINES = 0.55, 0.5, 0.14  # letters
_BETWEEN_MODELS = 0.78  # letters, of markers in one line


@dataclass(frozen=True)
class Place:
    """Texts of one line and their heights in points, downwards from the top of the plot.

    Attributes
    ----------
    name, rest, counts : str
        Broken into lines; `counts` only where they stand beneath the name.
    indent, along : float
        Of the name, and of the rest, in points.
    name_y, rest_y, counts_y : float
        Of the middles of the texts.
    middle : float
        Of the figures and of a reference's tick.
    stacked : tuple of float
        Of each model's figures, where they stand beneath each other; else all the middle.
    marks : tuple of float
        Of each model's marker.
    """

    name: str
    rest: str
    counts: str
    indent: float
    along: float
    name_y: float
    rest_y: float
    counts_y: float
    middle: float
    stacked: tuple[float, ...]
    marks: tuple[float, ...]


@dataclass(frozen=True)
class TableLayout:
    """The lines' places, rules between groups, heights free for the plot, whole height."""

    places: tuple[Place, ...]
    rules: tuple[float, ...]
    spans: tuple[tuple[float, float], ...]
    height: float


def laid_out(
    lines: Sequence[OddsLine], columns: Columns, theme: Theme, width: float, air: float = 0.0
) -> TableLayout:
    """Lay the lines out.

    Parameters
    ----------
    lines : sequence of OddsLine
    columns : Columns
    theme : Theme
    width : float
        Of the slot, in points.
    air : float
        Added to every line, in points.
    """
    em = theme.font_size
    y = 0.4 * em
    places: list[Place] = []
    rules, spans, start = [], [], 0.0
    for place, line in enumerate(lines):
        # predictors of one line each stand together
        alone = line.kind == "entry" and bool(place) and lines[place - 1].depth == 0
        if place and line.depth == 0 and not alone:
            rules.append(y + 0.5 * _BETWEEN_GROUPS * em)
            y += _BETWEEN_GROUPS * em
        put, height = _placed(line, place, columns, theme, width, y, air)
        if line.kind == "test":
            if lines[place - 1].kind != "test":
                spans.append((start, y))
            start = y + height
        places.append(put)
        # several lines of figures are one row of the table
        several = len(set(put.stacked)) > 1
        y += height + (_BETWEEN_ROWS if several else _BETWEEN_LINES) * em
    y += 0.3 * em
    spans.append((start, y))
    return TableLayout(tuple(places), tuple(rules), tuple(spans), y)


def _placed(
    line: OddsLine,
    place: int,
    columns: Columns,
    theme: Theme,
    width: float,
    top: float,
    air: float,
) -> tuple[Place, float]:
    """One line and the height that it takes."""
    em, small = theme.font_size, theme.small
    indent = line.depth * INDENT * em
    if line.kind == "test":
        return _test(line, indent, theme, width, top, air)
    room = columns.labels_width - indent
    if line.counts is None and columns.counts_width:
        # where a line has no counts, their column is free for its label
        room += columns.counts_width + GAP * em
    name, rest, along = _label(line, room, theme)
    counts = "" if columns.form.counts else _closed_up(columns.counts[place])
    counts = wrapped(counts, room, theme, small, 1)
    beneath = bool(rest) and along == 0.0
    heights = (
        line_height(em, name.count("\n") + 1),
        line_height(small, rest.count("\n") + 1) if beneath else 0.0,
        line_height(small) if counts else 0.0,
    )
    needs = _needs(line, place, columns, theme)
    height = max(sum(heights), sum(needs)) + air
    first, middle = top + (height - sum(heights)) / 2, top + height / 2
    name_y = first + heights[0] / 2
    stacked, marks = _middles(line, columns, place, needs, middle, theme)
    put = Place(
        name, rest, counts, indent, indent + along,
        name_y=name_y,
        rest_y=first + heights[0] + heights[1] / 2 if beneath else name_y,
        counts_y=first + heights[0] + heights[1] + heights[2] / 2,
        middle=middle, stacked=stacked, marks=marks,
    )  # fmt: skip
    return put, height


def _test(
    line: OddsLine, indent: float, theme: Theme, width: float, top: float, air: float
) -> tuple[Place, float]:
    """A test is told across the whole table."""
    assert line.test is not None
    # never broken between the name and the figure
    test = message("p-value {}", p_value(line.test.test.p_value)).replace(" ", "\u00a0")
    told = f"{line.name}: {test}"
    text = wrapped(told, width - indent - theme.font_size, theme, theme.small, _TEST_LINES)
    height = line_height(theme.small, text.count("\n") + 1) + 0.5 * air
    y = top + height / 2
    return Place("", text, "", indent, indent, y, y, y, y, (), ()), height


def _middles(
    line: OddsLine,
    columns: Columns,
    place: int,
    needs: Sequence[float],
    middle: float,
    theme: Theme,
) -> tuple[tuple[float, ...], tuple[float, ...]]:
    """Heights of each model's figures, and of its marker."""
    figures = columns.figures[place]
    if columns.form.apart:
        step, order = _BETWEEN_MODELS * theme.font_size, _ranks(line, figures)
        first = middle - (max(order) if order else 0) / 2 * step
        return (middle,) * len(figures), tuple(first + rank * step for rank in order)
    edge, heights = middle - sum(needs) / 2, iter(needs)
    stacked = []
    for text in figures:
        # a line has heights only for the models that have figures in it
        need = next(heights) if text else 0.0
        stacked.append(edge + need / 2 if text else middle)
        edge += need
    return tuple(stacked), tuple(stacked)


def _ranks(line: OddsLine, figures: Sequence[str]) -> list[int]:
    """Which marker of the line is each model's, from 0, of those that have one."""
    has = [bool(text) and text != DASH for text in figures]
    return [max(0, sum(has[: i + 1]) - 1) if line.rows else 0 for i in range(len(figures))]


def _closed_up(counts: str) -> str:
    """Counts without the spaces that set them in line in a column."""
    return counts.replace(FIGURE_SPACE, "").replace("\u2008", "")


def _label(line: OddsLine, room: float, theme: Theme) -> tuple[str, str, float]:
    """Name and rest in lines, and how far along the rest stands; 0 beneath the name."""
    em, small = theme.font_size, theme.small
    if line.depth:
        return wrapped(line.name, room, theme, em, _LABEL_LINES), "", 0.0
    along = text_width(line.name, theme, em, "bold") + 0.5 * em
    if not line.rest or along + text_width(line.rest, theme, small) <= room:
        return wrapped(line.name, room, theme, em, 2, "bold"), line.rest, along
    return (
        wrapped(line.name, room, theme, em, 2, "bold"),
        wrapped(line.rest, room, theme, small, _LABEL_LINES),
        0.0,
    )


def _needs(line: OddsLine, place: int, columns: Columns, theme: Theme) -> list[float]:
    """Heights that the figures of a line need, one beneath the other."""
    em = theme.font_size
    texts = [text for text in columns.figures[place] if text]
    heights = [line_height(em, text.count("\n") + 1) for text in texts]
    if not columns.form.apart:
        return heights
    return [max([*heights, _BETWEEN_MODELS * em * len(line.rows)])] if heights else []
