"""statsmodels results -> FittedModel."""

from __future__ import annotations

import math
from collections.abc import Callable, Mapping
from dataclasses import replace
from typing import Any

import numpy as np
import pandas as pd

from plainodds.errors import FitRefused, QuestionRefused
from plainodds.model import derived as derivation
from plainodds.model.design.design import Column, Design, Factor, Floats
from plainodds.model.estimates import estimates_of, refuse_other_models
from plainodds.model.facts import level_facts, number_facts
from plainodds.model.fitted import FittedModel, Sample
from plainodds.model.matching import refuse_rows_that_do_not_match, refuse_wrong_derivations
from plainodds.model.noticed import noticed
from plainodds.model.outcome import modelled_outcome, must_turn, outcome_facts
from plainodds.model.predictors import (
    Outcome,
    Predictor,
    PredictorFacts,
    Sampling,
    Subject,
)
from plainodds.model.quantiles import weighted_quantiles
from plainodds.model.raw import RawColumn, coded_column
from plainodds.model.record import read_record
from plainodds.model.shapes import allowed_range, is_linear, shares_terms_with
from plainodds.model.source import Source, source_of
from plainodds.model.statements import Statements, read_statements

__all__ = ["take_in"]

_LEFT_OPEN = (
    "Some columns of the model follow from others in every row, so the data leave some figures "
    "open; these are not known, whatever figure the fit itself gives."
)
# rows at which the shape of a factor of several predictors is looked at
_LOOKED_AT = 5


def take_in(
    result: Any,
    data: pd.DataFrame | None,
    predictors: Mapping[str, Predictor] | None,
    outcome: Outcome | None,
    derived: Mapping[str, str] | None,
    functions: Mapping[str, Callable[..., Any]] | None,
    offset: float | None,
    sampling: Sampling | None,
    prevalence: float | None,
    causal: bool = False,
    reason: str = "",
) -> FittedModel:
    """Take a fitted statsmodels result in.

    The arguments are those of `plainodds.FittedLogit`.

    Raises
    ------
    FitRefused
        With the reason and the way out.
    """
    refuse_other_models(result)
    stated = read_statements(
        predictors, outcome, derived, functions, offset, sampling, prevalence, causal, reason
    )
    source = source_of(result, data, stated.functions)
    modelled = modelled_outcome(result.model, source.outcome)
    turned = must_turn(modelled, stated.outcome)
    estimates = estimates_of(result)

    declared = derivation.parse(stated.derived, source.names)
    factors = derivation.with_derived(source.factors, declared)
    raw = _raw_columns(source, factors, stated)
    _check_derivations(source, declared, raw)
    design = _design(factors, source.columns, raw)
    matrix = _rebuilt(design, raw) if source.matrix is None else source.matrix
    refuse_rows_that_do_not_match(design, raw, matrix)

    sign = -1.0 if turned else 1.0
    sample = Sample(
        matrix,
        {name: column.values for name, column in raw.items()},
        source.weights,
        None if source.offset is None else sign * source.offset,
        _events(source, turned),
        source.frequencies,
        source.labels,
    )
    share = _share(sample)
    known = _facts(design, raw, sample, stated.predictors)
    facts, notices = outcome_facts(modelled, stated.outcome, share, turned)
    record = read_record(
        result, source, facts.name, sample.outcome, estimates.without_standard_error
    )
    subject = Subject(
        outcome=facts,
        predictors=known,
        rows=len(matrix),
        covariance_kind=estimates.covariance_kind,
        no_interval=estimates.no_interval,
        offset=_held_offset(sample, stated.offset, sign),
        notices=(
            *record.notices,
            *notices,
            *source.notices,
            *_empty_levels(known),
            *_suggestions(raw, declared),
        ),
        setting=stated.setting(with_data=data is not None, sampling=sampling),
        sampling=stated.sampling,
        prevalence=stated.prevalence,
    )
    model = FittedModel(
        coefficients=sign * estimates.coefficients,
        covariance=estimates.covariance,
        degrees_of_freedom=estimates.degrees_of_freedom,
        design=design,
        sample=sample,
        subject=subject,
        no_likelihood=estimates.no_likelihood,
        intercept_shift=_intercept_shift(share, stated.prevalence),
        record=record,
        data=source.data,
    )
    if not model.leaves_something_open:
        return model
    return replace(model, subject=replace(subject, notices=(*subject.notices, _LEFT_OPEN)))


def _raw_columns(
    source: Source, factors: tuple[Factor, ...], stated: Statements
) -> dict[str, RawColumn]:
    names = Design(factors, source.columns, {}).variables
    if not names:
        raise FitRefused(
            "The model has no predictors, only an intercept, so there is nothing to ask of it. "
            "Add a predictor to the formula and fit again."
        )
    unknown = sorted(set(stated.predictors) - set(names))
    if unknown:
        raise FitRefused(
            f"predictors= names {', '.join(map(repr, unknown))}, which the model does not use. "
            f"It uses {', '.join(names)}."
        )
    return {
        name: coded_column(
            name,
            source.column(name),
            stated.predictors.get(name, Predictor()),
            [f.levels for f in factors if f.variables == {name} and f.levels is not None],
        )
        for name in names
    }


def _check_derivations(
    source: Source,
    declared: Mapping[str, derivation.Derived],
    raw: Mapping[str, RawColumn],
) -> None:
    used = frozenset().union(*(factor.variables for factor in source.factors))
    for item in declared.values():
        if item.name not in used:
            raise FitRefused(
                f"derived= names {item.name!r}, which is not a column that the model uses. It uses "
                f"{', '.join(sorted(used))}."
            )
    refuse_wrong_derivations(declared, raw, {name: source.column(name) for name in declared})


def _design(
    factors: tuple[Factor, ...], columns: tuple[Column, ...], raw: Mapping[str, RawColumn]
) -> Design:
    """The design with its categories, and the bounds and the spread of its numbers."""
    ends = {name: _ends(c) for name, c in raw.items() if not c.levels}
    plain = Design(factors, columns, {})
    return Design(
        factors,
        columns,
        palettes={name: c.palette for name, c in raw.items() if c.levels},
        allowed={name: allowed_range(plain, name, low, high) for name, (low, high) in ends.items()},
        spreads={name: (high - low) or 1.0 for name, (low, high) in ends.items()},
    )


def _ends(column: RawColumn) -> tuple[float, float]:
    return float(column.values.min()), float(column.values.max())


def _facts(
    design: Design,
    raw: Mapping[str, RawColumn],
    sample: Sample,
    predictors: Mapping[str, Predictor],
) -> tuple[PredictorFacts, ...]:
    modifiers = shares_terms_with(design)
    n = len(next(iter(raw.values())).values)
    rows = np.unique(np.linspace(0, n - 1, _LOOKED_AT).astype(int))
    at = {name: column.values[rows] for name, column in raw.items()}
    found = []
    for name, column in raw.items():
        stated = predictors.get(name, Predictor())
        if column.levels:
            found.append(level_facts(name, column, sample, stated, modifiers[name]))
            continue
        linear = is_linear(design, name, *_ends(column), at)
        found.append(
            number_facts(
                name,
                column,
                sample.weights,
                stated,
                design.allowed[name],
                linear,
                modifiers[name],
            )
        )
    return tuple(found)


def _rebuilt(design: Design, raw: Mapping[str, RawColumn]) -> Floats:
    try:
        return design.rows({name: column.values for name, column in raw.items()})
    except QuestionRefused as error:
        raise FitRefused(
            f"The design cannot be made again from the data handed over: {error} Hand over the "
            "very data that the model was fitted on."
        ) from error


def _events(source: Source, turned: bool) -> Floats | None:
    if source.outcome is None:
        return None
    events = np.asarray(source.outcome, dtype=float)
    return 1.0 - events if turned else events


def _share(sample: Sample) -> float:
    if sample.outcome is None:
        return float("nan")
    return float(np.average(sample.outcome, weights=sample.weights))


def _intercept_shift(share: float, prevalence: float | None) -> float:
    """The prior correction of King & Zeng 2001 (Political Analysis 9:137)."""
    if prevalence is None:
        return 0.0
    if math.isnan(share):
        raise FitRefused(
            "prevalence= needs the sample's own share of events, and the result no longer carries "
            "its outcome. Fit again and keep the data."
        )
    return -math.log((1 - prevalence) / prevalence * share / (1 - share))


def _held_offset(sample: Sample, stated: float | None, sign: float) -> float | None:
    """The value at which the offset is held, on the scale that the answers speak of."""
    if sample.offset is None:
        if stated is not None:
            raise FitRefused(
                f"offset={stated!r}: the model has no offset to hold. Leave offset= out."
            )
        return None
    if stated is not None:
        return sign * stated
    return weighted_quantiles(sample.offset, sample.weights, (0.5,))[0]


def _empty_levels(known: tuple[PredictorFacts, ...]) -> tuple[str, ...]:
    return tuple(
        f"No row has {facts.name} = {level!r}, so nothing is known of it; odds ratios and effects "
        "leave it out."
        for facts in known
        for level in facts.levels
        if level not in facts.levels_with_rows
    )


def _suggestions(
    raw: Mapping[str, RawColumn], declared: Mapping[str, derivation.Derived]
) -> tuple[str, ...]:
    numeric = {
        name: column.values
        for name, column in raw.items()
        if not column.levels or set(column.levels) == {False, True}
    }
    return tuple(
        f"{name} is exactly {expression}, but is held still while the other moves. If it should "
        f"move with it, pass derived={{{name!r}: {expression!r}}}."
        for name, expression in noticed(numeric).items()
        if name not in declared
    )
