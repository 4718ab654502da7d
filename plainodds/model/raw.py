"""Raw columns from the analyst's data, copied once, coded, and nothing else kept."""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from typing import Any

import numpy as np
import pandas as pd
from numpy.typing import NDArray

from plainodds.errors import FitRefused
from plainodds.model.predictors import Kind, Predictor
from plainodds.values import Scalar

__all__ = ["RawColumn", "coded_column"]


@dataclass(frozen=True, eq=False)
class RawColumn:
    """One raw column: floats, or positions in `levels`.

    Attributes
    ----------
    kind : Kind
    values : array (n,)
    levels : tuple of scalars
        Empty for numbers.
    palette : array or None
        What the formula reads for each level, in the column's own type: an interval
        where the level is its text, a category of the same categories. None for numbers.
    """

    kind: Kind
    values: NDArray[Any]
    levels: tuple[Scalar, ...] = ()
    palette: Any = None


def coded_column(
    name: str,
    column: pd.Series[Any] | NDArray[Any],
    stated: Predictor,
    engine_levels: Sequence[tuple[Any, ...]],
) -> RawColumn:
    """Code one raw column.

    Parameters
    ----------
    name : str
    column : Series or array (n,)
        The rows used in the fit, in their order.
    stated : Predictor
        What the analyst says of it.
    engine_levels : sequence of tuple
        The levels of each categorical factor that reads this column alone. Those that
        are the column's own values settle its levels and their order; those of
        ``C(age > 40)`` are not.

    Raises
    ------
    FitRefused
        If the column has missing values in rows that the fit used, is neither numbers
        nor levels, or its stated kind does not fit its values.
    """
    if isinstance(column, np.ndarray) and column.dtype.kind == "f":
        # without a formula the columns are views of the design, and stay so
        return _numeric(name, column, column, stated, engine_levels)
    series = column if isinstance(column, pd.Series) else pd.Series(column)
    _refuse_missing(name, series)
    dtype = series.dtype
    if isinstance(dtype, pd.CategoricalDtype):
        return _category(name, series, stated, engine_levels)
    if pd.api.types.is_bool_dtype(dtype) or _holds_only_booleans(series):
        return _boolean(name, series, stated)
    if pd.api.types.is_numeric_dtype(dtype) and dtype.kind != "c":
        return _numeric(name, series, series.to_numpy(dtype=float), stated, engine_levels)
    if dtype.kind in "mM" or isinstance(dtype, pd.PeriodDtype):
        raise FitRefused(
            f"Column {name!r} holds dates or durations. Turn them into a number that means "
            "something, such as years since a start, and fit again."
        )
    return _category(name, series, stated, engine_levels)


def _refuse_missing(name: str, series: pd.Series[Any]) -> None:
    missing = int(series.isna().sum())
    if missing:
        raise FitRefused(
            f"Column {name!r} has {missing} missing values in rows that the fit used. The data "
            "have changed since the fit: hand over the data it was fitted on, "
            "FittedLogit(result, data=frame)."
        )


def _holds_only_booleans(series: pd.Series[Any]) -> bool:
    return series.dtype == object and pd.api.types.infer_dtype(series) == "boolean"


def _boolean(name: str, series: pd.Series[Any], stated: Predictor) -> RawColumn:
    if stated.kind not in (None, "yes/no", "category"):
        raise FitRefused(
            f"Predictor {name!r} is stated as a {stated.kind}, but holds yes/no values. Leave "
            "kind= out, or state 'yes/no'."
        )
    kind = stated.kind or "yes/no"
    levels = _in_stated_order(name, (False, True), stated, kind)
    codes = series.to_numpy(dtype=np.int8)
    palette = np.array(levels, dtype=object if series.dtype == object else bool)
    return RawColumn(kind, codes if levels == (False, True) else 1 - codes, levels, palette)


def _numeric(
    name: str,
    column: pd.Series[Any] | NDArray[Any],
    values: NDArray[np.float64],
    stated: Predictor,
    engine_levels: Sequence[tuple[Any, ...]],
) -> RawColumn:
    if not np.isfinite(values).all():
        raise FitRefused(
            f"Column {name!r} has infinite or missing values in rows that the fit used. The data "
            "have changed since the fit: hand over the data it was fitted on, "
            "FittedLogit(result, data=frame)."
        )
    as_levels = _own_levels(np.unique(values), engine_levels) if engine_levels else None
    if as_levels is not None or stated.kind == "category":
        series = column if isinstance(column, pd.Series) else pd.Series(column)
        return _category(name, series, stated, engine_levels)
    two = _takes_only_0_and_1(values)
    kind = stated.kind or ("yes/no" if two else _kind_of_number(values))
    if kind == "yes/no":
        if not two:
            raise FitRefused(
                f"Predictor {name!r} is stated as yes/no, but has values other than 0 and 1. "
                "Leave kind= out, or state 'number' or 'category'."
            )
        levels = _in_stated_order(name, (0, 1), stated, kind)
        return RawColumn(kind, values.astype(np.int8), levels, np.array(levels, dtype=float))
    if kind == "whole number" and _kind_of_number(values) != kind:
        raise FitRefused(
            f"Predictor {name!r} is stated as a whole number, but has values between whole "
            "numbers. Leave kind= out, or state 'number'."
        )
    if stated.levels is not None:
        raise FitRefused(
            f"Predictor {name!r} is a number, so levels= has no meaning for it. Leave levels= out, "
            "or state kind='category'."
        )
    return RawColumn(kind, values)


def _takes_only_0_and_1(values: NDArray[np.float64]) -> bool:
    # a glance at the first rows spares most columns the pass over all of them
    return all(bool(((v == 0) | (v == 1)).all()) for v in (values[:100], values))


def _kind_of_number(values: NDArray[np.float64]) -> Kind:
    whole = all(bool((v == np.rint(v)).all()) for v in (values[:100], values))
    return "whole number" if whole else "number"


def _category(
    name: str,
    series: pd.Series[Any],
    stated: Predictor,
    engine_levels: Sequence[tuple[Any, ...]],
) -> RawColumn:
    if stated.kind in ("number", "whole number"):
        raise FitRefused(
            f"Predictor {name!r} is stated as a {stated.kind}, but the model holds it as a "
            "category. Leave kind= out, or state 'category'."
        )
    found, places = _values_and_places(series)
    own = _own_levels(found, engine_levels)
    if own is None:
        own = _levels_of(series.dtype, found)
    by_scalar = {_scalar(level): level for level in own}
    yes_no = set(by_scalar) == {False, True} and stated.kind != "category"
    if stated.kind == "yes/no" and not yes_no:
        raise FitRefused(
            f"Predictor {name!r} is stated as yes/no, but has the levels {list(by_scalar)!r}. "
            "Leave kind= out, or turn the column into True and False and fit again."
        )
    kind: Kind = "yes/no" if yes_no else "category"
    order = tuple(sorted(by_scalar)) if yes_no else tuple(by_scalar)
    levels = _in_stated_order(name, order, stated, kind)
    position = {level: place for place, level in enumerate(levels)}
    kept = np.array([position[_scalar(value)] for value in found])
    codes = kept.astype(np.int8 if len(levels) < 128 else np.intp)[places]
    palette = _palette([by_scalar[level] for level in levels], series.dtype)
    return RawColumn(kind, codes, levels, palette)


def _values_and_places(series: pd.Series[Any]) -> tuple[list[Any], NDArray[Any]]:
    """The distinct values, and for each row the position of its value."""
    if isinstance(series.dtype, pd.CategoricalDtype):
        present, places = np.unique(series.cat.codes.to_numpy(), return_inverse=True)
        return list(series.dtype.categories[present]), places
    places, found = pd.factorize(series)
    return list(found), places


def _levels_of(dtype: Any, found: list[Any]) -> tuple[Any, ...]:
    if isinstance(dtype, pd.CategoricalDtype):
        return tuple(dtype.categories)
    return tuple(sorted(found, key=lambda level: (str(type(level)), level)))


def _own_levels(
    found: Iterable[Any], engine_levels: Sequence[tuple[Any, ...]]
) -> tuple[Any, ...] | None:
    """The first levels among the engine's that are the column's own values."""
    values = set(found)
    return next(
        (
            levels
            for levels in engine_levels
            # True equals 1, but the levels of C(x > 0) are not those of a 0/1 column
            if values <= set(levels)
            and len({isinstance(level, bool | np.bool_) for level in (*values, *levels)}) == 1
        ),
        None,
    )


def _scalar(level: Any) -> Scalar:
    """A level as a plain value: intervals and the like by their text."""
    if isinstance(level, np.generic):
        level = level.item()
    if isinstance(level, float) and level.is_integer():
        return int(level)
    return level if isinstance(level, bool | int | float | str) else str(level)


def _palette(originals: list[Any], dtype: Any) -> Any:
    if isinstance(dtype, pd.CategoricalDtype):
        return pd.Categorical(originals, dtype=dtype)
    if pd.api.types.is_numeric_dtype(dtype):
        return np.array(originals)
    palette = np.empty(len(originals), dtype=object)
    palette[:] = originals
    return palette


def _in_stated_order(
    name: str, found: tuple[Scalar, ...], stated: Predictor, kind: Kind
) -> tuple[Scalar, ...]:
    if stated.levels is None:
        return found
    if len(set(stated.levels)) < len(stated.levels) or set(stated.levels) != set(found):
        raise FitRefused(
            f"Predictor {name!r}: levels={list(stated.levels)!r} must name each of the fit's "
            f"levels once. The fit has {list(found)!r}."
        )
    # no comes before yes, whatever is stated
    return found if kind == "yes/no" else tuple(found[found.index(v)] for v in stated.levels)
