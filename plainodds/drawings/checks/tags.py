"""Names beside marks, where they meet as little as can be."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np

from plainodds.drawings.checks.board import Board
from plainodds.drawings.lettering import line_height, text_width, wrapped

__all__ = ["Tag", "draw_tags"]

Box = tuple[float, float, float, float]

_ANGLES = (0, 180, 90, 270, 45, 315, 135, 225)
_AWAY = (0.0, 1.4, 3.0, 5.0)
_WIDEST = 12.0
_AIR = 0.5
_COST = 1.2
"""What a letter's distance counts for, in marks that a name covers."""
_FEW = 1.0
"""So many marks may the name of one that is not wanted cover."""


@dataclass(frozen=True)
class Tag:
    """A name, its mark's centre in points from the plot's lower left corner, and its radius.

    One that is `wanted` may stand away from its mark; any other stands beside it or not at all.
    """

    name: str
    x: float
    y: float
    radius: float
    wanted: bool


def draw_tags(
    board: Board, tags: Sequence[Tag], others: Sequence[tuple[float, float]],
    plot: tuple[float, float],
) -> None:  # fmt: skip
    """Write names near their marks, with a hairline where they stand away from them.

    Parameters
    ----------
    board : Board
    tags : sequence of Tag
        The most important first; one for which there is no room goes without its name.
    others : sequence of (x, y)
        Centres of all marks, which names cover as few of as can be.
    plot : (width, height)
        In points.
    """
    theme, em = board.theme, board.theme.font_size
    marks = np.asarray(others, dtype=float).reshape(-1, 2)
    # a diamond's tips reach farther than a square's sides
    taken: list[Box] = [
        (tag.x - r, tag.y - r, tag.x + r, tag.y + r)
        for tag, r in ((t, 0.9 * t.radius) for t in tags)
    ]
    leaders = []
    for tag in tags:
        words = wrapped(tag.name, _WIDEST * em, theme, theme.small, 1)
        size = (text_width(words, theme, theme.small) + _AIR * em, line_height(theme.small))
        best: tuple[float, Box, float] | None = None
        for away in _AWAY if tag.wanted else _AWAY[:1]:
            for angle in _ANGLES:
                box = _box(tag, size, math.radians(angle), away * em)
                if not _inside(box, plot) or any(_meet(box, other) for other in taken):
                    continue
                cost = _covered(box, marks) + _COST * away
                if not tag.wanted and cost > _FEW:
                    continue
                if best is None or cost < best[0]:
                    best = (cost, box, away)
        if best is None:
            continue
        _, box, away = best
        taken.append(box)
        board.write(
            words, box[0] + _AIR * em / 2, (box[1] + box[3]) / 2, board.at(0, 0), size=theme.small
        )
        if away:
            near = (min(max(tag.x, box[0]), box[2]), min(max(tag.y, box[1]), box[3]))
            leaders.append([(tag.x, tag.y), near])
            taken += [(x, y, x, y) for x, y in _between(tag, near)]
    board.strokes(
        "tag leaders", leaders, transform=board.at(0, 0), colors=theme.ink,
        linewidths=theme.hairline, zorder=2.8,
    )  # fmt: skip


def _box(tag: Tag, size: tuple[float, float], angle: float, gap: float) -> Box:
    """Where a name of this size stands, seen from its mark at an angle."""
    out = 1.3 * tag.radius + gap
    across, up = math.cos(angle), math.sin(angle)
    middle = (tag.x + across * (out + size[0] / 2), tag.y + up * (out + size[1] / 2))
    return (
        middle[0] - size[0] / 2, middle[1] - size[1] / 2, middle[0] + size[0] / 2,
        middle[1] + size[1] / 2,
    )  # fmt: skip


def _between(tag: Tag, end: tuple[float, float]) -> list[tuple[float, float]]:
    """Points along a leader, which other names are to keep off."""
    shares = np.linspace(0.0, 1.0, 7)
    return [
        (tag.x + share * (end[0] - tag.x), tag.y + share * (end[1] - tag.y)) for share in shares
    ]


def _inside(box: Box, plot: tuple[float, float]) -> bool:
    return box[0] >= 0 and box[2] <= plot[0] and box[1] >= 0 and box[3] <= plot[1]


def _meet(one: Box, other: Box) -> bool:
    return one[0] < other[2] and other[0] < one[2] and one[1] < other[3] and other[1] < one[3]


def _covered(box: Box, marks: np.ndarray) -> float:
    x, y = marks[:, 0], marks[:, 1]
    return float(((x > box[0]) & (x < box[2]) & (y > box[1]) & (y < box[3])).sum())
