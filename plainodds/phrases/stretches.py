"""Where along one predictor the effect of another differs from none, and where it turns."""

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
from plainodds.phrases.labels import listed, predictor_name, value_label
from plainodds.phrases.pair_labels import (
    Sign,
    at_value,
    is_averaged,
    odds_opening,
    pair_noun,
    place_label,
    share_label,
    stretch_span,
)
from plainodds.phrases.units import tidy

__all__ = ["stretches_words", "turns_words", "unsupported_words"]


def stretches_words(answer: PairAnswer, *, at_most: int = SPANS_AT_MOST) -> list[str]:
    """Say where the whole interval lies on one side of no effect; empty without intervals."""
    clauses: list[str] = []
    for sign, found in stretches_by_sign(answer).items():
        verdict = _verdict(answer, sign, first=not clauses)
        clauses.append(f"{_where(answer, found, at_most)}, {verdict}")
    return ["; ".join(clauses)] if clauses else []


def _where(answer: PairAnswer, found: list[Stretch], at_most: int) -> str:
    """The stretches of one kind with their shares, the largest first where not all are told."""
    facts = answer.subject.predictor(answer.question.b)
    found, left = largest_stretches(found, at_most)
    told = []
    for place, each in enumerate(found):
        span = stretch_span(answer, each) if facts.is_number else value_label(facts, each.start)
        if facts.is_number and " to " in span:
            span = f"from {span}"
        share = share_label(answer, each.share)
        if place > 0:
            share = share.removesuffix(f" of the {tidy(answer.subject.outcome.cases)}")
        told.append(f"{span} ({share})" if share else span)
        if place == 0:
            told[0] = f"with {predictor_name(facts)} {told[0]}"
    if left > 0:
        told.append(f"{left} more {'place' if left == 1 else 'places'}")
    return listed(told)


def _verdict(answer: PairAnswer, sign: Sign, *, first: bool) -> str:
    """What a stretch says, in full the first time."""
    if sign == "open":
        return "the interval includes no difference, so the data leave the direction open"
    told = _direction(answer, sign)
    if not first:
        they = "they are" if answer.question.scale == "odds" else "it is"
        told = f"{they} {'higher' if sign == 'above' else 'lower'}"
        if answer.question.a in answer.sloped and answer.question.scale == "probability":
            told = f"it {'rises' if sign == 'above' else 'falls'}"
    return f"{told}, the interval lying wholly {sign} no difference"


def _direction(answer: PairAnswer, sign: Sign) -> str:
    question, subject = answer.question, answer.subject
    higher, sloped = sign == "above", question.a in answer.sloped
    facts = subject.predictor(question.a)
    odds = "the odds matching the average chance are" if is_averaged(answer) else "the odds are"
    if question.scale == "odds" and sloped:
        return f"{odds} {'higher' if higher else 'lower'} {odds_opening(answer)}"
    if sloped:
        return (
            f"the {pair_noun(answer)} {'rises' if higher else 'falls'} with {predictor_name(facts)}"
        )
    what = odds if question.scale == "odds" else f"the {pair_noun(answer)} is"
    start, end = answer.a_change
    return (
        f"{what} {'higher' if higher else 'lower'} with {at_value(subject, facts.name, end)} than "
        f"with {value_label(facts, start)}"
    )


def turns_words(answer: PairAnswer) -> list[str]:
    """Say where the effect turns, and with it the interaction its sign; empty where nowhere."""
    turns = answer.effect.turns
    facts = answer.subject.predictor(answer.question.b)
    if not turns or not facts.is_number:
        return []
    what = "this figure" if answer.question.a in answer.sloped else "this difference"
    if answer.question.scale == "odds":
        what = "this odds ratio"
    start = f"along {predictor_name(facts)}, {what}"
    values = [place_label(facts, each) for each in turns]
    moves = ["rises" if rising else "falls" for rising in moves_told(answer.effect)]
    if not moves:
        places = listed(values[:TURNS_AT_MOST])
        return [f"{start} turns at {places}; there the interaction changes its sign"]
    told = [f"first {moves[0]}"]
    told += [f"from {at} on {move}" for at, move in zip(values, moves[1:], strict=True)]
    return [f"{start} {listed(told)}; where it turns, the interaction changes its sign"]


def unsupported_words(answer: PairAnswer) -> list[str]:
    """Where along `b` no row lies near; empty where the data are everywhere, or not known."""
    told = places_without_rows(answer)
    if not told:
        return []
    name = predictor_name(answer.subject.predictor(answer.question.b))
    return [
        f"The data have no rows near by, and the model speaks on its own: {name} {listed(told)}"
    ]
