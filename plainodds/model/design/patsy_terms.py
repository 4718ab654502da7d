"""Designs that patsy made from a formula."""

from __future__ import annotations

import ast
from collections.abc import Collection, Iterator, Mapping
from dataclasses import dataclass
from itertools import product
from typing import Any

import numpy as np
import pandas as pd
from numpy.typing import NDArray
from patsy import DesignInfo, NAAction
from patsy.categorical import categorical_to_int
from patsy.design_info import FactorInfo, SubtermInfo

from plainodds.model.design.design import Atom, Column, Factor, Floats
from plainodds.model.design.plain_columns import PlainFactor

__all__ = ["PatsyFactor", "patsy_terms", "raw_names"]


@dataclass(frozen=True, eq=False)
class PatsyFactor:
    """A factor of a patsy formula, with its contrast matrix where it is categorical."""

    info: FactorInfo
    variables: frozenset[str]
    contrast: Floats | None
    series: frozenset[str] = frozenset()
    """Columns of which the formula asks what only a Series has, as `site.isin(...)` does."""

    @property
    def name(self) -> str:
        """How the formula writes it."""
        return str(self.info.factor.name())

    @property
    def levels(self) -> tuple[Any, ...] | None:
        """The categories that patsy remembered."""
        return None if self.contrast is None else tuple(self.info.categories)

    def evaluate(self, raw: Mapping[str, NDArray[Any]]) -> Floats:
        """Evaluate with the state remembered from the fit, shape (n, width)."""
        # plain arrays are evaluated many times as fast
        columns = {n: pd.Series(v) if n in self.series else v for n, v in raw.items()}
        values = self.info.factor.eval(self.info.state, columns)
        if self.contrast is None:
            numbers = np.asarray(values, dtype=float)
            return numbers[:, None] if numbers.ndim == 1 else numbers
        codes = categorical_to_int(values, self.info.categories, NAAction(on_NA="raise"))
        return np.asarray(self.contrast[np.asarray(codes)])


def patsy_terms(
    spec: DesignInfo, known: Collection[str]
) -> tuple[tuple[Factor, ...], tuple[Column, ...]]:
    """Factors and columns of a patsy design.

    Parameters
    ----------
    spec : patsy.DesignInfo
    known : collection of str
        The data's column names; other names in a formula come from its environment.
    """
    factors: list[Factor] = []
    columns: list[Column] = []
    places: dict[tuple[Any, bytes | None], int] = {}

    def place(factor: Any, subterm: SubtermInfo) -> int:
        contrast = subterm.contrast_matrices.get(factor)
        matrix = None if contrast is None else np.asarray(contrast.matrix, dtype=float)
        key = (factor, None if matrix is None else matrix.tobytes())
        if key not in places:
            places[key] = len(factors)
            code = getattr(factor, "code", factor.name())
            names = raw_names(code, known)
            plain = matrix is None and _bare(factor, names)
            factors.append(
                PlainFactor(*names)
                if plain
                else PatsyFactor(spec.factor_infos[factor], names, matrix, _asked(code) & names)
            )
        return places[key]

    names = iter(spec.column_names)
    for term in spec.terms:
        for subterm in spec.term_codings[term]:
            positions = [place(factor, subterm) for factor in subterm.factors]
            for atoms in _combinations(
                positions, [_width(spec, f, subterm) for f in subterm.factors]
            ):
                columns.append(Column(next(names), atoms))
    return tuple(factors), tuple(columns)


def _bare(factor: Any, names: frozenset[str]) -> bool:
    """Whether the factor is a column taken as it is, so that patsy need not be asked."""
    return len(names) == 1 and factor.name() in (*names, *(f"Q({name!r})" for name in names))


def _width(spec: DesignInfo, factor: Any, subterm: SubtermInfo) -> int:
    contrast = subterm.contrast_matrices.get(factor)
    if contrast is not None:
        return int(contrast.matrix.shape[1])
    return int(spec.factor_infos[factor].num_columns)


def _combinations(positions: list[int], widths: list[int]) -> Iterator[tuple[Atom, ...]]:
    # patsy lets the first factor's columns run fastest
    for chosen in product(*(range(width) for width in reversed(widths))):
        yield tuple(zip(positions, reversed(chosen), strict=True))


def raw_names(code: str, known: Collection[str]) -> frozenset[str]:
    """The data's columns that a piece of formula code reads, `Q("a b")` included."""
    tree = ast.parse(code, mode="eval")
    called = {id(node.func) for node in ast.walk(tree) if isinstance(node, ast.Call)}
    found: set[str] = set()
    for node in ast.walk(tree):
        if isinstance(node, ast.Name) and id(node) not in called:
            found.add(node.id)
        elif (
            isinstance(node, ast.Call)
            and isinstance(node.func, ast.Name)
            and node.func.id == "Q"
            and node.args
            and isinstance(node.args[0], ast.Constant)
        ):
            found.add(str(node.args[0].value))
    return frozenset(found & set(known))


def _asked(code: str) -> frozenset[str]:
    """Names of which an attribute or a method is used."""
    return frozenset(
        node.value.id
        for node in ast.walk(ast.parse(code, mode="eval"))
        if isinstance(node, ast.Attribute) and isinstance(node.value, ast.Name)
    )
