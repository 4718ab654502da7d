"""Raw columns from the analyst's data, copied once, coded, and nothing else kept."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Any

import numpy as np
import pandas as pd
from numpy.typing import NDArray

from plainodds.errors import FitRefused
from plainodds.model.predictors import Kind, Predictor
from plainodds.values import Scalar, plain

__all__ = ["RawColumn", "coded_column"]


@dataclass(frozen=True, eq=False)
class RawColumn:
    """One raw column: floats, or positions in `levels`."""

    kind: Kind
    values: NDArray[Any]
    levels: tuple[Scalar, ...]


def coded_column(
    name: str,
    column: pd.Series[Any] | NDArray[Any],
    stated: Predictor,
    engine_levels: tuple[Any, ...] | None,
) -> RawColumn:
    """Code one raw column.

    Parameters
    ----------
    name : str
    column : Series or array (n,)
        The rows used in the fit, in their order.
    stated : Predictor
        What the analyst says of it.
    engine_levels : tuple or None
        The levels, where the formula treats the column itself as categorical.

    Raises
    ------
    FitRefused
        If the column has missing values in rows that the fit used, is neither numbers
        nor levels, or its stated kind does not fit its values.
    """
    series = column if isinstance(column, pd.Series) else pd.Series(column)
    missing = series.isna()
    if missing.any():
        raise FitRefused(
            f"Column {name!r} has {int(missing.sum())} missing values in rows that the fit used. "
            "The data have changed since the fit: hand over the data it was fitted on, data=frame."
        )
    if series.dtype == object and series.map(type).eq(bool).all():
        series = series.astype(bool)
    if pd.api.types.is_bool_dtype(series.dtype):
        return _boolean(name, series, stated)
    if pd.api.types.is_numeric_dtype(series.dtype) and not isinstance(
        series.dtype, pd.CategoricalDtype
    ):
        return _numeric(name, series, stated, engine_levels)
    if pd.api.types.is_datetime64_any_dtype(series.dtype):
        raise FitRefused(
            f"Column {name!r} holds dates. Turn them into a number that means something, such as "
            "years since a start, and fit again."
        )
    return _category(name, series, stated, engine_levels)


def _boolean(name: str, series: pd.Series[Any], stated: Predictor) -> RawColumn:
    if stated.kind not in (None, "yes/no", "category"):
        raise FitRefused(
            f"Predictor {name!r} is stated as a {stated.kind}, but holds yes/no values."
        )
    return RawColumn(stated.kind or "yes/no", series.to_numpy(dtype=np.int8), (False, True))


def _numeric(
    name: str,
    series: pd.Series[Any],
    stated: Predictor,
    engine_levels: tuple[Any, ...] | None,
) -> RawColumn:
    values = series.to_numpy(dtype=float)
    if not np.isfinite(values).all():
        raise FitRefused(f"Column {name!r} has infinite values in rows that the fit used.")
    if engine_levels is not None and set(np.unique(values)) <= {
        level for level in engine_levels if isinstance(level, int | float | np.number)
    }:
        return _category(name, series, stated, engine_levels)
    two = bool(np.isin(values, (0.0, 1.0)).all())
    kind: Kind = stated.kind or (
        "yes/no"
        if two
        else "whole number"
        if bool((values == np.round(values)).all())
        else "number"
    )
    if kind == "yes/no":
        if not two:
            raise FitRefused(
                f"Predictor {name!r} is stated as yes/no, but has values other than 0 and 1."
            )
        return RawColumn(kind, values.astype(np.int8), (0, 1))
    if kind == "category":
        return _category(name, series, stated, None)
    return RawColumn(kind, values, ())


def _category(
    name: str,
    series: pd.Series[Any],
    stated: Predictor,
    engine_levels: tuple[Any, ...] | None,
) -> RawColumn:
    if stated.kind in ("number", "whole number"):
        raise FitRefused(
            f"Predictor {name!r} is stated as a {stated.kind}, but holds text or categories."
        )
    if engine_levels is not None:
        found = [plain(level) for level in engine_levels]
    elif isinstance(series.dtype, pd.CategoricalDtype):
        found = [plain(level) for level in series.dtype.categories]
    else:
        found = sorted(
            (plain(level) for level in pd.unique(series)), key=lambda v: (str(type(v)), v)
        )
    levels = _in_stated_order(name, found, stated)
    codes = pd.Categorical(series, categories=list(levels)).codes
    if (codes < 0).any():
        odd = plain(series[codes < 0].iloc[0])
        raise FitRefused(
            f"Column {name!r} holds {odd!r}, which the fit has no level for. The data have changed "
            "since the fit: hand over the data it was fitted on, data=frame."
        )
    kind: Kind = stated.kind or ("yes/no" if set(levels) == {False, True} else "category")
    return RawColumn(kind, np.asarray(codes), levels)


def _in_stated_order(name: str, found: list[Scalar], stated: Predictor) -> tuple[Scalar, ...]:
    if stated.levels is None:
        return tuple(found)
    if set(stated.levels) != set(found):
        odd = sorted(map(repr, set(stated.levels) ^ set(found)))
        raise FitRefused(
            f"Predictor {name!r}: levels={list(stated.levels)!r} and the fit's levels differ by "
            f"{', '.join(odd)}. The fit has {found!r}."
        )
    return stated.levels
