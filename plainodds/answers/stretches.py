"""Where along a predictor an effect differs from nothing."""

from __future__ import annotations

from collections.abc import Callable
from typing import Literal, TypeAlias

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.delta import Intervals
from plainodds.answers.roots import roots_between, turning_points
from plainodds.values import Scalar, value

__all__ = ["EffectAlong", "Measured", "Stretch", "bounds_along", "signs", "turns_along"]

Floats = NDArray[np.float64]
Sign: TypeAlias = Literal["above", "below", "open"]

Measured: TypeAlias = Callable[[Floats], Intervals]
"""An effect at n values of a number, on a scale on which 0 is no effect."""

# a turn of less than this share of the largest effect is rounding
_ROUNDING = 1e-9


@value
class Stretch:
    """A stretch of one predictor on which another one's effect is told the same way.

    Attributes
    ----------
    start, end : scalar
        Its ends; the same level twice where the predictor has levels.
    sign : {"above", "below", "open"}
        The whole interval above no effect, below it, or holding it.
    share : float
        Of the rows; nan where the model carries none.
    """

    start: Scalar
    end: Scalar
    sign: Sign
    share: float


@value
class EffectAlong:
    """The effect of `a` as `b` varies.

    Attributes
    ----------
    at : tuple of scalars
        Values of `b`.
    estimate : tuple of float
        Risk differences, slopes per unit, or odds ratios: as the question asks.
    se, lower, upper : tuple of float, or None where no interval can be had
    supported : tuple of bool
        Whether rows lie near each value.
    stretches : tuple of Stretch
        Cover the range of `at`, in order, but for values at which the rows leave the
        effect open (its estimate is nan); empty where there is no interval.
    turns : tuple of float
        Values of a numeric `b` at which the effect turns from growing to shrinking or
        back: there the interaction changes its sign.
    """

    at: tuple[Scalar, ...]
    estimate: tuple[float, ...]
    se: tuple[float, ...] | None
    lower: tuple[float, ...] | None
    upper: tuple[float, ...] | None
    supported: tuple[bool, ...]
    stretches: tuple[Stretch, ...]
    turns: tuple[float, ...]


def signs(found: Intervals) -> tuple[Sign | None, ...]:
    """On which side of no effect each interval lies; None for what the rows leave open.

    Empty where there are no intervals.
    """
    if found.lower is None or found.upper is None:
        return ()
    return tuple(
        None if np.isnan(low) else "above" if low > 0 else "below" if high < 0 else "open"
        for low, high in zip(found.lower, found.upper, strict=True)
    )


def bounds_along(measured: Measured, at: Floats, found: Intervals) -> Floats:
    """Where an end of the interval is 0, between the first and the last of some values.

    A grid's cell is looked into where an end changes its sign within it, and where an end
    comes close to 0 and turns back, so that it may have crossed twice.

    Parameters
    ----------
    measured : callable
    at : array (n,)
        Increasing values.
    found : Intervals
        What `measured` gives there.
    """
    if found.lower is None or found.upper is None or len(at) < 2:
        return np.empty(0)

    def lower(x: Floats) -> Floats:
        return np.asarray(measured(x).lower)

    def upper(x: Floats) -> Floats:
        return np.asarray(measured(x).upper)

    low_brackets = _brackets(*_with_dips(lower, at, found.lower))
    high_brackets = _brackets(*_with_dips(upper, at, found.upper))
    of_lower = np.arange(low_brackets.shape[1] + high_brackets.shape[1]) < low_brackets.shape[1]

    def ends(x: Floats) -> Floats:
        both = measured(x)
        return np.where(of_lower, np.asarray(both.lower), np.asarray(both.upper))

    # one search for all, as a look at many rows costs the same for one value as for a few
    return np.unique(roots_between(ends, *np.hstack([low_brackets, high_brackets])))


def _brackets(nodes: Floats, values: Floats) -> Floats:
    """Between which nodes the sign changes: low, high, and the values there, (4, m)."""
    known = np.isfinite(values[:-1]) & np.isfinite(values[1:])
    cells = np.nonzero(((values[:-1] > 0) != (values[1:] > 0)) & known)[0]
    return np.array([nodes[cells], nodes[cells + 1], values[cells], values[cells + 1]])


def _with_dips(
    along: Callable[[Floats], Floats], at: Floats, ends: Floats
) -> tuple[Floats, Floats]:
    """The grid with a point more where the function dips through 0 within a cell."""
    last = len(at) - 1
    dips = _may_dip(ends)
    low, high = at[np.maximum(dips - 1, 0)], at[np.minimum(dips + 1, last)]
    if not len(dips):
        return at, ends
    where, _ = turning_points(along, low, high, -np.sign(ends[dips]))
    # the parabola's own value may be off where the function has a kink
    value = along(where)
    through = np.sign(value) == -np.sign(ends[dips])
    nodes = np.append(at, where[through])
    order = np.argsort(nodes, kind="stable")
    return nodes[order], np.append(ends, value[through])[order]


def _may_dip(ends: Floats) -> NDArray[np.intp]:
    """Points nearest to 0 among their neighbours, from where it may well go on to 0.

    A parabola comes much nearer still, or, as a kink may lie between two points, the
    function changes by as much from one point to the next.
    """
    size = np.abs(ends)
    before, after = np.append(np.inf, size[:-1]), np.append(size[1:], np.inf)
    candidates = np.nonzero((size > 0) & (size <= before) & (size <= after))[0]
    if len(ends) < 3:
        return candidates
    # at either end of the grid the parabola through the first or the last three points
    middle = np.clip(candidates, 1, len(ends) - 2)
    left, centre, right = (size[middle + shift] for shift in (-1, 0, 1))
    bend = left - 2 * centre + right
    with np.errstate(divide="ignore", invalid="ignore"):
        beside = (left - right) / (2 * bend)
        lowest = centre - bend * beside**2 / 2
    much_nearer = (bend > 0) & (np.abs(beside) <= 1) & (lowest < size[candidates] / 2)
    change = np.maximum(np.abs(left - centre), np.abs(right - centre))
    return np.asarray(candidates[much_nearer | (size[candidates] <= change)])


def turns_along(measured: Measured, at: Floats, estimate: Floats) -> tuple[float, ...]:
    """Where an effect turns from growing to shrinking or back, in order."""
    scale = float(np.abs(estimate).max())
    if len(at) < 3 or float(np.ptp(estimate)) <= _ROUNDING * scale:
        return ()
    steps = np.diff(estimate)
    # a step of rounding says nothing: the effect goes on as before
    direction = np.where(np.abs(steps) > 1e-12 * scale, np.sign(steps), 0.0)
    told = np.nonzero(direction)[0]
    changes = np.nonzero(np.diff(direction[told]))[0]
    low, high = at[told[changes]], at[told[changes + 1] + 1]
    where, value = turning_points(
        lambda x: measured(x).estimate, low, high, direction[told[changes]]
    )
    turns: list[float] = []
    level = float(estimate[0])
    for x, reached in zip(where.tolist(), value.tolist(), strict=True):
        if abs(reached - level) > _ROUNDING * scale:
            turns.append(x)
            level = reached
    return tuple(turns)
