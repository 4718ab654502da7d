"""A curve drawn: lines with bands along a number, and the data's support beneath."""

from __future__ import annotations

from collections.abc import Hashable
from typing import Any

import numpy as np
from matplotlib.axes import Axes
from matplotlib.collections import PolyCollection
from matplotlib.lines import Line2D
from matplotlib.patches import StepPatch
from matplotlib.transforms import blended_transform_factory

from plainodds.answers.curve import CurveAnswer, CurveLine, Scale, Support
from plainodds.drawings.curve_frame import CurveFrame, Rows
from plainodds.drawings.curve_scale import shown
from plainodds.drawings.furniture import marker_line
from plainodds.drawings.geometry import corner
from plainodds.drawings.lettering import line_height, tick_style
from plainodds.drawings.theme import Theme
from plainodds.drawings.ticks import label_ticks, round_ticks
from plainodds.phrases.labels import cases_label, scale_title
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import guarded_count, quantity

__all__ = ["CurveDrawing", "LineArtists", "curve_notes"]

_MARKS_ON_A_LINE = 4


class CurveDrawing:
    """Lines along a number.

    A line is solid where the data support it and broken, in its own dash, where they
    don't; several lines carry markers and their labels stand at their right ends.

    Parameters
    ----------
    axes : Axes
        In the predictor's units across; up in chances, percentage points per unit,
        odds (logarithmic) or log odds.
    answer : CurveAnswer
        Along a number.
    theme : Theme
    """

    def __init__(self, axes: Axes, answer: CurveAnswer, theme: Theme) -> None:
        self.axes, self._theme = axes, theme
        self._answer = answer
        self.frame = CurveFrame(axes, answer, theme, lambda: self.update(self._answer))
        self.lines = [
            LineArtists(axes, theme, place, len(answer.lines)) for place in range(len(answer.lines))
        ]
        axes.tick_params(axis="x", labelbottom=True)
        self.update(answer)

    @staticmethod
    def title(answer: CurveAnswer) -> str:
        """What the vertical axis shows."""
        return scale_title(answer)

    @staticmethod
    def structure(answer: CurveAnswer) -> Hashable:
        """Number of lines, kind of scale, and whether the lines are named."""
        return (
            len(answer.lines),
            answer.question.scale == "odds",
            answer.question.by is None,
        )

    @staticmethod
    def natural_height(answer: CurveAnswer, theme: Theme, width: float) -> float:
        """Height in points at which the answer looks best."""
        rows = _rows(answer, theme)
        return max(
            max(0.5 * width, 21 * theme.font_size) + rows.depth,
            CurveDrawing.least_height(answer, theme, width),
        )

    @staticmethod
    def least_height(answer: CurveAnswer, theme: Theme, width: float) -> float:
        """Height in points below which the plot itself would vanish."""
        return CurveFrame.least_height(
            answer, _rows(answer, theme), curve_notes(answer), theme, width
        )

    @staticmethod
    def notes(answer: CurveAnswer) -> list[str]:
        """What the small print says."""
        return curve_notes(answer)

    def update(self, answer: CurveAnswer) -> None:
        """Show another answer of the same structure."""
        self._answer = answer
        theme, em = self._theme, self._theme.font_size
        rows = _rows(answer, theme)
        vertical = self.frame.place(
            answer, rows, self.notes(answer), tick_lines=line_height(theme.small), rows_from=0.0
        )
        plot, _ = self.frame.room.plot_size()
        lower, upper = _horizontal(answer)
        ticks = round_ticks(lower, upper, max(2, int(plot / (4.2 * theme.small))))
        label_ticks(self.axes, "x", ticks, [quantity(tick) for tick in ticks], tick_style(theme))
        self.axes.tick_params(axis="x", pad=rows.depth + 0.35 * em)
        self.axes.set_xlim(lower, upper)
        for place, (line, support) in enumerate(zip(answer.lines, answer.support, strict=True)):
            artists = self.lines[place]
            artists.update(line, answer.question.scale)
            base = -(place + 1) * rows.step
            edges = np.clip(np.asarray(support.edges, dtype=float), lower, upper)
            heights = _bar_heights(support, rows.height)
            artists.support.set_data(base + heights, edges, base)
        ends = [
            vertical.share(_end(line, answer.question.scale), self.frame.logarithmic)
            for line in answer.lines
        ]
        self.frame.place_labels(answer, ends, leaders=True)


class LineArtists:
    """The artists of one line."""

    def __init__(self, axes: Axes, theme: Theme, place: int, count: int) -> None:
        series = theme.series(place)
        opacity = theme.band_opacity * (1.0 if count <= 3 else 0.6)
        # the whole band is pale, and painted over once more where the data support it
        self.band = PolyCollection([], facecolor=series.colour, alpha=0.5 * opacity)
        self.supported_band = PolyCollection([], facecolor=series.colour, alpha=0.6 * opacity)
        for band in (self.band, self.supported_band):
            band.set(linewidth=0, zorder=1.5)
            axes.add_collection(band, autolim=False)
        self.edges = Line2D(
            [], [], color=series.colour, linewidth=0.8 * theme.hairline, linestyle="-",
            alpha=0.55, zorder=1.6,
        )  # fmt: skip
        axes.add_line(self.edges)
        style: dict[str, Any] = {"color": series.colour, "linewidth": theme.line_width, "zorder": 3}
        self.supported = Line2D([], [], linestyle="-", solid_capstyle="round", **style)
        self.unsupported = Line2D([], [], dashes=series.dash, dash_capstyle="butt", **style)
        self.marks = marker_line(theme, series)
        for line in (self.supported, self.unsupported, self.marks):
            axes.add_line(line)
        self.marks.set_clip_on(False)
        self._offset = (place + 0.5) / count
        self._marked = count > 1
        self.support = StepPatch(
            [0.0], [0.0, 1.0], baseline=0.0, fill=True, facecolor=series.colour,
            edgecolor="none", linewidth=0, alpha=0.75,
            transform=blended_transform_factory(axes.transData, corner(axes, 0, 0)),
        )  # fmt: skip
        axes.add_artist(self.support)
        self.support.set_clip_on(False)

    def update(self, line: CurveLine, scale: Scale) -> None:
        """Set the line, its band and its marks."""
        x = np.asarray(line.at, dtype=float)
        y = shown(scale, line.estimate)
        held = np.asarray(line.supported, dtype=bool)
        self.supported.set_data(x, np.where(held, y, np.nan))
        self.unsupported.set_data(x, np.where(_open(held), y, np.nan))
        places = _marked_places(len(x), self._offset) if self._marked or len(x) < 3 else []
        self.marks.set_data(x[places], y[places])
        if line.lower is None or line.upper is None:
            self.band.set_verts([])
            self.supported_band.set_verts([])
            self.edges.set_data([], [])
            return
        low, high = shown(scale, line.lower), shown(scale, line.upper)
        self.band.set_verts(_polygons(x, low, high, np.ones_like(held)))
        self.supported_band.set_verts(_polygons(x, low, high, held))
        gap = [np.nan]
        self.edges.set_data(
            np.concatenate([x, gap, x]),
            np.concatenate([np.where(held, low, np.nan), gap, np.where(held, high, np.nan)]),
        )


def _open(held: np.ndarray) -> np.ndarray:
    """Points that are unsupported or stand next to one that is."""
    loose = ~held
    near = loose.copy()
    near[1:] |= loose[:-1]
    near[:-1] |= loose[1:]
    return near


def _polygons(
    x: np.ndarray, low: np.ndarray, high: np.ndarray, held: np.ndarray
) -> list[np.ndarray]:
    """Outlines of the band over each run of held points."""
    good = held & np.isfinite(low) & np.isfinite(high)
    breaks = np.flatnonzero(np.diff(good.astype(int))) + 1
    polygons = []
    for run in np.split(np.arange(len(x)), breaks):
        if good[run[0]] and len(run) > 1:
            there = np.column_stack([x[run], high[run]])
            back = np.column_stack([x[run], low[run]])[::-1]
            polygons.append(np.vstack([there, back]))
    return polygons


def _marked_places(points: int, offset: float) -> list[int]:
    """Where a line carries markers: all of a few points, else a few, no two lines alike."""
    if points <= 2 * _MARKS_ON_A_LINE:
        return list(range(points))
    steps = (np.arange(_MARKS_ON_A_LINE) + offset) / _MARKS_ON_A_LINE
    return [int(each) for each in np.unique(np.round(steps * (points - 1)))]


def _bar_heights(support: Support, height: float) -> np.ndarray:
    """Heights in points: each line by itself; a bin with any rows at all can be seen."""
    # bins that were merged are wider than the others
    density = np.asarray(support.counts, dtype=float) / np.diff(support.edges)
    share = density / (density.max() or 1.0)
    return height * np.where(share > 0, np.maximum(share, 0.1), 0.0)


def _horizontal(answer: CurveAnswer) -> tuple[float, float]:
    ends = [float(each) for line in answer.lines for each in (line.at[0], line.at[-1])]
    lower, upper = min(ends), max(ends)
    room = 0.012 * (upper - lower) or 0.5
    return lower - room, upper + room


def _end(line: CurveLine, scale: Scale) -> float:
    y = shown(scale, line.estimate)
    finite = y[np.isfinite(y)]
    return float(finite[-1]) if finite.size else float("nan")


def _rows(answer: CurveAnswer, theme: Theme) -> Rows:
    step = (1.45 if len(answer.lines) <= 3 else 1.05) * theme.font_size
    cases = cases_label(answer.subject.outcome)
    smallest = answer.subject.smallest_cell
    totals = [sum(each.counts) for each in answer.support]
    captions = tuple(f"{guarded_count(total, smallest)} {cases}" for total in totals)
    return Rows(captions, 0.8 * step, step)


def curve_notes(answer: CurveAnswer) -> list[str]:
    """Say what bands, broken lines and the rows beneath mean."""
    cases = cases_label(answer.subject.outcome)
    notes = [CurveFrame.interval_note(answer, message("Band"))]
    if not all(all(line.supported) for line in answer.lines):
        notes.append(message("Broken line: few {} or none there.", cases))
    notes.append(message("Beneath: where the {} are.", cases))
    return notes
