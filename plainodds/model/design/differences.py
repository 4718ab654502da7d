"""First derivatives by fourth-order finite differences, one-sided at a bound."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np
from numpy.typing import NDArray

from plainodds.errors import QuestionRefused

__all__ = ["derivative"]

Floats = NDArray[np.float64]

# 24 times the weights of the derivative of the quartic through five equidistant points, at
# the point of that index: Abramowitz & Stegun, Handbook of Mathematical Functions, table 25.2.
_FIVE_POINTS = np.array(
    [
        [-50, 96, -72, 32, -6],
        [-6, -20, 36, -12, 2],
        [2, -16, 0, 16, -2],
        [-2, 12, -36, 20, 6],
        [6, -32, 72, -96, 50],
    ],
    dtype=float,
)
# Twice the same of the parabola through the three nearest of them: how far the two are
# apart tells how well the points suit the function.
_THREE_POINTS = np.array(
    [
        [-3, 4, -1, 0, 0],
        [-1, 0, 1, 0, 0],
        [0, -1, 0, 1, 0],
        [0, 0, -1, 0, 1],
        [0, 0, 1, -4, 3],
    ],
    dtype=float,
)
_STEP = 1e-4
_ROUNDING = np.finfo(float).eps
_TINY = np.finfo(float).tiny


def derivative(
    function: Callable[[Floats], Floats], x: Floats, lower: float, upper: float, spread: float
) -> Floats:
    """Differentiate a function that works element by element.

    Parameters
    ----------
    function : callable
        From (m,) to (m, width), m being a multiple of n: copies of x one after the
        other, each moved a little. Not called outside [lower, upper].
    x : array (n,)
    lower, upper : float
        Bounds of the function's domain, possibly infinite.
    spread : float
        Over how much x ranges in the data.

    Returns
    -------
    array (n, width)

    Raises
    ------
    QuestionRefused
        If the function cannot be computed close to x.

    Notes
    -----
    Five points a ten-thousandth of the spread apart suit a spline or a standardised
    number, also where x is 0; five points a ten-thousandth of x itself apart suit 1/x and
    log(x) where x is small beside the spread. Each is tried, and for each element the one
    with the smaller estimated error is taken. A cubic is differentiated to rounding error.
    """
    size = np.clip(np.abs(x), 1e-6 * spread, spread)
    near, near_error = _differences(function, x, lower, upper, _STEP * size)
    try:
        wide, wide_error = _differences(function, x, lower, upper, np.full(x.shape, _STEP * spread))
    except QuestionRefused:
        return near
    return np.where(wide_error < near_error, wide, near)


def _differences(
    function: Callable[[Floats], Floats], x: Floats, lower: float, upper: float, step: Floats
) -> tuple[Floats, Floats]:
    """Derivatives and their estimated errors, each of shape (n, width)."""
    # steps that a narrow domain has room for, and that differ from x in the last digits
    step = np.maximum(np.minimum(step, (upper - lower) / 4.0), 8 * _ROUNDING * np.abs(x))
    place = np.full(x.shape, 2)
    for shift in (1, 2):
        # where the central points would leave the domain, slide them inwards
        place = np.where(x - (3 - shift) * step < lower, 2 - shift, place)
        place = np.where(x + (3 - shift) * step > upper, 2 + shift, place)
    moved = np.clip(x + (np.arange(5)[:, None] - place) * step, lower, upper)
    values = np.asarray(function(moved.ravel()), dtype=float).reshape(5, len(x), -1)
    step = step[:, None]
    rounding = _ROUNDING * np.abs(values).max(axis=0) / step
    # the weights sum to zero, so a constant may be taken off, and then cancels exactly
    values = values - values[2]
    five = np.einsum("nj,jnk->nk", _FIVE_POINTS[place], values) / (24 * step)
    three = np.einsum("nj,jnk->nk", _THREE_POINTS[place], values) / (2 * step)
    # what three points miss is of order step², what five miss of order step⁴
    steepest = np.abs(values).max(axis=0) / step
    return five, (five - three) ** 2 / np.maximum(steepest, _TINY) + rounding
