"""Columns that are exactly the square, cube, root, logarithm or product of others."""

from __future__ import annotations

from collections.abc import Callable, Iterator, Mapping
from keyword import iskeyword
from typing import Any

import numpy as np
from numpy.typing import NDArray

__all__ = ["noticed"]

Floats = NDArray[np.float64]

# rows that are looked at before a whole column is computed
_FIRST_LOOK = 200


def noticed(columns: Mapping[str, NDArray[Any]]) -> dict[str, str]:
    """Find columns that follow from others in every row.

    Parameters
    ----------
    columns : mapping of name to array (n,)
        The numeric raw columns.

    Returns
    -------
    mapping of name to expression
        Ready to be handed over as `derived=`.

    Examples
    --------
    >>> age = np.array([20.0, 35.0, 50.0])
    >>> noticed({"age": age, "age_sq": age**2})
    {'age_sq': 'age ** 2'}
    """
    varied = {name: column for name, column in columns.items() if np.ptp(column) > 0}
    found: dict[str, str] = {}
    if not varied:
        return found
    # a square root is the root of the square and this the square of that: of two columns
    # that say the same, the later one is taken to follow from the earlier
    order = {name: place for place, name in enumerate(varied)}
    candidates = sorted(
        _candidates(varied), key=lambda each: order[each[0]] < max(order[s] for s in each[1])
    )
    for target, sources, expression, compute in candidates:
        if target in found or target in sources or found.keys() & sources:
            continue
        stored = np.asarray(varied[target], dtype=float)
        if np.allclose(compute(varied), stored, rtol=1e-10, atol=1e-12):
            found[target] = expression
    return found


_Candidate = tuple[str, set[str], str, Callable[[Mapping[str, NDArray[Any]]], Floats]]


def _candidates(columns: Mapping[str, NDArray[Any]]) -> Iterator[_Candidate]:
    """What may be what, judged by a weighted sum over a few rows."""
    names = list(columns)
    n = len(columns[names[0]])
    rows = np.unique(np.linspace(0, n - 1, _FIRST_LOOK).astype(int))
    heads = np.column_stack([np.asarray(columns[name][rows], dtype=float) for name in names])
    weights = np.random.default_rng(0).uniform(1.0, 2.0, len(rows))
    sums, sizes = weights @ heads, weights @ np.abs(heads)
    for form, function in _FORMS.items():
        for place, name in enumerate(names):
            values = function(heads[:, place])
            if not np.isfinite(values).all():
                continue
            near = _near(sums, weights @ values, sizes + weights @ np.abs(values))
            # the square of a 0/1 column is itself, and says nothing
            if near.any() and _has_more_than_two(columns[name]):
                for target in np.nonzero(near)[0]:
                    yield names[target], {name}, form.format(_as_code(name)), _of(name, function)
    # every product of two at once, in one matrix product
    products = heads.T @ (heads * weights[:, None])
    magnitudes = np.abs(heads).T @ np.abs(heads * weights[:, None])
    for name, total, size in zip(names, sums, sizes, strict=True):
        near = _near(products, total, magnitudes + size)
        for i, j in np.argwhere(np.triu(near, 1)):
            one, other = names[i], names[j]
            expression = f"{_as_code(one)} * {_as_code(other)}"
            yield name, {one, other}, expression, _product(one, other)


def _near(some: Any, other: Any, size: Any) -> NDArray[np.bool_]:
    return np.asarray(np.abs(some - other) <= 1e-9 * size)


def _of(
    name: str, function: Callable[[Floats], Floats]
) -> Callable[[Mapping[str, NDArray[Any]]], Floats]:
    return lambda columns: function(np.asarray(columns[name], dtype=float))


def _product(one: str, other: str) -> Callable[[Mapping[str, NDArray[Any]]], Floats]:
    return lambda columns: np.asarray(columns[one], dtype=float) * columns[other]


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
    return name if name.isidentifier() and not iskeyword(name) else f"Q({name!r})"


def _has_more_than_two(column: NDArray[Any]) -> bool:
    return bool(((column != column.min()) & (column != column.max())).any())
