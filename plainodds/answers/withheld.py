"""Which counts of events do not leave the notebook.

Source: common practice in official statistics. What is too few is withheld first; where
that is one count alone, it would follow from the others and a total that captions tell,
and so the next smallest is withheld with it.
"""

from __future__ import annotations

import math
from collections.abc import Sequence

__all__ = ["withheld"]


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
