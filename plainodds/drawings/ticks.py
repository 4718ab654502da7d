"""Ticks that people read: simple fractions for odds, percentages for chances, round numbers."""

from __future__ import annotations

import math
from collections.abc import Sequence
from fractions import Fraction
from itertools import pairwise
from typing import Any

import numpy as np
from matplotlib.axes import Axes
from matplotlib.ticker import MaxNLocator, NullLocator

__all__ = ["bare", "fraction_ticks", "label_ticks", "outer_fractions", "round_ticks"]

# where a locator remembers what it was made for
_HELD = "plainodds_ticks"
# what lies above 1, from coarse to fine; a ladder holds the reciprocals too
_ABOVE: tuple[list[Fraction], ...] = (
    [Fraction(10**power) for power in range(3, 46, 3)],
    [Fraction(10**power) for power in range(1, 16)],
    [Fraction(4**power) for power in range(1, 8)],
    [Fraction(2**power) for power in range(1, 11)],
    [Fraction(3, 2), Fraction(2), Fraction(3), Fraction(4)],
    [Fraction(5, 4), Fraction(3, 2), Fraction(2)],
    [Fraction(10, 9), Fraction(5, 4), Fraction(3, 2)],
)
_LADDERS = tuple(sorted({Fraction(1), *above, *(1 / each for each in above)}) for above in _ABOVE)


def fraction_ticks(lower: float, upper: float, apart: float = 1.0) -> tuple[float, ...]:
    """Simple fractions within a range of odds or ratios.

    The finest of a fixed set of ladders (1/4, 1/2, 1, 2, 4 among them) that spans the
    range and whose neighbours stand far enough apart.

    Parameters
    ----------
    lower, upper : float
        Ends of the range, both above 0.
    apart : float
        The least ratio of neighbouring ticks.

    Returns
    -------
    tuple of float
        In rising order; empty if the range holds none.

    Examples
    --------
    >>> fraction_ticks(0.2, 5.0, apart=1.5)
    (0.25, 0.5, 1.0, 2.0, 4.0)
    """
    best: tuple[float, ...] = ()
    for ladder in _LADDERS:
        inside = tuple(
            float(each) for each in ladder if lower * (1 - 1e-9) <= each <= upper * (1 + 1e-9)
        )
        # a ladder may leave its own last step uncovered, no more
        spans = (
            ladder[0] <= lower * ladder[1] / ladder[0]
            and ladder[-1] * (ladder[-1] / ladder[-2]) >= upper
        )
        steps = [after / before for before, after in pairwise(inside)]
        if spans and len(inside) >= len(best) and min(steps, default=apart) >= apart * (1 - 1e-9):
            best = inside
    return best


def outer_fractions(lower: float, upper: float) -> tuple[float, float]:
    """The nearest simple fractions on either side of 1 that a readable axis has to reach.

    Examples
    --------
    >>> outer_fractions(0.97, 1.04) == (0.8, 1.25)
    True
    >>> outer_fractions(0.4, 3.0) == (0.4, 3.0)
    True
    """
    return min(lower, 0.8), max(upper, 1.25)


def round_ticks(lower: float, upper: float, most: int = 6) -> tuple[float, ...]:
    """Round numbers within a range, at most so many."""
    if not (math.isfinite(lower) and math.isfinite(upper)) or upper <= lower:
        return ()
    locator = MaxNLocator(nbins=max(1, most), steps=[1, 2, 2.5, 5, 10])
    ticks = np.asarray(locator.tick_values(lower, upper), dtype=float)
    slack = 1e-9 * (upper - lower)
    inside = ticks[(ticks >= lower - slack) & (ticks <= upper + slack)]
    return tuple(float(np.round(each, 12)) + 0.0 for each in inside)


def label_ticks(
    axes: Axes, which: str, ticks: Sequence[float], labels: Sequence[str], style: dict[str, Any]
) -> None:
    """Put labelled ticks on the axis "x" or "y", unless they are there already.

    Replacing ticks costs more than all else in an update, so equal ones stay.
    """
    axis = axes.xaxis if which == "x" else axes.yaxis
    wanted = (tuple(ticks), tuple(labels))
    if getattr(axis.get_major_locator(), _HELD, None) == wanted:
        return
    axis.set_ticks(list(ticks), labels=list(labels), **style)
    axis.set_minor_locator(NullLocator())
    setattr(axis.get_major_locator(), _HELD, wanted)


def bare(axes: Axes) -> None:
    """Take from axes whatever the user's settings put there: patch, spines, grid, ticks."""
    axes.patch.set_visible(False)
    axes.grid(visible=False, which="both")
    for spine in axes.spines.values():
        spine.set_visible(False)
    axes.tick_params(
        which="both", left=False, right=False, top=False, bottom=False, labelleft=False,
        labelright=False, labeltop=False, labelbottom=False, length=0,
    )  # fmt: skip
    for axis in (axes.xaxis, axes.yaxis):
        axis.set_major_locator(NullLocator())
        axis.set_minor_locator(NullLocator())
