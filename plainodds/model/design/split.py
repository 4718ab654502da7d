"""The touched columns of a design, split into what moves and what stays.

When predictors are moved, each column that they touch is a product of atoms that
move and atoms that stay: `bs(age)[2]:material[pvc]` moves as `bs(age)[2]` and stays
as the dummy of `material`. So the linear predictor of row i at point j is

    η(i, j) = rest(i) + Σ_g still(i, g) · Σ_{c in g} β_c own(j, c)

with one g for each distinct product that stays. That turns an average over a
million rows at a hundred points into a few matrix products.
"""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass
from functools import cached_property

import numpy as np
from numpy.typing import NDArray

from plainodds.model.design.design import Atom, Coded, Column, Design, Floats

__all__ = ["Split", "split"]


@dataclass(frozen=True, eq=False)
class Split:
    """How the touched columns come apart.

    Attributes
    ----------
    design : Design
    touched : array (T,) of int
        Positions of the columns that move.
    own : tuple of Column
        What moves of each, with its scale.
    still : tuple of tuples of Atom
        The G distinct products that stay.
    group : array (T,) of int
        For each touched column, which of `still` it is multiplied by.
    """

    design: Design
    touched: NDArray[np.intp]
    own: tuple[Column, ...]
    still: tuple[tuple[Atom, ...], ...]
    group: NDArray[np.intp]

    @cached_property
    def resting(self) -> NDArray[np.intp]:
        """Positions of the columns that no moved predictor touches."""
        return np.setdiff1d(np.arange(len(self.design.columns)), self.touched)

    @property
    def width(self) -> int:
        """How many columns carry a gradient: the resting ones and what stays of the others."""
        return len(self.resting) + len(self.still)

    def own_values(self, moved: Coded) -> Floats:
        """What moves, at J points: shape (J, T)."""
        n = len(next(iter(moved.values())))
        return self.design.values_of(self.own, moved, n)

    def own_derivatives(self, name: str, moved: Coded) -> Floats:
        """d(own)/d(predictor) at J points: shape (J, T)."""
        return self.design.derivatives_of(self.own, name, moved)

    def still_values(self, coded: Coded, n: int) -> Floats:
        """What stays, for n rows: shape (n, G)."""
        return self.design.values_of([Column("", atoms) for atoms in self.still], coded, n)

    @cached_property
    def _standing(self) -> dict[int, int]:
        """Which products that stay are columns of the design, by themselves."""
        by_atoms = {
            self.design.columns[i].atoms: int(i)
            for i in self.resting
            if self.design.columns[i].scale == 1.0
        }
        return {g: by_atoms[atoms] for g, atoms in enumerate(self.still) if atoms in by_atoms}

    def still_rows(self, matrix: Floats, coded: Coded) -> Floats:
        """What stays, for rows whose design is known: shape (n, G)."""
        built = np.empty((len(matrix), len(self.still)))
        missing = [g for g in range(len(self.still)) if g not in self._standing]
        for g, i in self._standing.items():
            built[:, g] = matrix[:, i]
        columns = [Column("", self.still[g]) for g in missing]
        built[:, missing] = self.design.values_of(columns, coded, len(matrix))
        return built

    def membership(self) -> Floats:
        """Indicator of shape (T, G): which column belongs to which product that stays."""
        return np.asarray(self.group[:, None] == np.arange(len(self.still)), dtype=float)


def split(design: Design, names: Iterable[str]) -> Split | None:
    """Split the columns that the named predictors touch.

    Returns
    -------
    Split or None
        None where one factor reads both a moved and a still predictor, as `I(a * b)`
        does: then the columns must be rebuilt for every point.
    """
    moved = frozenset(names)
    touched = design.touched(moved)
    own: list[Column] = []
    places: dict[tuple[Atom, ...], int] = {}
    group: list[int] = []
    for i in touched:
        column = design.columns[i]
        moving = tuple(a for a in column.atoms if design.factors[a[0]].variables & moved)
        if any(not design.factors[at].variables <= moved for at, _ in moving):
            return None
        staying = tuple(a for a in column.atoms if a not in moving)
        own.append(Column(column.name, moving, column.scale))
        group.append(places.setdefault(staying, len(places)))
    return Split(design, touched, tuple(own), tuple(places), np.array(group, dtype=np.intp))
