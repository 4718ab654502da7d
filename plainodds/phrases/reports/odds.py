"""Report tables of odds ratios: predictors as headings, references, counts and tests shown."""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence
from dataclasses import dataclass

from plainodds.answers.odds import OddsAnswer
from plainodds.model.predictors import OutcomeFacts
from plainodds.phrases.captions.parts import fitted_words
from plainodds.phrases.labels import listed, odds_of_event, predictor_name, sentence_case
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import count, guarded_count, wording
from plainodds.phrases.odds_lines import Counts, OddsLine, odds_lines
from plainodds.phrases.parts import model_cautions
from plainodds.phrases.reports.cells import interval_title, p_cell, ratio_cell
from plainodds.phrases.reports.report import ReportTable, report_of
from plainodds.phrases.reports.rows import ReportRow, entry, heading, reference
from plainodds.phrases.sentences import joined
from plainodds.phrases.units import tidy

__all__: list[str] = []

_WITHHELD = "\u2013"


@report_of.register
def _(answer: OddsAnswer) -> ReportTable:
    subject, lines = answer.subject, odds_lines(answer)
    models = answer.question.models or ("",)
    one = interval_title(subject, message("Odds ratio"), answer.question.level)
    names = [tidy(name) for name in models if name]
    columns = [f"{name}: {one}" for name in names] or [one]
    tested = not names and not subject.no_interval
    if tested:
        columns.append(message("p-value"))
    shape = _Shape(models, tested, *_counted(lines), subject.smallest_cell)
    counts = [message("Events")] * shape.events + [_cases(subject.outcome)] * shape.cases
    told = joined(_kind(answer), *_given(answer), *_whose(answer, shape), fitted_words(subject))
    return ReportTable(
        odds_of_event(subject.outcome),
        (message("Predictor"), *counts, *columns),
        tuple(row for line in lines for row in _rows(line, shape)),
        (told, *model_cautions(subject)),
    )


def _cases(outcome: OutcomeFacts) -> str:
    """What the rows are, as a heading; in the language of now where the analyst did not say."""
    cases = tidy(outcome.cases)
    return message("Cases") if cases == "cases" else sentence_case(cases)


@dataclass(frozen=True)
class _Shape:
    """Which columns there are, beside those of the odds ratios."""

    models: tuple[str, ...]
    tested: bool
    events: bool
    cases: bool
    smallest: int


def _counted(lines: Sequence[OddsLine]) -> tuple[bool, bool]:
    """Whether events are known of any line, and whether cases are."""
    counts = [line.counts for line in lines if line.counts is not None]
    return any(each.events is not None for each in counts), bool(counts)


def _whose(answer: OddsAnswer, shape: _Shape) -> list[str]:
    """What a dash among the events means, and whose counts these are."""
    told = []
    events = [line.counts.events for line in odds_lines(answer) if line.counts is not None]
    if any(each is not None and math.isnan(each) for each in events):
        few = count(shape.smallest)
        told.append(
            message(
                "– among the events: fewer than {} with or without them, or a number that would "
                "give such a one away",
                few,
            )
        )
    if shape.cases and answer.question.models:
        first = tidy(answer.question.models[0])
        told.append(
            message("Counts are of the model “{}”, or of the first that has the predictor.", first)
        )
    return told


def _kind(answer: OddsAnswer) -> str:
    if answer.subject.no_interval:
        return ""
    if answer.question.interval == "likelihood":
        return message("Intervals by profile likelihood")
    return message("Intervals are Wald intervals")


def _given(answer: OddsAnswer) -> list[str]:
    """Whose odds ratios depend on which other predictors."""
    told = {}
    for row in answer.rows:
        if row.given:
            name = predictor_name(answer.subject.predictor(row.predictor))
            others = [predictor_name(answer.subject.predictor(each)) for each, _ in row.given]
            told[name] = message("The odds ratios of {} depend on {}", name, listed(others))
    return list(told.values())


def _rows(line: OddsLine, shape: _Shape) -> Iterator[ReportRow]:
    """A line of the printed table as rows of the report."""
    counts = _counts(line.counts, shape)
    last = [""] * shape.tested
    if line.kind == "heading":
        yield heading(", ".join(filter(None, (line.name, line.rest))))
    elif line.kind == "level":
        yield entry(line.name, *counts, *[""] * len(shape.models), *last, within=True)
    elif line.kind == "reference":
        one, none = f"1 {message('(reference)')}", wording().not_known
        ones = [one if name in line.models else none for name in shape.models]
        yield reference(line.name, *counts, *ones, *last)
    elif line.kind == "test":
        assert line.test is not None
        told = p_cell(line.test.test.p_value)
        of_model = message("p-value {}", told)
        cells = [of_model if name == line.test.model else "" for name in shape.models]
        figures = ["", told] if shape.tested else cells
        yield entry(line.name, *counts, *figures, within=True)
    else:
        if not line.depth:
            yield heading(line.name)
        label = line.name if line.depth else line.rest
        label = "; ".join(filter(None, (line.level, label)))
        by_model = {row.model: row for row in line.rows}
        cells = [
            ratio_cell(by_model[name].odds_ratio) if name in by_model else wording().not_known
            for name in shape.models
        ]
        if shape.tested:
            cells.append(p_cell(line.rows[0].p_value))
        yield entry(label, *counts, *cells, within=True)


def _counts(counts: Counts | None, shape: _Shape) -> list[str]:
    """Events and cases, as far as the table has columns for them."""
    if counts is None:
        return [""] * (shape.events + shape.cases)
    cells = []
    if shape.events:
        events = counts.events
        known = events is not None and not math.isnan(events)
        cells.append(count(round(events or 0.0)) if known else _WITHHELD)
    return [*cells, guarded_count(round(counts.cases), shape.smallest)]
