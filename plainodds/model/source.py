"""Where a fitted result keeps its rows, its design, its weights and its outcome."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass
from typing import Any

import numpy as np
import pandas as pd
from numpy.typing import NDArray
from patsy import DesignInfo
from statsmodels.discrete.discrete_model import Logit
from statsmodels.genmod.generalized_estimating_equations import GEE

from plainodds.errors import FitRefused
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
    notices : tuple of str
    """

    names: tuple[str, ...]
    column: Callable[[str], Any]
    factors: tuple[Factor, ...]
    columns: tuple[Column, ...]
    matrix: Floats | None
    outcome: NDArray[Any] | None
    weights: Floats | None
    offset: Floats | None
    notices: tuple[str, ...]


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
    spec = getattr(model.data, "model_spec", None) or getattr(model.data, "design_info", None)
    if spec is not None:
        return _from_formula(model, spec, data, functions)
    return _from_arrays(model, data)


def _from_formula(
    model: Any,
    spec: Any,
    data: pd.DataFrame | None,
    functions: Mapping[str, Callable[..., Any]],
) -> Source:
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
    kept = _rows_used(model, frame, matrix)
    if isinstance(spec, DesignInfo):
        factors, columns = patsy_terms(spec, names)
    else:
        from plainodds.model.design.formulaic_terms import formulaic_terms

        examples = frame.iloc[np.nonzero(kept)[0]] if kept is not None else frame
        factors, columns = formulaic_terms(spec, names, examples, functions)
    places = {str(name): place for place, name in enumerate(frame.columns)}
    _refuse_repeated(names, frozenset().union(*(f.variables for f in factors)))

    def column(name: str) -> pd.Series[Any]:
        # a copy, so that the analyst's frame is neither kept alive nor changed
        series = frame.iloc[:, places[name]]
        return series.copy() if kept is None else series[kept]

    if matrix is None:
        return Source(names, column, factors, columns, None, None, None, None, (_REMOVED,))
    return Source(names, column, factors, columns, matrix, *_outcome_parts(model))


def _from_arrays(model: Any, data: pd.DataFrame | None) -> Source:
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
    extra: dict[str, Any] = {}
    if data is not None:
        kept = _rows_used(model, data, matrix)
        extra = {
            str(name): data[name] if kept is None else data[name][kept]
            for name in data.columns
            if str(name) not in places
        }

    def column(name: str) -> Any:
        return matrix[:, places[name]] if name in places else extra[name]

    return Source(
        exog_names + tuple(extra), column, factors, columns, matrix, *_outcome_parts(model)
    )


_REMOVED = (
    "The result no longer carries its data: weights, offset and outcome are unknown, and averages "
    "take every row as one."
)


def _own_matrix(model: Any) -> Floats | None:
    exog = getattr(model, "exog", None)
    return None if exog is None else np.asarray(exog, dtype=float)


def _rows_used(model: Any, frame: pd.DataFrame, matrix: Floats | None) -> NDArray[np.bool_] | None:
    """Which rows of the frame the fit used, by position; None for all of them."""
    dropped = getattr(model.data, "missing_row_idx", None)
    dropped = np.array([], dtype=int) if dropped is None else np.asarray(dropped, dtype=int)
    used = len(matrix) if matrix is not None else len(frame) - len(dropped)
    if len(frame) == used:
        return None
    if len(frame) - len(dropped) != used:
        raise FitRefused(
            f"The data have {len(frame):,} rows, and the fit used {used:,} after dropping "
            f"{len(dropped):,} with missing values: they do not match. Hand over the data that the "
            "model was fitted on, in the same order."
        )
    kept = np.ones(len(frame), dtype=bool)
    kept[dropped] = False
    return kept


def _refuse_repeated(names: tuple[str, ...], used: frozenset[str]) -> None:
    repeated = sorted({name for name in names if name in used and names.count(name) > 1})
    if repeated:
        raise FitRefused(
            f"Two columns are named {repeated[0]!r}; give each a name of its own and fit again."
        )


def _outcome_parts(
    model: Any,
) -> tuple[NDArray[Any] | None, Floats | None, Floats | None, tuple[str, ...]]:
    """Outcome, weights and offset as the fit used them, with notices."""
    outcome = getattr(model, "endog", None)
    n = len(model.exog)
    if isinstance(model, Logit):
        ignored = [w for w in ("freq_weights", "var_weights", "weights") if _given(model, w)]
        notices = tuple(
            f"statsmodels' Logit ignores {name}; the fit is unweighted. For a weighted fit use "
            f"GLM(family=Binomial(), {name}=...)."
            for name in ignored
        )
        return outcome, None, _offset(model, n), notices
    total = np.ones(n)
    # a GLM's own `weights` are those of its last iteration, a GEE's those that were handed over
    names = ("weights",) if isinstance(model, GEE) else ("freq_weights", "var_weights", "n_trials")
    for name in names:
        weights = getattr(model, name, None)
        if weights is not None and np.shape(weights) == (n,):
            total = total * np.asarray(weights, dtype=float)
    return outcome, None if (total == 1.0).all() else total, _offset(model, n), ()


def _given(model: Any, name: str) -> bool:
    return getattr(model, name, None) is not None or name in getattr(model, "_init_keys", ())


def _offset(model: Any, n: int) -> Floats | None:
    offset = getattr(model, "offset", None)
    if offset is None or np.shape(offset) != (n,) or not np.any(offset):
        return None
    return np.asarray(offset, dtype=float)
