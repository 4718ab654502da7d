"""Over which rows a figure is averaged, and how these came."""

from __future__ import annotations

import math
from typing import Any

from plainodds.answers.drawn import Sampling
from plainodds.answers.estimate import Estimate
from plainodds.answers.where import Mask, Where
from plainodds.model.predictors import PredictorFacts, Subject
from plainodds.phrases.labels import listed, predictor_name, value_label, values_range
from plainodds.phrases.lexicon import lexicon
from plainodds.phrases.numbers import guarded_count
from plainodds.phrases.parts import counted_rows
from plainodds.phrases.units import tidy

__all__ = ["cases_chosen", "drawn_method", "drawn_words", "rows_chosen", "values_chosen"]


def cases_chosen(subject: Subject, where: Where, counted: int) -> str:
    """Whom an average is about: "pipes like those in the data", "pipes with soil high"."""
    cases = tidy(subject.outcome.cases)
    if isinstance(where, Mask):
        rows = _rows(subject, counted)
        return f"the {cases} chosen ({rows})"
    if not where:
        return f"{cases} like those in the data"
    return lexicon().rows_with.format(cases, values_chosen(subject, where))


def rows_chosen(subject: Subject, where: Where, counted: int) -> str:
    """The rows averaged over: "1,234 rows with soil high"."""
    rows = _rows(subject, counted)
    if isinstance(where, Mask):
        return lexicon().rows_masked.format(rows)
    return lexicon().rows_with.format(rows, values_chosen(subject, where)) if where else rows


def _rows(subject: Subject, counted: int) -> str:
    return counted_rows(counted, guarded_count(counted, subject.smallest_cell))


def values_chosen(subject: Subject, where: tuple[tuple[str, Any], ...]) -> str:
    """Which values rows are chosen by: "soil high and pipe age 20 to 60 years"."""
    told = [(subject.predictor(name), held) for name, held in where]
    value = lexicon().value
    return listed([value.format(predictor_name(facts), _held(facts, held)) for facts, held in told])


def _held(facts: PredictorFacts, held: Any) -> str:
    if not isinstance(held, tuple):
        return value_label(facts, held)
    if not facts.is_number:
        return lexicon().either_or.join(value_label(facts, level) for level in held)
    low, high = held
    if math.isinf(high):
        return lexicon().or_more.format(value_label(facts, low))
    if math.isinf(low):
        return lexicon().or_less.format(value_label(facts, high))
    return values_range(facts, low, high)


def drawn_words(subject: Subject, sample: Sampling, estimate: Estimate) -> list[str]:
    """That an interval counts the rows' having been drawn; empty where it does not."""
    if sample == "fixed" or estimate.lower is None:
        return []
    return [
        "The intervals also allow for these rows having been drawn from a larger number of "
        f"{tidy(subject.outcome.cases)}"
    ]


def drawn_method(sample: Sampling) -> str:
    """How the rows' having been drawn comes into the variance, to end a sentence on method."""
    if sample == "fixed":
        return "; the rows are taken as fixed (the interval is about these very rows)"
    return (
        "; the rows are taken as drawn from a larger population: to the variance that comes from "
        "the coefficients is added the sum, over the rows, of the squared share of a row in the "
        "average (divided by how many cases the row stands for) times the squared distance of its "
        "own value from the average"
    )
