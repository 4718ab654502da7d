"""The lines of two predictors together: the chance along one, by values of the other."""

from __future__ import annotations

import numpy as np

from plainodds.answers.averaging import Averager, Exact
from plainodds.answers.curve import CurveAnswer, CurveQuestion, answer_curve
from plainodds.answers.pair_levels import MOST_LEVELS, MOST_LINES, levels_told
from plainodds.answers.pair_settled import PairQuestion, Settled
from plainodds.answers.points import POINTS, grid_along
from plainodds.answers.remembered import remembered
from plainodds.model.fitted import FittedModel, checked
from plainodds.model.predictors import PredictorFacts
from plainodds.values import Scalar

__all__ = ["lines_of"]


def lines_of(
    model: FittedModel, question: PairQuestion, pair: Settled, averager: Averager | None
) -> CurveAnswer:
    """Lines along a number where there is one, by the other predictor.

    Parameters
    ----------
    model : FittedModel
    question : PairQuestion
    pair : Settled
    averager : Averager or None
        What averages over the rows; None at the held profile.
    """
    along, by = pair.a, pair.b
    if not along.is_number and by.is_number:
        along, by = by, along
    changes = {pair.a.name: pair.a_change, pair.b.name: pair.b_change}
    asked = CurveQuestion(
        along.name,
        by.name,
        by_values=_values_of_lines(question, by, changes[by.name]),
        others=question.others,
        scale=question.scale,
        at=_points_along(along, () if along.name in pair.sloped else changes[along.name]),
        level=question.level,
    )
    if not isinstance(averager, Exact):
        return answer_curve(model, asked, averager)
    return remembered(model, ("lines", asked), lambda: answer_curve(model, asked, averager))


def _values_of_lines(
    question: PairQuestion, by: PredictorFacts, change: tuple[Scalar, Scalar]
) -> tuple[Scalar, ...]:
    """The stated values, every level, or a number's quartiles where they differ."""
    if not by.is_number:
        return _levels(by, change, MOST_LINES)
    stated = question.a_values if by.name == question.a else question.b_values
    if stated or by.quartiles[0] != by.quartiles[2]:
        return stated
    return change


def _points_along(facts: PredictorFacts, ends: tuple[Scalar, ...]) -> tuple[Scalar, ...]:
    """Every level, or a number's grid with the ends of its change.

    With them the four chances that are compared lie on the lines.
    """
    if not facts.is_number:
        return _levels(facts, ends, MOST_LEVELS)
    grid, compared = grid_along(facts, POINTS), np.array(ends, dtype=float)
    among = np.isclose(grid[:, None], compared, rtol=1e-9, atol=1e-12).any(axis=1)
    points = np.sort(np.append(grid[~among], compared))
    return tuple(checked(facts, x) for x in points.tolist())


def _levels(facts: PredictorFacts, compared: tuple[Scalar, ...], most: int) -> tuple[Scalar, ...]:
    """The levels told, where they are not all that there are; else nothing need be said."""
    told = levels_told(facts, compared, most)
    return () if told == facts.levels else told
