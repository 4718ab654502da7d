"""The four chances that two changes lead to, read off an answer about two predictors."""

from __future__ import annotations

import math
from dataclasses import dataclass

from plainodds import scales
from plainodds.answers.curve import CurveLine
from plainodds.answers.estimate import Estimate
from plainodds.answers.pair import PairAnswer
from plainodds.phrases.numbers import denominator
from plainodds.phrases.ways import estimate_at
from plainodds.values import Scalar

__all__ = ["Corners", "corners", "denominator_of_corners"]

_LEAST_APART = 5
_MOST = 1_000


@dataclass(frozen=True)
class Corners:
    """The chances at both values of both predictors.

    Attributes
    ----------
    neither, a_alone, b_alone, both : Estimate
        Which of the two have changed.
    """

    neither: Estimate
    a_alone: Estimate
    b_alone: Estimate
    both: Estimate

    @property
    def all(self) -> tuple[Estimate, Estimate, Estimate, Estimate]:
        """The four in the order in which they are told: by the value of `b`."""
        return self.neither, self.a_alone, self.b_alone, self.both

    @property
    def differences(self) -> tuple[float, float]:
        """What the change of `a` comes to at both values of `b`."""
        before = self.a_alone.estimate - self.neither.estimate
        return before, self.both.estimate - self.b_alone.estimate


def corners(answer: PairAnswer) -> Corners | None:
    """The four chances, where both changes are between two values and the answer has them."""
    if answer.sloped:
        return None
    found = [
        _chance(answer, a_value, b_value)
        for b_value in answer.b_change
        for a_value in answer.a_change
    ]
    neither, a_alone, b_alone, both = found
    if neither is None or a_alone is None or b_alone is None or both is None:
        return None
    return Corners(neither, a_alone, b_alone, both)


def _chance(answer: PairAnswer, a_value: Scalar, b_value: Scalar) -> Estimate | None:
    if answer.joint is not None:
        for cell in answer.joint.cells:
            if cell.a == a_value and cell.b == b_value:
                return cell.chance
    if answer.lines is None:
        return None
    question = answer.lines.question
    values = {answer.question.a: a_value, answer.question.b: b_value}
    along, by = values[question.predictor], values.get(question.by or "")
    for line in answer.lines.lines:
        if line.by is None or by is None or not _same(line.by, by):
            continue
        for place, at in enumerate(line.at):
            if _same(at, along):
                return _as_chance(line, place, question.scale)
    return None


def _same(one: Scalar, other: Scalar) -> bool:
    if isinstance(one, str) or isinstance(other, str):
        return one == other
    return math.isclose(one, other, rel_tol=1e-9, abs_tol=1e-12)


def _as_chance(line: CurveLine, place: int, scale: str) -> Estimate | None:
    """One point of a line as a chance, its interval carried over."""
    found = estimate_at(line, place)
    if scale == "probability":
        return found
    if scale != "odds":
        return None

    lower = None if found.lower is None else _carried(found.lower)
    upper = None if found.upper is None else _carried(found.upper)
    return Estimate(_carried(found.estimate), None, lower, upper)


def _carried(odds: float) -> float:
    # by way of η, since odds too large to be held are a chance of 1 all the same
    eta = scales.linear_predictor_from_odds(odds)
    return float(scales.probability_from_linear_predictor(eta))


def denominator_of_corners(four: Corners, apart: float) -> int:
    """The one denominator over which the four chances and all differences are told.

    That of the chances, or 1,000 where the difference between the differences, `apart`,
    would come to fewer than five in 100 and be lost in rounding.
    """
    over = denominator(each.estimate for each in four.all)
    return max(over, _MOST) if 0 < abs(apart) * over < _LEAST_APART else over
