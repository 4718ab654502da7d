"""The chance at each level drawn: points with intervals, and the rows of each level beneath."""

from __future__ import annotations

from collections.abc import Callable, Hashable, Sequence
from typing import Any

import numpy as np
from matplotlib.axes import Axes
from matplotlib.collections import LineCollection
from matplotlib.transforms import blended_transform_factory

from plainodds.answers.curve import CurveAnswer, CurveLine, Scale
from plainodds.drawings.curve_frame import CurveFrame, Rows
from plainodds.drawings.curve_scale import shown
from plainodds.drawings.furniture import marker_line
from plainodds.drawings.geometry import corner, shifted, slot_size
from plainodds.drawings.lettering import letter, line_height, text_width, tick_style, wrapped
from plainodds.drawings.theme import Theme
from plainodds.drawings.ticks import label_ticks
from plainodds.phrases.labels import cases_label, scale_title, value_label
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import chance, count_mark, percentage_points, ratio, signed

__all__ = ["LevelPoints", "LevelsDrawing", "level_labels", "levels_notes"]

_LEVEL_LINES = 3
_SAY: dict[Scale, Callable[[float], str]] = {
    "probability": chance,
    "slope": percentage_points,
    "odds": ratio,
    "linear_predictor": signed,
}


class LevelsDrawing:
    """Points at each level of a category or a yes/no.

    A point is filled where the data support it, and hollow with a broken interval where
    they don't.

    Parameters
    ----------
    axes : Axes
        Levels stand at 0, 1, 2 … across, several lines side by side around them.
    answer : CurveAnswer
        Along a category or a yes/no.
    theme : Theme
    """

    def __init__(self, axes: Axes, answer: CurveAnswer, theme: Theme) -> None:
        self.axes, self._theme = axes, theme
        self._answer = answer
        self.frame = CurveFrame(axes, answer, theme, lambda: self.update(self._answer))
        levels, lines = len(answer.lines[0].at), len(answer.lines)
        self.lines = [LevelPoints(axes, theme, place, lines) for place in range(lines)]
        beneath = blended_transform_factory(axes.transData, corner(axes, 0, 0))
        self.counts = [
            [
                letter(axes, theme, beneath, size=theme.small, colour=theme.faint, across="center")
                for _ in range(levels)
            ]
            for _ in range(lines)
        ]
        beside = shifted(axes, 0.8 * theme.font_size)
        self.figures = [letter(axes, theme, beside) for _ in range(levels if lines == 1 else 0)]
        axes.tick_params(axis="x", labelbottom=True)
        self.update(answer)

    @staticmethod
    def title(answer: CurveAnswer) -> str:
        """What the vertical axis shows."""
        return scale_title(answer)

    @staticmethod
    def structure(answer: CurveAnswer) -> Hashable:
        """Number of lines and levels, kind of scale, and whether the lines are named."""
        return (
            len(answer.lines),
            len(answer.lines[0].at),
            answer.question.scale == "odds",
            answer.question.by is None,
        )

    @staticmethod
    def natural_height(answer: CurveAnswer, theme: Theme, width: float) -> float:
        """Height in points at which the answer looks best."""
        plot = max(0.5 * width, 21 * theme.font_size) + _rows(answer, theme).depth
        turned = _label_depth(answer, theme, width) - 3 * theme.font_size
        return max(plot + max(0.0, turned), LevelsDrawing.least_height(answer, theme, width))

    @staticmethod
    def least_height(answer: CurveAnswer, theme: Theme, width: float) -> float:
        """Height in points below which the plot itself would vanish."""
        least = CurveFrame.least_height(
            answer, _rows(answer, theme), levels_notes(answer), theme, width
        )
        return least + _label_depth(answer, theme, width) - line_height(theme.small)

    @staticmethod
    def notes(answer: CurveAnswer) -> list[str]:
        """What the small print says."""
        return levels_notes(answer)

    def update(self, answer: CurveAnswer) -> None:
        """Show another answer of the same structure."""
        self._answer = answer
        theme, em, small = self._theme, self._theme.font_size, self._theme.small
        facts = answer.subject.predictor(answer.question.predictor)
        at = answer.lines[0].at
        rows = _rows(answer, theme)
        room = _level_room(answer, theme, slot_size(self.axes)[0])
        labels, size, rotation, depth = level_labels(_names(answer), room, theme)
        beneath = depth + 0.4 * em
        vertical = self.frame.place(answer, rows, self.notes(answer), depth, beneath)
        style = tick_style(theme, size) | {"color": theme.ink, "rotation": rotation}
        label_ticks(self.axes, "x", range(len(at)), labels, style)
        self.axes.tick_params(axis="x", pad=0.35 * em)
        self.axes.set_xlim(-0.55, len(at) - 0.45)
        for artists, line in zip(self.lines, answer.lines, strict=True):
            artists.update(line, answer.question.scale)
        for place, (texts, support) in enumerate(zip(self.counts, answer.support, strict=True)):
            by_level = dict(zip(facts.levels, support.counts, strict=False))
            for x, (text, level) in enumerate(zip(texts, at, strict=True)):
                text.set_text(count_mark(by_level.get(level, 0), answer.subject.smallest_cell))
                text.set_position((x, -beneath - (place + 0.6) * rows.step))
                needed = text_width(text.get_text(), theme, small)
                text.set_fontsize(min(small, 0.95 * rows.step, small * room / needed))
        logarithmic = self.frame.logarithmic
        scale = answer.question.scale
        ends = [
            vertical.share(float(shown(scale, line.estimate)[-1]), logarithmic)
            for line in answer.lines
        ]
        self.frame.place_labels(answer, ends, leaders=False)
        self._place_figures(answer)

    def _place_figures(self, answer: CurveAnswer) -> None:
        """Write each estimate beside its point, where one line leaves room for that."""
        say = _SAY[answer.question.scale]
        for x, (text, estimate) in enumerate(
            zip(self.figures, answer.lines[0].estimate, strict=False)
        ):
            text.set_text(say(estimate))
            text.set_position((x, estimate))


class LevelPoints:
    """The artists of one line's points."""

    def __init__(self, axes: Axes, theme: Theme, place: int, count: int) -> None:
        series = theme.series(place)
        style: dict[str, Any] = {
            "colors": series.colour,
            "linewidths": theme.line_width,
            "zorder": 3,
        }
        self.intervals = LineCollection([], linestyles="-", **style)
        self.loose_intervals = LineCollection([], linestyles=[(0, series.dash)], **style)
        for collection in (self.intervals, self.loose_intervals):
            axes.add_collection(collection, autolim=False)
        self.points = marker_line(theme, series)
        self.loose_points = marker_line(theme, series)
        self.loose_points.set(
            markerfacecolor=theme.paper, markeredgecolor=series.colour,
            markeredgewidth=0.75 * theme.line_width,
        )  # fmt: skip
        for line in (self.points, self.loose_points):
            axes.add_line(line)
            line.set(clip_on=False, markersize=0.85 * line.get_markersize())
        between = min(0.17, 0.66 / count)
        self.offset = (place - (count - 1) / 2) * between

    def update(self, line: CurveLine, scale: Scale) -> None:
        """Set points and intervals."""
        x = np.arange(len(line.at)) + self.offset
        y = shown(scale, line.estimate)
        held = np.asarray(line.supported, dtype=bool)
        self.points.set_data(x[held], y[held])
        self.loose_points.set_data(x[~held], y[~held])
        segments = np.empty((0, 2, 2))
        if line.lower is not None and line.upper is not None:
            low, high = shown(scale, line.lower), shown(scale, line.upper)
            segments = np.stack([np.column_stack([x, low]), np.column_stack([x, high])], axis=1)
        some = len(segments) > 0
        self.intervals.set_segments(list(segments[held]) if some else [])
        self.loose_intervals.set_segments(list(segments[~held]) if some else [])


def _names(answer: CurveAnswer) -> list[str]:
    facts = answer.subject.predictor(answer.question.predictor)
    return [value_label(facts, level) for level in answer.lines[0].at]


def _level_room(answer: CurveAnswer, theme: Theme, width: float) -> float:
    """Width in points of one level."""
    beside = CurveFrame.label_width(answer, _rows(answer, theme), theme, width)
    return 0.92 * (width - beside - 3.5 * theme.small) / len(answer.lines[0].at)


def _label_depth(answer: CurveAnswer, theme: Theme, width: float) -> float:
    return level_labels(_names(answer), _level_room(answer, theme, width), theme)[3]


def level_labels(
    names: Sequence[str], room: float, theme: Theme
) -> tuple[list[str], float, float, float]:
    """Labels that fit a level's width in points: their lines, size, rotation and depth."""
    for size in (theme.font_size, theme.small):
        labels = [wrapped(name, room, theme, size, _LEVEL_LINES) for name in names]
        if all(label.replace("\n", " ") == name for label, name in zip(labels, names, strict=True)):
            break
    else:
        turned = [wrapped(name, 11.0 * size, theme, size, 1) for name in names]
        longest = max(text_width(label, theme, size) for label in turned)
        if room >= line_height(size) and room < 6.0 * size:
            return turned, size, 90.0, longest + 0.4 * size
    return labels, size, 0.0, line_height(size, max(each.count("\n") for each in labels) + 1)


def _rows(answer: CurveAnswer, theme: Theme) -> Rows:
    step = (1.35 if len(answer.lines) <= 3 else 1.1) * theme.font_size
    return Rows(tuple(cases_label(answer.subject.outcome) for _ in answer.support), step, step)


def levels_notes(answer: CurveAnswer) -> list[str]:
    """Say what lines through points and hollow points mean."""
    cases = cases_label(answer.subject.outcome)
    notes = [CurveFrame.interval_note(answer, message("Line through a point"))]
    if not all(all(line.supported) for line in answer.lines):
        notes.append(message("Hollow point: few {} or none there.", cases))
    return notes
