"""The vertical axis of a curve: its limits, ticks and figures on each scale."""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import dataclass

import numpy as np

from plainodds.answers.curve import CurveAnswer, CurveLine, Scale
from plainodds.drawings.ticks import fraction_ticks, round_ticks
from plainodds.phrases.numbers import quantity, simple_fraction

__all__ = ["VerticalAxis", "is_cut", "shown", "vertical_axis"]

_FARTHEST = 2.0


@dataclass(frozen=True)
class VerticalAxis:
    """Limits, ticks and their labels; `zero` is where the reference line stands, if one does."""

    lower: float
    upper: float
    ticks: tuple[float, ...]
    labels: tuple[str, ...]
    zero: float | None

    def share(self, height: float, logarithmic: bool) -> float:
        """How far up the axis a value lies: 0 at the bottom, 1 at the top; clipped to them."""
        lower, upper, at = self.lower, self.upper, height
        if logarithmic:
            lower, upper, at = math.log(lower), math.log(upper), math.log(max(height, 1e-300))
        if not math.isfinite(at):
            at = lower
        return min(1.0, max(0.0, (at - lower) / (upper - lower)))


def shown(scale: Scale, values: tuple[float, ...]) -> np.ndarray:
    """Values as the axis shows them: slopes in percentage points, all else as it is."""
    held = np.asarray(values, dtype=float)
    return 100.0 * held if scale == "slope" else held


def vertical_axis(answer: CurveAnswer, height: float, letter: float) -> VerticalAxis:
    """Choose the axis for an answer.

    All estimates are on it. Intervals are as far as the data support them and as they
    don't squash the estimates; the rest is cut off at the axis.

    Parameters
    ----------
    answer : CurveAnswer
    height : float
        Of the plot, in points.
    letter : float
        Size of the tick labels, in points.
    """
    scale = answer.question.scale
    most = max(2, min(7, int(height / (2.6 * letter))))
    if scale == "odds":
        return _odds_axis(answer, height, letter)
    lower, upper = _reach(answer, lambda values: values)
    if scale == "probability":
        return _probability_axis(upper, most)
    if scale == "slope":
        lower, upper = min(lower, 0.0), max(upper, 0.0)
    lower, upper = _padded(lower, upper)
    ticks = round_ticks(lower, upper, most)
    zero = 0.0 if scale == "slope" else None
    return VerticalAxis(lower, upper, ticks, tuple(map(quantity, ticks)), zero)


def _probability_axis(upper: float, most: int) -> VerticalAxis:
    top = 1.0 if upper > 0.72 else max(1.06 * upper, 0.001)
    ticks = round_ticks(0.0, top, most)
    labels = tuple(quantity(round(100 * tick, 9), "%") for tick in ticks)
    # marks of a line at 100 % are not to be cut in half
    return VerticalAxis(0.0, 1.02 if top == 1.0 else top, ticks, labels, 0.0)


def _odds_axis(answer: CurveAnswer, height: float, letter: float) -> VerticalAxis:
    with np.errstate(divide="ignore"):
        lower, upper = _reach(answer, np.log)
    lower, upper = _padded(lower, upper)
    if upper - lower < 1.4:
        middle = (lower + upper) / 2
        lower, upper = middle - 0.7, middle + 0.7
    lower, upper = math.exp(lower), math.exp(upper)
    apart = (upper / lower) ** (1.9 * letter / max(height, letter))
    ticks = fraction_ticks(lower, upper, apart)
    return VerticalAxis(lower, upper, ticks, tuple(map(simple_fraction, ticks)), None)


def _padded(lower: float, upper: float) -> tuple[float, float]:
    room = 0.05 * (upper - lower) or 0.05 * abs(upper) or 0.5
    return lower - room, upper + room


def _reach(answer: CurveAnswer, to: Callable[[np.ndarray], np.ndarray]) -> tuple[float, float]:
    scale = answer.question.scale
    middles = np.concatenate([to(shown(scale, line.estimate)) for line in answer.lines])
    middles = middles[np.isfinite(middles)]
    if not middles.size:
        return 0.0, 1.0
    lowest, highest = float(middles.min()), float(middles.max())
    anchor = 0.0 if scale in ("probability", "slope") else lowest
    span = max(highest, anchor) - min(lowest, anchor)
    span = span or abs(highest) or 1.0
    lows = [_supported(line, to(shown(scale, line.lower))) for line in answer.lines if line.lower]
    highs = [_supported(line, to(shown(scale, line.upper))) for line in answer.lines if line.upper]
    ends = np.concatenate([*lows, *highs, [lowest, highest]])
    ends = ends[np.isfinite(ends)]
    return (
        max(min(lowest, float(ends.min())), lowest - _FARTHEST * span),
        min(max(highest, float(ends.max())), highest + _FARTHEST * span),
    )


def is_cut(answer: CurveAnswer) -> bool:
    """Whether the axis, of whatever height, cuts off an interval that the data support."""
    scale = answer.question.scale
    vertical = vertical_axis(answer, height=100.0, letter=10.0)
    for line in answer.lines:
        if line.lower is None or line.upper is None:
            continue
        low = _supported(line, shown(scale, line.lower))
        high = _supported(line, shown(scale, line.upper))
        if (low < vertical.lower).any() or (high > vertical.upper).any():
            return True
    return False


def _supported(line: CurveLine, values: np.ndarray) -> np.ndarray:
    held: np.ndarray = values[np.asarray(line.supported, dtype=bool)]
    return held
