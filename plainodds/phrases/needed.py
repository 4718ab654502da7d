"""The number needed in words, its interval in one piece or two."""

from __future__ import annotations

import math

from plainodds.answers.comparing import NumberNeeded
from plainodds.model.predictors import Subject
from plainodds.phrases.numbers import confidence, needed
from plainodds.phrases.units import tidy

__all__ = ["needed_technical", "needed_words"]

_Pieces = list[tuple[str, tuple[float, float]]]


def needed_words(subject: Subject, number: NumberNeeded, level: float) -> list[str]:
    """Among how many cases there is one event more, or fewer; empty where that is not known."""
    if math.isnan(number.estimate):
        return []
    told = f"For every {_cases(subject, number.estimate)} compared there is one event "
    told += _side(number)
    if math.isinf(number.estimate):
        cases = tidy(subject.outcome.cases)
        told = f"With no difference, no number of {cases} shows one event more or fewer"
    pieces = _pieces(number)
    if not pieces:
        return [told]
    (side, (least, most)) = pieces[0]
    if len(pieces) == 1 and not math.isinf(most):
        return [f"{told} ({confidence(level)} interval {_range(least, most)})"]
    if len(pieces) == 1:
        return [
            f"{told}; the {confidence(level)} interval goes from {needed(least)} for one {side} to "
            "infinity, which stands for no difference"
        ]
    other, (fewest, _) = pieces[1]
    return [
        f"{told}; the {confidence(level)} interval includes no difference, so it goes from "
        f"{needed(least)} for one {side}, through infinity (no difference), to "
        f"{needed(fewest)} for one {other}"
    ]


def needed_technical(number: NumberNeeded, level: float) -> list[str]:
    """The number needed with its interval's pieces; empty where it is not known."""
    if math.isnan(number.estimate):
        return []
    told = f"Number needed {needed(number.estimate)}"
    if not math.isinf(number.estimate):
        told += f" for one event {_side(number)}"
    pieces = _pieces(number)
    if not pieces:
        return [told]
    written = [f"{_range(*ends)} for one {side}" for side, ends in pieces]
    how = f"{confidence(level)} interval {written[0]}"
    if len(written) == 2:
        how = f"{confidence(level)} interval in two pieces, {written[0]} and {written[1]}"
    return [f"{told} ({how})"]


def _side(number: NumberNeeded) -> str:
    return "more" if number.more else "fewer"


def _pieces(number: NumberNeeded) -> _Pieces:
    """The interval's pieces with their sides, the estimate's own side first."""
    sides = {"more": number.for_one_more, "fewer": number.for_one_fewer}
    order = ("more", "fewer") if number.more else ("fewer", "more")
    found = [(side, sides[side]) for side in order]
    return [(side, ends) for side, ends in found if ends is not None]


def _range(least: float, most: float) -> str:
    low, high = needed(least), needed(most)
    return low if low == high else f"{low} to {high}"


def _cases(subject: Subject, number: float) -> str:
    if needed(number) == "1":
        return tidy(subject.outcome.case)
    return f"{needed(number)} {tidy(subject.outcome.cases)}"
