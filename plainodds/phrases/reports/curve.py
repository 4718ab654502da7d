"""Report tables of curves: the figures at a few points, one column for each line."""

from __future__ import annotations

from collections.abc import Callable

from plainodds.answers.curve import CurveAnswer, CurveLine, Scale
from plainodds.answers.estimate import Estimate
from plainodds.model.predictors import OutcomeFacts
from plainodds.phrases.captions.parts import fitted_words
from plainodds.phrases.choices.curve import tabled_places
from plainodds.phrases.held import others_words
from plainodds.phrases.labels import axis_title, line_label, scale_title, value_label
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import level_figures, quantity
from plainodds.phrases.parts import model_cautions
from plainodds.phrases.reports.cells import chance_cell, points_cell, ratio_cell, signed_cell
from plainodds.phrases.reports.report import ReportTable, report_of
from plainodds.phrases.reports.rows import entry
from plainodds.phrases.sentences import joined
from plainodds.phrases.units import tidy
from plainodds.phrases.ways import estimate_at

__all__: list[str] = []

_ALL = 1_000_000
_CELLS: dict[Scale, Callable[[Estimate], str]] = {
    "probability": chance_cell,
    "slope": points_cell,
    "odds": ratio_cell,
    "linear_predictor": signed_cell,
}


@report_of.register
def _(answer: CurveAnswer) -> ReportTable:
    subject, question = answer.subject, answer.question
    facts = subject.predictor(question.predictor)
    at = answer.lines[0].at
    places = tabled_places(len(at))
    rows = tuple(
        entry(
            quantity(float(at[place])) if facts.is_number else value_label(facts, at[place]),
            *(_cell(line, place, question.scale) for line in answer.lines),
        )
        for place in places
    )
    open_somewhere = any(not line.supported[place] for line in answer.lines for place in places)
    level = level_figures(question.level)
    return ReportTable(
        scale_title(answer),
        (axis_title(facts), *(_title(answer, line) for line in answer.lines)),
        rows,
        (
            *([] if subject.no_interval else [message("In brackets {}% intervals.", level)]),
            *([_few(subject.outcome)] if open_somewhere else []),
            joined(*others_words(answer, at_most=_ALL), fitted_words(subject)),
            *model_cautions(subject, offset_held=question.others != "observed"),
        ),
    )


def _few(outcome: OutcomeFacts) -> str:
    """What a star stands for."""
    cases = tidy(outcome.cases)
    if cases == "cases":
        return message("* The data have few cases there, or none.")
    return message("* The data have few {} there, or none.", cases)


def _title(answer: CurveAnswer, line: CurveLine) -> str:
    if answer.question.by is None or line.by is None:
        return message("Estimate")
    return line_label(answer.subject.predictor(answer.question.by), line.by)


def _cell(line: CurveLine, place: int, scale: Scale) -> str:
    star = "" if line.supported[place] else " *"
    return _CELLS[scale](estimate_at(line, place)) + star
