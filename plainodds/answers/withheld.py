"""Counts of few: raised, merged with their neighbours, or withheld.

Source: common practice in official statistics. Of events, what is too few is withheld first;
where that is one count alone, it would follow from the others and a total that captions tell,
and so the next smallest is withheld with it.
"""

from __future__ import annotations

import math
from collections.abc import Sequence
from typing import TypeVar

__all__ = ["merged", "raised", "withheld"]

Number = TypeVar("Number", int, float)


def raised(number: Number, smallest: int) -> Number:
    """A count, to be read as "up to" where it is the smallest that may leave.

    Examples
    --------
    >>> raised(3, 10), raised(0, 10), raised(12.5, 10)
    (10, 0, 12.5)
    """
    return type(number)(smallest) if 0 < number < smallest else number


def merged(
    edges: Sequence[float], counts: Sequence[tuple[Number, ...]], smallest: int
) -> tuple[tuple[float, ...], list[tuple[Number, ...]]]:
    """Bins merged with their neighbours until none holds too few of anything.

    Parameters
    ----------
    edges : sequence of float
        One more than bins.
    counts : sequence of tuples
        Of each bin, one for each kind of case.
    smallest : int

    Returns
    -------
    tuple
        Edges and counts; what is still too few, in a single bin, is raised.
    """
    ends, held = list(edges), list(counts)
    place = 0
    while place < len(held) and len(held) > 1:
        if not any(0 < each < smallest for each in held[place]):
            place += 1
            continue
        # with the neighbour above, or with the one below where it is the last
        place = min(place, len(held) - 2)
        both = zip(held[place], held[place + 1], strict=True)
        held[place : place + 2] = [tuple(a + b for a, b in both)]
        del ends[place + 1]
    return tuple(ends), [tuple(raised(each, smallest) for each in kinds) for kinds in held]


def withheld(counts: Sequence[tuple[float, float]], smallest: int) -> tuple[bool, ...]:
    """Which of some counts that add up to a known total are not told.

    Parameters
    ----------
    counts : sequence of (events, cases)
        nan for events that are withheld already.
    smallest : int
        Fewer events than these, or fewer cases without one, are too few; none is not.

    Examples
    --------
    >>> withheld([(40.0, 400.0), (12.0, 300.0), (3.0, 200.0)], 10)
    (False, True, True)
    """
    hidden = [math.isnan(events) or _few(events, cases, smallest) for events, cases in counts]
    if sum(hidden) == 1:
        told = [place for place, is_hidden in enumerate(hidden) if not is_hidden]
        # none, and all, are as good as told by the picture, so they hide little
        beside = min(told, key=lambda place: _margin(*counts[place]) or math.inf, default=None)
        if beside is not None:
            hidden[beside] = True
    return tuple(hidden)


def _few(events: float, cases: float, smallest: int) -> bool:
    return any(0 < each < smallest for each in (events, cases - events))


def _margin(events: float, cases: float) -> float:
    return min(events, cases - events)
