"""Profiles in German."""

from __future__ import annotations

from plainodds.answers.profile import Comparison, LedgerRow, ProfileAnswer, ProfilePoint
from plainodds.phrases.choices.profile import (
    chosen_values,
    largest_adds,
    moved_predictors,
    profile_denominator,
    sorted_adds,
)
from plainodds.phrases.german.familiarity import familiarity_cautions, familiarity_sentences
from plainodds.phrases.german.language import GERMAN
from plainodds.phrases.german.parts import (
    EVERYTHING,
    ODDS_MEANING,
    association,
    beyond_saying,
    covariance,
    event,
    level_intervals,
    model_cautions,
    odds_ratio_cautions,
    whom,
)
from plainodds.phrases.german.parts import chance as chance_for
from plainodds.phrases.german.unbounded import profile_cautions, ratio_told
from plainodds.phrases.labels import listed, predictor_name, value_label
from plainodds.phrases.lexicon import lexicon
from plainodds.phrases.numbers import chance, frequency, frequency_span, ratio, signed
from plainodds.phrases.parts import (
    chance_with_interval,
    difference_with_interval,
    is_beyond_saying,
    rather,
    ratio_with_interval,
    rows_words,
    signed_with_interval,
    standard_error,
)
from plainodds.phrases.saying import Audience, Words, for_audience
from plainodds.phrases.sentences import joined, sentence
from plainodds.values import Pairs

__all__: list[str] = []

_NOT = "die Wahrscheinlichkeit, dass dies nicht eintritt, beträgt"


@GERMAN.words.register
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
    told += familiarity_sentences(answer)
    speaks_of_odds = answer.comparison is not None or sorted_adds(answer)
    return _words(answer, told, [ODDS_MEANING] if speaks_of_odds else [])


def _words(answer: ProfileAnswer, told: list[str], more: list[str]) -> Words:
    cautions = [*profile_cautions(answer), *familiarity_cautions(answer), *more]
    if answer.comparison is not None:
        cautions += odds_ratio_cautions(
            (answer.point.probability.estimate, answer.start.probability.estimate)
        )
    cautions.append(association(answer.subject))
    if answer.comparison is not None and is_beyond_saying(answer.comparison.odds_ratio):
        cautions.append(beyond_saying("bei diesem Vergleich"))
    return Words(
        tuple(map(sentence, told)),
        (*map(sentence, cautions), *model_cautions(answer.subject)),
    )


def _who(
    answer: ProfileAnswer,
    point: ProfilePoint,
    stated: Pairs,
    article: str = "einen",
    at_most: int = 8,
) -> str:
    chosen, whole = chosen_values(point, stated)
    return whom(answer.subject, chosen, whole=whole, article=article, at_most=at_most)


def _chance_told(answer: ProfileAnswer, over: int) -> str:
    estimate, level = answer.point.probability, answer.question.level
    counted = frequency(estimate.estimate, over)
    if estimate.lower is not None and estimate.upper is not None:
        counted += f", mit einem Bereich von {frequency_span(estimate.lower, estimate.upper, over)}"
    told = (
        f"für {_who(answer, answer.point, answer.question.values)} beträgt "
        f"{chance_for(answer.subject.outcome)} {chance_with_interval(estimate, level)}"
    )
    return lexicon().that_is.format(told, counted)


def _framed(answer: ProfileAnswer, over: int) -> str:
    """The same chance from its other side, since either side alone can mislead."""
    other = 1 - answer.point.probability.estimate
    return lexicon().that_is.format(f"{_NOT} {chance(other)}", frequency(other, over))


def _comparison(answer: ProfileAnswer, comparison: Comparison, over: int) -> list[str]:
    level = answer.question.level
    here, there = answer.point.probability.estimate, answer.start.probability.estimate
    with_whom = _who(answer, answer.start, answer.question.against or (), "einem")
    return [
        f"verglichen mit {with_whom} beträgt die Wahrscheinlichkeit {rather(here, there, over)}",
        f"sie liegt {difference_with_interval(comparison.risk_difference, level)}",
        f"{_NOT} {rather(1 - here, 1 - there, over)}",
        "Als Verhältnisse gesagt wird die Wahrscheinlichkeit mit "
        f"{ratio_with_interval(comparison.risk_ratio, level)} multipliziert und die Chance (Odds) "
        f"mit {ratio_told(comparison.odds_ratio, level)}",
    ]


def _ledger(answer: ProfileAnswer) -> list[str]:
    """With what the odds differ most between the start and the profile, each way."""
    rows, level = sorted_adds(answer), answer.question.level
    if not rows:
        return []
    start = whom(answer.subject, (), whole=False, article="einem")
    if answer.comparison is not None:
        if len(rows) == 1:
            return [f"Der ganze Unterschied geht einher mit {_group(answer, rows[0])}"]
        start = "jenem Profil"
    told = [
        f"{_move(row, only=len(rows) == 1)} der Chance (Odds) geht einher mit "
        f"{_group(answer, row)}, mit {ratio_with_interval(row.multiplies, level)} multipliziert"
        for row in largest_adds(answer)
    ]
    before = chance(answer.start.probability.estimate)
    return [f"Ausgehend von {start} mit einer Wahrscheinlichkeit von {before}: {'; '.join(told)}"]


def _move(row: LedgerRow, *, only: bool) -> str:
    kind = "Anstieg" if row.adds.estimate > 0 else "Rückgang"
    return f"der {kind}" if only else f"der größte {kind}"


def _group(answer: ProfileAnswer, row: LedgerRow) -> str:
    values = dict(answer.point.values)
    together = [
        f"{predictor_name(facts)} ({value_label(facts, values[facts.name])})"
        for facts in moved_predictors(answer, row)
    ]
    return f"{listed(together)} zusammen" if len(together) > 1 else listed(together)


def _technical(answer: ProfileAnswer) -> Words:
    level, subject = answer.question.level, answer.subject
    told = [_on_scales(answer, answer.point, answer.question.values)]
    if answer.comparison is not None:
        compared = answer.comparison
        told.append(_on_scales(answer, answer.start, answer.question.against or ()))
        told.append(
            f"Odds Ratio {ratio_told(compared.odds_ratio, level)}, relatives Risiko "
            f"{ratio_with_interval(compared.risk_ratio, level)}; das Risiko liegt "
            f"{difference_with_interval(compared.risk_difference, level)}"
        )
    rows = [
        f"{listed([predictor_name(subject.predictor(name)) for name in row.predictors])} "
        f"{signed_with_interval(row.adds, level)}"
        for row in sorted_adds(answer)
    ]
    if rows:
        eta = signed(answer.start.linear_predictor.estimate)
        told.append(f"Zum linearen Prädiktor von {eta} am Start kommen hinzu: {'; '.join(rows)}")
    told += familiarity_sentences(answer)
    method = f"Aus {rows_words(subject)}"
    if answer.point.probability.lower is not None:
        method += (
            f"; {level_intervals(level)} nach Wald auf dem linearen Prädiktor, auf Odds und "
            f"Wahrscheinlichkeit übertragen, mit {covariance(subject)}"
        )
        if answer.comparison is not None:
            method += "; Vergleiche nach der gemeinsamen Delta-Methode, Verhältnisse auf der "
            method += "Log-Skala"
    return _words(answer, [*told, method], [])


def _on_scales(answer: ProfileAnswer, point: ProfilePoint, stated: Pairs) -> str:
    level = answer.question.level
    return (
        f"für {_who(answer, point, stated, at_most=EVERYTHING)}: linearer Prädiktor "
        f"{signed_with_interval(point.linear_predictor, level)}"
        f"{standard_error(point.linear_predictor)}; Odds "
        f"{ratio_with_interval(point.odds, level)}; Wahrscheinlichkeit "
        f"{chance_with_interval(point.probability, level)}"
    )


@GERMAN.alternative.register
def _(answer: ProfileAnswer) -> str:
    point, level = answer.point, answer.question.level
    start = (
        f"Wahrscheinlichkeit für {event(answer.subject.outcome)} für "
        f"{_who(answer, point, answer.question.values)}, abgelesen auf drei ausgerichteten Skalen: "
        f"linearer Prädiktor {signed(point.linear_predictor.estimate)}, Chance (Odds) "
        f"{ratio(point.odds.estimate)}, Wahrscheinlichkeit "
        f"{chance_with_interval(point.probability, level)}"
    )
    rows = sorted_adds(answer)
    if not rows:
        return sentence(start)
    steps = "in 1 Schritt" if len(rows) == 1 else f"in {len(rows)} Schritten"
    compared = answer.comparison is not None
    who = "vom verglichenen Profil" if compared else "vom typischen Profil"
    other = chance(answer.start.probability.estimate)
    return joined(
        start, f"Eine Aufstellung führt {steps} dorthin, {who} mit der Wahrscheinlichkeit {other}"
    )
