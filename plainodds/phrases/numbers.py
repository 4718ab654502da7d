"""How numbers are written: the one place for percent, ratios, ranges and units of chance.

Nothing here rounds a chance to 0% or 100%, a ratio to 0, or two ends of an interval
to the same figure where a finer one tells them apart. Negative numbers carry a true
minus sign (U+2212).
"""

from __future__ import annotations

import math
from collections.abc import Callable, Iterable, Sequence
from fractions import Fraction
from typing import TypeAlias

__all__ = [
    "MINUS",
    "NOT_KNOWN",
    "chance",
    "confidence",
    "count",
    "denominator",
    "frequency",
    "frequency_span",
    "p_value",
    "percentage_points",
    "points_span",
    "quantity",
    "ratio",
    "ratio_interval",
    "signed",
    "simple_fraction",
    "span",
    "summing",
]

MINUS = "−"
NOT_KNOWN = "not known"

Say: TypeAlias = Callable[..., str]
"""Writes one number; takes the number of decimals as the keyword `decimals`."""

_MOST_DECIMALS = 4
_LEAST_CHANCE = 0.001
_LEAST_POINTS = 0.001
_RATIO_LIMIT = 1000.0
_DENOMINATORS = (100, 1_000, 10_000)


def count(number: int) -> str:
    """Write a count, from 10,000 on with its thousands set off.

    Examples
    --------
    >>> count(6000), count(1000000)
    ('6,000', '1,000,000')
    """
    return f"{number:,}".replace("-", MINUS)


def confidence(level: float) -> str:
    """Write a confidence level.

    Examples
    --------
    >>> confidence(0.95), confidence(0.999)
    ('95%', '99.9%')
    """
    return f"{100 * level:.10g}%"


def chance(probability: float, *, decimals: int | None = None) -> str:
    """Write a chance in percent, with two or three figures.

    Parameters
    ----------
    probability : float
        Between 0 and 1.
    decimals : int, optional
        Decimals of the percentage; more are written where fewer would round to
        0% or 100%.

    Returns
    -------
    str
        Never "0%" and never "100%": beyond a tenth of a percent from either end the
        text says "under 0.1%" or "over 99.9%".

    Examples
    --------
    >>> chance(0.2345), chance(0.0421), chance(0.9421), chance(0.00001), chance(1.0)
    ('23%', '4.2%', '94.2%', 'under 0.1%', 'over 99.9%')
    """
    if math.isnan(probability):
        return NOT_KNOWN
    if probability < _LEAST_CHANCE:
        return "under 0.1%"
    if probability > 1 - _LEAST_CHANCE:
        return "over 99.9%"
    percent = 100 * probability
    places = _chance_decimals(percent) if decimals is None else decimals
    text = f"{percent:.{places}f}"
    while float(text) in (0.0, 100.0):
        places += 1
        text = f"{percent:.{places}f}"
    if decimals is None and _chance_decimals(float(text)) < places:
        text = f"{percent:.{_chance_decimals(float(text))}f}"
    return f"{text}%"


def _chance_decimals(percent: float) -> int:
    if 10 <= percent <= 90:
        return 0
    return 2 if percent < 1 else 1


def denominator(chances: Iterable[float]) -> int:
    """Choose the one denominator over which a set of chances is written as frequencies.

    The smallest of 100, 1,000 and 10,000 over which the rarest event (or the rarest
    non-event) still counts at least two, and over which chances that differ are told
    apart where 1,000 can do that.

    Source: one fixed denominator for all, Gigerenzer et al. 2007; Fagerlin,
    Zikmund-Fisher & Ubel 2011.

    Examples
    --------
    >>> denominator([0.23, 0.31]), denominator([0.004, 0.31]), denominator([0.231, 0.234])
    (100, 1000, 1000)
    """
    known = sorted(each for each in chances if not math.isnan(each))
    if not known:
        return _DENOMINATORS[0]
    rarest = min(min(each, 1 - each) for each in known)
    fitting = [each for each in _DENOMINATORS if rarest * each >= 2]
    smallest = fitting[0] if fitting else _DENOMINATORS[-1]
    if smallest == _DENOMINATORS[0] and known[-1] > known[0]:
        low, high = known[0], known[-1]
        same = round(low * smallest) == round(high * smallest)
        if same and round(low * 1_000) != round(high * 1_000):
            return 1_000
    return smallest


def frequency(probability: float, over: int | None = None) -> str:
    """Write a chance as a natural frequency.

    Parameters
    ----------
    probability : float
    over : int, optional
        The denominator; chosen for this chance alone where it is left out.

    Examples
    --------
    >>> frequency(0.23), frequency(0.004), frequency(0.004, 100)
    ('23 in 100', '4 in 1,000', 'under 1 in 100')
    """
    if math.isnan(probability):
        return NOT_KNOWN
    over = denominator([probability]) if over is None else over
    return f"{_cases(probability, over)} in {over:,}"


def frequency_span(lower: float, upper: float, over: int) -> str:
    """Write two chances as a range of natural frequencies over one denominator.

    Examples
    --------
    >>> frequency_span(0.18, 0.29, 100), frequency_span(0.001, 0.02, 100)
    ('18 to 29 in 100', 'under 1 to 2 in 100')
    """
    if math.isnan(lower) or math.isnan(upper):
        return NOT_KNOWN
    low, high = _cases(lower, over), _cases(upper, over)
    return f"{low} in {over:,}" if low == high else f"{low} to {high} in {over:,}"


def _cases(probability: float, over: int) -> str:
    cases = round(probability * over)
    if cases == 0:
        return "under 1"
    if cases == over:
        return f"over {over - 1:,}"
    return f"{cases:,}"


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
    return f"{_points(difference, decimals=decimals, sign=sign)} percentage points"


def points_span(lower: float, upper: float) -> str:
    """Write a range of differences of chances in percentage points.

    Examples
    --------
    >>> points_span(-0.021, 0.056), points_span(0.021, 0.056)
    ('−2 to +6 percentage points', '2.1 to 5.6 percentage points')
    """
    sign = lower < 0 < upper

    def say(difference: float, decimals: int | None = None) -> str:
        return _points(difference, decimals=decimals, sign=sign)

    return f"{_span(lower, upper, say, 0.01, _points_decimals)} percentage points"


def _points(difference: float, decimals: int | None = None, sign: bool = False) -> str:
    if math.isnan(difference):
        return NOT_KNOWN
    if difference == 0:
        return "0"
    points = 100 * difference
    if 0 < abs(points) < _LEAST_POINTS:
        within = f"{_LEAST_POINTS:g}"
        return f"under {within}" if points > 0 else f"between {MINUS}{within} and 0"
    places = _points_decimals(difference) if decimals is None else decimals
    while float(f"{points:.{places}f}") == 0:
        places += 1
    return _with_sign(f"{points:,.{places}f}", sign)


def _points_decimals(difference: float) -> int:
    size = abs(100 * difference)
    if size >= 10 or size == 0:
        return 0
    return 1 if size >= 1 else min(3, 1 - math.floor(math.log10(size)))


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
        return NOT_KNOWN
    if number > _RATIO_LIMIT:
        return f"over {_RATIO_LIMIT:,.0f}"
    if number < 1 / _RATIO_LIMIT:
        return f"under {1 / _RATIO_LIMIT:g}"
    places = _ratio_decimals(number) if decimals is None else decimals
    text = f"{number:,.{places}f}"
    while float(text.replace(",", "")) == 0:
        places += 1
        text = f"{number:,.{places}f}"
    return text


def ratio_interval(lower: float, upper: float) -> str:
    """Write the interval of a ratio, both ends with the same decimals where both are under 10.

    Examples
    --------
    >>> ratio_interval(1.084, 3.776), ratio_interval(0.0004, float("inf"))
    ('1.08 to 3.78', 'under 0.001 to over 1,000')
    """
    places = None
    if 1 / _RATIO_LIMIT <= lower <= upper < 10:
        places = max(_ratio_decimals(lower), _ratio_decimals(upper))
    low, high = ratio(lower, decimals=places), ratio(upper, decimals=places)
    return low if low == high else f"{low} to {high}"


def _ratio_decimals(number: float) -> int:
    from_one = abs(number - 1)
    if 0 < from_one < 0.00995:
        return 3 if from_one >= 0.000995 else (4 if from_one >= 0.00005 else 2)
    if number >= 99.95:
        return 0
    if number >= 9.995:
        return 1
    return 2 if number >= 0.0995 else 1 - math.floor(math.log10(number))


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
        return NOT_KNOWN
    if math.isinf(number):
        return "+∞" if number > 0 else f"{MINUS}∞"
    places = decimals
    if places is None:
        small = 0 < abs(number) < 0.0995
        places = min(8, 1 - math.floor(math.log10(abs(number)))) if small else 2
    return _with_sign(f"{number:,.{places}f}", True)


def _with_sign(text: str, plus: bool) -> str:
    # a number that rounds to nought has no sign
    nought = not any(figure in "123456789" for figure in text)
    bare = text.lstrip("-")
    if nought:
        return bare
    if text.startswith("-"):
        return f"{MINUS}{bare}"
    return f"+{bare}" if plus else bare


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
    if unit in ("%", "‰", "°", "′", "″"):
        return f"{text}{unit}"
    if unit in ("$", "£", "€", "¥", "₹"):
        bare = text.removeprefix(MINUS)
        return f"{MINUS if bare != text else ''}{unit}{bare}"
    return f"{text} {unit}"


def _figures(number: float) -> str:
    if math.isnan(number):
        return NOT_KNOWN
    if math.isinf(number):
        return "∞" if number > 0 else f"{MINUS}∞"
    if number == 0:
        return "0"
    whole = math.floor(math.log10(abs(number))) + 1
    if not -6 < whole <= 15:
        return f"{number:.4g}".replace("-", MINUS)
    short = float(f"{number:.6g}")
    exact = math.isclose(short, number, rel_tol=1e-9, abs_tol=0.0)
    places = max(0, (6 if exact else 4) - whole)
    text = f"{number:,.{places}f}" if abs(number) >= 9999.5 else f"{number:.{places}f}"
    if "." in text:
        text = text.rstrip("0").rstrip(".")
    return _with_sign(text, False)


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
        return f"{near.numerator:,}"
    return f"{near.numerator:,}/{near.denominator:,}"


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
        return _span(lower, upper, say, 0.01, lambda p: _chance_decimals(100 * p))
    if say is ratio:
        return ratio_interval(lower, upper)
    if say is quantity:
        low, high = quantity(lower), quantity(upper)
        return low if low == high else f"{low} to {high}"
    return _span(lower, upper, say, 1.0, lambda _: 2)


def _span(
    lower: float, upper: float, say: Say, unit: float, decimals: Callable[[float], int]
) -> str:
    width = upper - lower
    if not math.isfinite(width):
        low, high = say(lower), say(upper)
        return low if low == high else f"{low} to {high}"
    warranted = 0
    while warranted < _MOST_DECIMALS and unit * 10.0**-warranted > width / 5:
        warranted += 1
    places = min(warranted, max(decimals(lower), decimals(upper)))
    low, high = say(lower, decimals=places), say(upper, decimals=places)
    while low == high and places < warranted:
        places += 1
        low, high = say(lower, decimals=places), say(upper, decimals=places)
    return low if low == high else f"{low} to {high}"


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


def p_value(p: float) -> str:
    """Write a p-value: two decimals, three below 0.1, never nought and never one.

    Examples
    --------
    >>> p_value(0.2345), p_value(0.0321), p_value(1e-12), p_value(0.999)
    ('0.23', '0.032', 'under 0.001', 'over 0.99')
    """
    if math.isnan(p):
        return NOT_KNOWN
    if p < 0.001:
        return "under 0.001"
    if p > 0.99:
        return "over 0.99"
    return f"{p:.3f}" if p < 0.0995 else f"{p:.2f}"
