"""Raw predictors -> design rows, whatever engine made the design.

A column of a logit model's design is a product: `age:material[pvc]` is the
values of `age` times a dummy of `material`. So a design is held as *factors*,
which turn raw columns into one or more numeric columns, and *columns*, each the
product of one column from each of its factors. From that follow, for any engine:
new rows, the columns that a moved predictor touches, their derivative, and the
split of each touched column into a part that moves and a part that stays.

Raw columns come *coded*: numbers as floats, categories and yes/no as positions
in their levels. A factor of one category only is then a table look-up.
"""

from __future__ import annotations

from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass, field
from functools import reduce
from operator import mul
from typing import Any, Protocol, TypeAlias

import numpy as np
from numpy.typing import NDArray

from plainodds.errors import QuestionRefused
from plainodds.model.design.differences import derivative
from plainodds.model.design.tabulated import FEW, Table, tabulated

__all__ = ["Atom", "Coded", "Column", "Design", "Factor", "Floats", "Palette", "decoded"]

Floats: TypeAlias = NDArray[np.float64]
Coded: TypeAlias = Mapping[str, NDArray[Any]]
"""Raw predictors by name: floats, or positions in the levels."""

Palette: TypeAlias = Any
"""An array, of numpy or pandas, of what the formula reads for each level of a column."""

Atom: TypeAlias = tuple[int, int]
"""A factor's position and the column of that factor."""


class Factor(Protocol):
    """What an engine module provides: one evaluated piece of a formula."""

    @property
    def name(self) -> str:
        """How the formula writes it."""

    @property
    def variables(self) -> frozenset[str]:
        """The raw columns that it reads."""

    @property
    def levels(self) -> tuple[Any, ...] | None:
        """Its levels where the engine treats it as categorical."""

    def evaluate(self, raw: Mapping[str, NDArray[Any]]) -> Floats:
        """Turn raw columns of n values into an (n, width) array."""


@dataclass(frozen=True)
class Column:
    """One column of the design: `scale` times the product of its atoms."""

    name: str
    atoms: tuple[Atom, ...]
    scale: float = 1.0


def decoded(codes: NDArray[Any], palette: Palette) -> Any:
    """Turn positions back into what the formula reads."""
    return palette[codes]


@dataclass(frozen=True, eq=False)
class Design:
    """How raw predictors become the design's columns.

    Parameters
    ----------
    factors : tuple of Factor
    columns : tuple of Column
        In the order of the coefficients.
    palettes : mapping of name to Palette
        For each raw column that is a category or a yes/no.
    allowed : mapping of name to (lowest, highest)
        Bounds within which a number can be computed.
    spreads : mapping of name to float
        Over how much a number ranges in the data: the scale on which its slopes are taken.
    """

    factors: tuple[Factor, ...]
    columns: tuple[Column, ...]
    palettes: Mapping[str, Palette]
    allowed: Mapping[str, tuple[float, float]] = field(default_factory=dict)
    spreads: Mapping[str, float] = field(default_factory=dict)
    _tables: dict[int, Floats] = field(init=False, default_factory=dict)
    _slopes: dict[int, Table] = field(init=False, default_factory=dict)

    def __post_init__(self) -> None:
        for position, factor in enumerate(self.factors):
            if len(factor.variables) == 1 and factor.variables <= self.palettes.keys():
                (name,) = factor.variables
                try:
                    codes = np.arange(len(self.palettes[name]))
                    self._tables[position] = self.factor_values(position, {name: codes})
                except QuestionRefused:
                    # a level that no row has may be beyond the formula: ask again when it is met
                    continue

    @property
    def variables(self) -> tuple[str, ...]:
        """The raw columns, in the order in which the columns mention them."""
        seen: dict[str, None] = {}
        for column in self.columns:
            for position, _ in column.atoms:
                seen.update(dict.fromkeys(sorted(self.factors[position].variables)))
        return tuple(seen)

    def variables_of(self, column: Column) -> frozenset[str]:
        """The raw columns behind one column of the design."""
        return frozenset().union(*(self.factors[at].variables for at, _ in column.atoms))

    def touched(self, names: Iterable[str]) -> NDArray[np.intp]:
        """Positions of the columns that move when any of the named predictors moves."""
        moved = frozenset(names)
        return np.array(
            [i for i, column in enumerate(self.columns) if self.variables_of(column) & moved],
            dtype=np.intp,
        )

    def factor_values(self, position: int, coded: Coded) -> Floats:
        """One factor's (n, width) values.

        Raises
        ------
        QuestionRefused
            If the factor cannot be computed, or is not a number, for some value.
        """
        factor = self.factors[position]
        if position in self._tables:
            (name,) = factor.variables
            return self._tables[position][coded[name]]
        raw = {
            name: decoded(coded[name], palette)
            if (palette := self.palettes.get(name)) is not None
            else coded[name]
            for name in factor.variables
        }
        try:
            with np.errstate(all="ignore"):
                values = factor.evaluate(raw)
        except Exception as error:
            reason = (str(error).splitlines() or [type(error).__name__])[0].rstrip(".")
            raise QuestionRefused(
                f"{factor.name} cannot be computed for these values: {reason}."
            ) from error
        if not np.isfinite(values).all():
            raise QuestionRefused(
                f"{factor.name} is not a number for some of these values of "
                f"{', '.join(sorted(factor.variables))}; stay within the data's range."
            )
        return values

    def rows(self, coded: Coded) -> Floats:
        """The whole design for n coded rows, shape (n, columns)."""
        n = len(next(iter(coded.values()))) if coded else 1
        return self.some_columns(range(len(self.columns)), coded, n)

    def some_columns(self, which: Iterable[int], coded: Coded, n: int) -> Floats:
        """The named columns only, shape (n, len(which)); builds the factors these need."""
        return self.values_of([self.columns[i] for i in which], coded, n)

    def values_of(self, columns: Sequence[Column], coded: Coded, n: int) -> Floats:
        """Any products of this design's factors, shape (n, len(columns))."""
        values = {at: self.factor_values(at, coded) for at in _positions(columns)}
        built = np.empty((n, len(columns)))
        for i, column in enumerate(columns):
            built[:, i] = product(column, values)
        return built

    def row_derivatives(self, name: str, coded: Coded) -> Floats:
        """d(row)/d(predictor) for n coded rows, shape (n, columns)."""
        return self.derivatives_of(self.columns, name, coded)

    def touched_derivatives(self, name: str, coded: Coded) -> tuple[NDArray[np.intp], Floats]:
        """Positions of the T columns that a predictor touches, and their derivatives, (n, T)."""
        touched = self.touched([name])
        return touched, self.derivatives_of([self.columns[i] for i in touched], name, coded)

    def derivatives_of(self, columns: Sequence[Column], name: str, coded: Coded) -> Floats:
        """d(column)/d(predictor) for n coded rows, shape (n, len(columns)).

        By the product rule over each column's factors; a factor's own derivative by
        fourth-order differences, which are exact for cubic splines between knots.
        """
        result = np.zeros((len(coded[name]), len(columns)))
        # each place where a factor moves, with the product of the factors beside it
        parts = [
            (i, at, k, Column(column.name, column.atoms[:p] + column.atoms[p + 1 :], column.scale))
            for i, column in enumerate(columns)
            for p, (at, k) in enumerate(column.atoms)
            if name in self.factors[at].variables
        ]
        moving = {at for _, at, _, _ in parts}
        slopes = {at: self.factor_derivative(at, name, coded) for at in moving}
        beside = _positions([rest for *_, rest in parts])
        values = {at: self.factor_values(at, coded) for at in beside}
        for i, at, k, rest in parts:
            result[:, i] += slopes[at][:, k] * product(rest, values)
        return result

    def factor_derivative(self, position: int, name: str, coded: Coded) -> Floats:
        """d(factor)/d(predictor) for n coded rows, shape (n, width)."""
        factor, n = self.factors[position], len(coded[name])
        if factor.name == name:
            return np.ones((n, 1))
        if factor.levels is not None:
            # a number cut into levels has no slope within a level
            return np.zeros_like(self.factor_values(position, coded))
        others = {other: coded[other] for other in factor.variables - {name}}

        def along(x: Floats) -> Floats:
            still = {other: np.tile(codes, len(x) // n) for other, codes in others.items()}
            return self.factor_values(position, {**still, name: x})

        lower, upper = self.allowed.get(name, (-np.inf, np.inf))
        spread = self.spreads.get(name, 1.0)

        def differentiated(x: Floats) -> Floats:
            return derivative(along, x, lower, upper, spread)

        x = np.asarray(coded[name], dtype=float)
        if n <= FEW or others:
            return differentiated(x)
        if position not in self._slopes:
            self._slopes[position] = tabulated(differentiated, float(x.min()), float(x.max()))
        return self._slopes[position](x)


def _positions(columns: Iterable[Column]) -> list[int]:
    return sorted({at for column in columns for at, _ in column.atoms})


def product(column: Column, values: Mapping[int, Floats]) -> Floats | float:
    """A column from the values of its factors."""
    return reduce(mul, (values[at][:, k] for at, k in column.atoms), column.scale)
