"""Where along one predictor the effect of another differs from none, and where it turns."""

from __future__ import annotations

import math
from itertools import pairwise

from plainodds.answers.estimate import Estimate
from plainodds.answers.pair import PairAnswer
from plainodds.answers.stretches import EffectAlong, Stretch
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
from plainodds.values import Scalar

__all__ = [
    "effect_at",
    "effect_estimate",
    "places_told",
    "stretches_words",
    "turns_words",
    "unsupported_words",
]

_SPANS_AT_MOST = 3
_TURNS_AT_MOST = 3
_SIGNS: tuple[Sign, ...] = ("above", "below", "open")


def effect_estimate(effect: EffectAlong, place: int) -> Estimate:
    """The effect at one of its places."""
    return Estimate(
        effect.estimate[place],
        None if effect.se is None else effect.se[place],
        None if effect.lower is None else effect.lower[place],
        None if effect.upper is None else effect.upper[place],
    )


def effect_at(effect: EffectAlong, value: Scalar) -> Estimate | None:
    """The effect at exactly this value of `b`, if the answer has it."""
    for place, at in enumerate(effect.at):
        alike = at == value
        if not alike and not isinstance(at, str) and not isinstance(value, str):
            alike = math.isclose(at, value, rel_tol=1e-9, abs_tol=1e-12)
        if alike:
            return effect_estimate(effect, place)
    return None


def places_told(answer: PairAnswer) -> list[int]:
    """Places at which the effect is told: those of the change of `b`, or its quartiles."""
    effect, facts = answer.effect, answer.subject.predictor(answer.question.b)
    wanted: tuple[Scalar, ...] = answer.b_change
    if facts.name in answer.sloped:
        wanted = facts.quartiles[0], facts.quartiles[2]
    places = range(len(effect.at))
    if not facts.is_number:
        return [place for value in wanted for place in places if effect.at[place] == value]
    near = [place for place in places if effect.supported[place]] or list(places)
    if wanted[0] == wanted[1] or any(math.isnan(float(each)) for each in wanted):
        wanted = effect.at[near[0]], effect.at[near[-1]]
    nearest = [
        min(near, key=lambda place: abs(float(effect.at[place]) - float(value))) for value in wanted
    ]
    return list(dict.fromkeys(nearest))


def stretches_words(answer: PairAnswer, *, at_most: int = _SPANS_AT_MOST) -> list[str]:
    """Say where the whole interval lies on one side of no effect; empty without intervals."""
    clauses: list[str] = []
    for sign in _SIGNS:
        found = [each for each in answer.effect.stretches if each.sign == sign]
        if found:
            verdict = _verdict(answer, sign, first=not clauses)
            clauses.append(f"{_where(answer, found, at_most)}, {verdict}")
    return ["; ".join(clauses)] if clauses else []


def _where(answer: PairAnswer, found: list[Stretch], at_most: int) -> str:
    """The stretches of one kind with their shares, the largest first where not all are told."""
    facts = answer.subject.predictor(answer.question.b)
    left = len(found) - at_most
    if left > 0:
        found = sorted(found, key=lambda each: -_size(each))[:at_most]
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


def _size(stretch: Stretch) -> float:
    return -1.0 if math.isnan(stretch.share) else stretch.share


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
    moves = _moves(answer.effect)
    if len(turns) > _TURNS_AT_MOST or not moves:
        return [f"{start} turns at {listed(values[:8])}; there the interaction changes its sign"]
    told = [f"first {moves[0]}"]
    told += [f"from {at} on {move}" for at, move in zip(values, moves[1:], strict=True)]
    return [f"{start} {listed(told)}; where it turns, the interaction changes its sign"]


def _moves(effect: EffectAlong) -> list[str]:
    """Whether the effect rises or falls before the first turn, between turns and after."""
    places = range(len(effect.at))

    def nearest(value: float) -> int:
        return min(places, key=lambda place: abs(float(effect.at[place]) - value))

    stops = [0, *map(nearest, effect.turns), len(effect.at) - 1]
    heights = [effect.estimate[place] for place in stops]
    if any(map(math.isnan, heights)) or any(one == other for one, other in pairwise(heights)):
        return []
    return ["rises" if other > one else "falls" for one, other in pairwise(heights)]


def unsupported_words(answer: PairAnswer) -> list[str]:
    """Where along `b` no row lies near; empty where the data are everywhere, or not known."""
    effect, facts = answer.effect, answer.subject.predictor(answer.question.b)
    if all(effect.supported) or not any(effect.supported):
        return []
    if not facts.is_number:
        told = [
            value_label(facts, at)
            for at, held in zip(effect.at, effect.supported, strict=True)
            if not held
        ]
    else:
        told = _gaps(answer)
    name = predictor_name(facts)
    return [
        f"The data have no rows near by, and the model speaks on its own: {name} {listed(told)}"
    ]


def _gaps(answer: PairAnswer) -> list[str]:
    effect, facts = answer.effect, answer.subject.predictor(answer.question.b)
    held = [place for place, supported in enumerate(effect.supported) if supported]
    labels = [value_label(facts, at) for at in effect.at]
    gaps = [f"below {labels[held[0]]}"] if held[0] > 0 else []
    gaps += [
        f"between {labels[low]} and {labels[high]}"
        for low, high in pairwise(held)
        if high > low + 1
    ]
    return [*gaps, f"above {labels[held[-1]]}"] if held[-1] < len(labels) - 1 else gaps
