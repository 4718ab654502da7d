"""How a design's columns depend on two numbers at once: ∂²(column)/∂a∂b."""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray

from plainodds.model.design.design import Atom, Coded, Column, Design, Floats
from plainodds.model.design.differences import derivative

__all__ = ["cross_derivatives"]


def cross_derivatives(
    design: Design, a: str, b: str, coded: Coded
) -> tuple[NDArray[np.intp], Floats]:
    """Positions of the T columns that both numbers touch, and their ∂²/∂a∂b, shape (n, T).

    By the product rule over each column's factors: one factor's slope along `a` times
    another one's along `b`, and where one factor reads both numbers its own cross
    derivative, by differences of differences.

    Parameters
    ----------
    design : Design
    a, b : str
        Two different numbers.
    coded : mapping of name to coded array (n,)
    """
    touched = np.intersect1d(design.touched([a]), design.touched([b]))
    result = np.zeros((len(coded[a]), len(touched)))
    slopes = _Slopes(design, coded)
    for place, i in enumerate(touched):
        column = design.columns[i]
        atoms = column.atoms
        for p, (at, k) in enumerate(atoms):
            if a not in design.factors[at].variables:
                continue
            if b in design.factors[at].variables:
                beside = slopes.product(column, atoms[:p] + atoms[p + 1 :])
                result[:, place] += slopes.across(at, a, b)[:, k] * beside
            for q, (other, m) in enumerate(atoms):
                if q == p or b not in design.factors[other].variables:
                    continue
                rest = tuple(atom for r, atom in enumerate(atoms) if r not in (p, q))
                along = slopes.along(at, a)[:, k] * slopes.along(other, b)[:, m]
                result[:, place] += along * slopes.product(column, rest)
    return touched, result


class _Slopes:
    """A design's factors and their slopes at some rows, each computed once."""

    def __init__(self, design: Design, coded: Coded) -> None:
        self.design, self.coded = design, coded
        self._along: dict[tuple[int, str], Floats] = {}
        self._across: dict[int, Floats] = {}

    def along(self, position: int, name: str) -> Floats:
        """d(factor)/d(name)."""
        if (position, name) not in self._along:
            self._along[position, name] = self.design.factor_derivative(position, name, self.coded)
        return self._along[position, name]

    def across(self, position: int, a: str, b: str) -> Floats:
        """∂²(factor)/∂a∂b of a factor that reads both."""
        if position not in self._across:
            self._across[position] = self._differences(position, a, b)
        return self._across[position]

    def product(self, column: Column, atoms: tuple[Atom, ...]) -> Floats:
        """The product of some of a column's factors, with its scale."""
        n = len(next(iter(self.coded.values())))
        rest = Column(column.name, atoms, column.scale)
        return self.design.values_of([rest], self.coded, n)[:, 0]

    def _differences(self, position: int, a: str, b: str) -> Floats:
        design, coded = self.design, self.coded
        n = len(coded[b])
        names = design.factors[position].variables

        def slope_along_a(x: Floats) -> Floats:
            still = {name: np.tile(coded[name], len(x) // n) for name in names}
            return design.factor_derivative(position, a, {**still, b: x})

        lower, upper = design.allowed.get(b, (-np.inf, np.inf))
        x = np.asarray(coded[b], dtype=float)
        return derivative(slope_along_a, x, lower, upper, design.spreads.get(b, 1.0))
