"""The ruler's three scales: where their ticks stand along the linear predictor."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass

from plainodds.answers.profile import ProfileAnswer, ProfilePoint
from plainodds.drawings.lettering import text_width
from plainodds.drawings.theme import Theme
from plainodds.phrases.numbers import quantity, signed, simple_fraction
from plainodds.scales import linear_predictor_from_probability

__all__ = ["ScaleTicks", "chance_scale", "linear_predictor_scale", "odds_scale", "window"]

# which marks are named first where there is not room for all: of chances in percent up to
# a half (the other half mirrors it), and of odds above 1
_CHANCES = (50.0, 10.0, 1.0, 0.1, 0.01, 0.001, 20.0, 5.0, 2.0, 0.5, 30.0, 0.2, 0.05, 0.02, 40.0)
_ODDS = (1, 10, 100, 1000, 10_000, 100_000, 2, 4, 20, 50, 200, 500)
_RARE, _COMMON = 0.3, 0.7
_FARTHEST = 14.0


@dataclass(frozen=True)
class ScaleTicks:
    """Ticks of one scale, as values of the linear predictor."""

    named: tuple[float, ...]
    names: tuple[str, ...]
    unnamed: tuple[float, ...]


def window(answer: ProfileAnswer, points: Sequence[ProfilePoint]) -> tuple[float, float]:
    """The stretch of the linear predictor that the ruler shows.

    It depends on how common the event is in the data, so that it stays where it is while
    profiles change; it is lengthened, by whole units, where a profile lies outside.
    """
    share = answer.subject.outcome.share
    lower, upper = -5.0, 5.0
    if share < _RARE:
        lower, upper = -6.0, 2.5
    elif share > _COMMON:
        lower, upper = -2.5, 6.0
    for point in points:
        held = point.linear_predictor
        low = held.estimate if held.lower is None else max(held.lower, held.estimate - 2.0)
        high = held.estimate if held.upper is None else min(held.upper, held.estimate + 2.0)
        low, high = _bounded(low) - 0.3, _bounded(high) + 0.3
        lower = math.floor(low) if low < lower else lower
        upper = math.ceil(high) if high > upper else upper
    return lower, upper


def _bounded(number: float) -> float:
    return max(-_FARTHEST, min(_FARTHEST, number)) if not math.isnan(number) else 0.0


def chance_scale(
    lower: float, upper: float, length: float, theme: Theme, size: float
) -> ScaleTicks:
    """Ticks of the scale of chances, at round percentages."""
    wanted = []
    for percent in _CHANCES:
        wanted += [percent, 100.0 - percent] if percent != 50.0 else [percent]
    fine = [step * 10.0**power for power in (-3, -2, -1, 0) for step in range(1, 10)]
    fine += [10.0, 15.0, 20.0, 25.0, 30.0, 35.0, 40.0, 45.0, 50.0]
    marks = {*fine, *(100.0 - each for each in fine)}
    return _chosen(
        [(_logit(percent), quantity(round(percent, 6), "%")) for percent in wanted],
        [_logit(percent) for percent in sorted(marks)],
        lower, upper, length, theme, size,
    )  # fmt: skip


def odds_scale(lower: float, upper: float, length: float, theme: Theme, size: float) -> ScaleTicks:
    """Ticks of the scale of odds, at simple fractions and round numbers."""
    wanted = []
    for odds in _ODDS:
        wanted += [float(odds), 1.0 / odds] if odds != 1 else [1.0]
    marks = [step * 10.0**power for power in range(7) for step in range(1, 10)]
    return _chosen(
        [(math.log(odds), _odds_name(odds)) for odds in wanted],
        sorted({math.log(each) for each in marks} | {-math.log(each) for each in marks}),
        lower, upper, length, theme, size,
    )  # fmt: skip


def linear_predictor_scale(
    lower: float, upper: float, length: float, theme: Theme, size: float
) -> ScaleTicks:
    """Ticks of the scale of the linear predictor, at whole numbers."""
    per_unit = length / (upper - lower)
    needed = text_width("+10", theme, size) + 0.8 * size
    step = next((each for each in (1, 2, 5) if each * per_unit >= needed), 10)
    halves = [each / 2 for each in range(-40, 41)]
    return _chosen(
        [(float(each), signed(each, decimals=0) if each else "0") for each in range(-20, 21, step)],
        halves, lower, upper, length, theme, size,
    )  # fmt: skip


def _odds_name(odds: float) -> str:
    return simple_fraction(odds) if odds >= 1 else f"1/{simple_fraction(1.0 / odds)}"


def _logit(percent: float) -> float:
    return float(linear_predictor_from_probability(percent / 100.0))


def _chosen(
    wanted: Sequence[tuple[float, str]],
    marks: Sequence[float],
    lower: float,
    upper: float,
    length: float,
    theme: Theme,
    size: float,
) -> ScaleTicks:
    """Name the marks in the order wanted, as long as the names keep clear of each other."""
    per_unit = length / (upper - lower)
    taken: list[tuple[float, float, str]] = []
    for at, name in wanted:
        half = text_width(name, theme, size) / 2 + 0.4 * size
        place = (at - lower) * per_unit
        inside = half <= place <= length - half
        if inside and all(abs(place - (t - lower) * per_unit) >= half + h for t, h, _ in taken):
            taken.append((at, half, name))
    taken.sort()
    named = tuple(at for at, _, _ in taken)
    spaced: list[float] = []
    for at in marks:
        clear = not spaced or (at - spaced[-1]) * per_unit >= 0.28 * size
        if lower <= at <= upper and clear and not any(abs(at - n) < 1e-9 for n in named):
            spaced.append(at)
    return ScaleTicks(named, tuple(name for _, _, name in taken), tuple(spaced))
