"""What is told of changes."""

from __future__ import annotations

from plainodds.answers.change import ChangeAnswer
from plainodds.answers.moves import Shift
from plainodds.phrases.numbers import denominator_of_change, frequencies, span

__all__ = ["both_intervals", "change_averaged", "has_others", "is_open", "marks_told", "misses_one"]

_MOST_MARKS = 1_000


def change_averaged(answer: ChangeAnswer) -> bool:
    """Whether anything is left in which the rows differ."""
    if answer.question.others != "observed":
        return False
    shifts = any(isinstance(move, Shift) for _, move in answer.question.moves)
    return shifts or has_others(answer) or answer.subject.offset is not None


def has_others(answer: ChangeAnswer) -> bool:
    """Whether any predictor does not move."""
    moved = {name for name, _ in answer.question.moves}
    return any(facts.name not in moved for facts in answer.subject.predictors)


def both_intervals(answer: ChangeAnswer) -> list[str]:
    """The intervals of both chances, in the order in which the chances are told, or none."""
    ends = [
        span(each.lower, each.upper)
        for each in (answer.end, answer.start)
        if each.lower is not None and each.upper is not None
    ]
    return ends if len(ends) == 2 else []


def is_open(answer: ChangeAnswer) -> bool:
    """Whether the interval of the difference holds differences in both directions."""
    difference = answer.comparison.risk_difference
    if difference.lower is None or difference.upper is None:
        return False
    return difference.lower < 0 < difference.upper


def misses_one(answer: ChangeAnswer, over: int) -> bool:
    """Whether the rounded counts differ by another number than their rounded difference."""
    start, end = answer.start.estimate, answer.end.estimate
    if not (0 <= start <= 1 and 0 <= end <= 1):
        return False
    apart = round(abs(end - start) * over)
    return apart != abs(round(end * over) - round(start * over))


def marks_told(answer: ChangeAnswer) -> str:
    """Both chances as the picture's marks show them: "18 and 8 in 100"."""
    chances = answer.start.estimate, answer.end.estimate
    return frequencies(chances, min(denominator_of_change(*chances), _MOST_MARKS))
