"""Fitted chances against what happened."""

from __future__ import annotations

import math

from plainodds.answers.checks.calibration import CalibrationEvidence
from plainodds.answers.checks.discrimination import DiscriminationEvidence
from plainodds.drawings.checks.along import (
    Axis,
    chances_axis,
    density,
    draw_strip,
    draw_x_axis,
    draw_y_axis,
    plot_room,
    x_axis_height,
    y_axis_width,
)
from plainodds.drawings.checks.board import Board
from plainodds.drawings.checks.ends import EndLabel, above_height, draw_above, draw_ends, ends_width
from plainodds.drawings.checks.observed import band_note, cases_each, draw_observed
from plainodds.drawings.checks.plate import Found, Plate
from plainodds.drawings.checks.tables import draw_table, table_height
from plainodds.drawings.geometry import Margins
from plainodds.drawings.lettering import line_height, wrapped
from plainodds.drawings.odds_rows import is_narrow
from plainodds.drawings.theme import Theme
from plainodds.phrases.checks.headings import picture_axes, picture_legend
from plainodds.phrases.checks.parts import cases_called
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import count, quantity, signed, wording

__all__ = ["CALIBRATION"]

_STRIP = 1.6
_SIDE = 25.0


def _below(found: Found, theme: Theme, width: float, side: float = math.inf) -> float:
    em, (title, _) = theme.font_size, picture_axes(found.finding, found.subject)
    # the plot is square, so that its title has no more room than its side
    room = min(plot_room(width), _SIDE * em, side)
    axis = (1.25 * _STRIP + 0.1) * em + x_axis_height(title, theme, room)
    table = table_height(_optimism(found), theme, width)
    return axis + (table + 0.8 * em if table else 0.0)


def _above(found: Found, theme: Theme, width: float) -> float:
    names = 0.0
    if is_narrow(theme, width):
        names = above_height(_names(found), theme, width) + 0.3 * theme.font_size
    return line_height(theme.small) + names + 0.6 * theme.font_size


def _names(found: Found) -> tuple[str, str]:
    return picture_legend(found.finding, found.subject)


def _beside(found: Found, theme: Theme, width: float) -> float:
    """Room to the right of the plot, at whose ends lines are named unless it is narrow."""
    if is_narrow(theme, width):
        return 1.2 * theme.font_size
    return ends_width(_names(found), theme, width)


def _natural(found: Found, theme: Theme, width: float) -> float:
    beside = _beside(found, theme, width) + 3 * theme.font_size
    side = min(max(width - beside, 12 * theme.font_size), _SIDE * theme.font_size)
    return _above(found, theme, width) + side + _below(found, theme, width)


def _least(found: Found, theme: Theme, width: float) -> float:
    return _above(found, theme, width) + 10 * theme.font_size + _below(found, theme, width)


def _notes(found: Found) -> list[str]:
    evidence = found.evidence(CalibrationEvidence)
    return [
        band_note(found),
        cases_each(evidence.bins, found),
        message("Beneath: how many {cases} have each chance.", cases=cases_called(found.subject)),
    ]


def _optimism(found: Found) -> list[tuple[str, ...]]:
    """The rows of the table that says how much is the fit's own optimism; empty without it."""
    evidence = found.evidence(CalibrationEvidence)
    held, ranks = evidence.optimism, found.also(DiscriminationEvidence)
    if held is None:
        return []
    c = math.nan if ranks is None else ranks.c.estimate
    repeats = count(held.repeats)
    ways = {
        "bootstrap": message("{} bootstrap samples", repeats),
        "cross-validation": message("{} repeats of cross-validation", repeats),
    }
    return [
        (ways[held.way], message("on its own data"), message("corrected")),
        (message("Slope (1 is right)"), _figure(evidence.slope.estimate), _figure(held.slope)),
        (message("Brier score (0 is best)"), _figure(evidence.brier, 3), _figure(held.brier, 3)),
        (message("c (1 is best)"), _figure(c), _figure(held.c)),
    ]


def _figure(number: float, decimals: int = 2) -> str:
    return (
        wording().not_known
        if math.isnan(number)
        else quantity(round(number, 9))
        if number == round(number)
        else signed(number, decimals=decimals).removeprefix("+")
    )


def _paint(board: Board, found: Found, width: float, height: float) -> Margins:
    theme, em = board.theme, board.theme.font_size
    evidence = found.evidence(CalibrationEvidence)
    names = _names(found)
    top = _above(found, theme, width)
    bottom = _below(found, theme, width, height - _below(found, theme, width) - top)
    plot_height = height - bottom - top
    bins = evidence.bins
    axis = chances_axis(
        (*evidence.at, *evidence.smoothed, *(each.observed for each in bins),
         *(each.centre for each in bins)),
        (*evidence.lower, *evidence.upper, *(each.lower for each in bins),
         *(each.upper for each in bins)),
        int(plot_height / (2.8 * theme.small)),
    )  # fmt: skip
    left = y_axis_width(axis, theme)
    plot_width = min(width - left - _beside(found, theme, width), plot_height)
    right = width - left - plot_width
    most = int(plot_width / (4.4 * theme.small))
    across = Axis(axis.lower, axis.upper, *_thinned(axis, most))
    chance, share = picture_axes(found.finding, found.subject)
    draw_y_axis(board, axis)
    draw_x_axis(board, across, chance, plot_width, (1.25 * _STRIP + 0.35) * em)
    board.write(
        wrapped(share, width, theme, theme.small, 1), -left, 0.45 * em, board.at(0, 1),
        down="bottom",
    )  # fmt: skip
    _draw_curves(board, evidence, axis)
    draw_strip(board, "support", _chances(found), across, plot_width, _STRIP * em)
    before = (1 - axis.share(evidence.at[-1])) * plot_width
    labels = [
        EndLabel(names[0], axis.share(evidence.smoothed[-1]), 0, before),
        EndLabel(names[1], 1.0, -1),
    ]
    if is_narrow(theme, width):
        draw_above(board, labels, -left, top, width)
    else:
        draw_ends(board, labels, right, plot_height)
    rows = _optimism(found)
    if rows:
        draw_table(board, rows, -left, -bottom + table_height(rows, theme, width), width, (0, 0))
    return Margins(left, right, bottom, top)


def _thinned(axis: Axis, most: int) -> tuple[tuple[float, ...], tuple[str, ...]]:
    """Ticks of the other axis, no more of them than there is room for."""
    step = max(1, math.ceil(len(axis.ticks) / max(2, most)))
    return axis.ticks[::step], axis.labels[::step]


def _chances(found: Found) -> list[tuple[float, float, float]]:
    """Where cases are along the fitted chance: finely where discrimination was looked at."""
    fine = found.also(DiscriminationEvidence)
    if fine is not None:
        totals = [sum(pair) for pair in zip(fine.events, fine.others, strict=True)]
        edges = fine.edges
        return density(edges[:-1], edges[1:], totals, 0.0)
    bins = found.evidence(CalibrationEvidence).bins
    lows, highs = [each.low for each in bins], [each.high for each in bins]
    return density(lows, highs, [each.cases for each in bins], highs[-1] - lows[0])


def _draw_curves(board: Board, evidence: CalibrationEvidence, axis: Axis) -> None:
    theme = board.theme
    board.line(
        "equality", [axis.lower, axis.upper], [axis.lower, axis.upper], color=theme.rule,
        linewidth=1.6 * theme.hairline, linestyle=(0, (4.0, 2.4)), zorder=2,
    )  # fmt: skip
    draw_observed(
        board, evidence.at, evidence.smoothed, (evidence.lower, evidence.upper), evidence.bins, axis
    )


CALIBRATION = Plate("calibration", _natural, _least, _notes, _paint)
