"""Where events and non-events lie along the fitted chance: one above, the other below."""

from __future__ import annotations

from collections.abc import Sequence
from itertools import pairwise

from plainodds.answers.checks.discrimination import DiscriminationEvidence
from plainodds.drawings.checks.along import (
    Axis,
    chances_axis,
    draw_x_axis,
    draw_y_axis,
    plot_room,
    x_axis_height,
    y_axis_width,
)
from plainodds.drawings.checks.board import Board
from plainodds.drawings.checks.plate import Found, Plate
from plainodds.drawings.checks.tables import draw_paragraph, paragraph_height
from plainodds.drawings.geometry import Margins
from plainodds.drawings.lettering import line_height, text_width, wrapped
from plainodds.drawings.theme import Theme
from plainodds.drawings.ticks import round_ticks
from plainodds.phrases.checks.finding_words import finding_words
from plainodds.phrases.checks.headings import picture_axes, picture_legend
from plainodds.phrases.checks.parts import amount, cases, cases_called
from plainodds.phrases.labels import sentence_case
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import count

__all__ = ["DISCRIMINATION"]

_UNLIKE = 3.0
"""From this ratio of their highest bars on, each side has a scale of its own."""


def _words(found: Found) -> str:
    return finding_words(found.finding, found.subject, found.level).what


def _above(found: Found, theme: Theme, width: float) -> float:
    em = theme.font_size
    return paragraph_height(_words(found), theme, width) + line_height(theme.small) + 1.3 * em


def _below(found: Found, theme: Theme, width: float) -> float:
    title, _ = picture_axes(found.finding, found.subject)
    return x_axis_height(title, theme, plot_room(width)) + 0.1 * theme.font_size


def _natural(found: Found, theme: Theme, width: float) -> float:
    plot = max(0.36 * width, 15 * theme.font_size)
    return _above(found, theme, width) + plot + _below(found, theme, width)


def _least(found: Found, theme: Theme, width: float) -> float:
    return _above(found, theme, width) + 9 * theme.font_size + _below(found, theme, width)


def _notes(found: Found) -> list[str]:
    evidence = found.evidence(DiscriminationEvidence)
    notes = []
    if _factor(evidence) != 1.0:
        notes.append(message("Each side has a scale of its own: there are many more of one kind."))
    if min(_narrowness(evidence)) < 1.0:
        notes.append(
            message("A wider bar is of several with few {} each, at their mean height.",
                    cases_called(found.subject))
        )  # fmt: skip
    return notes


def _narrowness(evidence: DiscriminationEvidence) -> list[float]:
    """Each bar's narrowness: 1 for the narrowest, less for bars of several bins."""
    widths = [b - a for a, b in pairwise(evidence.edges)]
    # all widths are the same to rounding unless bins were merged
    return [round(min(widths) / each, 9) for each in widths]


def _heights(evidence: DiscriminationEvidence, counts: Sequence[float]) -> list[float]:
    """Heights of bars, whose areas are cases."""
    return [number * narrow for number, narrow in zip(counts, _narrowness(evidence), strict=True)]


def _factor(evidence: DiscriminationEvidence) -> float:
    """How many times as high a bar below is drawn as one above of the same number."""
    up, down = (max(_heights(evidence, each)) for each in (evidence.events, evidence.others))
    if not (up > 0 and down > 0) or 1 / _UNLIKE <= up / down <= _UNLIKE:
        return 1.0
    return up / down


def _upright(evidence: DiscriminationEvidence, factor: float, most: int) -> Axis:
    up, down = (max(_heights(evidence, each)) for each in (evidence.events, evidence.others))
    down *= factor
    span = up + down
    above = round_ticks(0.0, up, max(2, round(most * up / span)))
    below = round_ticks(0.0, down / factor, max(2, round(most * down / span)))
    ticks = [(-factor * each, each) for each in reversed(below) if each > 0]
    ticks += [(each, each) for each in above]
    whole = [(at, each) for at, each in ticks if each == round(each)]
    return Axis(
        -down - 0.2 * span, up + 0.2 * span, tuple(at for at, _ in whole),
        tuple(count(round(each)) for _, each in whole),
    )  # fmt: skip


def _paint(board: Board, found: Found, width: float, height: float) -> Margins:
    theme, em = board.theme, board.theme.font_size
    evidence = found.evidence(DiscriminationEvidence)
    factor = _factor(evidence)
    top, bottom = _above(found, theme, width), _below(found, theme, width)
    plot_height = height - top - bottom
    up = _upright(evidence, factor, int(plot_height / (2.6 * theme.small)))
    left, right = y_axis_width(up, theme), 0.6 * em
    plot_width = width - left - right
    edges = evidence.edges
    across = chances_axis(edges, (), int(plot_width / (4.6 * theme.small)))
    chance, number = picture_axes(found.finding, found.subject)
    draw_y_axis(board, up)
    draw_x_axis(board, across, chance, plot_width, 0.35 * em)
    board.axes.spines["bottom"].set_visible(False)
    _draw_bars(board, evidence, factor)
    board.line(
        "zero", [across.lower, across.upper], [0.0, 0.0], color=theme.rule,
        linewidth=1.4 * theme.hairline, zorder=3,
    )  # fmt: skip
    events, others = picture_legend(found.finding, found.subject)
    for words, total, y, down in (
        (events, sum(evidence.events), -0.3 * em, "top"),
        (others, sum(evidence.others), 0.3 * em, "bottom"),
    ):
        told, room, size = (
            f"{cases(found.subject, total)} {words}",
            plot_width + right - 0.4 * em,
            em,
        )
        if text_width(told, theme, em) > room:
            told, size = f"{amount(total)} {words}", theme.small
        board.write(
            wrapped(told, room, theme, size, 1), 0.4 * em, y,
            board.at(0, 1 if down == "top" else 0), size=size,
            down="top" if down == "top" else "bottom",
        )  # fmt: skip
    board.write(
        wrapped(sentence_case(number), width, theme, theme.small, 1), -left, 0.45 * em,
        board.at(0, 1), down="bottom",
    )  # fmt: skip
    draw_paragraph(board, _words(found), -left, top, width, (0, 1))
    return Margins(left, right, bottom, top)


def _draw_bars(board: Board, evidence: DiscriminationEvidence, factor: float) -> None:
    theme = board.theme
    edges = evidence.edges
    sides = (("events", evidence.events, 1.0), ("others", evidence.others, -factor))
    for place, (name, counts, scale) in enumerate(sides):
        outlines = []
        bars = zip(
            edges[:-1], edges[1:], _heights(evidence, counts), _narrowness(evidence), strict=True
        )
        for first, last, tall, narrow in bars:
            if tall > 0:
                # the same gap beside every bar
                tip, gap = scale * tall, 0.06 * (last - first) * narrow
                low, high = first + gap, last - gap
                outlines.append([(low, 0.0), (high, 0.0), (high, tip), (low, tip)])
        board.area(
            name, outlines, facecolor=theme.series(place).colour, zorder=2, alpha=0.9,
        )  # fmt: skip


DISCRIMINATION = Plate("discrimination", _natural, _least, _notes, _paint)
