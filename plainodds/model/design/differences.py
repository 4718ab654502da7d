"""First derivatives by fourth-order finite differences, one-sided at a bound."""

from __future__ import annotations

from collections.abc import Callable

import numpy as np
from numpy.typing import NDArray

__all__ = ["derivative"]

Floats = NDArray[np.float64]

# Weights of the derivative of the quartic through five equidistant points, at the
# point of that index: Abramowitz & Stegun, Handbook of Mathematical Functions, table 25.2.
_WEIGHTS = (
    np.array(
        [
            [-50, 96, -72, 32, -6],
            [-6, -20, 36, -12, 2],
            [2, -16, 0, 16, -2],
            [-2, 12, -36, 20, 6],
            [6, -32, 72, -96, 50],
        ],
        dtype=float,
    )
    / 24.0
)
_STEP = 1e-4


def derivative(
    function: Callable[[Floats], Floats], x: Floats, lower: float, upper: float
) -> Floats:
    """Differentiate an (n,) -> (n, width) function that works element by element.

    Parameters
    ----------
    function : callable
        Not called outside [lower, upper].
    x : array (n,)
    lower, upper : float
        Bounds of the function's domain, possibly infinite.

    Returns
    -------
    array (n, width)

    Notes
    -----
    Five points, a ten-thousandth of the value's own size apart: the error of a smooth
    function is of order step⁴, and a cubic is differentiated to rounding error.
    """
    finite = upper - lower if np.isfinite(upper - lower) else 1.0
    size = np.minimum(np.maximum(np.abs(x), 1e-3 * finite), finite)
    step = np.maximum(size * _STEP, 1e-12)
    # where the central stencil would leave the domain, slide it inwards
    place = np.full(x.shape, 2)
    for shift in (1, 2):
        place = np.where(x - (3 - shift) * step < lower, 2 - shift, place)
        place = np.where(x + (3 - shift) * step > upper, 2 + shift, place)
    total: Floats | float = 0.0
    for j in range(5):
        moved = np.clip(x + (j - place) * step, lower, upper)
        total = total + _WEIGHTS[place, j][:, None] * function(moved)
    return np.asarray(total / step[:, None])
