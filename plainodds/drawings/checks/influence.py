"""Covariate patterns by their chance and by how badly they are fitted; odds ratios without them."""

from __future__ import annotations

import math

from plainodds.answers.checks.influence import InfluenceEvidence, InfluentialPattern
from plainodds.drawings.checks.along import (
    Axis,
    chances_axis,
    draw_x_axis,
    draw_y_axis,
    numbers_axis,
    plot_room,
    x_axis_height,
    y_axis_width,
)
from plainodds.drawings.checks.board import Board
from plainodds.drawings.checks.plate import Found, Plate
from plainodds.drawings.checks.tags import Tag, draw_tags
from plainodds.drawings.checks.without import draw_without, label_of, moves_shown, without_height
from plainodds.drawings.geometry import Margins
from plainodds.drawings.lettering import line_height, wrapped
from plainodds.drawings.theme import Theme
from plainodds.phrases.checks.headings import picture_axes
from plainodds.phrases.checks.parts import cases_called
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import count

__all__ = ["INFLUENCE"]

_LARGEST = 2.6


def _above(theme: Theme) -> float:
    return line_height(theme.small) + 0.6 * theme.font_size


def _axis_height(found: Found, theme: Theme, width: float) -> float:
    title, _ = picture_axes(found.finding, found.subject)
    return x_axis_height(title, theme, plot_room(width)) + 0.1 * theme.font_size


def _around(found: Found, theme: Theme, width: float) -> float:
    return _above(theme) + _axis_height(found, theme, width) + without_height(found, theme, width)


def _natural(found: Found, theme: Theme, width: float) -> float:
    return max(0.4 * width, 17 * theme.font_size) + _around(found, theme, width)


def _least(found: Found, theme: Theme, width: float) -> float:
    return 9 * theme.font_size + _around(found, theme, width)


def _notes(found: Found) -> list[str]:
    evidence = found.evidence(InfluenceEvidence)
    notes = [
        message(
            "A mark is a kind of row: all {cases} of the same values. The larger it is, the "
            "farther the fit moves without it (Δβ).",
            cases=cases_called(found.subject),
        )
    ]
    if evidence.thinned:
        shown = count(len(evidence.probability))
        every = count(evidence.patterns)
        notes.append(message("{} of {} are shown, these among them.", shown, every))
    return notes


def _points(evidence: InfluenceEvidence) -> list[tuple[float, float, float]]:
    triples = zip(evidence.probability, evidence.delta_chi2, evidence.delta_beta, strict=True)
    return [each for each in triples if all(map(math.isfinite, each))]


def _outstanding(found: Found) -> list[InfluentialPattern]:
    return [
        each
        for each in found.evidence(InfluenceEvidence).standing_out
        if all(map(math.isfinite, (each.probability, each.delta_chi2, each.delta_beta)))
    ]


def _paint(board: Board, found: Found, width: float, height: float) -> Margins:
    theme, em = board.theme, board.theme.font_size
    points, outstanding = _points(found.evidence(InfluenceEvidence)), _outstanding(found)
    beneath = without_height(found, theme, width)
    top, bottom = _above(theme), _axis_height(found, theme, width) + beneath
    plot_height = height - top - bottom
    highest = max((y for _, y, _ in points), default=1.0) or 1.0
    up = numbers_axis(0.0, highest, int(plot_height / (2.8 * theme.small)))
    up = Axis(-0.04 * highest, 1.08 * highest, up.ticks, up.labels)
    left, right = y_axis_width(up, theme), 1.2 * em
    plot_width = width - left - right
    across = chances_axis([x for x, _, _ in points], (), int(plot_width / (4.6 * theme.small)))
    chance, badly = picture_axes(found.finding, found.subject)
    draw_y_axis(board, up)
    draw_x_axis(board, across, chance, plot_width, 0.35 * em)
    board.write(
        wrapped(badly, width, theme, theme.small, 1), -left, 0.45 * em, board.at(0, 1),
        down="bottom",
    )  # fmt: skip
    largest = max((size for _, _, size in points), default=1.0) or 1.0
    whole = (_LARGEST * theme.marker_size) ** 2
    least = (0.4 * theme.marker_size) ** 2

    def area(size: float) -> float:
        return least + (whole - least) * size / largest

    board.circles(
        "patterns", [(x, y) for x, y, _ in points], [area(size) for _, _, size in points],
        facecolors="none", edgecolors=theme.faint, linewidths=0.9 * theme.hairline,
        alpha=0.6, zorder=2, clip_on=False,
    )  # fmt: skip
    board.circles(
        "standing out", [(each.probability, each.delta_chi2) for each in outstanding],
        [area(each.delta_beta) for each in outstanding], marker="D", clip_on=False,
        facecolors=theme.series(0).colour, edgecolors=theme.paper, alpha=0.85,
        linewidths=0.9 * theme.hairline, zorder=3,
    )  # fmt: skip

    def place(x: float, y: float) -> tuple[float, float]:
        return across.share(x) * plot_width, up.share(y) * plot_height

    shown = [pattern for pattern, _ in moves_shown(found)]
    draw_tags(
        board,
        [Tag(label_of(each), *place(each.probability, each.delta_chi2),
             math.sqrt(area(each.delta_beta)) / 2, each in shown) for each in outstanding],
        [place(x, y) for x, y, _ in points], (plot_width, plot_height),
    )  # fmt: skip
    draw_without(
        board, found, Margins(left, right, beneath, 0.0), width, -_axis_height(found, theme, width)
    )
    return Margins(left, right, bottom, top)


INFLUENCE = Plate("influence", _natural, _least, _notes, _paint)
