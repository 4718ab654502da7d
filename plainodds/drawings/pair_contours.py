"""Contours over two numbers: at which levels, where they run, where their labels stand."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from typing import Any, TypeAlias

import numpy as np
from contourpy import FillType, LineType, contour_generator
from matplotlib.path import Path
from numpy.typing import NDArray

from plainodds.answers.surface import Surface
from plainodds.drawings.ticks import fraction_ticks, round_ticks

__all__ = ["Box", "Contours", "contours_of", "cut", "label_place", "levels_of", "sign_lines"]

Floats: TypeAlias = NDArray[np.float64]
Box: TypeAlias = tuple[float, float, float, float]
"""Left, lower, right and upper edge."""

_MOST = 9
_FINE = (
    0.0001, 0.0002, 0.0005, 0.001, 0.002, 0.005, 0.01, 0.02, 0.05, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6,
    0.7, 0.8, 0.9, 0.95, 0.98, 0.99, 0.995, 0.998, 0.999,
)  # fmt: skip
_COARSE = (0.0001, 0.001, 0.01, 0.05, 0.1, 0.25, 0.5, 0.75, 0.9, 0.95, 0.99, 0.999)
_EVEN = 12.0  # a ratio of odds up to which levels are equally far apart
_NO_SIGN = 1e-7
_CANDIDATES = 25
_CLOSE = 4.0  # points
_BENDING, _OFF_CENTRE = 8.0, 0.6


@dataclass(frozen=True)
class Contours:
    """Contours within the supported region, in the units of both predictors.

    `lines` and `areas` run over the levels: a level's lines, and the region above it.
    `region` is the supported region itself.
    """

    levels: tuple[float, ...]
    lines: tuple[list[Floats], ...]
    areas: tuple[Path | None, ...]
    region: Path | None


def contours_of(surface: Surface, levels: Sequence[float]) -> Contours:
    """Contours of the estimate where rows lie near, and nowhere else."""
    shown = _masked(surface, surface.estimate)
    generator = _generator(surface, shown)
    ends = (float(shown.min()) - 1.0, float(shown.max()) + 1.0) if shown.count() else (0.0, 1.0)
    return Contours(
        tuple(levels),
        tuple(_lines(generator, level) for level in levels),
        tuple(_area(generator, level, ends[1]) for level in levels),
        _area(generator, *ends),
    )


def sign_lines(surface: Surface) -> list[Floats]:
    """Where, within the supported region, the local interaction changes its sign."""
    crossing = _masked(surface, surface.crossing)
    shown = _masked(surface, surface.estimate)
    if not crossing.count():
        return []
    area = np.ptp(surface.a_at) * np.ptp(surface.b_at)
    # what is nothing but the noise of differences has no sign
    least = _NO_SIGN * max(float(np.ptp(shown.compressed())), 1e-12)
    if float(np.abs(crossing).max()) * area <= least:
        return []
    return _lines(_generator(surface, crossing), 0.0)


def levels_of(surface: Surface, scale: str) -> tuple[float, ...]:
    """The levels of the contours: round chances, or odds at simple fractions."""
    shown = _masked(surface, surface.estimate).compressed()
    if not shown.size or shown.min() >= shown.max():
        return ()
    lower, upper = float(shown.min()), float(shown.max())
    if scale == "odds":
        found = fraction_ticks(lower, upper, (upper / lower) ** (1 / _MOST))
        return tuple(each for each in found if lower < each < upper)
    odds = [each / (1 - each) if each < 1 else np.inf for each in (lower, upper)]
    even = round_ticks(lower, upper, 7)
    if odds[1] <= _EVEN * odds[0]:
        return tuple(each for each in even if lower < each < upper)
    fine = tuple(each for each in _FINE if lower < each < upper)
    return fine if len(fine) <= _MOST else tuple(x for x in _COARSE if lower < x < upper)


def _masked(surface: Surface, values: tuple[tuple[float, ...], ...]) -> Any:
    held = np.asarray(surface.supported, dtype=bool)
    z = np.asarray(values, dtype=float)
    return np.ma.array(z, mask=~held | ~np.isfinite(z))


def _generator(surface: Surface, values: Any) -> Any:
    return contour_generator(
        np.asarray(surface.a_at), np.asarray(surface.b_at), values, name="serial",
        corner_mask=True, line_type=LineType.Separate, fill_type=FillType.OuterCode,
    )  # fmt: skip


def _lines(generator: Any, level: float) -> list[Floats]:
    return [np.asarray(line, dtype=float) for line in generator.lines(level)]


def _area(generator: Any, lower: float, upper: float) -> Path | None:
    points, codes = generator.filled(lower, max(upper, lower + 1e-9))
    if not points:
        return None
    return Path(np.concatenate(points), np.concatenate(codes))


def label_place(
    lines: Sequence[Floats], size: tuple[float, float], plot: Box, taken: Sequence[Box]
) -> Box | None:
    """Where a label stands best on a contour: where that bends least, near its middle.

    Parameters
    ----------
    lines : sequence of arrays of shape (points, 2)
        The contour's pieces, in points.
    size : (float, float)
        Width and height of the label.
    plot : (left, lower, right, upper)
        What the label has to stay within.
    taken : sequence of (left, lower, right, upper)
        What it must not meet.

    Returns
    -------
    (left, lower, right, upper) or None
        None where no piece is long enough, or all is taken.
    """
    width, height = size
    best: tuple[float, Box] | None = None
    for line in lines:
        moves = np.diff(line, axis=0)
        steps = np.hypot(moves[:, 0], moves[:, 1])
        along = np.concatenate([[0.0], np.cumsum(steps)])
        length = along[-1]
        if length < 1.5 * width:
            continue
        middles = np.linspace(0.6 * width, length - 0.6 * width, _CANDIDATES)
        first, centre, last = (
            np.column_stack([np.interp(at, along, line[:, i]) for i in (0, 1)])
            for at in (middles - width / 2, middles, middles + width / 2)
        )
        apart = last - first
        bends = 1.0 - np.hypot(apart[:, 0], apart[:, 1]) / width
        cost = _BENDING * bends + _OFF_CENTRE * np.abs(middles / length - 0.5)
        # a longer piece is the better place
        cost = cost - 0.002 * min(length, 200.0)
        for place in np.argsort(cost):
            x, y = centre[place]
            box = (x - width / 2, y - height / 2, x + width / 2, y + height / 2)
            if best is not None and cost[place] >= best[0]:
                break
            if _within(box, plot) and not any(_meet(box, other) for other in taken):
                best = (float(cost[place]), box)
                break
    return None if best is None else best[1]


def _within(box: Box, plot: Box) -> bool:
    return box[0] >= plot[0] and box[1] >= plot[1] and box[2] <= plot[2] and box[3] <= plot[3]


def _meet(one: Box, other: Box) -> bool:
    return one[0] < other[2] and other[0] < one[2] and one[1] < other[3] and other[1] < one[3]


def _close(line: Floats) -> Floats:
    """The same line with points close to each other, so that it can be cut anywhere."""
    moves = np.diff(line, axis=0)
    along = np.concatenate([[0.0], np.cumsum(np.hypot(moves[:, 0], moves[:, 1]))])
    if len(line) < 2 or np.diff(along).max() <= _CLOSE:
        return line
    at = np.union1d(along, np.arange(0.0, along[-1], _CLOSE))
    return np.column_stack([np.interp(at, along, line[:, i]) for i in (0, 1)])


def cut(lines: Sequence[Floats], boxes: Sequence[Box]) -> list[Floats]:
    """Leave out of lines what lies within boxes, for labels to stand there.

    Parameters
    ----------
    lines : sequence of arrays of shape (points, 2)
        In points of the picture.
    boxes : sequence of (left, lower, right, upper)

    Returns
    -------
    list of arrays of shape (points, 2)
        Pieces of two points or more.
    """
    pieces: list[Floats] = []
    edges = np.asarray(boxes, dtype=float).reshape(-1, 4)
    for line in map(_close, lines) if boxes else lines:
        x, y = line[:, :1], line[:, 1:]
        inside = (x > edges[:, 0]) & (y > edges[:, 1]) & (x < edges[:, 2]) & (y < edges[:, 3])
        hidden = np.asarray(inside.any(axis=1), dtype=bool)
        if not hidden.any():
            pieces.append(line)
            continue
        breaks = np.flatnonzero(np.diff(hidden.astype(int))) + 1
        pieces += [
            line[run]
            for run in np.split(np.arange(len(line)), breaks)
            if len(run) > 1 and not hidden[run[0]]
        ]
    return pieces
