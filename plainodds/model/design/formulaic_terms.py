"""Designs that formulaic made from a formula."""

from __future__ import annotations

from collections.abc import Collection, Iterable, Mapping
from dataclasses import dataclass
from itertools import product
from typing import Any

import numpy as np
import pandas as pd
from formulaic import Formula, ModelSpec
from formulaic.parser.types import Factor as FormulaicTermFactor
from formulaic.parser.types import Term
from numpy.typing import NDArray

from plainodds.errors import FitRefused
from plainodds.model.design.design import Atom, Column, Factor, Floats
from plainodds.model.design.plain_columns import PlainFactor

__all__ = ["FormulaicFactor", "formulaic_terms"]

_INTERCEPT = Term([FormulaicTermFactor("1", eval_method="literal")])


@dataclass(frozen=True, eq=False)
class FormulaicFactor:
    """A factor of a formulaic formula, as a one-factor specification with the fit's state."""

    name: str
    variables: frozenset[str]
    spec: ModelSpec
    columns: tuple[str, ...]
    functions: Mapping[str, Any]
    levels: tuple[Any, ...] | None

    def evaluate(self, raw: Mapping[str, NDArray[Any]]) -> Floats:
        """Evaluate with the state remembered from the fit, shape (n, width)."""
        columns = _as_fitted(pd.DataFrame(dict(raw)))
        built = self.spec.get_model_matrix(columns, context=self.functions)
        return np.asarray(built[list(self.columns)], dtype=float)


def formulaic_terms(
    spec: ModelSpec,
    known: Collection[str],
    examples: pd.DataFrame,
    functions: Mapping[str, Any],
) -> tuple[tuple[Factor, ...], tuple[Column, ...]]:
    """Factors and columns of a formulaic design.

    Parameters
    ----------
    spec : formulaic.ModelSpec
    known : collection of str
        The data's column names.
    examples : DataFrame
        A few of the fit's rows, from which the names of a factor's columns are read.
    functions : mapping of name to callable
        The analyst's own functions that the formula mentions.

    Raises
    ------
    FitRefused
        If the formula needs a function that was not handed over.
    """
    factors: list[Factor] = []
    field_names: list[tuple[str, ...]] = []
    places: dict[tuple[str, bool], int] = {}
    by_name: dict[str, Column] = {}

    def place(scoped: Any) -> int:
        key = (scoped.factor.factor.expr, scoped.reduced)
        if key not in places:
            places[key] = len(factors)
            factor = scoped.factor.factor
            names = _raw_names(spec.factor_variables[factor], known)
            made = _one_factor(spec, factor, scoped.reduced, names, examples, functions)
            field_names.append(made.columns)
            # a column taken as it is need not be asked of formulaic
            bare = made.levels is None and names == {factor.expr}
            factors.append(PlainFactor(factor.expr) if bare else made)
        return places[key]

    for encoded in spec.structure:
        for scoped_term in encoded.scoped_terms:
            positions = [place(scoped) for scoped in scoped_term.factors]
            choices = [list(enumerate(field_names[at])) for at in positions]
            for chosen in product(*choices):
                atoms: tuple[Atom, ...] = tuple(
                    (at, k) for at, (k, _) in zip(positions, chosen, strict=True)
                )
                name = ":".join(part for _, part in chosen) or "Intercept"
                by_name[name] = Column(name, atoms, float(scoped_term.scale))
    return tuple(factors), tuple(by_name[name] for name in spec.column_names)


def _raw_names(variables: Iterable[Any], known: Collection[str]) -> frozenset[str]:
    """The data's columns among what formulaic says a factor reads."""
    found = (str(variable) for variable in variables)
    # of `site.isin(...)` formulaic says that it reads site.isin
    names = (name if name in known else name.partition(".")[0] for name in found)
    return frozenset(names) & set(known)


def _one_factor(
    spec: ModelSpec,
    factor: Any,
    reduced: bool,
    names: frozenset[str],
    examples: pd.DataFrame,
    functions: Mapping[str, Any],
) -> FormulaicFactor:
    # beside an intercept formulaic codes a category in reduced rank, alone in full rank
    terms = [_INTERCEPT, Term([factor])] if reduced else [Term([factor])]
    alone = spec.update(formula=Formula(terms), structure=None, na_action="ignore")
    try:
        built = alone.get_model_matrix(_as_fitted(examples[list(names)]), context=functions)
    except Exception as error:
        raise FitRefused(
            f"The formula's {factor.expr} cannot be computed anew ({error}). If it uses a "
            "function of your own, hand it over: FittedLogit(result, functions={'name': name})."
        ) from error
    columns = tuple(built.model_spec.structure[-1].columns)
    contrasts = spec.factor_contrasts.get(factor)
    levels = None if contrasts is None else tuple(contrasts.levels)
    return FormulaicFactor(factor.expr, names, alone, columns, functions, levels)


def _as_fitted(frame: pd.DataFrame) -> pd.DataFrame:
    """Text as objects, which is how statsmodels hands it to formulaic."""
    text = [name for name, dtype in frame.dtypes.items() if isinstance(dtype, pd.StringDtype)]
    return frame.astype(dict.fromkeys(text, object)) if text else frame
