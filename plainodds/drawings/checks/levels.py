"""Levels, the sparse ones first, with their cases."""

from __future__ import annotations

from plainodds.answers.checks.amount import LevelCount, LevelsEvidence
from plainodds.drawings.checks.along import x_axis_height
from plainodds.drawings.checks.board import Board
from plainodds.drawings.checks.counts import (
    MOST_LEVELS,
    draw_counts,
    head_height,
    laid_counts,
)
from plainodds.drawings.checks.plate import Found, Plate
from plainodds.drawings.geometry import Margins
from plainodds.drawings.theme import Theme
from plainodds.phrases.checks.headings import picture_axes, picture_legend
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import count

__all__ = ["LEVELS"]


def _shown(found: Found) -> tuple[LevelCount, ...]:
    """The sparse ones first, then those with the fewest cases of one outcome; by predictor."""
    evidence, wanted = found.evidence(LevelsEvidence), found.answer.question.predictor
    rest = sorted(evidence.counts[evidence.sparse :], key=_rarer)
    ordered = [*evidence.counts[: evidence.sparse], *rest]
    if any(each.predictor == wanted for each in ordered):
        ordered.sort(key=lambda each: each.predictor != wanted)
    first = ordered[:MOST_LEVELS]
    names = list(dict.fromkeys(each.predictor for each in first))
    return tuple(sorted(first, key=lambda each: names.index(each.predictor)))


def _rarer(each: LevelCount) -> float:
    return min(each.events, each.cases - each.events)


def _has_picture(found: Found) -> bool:
    counts = found.evidence(LevelsEvidence).counts
    return bool(counts) and all(each.events == each.events for each in counts)


def _height(found: Found, theme: Theme, width: float) -> float:
    laid = laid_counts(_shown(found), found.subject, theme, width)
    legend = picture_legend(found.finding, found.subject)
    title, _ = picture_axes(found.finding, found.subject)
    return (
        head_height(legend, theme, width)
        + laid.height
        + x_axis_height(title, theme, laid.title_room(width))
    )


def _notes(found: Found) -> list[str]:
    left = len(found.evidence(LevelsEvidence).counts) - MOST_LEVELS
    if left <= 0:
        return []
    if left == 1:
        return [message("Not shown: 1 more level.")]
    return [message("Not shown: {} more levels.", count(left))]


def _paint(board: Board, found: Found, width: float, height: float) -> Margins:
    theme = board.theme
    counts = _shown(found)
    laid = laid_counts(counts, found.subject, theme, width)
    legend = picture_legend(found.finding, found.subject)
    title, _ = picture_axes(found.finding, found.subject)
    draw_counts(board, counts, laid, legend, title, width)
    top = head_height(legend, theme, width)
    return Margins(laid.left, laid.right, height - top - laid.height, top)


LEVELS = Plate("levels", _height, _height, _notes, _paint, has_picture=_has_picture)
