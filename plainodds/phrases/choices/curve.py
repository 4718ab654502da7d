"""What is told of curves."""

from __future__ import annotations

from dataclasses import replace
from typing import Literal

from plainodds import scales
from plainodds.answers.curve import CurveAnswer, CurveLine, Scale
from plainodds.phrases.numbers import chance
from plainodds.phrases.reach import supported_places
from plainodds.phrases.slope import slope_places
from plainodds.phrases.ways import Way

__all__ = [
    "LISTED_AT_MOST",
    "as_chances",
    "extreme_points",
    "going",
    "spoken_places",
    "tabled_places",
]

LISTED_AT_MOST = 6
_TABLED = 11


def as_chances(line: CurveLine, scale: Scale) -> CurveLine:
    """A line of odds or of the linear predictor as chances, its interval carried over."""
    if scale not in ("odds", "linear_predictor"):
        return line

    def carried(numbers: tuple[float, ...]) -> tuple[float, ...]:
        # by way of η, since odds too large to be held are a chance of 1 all the same
        eta = scales.linear_predictor_from_odds(numbers) if scale == "odds" else numbers
        return tuple(scales.probability_from_linear_predictor(eta).tolist())

    return replace(
        line,
        estimate=carried(line.estimate),
        se=None,
        lower=None if line.lower is None else carried(line.lower),
        upper=None if line.upper is None else carried(line.upper),
    )


def spoken_places(answer: CurveAnswer, line: CurveLine) -> list[int]:
    """The points that a sentence speaks of, in the order in which it does.

    All of a few; of many, the ends of the part with data, and where the curve turns.
    """
    if len(line.at) <= LISTED_AT_MOST:
        return list(range(len(line.at)))
    places = supported_places(line)
    if answer.question.scale == "slope":
        return slope_places(answer, line)
    chances = as_chances(line, answer.question.scale).estimate
    low = min(places, key=lambda place: chances[place])
    high = max(places, key=lambda place: chances[place])
    if not answer.subject.predictor(answer.question.predictor).is_number:
        return [low, high]
    ends = [places[0], places[-1]]
    at_ends = {chance(chances[place]) for place in ends}
    turns = [place for place in (low, high) if chance(chances[place]) not in at_ends]
    return [*ends, *turns]


def tabled_places(points: int) -> list[int]:
    """The points that a table has a row for: all of a few, of many some evenly spaced ones."""
    if points <= 2 * _TABLED:
        return list(range(points))
    return [round(each * (points - 1) / (_TABLED - 1)) for each in range(_TABLED)]


def going(line: CurveLine, start: int, end: int, way: Way) -> Literal["level", "rising", "falling"]:
    """Which way a line goes between two points, as far as its written figures show."""
    first, last = line.estimate[start], line.estimate[end]
    if way.bare(first) == way.bare(last):
        return "level"
    return "rising" if last > first else "falling"


def extreme_points(answer: CurveAnswer) -> tuple[tuple[CurveLine, int], tuple[CurveLine, int]]:
    """The lowest and the highest point of all lines where there are data, by line and place."""
    points = [(line, place) for line in answer.lines for place in supported_places(line)]

    def height(point: tuple[CurveLine, int]) -> float:
        return point[0].estimate[point[1]]

    return min(points, key=height), max(points, key=height)
