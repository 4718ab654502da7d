"""Designs without a formula: every column is its own predictor."""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from typing import Any

import numpy as np
from numpy.typing import NDArray

from plainodds.model.design.design import Column, Factor, Floats

__all__ = ["PlainFactor", "plain_columns"]


@dataclass(frozen=True)
class PlainFactor:
    """A raw column taken as it is."""

    name: str

    @property
    def variables(self) -> frozenset[str]:
        """The column itself."""
        return frozenset([self.name])

    @property
    def levels(self) -> None:
        """Plain columns are numbers."""

    def evaluate(self, raw: Mapping[str, NDArray[Any]]) -> Floats:
        """The column's values, shape (n, 1)."""
        return np.asarray(raw[self.name], dtype=float)[:, None]


def plain_columns(
    names: Sequence[str], constants: Mapping[str, float]
) -> tuple[tuple[Factor, ...], tuple[Column, ...]]:
    """Factors and columns of a design that was given as numbers.

    Parameters
    ----------
    names : sequence of str
        The columns' names in the order of the coefficients.
    constants : mapping of name to number
        Columns that have one value only, such as the intercept.
    """
    factors: list[Factor] = []
    columns: list[Column] = []
    for name in names:
        if name in constants:
            columns.append(Column(name, (), constants[name]))
        else:
            columns.append(Column(name, ((len(factors), 0),)))
            factors.append(PlainFactor(name))
    return tuple(factors), tuple(columns)
