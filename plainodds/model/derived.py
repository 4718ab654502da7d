"""Columns that move with another one, as the analyst declares them."""

from __future__ import annotations

import ast
from collections.abc import Collection, Mapping
from dataclasses import dataclass
from types import CodeType
from typing import Any

import numpy as np
from numpy.typing import NDArray

from plainodds.errors import FitRefused
from plainodds.model.design.design import Factor, Floats

__all__ = ["Derived", "DerivedFactor", "parse", "with_derived"]

_FUNCTIONS = {
    name: getattr(np, name)
    for name in (
        *("abs", "exp", "log", "log1p", "log2", "log10", "sqrt"),
        *("ceil", "floor", "maximum", "minimum", "where"),
    )
}


@dataclass(frozen=True, eq=False)
class Derived:
    """A column computed from others: `exper_sq` as `exper ** 2`."""

    name: str
    expression: str
    code: CodeType
    variables: frozenset[str]

    def evaluate(self, raw: Mapping[str, NDArray[Any]]) -> NDArray[Any]:
        """The column's values for n rows of raw columns."""

        def quoted(name: str) -> NDArray[Any]:
            return raw[name]

        names = {**_FUNCTIONS, "np": np, "Q": quoted, **raw}
        return np.asarray(eval(self.code, {"__builtins__": {}}, names))


def parse(derived: Mapping[str, str], known: Collection[str]) -> dict[str, Derived]:
    """Read the analyst's declarations.

    Raises
    ------
    FitRefused
        If an expression is not Python, or reads a column that the data don't have.
    """
    parsed: dict[str, Derived] = {}
    for name, expression in derived.items():
        try:
            tree = ast.parse(expression, mode="eval")
        except SyntaxError as error:
            raise FitRefused(
                f"derived={{{name!r}: {expression!r}}} is not a Python expression: {error.msg}."
            ) from error
        variables = _names_read(tree)
        missing = sorted(variables - set(known))
        if missing:
            raise FitRefused(
                f"derived={{{name!r}: {expression!r}}} reads {', '.join(missing)}, which the data "
                f"don't have. They have: {', '.join(map(str, known))}."
            )
        code = compile(tree, f"<derived {name}>", "eval")
        parsed[name] = Derived(name, expression, code, frozenset(variables))
    for item in parsed.values():
        chained = item.variables & set(parsed)
        if chained:
            raise FitRefused(
                f"derived={{{item.name!r}: {item.expression!r}}} reads {sorted(chained)[0]!r}, "
                "which is derived itself; write it in terms of columns that are not."
            )
    return parsed


def _names_read(tree: ast.Expression) -> set[str]:
    called = {id(node.func) for node in ast.walk(tree) if isinstance(node, ast.Call)}
    names: set[str] = set()
    for node in ast.walk(tree):
        if isinstance(node, ast.Name) and id(node) not in called and node.id != "np":
            names.add(node.id)
        elif (
            isinstance(node, ast.Call)
            and isinstance(node.func, ast.Name)
            and node.func.id == "Q"
            and node.args
            and isinstance(node.args[0], ast.Constant)
        ):
            names.add(str(node.args[0].value))
    return names


@dataclass(frozen=True, eq=False)
class DerivedFactor:
    """A factor that reads derived columns, seen as a factor of what these are derived from."""

    inner: Factor
    derived: tuple[Derived, ...]

    @property
    def name(self) -> str:
        """How the formula writes it."""
        return self.inner.name

    @property
    def levels(self) -> tuple[Any, ...] | None:
        """The derived column's levels say nothing of the raw column's."""
        return None

    @property
    def variables(self) -> frozenset[str]:
        """The raw columns behind it."""
        kept = self.inner.variables - {item.name for item in self.derived}
        return kept.union(*(item.variables for item in self.derived))

    def evaluate(self, raw: Mapping[str, NDArray[Any]]) -> Floats:
        """Compute the derived columns, then the factor."""
        computed = {
            item.name: item.evaluate({name: raw[name] for name in item.variables})
            for item in self.derived
        }
        return self.inner.evaluate({**raw, **computed})


def with_derived(factors: tuple[Factor, ...], derived: Mapping[str, Derived]) -> tuple[Factor, ...]:
    """Replace the factors that read a derived column."""
    return tuple(
        DerivedFactor(factor, tuple(derived[name] for name in sorted(read)))
        if (read := factor.variables & set(derived))
        else factor
        for factor in factors
    )
