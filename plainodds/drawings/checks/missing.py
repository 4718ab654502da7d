"""The share of events among rows that were used, and among those left out."""

from __future__ import annotations

import math

from plainodds.answers.checks.amount import MissingEvidence
from plainodds.drawings.checks.along import chances_axis, draw_x_axis, x_axis_height
from plainodds.drawings.checks.board import Board
from plainodds.drawings.checks.plate import Found, Plate
from plainodds.drawings.checks.rows import LaidRows, Row, draw_grid, draw_rows, laid_rows
from plainodds.drawings.checks.tables import draw_paragraph, paragraph_height
from plainodds.drawings.geometry import Margins
from plainodds.drawings.theme import Theme
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.headings import picture_axes
from plainodds.phrases.checks.parts import quoted, short_list
from plainodds.phrases.labels import predictor_name, sentence_case
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import chance, count, guarded_count, level_figures

__all__ = ["MISSING"]

_GAP = 0.9


def _has_picture(found: Found) -> bool:
    evidence = found.evidence(MissingEvidence)
    return evidence.difference is not None and not math.isnan(evidence.share_used)


def _laid(found: Found, theme: Theme, width: float) -> LaidRows:
    evidence = found.evidence(MissingEvidence)
    used = message("{} rows used", count(evidence.used))
    known = message("{} rows left out", count(evidence.known))
    if evidence.known < evidence.dropped:
        known = message("{} rows left out, outcome known", count(evidence.known))
    return laid_rows(
        [
            Row("", used, chance(evidence.share_used)),
            Row("", known, chance(evidence.share_dropped)),
        ],
        theme, width,
    )  # fmt: skip


def _columns(found: Found) -> str:
    """In which columns values are missing, the most first."""
    subject = found.subject
    told = [
        f"{_name(str(name), subject)} ({guarded_count(int(number), subject.smallest_cell)})"
        for name, number in found.evidence(MissingEvidence).columns
    ]
    return message("Missing in the rows left out: {}.", short_list(told, 6)) if told else ""


def _name(column: str, subject: Subject) -> str:
    if column == subject.outcome.name:
        return message("the outcome")
    known = {facts.name: facts for facts in subject.predictors}
    return predictor_name(known[column]) if column in known else quoted(column)


def _foot(found: Found, theme: Theme, width: float) -> float:
    title = sentence_case(picture_axes(found.finding, found.subject)[0])
    axis = x_axis_height(title, theme, _laid(found, theme, width).title_room(width))
    words = paragraph_height(_columns(found), theme, width, 0.94)
    return axis + (words + _GAP * theme.font_size if words else 0.0)


def _height(found: Found, theme: Theme, width: float) -> float:
    rows = _laid(found, theme, width).height
    return 0.3 * theme.font_size + rows + _foot(found, theme, width)


def _notes(found: Found) -> list[str]:
    return [
        message(
            "Line: {}% interval of the difference, drawn from the share among the rows used.",
            level_figures(found.level),
        )
    ]


def _paint(board: Board, found: Found, width: float, height: float) -> Margins:
    theme, em = board.theme, board.theme.font_size
    evidence, laid = found.evidence(MissingEvidence), _laid(found, theme, width)
    difference = evidence.difference
    assert difference is not None
    plot_width = width - laid.left - laid.right
    used, dropped = evidence.share_used, evidence.share_dropped
    ends = [used + (0.0 if end is None else end) for end in (difference.lower, difference.upper)]
    axis = chances_axis((used, dropped, *ends), (), int(plot_width / (4.4 * theme.small)))
    draw_grid(board, laid, axis)
    draw_rows(board, laid)
    title = sentence_case(picture_axes(found.finding, found.subject)[0])
    draw_x_axis(board, axis, title, laid.title_room(width), 0.3 * em)
    board.axes.spines["bottom"].set_visible(False)
    first, second = laid.middles
    board.strokes(
        "used", _from_used(used, first, laid), transform=board.rows(),
        colors=theme.series(1).colour, linewidths=1.8 * theme.hairline,
        linestyles=(0, (3.0, 2.0)), zorder=2,
    )  # fmt: skip
    low, high = (min(max(end, axis.lower), axis.upper) for end in ends)
    board.strokes(
        "difference", [[(low, -second), (high, -second)]], transform=board.rows(),
        colors=theme.series(0).colour, linewidths=theme.line_width, zorder=3,
    )  # fmt: skip
    board.marks("used mark", [(used, -first)], 1, transform=board.rows())
    board.marks("dropped mark", [(dropped, -second)], 0, transform=board.rows())
    bottom = height - 0.3 * em - laid.height
    y = -_foot(found, theme, width) + paragraph_height(_columns(found), theme, width, 0.94)
    draw_paragraph(board, _columns(found), -laid.left, y, width, (0, 0), 0.94)
    return Margins(laid.left, laid.right, bottom, 0.3 * em)


def _from_used(used: float, first: float, laid: LaidRows) -> list[list[tuple[float, float]]]:
    """A line from the mark of the rows used down to the others, where no labels are."""
    ends = [(max(a, first), b) for a, b in laid.spans if b > first]
    return [[(used, -a), (used, -b)] for a, b in ends]


MISSING = Plate("missing", _height, _height, _notes, _paint, has_picture=_has_picture)
