"""A function of one number at very many values, read from a table where that is exact."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

__all__ = ["FEW", "Table", "tabulated"]

Floats = NDArray[np.float64]

_CELLS = 4_096
_TOLERANCE = 1e-9
FEW = 5 * _CELLS
"""Up to so many values a table costs more than it saves."""


@dataclass(frozen=True, eq=False)
class Table:
    """A costly (n,) -> (n, width) function, such as a spline's derivative by differences.

    A parabola through three points in each of 4,096 cells, which the slope of a cubic
    spline is, between knots. Two more points in each cell check it to one part in 10⁹; in
    a cell that fails, where a knot or a kink lies, and outside the table's range, the
    function itself is used.
    """

    function: Callable[[Floats], Floats]
    low: float
    high: float
    left: Floats
    linear: Floats
    square: Floats
    wrong: NDArray[np.bool_]

    def __call__(self, x: Floats) -> Floats:
        """The function's values, shape (n, width)."""
        at = (x - self.low) * (_CELLS / (self.high - self.low))
        cell = np.clip(at.astype(np.intp), 0, _CELLS - 1)
        within = (at - cell)[:, None]
        values = self.square[cell]
        values *= within
        values += self.linear[cell]
        values *= within
        values += self.left[cell]
        direct = np.nonzero(self.wrong[cell] | (x < self.low) | (x > self.high))[0]
        if len(direct):
            values[direct] = self.function(x[direct])
        return np.asarray(values)


def tabulated(function: Callable[[Floats], Floats], low: float, high: float) -> Table:
    """Tabulate a function that works element by element, over a range."""
    nodes = np.linspace(low, high, 4 * _CELLS + 1)
    table = function(nodes)
    left, middle, right = table[:-1:4], table[2::4], table[4::4]
    linear, square = 4 * middle - 3 * left - right, 2 * (left + right) - 4 * middle
    scale = np.abs(table).max(axis=0) + np.finfo(float).tiny
    wrong = np.zeros(_CELLS, dtype=bool)
    for quarter in (1, 3):
        u = quarter / 4
        off = np.abs(left + u * (linear + u * square) - table[quarter::4])
        wrong |= (off > _TOLERANCE * scale).any(axis=1)
    # a kink at a cell's edge may show on one side only
    wrong |= np.append(wrong[1:], False) | np.append(False, wrong[:-1])
    return Table(function, low, high, left, linear, square, wrong)
