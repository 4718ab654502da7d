"""The axes of effects: one for each unit, all with 0 in one place.

Percentage points per year and percentage points per metre are no more comparable than
years and metres, so no two units share an axis. What the axes do share is where 0 lies:
on which side of it an effect is, can be seen at a glance down the whole picture.
"""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass

from plainodds.answers.effects import EffectRow

__all__ = ["Limits", "limits_of", "shown"]

_FARTHEST_END, _FARTHEST = 8.0, 12.0  # in the median row's reach
_LEAST_SIDE = 0.12
_PAD = 0.06


@dataclass(frozen=True)
class Limits:
    """Ends of an axis, and whether something lies beyond them."""

    lower: float
    upper: float
    leaves: bool

    @property
    def span(self) -> float:
        """The length of the axis."""
        return self.upper - self.lower


def shown(row: EffectRow) -> tuple[float, float, float]:
    """Effect and ends of its interval; thrice the same where there is no interval."""
    middle, low, high = row.effect.estimate, row.effect.lower, row.effect.upper
    if low is None or high is None or math.isnan(low) or math.isnan(high):
        return middle, middle, middle
    return middle, low, high


def limits_of(panels: Sequence[Sequence[EffectRow]]) -> tuple[Limits, ...]:
    """Limits of each panel's axis, 0 at the same share of all.

    Interval ends are shown as far as eight times the median row's reach from 0, estimates
    as far as twelve times; what lies farther off ends in an arrow.
    """
    sides = [_sides(rows) for rows in panels]
    shares = [left / (left + right) for left, right in sides]
    zero = (min(shares) + max(shares)) / 2 if shares else 0.5
    limits = []
    for rows, (left, right) in zip(panels, sides, strict=True):
        span = (1 + 2 * _PAD) * max(left / zero, right / (1 - zero))
        lower, upper = -zero * span, (1 - zero) * span
        leaves = any(not lower <= each <= upper for row in rows for each in shown(row))
        limits.append(Limits(lower, upper, leaves))
    return tuple(limits)


def _sides(rows: Sequence[EffectRow]) -> tuple[float, float]:
    """How far a panel reaches to either side of 0."""
    triples = [shown(row) for row in rows]
    reaches = sorted(max(-low, high, abs(middle)) for middle, low, high in triples)
    finite = [each for each in reaches if math.isfinite(each) and each > 0]
    typical = finite[(len(finite) - 1) // 2] if finite else 0.01
    left = _reach([-low for _, low, _ in triples], [-middle for middle, _, _ in triples], typical)
    right = _reach([high for _, _, high in triples], [middle for middle, _, _ in triples], typical)
    if left == right == 0.0:
        return typical, typical
    return max(left, _LEAST_SIDE * right), max(right, _LEAST_SIDE * left)


def _reach(ends: Sequence[float], middles: Sequence[float], typical: float) -> float:
    near = [0.0, *(each for each in ends if each <= _FARTHEST_END * typical)]
    near += [each for each in middles if each <= _FARTHEST * typical]
    # where something is cut, its line should be seen to go on past the rest
    return max(near) + (0.5 * typical if max(ends, default=0.0) > max(near) else 0.0)
