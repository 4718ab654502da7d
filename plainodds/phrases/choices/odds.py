"""What is told of odds ratios."""

from __future__ import annotations

import math
from typing import Literal, TypeAlias

from plainodds import scales
from plainodds.answers.odds import OddsAnswer, OddsRow
from plainodds.phrases.labels import predictor_name
from plainodds.phrases.numbers import ratio
from plainodds.phrases.parts import is_beyond_saying
from plainodds.phrases.unbounded import has_finite_estimate

__all__ = [
    "Side",
    "curved_names",
    "extreme_names",
    "highest_and_lowest",
    "modified_names",
    "moved_chances",
    "side_of",
    "typical_chance",
]

Side: TypeAlias = Literal["not known", "open", "same", "higher", "lower"]


def typical_chance(answer: OddsAnswer) -> float:
    """The chance at the typical profile; not known where the sample tells no chances."""
    subject = answer.subject
    if subject.sampling == "case-control" and subject.prevalence is None:
        return math.nan
    return answer.typical_probability


def moved_chances(answer: OddsAnswer, row: OddsRow) -> tuple[float, float] | None:
    """The chance at the typical profile before and after this row's change.

    Only where the answer's numbers give them exactly: where the change starts from the
    typical profile, or where another row leads from this one's start to it.
    """
    subject = answer.subject
    typical = subject.predictor(row.predictor).typical
    given_typical = all(subject.predictor(name).typical == held for name, held in row.given)
    if row.model or not given_typical or not 0 < typical_chance(answer) < 1:
        return None
    start = float(scales.linear_predictor_from_probability(answer.typical_probability))
    if not row.per_step and row.start != typical:
        leading = [each for each in answer.rows if _alike(each, row) and each.end == typical]
        start -= leading[0].log_odds_ratio.estimate if leading else math.nan
    end = start + row.log_odds_ratio.estimate
    if not (math.isfinite(start) and math.isfinite(end)):
        return None
    before, after = scales.probability_from_linear_predictor([start, end])
    return float(before), float(after)


def _alike(one: OddsRow, other: OddsRow) -> bool:
    return (one.predictor, one.start, one.given) == (other.predictor, other.start, other.given)


def side_of(row: OddsRow) -> Side:
    """On which side of 1 an odds ratio lies, as far as its interval and its figures show."""
    estimate = row.odds_ratio
    if math.isnan(estimate.estimate):
        return "not known"
    known = estimate.lower is not None and estimate.upper is not None
    if known and estimate.lower <= 1 <= estimate.upper:  # type: ignore[operator]
        return "open"
    if ratio(estimate.estimate) == ratio(1.0):
        return "same"
    return "higher" if estimate.estimate > 1 else "lower"


def modified_names(answer: OddsAnswer) -> dict[str, tuple[str, ...]]:
    """The predictors whose odds ratios depend on others, with these others."""
    subject = answer.subject
    modified: dict[str, tuple[str, ...]] = {}
    for row in answer.rows:
        if row.given:
            modifiers = (predictor_name(subject.predictor(each)) for each, _ in row.given)
            name = predictor_name(subject.predictor(row.predictor))
            modified.setdefault(name, tuple(modifiers))
    return modified


def curved_names(answer: OddsAnswer) -> list[str]:
    """The numbers whose equal steps do not have equal odds ratios."""
    found = [answer.subject.predictor(row.predictor) for row in answer.rows]
    curved = (facts for facts in found if facts.is_number and not facts.linear)
    return list(dict.fromkeys(map(predictor_name, curved)))


def extreme_names(answer: OddsAnswer) -> list[str]:
    """The predictors with an odds ratio so far from 1 that only its limit is written."""
    found = (
        row for row in answer.rows if has_finite_estimate(row) and is_beyond_saying(row.odds_ratio)
    )
    names = (predictor_name(answer.subject.predictor(row.predictor)) for row in found)
    return list(dict.fromkeys(names))


def highest_and_lowest(answer: OddsAnswer) -> tuple[OddsRow, ...]:
    """The rows of the largest and the smallest odds ratio; one where they are the same."""
    known = [row for row in answer.rows if not math.isnan(row.odds_ratio.estimate)]
    if not known:
        return ()
    highest = max(known, key=lambda row: row.odds_ratio.estimate)
    lowest = min(known, key=lambda row: row.odds_ratio.estimate)
    return (highest,) if lowest is highest else (highest, lowest)
