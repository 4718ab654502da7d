"""What is told of the effect of one predictor along another."""

from __future__ import annotations

import math
from itertools import pairwise

from plainodds.answers.estimate import Estimate
from plainodds.answers.pair import PairAnswer
from plainodds.answers.stretches import EffectAlong, Stretch
from plainodds.phrases.labels import value_label
from plainodds.phrases.lexicon import lexicon
from plainodds.phrases.pair_labels import Sign
from plainodds.values import Scalar

__all__ = [
    "SPANS_AT_MOST",
    "TURNS_AT_MOST",
    "effect_at",
    "effect_estimate",
    "largest_stretches",
    "moves_told",
    "places_told",
    "places_without_rows",
    "stretches_by_sign",
    "turns_are_told",
]

SPANS_AT_MOST = 3
TURNS_AT_MOST = 8
_MOVES_AT_MOST = 3
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


def stretches_by_sign(answer: PairAnswer) -> dict[Sign, list[Stretch]]:
    """The stretches of each kind that there is, in the order in which kinds are told."""
    found = {
        sign: [each for each in answer.effect.stretches if each.sign == sign] for sign in _SIGNS
    }
    return {sign: stretches for sign, stretches in found.items() if stretches}


def largest_stretches(found: list[Stretch], at_most: int) -> tuple[list[Stretch], int]:
    """Those that are told, the largest first where not all are, and how many are left."""
    left = len(found) - at_most
    if left <= 0:
        return found, 0
    return sorted(found, key=lambda each: -_size(each))[:at_most], left


def _size(stretch: Stretch) -> float:
    return -1.0 if math.isnan(stretch.share) else stretch.share


def turns_are_told(answer: PairAnswer) -> bool:
    """Whether it is told where the effect turns: without any clear stretch that is too open."""
    stretches = answer.effect.stretches
    return not stretches or any(each.sign != "open" for each in stretches)


def moves_told(effect: EffectAlong) -> list[bool]:
    """Whether the effect rises, for each part between turns; empty where these are too many."""
    return _moves(effect) if len(effect.turns) <= _MOVES_AT_MOST else []


def _moves(effect: EffectAlong) -> list[bool]:
    """Whether the effect rises before the first turn, between turns and after; else empty."""
    places = range(len(effect.at))

    def nearest(value: float) -> int:
        return min(places, key=lambda place: abs(float(effect.at[place]) - value))

    stops = [0, *map(nearest, effect.turns), len(effect.at) - 1]
    heights = [effect.estimate[place] for place in stops]
    if any(map(math.isnan, heights)) or any(one == other for one, other in pairwise(heights)):
        return []
    return [other > one for one, other in pairwise(heights)]


def places_without_rows(answer: PairAnswer) -> list[str]:
    """Where along `b` no row lies near; empty where the data are everywhere, or not known."""
    effect, facts = answer.effect, answer.subject.predictor(answer.question.b)
    if all(effect.supported) or not any(effect.supported):
        return []
    labels = [value_label(facts, at) for at in effect.at]
    if not facts.is_number:
        return [label for label, held in zip(labels, effect.supported, strict=True) if not held]
    say = lexicon()
    held = [place for place, supported in enumerate(effect.supported) if supported]
    gaps = [say.below.format(labels[held[0]])] if held[0] > 0 else []
    gaps += [
        say.between.format(labels[low], labels[high])
        for low, high in pairwise(held)
        if high > low + 1
    ]
    return [*gaps, say.above.format(labels[held[-1]])] if held[-1] < len(labels) - 1 else gaps
