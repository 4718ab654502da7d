"""What a printed table of odds ratios has to say beneath itself."""

from __future__ import annotations

import math

from plainodds.answers.odds import OddsAnswer
from plainodds.drawings.furniture import Notes
from plainodds.drawings.odds_table_axis import Extent
from plainodds.drawings.odds_table_columns import DASH, Columns
from plainodds.phrases.labels import why_no_interval
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import count
from plainodds.phrases.odds_lines import odds_lines
from plainodds.phrases.unbounded import has_finite_estimate, unbounded_note
from plainodds.phrases.units import tidy

__all__ = ["TableNotes", "notes_of"]


class TableNotes(Notes):
    """Small print in as many lines as it needs."""

    _lines = 12


def notes_of(answer: OddsAnswer, extent: Extent, columns: Columns) -> list[str]:
    """Notes on cuts, on dashes, on whose counts these are, on what has no estimate."""
    lines, subject, notes = odds_lines(answer), answer.subject, []
    cut = [each for row in answer.rows for each in extent.triple(row)]
    if 0.0 in cut or math.inf in cut:
        notes.append(
            message(
                "Arrow: the line goes on beyond the break of the axis; its figures stand in the "
                "table."
            )
        )
    events = [line.counts.events for line in lines if line.counts is not None]
    if any(each is not None and math.isnan(each) for each in events):
        few = count(subject.smallest_cell)
        notes.append(
            message(
                "A dash among the events: fewer than {} with or without them, or a number that "
                "would give such a one away.",
                few,
            )
        )
    if any(text == DASH for each in columns.figures for text in each):
        notes.append(message("A dash among the figures: not in this model."))
    if events and answer.question.models:
        first = tidy(answer.question.models[0])
        notes.append(
            message("Counts are of the model “{}”, or of the first that has the predictor.", first)
        )
    if any(math.isinf(row.log_odds_ratio.estimate) for row in answer.rows):
        notes.append(unbounded_note())
    if any(row.odds_ratio.lower is None and has_finite_estimate(row) for row in answer.rows):
        notes.append(why_no_interval(subject))
    return notes
