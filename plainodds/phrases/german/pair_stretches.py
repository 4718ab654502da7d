"""Where along one predictor the effect of another differs from none, in German."""

from __future__ import annotations

from plainodds.answers.pair import PairAnswer
from plainodds.answers.stretches import Stretch
from plainodds.phrases.choices.stretches import (
    SPANS_AT_MOST,
    TURNS_AT_MOST,
    largest_stretches,
    moves_told,
    places_without_rows,
    stretches_by_sign,
)
from plainodds.phrases.german.pair_labels import noun, opening, share, stretch_place
from plainodds.phrases.labels import listed, named_value, predictor_name, value_label
from plainodds.phrases.lexicon import lexicon
from plainodds.phrases.pair_labels import Sign, is_averaged, place_label

__all__ = ["stretches_sentences", "turns_sentences", "unsupported_sentences"]

_INTERVAL = ", und zwar im ganzen Intervall"


def stretches_sentences(answer: PairAnswer, *, at_most: int = SPANS_AT_MOST) -> list[str]:
    """Where the whole interval lies on one side of no effect; empty without intervals."""
    clauses: list[str] = []
    for sign, found in stretches_by_sign(answer).items():
        verdict = _verdict(answer, sign, first=not clauses)
        clauses.append(f"bei {_where(answer, found, at_most)} {verdict}")
    return ["; ".join(clauses)] if clauses else []


def _where(answer: PairAnswer, found: list[Stretch], at_most: int) -> str:
    found, left = largest_stretches(found, at_most)
    told = []
    for place, each in enumerate(found):
        span, rows = stretch_place(answer, each, first=place == 0), share(each.share)
        if place > 0:
            rows = rows.removesuffix(" der Fälle")
        told.append(f"{span} ({rows})" if rows else span)
    if left > 0:
        told.append("1 weiteren Stelle" if left == 1 else f"{left} weiteren Stellen")
    return listed(told)


def _verdict(answer: PairAnswer, sign: Sign, *, first: bool) -> str:
    """What a stretch says, in full the first time."""
    if sign == "open":
        return (
            "enthält das Intervall auch, dass es keinen Unterschied gibt, sodass die Daten die "
            "Richtung offen lassen"
        )
    question = answer.question
    side = "höher" if sign == "above" else "niedriger"
    if question.a in answer.sloped and question.scale == "probability":
        verb = "steigt" if sign == "above" else "fällt"
        facts = answer.subject.predictor(question.a)
        told = f"{verb} {noun(answer)} mit {predictor_name(facts)}" if first else f"{verb} sie"
        return f"{told}{_INTERVAL}"
    if not first:
        return f"liegt sie {side}{_INTERVAL}"
    return f"liegt {_what(answer)}{_compared(answer, side)}{_INTERVAL}"


def _what(answer: PairAnswer) -> str:
    if answer.question.scale != "odds":
        return noun(answer)
    if is_averaged(answer):
        return "die zur mittleren Wahrscheinlichkeit gehörende Chance (Odds)"
    return "die Chance (Odds)"


def _compared(answer: PairAnswer, side: str) -> str:
    if answer.question.a in answer.sloped:
        return f" {opening(answer)} {side}"
    facts = answer.subject.predictor(answer.question.a)
    start, end = answer.a_change
    return f" mit {named_value(facts, end)} {side} als mit {value_label(facts, start)}"


def turns_sentences(answer: PairAnswer) -> list[str]:
    """Where the effect turns, and with it the interaction its sign; empty where nowhere."""
    turns = answer.effect.turns
    facts = answer.subject.predictor(answer.question.b)
    if not turns or not facts.is_number:
        return []
    what = "diese Zahl" if answer.question.a in answer.sloped else "dieser Unterschied"
    if answer.question.scale == "odds":
        what = "dieses Odds Ratio"
    values = [place_label(facts, each) for each in turns]
    verbs = ["steigt" if rising else "fällt" for rising in moves_told(answer.effect)]
    start, sign = f"entlang {predictor_name(facts)}", "wechselt die Wechselwirkung ihr Vorzeichen"
    if not verbs:
        return [f"{start} wendet sich {what} bei {listed(values[:TURNS_AT_MOST])}; dort {sign}"]
    told = [f"{verbs[0]} {what} zuerst"]
    told += [f"{verb} ab {at}" for at, verb in zip(values, verbs[1:], strict=True)]
    return [f"{start} {listed(told)}; wo die Richtung wechselt, {sign}"]


def unsupported_sentences(answer: PairAnswer) -> list[str]:
    """Where along the other predictor no row lies near."""
    told = places_without_rows(answer)
    if not told:
        return []
    facts = answer.subject.predictor(answer.question.b)
    name, values = predictor_name(facts), listed(told)
    where = f"{name} {values}" if facts.is_number else lexicon().value.format(name, values)
    return [
        f"Die Daten haben keine Zeilen in der Nähe, und das Modell spricht für sich allein: {where}"
    ]
