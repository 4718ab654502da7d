"""What was observed along a number or a chance: a smoothed line, its band, and grouped cases."""

from __future__ import annotations

import math
from collections.abc import Sequence

from plainodds.answers.checks.shape import Bin
from plainodds.drawings.checks.along import Axis
from plainodds.drawings.checks.board import Board
from plainodds.drawings.checks.plate import Found
from plainodds.drawings.theme import Theme
from plainodds.phrases.checks.parts import amount, cases
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import level_figures

__all__ = ["band", "band_note", "cases_each", "dot_areas", "draw_observed"]


def cases_each(bins: Sequence[Bin], found: Found) -> str:
    """How many cases the dots stand for: "Dots: 54 to 60 pipes each."."""
    low, high = min(each.cases for each in bins), max(each.cases for each in bins)
    told = cases(found.subject, high)
    if low > 0.995 * high:
        return message("Dots: {cases} each.", cases=told)
    if high > 1.5 * low:
        return message(
            "Dots: {least} to {cases} each, the more the larger.", least=amount(low), cases=told
        )
    return message("Dots: {least} to {cases} each.", least=amount(low), cases=told)


def band_note(found: Found) -> str:
    """Which intervals the band and the bars are."""
    return message("Band and bars: {}% intervals.", level_figures(found.level))


def band(
    x: Sequence[float], lower: Sequence[float], upper: Sequence[float]
) -> list[list[tuple[float, float]]]:
    """The outline of a band, in one piece; empty where its ends are not known."""
    there = [(a, b) for a, b in zip(x, upper, strict=True) if math.isfinite(b)]
    back = [(a, b) for a, b in zip(x, lower, strict=True) if math.isfinite(b)]
    return [[*there, *reversed(back)]] if len(there) > 1 and len(back) > 1 else []


def dot_areas(bins: Sequence[Bin], theme: Theme) -> list[float]:
    """Areas in square points, in proportion to cases; the least can still be seen."""
    largest = max((each.cases for each in bins), default=1.0) or 1.0
    whole = (1.05 * theme.marker_size) ** 2
    return [whole * max(each.cases / largest, 0.2) for each in bins]


def draw_observed(
    board: Board, at: Sequence[float], smoothed: Sequence[float],
    ends: tuple[Sequence[float], Sequence[float]], bins: Sequence[Bin], up: Axis,
) -> None:  # fmt: skip
    """Draw the data as the first of the theme's series.

    Parameters
    ----------
    board : Board
    at : sequence of float
        Places along the horizontal axis.
    smoothed : sequence of float
        The smoothed share of events at each.
    ends : two sequences of float
        Lower and upper end of its interval at each; nan where there is none.
    bins : sequence of Bin
        Cases in groups, each with its share of events and an interval.
    up : Axis
        The vertical axis, beyond which no interval goes.
    """
    theme = board.theme
    data = theme.series(0)
    board.area(
        "band", band(at, *ends), facecolor=data.colour, alpha=theme.band_opacity, zorder=1.5,
        clip=True,
    )  # fmt: skip
    board.strokes(
        "intervals", _intervals(bins, up), colors=data.colour, linewidths=1.6 * theme.hairline,
        zorder=2.5, alpha=0.7,
    )  # fmt: skip
    board.circles(
        "bins", [(each.centre, each.observed) for each in bins], dot_areas(bins, theme),
        facecolors=theme.paper, edgecolors=data.colour, linewidths=0.7 * theme.line_width,
        zorder=2.6, clip_on=False,
    )  # fmt: skip
    board.line(
        "data", at, smoothed, color=data.colour, linewidth=theme.line_width, zorder=3
    )  # fmt: skip


def _intervals(bins: Sequence[Bin], up: Axis) -> list[list[tuple[float, float]]]:
    """The bins' intervals as upright lines, as far as the axis goes."""
    return [
        [(each.centre, max(each.lower, up.lower)), (each.centre, min(each.upper, up.upper))]
        for each in bins
    ]
