"""Columns that move with another one: declared by the analyst, or noticed in the data."""

from __future__ import annotations

import ast
from collections.abc import Callable, Collection, Iterator, Mapping
from dataclasses import dataclass
from itertools import combinations
from types import CodeType
from typing import Any

import numpy as np
from numpy.typing import NDArray

from plainodds.errors import FitRefused
from plainodds.model.design.design import Factor, Floats

__all__ = ["Derived", "DerivedFactor", "noticed", "parse", "with_derived"]

_FUNCTIONS = {
    name: getattr(np, name)
    for name in "abs log log2 log10 log1p exp sqrt minimum maximum where floor ceil".split()
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
                f"derived={{{item.name!r}: {item.expression!r}}} reads {sorted(chained)[0]!r}, which is "
                "derived itself; write it in terms of columns that are not."
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
        extra = {item.name: item.evaluate(raw) for item in self.derived}
        return self.inner.evaluate({**raw, **extra})


def with_derived(factors: tuple[Factor, ...], derived: Mapping[str, Derived]) -> tuple[Factor, ...]:
    """Replace the factors that read a derived column."""
    return tuple(
        DerivedFactor(factor, tuple(derived[name] for name in sorted(read)))
        if (read := factor.variables & set(derived))
        else factor
        for factor in factors
    )


def noticed(columns: Mapping[str, Floats]) -> dict[str, str]:
    """Columns that are exactly the square, cube, root, log or product of others.

    Parameters
    ----------
    columns : mapping of name to array (n,)
        The numeric raw columns.

    Returns
    -------
    mapping of name to expression
        Ready to be handed over as `derived=`.
    """
    varied = [name for name, column in columns.items() if np.ptp(column) > 0]
    first = {name: columns[name][:200] for name in varied}
    if not varied:
        return {}
    heads = np.column_stack([first[name] for name in varied])
    tolerance = 1e-12 + 1e-10 * np.abs(heads)
    found: dict[str, str] = {}
    for sources, expression, compute in _candidates(columns, varied):
        if found.keys() & sources:
            continue
        alike = (np.abs(heads - compute(first)[:, None]) <= tolerance).all(axis=0)
        for place in np.nonzero(alike)[0]:
            target = varied[place]
            if (
                target not in sources
                and target not in found
                and np.allclose(compute(columns), columns[target], rtol=1e-10, atol=1e-12)
            ):
                found[target] = expression
    return found


def _candidates(
    columns: Mapping[str, Floats], names: list[str]
) -> Iterator[tuple[set[str], str, Callable[[Mapping[str, Floats]], Floats]]]:
    # a 0/1 column is its own square, so powers and logs of it say nothing
    many = [name for name in names if _has_more_than_two(columns[name])]
    for form, function in _FORMS.items():
        for name in many:
            yield {name}, form.format(_as_code(name)), lambda c, n=name, f=function: f(c[n])
    for one, other in combinations(names, 2):
        expression = f"{_as_code(one)} * {_as_code(other)}"
        yield {one, other}, expression, lambda c, a=one, b=other: c[a] * c[b]


def _quiet(function: Callable[[Floats], Floats]) -> Callable[[Floats], Floats]:
    def quiet(x: Floats) -> Floats:
        with np.errstate(all="ignore"):
            return np.asarray(function(x))

    return quiet


_FORMS: dict[str, Callable[[Floats], Floats]] = {
    "{} ** 2": np.square,
    "{} ** 3": lambda x: x**3,
    "log({})": _quiet(np.log),
    "log1p({})": _quiet(np.log1p),
    "sqrt({})": _quiet(np.sqrt),
}


def _as_code(name: str) -> str:
    return name if name.isidentifier() else f"Q({name!r})"


def _has_more_than_two(column: Floats) -> bool:
    # the square of a 0/1 column is itself, and says nothing
    return bool(((column != column.min()) & (column != column.max())).any())
