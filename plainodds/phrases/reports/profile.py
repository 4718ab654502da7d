"""Report tables of profiles: the chance, and what each predictor adds."""

from __future__ import annotations

from collections.abc import Iterator

from plainodds.answers.profile import ProfileAnswer, ProfilePoint
from plainodds.phrases.captions.parts import fitted_words
from plainodds.phrases.labels import chance_of, listed, predictor_label, value_label
from plainodds.phrases.lexicon import lexicon, message
from plainodds.phrases.parts import model_cautions, profile_words
from plainodds.phrases.reports.cells import (
    chance_cell,
    interval_title,
    points_cell,
    ratio_cell,
    signed_cell,
)
from plainodds.phrases.reports.report import ReportTable, report_of
from plainodds.phrases.reports.rows import ReportRow, entry, heading
from plainodds.phrases.sentences import joined

__all__: list[str] = []

_ALL = 1_000_000


@report_of.register
def _(answer: ProfileAnswer) -> ReportTable:
    subject, level = answer.subject, answer.question.level
    return ReportTable(
        chance_of(subject.outcome),
        (message("Figure"), interval_title(subject, message("Estimate"), level)),
        tuple(_rows(answer)),
        (joined(_whom(answer), fitted_words(subject)), *model_cautions(subject)),
    )


def _whom(answer: ProfileAnswer) -> str:
    told = profile_words(answer.subject, answer.point.values, at_most=_ALL)
    if answer.comparison is None:
        return message("The profile: {}", told)
    other = profile_words(answer.subject, answer.start.values, at_most=_ALL)
    return message("The profile: {}. The other profile: {}", told, other)


def _rows(answer: ProfileAnswer) -> Iterator[ReportRow]:
    compared = answer.comparison
    yield heading(message("The profile"))
    yield from _point(answer.point)
    if compared is not None:
        yield heading(message("The other profile"))
        yield from _point(answer.start)
        yield heading(message("The profile against the other"))
        difference = points_cell(compared.risk_difference)
        yield entry(message("Difference, percentage points"), difference, within=True)
        yield entry(message("Ratio of chances"), ratio_cell(compared.risk_ratio), within=True)
        yield entry(message("Odds ratio"), ratio_cell(compared.odds_ratio), within=True)
    values = dict(answer.point.values)
    yield heading(message("Adds to the log odds, from where the ledger starts"))
    for row in answer.ledger:
        named = [(answer.subject.predictor(name), values[name]) for name in row.predictors]
        value = lexicon().value
        told = [value.format(predictor_label(facts), value_label(facts, v)) for facts, v in named]
        yield entry(listed(told), signed_cell(row.adds), within=True)


def _point(point: ProfilePoint) -> Iterator[ReportRow]:
    yield entry(message("Chance"), chance_cell(point.probability), within=True)
    yield entry(message("Odds"), ratio_cell(point.odds), within=True)
    yield entry(message("Log odds"), signed_cell(point.linear_predictor), within=True)
