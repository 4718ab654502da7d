"""statsmodels results -> FittedModel."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from typing import Any

import numpy as np
import pandas as pd
from numpy.typing import NDArray

from plainodds.errors import FitRefused, QuestionRefused
from plainodds.model import derived as derivation
from plainodds.model.design.design import Column, Design, Factor, Floats
from plainodds.model.design.plain_columns import plain_columns
from plainodds.model.estimates import estimates_of
from plainodds.model.facts import (
    allowed_range,
    is_linear,
    level_facts,
    number_facts,
    shares_terms_with,
)
from plainodds.model.fitted import FittedModel, Sample
from plainodds.model.outcome import modelled_outcome, must_turn, outcome_facts
from plainodds.model.predictors import Outcome, Predictor, PredictorFacts, Setting, Subject
from plainodds.model.quantiles import weighted_quantiles
from plainodds.model.raw import RawColumn, coded_column
from plainodds.model.source import Source, source_of

__all__ = ["take_in"]

_CHECKED_ROWS = 2_000


def take_in(
    result: Any,
    data: pd.DataFrame | None,
    predictors: Mapping[str, Predictor],
    outcome: Outcome | None,
    derived: Mapping[str, str],
    functions: Mapping[str, Callable[..., Any]],
    offset: float | None,
) -> FittedModel:
    """Take a fitted statsmodels result in.

    The arguments are those of `plainodds.FittedLogit`.

    Raises
    ------
    FitRefused
        With the reason and the way out.
    """
    estimates = estimates_of(result)
    source = source_of(result, data, functions)
    declared = derivation.parse(derived, source.names)
    factors = derivation.with_derived(source.factors, declared)
    raw = _raw_columns(source, factors, source.columns, predictors)
    levels = {name: column.levels for name, column in raw.items() if column.levels}
    design = _with_bounds(Design(factors, source.columns, levels), raw)
    matrix = source.matrix if source.matrix is not None else _rebuilt(design, raw)
    _refuse_rows_that_do_not_match(design, raw, matrix, declared, source)

    modelled = modelled_outcome(result.model, source.outcome)
    turned = must_turn(modelled, outcome)
    sign = -1.0 if turned else 1.0
    sample = Sample(
        matrix,
        {name: column.values for name, column in raw.items()},
        source.weights,
        None if source.offset is None else sign * source.offset,
    )
    share = _share(source, turned)
    facts, notices = outcome_facts(modelled, outcome, share, turned)
    subject = Subject(
        outcome=facts,
        predictors=_facts(design, raw, source.weights, predictors),
        rows=len(matrix),
        covariance_kind=estimates.covariance_kind,
        no_interval=estimates.no_interval,
        offset=_held_offset(sample, offset),
        notices=notices + source.notices + _suggestions(raw, declared),
        setting=Setting(
            predictors=tuple(predictors.items()),
            outcome=outcome,
            derived=tuple(derived.items()),
            functions=tuple(functions),
            offset=offset,
            with_data=data is not None,
        ),
    )
    return FittedModel(
        coefficients=sign * estimates.coefficients,
        covariance=estimates.covariance,
        degrees_of_freedom=estimates.degrees_of_freedom,
        design=design,
        sample=sample,
        subject=subject,
    )


def _raw_columns(
    source: Source,
    factors: tuple[Factor, ...],
    columns: tuple[Column, ...],
    predictors: Mapping[str, Predictor],
) -> dict[str, RawColumn]:
    names = Design(factors, columns, {}).variables
    unknown = sorted(set(predictors) - set(names))
    if unknown:
        raise FitRefused(
            f"predictors= names {', '.join(map(repr, unknown))}, which the model does not use. "
            f"It uses {', '.join(names)}."
        )
    raw: dict[str, RawColumn] = {}
    for name in names:
        stated = predictors.get(name, Predictor())
        own = [f.levels for f in factors if f.variables == {name} and f.levels is not None]
        raw[name] = coded_column(name, source.column(name), stated, own[0] if own else None)
    return raw


def _first_row(raw: Mapping[str, RawColumn]) -> dict[str, NDArray[Any]]:
    return {name: column.values[:1] for name, column in raw.items()}


def _with_bounds(design: Design, raw: Mapping[str, RawColumn]) -> Design:
    at = _first_row(raw)
    allowed = {
        name: allowed_range(design, name, float(c.values.min()), float(c.values.max()), at)
        for name, c in raw.items()
        if not c.levels
    }
    return Design(design.factors, design.columns, design.levels, allowed)


def _facts(
    design: Design,
    raw: Mapping[str, RawColumn],
    weights: Floats | None,
    predictors: Mapping[str, Predictor],
) -> tuple[PredictorFacts, ...]:
    modifiers = shares_terms_with(design)
    at = _first_row(raw)
    found = []
    for name, column in raw.items():
        stated = predictors.get(name, Predictor())
        if column.levels:
            found.append(level_facts(name, column, weights, stated, modifiers[name]))
            continue
        low, high = float(column.values.min()), float(column.values.max())
        linear = is_linear(design, name, low, high, at)
        found.append(
            number_facts(
                name, column, weights, stated, design.allowed[name], linear, modifiers[name]
            )
        )
    return tuple(found)


def _rebuilt(design: Design, raw: Mapping[str, RawColumn]) -> Floats:
    n = len(next(iter(raw.values())).values)
    return design.some_columns(
        range(len(design.columns)), {name: column.values for name, column in raw.items()}, n
    )


def _refuse_rows_that_do_not_match(
    design: Design,
    raw: Mapping[str, RawColumn],
    matrix: Floats,
    declared: Mapping[str, derivation.Derived],
    source: Source,
) -> None:
    for item in declared.values():
        _refuse_wrong_derivation(item, source)
    chosen = np.unique(np.linspace(0, len(matrix) - 1, _CHECKED_ROWS).astype(int))
    try:
        built = design.rows({name: column.values[chosen] for name, column in raw.items()})
    except QuestionRefused as error:
        raise FitRefused(f"The fit's own rows cannot be computed anew: {error}") from error
    wrong = ~np.isclose(built, matrix[chosen], rtol=1e-6, atol=1e-8)
    if wrong.any():
        row, column = (int(place[0]) for place in np.nonzero(wrong))
        raise FitRefused(
            f"The data and the fit do not match: in row {chosen[row]} of the rows used, "
            f"{design.columns[column].name} is {matrix[chosen][row, column]:g} in the fit and "
            f"{built[row, column]:g} in the data. Hand over the data that the model was fitted on, "
            "unchanged: FittedLogit(result, data=frame)."
        )


def _refuse_wrong_derivation(item: derivation.Derived, source: Source) -> None:
    if item.name not in source.names:
        raise FitRefused(
            f"derived= names {item.name!r}, which is not a column of the data or the model."
        )
    stored = np.asarray(source.column(item.name), dtype=float)
    raw = {name: np.asarray(source.column(name)) for name in item.variables}
    computed = np.broadcast_to(np.asarray(item.evaluate(raw), dtype=float), stored.shape)
    wrong = np.nonzero(~np.isclose(stored, computed, rtol=1e-8, atol=1e-10))[0]
    if len(wrong):
        raise FitRefused(
            f"derived={{{item.name!r}: {item.expression!r}}} does not hold: in row {wrong[0]} of the "
            f"rows used {item.name} is {stored[wrong[0]]:g}, the expression {computed[wrong[0]]:g}."
        )


def _share(source: Source, turned: bool) -> float:
    if source.outcome is None:
        return float("nan")
    share = float(np.average(np.asarray(source.outcome, dtype=float), weights=source.weights))
    return 1.0 - share if turned else share


def _held_offset(sample: Sample, stated: float | None) -> float | None:
    if sample.offset is None:
        if stated is not None:
            raise FitRefused(f"offset={stated!r}: the model has no offset to hold.")
        return None
    if stated is not None:
        return float(stated)
    return weighted_quantiles(sample.offset, sample.weights, (0.5,))[0]


def _suggestions(
    raw: Mapping[str, RawColumn], declared: Mapping[str, derivation.Derived]
) -> tuple[str, ...]:
    numeric = {
        name: np.asarray(column.values, dtype=float)
        for name, column in raw.items()
        if not column.levels or column.levels in ((0, 1), (False, True))
    }
    return tuple(
        f"{name} is exactly {expression}, but is held still while the other moves. If it should "
        f"move with it, pass derived={{{name!r}: {expression!r}}}."
        for name, expression in derivation.noticed(numeric).items()
        if name not in declared
    )
