"""Odds, ratios and p-values."""

from __future__ import annotations

import math
from fractions import Fraction

from plainodds.phrases.numbers.marks import marked
from plainodds.phrases.numbers.wording import wording

__all__ = ["p_mark", "p_value", "ratio", "ratio_interval", "simple_fraction"]

_RATIO_LIMIT = 1000.0


def ratio(number: float, *, decimals: int | None = None) -> str:
    """Write an odds ratio, a risk ratio or odds, with about three figures.

    Parameters
    ----------
    number : float
        At least 0; may be infinite.
    decimals : int, optional

    Returns
    -------
    str
        Near 1 with as many decimals as show on which side of 1 it lies. Above 1,000
        and below 0.001 only the limit is written.

    Examples
    --------
    >>> ratio(2.0249), ratio(12.34), ratio(1.0034), ratio(float("inf")), ratio(1e-9)
    ('2.02', '12.3', '1.003', 'over 1,000', 'under 0.001')
    """
    if math.isnan(number):
        return wording().not_known
    if number > _RATIO_LIMIT:
        return wording().over.format(marked(f"{_RATIO_LIMIT:,.0f}"))
    if number < 1 / _RATIO_LIMIT:
        return wording().under.format(marked(f"{1 / _RATIO_LIMIT:g}"))
    places = _ratio_decimals(number) if decimals is None else decimals
    text = f"{number:,.{places}f}"
    while float(text.replace(",", "")) == 0:
        places += 1
        text = f"{number:,.{places}f}"
    return marked(text)


def ratio_interval(lower: float, upper: float) -> str:
    """Write the interval of a ratio, both ends with the same decimals from 0.1 to 10.

    Examples
    --------
    >>> ratio_interval(1.084, 3.776), ratio_interval(0.0004, float("inf"))
    ('1.08 to 3.78', 'under 0.001 to over 1,000')
    """
    places = None
    if 0.0995 <= lower <= upper < 9.995:
        places = max(_ratio_decimals(lower), _ratio_decimals(upper))
    low, high = ratio(lower, decimals=places), ratio(upper, decimals=places)
    return low if low == high else wording().to.format(low, high)


def _ratio_decimals(number: float) -> int:
    from_one = abs(number - 1)
    if 0 < from_one < 0.00995:
        return 3 if from_one >= 0.000995 else (4 if from_one >= 0.00005 else 2)
    if number >= 99.95:
        return 0
    if number >= 9.995:
        return 1
    return 2 if number >= 0.0995 else 1 - math.floor(math.log10(number))


def simple_fraction(number: float) -> str:
    """Write odds or a ratio as a simple fraction, for ticks.

    Examples
    --------
    >>> simple_fraction(0.25), simple_fraction(1), simple_fraction(4.0), simple_fraction(2 / 3)
    ('1/4', '1', '4', '2/3')
    """
    if not math.isfinite(number) or number <= 0:
        return ratio(number) if number > 0 or math.isnan(number) else "0"
    if number >= 1:
        near = Fraction(number).limit_denominator(10)
    else:
        near = 1 / Fraction(1 / number).limit_denominator(10)
    if not math.isclose(float(near), number, rel_tol=1e-6):
        return ratio(number)
    if near.denominator == 1:
        return marked(f"{near.numerator:,}")
    return marked(f"{near.numerator:,}/{near.denominator:,}")


def p_value(p: float) -> str:
    """Write a p-value: two decimals, three below 0.1, never nought and never one.

    Examples
    --------
    >>> p_value(0.2345), p_value(0.0321), p_value(1e-12), p_value(0.999)
    ('0.23', '0.032', 'under 0.001', 'over 0.99')
    """
    if math.isnan(p):
        return wording().not_known
    if p < 0.001:
        return wording().under.format(marked("0.001"))
    if p > 0.99:
        return wording().over.format(marked("0.99"))
    return marked(f"{p:.3f}" if p < 0.0995 else f"{p:.2f}")


def p_mark(p: float) -> str:
    """Write a p-value in a column of figures, where there is little room.

    Examples
    --------
    >>> p_mark(0.2345), p_mark(1e-12), p_mark(0.999)
    ('0.23', '<0.001', '>0.99')
    """
    if p < 0.001:
        return f"<{marked('0.001')}"
    return f">{marked('0.99')}" if p > 0.99 else p_value(p)
