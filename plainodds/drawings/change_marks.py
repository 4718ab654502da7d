"""A chance as marks to count: those with the event at both ends of a change, and those that change.

The marks stand in hundreds, ten by ten. Shape tells as much as shade: a square has the
event at the start and at the end, a triangle that points up has it at the end only, a
hollow one that points down at the start only, and a dot has it at neither.
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from functools import cache

import numpy as np
from matplotlib.axes import Axes
from matplotlib.lines import Line2D
from numpy.typing import NDArray

from plainodds.answers.change import ChangeAnswer
from plainodds.answers.moves import Move
from plainodds.drawings.geometry import corner
from plainodds.drawings.lettering import letter, line_height, text_width, wrapped
from plainodds.drawings.theme import Theme
from plainodds.phrases.labels import cases_label, value_label
from plainodds.phrases.lexicon import message
from plainodds.phrases.moves import settled_moves
from plainodds.phrases.numbers import cases, count, denominator_of_change
from plainodds.phrases.units import tidy

__all__ = ["Counts", "Marks", "counts_of", "legend_of"]

_MOST = 1_000
_SIDE = 10  # marks along a hundred
_GAP = 0.7  # between hundreds, in marks
_ACROSS = 5  # hundreds in a line
_COLUMNS = _SIDE * _ACROSS + _GAP * (_ACROSS - 1)  # of a thousand
_LINES = 2 * _SIDE + _GAP
_BEST, _LEAST = 0.58, 0.36  # room of one mark in a thousand, in letters
_MORE_ROOM = 1.1
"""From so many times the height that marks take at best, they grow."""
_LEGEND = 17.0  # letters, at least
_APART = 2.0  # letters between marks and legend
_LONGEST_END = 18  # characters
_KINDS = ("both", "more", "fewer", "neither")
# marker, share of its room
_SHAPES = {"both": ("s", 0.68), "more": ("^", 0.82), "fewer": ("v", 0.72), "neither": (".", 0.36)}


@dataclass(frozen=True)
class Counts:
    """Whole marks out of `over`; at least one of `more` and `fewer` is 0."""

    over: int
    both: int
    more: int
    fewer: int
    neither: int

    @property
    def start(self) -> int:
        """Marks with the event at the start."""
        return self.both + self.fewer

    @property
    def end(self) -> int:
        """Marks with the event at the end."""
        return self.both + self.more


def counts_of(answer: ChangeAnswer) -> Counts:
    """Both chances in whole marks, out of the 100 or 1,000 that the words speak of.

    Each chance is rounded by itself, as it is in the words; what changes is the
    difference of the two counts.
    """
    chances = (answer.start.estimate, answer.end.estimate)
    over = min(denominator_of_change(*chances), _MOST)
    start, end = (round(each * over) for each in chances)
    return Counts(
        over, min(start, end), max(end - start, 0), max(start - end, 0), over - max(start, end)
    )


def legend_of(answer: ChangeAnswer) -> tuple[str, tuple[tuple[str, int, str], ...]]:
    """The legend's heading, and for each kind of mark its name, its count and its words."""
    counts, outcome = counts_of(answer), answer.subject.outcome
    start, end, after = _ends(answer)
    if counts.more or counts.fewer:
        kind = "more" if counts.more else "fewer"
        now, instead = (cases(each.estimate, counts.over) for each in (answer.end, answer.start))
        words = (
            message("more {}: {} instead of {}", end, now, instead)
            if counts.more
            else message("fewer {}: {} instead of {}", end, now, instead)
        )
        change = (kind, counts.more or counts.fewer, words)
    else:
        over = count(counts.over)
        change = ("more", 0, message("more or fewer: the difference is under 1 in {}", over))
    return (
        message(
            "Of {} {}, {} (rounded):",
            count(counts.over),
            cases_label(outcome),
            tidy(outcome.event),
        ),
        (
            ("both", counts.both, message("{} and {} alike", start, after)),
            change,
            ("neither", counts.neither, message("neither {} nor {}", start, after)),
        ),
    )


def _ends(answer: ChangeAnswer) -> tuple[str, str, str]:
    """Start and end as they follow a count, and the end as it follows the start."""
    moves = settled_moves(answer)
    name, move = moves[0]
    if len(moves) == 1 and isinstance(move, Move):
        facts = answer.subject.predictor(name)
        start, end = (value_label(facts, each) for each in (move.start, move.end))
        # a bare number or a yes says nothing without its predictor
        speaks = facts.kind == "category" or (facts.is_number and tidy(facts.unit) != "")
        if speaks and max(len(start), len(end)) <= _LONGEST_END:
            if facts.is_number:
                here, there = message("at {}", start), message("at {}", end)
            else:
                here, there = message("for {}", start), message("for {}", end)
            return here, there, there
    return message("before the change"), message("after the change"), message("after it")


class Marks:
    """The marks and their legend, in points from the lower left corner of axes."""

    def __init__(self, axes: Axes, theme: Theme) -> None:
        self._theme = theme
        points = corner(axes, 0, 0)
        self.lines = {kind: _line(axes, theme, kind) for kind in _KINDS}
        self.keys = {kind: _line(axes, theme, kind) for kind in _KINDS}
        self.heading = letter(axes, theme, points, size=theme.small, colour=theme.faint, down="top")
        self.counts = [
            letter(axes, theme, points, weight="bold", across="right", down="top") for _ in range(3)
        ]
        self.words = [letter(axes, theme, points, down="top") for _ in range(3)]

    @staticmethod
    def height(answer: ChangeAnswer, theme: Theme, width: float, least: bool = False) -> float:
        """Height in points of marks and legend, at best or at least."""
        beside, best = _arranged(theme, width)
        up = min(best, _LEAST * theme.font_size * _LINES) if least else best
        if beside:
            # a thousand leave the legend least room; a hundred are to be as high
            room = width - up / _LINES * _COLUMNS - _APART * theme.font_size
            return max(up, _Legend(answer, theme, room, _MOST).height)
        return up + 0.6 * theme.font_size + _Legend(answer, theme, width).height

    def place(self, answer: ChangeAnswer, x: float, y: float, width: float, height: float) -> None:
        """Set marks and legend with their upper left corner at points from the axes' corner."""
        theme, em = self._theme, self._theme.font_size
        counts = counts_of(answer)
        beside, up = _arranged(theme, width)
        if height > _MORE_ROOM * self.height(answer, theme, width):
            beside, up = _grown(answer, theme, width, height)
        beneath = _Legend(answer, theme, width)
        up = min(up, height if beside else height - beneath.height - 0.6 * em)
        if beside:
            # smaller marks leave a narrow legend more room
            least = _LEAST * em * _LINES
            while up > least and _beside(answer, theme, width, up).height > height:
                up = max(0.96 * up, least)
        across, cell = _extent(counts.over, up)
        places, first = np.array([x, y]) + cell * _places(counts.over), 0
        for kind in _KINDS:
            own = places[first : first + getattr(counts, kind)]
            first += len(own)
            line = self.lines[kind]
            line.set_data(own[:, 0], own[:, 1])
            line.set(markersize=_size(kind, cell), markeredgewidth=_edge(kind, cell))
        if beside:
            legend = _beside(answer, theme, width, up)
            drop = max(0.0, (up - legend.height) / 2)
            self._write(legend, x + across + _APART * em, y - drop)
        else:
            self._write(beneath, x, y - up - 0.6 * em)

    def _write(self, legend: _Legend, x: float, y: float) -> None:
        theme, em = self._theme, self._theme.font_size
        self.heading.set_text(legend.heading)
        self.heading.set_position((x, y))
        y -= line_height(theme.small, legend.heading.count("\n") + 1) + 0.35 * em
        shown = {kind for kind, _, _ in legend.lines}
        for kind in set(_KINDS) - shown:
            self.keys[kind].set_data([], [])
        for (kind, number, words), counted, text in zip(
            legend.lines, self.counts, self.words, strict=True
        ):
            self.keys[kind].set_data([x + 0.6 * em], [y - 0.55 * em])
            counted.set_text(number)
            counted.set_position((x + 1.5 * em + legend.digits, y))
            text.set_text(words)
            text.set_position((x + legend.indent, y))
            y -= line_height(em, words.count("\n") + 1) + 0.25 * em


class _Legend:
    """The legend broken into a width in points, with room for counts up to `over`."""

    def __init__(
        self, answer: ChangeAnswer, theme: Theme, width: float, over: int | None = None
    ) -> None:
        em, over = theme.font_size, over or counts_of(answer).over
        heading, lines = legend_of(answer)
        self.digits = text_width(count(over), theme, em, "bold")
        self.indent = 1.5 * em + self.digits + 0.5 * em
        self.heading = wrapped(heading, width, theme, theme.small, 3)
        self.lines: Sequence[tuple[str, str, str]] = [
            (kind, count(number), wrapped(words, width - self.indent, theme, em, 3))
            for kind, number, words in lines
        ]
        broken = [words.count("\n") + 1 for _, _, words in self.lines]
        self.height = line_height(theme.small, self.heading.count("\n") + 1) + 0.35 * em
        self.height += line_height(em, sum(broken)) + 0.25 * em * (len(broken) - 1)


def _beside(answer: ChangeAnswer, theme: Theme, width: float, up: float) -> _Legend:
    """The legend in the width that marks of a height in points leave."""
    across, _ = _extent(counts_of(answer).over, up)
    return _Legend(answer, theme, width - across - _APART * theme.font_size)


def _line(axes: Axes, theme: Theme, kind: str) -> Line2D:
    marker, _ = _SHAPES[kind]
    stays, changes = theme.series(0).colour, theme.series(1).colour
    colour = {"both": stays, "neither": theme.rule}.get(kind, changes)
    line = Line2D(
        [], [], linestyle="none", marker=marker, markersize=_size(kind, 1.1 * theme.font_size),
        markerfacecolor="none" if kind == "fewer" else colour, markeredgecolor=colour,
        markeredgewidth=_edge(kind, 1.1 * theme.font_size), transform=corner(axes, 0, 0), zorder=3,
    )  # fmt: skip
    axes.add_artist(line)
    line.set_clip_on(False)
    return line


def _size(kind: str, cell: float) -> float:
    # matplotlib draws "." at half its size
    return _SHAPES[kind][1] * cell * (2.0 if kind == "neither" else 1.0)


def _edge(kind: str, cell: float) -> float:
    return 0.13 * cell if kind == "fewer" else 0.0


def _arranged(theme: Theme, width: float) -> tuple[bool, float]:
    """Whether the legend stands beside the marks, and the marks' height in points at best.

    The same for a hundred as for a thousand, so that nothing jumps when one follows the other.
    """
    em = theme.font_size
    beside = (width - (_LEGEND + _APART) * em) / _COLUMNS
    if beside >= 0.7 * _BEST * em:
        return True, _LINES * min(_BEST * em, beside)
    return False, _LINES * min(_BEST * em, width / _COLUMNS)


def _grown(answer: ChangeAnswer, theme: Theme, width: float, height: float) -> tuple[bool, float]:
    """The same where there is room to spare, as on a slide: whichever makes the marks larger."""
    em = theme.font_size
    # width of marks in their height
    wide = 1.0 if counts_of(answer).over == _SIDE * _SIDE else _COLUMNS / _LINES
    beside = min(height, (width - (_LEGEND + _APART) * em) / wide)
    legend = _Legend(answer, theme, width).height + 0.6 * em
    beneath = min(height - legend, width / wide)
    return beside >= beneath, max(beside, beneath)


def _extent(over: int, up: float) -> tuple[float, float]:
    """Width of so many marks of a height in points, and the room of one mark."""
    if over == _SIDE * _SIDE:
        return up, up / _SIDE
    cell = up / _LINES
    return cell * _COLUMNS, cell


@cache
def _places(over: int) -> NDArray[np.float64]:
    """Centres of the marks, array (over, 2), with the room of a mark as unit and y upwards.

    Hundred by hundred, each in lines from the top.
    """
    hundred, within = np.divmod(np.arange(over), _SIDE * _SIDE)
    row, column = np.divmod(within, _SIDE)
    block_row, block_column = np.divmod(hundred, _ACROSS)
    along = column + block_column * (_SIDE + _GAP) + 0.5
    down = row + block_row * (_SIDE + _GAP) + 0.5
    return np.column_stack([along, -down])
