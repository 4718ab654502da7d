"""Odds ratios in German."""

from __future__ import annotations

import math

from plainodds.answers.odds import OddsAnswer, OddsRow
from plainodds.answers.odds_interactions import InteractionTest
from plainodds.model.predictors import PredictorFacts
from plainodds.phrases.choices.odds import (
    curved_names,
    extreme_names,
    highest_and_lowest,
    modified_names,
    moved_chances,
    side_of,
    typical_chance,
)
from plainodds.phrases.german.concerns import sparse_cautions, unseen_cautions
from plainodds.phrases.german.language import GERMAN
from plainodds.phrases.german.likelihood import (
    interval_method,
    likelihood_cautions,
    odds_ratio_words,
)
from plainodds.phrases.german.parts import (
    ODDS_MEANING,
    association,
    beyond_saying,
    event,
    level_intervals,
    model_cautions,
    odds_ratio_reading,
    whom,
)
from plainodds.phrases.german.parts import chance as chance_for
from plainodds.phrases.german.unbounded import unbounded_cautions, unbounded_told
from plainodds.phrases.joined_tests import joined_test
from plainodds.phrases.labels import (
    change_label,
    given_clause,
    listed,
    predictor_name,
    row_label,
    step_label,
)
from plainodds.phrases.lexicon import lexicon
from plainodds.phrases.moves import end_rather_than_start
from plainodds.phrases.numbers import (
    chance,
    denominator,
    frequency,
    p_value,
    quantity,
)
from plainodds.phrases.parts import RARE, rather, rows_words, signed_with_interval, standard_error
from plainodds.phrases.saying import Audience, Words, for_audience
from plainodds.phrases.sentences import joined, sentence
from plainodds.phrases.unbounded import has_finite_estimate
from plainodds.phrases.units import tidy

__all__: list[str] = []

_SIDES = {
    "open": "; offen bleibt, ob sie höher oder niedriger ist",
    "same": "",
    "higher": ", ist also höher",
    "lower": ", ist also niedriger",
}


@GERMAN.words.register
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
    cautions = (ODDS_MEANING, *_reading(answer, known), association(answer.subject))
    return Words(
        (*start, *told),
        (*map(sentence, (*cautions, *_cautions(answer))), *model_cautions(answer.subject)),
    )


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
    subject, typical = answer.subject, answer.typical_probability
    chosen = any(stated.typical is not None for _, stated in subject.setting.predictors)
    values = "seinem typischen Wert" if chosen else "seinem Median oder seiner häufigsten Stufe"
    models = answer.question.models
    by = f" (nach dem Modell „{tidy(models[0])}“)" if models else ""
    return sentence(
        f"Für {whom(subject, (), whole=False)}, jedes Merkmal auf {values}, beträgt "
        f"{chance_for(subject.outcome)} {chance(typical)}, das sind {frequency(typical, over)}{by}"
    )


def _plain_row(
    answer: OddsAnswer, row: OddsRow, move: tuple[float, float] | None, over: int
) -> str:
    subject = answer.subject
    facts = subject.predictor(row.predictor)
    opening = _change(facts, row)
    if row.given:
        opening = f"{opening}, {given_clause(subject, row.given)},"
    if not has_finite_estimate(row):
        model = f"im Modell „{tidy(row.model)}“ gilt: {opening}" if row.model else opening
        return f"{model} {unbounded_told(answer, row)}"
    odds = _odds_words(row, answer.question.level)
    if move is None:
        model = f"im Modell „{tidy(row.model)}“ " if row.model else ""
        return f"{opening} wird {model}die Chance (Odds) für {event(subject.outcome)} {odds}"
    before, after = move
    return (
        f"{opening} beträgt die Wahrscheinlichkeit für {whom(subject, (), whole=False)} "
        f"{rather(after, before, over)}; die Chance (Odds) wird {odds}"
    )


def _change(facts: PredictorFacts, row: OddsRow) -> str:
    name = predictor_name(facts)
    if facts.is_number and row.per_step:
        return f"{step_label(facts, float(row.end) - float(row.start))} ({name})"
    ends = end_rather_than_start(facts, row.start, row.end)
    return f"bei {lexicon().value.format(name, ends)}"


def _odds_words(row: OddsRow, level: float) -> str:
    """What happens to the odds, to follow "wird"."""
    side = side_of(row)
    if side == "not known":
        return "mit einer nicht bekannten Zahl multipliziert"
    return f"mit {odds_ratio_words(row, level)} multipliziert{_SIDES[side]}"


def _reading(answer: OddsAnswer, chances: list[float]) -> tuple[str, ...]:
    typical, percent = typical_chance(answer), quantity(100 * RARE, "%")
    if math.isnan(typical):
        return (
            "Ein Chancenverhältnis (Odds Ratio) ist kein Verhältnis von Wahrscheinlichkeiten; "
            f"beide liegen nur nah beieinander, wo die Wahrscheinlichkeiten unter etwa {percent} "
            "liegen",
        )
    if typical > RARE:
        return (
            odds_ratio_reading(
                f"bei einer typischen Wahrscheinlichkeit von {chance(typical)}, also über etwa "
                f"{percent},"
            ),
        )
    if max(chances) > RARE:
        return (
            odds_ratio_reading(
                f"wo Wahrscheinlichkeiten, wie einige hier, über etwa {percent} liegen,"
            ),
        )
    return ()


def _changes(answer: OddsAnswer) -> tuple[str, ...]:
    """Why some rows are stated at values of another predictor, or between two values."""
    told = [
        f"Das Chancenverhältnis (Odds Ratio) zu {name} hängt ab von {listed(list(others))} und "
        f"ist deshalb für Werte {'dieser Merkmale' if len(others) > 1 else 'dieses Merkmals'} "
        "angegeben"
        for name, others in modified_names(answer).items()
    ]
    curved = curved_names(answer)
    if curved:
        told.append(
            f"Gleiche Schritte von {listed(curved)} haben nicht gleiche Chancenverhältnisse (Odds "
            "Ratios), deshalb werden zwei Werte verglichen"
        )
    return tuple(told)


def _extremes(answer: OddsAnswer) -> tuple[str, ...]:
    found = extreme_names(answer)
    return (beyond_saying(f"bei {listed(found)}"),) if found else ()


def _technical(answer: OddsAnswer) -> Words:
    subject = answer.subject
    told = [sentence(_technical_row(answer, row)) for row in answer.rows]
    told += [sentence(_technical_test(answer, found)) for found in answer.interactions]
    method = (
        "Odds Ratios sind Exponenten der Änderung des linearen Prädiktors, aus "
        f"{rows_words(subject)}"
    )
    if any(row.odds_ratio.lower is not None for row in answer.rows):
        method += f"; {interval_method(answer)}"
    reading = _reading(answer, [typical_chance(answer)])
    cautions = map(sentence, (*reading, association(subject), *_cautions(answer)))
    return Words((*told, sentence(method)), (*cautions, *model_cautions(subject)))


def _technical_row(answer: OddsAnswer, row: OddsRow) -> str:
    level = answer.question.level
    model = f"Modell „{tidy(row.model)}“: " if row.model else ""
    text = (
        f"{model}{row_label(answer.subject, row)}: Odds Ratio {odds_ratio_words(row, level)}, "
        f"Log-Odds-Ratio {signed_with_interval(row.log_odds_ratio, level)}"
        f"{standard_error(row.log_odds_ratio)}"
    )
    return text if row.p_value is None else f"{text}, p-Wert {p_value(row.p_value)}"


def _technical_test(answer: OddsAnswer, found: InteractionTest) -> str:
    model = f"Modell „{tidy(found.model)}“: " if found.model else ""
    return f"{model}{joined_test(answer.subject, (found.predictor, found.modifier), found.test)}"


@GERMAN.alternative.register
def _(answer: OddsAnswer) -> str:
    rows = answer.rows
    if not rows:
        return "Ein Bild von Chancenverhältnissen (Odds Ratios) ohne eine einzige Zeile."
    one = len(rows) == 1
    kind = "Chancenverhältnis (Odds Ratio)" if one else "Chancenverhältnisse (Odds Ratios)"
    marks = "Punkt" if one else "Punkte"
    start = f"{len(rows)} {kind} für {event(answer.subject.outcome)} als {marks} auf einer "
    start += "logarithmischen Achse"
    if any(row.odds_ratio.lower is not None for row in rows):
        start += f", mit Linien für {level_intervals(answer.question.level)}"
    known = highest_and_lowest(answer)
    if not known:
        return sentence(start)
    told = f"{'Es beträgt' if one else 'Das größte beträgt'} {_short(answer, known[0])}"
    for lowest in known[1:]:
        told += f"; das kleinste beträgt {_short(answer, lowest)}"
    return joined(start, told)


def _short(answer: OddsAnswer, row: OddsRow) -> str:
    facts = answer.subject.predictor(row.predictor)
    model = f", im Modell „{tidy(row.model)}“" if row.model else ""
    given = f", {given_clause(answer.subject, row.given)}" if row.given else ""
    odds = odds_ratio_words(row, answer.question.level)
    return f"{odds} für {predictor_name(facts)}, {change_label(facts, row)}{given}{model}"
