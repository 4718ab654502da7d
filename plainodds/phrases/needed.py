"""The number needed in words, its interval in one piece or two."""

from __future__ import annotations

import math

from plainodds.answers.comparing import NumberNeeded
from plainodds.model.predictors import Subject
from plainodds.phrases.languages import in_language
from plainodds.phrases.numbers import confidence, needed, wording
from plainodds.phrases.units import tidy

__all__ = ["needed_range", "needed_technical", "needed_words", "pieces"]

Pieces = list[tuple[bool, tuple[float, float]]]


def needed_words(subject: Subject, number: NumberNeeded, level: float) -> list[str]:
    """Among how many cases there is one event more, or fewer; empty where that is not known."""
    if math.isnan(number.estimate):
        return []
    told = f"For every {_cases(subject, number.estimate)} compared there is one event "
    told += _side(number.more)
    if math.isinf(number.estimate):
        cases = tidy(subject.outcome.cases)
        told = f"With no difference, no number of {cases} shows one event more or fewer"
    found = pieces(number)
    if not found:
        return [told]
    (more, (least, most)) = found[0]
    if len(found) == 1 and not math.isinf(most):
        return [f"{told} ({confidence(level)} interval {needed_range(least, most)})"]
    side = _side(more)
    if len(found) == 1:
        return [
            f"{told}; the {confidence(level)} interval goes from {needed(least)} for one {side} to "
            "infinity, which stands for no difference"
        ]
    _, (fewest, _) = found[1]
    other = _side(not more)
    return [
        f"{told}; the {confidence(level)} interval includes no difference, so it goes from "
        f"{needed(least)} for one {side}, through infinity (no difference), to "
        f"{needed(fewest)} for one {other}"
    ]


@in_language
def needed_technical(number: NumberNeeded, level: float) -> list[str]:
    """The number needed with its interval's pieces; empty where it is not known."""
    if math.isnan(number.estimate):
        return []
    told = f"Number needed {needed(number.estimate)}"
    if not math.isinf(number.estimate):
        told += f" for one event {_side(number.more)}"
    found = pieces(number)
    if not found:
        return [told]
    written = [f"{needed_range(*ends)} for one {_side(more)}" for more, ends in found]
    how = f"{confidence(level)} interval {written[0]}"
    if len(written) == 2:
        how = f"{confidence(level)} interval in two pieces, {written[0]} and {written[1]}"
    return [f"{told} ({how})"]


def _side(more: bool) -> str:
    return "more" if more else "fewer"


def pieces(number: NumberNeeded) -> Pieces:
    """The interval's pieces, with whether they are of events more, the estimate's own first."""
    sides = {True: number.for_one_more, False: number.for_one_fewer}
    found = [(more, sides[more]) for more in (number.more, not number.more)]
    return [(more, ends) for more, ends in found if ends is not None]


def needed_range(least: float, most: float) -> str:
    """A range of numbers needed: "8.4 to 13"."""
    low, high = needed(least), needed(most)
    return low if low == high else wording().to.format(low, high)


def _cases(subject: Subject, number: float) -> str:
    if needed(number) == "1":
        return tidy(subject.outcome.case)
    return f"{needed(number)} {tidy(subject.outcome.cases)}"
