"""Odds ratios in words."""

from __future__ import annotations

import math

from plainodds import scales
from plainodds.answers.odds import OddsAnswer, OddsRow
from plainodds.model.predictors import PredictorFacts
from plainodds.phrases.alternative import alternative
from plainodds.phrases.concerns import sparse_cautions, unseen_cautions
from plainodds.phrases.labels import (
    change_label,
    from_to,
    given_clause,
    listed,
    predictor_name,
    row_label,
    step_label,
    value_label,
)
from plainodds.phrases.likelihood import (
    interval_method,
    likelihood_cautions,
    odds_ratio_words,
)
from plainodds.phrases.numbers import (
    chance,
    confidence,
    denominator,
    frequency,
    p_value,
    ratio,
)
from plainodds.phrases.parts import (
    ASSOCIATION,
    beyond_saying,
    is_beyond_saying,
    model_cautions,
    rather,
    rows_words,
    sentence,
    signed_with_interval,
    standard_error,
    typical_case,
    typical_words,
)
from plainodds.phrases.saying import Audience, Words, for_audience, words
from plainodds.phrases.unbounded import (
    has_finite_estimate,
    unbounded_cautions,
    unbounded_told,
)
from plainodds.phrases.units import tidy

__all__: list[str] = []

_RARE = 0.10


@words.register
def _(answer: OddsAnswer, audience: Audience = "plain") -> Words:
    return for_audience(audience, {"plain": _plain, "technical": _technical}, answer)


def _plain(answer: OddsAnswer) -> Words:
    moves = [_chances(answer, row) for row in answer.rows]
    typical = _typical_chance(answer)
    known = [typical, *(each for move in moves if move for each in move)]
    over = denominator(known)
    told = [
        sentence(_plain_row(answer, row, move, over))
        for row, move in zip(answer.rows, moves, strict=True)
    ]
    start = [] if math.isnan(typical) else [_typical(answer, over)]
    cautions = (*_reading(answer, known), ASSOCIATION, *_cautions(answer))
    return Words((*start, *told), (*cautions, *model_cautions(answer.subject)))


def _typical_chance(answer: OddsAnswer) -> float:
    """The chance at the typical profile; not known where the sample tells no chances."""
    subject = answer.subject
    if subject.sampling == "case-control" and subject.prevalence is None:
        return math.nan
    return answer.typical_probability


def _cautions(answer: OddsAnswer) -> tuple[str, ...]:
    return (
        *unbounded_cautions(answer),
        *sparse_cautions(answer),
        *unseen_cautions(answer),
        *_changes(answer),
        *_extremes(answer),
        *likelihood_cautions(answer),
    )


def _typical(answer: OddsAnswer, over: int) -> str:
    outcome, typical = answer.subject.outcome, answer.typical_probability
    models = answer.question.models
    by = f", by the model “{tidy(models[0])}”" if models else ""
    return sentence(
        f"For {typical_case(outcome)}, {typical_words(answer.subject)}, the chance of "
        f"{tidy(outcome.event)} is {chance(typical)}, that is {frequency(typical, over)}{by}"
    )


def _plain_row(
    answer: OddsAnswer, row: OddsRow, move: tuple[float, float] | None, over: int
) -> str:
    subject = answer.subject
    opening = _opening(answer, row)
    if not has_finite_estimate(row):
        return f"{opening}, {unbounded_told(answer, row)}"
    odds = _odds_words(row, answer.question.level)
    if move is None:
        return f"{opening}, the odds of {tidy(subject.outcome.event)} are {odds}"
    before, after = move
    return (
        f"{opening}, the chance for {typical_case(subject.outcome)} is "
        f"{rather(after, before, over)}; the odds are {odds}"
    )


def _opening(answer: OddsAnswer, row: OddsRow) -> str:
    facts = answer.subject.predictor(row.predictor)
    text = _change(facts, row)
    if row.given:
        text = f"{text}, {given_clause(answer.subject, row.given)}"
    return f"in the model “{tidy(row.model)}”, {text}" if row.model else text


def _change(facts: PredictorFacts, row: OddsRow) -> str:
    name = predictor_name(facts)
    if not facts.is_number:
        return (
            f"for {name} {value_label(facts, row.end)} rather than {value_label(facts, row.start)}"
        )
    if row.per_step:
        return f"{step_label(facts, float(row.end) - float(row.start))} of {name}"
    return f"with {name} {from_to(facts, row.start, row.end)}"


def _odds_words(row: OddsRow, level: float) -> str:
    """What happens to the odds, to follow "the odds are"."""
    estimate = row.odds_ratio
    number = estimate.estimate
    if math.isnan(number):
        return "multiplied by a number that is not known"
    multiplied = f"multiplied by {odds_ratio_words(row, level)}"
    if estimate.lower is None or estimate.upper is None:
        both_sides = False
    else:
        both_sides = estimate.lower <= 1 <= estimate.upper
    if both_sides:
        return f"{multiplied}, which leaves open whether they are higher or lower"
    if ratio(number) == "1.00":
        return multiplied
    return f"{'higher' if number > 1 else 'lower'}, {multiplied}"


def _chances(answer: OddsAnswer, row: OddsRow) -> tuple[float, float] | None:
    """The chance at the typical profile before and after this row's change.

    Only where the answer's numbers give them exactly: where the change starts from the
    typical profile, or where another row leads from this one's start to it.
    """
    subject = answer.subject
    typical = subject.predictor(row.predictor).typical
    given_typical = all(subject.predictor(name).typical == held for name, held in row.given)
    if row.model or not given_typical or not 0 < _typical_chance(answer) < 1:
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


def _reading(answer: OddsAnswer, chances: list[float]) -> tuple[str, ...]:
    typical = _typical_chance(answer)
    plain = "An odds ratio is not a ratio of chances"
    if math.isnan(typical):
        return (f"{plain}; the two are close only where the chances are under about 10%.",)
    if typical > _RARE:
        return (
            f"{plain}: with a typical chance of {chance(typical)}, above about 10%, it lies "
            "further from 1 than the ratio of the chances does.",
        )
    if max(chances) > _RARE:
        return (
            f"{plain}: where chances reach above about 10%, as some here do, it lies further "
            "from 1 than the ratio of the chances does.",
        )
    return ()


def _changes(answer: OddsAnswer) -> tuple[str, ...]:
    """Why some rows are stated at values of another predictor, or between two values."""
    subject = answer.subject
    modified: dict[str, tuple[str, ...]] = {}
    curved: list[str] = []
    for row in answer.rows:
        name = predictor_name(subject.predictor(row.predictor))
        if row.given:
            modifiers = (predictor_name(subject.predictor(each)) for each, _ in row.given)
            modified.setdefault(name, tuple(modifiers))
        facts = subject.predictor(row.predictor)
        if facts.is_number and not facts.linear and name not in curved:
            curved.append(name)
    told = [
        f"The odds ratio for {name} depends on {listed(list(others))}, so it is stated at values "
        f"of {'these' if len(others) > 1 else 'that predictor'}."
        for name, others in modified.items()
    ]
    if curved:
        told.append(
            f"Equal steps of {listed(curved)} do not have equal odds ratios, so two values are "
            "compared."
        )
    return tuple(told)


def _extremes(answer: OddsAnswer) -> tuple[str, ...]:
    found = {
        predictor_name(answer.subject.predictor(row.predictor)): None
        for row in answer.rows
        if has_finite_estimate(row) and is_beyond_saying(row.odds_ratio)
    }
    return (beyond_saying(listed(list(found))),) if found else ()


def _technical(answer: OddsAnswer) -> Words:
    subject = answer.subject
    told = [sentence(_technical_row(answer, row)) for row in answer.rows]
    method = (
        "Odds ratios are exponents of the change in the linear predictor, "
        f"from {rows_words(subject)}"
    )
    if any(row.odds_ratio.lower is not None for row in answer.rows):
        method += f"; {interval_method(answer)}"
    reading = _reading(answer, [_typical_chance(answer)])
    cautions = (*reading, ASSOCIATION, *_cautions(answer))
    return Words((*told, sentence(method)), (*cautions, *model_cautions(subject)))


def _technical_row(answer: OddsAnswer, row: OddsRow) -> str:
    label = row_label(answer.subject, row)
    model = f"Model “{tidy(row.model)}”: " if row.model else ""
    level = answer.question.level
    text = (
        f"{model}{label}: odds ratio {odds_ratio_words(row, level)}, log odds ratio "
        f"{signed_with_interval(row.log_odds_ratio, level)}{standard_error(row.log_odds_ratio)}"
    )
    return text if row.p_value is None else f"{text}, p-value {p_value(row.p_value)}"


@alternative.register
def _(answer: OddsAnswer) -> str:
    rows = answer.rows
    if not rows:
        return "A picture of odds ratios without any row."
    level = answer.question.level
    kind = "odds ratio" if len(rows) == 1 else "odds ratios"
    with_intervals = any(row.odds_ratio.lower is not None for row in rows)
    start = (
        f"{len(rows)} {kind} for {tidy(answer.subject.outcome.event)} as points on a logarithmic "
        f"axis{f', with lines for their {confidence(level)} intervals' if with_intervals else ''}"
    )
    known = [row for row in rows if not math.isnan(row.odds_ratio.estimate)]
    if not known:
        return sentence(start)
    highest = max(known, key=lambda row: row.odds_ratio.estimate)
    lowest = min(known, key=lambda row: row.odds_ratio.estimate)
    told = f"{'It' if len(rows) == 1 else 'The largest'} is {_short(answer, highest)}"
    if lowest is not highest:
        told += f"; the smallest is {_short(answer, lowest)}"
    return f"{sentence(start)} {sentence(told)}"


def _short(answer: OddsAnswer, row: OddsRow) -> str:
    model = f", in the model “{tidy(row.model)}”" if row.model else ""
    facts = answer.subject.predictor(row.predictor)
    given = f", {given_clause(answer.subject, row.given)}" if row.given else ""
    odds = odds_ratio_words(row, answer.question.level)
    return f"{odds} for {predictor_name(facts)}, {change_label(facts, row)}{given}{model}"
