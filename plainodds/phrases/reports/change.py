"""Report tables of changes."""

from __future__ import annotations

import math

from plainodds.answers.change import ChangeAnswer
from plainodds.phrases.captions.parts import fitted_words, rest_words
from plainodds.phrases.labels import chance_of, sentence_case
from plainodds.phrases.lexicon import message
from plainodds.phrases.moves import end_label, settled_moves, start_label
from plainodds.phrases.needed import needed_technical
from plainodds.phrases.parts import model_cautions
from plainodds.phrases.reports.cells import (
    chance_cell,
    interval_title,
    points_cell,
    ratio_cell,
)
from plainodds.phrases.reports.report import ReportTable, report_of
from plainodds.phrases.reports.rows import entry, heading
from plainodds.phrases.sentences import joined, sentence

__all__: list[str] = []


@report_of.register
def _(answer: ChangeAnswer) -> ReportTable:
    subject, question, compared = answer.subject, answer.question, answer.comparison
    moves = settled_moves(answer)
    known = not math.isnan(answer.number_needed.estimate)
    told = needed_technical(answer.number_needed, question.level) if known else []
    return ReportTable(
        chance_of(subject.outcome),
        (message("Figure"), interval_title(subject, message("Estimate"), question.level)),
        (
            heading(message("Chance")),
            entry(
                sentence_case(start_label(subject, moves)), chance_cell(answer.start), within=True
            ),
            entry(sentence_case(end_label(subject, moves)), chance_cell(answer.end), within=True),
            heading(message("Compared")),
            entry(
                message("Difference, percentage points"),
                points_cell(compared.risk_difference),
                within=True,
            ),
            entry(message("Ratio of chances"), ratio_cell(compared.risk_ratio), within=True),
            entry(message("Odds ratio"), ratio_cell(compared.odds_ratio), within=True),
        ),
        (
            *map(sentence, told),
            joined(
                rest_words(
                    subject,
                    question.others,
                    answer.held,
                    "chances",
                    answer.counted,
                    question.where,
                ),
                fitted_words(subject),
            ),
            *model_cautions(subject, offset_held=question.others != "observed"),
        ),
    )
