"""What changes when predictors change: two chances, their difference and ratios."""

from __future__ import annotations

from typing import Any, ClassVar

import numpy as np
from numpy.typing import NDArray

from plainodds.answers import averaging, rebuilding
from plainodds.answers.averaging import Averager, Exact
from plainodds.answers.chances import chances
from plainodds.answers.comparing import Comparison, NumberNeeded, compared, number_needed
from plainodds.answers.curve import Others
from plainodds.answers.delta import checked_level
from plainodds.answers.drawn import Rows, Sampling, spread_of
from plainodds.answers.estimate import Estimate
from plainodds.answers.held import held_probabilities, stated_values
from plainodds.answers.moves import Move, Shift, checked_moves, shifted, shifting_mover
from plainodds.answers.population import Averages, Population, everyone
from plainodds.answers.questions import Answer, Question
from plainodds.answers.where import Where, chosen_rows
from plainodds.errors import QuestionRefused
from plainodds.model.fitted import FittedModel
from plainodds.model.predictors import PredictorFacts, Subject
from plainodds.values import Pairs, value

__all__ = ["ChangeAnswer", "ChangeQuestion", "answer_change"]

Floats = NDArray[np.float64]


@value
class ChangeQuestion(Question):
    """What becomes of the chance when one or several predictors change?

    Attributes
    ----------
    moves : tuple of (predictor, Move or Shift)
        Predictors that change together.
    others : "observed", "typical" or pairs of (predictor, value)
        What the remaining predictors do.
    where : pairs of (predictor, value), a mask's fingerprint, or None
        Among which rows, where the others are as observed.
    sample : {"fixed", "drawn"}
        As in EffectsQuestion.
    level : float
    """

    moves: tuple[tuple[str, Move | Shift], ...]
    others: Others = "observed"
    where: Where = None
    sample: Sampling = "fixed"
    level: float = 0.95

    method: ClassVar[str] = "change"


@value
class ChangeAnswer(Answer):
    """Two chances and how they compare.

    Attributes
    ----------
    question : ChangeQuestion
    subject : Subject
    start, end : Estimate
        The chance before and after the change.
    comparison : Comparison
        Odds ratio, risk difference and risk ratio, from start to end.
    number_needed : NumberNeeded
    held : pairs of (predictor, value)
        The profile that is held; empty where the others are as observed.
    counted : int
        Rows averaged over; 0 where a profile is held.
    beyond : tuple of str
        Predictors that the change takes beyond the data's range.
    """

    question: ChangeQuestion
    subject: Subject
    start: Estimate
    end: Estimate
    comparison: Comparison
    number_needed: NumberNeeded
    held: Pairs
    counted: int
    beyond: tuple[str, ...]


def answer_change(
    model: FittedModel,
    question: ChangeQuestion,
    mask: NDArray[np.bool_] | None = None,
    averager: Averager | None = None,
) -> ChangeAnswer:
    """Two chances, averaged or held, compared by one joint delta method.

    Sources: Localio, Margolis & Berlin 2007 (J Clin Epidemiol 60:874) for differences and
    ratios; Muller & MacLehose 2014 for the averaged chances' intervals; Altman 1998 (BMJ
    317:1309) for the number needed.

    Parameters
    ----------
    model : FittedModel
    question : ChangeQuestion
    mask : array (n,) of bool, optional
        The rows, where the question chooses them by a mask.
    averager : Averager, optional
        What averages over the population asked for; exactly when left out.

    Raises
    ------
    QuestionRefused
    """
    level = checked_level(question.level)
    model.refuse_case_control()
    moves = checked_moves(model, question.moves)
    drawn = np.zeros((2, 2))
    if question.others == "observed":
        held: Pairs = ()
        population = _population(model, question, mask) if averager is None else averager.population
        averages = _observed(model, moves, population, averager)
        counted = population.counted
        drawn = spread_of(question.sample, model, population)(_rows(model, moves), 2)
    else:
        held, averages = _at_profile(model, question, moves)
        counted = 0
    if model.leaves_open(averages.gradient).any():
        raise QuestionRefused(
            "The rows leave open what this change does: some columns of the model follow from "
            "others, or no row has such a combination of levels. Leave one of the columns out of "
            "the model, or ask about levels that rows have together."
        )
    both = chances(model, averages, level, drawn)
    comparison = compared(model, averages.value, averages.gradient, level, drawn)
    return ChangeAnswer(
        question=question,
        subject=model.subject,
        start=both.at(0),
        end=both.at(1),
        comparison=comparison,
        number_needed=number_needed(comparison.risk_difference),
        held=held,
        counted=counted,
        beyond=_beyond(model, moves, question),
    )


def _population(
    model: FittedModel, question: ChangeQuestion, mask: NDArray[np.bool_] | None
) -> Population:
    population = everyone(model)
    if question.where is None:
        return population
    return population.among(*chosen_rows(model, question.where, mask))


Moves = tuple[tuple[str, Move | Shift], ...]


def _grid(model: FittedModel, moves: Moves) -> dict[str, NDArray[Any]] | None:
    """Start and end as two points, where nobody is shifted from his own value."""
    grid = {}
    for name, move in moves:
        if isinstance(move, Shift):
            return None
        facts = model.subject.predictor(name)
        grid[name] = model.coded_values(facts, (move.start, move.end))
    return grid


def _observed(
    model: FittedModel, moves: Moves, population: Population, averager: Averager | None
) -> Averages:
    grid = _grid(model, moves)
    if grid is not None:
        return (averager or Exact(model, population)).probability(grid)
    movers = [shifting_mover(model, moves, place) for place in ("start", "end")]
    return rebuilding.averaged_probability(model, movers, population)


def _rows(model: FittedModel, moves: Moves) -> Rows:
    grid = _grid(model, moves)
    if grid is not None:
        return averaging.row_probabilities(model, grid)
    movers = [shifting_mover(model, moves, place) for place in ("start", "end")]
    return rebuilding.row_probabilities(model, movers)


def _at_profile(
    model: FittedModel, question: ChangeQuestion, moves: Moves
) -> tuple[Pairs, Averages]:
    stated = stated_values(question.others, question.where, question.sample)
    moved = {name for name, _ in moves}
    for name in moved & set(stated):
        raise QuestionRefused(f"others= holds {name!r}, which the change itself moves.")
    base = dict(model.completed(stated))
    ends = []
    for place in ("start", "end"):
        values = dict(base)
        for name, move in moves:
            if isinstance(move, Move):
                values[name] = getattr(move, place)
            elif place == "end":
                facts = model.subject.predictor(name)
                values[name] = float(shifted(facts, move, np.array([float(base[name])]))[0])
        ends.append(values)
    held = tuple((name, v) for name, v in base.items() if name not in moved)
    return held, held_probabilities(model, ends)


def _beyond(model: FittedModel, moves: Moves, question: ChangeQuestion) -> tuple[str, ...]:
    held = question.others != "observed"
    found = []
    for name, move in moves:
        facts = model.subject.predictor(name)
        # whom a shift takes furthest: the typical case where a profile is held
        from_where = (
            (float(facts.typical),) if held and facts.is_number else (facts.minimum, facts.maximum)
        )
        if _is_beyond(facts, move, np.array(from_where)):
            found.append(name)
    return tuple(found)


def _is_beyond(facts: PredictorFacts, move: Move | Shift, from_where: Floats) -> bool:
    if isinstance(move, Shift):
        ends = shifted(facts, move, from_where)
    elif facts.is_number:
        ends = np.array([float(move.start), float(move.end)])
    else:
        return any(facts.level_counts[facts.levels.index(v)] == 0 for v in (move.start, move.end))
    return bool(ends.min() < facts.minimum or ends.max() > facts.maximum)
