"""Report tables of effects."""

from __future__ import annotations

from plainodds.answers.effects import EffectsAnswer
from plainodds.phrases.captions.parts import fitted_words, rest_words
from plainodds.phrases.labels import effect_label, effects_title, predictor_label, value_label
from plainodds.phrases.lexicon import lexicon, message
from plainodds.phrases.parts import model_cautions
from plainodds.phrases.reports.cells import interval_title, p_cell, points_cell
from plainodds.phrases.reports.report import ReportTable, report_of
from plainodds.phrases.reports.rows import ReportRow, entry, heading
from plainodds.phrases.sentences import joined

__all__: list[str] = []


@report_of.register
def _(answer: EffectsAnswer) -> ReportTable:
    subject, question = answer.subject, answer.question
    with_p = not subject.no_interval
    columns = [interval_title(subject, message("Percentage points"), question.level)]
    rows: list[ReportRow] = []
    opened = None
    for row in answer.rows:
        facts = subject.predictor(row.predictor)
        head = predictor_label(facts)
        if question.by is not None and row.by is not None:
            by = subject.predictor(question.by)
            within = lexicon().value.format(predictor_label(by), value_label(by, row.by))
            head = f"{within}: {head}"
        if head != opened:
            rows.append(heading(head))
            opened = head
        cells = [points_cell(row.effect), *([p_cell(row.p_value)] if with_p else [])]
        rows.append(entry(effect_label(facts, row), *cells, within=True))
    return ReportTable(
        effects_title(answer),
        (message("Predictor"), *columns, *([message("p-value")] if with_p else [])),
        tuple(rows),
        (
            joined(
                rest_words(
                    subject,
                    question.others,
                    answer.held,
                    "changes",
                    sum(answer.counted),
                    question.where,
                ),
                fitted_words(subject),
            ),
            *model_cautions(subject, offset_held=question.others != "observed"),
        ),
    )
