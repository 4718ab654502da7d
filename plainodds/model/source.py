"""Where a fitted result keeps its rows, its design, its weights and its outcome."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass
from functools import reduce
from operator import mul
from typing import Any

import numpy as np
import pandas as pd
from numpy.typing import NDArray
from patsy import DesignInfo
from statsmodels.discrete.discrete_model import Logit
from statsmodels.genmod.generalized_estimating_equations import GEE

from plainodds.errors import FitRefused
from plainodds.model.data_columns import DataColumns
from plainodds.model.design.design import Column, Factor, Floats
from plainodds.model.design.patsy_terms import patsy_terms
from plainodds.model.design.plain_columns import plain_columns

__all__ = ["Source", "source_of"]


@dataclass(frozen=True, eq=False)
class Source:
    """What a result and the data give.

    Attributes
    ----------
    names : tuple of str
        Columns that can be read.
    column : callable
        One column's values in the rows used.
    factors, columns
        The design's parts.
    matrix : array (n, k) or None
        The result's own design matrix; None where it was removed.
    outcome, weights, offset : array (n,) or None
        As the fit used them.
    frequencies : array (n,) or None
        How many cases a row stands for: frequency weights times trials.
    notices : tuple of str
    labels : Index or None
        What the rows used are called.
    rows_left_out : int or None
        Rows that the fit left out because something was missing; None where it can't be told.
    left_out : callable or None
        One column's values in those rows; None where they can no longer be read.
    data : DataColumns or None
        The columns beside the model's own; None where there is no frame.
    """

    names: tuple[str, ...]
    column: Callable[[str], Any]
    factors: tuple[Factor, ...]
    columns: tuple[Column, ...]
    matrix: Floats | None
    outcome: NDArray[Any] | None
    weights: Floats | None
    frequencies: Floats | None
    offset: Floats | None
    notices: tuple[str, ...]
    labels: pd.Index[Any] | None = None
    rows_left_out: int | None = None
    left_out: Callable[[str], pd.Series[Any]] | None = None
    data: DataColumns | None = None


def source_of(
    result: Any, data: pd.DataFrame | None, functions: Mapping[str, Callable[..., Any]]
) -> Source:
    """Find a result's rows and design.

    Raises
    ------
    FitRefused
        If the data were removed or do not match the fit.
    """
    model = result.model
    if data is not None and not isinstance(data, pd.DataFrame):
        raise FitRefused(
            f"data= is a {type(data).__name__}; hand over a pandas DataFrame, one row per case."
        )
    for attribute in ("model_spec", "design_info"):
        spec = getattr(model.data, attribute, None)
        if spec is not None:
            return _from_formula(result, spec, data, functions)
    return _from_arrays(result, data)


def _from_formula(
    result: Any,
    spec: Any,
    data: pd.DataFrame | None,
    functions: Mapping[str, Callable[..., Any]],
) -> Source:
    model = result.model
    matrix = _own_matrix(model)
    frame = data if data is not None else getattr(model.data, "frame", None)
    if frame is None or (matrix is None and data is None):
        raise FitRefused(
            "The data were removed from the result (remove_data). Hand over the data that the "
            "model was fitted on: FittedLogit(result, data=frame)."
        )
    if not isinstance(frame, pd.DataFrame):
        frame = pd.DataFrame(frame)
    names = tuple(map(str, frame.columns))
    kept = _rows_used(result, frame, matrix)
    if isinstance(spec, DesignInfo):
        factors, columns = patsy_terms(spec, names)
    else:
        from plainodds.model.design.formulaic_terms import formulaic_terms

        few = slice(0, _EXAMPLES) if kept is None else np.nonzero(kept)[0][:_EXAMPLES]
        factors, columns = formulaic_terms(spec, names, frame.iloc[few], functions)
    _refuse_repeated(names, frozenset().union(*(f.variables for f in factors)))
    column = _reader(frame, kept)
    if matrix is None:
        rows = len(frame) if kept is None else int(kept.sum())
        offset = _offset(model, rows)
        return Source(
            names, column, factors, columns, None, None, None, None, offset, (_REMOVED,),
            *_used_and_left_out(frame, kept),
        )  # fmt: skip
    parts = _outcome_parts(model)
    return Source(names, column, factors, columns, matrix, *parts, *_used_and_left_out(frame, kept))


def _reader(frame: pd.DataFrame, kept: NDArray[np.bool_] | None) -> Callable[[str], pd.Series[Any]]:
    places = {str(name): place for place, name in enumerate(frame.columns)}

    def column(name: str) -> pd.Series[Any]:
        # a copy, so that the analyst's frame is neither kept alive nor changed
        series = frame.iloc[:, places[name]]
        return series.copy() if kept is None else series[kept]

    return column


def _from_arrays(result: Any, data: pd.DataFrame | None) -> Source:
    model = result.model
    matrix = _own_matrix(model)
    if matrix is None:
        raise FitRefused(
            "The data were removed from the result (remove_data), and without a formula the design "
            "cannot be made again. Pickle the result with its data, or fit it again."
        )
    exog_names = tuple(map(str, model.exog_names))
    _refuse_repeated(exog_names, frozenset(exog_names))
    low, high = matrix.min(axis=0), matrix.max(axis=0)
    constants = {n: float(a) for n, a, b in zip(exog_names, low, high, strict=True) if a == b}
    factors, columns = plain_columns(exog_names, constants)
    places = {name: place for place, name in enumerate(exog_names)}
    names = exog_names
    read: Callable[[str], Any] | None = None
    rest = _used_without_data(model)
    if data is not None:
        kept = _rows_used(result, data, matrix)
        read = _reader(data, kept)
        rest = _used_and_left_out(data, kept)
        names += tuple(name for name in map(str, data.columns) if name not in places)

    def column(name: str) -> Any:
        return matrix[:, places[name]] if name in places or read is None else read(name)

    return Source(names, column, factors, columns, matrix, *_outcome_parts(model), *rest)


_Rest = tuple[
    "pd.Index[Any]", int | None, Callable[[str], "pd.Series[Any]"] | None, DataColumns | None
]


def _used_and_left_out(frame: pd.DataFrame, kept: NDArray[np.bool_] | None) -> _Rest:
    """Labels of the rows used, how many were left out, how to read those, and the other columns."""
    data = DataColumns(frame, kept)
    if kept is None:
        return frame.index, 0, None, data
    # only the few rows left out are held, not the analyst's frame
    others = frame[~kept]
    places = {str(name): place for place, name in enumerate(frame.columns)}
    return frame.index[kept], len(others), lambda name: others.iloc[:, places[name]], data


def _used_without_data(model: Any) -> _Rest:
    dropped = getattr(model.data, "missing_row_idx", None)
    left_out = 0 if dropped is None else len(dropped)
    labels = getattr(model.data, "row_labels", None)
    rows = len(model.exog)
    if labels is None or len(labels) != rows:
        places = np.delete(np.arange(rows + left_out), [] if dropped is None else dropped)
        labels = pd.Index(places) if left_out else pd.RangeIndex(rows)
    return pd.Index(labels), left_out, None, None


_REMOVED = (
    "The result no longer carries its data: whether the rows handed over are those of the fit "
    "could not be checked, weights and outcome are unknown, and averages take every row as one."
)
# as many rows as it takes to see which columns a factor makes
_EXAMPLES = 20


def _own_matrix(model: Any) -> Floats | None:
    exog = getattr(model, "exog", None)
    return None if exog is None else np.asarray(exog, dtype=float)


def _rows_used(result: Any, frame: pd.DataFrame, matrix: Floats | None) -> NDArray[np.bool_] | None:
    """Which rows of the frame the fit used, by position; None for all of them."""
    data = result.model.data
    dropped = getattr(data, "missing_row_idx", None)
    dropped = np.array([], dtype=int) if dropped is None else np.asarray(dropped, dtype=int)
    used = len(matrix) if matrix is not None else _rows_counted(result, len(frame) - len(dropped))
    if len(frame) == used:
        return None
    kept = np.ones(len(frame), dtype=bool)
    if len(frame) - len(dropped) == used:
        kept[dropped] = False
        return kept
    # a GEE doesn't say which rows it dropped, but their labels are missing
    labels = getattr(getattr(data, "orig_exog", None), "index", None)
    if labels is not None and frame.index.is_unique and len(labels) == used:
        kept = frame.index.isin(labels)
        if frame.index[kept].equals(labels):
            return kept
    raise FitRefused(
        f"The data have {len(frame):,} rows and the fit used {used:,}, and which of them cannot be "
        "told. Hand over the very rows that the model was fitted on, in the same order: "
        "FittedLogit(result, data=frame.dropna(subset=[...]))."
    )


def _rows_counted(result: Any, otherwise: int) -> int:
    counted = getattr(result, "nobs", None) or getattr(result.model, "nobs", None)
    return otherwise if counted is None else int(counted)


def _refuse_repeated(names: tuple[str, ...], used: frozenset[str]) -> None:
    repeated = sorted({name for name in names if name in used and names.count(name) > 1})
    if repeated:
        raise FitRefused(
            f"Two columns are named {repeated[0]!r}; give each a name of its own and fit again."
        )


def _outcome_parts(
    model: Any,
) -> tuple[NDArray[Any] | None, Floats | None, Floats | None, Floats | None, tuple[str, ...]]:
    """Outcome, weights, frequencies and offset as the fit used them, with notices."""
    outcome = getattr(model, "endog", None)
    n = len(model.exog)
    if isinstance(model, Logit):
        ignored = [w for w in ("freq_weights", "var_weights", "weights") if _given(model, w)]
        notices = tuple(
            f"statsmodels' Logit ignores {name}=: the fit is unweighted. For a weighted fit use "
            "GLM(..., family=Binomial(), freq_weights=...) or var_weights=."
            for name in ignored
        )
        return outcome, None, None, _offset(model, n), notices
    # a GLM's own `weights` are those of its last iteration, a GEE's those that were handed over
    names = ("weights",) if isinstance(model, GEE) else ("freq_weights", "var_weights", "n_trials")
    total = reduce(mul, (_weights(model, name, n) for name in names))
    notices = ()
    if isinstance(model, GEE) and np.any(_weights(model, "n_trials", n) != 1):
        notices = (
            "statsmodels' GEE takes the counts of each row as one share, whatever their number. "
            "For counts to count, fit the shares with weights= set to the number of trials.",
        )
    cases = ("freq_weights", "n_trials") if not isinstance(model, GEE) else ()
    frequencies = reduce(mul, (_weights(model, name, n) for name in cases), np.ones(1))
    return outcome, _unless_one(total), _unless_one(frequencies), _offset(model, n), notices


def _unless_one(weights: Floats) -> Floats | None:
    return None if np.all(weights == 1.0) else weights


def _weights(model: Any, name: str, n: int) -> Floats:
    weights: Any = getattr(model, name, None)
    return np.ones(1) if np.shape(weights) != (n,) else np.asarray(weights, dtype=float)


def _given(model: Any, name: str) -> bool:
    return getattr(model, name, None) is not None or name in getattr(model, "_init_keys", ())


def _offset(model: Any, n: int) -> Floats | None:
    offset = getattr(model, "offset", None)
    if offset is None or np.shape(offset) != (n,) or not np.any(offset):
        return None
    return np.asarray(offset, dtype=float)
