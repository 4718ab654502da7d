"""How many cases more or fewer, and how many it takes for one."""

from __future__ import annotations

import math

from plainodds.phrases.numbers.marks import marked
from plainodds.phrases.numbers.wording import wording

__all__ = ["cases_apart", "cases_apart_in", "cases_on_sides", "needed"]

_MOST_NEEDED = 1_000_000


def needed(number: float) -> str:
    """Write a number needed, with one decimal below 10.

    Parameters
    ----------
    number : float
        At least 1; may be infinite.

    Examples
    --------
    >>> needed(8.333), needed(24.3), needed(1234.5), needed(float("inf")), needed(1e9)
    ('8.3', '24', '1,234', 'infinity', 'over 1,000,000')
    """
    if math.isnan(number):
        return wording().not_known
    if math.isinf(number):
        return wording().infinity
    if number > _MOST_NEEDED:
        return wording().over.format(marked(f"{_MOST_NEEDED:,}"))
    text = f"{number:.1f}".removesuffix(".0") if number < 9.95 else f"{number:,.0f}"
    return marked(text)


def cases_apart(difference: float, over: int) -> str:
    """Write a difference of two chances as cases more or fewer.

    Parameters
    ----------
    difference : float
        Difference of probabilities, between −1 and 1.
    over : int
        The denominator.

    Examples
    --------
    >>> cases_apart(0.05, 1000), cases_apart(-0.05, 100), cases_apart(0.0001, 1000)
    ('50 more', '5 fewer', 'under 1 more')
    """
    if math.isnan(difference):
        return wording().more_or_fewer_not_known
    if difference == 0:
        return wording().no_more_no_fewer
    side = wording().more if difference > 0 else wording().fewer
    return side.format(_cases(difference, over))


def cases_apart_in(difference: float, over: int) -> str:
    """Write the same with its denominator.

    Examples
    --------
    >>> cases_apart_in(0.05, 1000)
    '50 more in 1,000'
    """
    return wording().apart_in.format(cases_apart(difference, over), marked(f"{over:,}"))


def cases_on_sides(lower: float, upper: float, over: int) -> str:
    """Write a range of differences of chances as cases more or fewer.

    Examples
    --------
    >>> cases_on_sides(0.034, 0.066, 1000), cases_on_sides(-0.002, 0.016, 1000)
    ('34 to 66 more', '2 fewer to 16 more')
    >>> cases_on_sides(-0.066, -0.034, 1000), cases_on_sides(0.0, 0.016, 1000)
    ('34 to 66 fewer', '0 to 16 more')
    """
    say = wording()
    low, high = _cases(lower, over), _cases(upper, over)
    if lower < 0 < upper:
        return say.to.format(say.fewer.format(low), say.more.format(high))
    side, nearer, further = (say.fewer, high, low) if lower < 0 else (say.more, low, high)
    return side.format(nearer if nearer == further else say.to.format(nearer, further))


def _cases(difference: float, over: int) -> str:
    cases = round(abs(difference) * over)
    return wording().under.format("1") if cases == 0 and difference != 0 else marked(f"{cases:,}")
