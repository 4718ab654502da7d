"""Ranges, as coarse as their width warrants, and differences of chances."""

from __future__ import annotations

import math
from collections.abc import Callable
from typing import TypeAlias

from plainodds.phrases.numbers.chances import chance, chance_decimals
from plainodds.phrases.numbers.marks import marked
from plainodds.phrases.numbers.quantities import quantity
from plainodds.phrases.numbers.ratios import ratio, ratio_interval
from plainodds.phrases.numbers.signs import MINUS, with_sign
from plainodds.phrases.numbers.wording import wording

__all__ = [
    "Say",
    "bare_points",
    "bare_points_span",
    "percentage_points",
    "points_on_sides",
    "points_span",
    "span",
]

Say: TypeAlias = Callable[..., str]
"""Writes one number; takes the number of decimals as the keyword `decimals`."""

_MOST_DECIMALS = 4
_LEAST_POINTS = 0.001
# an end of a range is told beside the other one, so that a smaller figure still says something
_LEAST_END = 0.00001


def span(lower: float, upper: float, say: Say = chance) -> str:
    """Write a range, with a precision as coarse as its width warrants.

    Parameters
    ----------
    lower, upper : float
    say : callable
        How one end is written: `chance`, `signed`, `quantity` or another function of
        this module that takes `decimals`.

    Returns
    -------
    str
        A single figure where both ends read the same at every precision offered.

    Examples
    --------
    >>> span(0.1834, 0.2921), span(0.2312, 0.2341), span(0.004, 0.12)
    ('18% to 29%', '23.1% to 23.4%', '0.4% to 12%')
    """
    if say is chance:
        return _span(lower, upper, say, 0.01, lambda p: chance_decimals(100 * p))
    if say is ratio:
        return ratio_interval(lower, upper)
    if say is quantity:
        low, high = quantity(lower), quantity(upper)
        return low if low == high else wording().to.format(low, high)
    return _span(lower, upper, say, 1.0, lambda _: 2)


def _span(
    lower: float, upper: float, say: Say, unit: float, decimals: Callable[[float], int]
) -> str:
    low, high = _ends(lower, upper, say, unit, decimals)
    return low if low == high else wording().to.format(low, high)


def _ends(
    lower: float, upper: float, say: Say, unit: float, decimals: Callable[[float], int]
) -> tuple[str, str]:
    """Write both ends of a range, with decimals as its width and the ends' sizes ask for."""
    width = upper - lower
    if not math.isfinite(width) or width <= 0:
        return say(lower), say(upper)
    warranted = 0
    while warranted < _MOST_DECIMALS and unit * 10.0**-warranted > width / 5:
        warranted += 1
    places = min(warranted, max(decimals(lower), decimals(upper)))

    def end(number: float) -> str:
        finer = places
        while finer < decimals(number) and _misses(number / unit, finer):
            finer += 1
        return say(number, decimals=finer)

    low, high = end(lower), end(upper)
    while low == high and places < warranted:
        places += 1
        low, high = end(lower), end(upper)
    return low, high


def _misses(number: float, decimals: int) -> bool:
    """Whether so few decimals would miss a number by more than an eighth of itself."""
    return abs(round(number, decimals) - number) > abs(number) / 8


def percentage_points(difference: float, *, decimals: int | None = None, sign: bool = False) -> str:
    """Write a difference of two chances in percentage points.

    Parameters
    ----------
    difference : float
        Difference of probabilities, between −1 and 1.
    decimals : int, optional
    sign : bool
        Whether a positive difference carries a plus sign.

    Examples
    --------
    >>> percentage_points(0.034), percentage_points(-0.12), percentage_points(0.00042)
    ('3.4 percentage points', '−12 percentage points', '0.042 percentage points')
    """
    return wording().points.format(_points(difference, decimals=decimals, sign=sign))


def bare_points(difference: float) -> str:
    """Write a difference of two chances, with its sign, where a heading names the unit.

    Examples
    --------
    >>> bare_points(0.034), bare_points(-0.12)
    ('+3.4', '−12')
    """
    return _points(difference, sign=True)


def points_span(lower: float, upper: float) -> str:
    """Write a range of differences of chances in percentage points.

    Examples
    --------
    >>> points_span(-0.021, 0.056), points_span(0.021, 0.056)
    ('−2 to +6 percentage points', '2.1 to 5.6 percentage points')
    """
    return wording().points.format(bare_points_span(lower, upper))


def bare_points_span(lower: float, upper: float) -> str:
    """Write a range of differences of chances where a heading names the unit.

    Examples
    --------
    >>> bare_points_span(-0.021, 0.056), bare_points_span(0.021, 0.056)
    ('−2 to +6', '2.1 to 5.6')
    """
    sign = lower < 0 < upper

    def say(difference: float, decimals: int | None = None) -> str:
        return _points(difference, decimals=decimals, sign=sign)

    return _span(lower, upper, say, 0.01, _points_decimals)


def points_on_sides(lower: float, upper: float) -> str:
    """Write a range of differences of chances in percentage points, the sides in words.

    Examples
    --------
    >>> points_on_sides(-0.021, 0.016), points_on_sides(-0.056, -0.021)
    ('2.1 lower to 1.6 higher', '2.1 to 5.6 lower')
    """
    words = wording()
    low, high = _ends(lower, upper, _unsigned_points, 0.01, _points_decimals)
    if lower < 0 < upper:
        return words.to.format(words.lower.format(low), words.higher.format(high))
    is_lower = upper <= 0 and lower < 0
    side, nearer, further = (words.lower, high, low) if is_lower else (words.higher, low, high)
    return side.format(nearer if nearer == further else words.to.format(nearer, further))


def _unsigned_points(difference: float, decimals: int | None = None) -> str:
    return _points(abs(difference), decimals=decimals)


def _points(difference: float, decimals: int | None = None, sign: bool = False) -> str:
    if math.isnan(difference):
        return wording().not_known
    if difference == 0:
        return "0"
    points = 100 * difference
    if decimals is not None and abs(points) < _LEAST_END:
        return wording().just_above if points > 0 else wording().just_below
    if decimals is None and abs(points) < _LEAST_POINTS:
        within = marked(f"{_LEAST_POINTS:g}")
        if points > 0:
            return wording().under.format(within)
        return wording().between_and_nought.format(f"{MINUS}{within}")
    places = _points_decimals(difference) if decimals is None else decimals
    while float(f"{points:.{places}f}") == 0:
        places += 1
    return marked(with_sign(f"{points:,.{places}f}", sign))


def _points_decimals(difference: float) -> int:
    size = abs(100 * difference)
    if size >= 10 or size == 0:
        return 0
    return 1 if size >= 1 else min(3, 1 - math.floor(math.log10(size)))
