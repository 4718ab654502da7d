"""Odds ratios in words."""

from __future__ import annotations

import math

from plainodds.answers.odds import OddsAnswer, OddsRow
from plainodds.answers.odds_interactions import InteractionTest
from plainodds.model.predictors import PredictorFacts
from plainodds.phrases.alternative import alternative
from plainodds.phrases.choices.odds import (
    curved_names,
    extreme_names,
    highest_and_lowest,
    modified_names,
    moved_chances,
    side_of,
    typical_chance,
)
from plainodds.phrases.concerns import sparse_cautions, unseen_cautions
from plainodds.phrases.joined_tests import joined_test
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
)
from plainodds.phrases.parts import (
    association,
    beyond_saying,
    model_cautions,
    rather,
    rows_words,
    signed_with_interval,
    standard_error,
    typical_case,
    typical_words,
)
from plainodds.phrases.saying import Audience, Words, for_audience, words
from plainodds.phrases.sentences import sentence
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
    moves = [moved_chances(answer, row) for row in answer.rows]
    typical = typical_chance(answer)
    known = [typical, *(each for move in moves if move for each in move)]
    over = denominator(known)
    told = [
        sentence(_plain_row(answer, row, move, over))
        for row, move in zip(answer.rows, moves, strict=True)
    ]
    start = [] if math.isnan(typical) else [_typical(answer, over)]
    cautions = (*_reading(answer, known), association(answer.subject), *_cautions(answer))
    return Words((*start, *told), (*cautions, *model_cautions(answer.subject)))


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
    side = side_of(row)
    if side == "not known":
        return "multiplied by a number that is not known"
    multiplied = f"multiplied by {odds_ratio_words(row, level)}"
    if side == "open":
        return f"{multiplied}, which leaves open whether they are higher or lower"
    return multiplied if side == "same" else f"{side}, {multiplied}"


def _reading(answer: OddsAnswer, chances: list[float]) -> tuple[str, ...]:
    typical = typical_chance(answer)
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
    curved = curved_names(answer)
    told = [
        f"The odds ratio for {name} depends on {listed(list(others))}, so it is stated at values "
        f"of {'these' if len(others) > 1 else 'that predictor'}."
        for name, others in modified_names(answer).items()
    ]
    if curved:
        told.append(
            f"Equal steps of {listed(curved)} do not have equal odds ratios, so two values are "
            "compared."
        )
    return tuple(told)


def _extremes(answer: OddsAnswer) -> tuple[str, ...]:
    found = extreme_names(answer)
    return (beyond_saying(listed(found)),) if found else ()


def _technical(answer: OddsAnswer) -> Words:
    subject = answer.subject
    told = [sentence(_technical_row(answer, row)) for row in answer.rows]
    told += [sentence(_technical_test(answer, found)) for found in answer.interactions]
    method = (
        "Odds ratios are exponents of the change in the linear predictor, "
        f"from {rows_words(subject)}"
    )
    if any(row.odds_ratio.lower is not None for row in answer.rows):
        method += f"; {interval_method(answer)}"
    reading = _reading(answer, [typical_chance(answer)])
    cautions = (*reading, association(answer.subject), *_cautions(answer))
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


def _technical_test(answer: OddsAnswer, found: InteractionTest) -> str:
    model = f"Model “{tidy(found.model)}”: " if found.model else ""
    names = found.predictor, found.modifier
    return f"{model}{joined_test(answer.subject, names, found.test)}"


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
    known = highest_and_lowest(answer)
    if not known:
        return sentence(start)
    told = f"{'It' if len(rows) == 1 else 'The largest'} is {_short(answer, known[0])}"
    for lowest in known[1:]:
        told += f"; the smallest is {_short(answer, lowest)}"
    return f"{sentence(start)} {sentence(told)}"


def _short(answer: OddsAnswer, row: OddsRow) -> str:
    model = f", in the model “{tidy(row.model)}”" if row.model else ""
    facts = answer.subject.predictor(row.predictor)
    given = f", {given_clause(answer.subject, row.given)}" if row.given else ""
    odds = odds_ratio_words(row, answer.question.level)
    return f"{odds} for {predictor_name(facts)}, {change_label(facts, row)}{given}{model}"
