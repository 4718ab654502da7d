"""Report tables of odds ratios: predictors as headings, reference levels shown."""

from __future__ import annotations

from collections.abc import Iterator
from itertools import groupby

from plainodds.answers.odds import OddsAnswer, OddsRow
from plainodds.model.predictors import PredictorFacts
from plainodds.phrases.captions.parts import fitted_words, joined
from plainodds.phrases.labels import (
    change_label,
    given_label,
    listed,
    odds_of_event,
    predictor_label,
    predictor_name,
    value_label,
)
from plainodds.phrases.numbers import NOT_KNOWN
from plainodds.phrases.parts import model_cautions
from plainodds.phrases.reports.cells import interval_title, p_cell, ratio_cell
from plainodds.phrases.reports.report import ReportTable, report_of
from plainodds.phrases.reports.rows import ReportRow, entry, heading, reference
from plainodds.phrases.units import tidy
from plainodds.values import Pairs

__all__: list[str] = []


@report_of.register
def _(answer: OddsAnswer) -> ReportTable:
    subject, level = answer.subject, answer.question.level
    models = answer.question.models or ("",)
    one = interval_title(subject, "Odds ratio", level)
    names = [tidy(name) for name in models if name]
    columns = [f"{name}: {one}" for name in names] or [one]
    if not names and not subject.no_interval:
        columns.append("p-value")
    return ReportTable(
        odds_of_event(subject.outcome),
        ("Predictor", *columns),
        tuple(_rows(answer, models)),
        (joined(_kind(answer), *_given(answer), fitted_words(subject)), *model_cautions(subject)),
    )


def _kind(answer: OddsAnswer) -> str:
    if answer.subject.no_interval:
        return ""
    likelihood = answer.question.interval == "likelihood"
    return f"Intervals {'by profile likelihood' if likelihood else 'are Wald intervals'}"


def _given(answer: OddsAnswer) -> list[str]:
    """Whose odds ratios depend on which other predictors."""
    told = {}
    for row in answer.rows:
        if row.given:
            name = predictor_name(answer.subject.predictor(row.predictor))
            others = [predictor_name(answer.subject.predictor(each)) for each, _ in row.given]
            told[name] = f"The odds ratios of {name} depend on {listed(others)}"
    return list(told.values())


def _rows(answer: OddsAnswer, models: tuple[str, ...]) -> Iterator[ReportRow]:
    for name, group in groupby(answer.rows, lambda row: row.predictor):
        facts = answer.subject.predictor(name)
        changes: dict[Pairs, dict[tuple[object, ...], dict[str, OddsRow]]] = {}
        for row in group:
            of_given = changes.setdefault(row.given, {})
            of_given.setdefault((row.start, row.end), {})[row.model] = row
        yield heading(predictor_label(facts))
        for given, told in changes.items():
            yield from _of_one(answer, facts, given, list(told.values()), models)


def _of_one(
    answer: OddsAnswer,
    facts: PredictorFacts,
    given: Pairs,
    changes: list[dict[str, OddsRow]],
    models: tuple[str, ...],
) -> Iterator[ReportRow]:
    """The changes of one predictor at one combination of its modifiers."""
    at = f"; {given_label(answer.subject, given)}" if given else ""
    starts = {_any(held).start for held in changes}
    show_reference = not facts.is_number and len(starts) == 1
    if show_reference:
        start = value_label(facts, next(iter(starts)))
        blank = [""] if models == ("",) and not answer.subject.no_interval else []
        yield reference(f"{start}{at}", *["1 (reference)"] * len(models), *blank)
    for held in changes:
        row = _any(held)
        label = value_label(facts, row.end) if show_reference else change_label(facts, row)
        cells = [
            ratio_cell(held[model].odds_ratio) if model in held else NOT_KNOWN for model in models
        ]
        if models == ("",) and not answer.subject.no_interval:
            cells.append(p_cell(row.p_value))
        yield entry(f"{label}{at}", *cells, within=True)


def _any(held: dict[str, OddsRow]) -> OddsRow:
    return next(iter(held.values()))
