"""Chances in percent and as natural frequencies."""

from __future__ import annotations

import math
from collections.abc import Iterable

from plainodds.phrases.numbers.marks import marked
from plainodds.phrases.numbers.wording import wording

__all__ = [
    "cases",
    "chance",
    "chance_decimals",
    "denominator",
    "denominator_of_change",
    "frequencies",
    "frequency",
    "frequency_span",
    "told_apart",
]

_LEAST_CHANCE = 0.001
_DENOMINATORS = (100, 1_000, 10_000)
_LEAST_APART = 5


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
        return wording().not_known
    if probability < _LEAST_CHANCE:
        return wording().under.format(_percent("0.1"))
    if probability > 1 - _LEAST_CHANCE:
        return wording().over.format(_percent("99.9"))
    percent = 100 * probability
    places = chance_decimals(percent) if decimals is None else decimals
    text = f"{percent:.{places}f}"
    while float(text) in (0.0, 100.0):
        places += 1
        text = f"{percent:.{places}f}"
    if decimals is None and chance_decimals(float(text)) < places:
        text = f"{percent:.{chance_decimals(float(text))}f}"
    return _percent(text)


def _percent(figures: str) -> str:
    return wording().percent.format(marked(figures), "%")


def told_apart(first: float, second: float) -> tuple[str, str]:
    """Write two chances with as many decimals, up to two, as tell them apart.

    Examples
    --------
    >>> told_apart(0.231, 0.234), told_apart(0.2, 0.3), told_apart(0.2, 0.2)
    (('23.1%', '23.4%'), ('20%', '30%'), ('20%', '20%'))
    """
    told = chance(first), chance(second)
    for decimals in (1, 2):
        finer = chance(first, decimals=decimals), chance(second, decimals=decimals)
        if told[0] != told[1]:
            break
        if finer[0] != finer[1]:
            told = finer
    return told


def chance_decimals(percent: float) -> int:
    """How many decimals a percentage is written with on its own."""
    if 10 <= percent <= 90:
        return 0
    return 2 if percent < 1 else 1


def denominator(chances: Iterable[float]) -> int:
    """Choose the one denominator over which a set of chances is written as frequencies.

    The smallest of 100, 1,000 and 10,000 over which the rarest event (or non-event)
    still counts: at least two for a chance alone, at least five where chances are
    compared.

    Source: one fixed denominator for all, Gigerenzer et al. 2007; Fagerlin,
    Zikmund-Fisher & Ubel 2011.

    Examples
    --------
    >>> denominator([0.23]), denominator([0.23, 0.31]), denominator([0.034, 0.31])
    (100, 100, 1000)
    """
    known = sorted(each for each in chances if not math.isnan(each))
    if not known:
        return _DENOMINATORS[0]
    compared = known[-1] > known[0]
    rarest = min(min(each, 1 - each) for each in known)
    fitting = [each for each in _DENOMINATORS if rarest * each >= (5 if compared else 2)]
    smallest = fitting[0] if fitting else _DENOMINATORS[-1]
    if smallest == _DENOMINATORS[0] and compared:
        low, high = known[0], known[-1]
        same = round(low * smallest) == round(high * smallest)
        return 1_000 if same and round(low * 1_000) != round(high * 1_000) else smallest
    return smallest


def denominator_of_change(start: float, end: float) -> int:
    """Choose the one denominator over which two chances and their difference are told.

    That of the two chances, or 1,000 where their difference would come to fewer than
    five in 100 and be lost in rounding.

    Examples
    --------
    >>> denominator_of_change(0.2, 0.3), denominator_of_change(0.076, 0.064)
    (100, 1000)
    """
    over = denominator((start, end))
    return max(over, 1_000) if 0 < abs(end - start) * over < _LEAST_APART else over


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
        return wording().not_known
    over = denominator([probability]) if over is None else over
    return _out_of(cases(probability, over), over)


def _out_of(told: str, over: int) -> str:
    return wording().out_of.format(told, marked(f"{over:,}"))


def frequency_span(lower: float, upper: float, over: int) -> str:
    """Write two chances as a range of natural frequencies over one denominator.

    Examples
    --------
    >>> frequency_span(0.18, 0.29, 100), frequency_span(0.001, 0.02, 100)
    ('18 to 29 in 100', 'under 1 to 2 in 100')
    """
    if math.isnan(lower) or math.isnan(upper):
        return wording().not_known
    low, high = cases(lower, over), cases(upper, over)
    return _out_of(low if low == high else wording().to.format(low, high), over)


def frequencies(chances: Iterable[float], over: int) -> str:
    """Write several chances as natural frequencies over one denominator, said once.

    Examples
    --------
    >>> frequencies([0.12, 0.07, 0.03], 100), frequencies([0.12], 100)
    ('12, 7 and 3 in 100', '12 in 100')
    """
    *first, last = (cases(each, over) for each in chances)
    told = wording().both.format(", ".join(first), last) if first else last
    return _out_of(told, over)


def cases(probability: float, over: int) -> str:
    """Write a chance as cases, their denominator being said elsewhere.

    Examples
    --------
    >>> cases(0.23, 100), cases(0.001, 100), cases(0.9999, 1000)
    ('23', 'under 1', 'over 999')
    """
    if math.isnan(probability):
        return wording().not_known
    counted = round(probability * over)
    if counted == 0:
        return wording().under.format("1")
    if counted == over:
        return wording().over.format(marked(f"{over - 1:,}"))
    return marked(f"{counted:,}")
