"""Model against data along a number, as shares and chances."""

from __future__ import annotations

from plainodds.answers.checks.shape import ShapeEvidence
from plainodds.drawings.checks.along import (
    Axis,
    chances_axis,
    density,
    draw_strip,
    draw_x_axis,
    draw_y_axis,
    marked_places,
    numbers_axis,
    plot_room,
    x_axis_height,
    y_axis_width,
)
from plainodds.drawings.checks.board import Board
from plainodds.drawings.checks.ends import EndLabel, draw_ends, ends_width
from plainodds.drawings.checks.observed import band_note, cases_each, draw_observed
from plainodds.drawings.checks.plate import Found, Plate
from plainodds.drawings.geometry import Margins
from plainodds.drawings.lettering import line_height, wrapped
from plainodds.drawings.theme import Theme
from plainodds.phrases.checks.headings import picture_axes
from plainodds.phrases.checks.parts import cases_called
from plainodds.phrases.lexicon import message

__all__ = ["SHAPE"]

_STRIP = 1.6
"""Height of the strip beneath the plot, in letters."""


def _below(found: Found, theme: Theme, width: float) -> float:
    """Room beneath the plot: strip, tick labels and title."""
    title, _ = picture_axes(found.finding, found.subject)
    return (1.25 * _STRIP + 0.1) * theme.font_size + x_axis_height(title, theme, plot_room(width))


def _above(theme: Theme) -> float:
    return line_height(theme.small) + 0.6 * theme.font_size


def _natural(found: Found, theme: Theme, width: float) -> float:
    return max(0.46 * width, 20 * theme.font_size) + _below(found, theme, width)


def _least(found: Found, theme: Theme, width: float) -> float:
    return _above(theme) + 9 * theme.font_size + _below(found, theme, width)


def _notes(found: Found) -> list[str]:
    beneath = message("Beneath: where the {cases} are.", cases=cases_called(found.subject))
    return [
        message("Both lines are smoothed in the same way."),
        band_note(found),
        f"{cases_each(found.evidence(ShapeEvidence).bins, found)} {beneath}",
    ]


def _paint(board: Board, found: Found, width: float, height: float) -> Margins:
    theme, em = board.theme, board.theme.font_size
    evidence = found.evidence(ShapeEvidence)
    names = [message("data"), message("model")]
    bottom, top = _below(found, theme, width), _above(theme)
    right = ends_width(names, theme, width)
    plot_height = height - bottom - top
    up = chances_axis(
        (*evidence.observed, *evidence.expected, *(each.observed for each in evidence.bins)),
        (*evidence.lower, *evidence.upper, *(each.lower for each in evidence.bins),
         *(each.upper for each in evidence.bins)),
        int(plot_height / (2.6 * theme.small)),
    )  # fmt: skip
    left = y_axis_width(up, theme)
    plot_width = width - left - right
    low = min(evidence.at[0], evidence.bins[0].low)
    high = max(evidence.at[-1], evidence.bins[-1].high)
    room = 0.02 * (high - low) or 0.5
    across = numbers_axis(low - room, high + room, int(plot_width / (4.4 * theme.small)))
    if found.subject.predictor(evidence.predictor).kind == "whole number":
        across = across.of_whole_numbers()
    along, share = picture_axes(found.finding, found.subject)
    draw_y_axis(board, up)
    draw_x_axis(board, across, along, plot_width, (1.25 * _STRIP + 0.35) * em)
    board.write(
        wrapped(share, width, theme, theme.small, 1), -left, 0.45 * em, board.at(0, 1),
        down="bottom",
    )  # fmt: skip
    _draw_curves(board, evidence, up)
    bars = density(
        [each.low for each in evidence.bins], [each.high for each in evidence.bins],
        [each.cases for each in evidence.bins], high - low,
    )  # fmt: skip
    draw_strip(board, "support", bars, across, plot_width, _STRIP * em)
    before = (1 - across.share(evidence.at[-1])) * plot_width
    draw_ends(
        board,
        [EndLabel(name, up.share(each[-1]), place, before)
         for place, (name, each) in enumerate(
             zip(names, (evidence.observed, evidence.expected), strict=True))],
        right, plot_height,
    )  # fmt: skip
    return Margins(left, right, bottom, top)


def _draw_curves(board: Board, evidence: ShapeEvidence, up: Axis) -> None:
    theme = board.theme
    model = theme.series(1)
    draw_observed(
        board, evidence.at, evidence.observed, (evidence.lower, evidence.upper), evidence.bins, up
    )
    board.line(
        "model", evidence.at, evidence.expected, color=model.colour, zorder=3.2,
        linewidth=1.15 * theme.line_width, linestyle=(0, model.dash),
    )  # fmt: skip
    places = marked_places(len(evidence.at), 0.5)
    board.marks(
        "model marks", [(evidence.at[place], evidence.expected[place]) for place in places], 1
    )


SHAPE = Plate("shape", _natural, _least, _notes, _paint)
