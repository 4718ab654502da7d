"""Roots and turning points of many functions at once, where each look costs a pass over rows."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np
from numpy.typing import NDArray

__all__ = ["roots_between", "turning_points"]

Floats = NDArray[np.float64]

_PASSES = 80
_CELLS = (16, 4, 4)


def roots_between(
    function: Callable[[Floats], Floats],
    low: Floats,
    high: Floats,
    at_low: Floats,
    at_high: Floats,
) -> Floats:
    """One root in each of m brackets, to the last digits.

    Inverse quadratic steps where they are safe, bisection where they are not. Source:
    Chandrupatla 1997 (Advances in Engineering Software 28:145).

    Parameters
    ----------
    function : callable
        From (m,) to (m,); the j-th element belongs to the j-th bracket.
    low, high : array (m,)
    at_low, at_high : array (m,)
        The function's values there, of opposite signs or 0.
    """
    if not len(low):
        return low
    x1, x2, f1, f2 = high, low, at_high, at_low
    found = np.where(np.abs(f2) < np.abs(f1), x2, x1)
    done = (f1 == 0) | (f2 == 0)
    share = np.full(len(low), 0.5)
    for _ in range(_PASSES):
        if done.all():
            break
        x = x1 + share * (x2 - x1)
        f = function(x)
        same = np.sign(f) == np.sign(f1)
        x3, f3 = np.where(same, x1, x2), np.where(same, f1, f2)
        x2, f2 = np.where(same, x2, x1), np.where(same, f2, f1)
        x1, f1 = x, f
        best = np.abs(f2) < np.abs(f1)
        found = np.where(done, found, np.where(best, x2, x1))
        width = np.abs(x2 - x1)
        tolerance = 4 * np.finfo(float).eps * np.maximum(np.abs(found), np.abs(high - low))
        done |= (width <= 2 * tolerance) | (f == 0)
        least = np.minimum(tolerance / np.where(width > 0, width, 1.0), 0.5)
        share = np.clip(_proposed(x1, x2, x3, f1, f2, f3), least, 1 - least)
    return found


def _proposed(x1: Floats, x2: Floats, x3: Floats, f1: Floats, f2: Floats, f3: Floats) -> Floats:
    """Where between x1 and x2 to look next, as a share of the way."""
    with np.errstate(divide="ignore", invalid="ignore"):
        xi, phi = (x1 - x2) / (x3 - x2), (f1 - f2) / (f3 - f2)
        alpha = (x3 - x1) / (x2 - x1)
        inverse = f1 / (f1 - f2) * f3 / (f3 - f2) - alpha * f1 / (f3 - f1) * f2 / (f2 - f3)
    safe = (phi**2 < xi) & ((1 - phi) ** 2 < 1 - xi) & np.isfinite(inverse)
    return np.where(safe, inverse, 0.5)


def turning_points(
    function: Callable[[Floats], Floats], low: Floats, high: Floats, sign: Floats
) -> tuple[Floats, Floats]:
    """The highest point (sign 1) or lowest point (sign −1) within each of m brackets.

    A fine grid in each, the parabola through the best three of its points, and twice more
    close around that: where the function is smooth, to one part in 10⁸.

    Parameters
    ----------
    function : callable
        From (n,) to (n,), element by element.
    low, high : array (m,)
    sign : array (m,)

    Returns
    -------
    where, value : array (m,)
    """
    if not len(low):
        return low, low
    for cells in _CELLS:
        grid = np.linspace(low, high, cells + 1)
        values = np.asarray(function(grid.ravel())).reshape(grid.shape)
        best = np.clip((values * sign).argmax(axis=0), 1, cells - 1)
        each = np.arange(len(low))
        step = (high - low) / cells
        left, middle, right = (values[best + shift, each] for shift in (-1, 0, 1))
        bend = left - 2 * middle + right
        with np.errstate(divide="ignore", invalid="ignore"):
            beside = np.clip(np.where(bend != 0, (left - right) / (2 * bend), 0.0), -1, 1)
        where, value = grid[best, each] + beside * step, middle + beside * (right - left) / 4
        low, high = np.maximum(low, where - step), np.minimum(high, where + step)
    return where, value
