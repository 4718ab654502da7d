"""How a fit went, as far as its result still tells: convergence, method, rows left out."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Any, Literal, TypeAlias

import numpy as np
import pandas as pd
from numpy.typing import NDArray
from statsmodels.genmod.generalized_estimating_equations import GEE

from plainodds.model.estimates import is_constrained, is_penalised
from plainodds.model.source import Source

__all__ = ["Dropped", "FitRecord", "Method", "read_record"]

Method: TypeAlias = Literal["maximum likelihood", "estimating equations", "penalised"]


@dataclass(frozen=True)
class Dropped:
    """Rows that the fit left out because a value was missing.

    Attributes
    ----------
    rows : int
    columns : tuple of (name, int)
        In how many of these rows each raw column, or the outcome, is missing, most first;
        empty where the rows can no longer be read.
    known : int
        Rows among them whose outcome is known.
    events : float
        Events among the known; shares count as parts of one.
    """

    rows: int
    columns: tuple[tuple[str, int], ...] = ()
    known: int = 0
    events: float = 0.0


@dataclass(frozen=True)
class FitRecord:
    """How a fit went; by default nothing is known.

    Attributes
    ----------
    converged : bool or None
        What the result itself says.
    iterations : int or None
    method : {"maximum likelihood", "estimating equations", "penalised"} or None
    constrained : bool
        Whether the fit kept coefficients under constraints.
    without_standard_error : tuple of str
        Columns whose variance is missing, infinite or below 0 in the result.
    dropped : Dropped or None
        None where it cannot be told.
    """

    converged: bool | None = None
    iterations: int | None = None
    method: Method | None = None
    constrained: bool = False
    without_standard_error: tuple[str, ...] = ()
    dropped: Dropped | None = None

    @property
    def notices(self) -> tuple[str, ...]:
        """What every answer of this fit has to say of how it went."""
        if self.converged is not False:
            return ()
        return (
            "The fit says that it did not converge, so its figures may not be those that the data "
            "support best.",
        )


def read_record(
    result: Any,
    source: Source,
    outcome_name: str,
    events: NDArray[np.float64] | None,
    without_standard_error: tuple[str, ...],
) -> FitRecord:
    """Read from a result how its fit went.

    Parameters
    ----------
    result : statsmodels result
    source : Source
    outcome_name : str
        The outcome's column, as its facts name it.
    events : array (n,) or None
        Shares of the event that the answers speak of, in the rows used.
    without_standard_error : tuple of str
    """
    said = getattr(result, "mle_retvals", None)
    told = said if isinstance(said, Mapping) else {}
    converged = getattr(result, "converged", None)
    converged = told.get("converged") if converged is None else converged
    return FitRecord(
        converged=None if converged is None else bool(converged),
        iterations=_iterations(result, told),
        method=_method(result),
        constrained=is_constrained(result),
        without_standard_error=without_standard_error,
        dropped=_dropped(source, "" if _is_counts(result.model) else outcome_name, events),
    )


def _is_counts(model: Any) -> bool:
    """Whether the outcome is two columns, of which one alone doesn't tell it."""
    trials = getattr(model, "n_trials", None)
    return trials is not None and bool(np.any(np.asarray(trials) != 1))


def _method(result: Any) -> Method:
    if is_penalised(result):
        return "penalised"
    return "estimating equations" if isinstance(result.model, GEE) else "maximum likelihood"


def _iterations(result: Any, told: Mapping[str, Any]) -> int | None:
    history = getattr(result, "fit_history", None)
    history = history if isinstance(history, Mapping) else {}
    if "iteration" in history:
        counted = history["iteration"]
    elif isinstance(result.model, GEE) and "params" in history:
        # a GEE keeps where it stood after each iteration
        counted = len(history["params"])
    else:
        counted = told.get("iterations")
    return int(counted) if isinstance(counted, int | float | np.number) else None


def _dropped(
    source: Source, outcome_name: str, events: NDArray[np.float64] | None
) -> Dropped | None:
    if source.rows_left_out is None:
        return None
    if source.rows_left_out == 0 or source.left_out is None:
        return Dropped(source.rows_left_out)
    read = source.left_out
    predictors = frozenset().union(*(factor.variables for factor in source.factors))
    counts = {
        name: int(read(name).isna().sum()) for name in sorted(predictors) if name in source.names
    }
    known = pd.Series(dtype=float)
    if outcome_name in source.names and events is not None:
        outcome = read(outcome_name)
        counts[outcome_name] = int(outcome.isna().sum())
        known = _read_as(outcome, source.column(outcome_name), events).dropna()
    missing = sorted((item for item in counts.items() if item[1]), key=lambda item: -item[1])
    return Dropped(source.rows_left_out, tuple(missing), len(known), float(known.sum()))


def _read_as(others: pd.Series[Any], used: Any, events: NDArray[np.float64]) -> pd.Series[float]:
    """Shares of events in other rows, where the same value means the same in all rows used."""
    meant = pd.Series(events).groupby(np.asarray(used, dtype=object)).agg(["min", "max"])
    sure = meant.loc[meant["min"] == meant["max"], "min"]
    return others.astype(object).map(sure).astype(float)
