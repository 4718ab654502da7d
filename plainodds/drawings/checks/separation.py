"""Who tells the outcome without exception, and coefficients without an end."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import replace

from matplotlib.transforms import blended_transform_factory

from plainodds.answers.checks.amount import LevelCount
from plainodds.answers.checks.finding import Finding
from plainodds.answers.checks.separation import SeparationEvidence
from plainodds.drawings.checks.along import x_axis_height
from plainodds.drawings.checks.board import Board
from plainodds.drawings.checks.counts import (
    MOST_LEVELS,
    draw_counts,
    head_height,
    laid_counts,
)
from plainodds.drawings.checks.plate import Found, Plate
from plainodds.drawings.checks.rows import LaidRows, Row, draw_rows, laid_rows
from plainodds.drawings.checks.tables import draw_paragraph, paragraph_height
from plainodds.drawings.geometry import Margins
from plainodds.drawings.lettering import line_height, wrapped
from plainodds.drawings.theme import Theme
from plainodds.phrases.checks.finding_words import finding_words
from plainodds.phrases.checks.headings import picture_axes, picture_legend
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import count
from plainodds.phrases.units import tidy

__all__ = ["SEPARATION"]

_MOST = 8
_GAP = 0.9
_LEVELS = Finding("levels", "nothing found")


def _has_picture(found: Found) -> bool:
    evidence = found.evidence(SeparationEvidence)
    return evidence.kind != "none" and bool(evidence.unbounded)


def _words(found: Found) -> str:
    return finding_words(found.finding, found.subject, found.level).what


def _counts(found: Found) -> tuple[LevelCount, ...]:
    """The levels of predictors with a level to blame; those to blame are never left out."""
    evidence = found.evidence(SeparationEvidence)
    blamed = set(evidence.levels)
    names = dict.fromkeys(name for name, _ in evidence.levels)
    held = [
        LevelCount(facts.name, level, cases, events)
        for facts in map(found.subject.predictor, names)
        for level, cases, events in zip(
            facts.levels, facts.level_cases, facts.level_events, strict=False
        )
        if cases > 0
    ]
    if any(math.isnan(each.events) for each in held):
        # withheld before the answer leaves: there is nothing to draw
        return ()
    wanted = sorted(held, key=lambda each: (each.predictor, each.level) not in blamed)
    kept = wanted[:MOST_LEVELS]
    return tuple(each for each in held if each in kept)


def _open(found: Found) -> tuple[tuple[str, float], ...]:
    pairs = found.evidence(SeparationEvidence).unbounded[:_MOST]
    return tuple((name, float(side)) for name, side in pairs)


def _laid_out(found: Found, theme: Theme, width: float) -> tuple[LaidRows | None, LaidRows]:
    """The rows of levels, if there are any, and those of coefficients, one above the other."""
    counts = _counts(found)
    rows = [Row("", tidy(name), _side(side)) for name, side in _open(found)]
    held = laid_rows(rows, theme, width)
    if not counts:
        return None, held
    laid = laid_counts(counts, found.subject, theme, width)
    left, right = max(laid.left, held.left), max(laid.right, held.right)
    return replace(laid, left=left, right=right), replace(held, left=left, right=right)


def _side(limit: float) -> str:
    if math.isnan(limit):
        return message("open either way")
    return message("no upper end") if limit > 0 else message("no lower end")


def _legend(found: Found) -> tuple[str, str]:
    return picture_legend(_LEVELS, found.subject)


def _heights(found: Found, theme: Theme, width: float) -> tuple[float, float, float]:
    """Of the words, the counts with their axis, and the coefficients."""
    em = theme.font_size
    laid, held = _laid_out(found, theme, width)
    words = paragraph_height(_words(found), theme, width) + _GAP * em
    rows = 0.0
    if laid is not None:
        title, _ = picture_axes(_LEVELS, found.subject)
        rows = head_height(_legend(found), theme, width) + laid.height + _GAP * em
        rows += x_axis_height(title, theme, laid.title_room(width))
    return words, rows, _open_head(theme) + held.height + line_height(theme.small)


def _open_head(theme: Theme) -> float:
    return line_height(theme.small) + 0.5 * theme.font_size


def _height(found: Found, theme: Theme, width: float) -> float:
    return sum(_heights(found, theme, width))


def _notes(found: Found) -> list[str]:
    left = len(found.evidence(SeparationEvidence).unbounded) - _MOST
    notes = [message("Not shown: {} more coefficients.", count(left))] if left > 0 else []
    arrow = message("An arrow has no end: any value farther off fits the data better still.")
    return [*notes, arrow]


def _paint(board: Board, found: Found, width: float, height: float) -> Margins:
    theme = board.theme
    laid, held = _laid_out(found, theme, width)
    words, rows, _ = _heights(found, theme, width)
    if laid is None:
        top, plot = words + _open_head(theme), held.height
        _draw_open(board, found, held, 0.0, width)
    else:
        legend, (title, _) = _legend(found), picture_axes(_LEVELS, found.subject)
        head = head_height(legend, theme, width)
        top, plot = words + head, laid.height
        draw_counts(board, _counts(found), laid, legend, title, width)
        _draw_open(board, found, held, rows - head + _open_head(theme), width)
    draw_paragraph(board, _words(found), -held.left, top, width, (0, 1))
    return Margins(held.left, held.right, height - top - plot, top)


def _draw_open(board: Board, found: Found, laid: LaidRows, down: float, width: float) -> None:
    """Draw coefficients as lines from 0 that end in an arrow, so many points down the plot."""
    theme, em = board.theme, board.theme.font_size
    across = blended_transform_factory(board.axes.transAxes, board.at(0, 1))
    heading = message("Coefficients without a finite estimate")
    board.write(
        wrapped(heading, width, theme, theme.small, 1), -laid.left, -down + 0.25 * em,
        board.at(0, 1), down="bottom", colour=theme.faint,
    )  # fmt: skip
    draw_rows(board, laid, down)
    lines: list[Sequence[tuple[float, float]]] = []
    arrows: dict[str, list[tuple[float, float]]] = {"<": [], ">": []}
    for (_, side), middle in zip(_open(found), laid.middles, strict=True):
        y = -down - middle
        if not side < 0:
            lines.append([(0.5, y), (0.985, y)])
            arrows[">"].append((0.985, y))
        if not side > 0:
            lines.append([(0.5, y), (0.015, y)])
            arrows["<"].append((0.015, y))
    board.strokes(
        "open", lines, transform=across, colors=theme.series(0).colour,
        linewidths=theme.line_width, zorder=3,
    )  # fmt: skip
    for marker, name in (("<", "no lower end"), (">", "no upper end")):
        board.marks(name, arrows[marker], 0, transform=across, marker=marker, scale=1.15)
    board.strokes(
        "nought", [[(0.5, -down - a), (0.5, -down - b)] for a, b in laid.spans],
        transform=across, colors=theme.rule, linewidths=1.6 * theme.hairline, zorder=2,
    )  # fmt: skip
    board.write(
        "0", 0.5, -down - laid.height - 0.2 * em, across, across="center", down="top",
        colour=theme.faint,
    )  # fmt: skip


def _variant(found: Found) -> str:
    return "with levels" if _counts(found) else "without levels"


SEPARATION = Plate(
    "separation", _height, _height, _notes, _paint, has_picture=_has_picture, variant=_variant
)
