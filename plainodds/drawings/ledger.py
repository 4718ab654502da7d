"""The ledger: what each predictor adds to the log odds, and where that leaves the chance."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass
from typing import Literal

from matplotlib.axes import Axes
from matplotlib.collections import LineCollection, PolyCollection
from matplotlib.text import Text

from plainodds.answers.profile import LedgerRow, ProfileAnswer
from plainodds.drawings.geometry import corner
from plainodds.drawings.lettering import Weight, letter, line_height, text_width, wrapped
from plainodds.drawings.theme import Theme
from plainodds.phrases.labels import listed, predictor_label, predictor_name, value_label
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import chance, ratio, signed, summing

__all__ = ["Ledger", "LedgerLine", "ledger_lines"]

_DECIMALS = 2


@dataclass(frozen=True)
class LedgerLine:
    """One line as it is written; `bar` is what it adds, nan where there is no bar."""

    name: str
    detail: str
    log_odds: str
    odds: str
    chance: str
    bar: float
    strong: bool


def ledger_lines(answer: ProfileAnswer) -> tuple[LedgerLine, ...]:
    """Word the ledger: where it starts, a line per group of predictors, where it ends.

    As written, the start and what is added sum exactly to the end. Groups that add nothing
    share one line.
    """
    start, point = answer.start, answer.point
    moved = [row for row in answer.ledger if row.adds.estimate != 0.0]
    still = [row for row in answer.ledger if row.adds.estimate == 0.0]
    first = start.linear_predictor.estimate
    parts = [first, *(row.adds.estimate for row in moved)]
    written = summing(parts, point.linear_predictor.estimate, _DECIMALS)
    opening = (
        message("Typical profile")
        if answer.comparison is None
        else message("Profile compared with")
    )
    lines = [
        LedgerLine(
            opening, "", signed(written[0], decimals=_DECIMALS), ratio(start.odds.estimate),
            chance(start.probability.estimate), math.nan, True,
        )
    ]  # fmt: skip
    for row, adds in zip(moved, written[1:], strict=True):
        lines.append(
            LedgerLine(
                *_names(answer, row), signed(adds, decimals=_DECIMALS),
                f"× {ratio(row.multiplies.estimate)}", chance(row.running_probability),
                row.adds.estimate, False,
            )
        )  # fmt: skip
    if still:
        names = [
            predictor_name(answer.subject.predictor(name)) for row in still
            for name in row.predictors
        ]  # fmt: skip
        lines.append(
            LedgerLine(
                message("Unchanged: {}", listed(names)),
                "",
                signed(0.0, decimals=_DECIMALS),
                "× 1",
                "",
                math.nan,
                False,
            )
        )
    lines.append(
        LedgerLine(
            message("This profile"), "", signed(sum(written), decimals=_DECIMALS),
            ratio(point.odds.estimate), chance(point.probability.estimate), math.nan, True,
        )
    )  # fmt: skip
    return tuple(lines)


def _headings() -> tuple[str, str, str]:
    return message("log odds η"), message("odds"), message("chance")


def _names(answer: ProfileAnswer, row: LedgerRow) -> tuple[str, str]:
    now, before = dict(answer.point.values), dict(answer.start.values)
    names, was = [], []
    for name in row.predictors:
        facts = answer.subject.predictor(name)
        names.append(f"{predictor_label(facts)} = {value_label(facts, now[name])}")
        if now[name] != before[name]:
            was.append(value_label(facts, before[name]))
    return ", ".join(names), message("instead of {}", listed(was)) if was else ""


class Ledger:
    """The ledger's texts, rules and bars, in points from the lower left corner of axes.

    The number of lines may change from answer to answer; texts are kept and reused.
    """

    def __init__(self, axes: Axes, theme: Theme) -> None:
        self._axes, self._theme = axes, theme
        self._points = corner(axes, 0, 0)
        series = theme.series(0)
        self.bars = PolyCollection(
            [], facecolor=series.colour, linewidth=0, transform=self._points, zorder=2
        )
        self.rules = LineCollection(
            [], colors=theme.grid, linewidths=theme.hairline, transform=self._points, zorder=1
        )
        self.zero = LineCollection(
            [], colors=theme.rule, linewidths=1.4 * theme.hairline, transform=self._points, zorder=2
        )
        for collection in (self.bars, self.rules, self.zero):
            axes.add_collection(collection, autolim=False)
            collection.set_clip_on(False)
        self.texts: list[Text] = []
        self._used = 0

    @classmethod
    def height(cls, answer: ProfileAnswer, theme: Theme, width: float) -> float:
        """Height in points that the ledger takes."""
        heights = [height for _, height in cls._broken(ledger_lines(answer), theme, width)]
        return line_height(theme.small) + 0.5 * theme.font_size + sum(heights)

    @classmethod
    def _columns(cls, lines: Sequence[LedgerLine], theme: Theme) -> tuple[float, float, float]:
        """Widths of the three columns of figures."""
        em = theme.font_size
        columns = zip(*((line.log_odds, line.odds, line.chance) for line in lines), strict=True)
        first, second, third = (
            max(
                text_width(heading, theme, theme.small),
                *(text_width(text, theme, em, "bold") for text in column),
            )
            for heading, column in zip(_headings(), columns, strict=True)
        )
        return first, second, third

    @classmethod
    def _room(cls, lines: Sequence[LedgerLine], theme: Theme, width: float) -> tuple[float, float]:
        """Widths of the names and of the bars."""
        rest = width - sum(cls._columns(lines, theme)) - 4.0 * 1.2 * theme.font_size
        bars = max(0.0, min(0.2 * width, 0.34 * rest))
        return max(rest - bars, 5.0 * theme.font_size), bars

    @classmethod
    def _broken(
        cls, lines: Sequence[LedgerLine], theme: Theme, width: float
    ) -> list[tuple[tuple[str, str], float]]:
        """Each line's broken name and detail, and its height."""
        em = theme.font_size
        room, _ = cls._room(lines, theme, width)
        broken = []
        for line in lines:
            weight: Weight = "bold" if line.strong else "normal"
            name = wrapped(line.name, room, theme, em, 3, weight)
            detail = wrapped(line.detail, room, theme, theme.small, 1) if line.detail else ""
            height = line_height(em, name.count("\n") + 1) + 0.45 * em
            height += line_height(theme.small) if detail else 0.0
            broken.append(((name, detail), height))
        return broken

    def place(self, answer: ProfileAnswer, x: float, y: float, width: float) -> None:
        """Set the ledger with its upper left corner at points from the axes' lower left one."""
        theme, em, small = self._theme, self._theme.font_size, self._theme.small
        lines = ledger_lines(answer)
        room, bars = self._room(lines, theme, width)
        gap = 1.2 * em
        ends = []  # right edges of the three columns
        edge = x + room + gap + bars
        for column in self._columns(lines, theme):
            edge += gap + column
            ends.append(edge)
        self._used = 0
        for heading, end in zip(_headings(), ends, strict=True):
            self._write(heading, end, y, small, theme.faint, across="right")
        top = y - line_height(small) - 0.5 * em
        rules, polygons = [[(x, top), (x + width, top)]], []
        largest = max((abs(line.bar) for line in lines if not math.isnan(line.bar)), default=1.0)
        low = min([0.0, *(line.bar for line in lines if not math.isnan(line.bar))])
        high = max([0.0, *(line.bar for line in lines if not math.isnan(line.bar))])
        span = (high - low) or largest or 1.0
        zero = x + room + gap + bars * (-low / span)
        first_bar, last_bar = top, top
        for line, ((name, detail), height) in zip(
            lines, self._broken(lines, theme, width), strict=True
        ):
            weight: Weight = "bold" if line.strong else "normal"
            text_top = top - 0.22 * em
            colour = theme.ink if line.strong or line.detail or line.chance else theme.faint
            self._write(name, x, text_top, em, colour, weight)
            if detail:
                under = text_top - line_height(em, name.count("\n") + 1)
                self._write(detail, x, under, small, theme.faint)
            for words, end in zip((line.log_odds, line.odds, line.chance), ends, strict=True):
                self._write(words, end, text_top, em, colour, weight, across="right")
            if not math.isnan(line.bar):
                middle = text_top - 0.62 * em
                tip = zero + bars * line.bar / span
                polygons.append(
                    [(zero, middle - 0.38 * em), (tip, middle - 0.38 * em),
                     (tip, middle + 0.38 * em), (zero, middle + 0.38 * em)]
                )  # fmt: skip
                first_bar = top if len(polygons) == 1 else first_bar
                last_bar = top - height
            top -= height
            rules.append([(x, top), (x + width, top)])
        self.rules.set_segments(rules[:-1])
        self.bars.set_verts(polygons)
        self.zero.set_segments([[(zero, first_bar), (zero, last_bar)]] if polygons else [])
        for text in self.texts[self._used :]:
            text.set_text("")

    def _write(
        self, words: str, x: float, y: float, size: float, colour: str,
        weight: Weight = "normal", across: Literal["left", "right"] = "left",
    ) -> None:  # fmt: skip
        if self._used == len(self.texts):
            self.texts.append(letter(self._axes, self._theme, self._points, down="top"))
        text = self.texts[self._used]
        text.set(text=words, position=(x, y), fontsize=size, color=colour, fontweight=weight)
        text.set_horizontalalignment(across)
        self._used += 1
