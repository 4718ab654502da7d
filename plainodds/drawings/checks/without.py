"""Odds ratios with all rows, and without the rows that stand out."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterable, Sequence
from dataclasses import dataclass

from plainodds.answers.checks.influence import InfluenceEvidence, InfluentialPattern, Moved
from plainodds.drawings.checks.board import Board
from plainodds.drawings.checks.plate import Found
from plainodds.drawings.checks.rows import LaidRows, Row, draw_rows, laid_rows
from plainodds.drawings.geometry import Margins
from plainodds.drawings.lettering import line_height, text_width
from plainodds.drawings.theme import Theme
from plainodds.drawings.ticks import fraction_ticks, outer_fractions
from plainodds.model.predictors import Subject
from plainodds.phrases.labels import (
    from_to,
    given_clause,
    predictor_label,
    value_label,
)
from plainodds.phrases.lexicon import lexicon, message
from plainodds.phrases.numbers import ratio, simple_fraction
from plainodds.phrases.units import tidy

__all__ = ["draw_without", "label_of", "moves_shown", "without_height"]

_MOST = 4
_LABELS = 3
_FARTHEST = math.log(1e4)
# of artists, in every language
_NAMES = ("with all rows", "without: one step", "without: fitted anew")
_LOOKS = ((0, False), (1, True), (1, False))  # series, and whether hollow


@dataclass(frozen=True)
class _Axis:
    lower: float
    upper: float

    def share(self, ratio: float) -> float:
        """How far along the axis an odds ratio lies; what is beyond it, at its end."""
        low, high = math.log(self.lower), math.log(self.upper)
        at = math.log(min(max(ratio, self.lower), self.upper))
        return (at - low) / (high - low)


def label_of(pattern: InfluentialPattern) -> str:
    """A pattern's rows in short: "4", or "4, 18, 20, …"."""
    first = [tidy(label) for label in pattern.labels[:_LABELS]]
    return ", ".join([*first, *(["…"] if len(pattern.labels) > _LABELS else [])])


def moves_shown(found: Found) -> list[tuple[InfluentialPattern, Moved]]:
    """Of each pattern that stands out most, the odds ratio that it moves farthest."""
    wanted = found.answer.question.predictor
    shown = []
    for pattern in found.evidence(InfluenceEvidence).standing_out:
        moves = [each for each in pattern.moved if each.odds_ratio > 0]
        own = [each for each in moves if each.predictor == wanted]
        if moves:
            shown.append((pattern, (own or moves)[0]))
    return shown[:_MOST]


def _rows(found: Found) -> list[Row]:
    return [
        Row(_heading(pattern), _change(moved, found.subject),
            f"{ratio(moved.odds_ratio)} → {_after(moved)}")
        for pattern, moved in moves_shown(found)
    ]  # fmt: skip


def _heading(pattern: InfluentialPattern) -> str:
    label = label_of(pattern)
    return message("Row {}", label) if len(pattern.labels) == 1 else message("Rows {}", label)


def _after(moved: Moved) -> str:
    if math.isnan(moved.refitted):
        return message("about {}", ratio(moved.one_step))
    return ratio(moved.refitted)


def _change(moved: Moved, subject: Subject) -> str:
    facts = subject.predictor(moved.predictor)
    if facts.is_number:
        change = f"{predictor_label(facts)} {from_to(facts, moved.start, moved.end)}"
    else:
        start, end = (value_label(facts, each) for each in (moved.start, moved.end))
        change = f"{predictor_label(facts)}: {lexicon().against.format(end, start)}"
    return f"{change}, {given_clause(subject, moved.given)}" if moved.given else change


def _laid(found: Found, theme: Theme, width: float) -> LaidRows:
    return laid_rows(_rows(found), theme, width)


def _told() -> tuple[str, str, str]:
    """What the key calls each series."""
    return (
        message("with all rows"), message("without: one step"), message("without: fitted anew")
    )  # fmt: skip


def _key_places(theme: Theme, width: float) -> list[tuple[int, float]]:
    """Line and place along it of each name of the key."""
    em, line, x = theme.font_size, 0, 0.0
    places = []
    for name in _told():
        needed = 1.2 * em + text_width(name, theme, theme.small)
        if x > 0 and x + needed > width:
            line, x = line + 1, 0.0
        places.append((line, x))
        x += needed + 1.5 * em
    return places


def _head(theme: Theme, width: float) -> float:
    """Height in points of the heading, the key and the gap above them."""
    lines = 2 + _key_places(theme, width)[-1][0]
    return 0.9 * theme.font_size + line_height(theme.small, lines) + 0.4 * theme.font_size


def without_height(found: Found, theme: Theme, width: float) -> float:
    """Height in points of all of it; 0 where no odds ratio is moved."""
    if not moves_shown(found):
        return 0.0
    axis = line_height(theme.small) + 0.4 * theme.font_size
    return _head(theme, width) + _laid(found, theme, width).height + axis


def draw_without(board: Board, found: Found, margins: Margins, width: float, down: float) -> None:
    """Draw the rows beneath a plot.

    Parameters
    ----------
    board : Board
    found : Found
    margins : Margins
        Of the plot above.
    width : float
        Of the slot, in points.
    down : float
        Where it begins, in points from the bottom of that plot; below 0.
    """
    shown = moves_shown(found)
    if not shown:
        return
    theme, em = board.theme, board.theme.font_size
    laid = _laid(found, theme, width)
    points = board.at(0, 0)
    y = down - 0.9 * em
    heading = message("Odds ratio, with these rows and without")
    board.write(heading, -margins.left, y - line_height(theme.small) / 2, points, weight="bold")
    _draw_key(board, -margins.left, y - line_height(theme.small), width)
    top = down - _head(theme, width)
    # the rows have a plot of their own: from its left edge, in points
    first = laid.left - margins.left
    inner = width - laid.left - laid.right
    draw_rows(board, laid, -top, (margins.left, margins.right), up=0.0)
    axis = _axis([each for _, moved in shown for each in
                  (moved.odds_ratio, moved.one_step, moved.refitted)])  # fmt: skip
    ticks = fraction_ticks(
        axis.lower, axis.upper, (axis.upper / axis.lower) ** (3.2 * theme.small / inner)
    )

    def across(value: float) -> float:
        return first + axis.share(value) * inner

    board.strokes(
        "odds ratio grid",
        [[(across(tick), top - a), (across(tick), top - b)] for a, b in laid.spans
         for tick in ticks if tick != 1.0],
        transform=points, colors=theme.grid, linewidths=theme.hairline, zorder=1,
    )  # fmt: skip
    board.strokes(
        "odds ratio 1", [[(across(1.0), top - a), (across(1.0), top - b)] for a, b in laid.spans],
        transform=points, colors=theme.rule, linewidths=1.6 * theme.hairline, zorder=2,
    )  # fmt: skip
    for tick in ticks:
        board.write(
            simple_fraction(tick), across(tick), top - laid.height - 0.25 * em, points,
            across="center", down="top", colour=theme.faint,
        )  # fmt: skip
    lanes = [top - middle for middle in laid.middles]
    _draw_moves(board, [moved for _, moved in shown], axis, lanes, across)


def _axis(values: Iterable[float]) -> _Axis:
    """The range of odds ratios, 1 always within it; what is enormous leaves it."""
    logs = [math.log(each) for each in values if 0 < each < math.inf]
    low, high = (math.exp(min(max(each, -_FARTHEST), _FARTHEST)) for each in (
        min([0.0, *logs]), max([0.0, *logs])))  # fmt: skip
    lower, upper = outer_fractions(low, high)
    room = (upper / lower) ** 0.04
    return _Axis(lower / room, upper * room)


def _draw_key(board: Board, x: float, y: float, width: float) -> None:
    theme, em, points = board.theme, board.theme.font_size, board.at(0, 0)
    step = line_height(theme.small)
    for place, (name, told, (line, along)) in enumerate(
        zip(_NAMES, _told(), _key_places(theme, width), strict=True)
    ):
        middle = y - (line + 0.5) * step
        series, hollow = _LOOKS[place]
        board.marks(
            f"key {name}", [(x + along + 0.4 * em, middle)], series, transform=points, hollow=hollow
        )
        board.write(told, x + along + 1.2 * em, middle, points)


def _draw_moves(
    board: Board, moves: Sequence[Moved], axis: _Axis, lanes: Sequence[float],
    across: Callable[[float], float],
) -> None:  # fmt: skip
    """Draw each odds ratio with all rows, and where it goes without the pattern."""
    theme, points = board.theme, board.at(0, 0)
    series: tuple[list[tuple[float, float]], ...] = ([], [], [])
    beyond: dict[str, list[tuple[float, float]]] = {"<": [], ">": []}
    lines = []
    for moved, y in zip(moves, lanes, strict=True):
        values = (moved.odds_ratio, moved.one_step, moved.refitted)
        known = [each for each in values if not math.isnan(each)]
        lines.append([(across(min(known)), y), (across(max(known)), y)])
        for held, value in zip(series, values, strict=True):
            if axis.lower <= value <= axis.upper:
                held.append((across(value), y))
            elif not math.isnan(value):
                beyond["<" if value < axis.lower else ">"].append((across(value), y))
    board.strokes(
        "moves", lines, transform=points, colors=theme.series(1).colour,
        linewidths=0.8 * theme.line_width, zorder=3,
    )  # fmt: skip
    for name, held, (place, hollow) in zip(_NAMES, series, _LOOKS, strict=True):
        board.marks(name, held, place, transform=points, hollow=hollow)
    for side, held in beyond.items():
        board.marks(f"beyond {side}", held, 1, transform=points, marker=side)
