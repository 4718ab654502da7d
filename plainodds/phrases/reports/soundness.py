"""Report tables of what was looked at in a fit."""

from __future__ import annotations

from collections.abc import Iterator

from plainodds.answers.soundness import SoundnessAnswer
from plainodds.phrases.captions.parts import fitted_words
from plainodds.phrases.checks.finding_words import finding_figures, finding_words
from plainodds.phrases.checks.headings import concern_label
from plainodds.phrases.lexicon import message
from plainodds.phrases.parts import model_cautions
from plainodds.phrases.reports.report import ReportTable, report_of
from plainodds.phrases.reports.rows import ReportRow, entry, heading
from plainodds.phrases.sentences import joined

__all__: list[str] = []


@report_of.register
def _(answer: SoundnessAnswer) -> ReportTable:
    return ReportTable(
        message("What was looked at in the fit"),
        (message("Figure"), message("Value")),
        tuple(_rows(answer)),
        (joined(fitted_words(answer.subject)), *model_cautions(answer.subject)),
    )


def _rows(answer: SoundnessAnswer) -> Iterator[ReportRow]:
    subject, level = answer.subject, answer.question.level
    for finding in answer.findings:
        said = finding_words(finding, subject, level)
        yield heading(f"{said.heading}: {concern_label(finding.concern)}")
        figures = finding_figures(finding, subject, level)
        if not figures:
            yield entry(said.what, "", within=True)
        for label, text in figures:
            yield entry(label, text, within=True)
