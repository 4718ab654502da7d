"""The axis of odds ratios: a range that one enormous interval can't spoil."""

from __future__ import annotations

import math
from collections.abc import Sequence

from plainodds.answers.odds import OddsRow
from plainodds.drawings.ticks import outer_fractions
from plainodds.phrases.lexicon import message

__all__ = ["axis_range", "axis_title", "shown", "sides"]


def axis_title() -> str:
    """What the axis is."""
    return message("odds ratio, logarithmic axis")


def sides() -> tuple[str, str]:
    """What lies on either side of 1."""
    return message("← lower odds"), message("higher odds →")


def shown(row: OddsRow) -> tuple[float, float, float]:
    """Odds ratio and ends of its interval; thrice the same where there is no interval."""
    held = row.odds_ratio
    low = held.estimate if held.lower is None else held.lower
    high = held.estimate if held.upper is None else held.upper
    return held.estimate, low, high


def axis_range(rows: Sequence[OddsRow]) -> tuple[float, float]:
    """The range of odds ratios to show, so that one enormous interval doesn't squash the rest.

    Interval ends are shown as far as four times the median row's reach from 1, estimates
    as far as ten times; what lies farther off ends in an arrow.

    Returns
    -------
    tuple of float
        Around 1, both ends finite and above 0.
    """
    left: list[float] = []
    right: list[float] = []
    middles, reaches = [], []
    for row in rows:
        logs = row.log_odds_ratio
        if math.isnan(logs.estimate):
            continue
        low = logs.estimate if logs.lower is None else logs.lower
        high = logs.estimate if logs.upper is None else logs.upper
        if math.isinf(logs.estimate):
            # where there is no finite estimate, the finite end of its interval is what to see
            ends, near = (right, low) if logs.estimate > 0 else (left, -high)
            ends += [math.inf, near]
            continue
        left.append(-low if math.isfinite(low) else math.inf)
        right.append(high if math.isfinite(high) else math.inf)
        middles.append(logs.estimate)
        reaches.append(max(left[-1], right[-1], 0.0))
    reaches.sort()
    typical = reaches[(len(reaches) - 1) // 2] if reaches else 0.0
    typical = min(max(typical, math.log(1.25)), math.log(1000.0))
    lowest = _reach(left, [-each for each in middles], typical)
    highest = _reach(right, middles, typical)
    return outer_fractions(math.exp(-lowest), math.exp(highest))


def _reach(ends: Sequence[float], middles: Sequence[float], typical: float) -> float:
    near = [0.0, *(each for each in ends if each <= 4.0 * typical)]
    near += [each for each in middles if each <= 10.0 * typical]
    # where something is cut, its line should be seen to go on past the rest
    return max(near) + (0.5 * typical if max(ends, default=0.0) > max(near) else 0.0)
