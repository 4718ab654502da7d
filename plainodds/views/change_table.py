"""The table of a change: both chances, and how they compare."""

from __future__ import annotations

import math
from collections.abc import Callable

from plainodds.answers.change import ChangeAnswer
from plainodds.answers.comparing import NumberNeeded
from plainodds.answers.estimate import Estimate
from plainodds.phrases.labels import chance_of, sentence_case
from plainodds.phrases.moves import end_label, settled_moves, start_label
from plainodds.phrases.numbers import (
    NOT_KNOWN,
    bare_points,
    bare_points_span,
    cases_apart,
    cases_on_sides,
    chance,
    confidence,
    count,
    needed,
    ratio,
    ratio_interval,
    span,
)
from plainodds.phrases.units import tidy
from plainodds.views import markup
from plainodds.views.markup import Column, Markup, Row

__all__ = ["change_table"]

_Cell = str | tuple[str, ...]


def change_table(answer: ChangeAnswer) -> Markup:
    """Both chances, their difference as points and as counts, ratios and the number needed."""
    subject, compared = answer.subject, answer.comparison
    moves, cases = settled_moves(answer), tidy(subject.outcome.cases)
    has_interval = not subject.no_interval
    columns = [Column("Figure"), Column("Estimate", is_number=True)]
    if has_interval:
        columns.append(Column(f"{confidence(answer.question.level)} interval", is_number=True))

    def row(title: str, estimate: Estimate, say: _Say, span_of: _SpanOf) -> tuple[_Cell, ...]:
        cells = (title, say(estimate.estimate))
        if not has_interval:
            return cells
        if estimate.lower is None or estimate.upper is None:
            return (*cells, NOT_KNOWN)
        return (*cells, span_of(estimate.lower, estimate.upper))

    difference = compared.risk_difference
    rows = [
        row(sentence_case(start_label(subject, moves)), answer.start, chance, span),
        row(sentence_case(end_label(subject, moves)), answer.end, chance, span),
        row("Difference, percentage points", difference, bare_points, bare_points_span),
        *(row(f"In {count(over)} {cases}", difference, *_counts(over)) for over in (100, 1_000)),
        row("Chances, as a ratio", compared.risk_ratio, ratio, ratio_interval),
        row("Odds, as a ratio", compared.odds_ratio, ratio, ratio_interval),
    ]
    if not math.isnan(answer.number_needed.estimate):
        rows.append(_needed(answer.number_needed, cases)[: len(columns)])
    average = "average " if answer.question.others == "observed" else ""
    title = chance_of(subject.outcome)
    title = f"Average {title[:1].lower()}{title[1:]}" if average else title
    return markup.table(title, columns, [Row(cells) for cells in rows])


_Say = Callable[[float], str]
_SpanOf = Callable[[float, float], str]


def _counts(over: int) -> tuple[_Say, _SpanOf]:
    return (
        lambda difference: cases_apart(difference, over),
        lambda lower, upper: cases_on_sides(lower, upper, over),
    )


def _needed(number: NumberNeeded, cases: str) -> tuple[_Cell, ...]:
    """The number needed; its interval has two pieces where it includes no difference."""
    side = "more" if number.more else "fewer"
    title = f"{sentence_case(cases)} for one event {side}"
    pieces = [
        f"{needed(low)} to {needed(high)}{'' if own == side else f' for one {own}'}"
        for own, ends in (("more", number.for_one_more), ("fewer", number.for_one_fewer))
        if ends is not None
        for low, high in [ends]
    ]
    if len(pieces) == 2 and not number.more:
        pieces.reverse()
    told = (f"{pieces[0]},", pieces[1]) if len(pieces) == 2 else tuple(pieces)
    return title, needed(number.estimate), told or NOT_KNOWN
