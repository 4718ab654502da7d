"""The axis of an effect that varies: percentage points around 0, or odds ratios around 1."""

from __future__ import annotations

import math

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.pair import PairAnswer
from plainodds.answers.stretches import EffectAlong
from plainodds.drawings.curve_scale import VerticalAxis
from plainodds.drawings.ticks import fraction_ticks, outer_fractions, round_ticks
from plainodds.phrases.numbers import quantity, simple_fraction

__all__ = ["effect_axis", "effect_is_cut"]

_FARTHEST = 1.6  # in spans of the estimates: how far intervals are followed
_PAD = 0.06
_LEAST = 1e-6

Floats = NDArray[np.float64]


def effect_axis(answer: PairAnswer, height: float, letter: float) -> VerticalAxis:
    """Choose the axis of an effect.

    All estimates are on it, and no effect. Intervals are as far as the data support them
    and as they don't squash the estimates; the rest is cut off at the axis.

    Parameters
    ----------
    answer : PairAnswer
    height : float
        Of the plot, in points.
    letter : float
        Size of the tick labels, in points.

    Returns
    -------
    VerticalAxis
        In percentage points, or in odds ratios for a logarithmic axis.
    """
    most = max(2, min(6, int(height / (2.8 * letter))))
    if answer.question.scale == "odds":
        with np.errstate(divide="ignore", invalid="ignore"):
            lower, upper = _reach(answer.effect, np.log)
        lower, upper = outer_fractions(math.exp(max(lower, -600)), math.exp(min(upper, 600)))
        lower, upper = lower**1.05, upper**1.05
        apart = (upper / lower) ** (1.9 * letter / max(height, letter))
        ticks = fraction_ticks(lower, upper, apart)
        return VerticalAxis(lower, upper, ticks, tuple(map(simple_fraction, ticks)), 1.0)
    lower, upper = _reach(answer.effect, lambda values: 100.0 * values)
    room = _PAD * (upper - lower)
    lower, upper = lower - room, upper + room
    ticks = round_ticks(lower, upper, most)
    labels = tuple(f"+{quantity(each)}" if each > 0 else quantity(each) for each in ticks)
    return VerticalAxis(lower, upper, ticks, labels, 0.0)


def effect_is_cut(answer: PairAnswer) -> bool:
    """Whether the axis cuts off an interval that the data support."""
    effect = answer.effect
    if effect.lower is None or effect.upper is None:
        return False
    axis = effect_axis(answer, height=100.0, letter=10.0)
    unit = 1.0 if answer.question.scale == "odds" else 100.0
    return any(
        low * unit < axis.lower or high * unit > axis.upper
        for low, high, held in zip(effect.lower, effect.upper, effect.supported, strict=True)
        if held
    )


def _reach(effect: EffectAlong, to: object) -> tuple[float, float]:
    """Lowest and highest of what is to be seen; both sides of no effect, which is 0."""
    assert callable(to)
    middles = _finite(to(np.asarray(effect.estimate, dtype=float)))
    lowest, highest = min([0.0, *middles]), max([0.0, *middles])
    span = highest - lowest
    ends: list[float] = []
    if effect.lower is not None and effect.upper is not None:
        held = np.asarray(effect.supported, dtype=bool)
        both = np.stack([np.asarray(effect.lower), np.asarray(effect.upper)])[:, held]
        ends = _finite(to(both.astype(float).ravel()))
    span = span or max(map(abs, ends), default=0.0) or 1.0
    lower = max(min([lowest, *ends]), lowest - _FARTHEST * span)
    upper = min(max([highest, *ends]), highest + _FARTHEST * span)
    # both sides of no effect are seen, so that it is seen on which the effect lies
    least = 0.12 * max(upper - lower, _LEAST if lower < upper else span)
    return min(lower, -least), max(upper, least)


def _finite(values: Floats) -> list[float]:
    return [float(each) for each in values[np.isfinite(values)]]
