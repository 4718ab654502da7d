"""Profiles in words."""

from __future__ import annotations

from plainodds.answers.profile import Comparison, LedgerRow, ProfileAnswer, ProfilePoint
from plainodds.phrases.alternative import alternative
from plainodds.phrases.choices.profile import (
    chosen_values,
    largest_adds,
    moved_predictors,
    profile_denominator,
    sorted_adds,
)
from plainodds.phrases.familiarity import familiarity_cautions, familiarity_words
from plainodds.phrases.labels import chance_of, listed, predictor_name, value_label
from plainodds.phrases.numbers import (
    chance,
    confidence,
    frequency,
    frequency_span,
    ratio,
    signed,
)
from plainodds.phrases.parts import (
    association,
    beyond_saying,
    case_words,
    chance_with_interval,
    covariance_words,
    difference_with_interval,
    is_beyond_saying,
    model_cautions,
    odds_ratio_cautions,
    rather,
    ratio_with_interval,
    rows_words,
    signed_with_interval,
    standard_error,
    typical_case,
)
from plainodds.phrases.saying import Audience, Words, for_audience, words
from plainodds.phrases.sentences import sentence
from plainodds.phrases.unbounded import profile_unbounded_cautions, ratio_or_none
from plainodds.phrases.units import tidy
from plainodds.values import Pairs

__all__: list[str] = []

_EVERYTHING = 1_000_000


@words.register
def _(answer: ProfileAnswer, audience: Audience = "plain") -> Words:
    return for_audience(audience, {"plain": _plain, "technical": _technical}, answer)


def _plain(answer: ProfileAnswer) -> Words:
    over = profile_denominator(answer)
    told = [_chance_told(answer, over)]
    if answer.comparison is None:
        told.append(_framed(answer, over))
    else:
        told += _comparison(answer, answer.comparison, over)
    told += _ledger(answer)
    told += familiarity_words(answer)
    return _words(answer, told)


def _words(answer: ProfileAnswer, told: list[str]) -> Words:
    cautions = [*profile_unbounded_cautions(answer), *familiarity_cautions(answer)]
    cautions += [*_reading(answer), association(answer.subject)]
    if answer.comparison is not None and is_beyond_saying(answer.comparison.odds_ratio):
        cautions.append(beyond_saying("this comparison"))
    return Words(
        tuple(map(sentence, told)),
        (*map(sentence, cautions), *model_cautions(answer.subject)),
    )


def _who(answer: ProfileAnswer, point: ProfilePoint, stated: Pairs, at_most: int = 8) -> str:
    """Whom a profile describes: "a pipe with pipe age 40 years and otherwise typical"."""
    chosen, whole = chosen_values(point, stated)
    return case_words(answer.subject, chosen, whole=whole, at_most=at_most)


def _chance_told(answer: ProfileAnswer, over: int) -> str:
    estimate, level = answer.point.probability, answer.question.level
    outcome = answer.subject.outcome
    counted = frequency(estimate.estimate, over)
    if estimate.lower is not None and estimate.upper is not None:
        counted += f", with a range of {frequency_span(estimate.lower, estimate.upper, over)}"
    return (
        f"For {_who(answer, answer.point, answer.question.values)}, the chance of "
        f"{tidy(outcome.event)} is {chance_with_interval(estimate, level)}, that is {counted}"
    )


def _framed(answer: ProfileAnswer, over: int) -> str:
    """The same chance from its other side, since either side alone can mislead."""
    event = answer.point.probability.estimate
    return (
        f"The chance that this does not happen is {chance(1 - event)}, that is "
        f"{frequency(1 - event, over)}"
    )


def _comparison(answer: ProfileAnswer, comparison: Comparison, over: int) -> list[str]:
    level = answer.question.level
    here, there = answer.point.probability.estimate, answer.start.probability.estimate
    with_whom = _who(answer, answer.start, answer.question.against or ())
    return [
        f"Compared with {with_whom}, the chance is {rather(here, there, over)}",
        f"It is {difference_with_interval(comparison.risk_difference, level)}",
        f"The chance that this does not happen is {rather(1 - here, 1 - there, over)}",
        f"Put as ratios, the chance is multiplied by "
        f"{ratio_with_interval(comparison.risk_ratio, level)} and the odds by "
        f"{ratio_or_none(comparison.odds_ratio, level)}",
    ]


def _ledger(answer: ProfileAnswer) -> list[str]:
    """With what the odds differ most between the start and the profile, each way."""
    rows, level = sorted_adds(answer), answer.question.level
    if not rows:
        return []
    start = typical_case(answer.subject.outcome)
    if answer.comparison is not None:
        if len(rows) == 1:
            return [f"The whole difference goes with {_group(answer, rows[0])}"]
        start = "that profile"
    opening = f"Starting from {start}, with a chance of {chance(answer.start.probability.estimate)}"
    size = "" if len(rows) == 1 else "largest "
    told = [
        f"the {size}{'rise' if row.adds.estimate > 0 else 'fall'} in the odds goes with "
        f"{_group(answer, row)}, multiplied by {ratio_with_interval(row.multiplies, level)}"
        for row in largest_adds(answer)
    ]
    return [f"{opening}, {'; '.join(told)}"]


def _group(answer: ProfileAnswer, row: LedgerRow) -> str:
    values = dict(answer.point.values)
    together = [
        f"{predictor_name(facts)} ({value_label(facts, values[facts.name])})"
        for facts in moved_predictors(answer, row)
    ]
    return f"{listed(together)} together" if len(together) > 1 else listed(together)


def _reading(answer: ProfileAnswer) -> tuple[str, ...]:
    if answer.comparison is None:
        return ()
    return odds_ratio_cautions(
        (answer.point.probability.estimate, answer.start.probability.estimate)
    )


def _technical(answer: ProfileAnswer) -> Words:
    level, subject = answer.question.level, answer.subject
    told = [_on_scales(answer, answer.point, answer.question.values)]
    if answer.comparison is not None:
        compared = answer.comparison
        told.append(_on_scales(answer, answer.start, answer.question.against or ()))
        told.append(
            f"Odds ratio {ratio_or_none(compared.odds_ratio, level)}, risk ratio "
            f"{ratio_with_interval(compared.risk_ratio, level)}; the risk is "
            f"{difference_with_interval(compared.risk_difference, level)}"
        )
    rows = [
        f"{listed([predictor_name(subject.predictor(name)) for name in row.predictors])} "
        f"{signed_with_interval(row.adds, level)}"
        for row in sorted_adds(answer)
    ]
    if rows:
        eta = signed(answer.start.linear_predictor.estimate)
        told.append(f"Added to the linear predictor's {eta} at the start: {'; '.join(rows)}")
    told += familiarity_words(answer)
    method = f"From {rows_words(subject)}"
    if answer.point.probability.lower is not None:
        method += (
            f"; {confidence(level)} Wald intervals on the linear predictor, carried over to odds "
            f"and chance, with {covariance_words(subject)}"
        )
        if answer.comparison is not None:
            method += "; comparisons by the joint delta method, ratios on the log scale"
    return _words(answer, [*told, method])


def _on_scales(answer: ProfileAnswer, point: ProfilePoint, stated: Pairs) -> str:
    level = answer.question.level
    return (
        f"For {_who(answer, point, stated, _EVERYTHING)}: linear predictor "
        f"{signed_with_interval(point.linear_predictor, level)}"
        f"{standard_error(point.linear_predictor)}; odds "
        f"{ratio_with_interval(point.odds, level)}; chance "
        f"{chance_with_interval(point.probability, level)}"
    )


@alternative.register
def _(answer: ProfileAnswer) -> str:
    point, level = answer.point, answer.question.level
    start = (
        f"{chance_of(answer.subject.outcome)} for "
        f"{_who(answer, point, answer.question.values)}, read on three aligned scales: linear "
        f"predictor {signed(point.linear_predictor.estimate)}, odds "
        f"{ratio(point.odds.estimate)}, chance {chance_with_interval(point.probability, level)}"
    )
    rows = sorted_adds(answer)
    other = chance(answer.start.probability.estimate)
    if not rows:
        return sentence(start)
    steps = "1 step" if len(rows) == 1 else f"{len(rows)} steps"
    who = "the profile compared with" if answer.comparison is not None else "the typical profile"
    return (
        f"{sentence(start)} "
        f"{sentence(f'A ledger leads there in {steps} from {who}, with a chance of {other}')}"
    )
