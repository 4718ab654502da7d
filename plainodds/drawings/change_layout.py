"""How the bridge between two chances is worded and laid out, before anything is drawn."""

from __future__ import annotations

import math
from collections.abc import Callable, Sequence
from dataclasses import dataclass, replace
from functools import partial

from plainodds.answers.change import ChangeAnswer
from plainodds.answers.estimate import Estimate
from plainodds.answers.moves import Move
from plainodds.drawings.lettering import line_height, text_width, wrapped
from plainodds.drawings.theme import Theme
from plainodds.phrases.labels import (
    listed,
    predictor_label,
    predictor_name,
    sentence_case,
    value_label,
)
from plainodds.phrases.lexicon import message
from plainodds.phrases.moves import end_label, settled_moves, start_label
from plainodds.phrases.numbers import (
    bare_points_span,
    denominator,
    frequency,
    frequency_span,
    percentage_points,
    span,
    told_apart,
)

__all__ = [
    "GAP",
    "BridgeLayout",
    "BridgeRow",
    "axis_limits",
    "beyond",
    "bridge_layout",
    "bridge_notes",
    "reached",
]

GAP = 1.1
"""Between texts and plot, in letters."""
_WIDEST_LABELS = 0.36
_NARROW = 37.0  # letters
_LINES = 3


@dataclass(frozen=True)
class BridgeRow:
    """What stands beside a mark: what it is, its figure, and the figure's interval."""

    label: str
    figure: str
    interval: str


@dataclass(frozen=True)
class BridgeLayout:
    """Texts and heights in points; heights are measured downwards from the top of the plot.

    `left` and `right` is room beside the plot; `texts` are heights of the middle of labels
    and figures, `marks` those of the three rows of marks,
    `spans` those between which the plot is free of texts.
    """

    rows: tuple[BridgeRow, ...]
    left: float
    right: float
    stacked: bool
    texts: tuple[float, ...]
    marks: tuple[float, ...]
    spans: tuple[tuple[float, float], ...]
    height: float


def bridge_layout(answer: ChangeAnswer, theme: Theme, width: float) -> BridgeLayout:
    """Lay the rows out: texts beside the plot, or above their marks where it is narrow."""
    em, gap = theme.font_size, GAP * theme.font_size
    rows = _rows(answer)
    stacked = width < _NARROW * em
    room = width if stacked else _WIDEST_LABELS * width
    rows = tuple(
        replace(row, label=each)
        for row, each in zip(rows, _labels(answer, rows, theme, room), strict=True)
    )
    lines = [row.label.count("\n") + 1 for row in rows]
    texts, marks, y = [], [], 0.1 * em
    for count_ in lines:
        if stacked:
            needed = line_height(em, count_ + 1)
            texts.append(y + needed / 2)
            marks.append(y + needed + 0.7 * em)
            y += needed + 1.6 * em
        else:
            needed = max(line_height(em, count_), line_height(em) + line_height(theme.small))
            texts.append(y + needed / 2)
            marks.append(y + needed / 2)
            y += needed + 0.35 * em
    if stacked:
        spans = tuple((mark - 0.75 * em, mark + 0.75 * em) for mark in marks)
        return BridgeLayout(rows, 0.5 * em, 0.5 * em, True, tuple(texts), tuple(marks), spans, y)
    left = max(text_width(row.label, theme, em) for row in rows) + gap
    figures = max(
        max(text_width(r.figure, theme, em, "bold"), text_width(r.interval, theme, theme.small))
        for r in rows
    )
    spans = ((0.0, y),)
    return BridgeLayout(rows, left, figures + gap, False, tuple(texts), tuple(marks), spans, y)


def _labels(
    answer: ChangeAnswer, rows: Sequence[BridgeRow], theme: Theme, room: float
) -> list[str]:
    """Labels broken into a width in points, their values whole even if a long name is not."""
    em = theme.font_size
    labels = [wrapped(row.label, room, theme, em, _LINES) for row in rows]
    moves = settled_moves(answer)
    name, move = moves[0]
    if len(moves) > 1 or not isinstance(move, Move):
        return labels
    facts = answer.subject.predictor(name)
    for place, value in ((0, move.start), (2, move.end)):
        if labels[place].replace("\n", " ") != rows[place].label:
            called = wrapped(predictor_label(facts), room, theme, em, _LINES - 1)
            labels[place] = f"{called}\n{wrapped(value_label(facts, value), room, theme, em, 1)}"
    return labels


def _rows(answer: ChangeAnswer) -> tuple[BridgeRow, ...]:
    subject, moves = answer.subject, settled_moves(answer)
    difference = answer.comparison.risk_difference
    figures, say = _said(answer)
    return (
        BridgeRow(
            sentence_case(start_label(subject, moves)), figures[0], _between(answer.start, say)
        ),
        BridgeRow(
            message("Difference"),
            percentage_points(difference.estimate, sign=True),
            _between(difference, bare_points_span),
        ),
        BridgeRow(sentence_case(end_label(subject, moves)), figures[1], _between(answer.end, say)),
    )


def _said(answer: ChangeAnswer) -> tuple[tuple[str, str], Callable[[float, float], str]]:
    """Both chances in percent, or as frequencies where percents would read the same."""
    start, end = answer.start.estimate, answer.end.estimate
    figures = told_apart(start, end)
    if figures[0] != figures[1] or start == end:
        return figures, span
    over = denominator((start, end))
    return (frequency(start, over), frequency(end, over)), partial(frequency_span, over=over)


def _between(estimate: Estimate, say: Callable[[float, float], str]) -> str:
    if estimate.lower is None or estimate.upper is None or math.isnan(estimate.lower):
        return ""
    return f"({say(estimate.lower, estimate.upper)})"


def axis_limits(answer: ChangeAnswer) -> tuple[float, float]:
    """The part of the axis of chances to show.

    It begins at 0 or ends at 100 %, whichever is nearer to the chances, and holds both
    intervals and the difference's interval as far as that is a chance at all.
    """
    start, end = answer.start, answer.end
    ends = [start.estimate, end.estimate]
    ends += [each for e in (start, end) for each in (e.lower, e.upper) if each is not None]
    ends += [min(max(each, 0.0), 1.0) for each in reached(answer)]
    known = [each for each in ends if 0 <= each <= 1]
    low, high = min(known, default=0.0), max(known, default=1.0)
    if low >= 0.5:
        room = max(1.0 - low, 0.001)
        return 1.0 - 1.08 * room, 1.0 + 0.02 * room
    if high > 0.72:
        return -0.02, 1.02
    room = max(high, 0.001)
    return -0.02 * room, 1.08 * room


def reached(answer: ChangeAnswer) -> list[float]:
    """From where to where the difference's interval reaches from the start; empty without."""
    difference, start = answer.comparison.risk_difference, answer.start.estimate
    if difference.lower is None or difference.upper is None or math.isnan(difference.lower):
        return []
    return [start + difference.lower, start + difference.upper]


def beyond(answer: ChangeAnswer) -> tuple[bool, bool]:
    """Whether start and end lie beyond the data."""
    found = [False, False]
    moves = dict(settled_moves(answer))
    for name in answer.beyond:
        facts, move = answer.subject.predictor(name), moves[name]
        if not isinstance(move, Move):
            found[1] = True
            continue
        for place, held in enumerate((move.start, move.end)):
            if facts.is_number:
                found[place] |= not facts.minimum <= float(held) <= facts.maximum
            else:
                found[place] |= facts.level_counts[facts.levels.index(held)] == 0
    return found[0], found[1]


def bridge_notes(answer: ChangeAnswer) -> list[str]:
    """What a hollow point and a pointed band mean, where there are any."""
    notes = []
    if any(beyond(answer)):
        names = [predictor_name(answer.subject.predictor(name)) for name in answer.beyond]
        notes.append(message("Hollow point: beyond the data ({}).", listed(names)))
    reach = reached(answer)
    if reach and (reach[0] < 0.0 or reach[1] > 1.0):
        notes.append(message("Pointed band: the interval goes on to where there is no chance."))
    return notes
