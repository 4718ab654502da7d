"""Values of predictors, counts, and numbers with a sign."""

from __future__ import annotations

import math
from collections.abc import Sequence

from plainodds.phrases.numbers.marks import marked
from plainodds.phrases.numbers.signs import MINUS, with_sign
from plainodds.phrases.numbers.wording import wording

__all__ = [
    "confidence",
    "count",
    "count_mark",
    "guarded_count",
    "level_figures",
    "quantity",
    "signed",
    "summing",
]


def count(number: int) -> str:
    """Write a count, from 10,000 on with its thousands set off.

    Examples
    --------
    >>> count(6000), count(1000000)
    ('6,000', '1,000,000')
    """
    return marked(f"{number:,}".replace("-", MINUS))


def guarded_count(number: int, smallest: int) -> str:
    """Write a count of a guarded answer: what may be smaller is "up to" the smallest cell.

    Examples
    --------
    >>> guarded_count(10, 10), guarded_count(0, 10), guarded_count(6000, 10), guarded_count(3, 0)
    ('up to 10', '0', '6,000', '3')
    """
    if 0 < number <= smallest:
        return wording().up_to.format(count(smallest))
    return count(number)


def count_mark(number: int, smallest: int) -> str:
    """Write the same in a picture, where there is little room: "≤10"."""
    return f"≤{count(smallest)}" if 0 < number <= smallest else count(number)


def confidence(level: float) -> str:
    """Write a confidence level.

    Examples
    --------
    >>> confidence(0.95), confidence(0.999)
    ('95%', '99.9%')
    """
    return wording().percent.format(level_figures(level), "%")


def level_figures(level: float) -> str:
    """Write a confidence level in percent, for words of which the sign is a part.

    Examples
    --------
    >>> level_figures(0.95)
    '95'
    """
    return marked(f"{100 * level:.10g}")


def quantity(number: float, unit: str = "") -> str:
    """Write a predictor's value without the noise of floating point.

    A value that six figures hold is written as it is; a longer one (a mean, a point
    of a grid) with four figures, and never fewer than its whole part.

    Parameters
    ----------
    number : float
    unit : str
        Written after the number as it stands; a percent sign closes up and a
        currency sign goes in front.

    Examples
    --------
    >>> quantity(0.30000000000000004), quantity(43.3333333, "years"), quantity(-2, "°C")
    ('0.3', '43.33 years', '−2 °C')
    >>> quantity(12500, "£"), quantity(40, "%"), quantity(1987)
    ('£12,500', '40%', '1987')
    """
    text = _figures(float(number))
    if not unit:
        return text
    if unit in ("%", "‰"):
        return wording().percent.format(text, unit)
    if unit in ("°", "′", "″"):
        return f"{text}{unit}"
    if unit in ("$", "£", "€", "¥", "₹"):
        bare = text.removeprefix(MINUS)
        sign = MINUS if bare != text else ""
        return wording().money.format(sign=sign, unit=unit, figures=bare)
    return f"{text} {unit}"


def _figures(number: float) -> str:
    if math.isnan(number):
        return wording().not_known
    if math.isinf(number):
        return "∞" if number > 0 else f"{MINUS}∞"
    if number == 0:
        return "0"
    whole = math.floor(math.log10(abs(number))) + 1
    if not -6 < whole <= 15:
        return marked(f"{number:.4g}".replace("-", MINUS))
    short = float(f"{number:.6g}")
    exact = math.isclose(short, number, rel_tol=1e-9, abs_tol=0.0)
    places = max(0, (6 if exact else 4) - whole)
    text = f"{number:,.{places}f}" if abs(number) >= 9999.5 else f"{number:.{places}f}"
    if "." in text:
        text = text.rstrip("0").rstrip(".")
    return marked(with_sign(text, False))


def signed(number: float, *, decimals: int | None = None) -> str:
    """Write a number with its sign, as on the scale of the linear predictor.

    Parameters
    ----------
    number : float
    decimals : int, optional
        Exactly so many decimals; otherwise two, and more for small numbers.

    Examples
    --------
    >>> signed(0.42), signed(-0.42), signed(0.0034), signed(0)
    ('+0.42', '−0.42', '+0.0034', '0.00')
    """
    if math.isnan(number):
        return wording().not_known
    if math.isinf(number):
        return "+∞" if number > 0 else f"{MINUS}∞"
    places = decimals
    if places is None:
        small = 0 < abs(number) < 0.0995
        places = min(8, 1 - math.floor(math.log10(abs(number)))) if small else 2
    return marked(with_sign(f"{number:,.{places}f}", True))


def summing(values: Sequence[float], total: float, decimals: int = 2) -> tuple[float, ...]:
    """Round numbers so that, as written, they add up exactly to their rounded total.

    By largest remainder: each number is rounded down or up to the given decimals,
    and those that lie highest above their floor go up.

    Parameters
    ----------
    values : sequence of float
        The parts.
    total : float
        Their sum.
    decimals : int

    Returns
    -------
    tuple of float
        Parallel to `values`; unchanged where a number is not finite.

    Raises
    ------
    ValueError
        If the parts do not add up to the total to begin with.

    Examples
    --------
    >>> summing([0.333, 0.333, 0.334], 1.0, 1)
    (0.3, 0.3, 0.4)
    """
    if not all(map(math.isfinite, (*values, total))):
        return tuple(values)
    scale = 10**decimals
    floors = [math.floor(each * scale) for each in values]
    remainders = [each * scale - floor for each, floor in zip(values, floors, strict=True)]
    missing = round(total * scale) - sum(floors)
    if not 0 <= missing <= len(floors):
        raise ValueError(f"The parts {list(values)} do not add up to {total}.")
    for place in sorted(range(len(floors)), key=lambda i: -remainders[i])[:missing]:
        floors[place] += 1
    return tuple(whole / scale for whole in floors)
