"""Answers for moving pictures: by a sketch of the rows, where a question allows one."""

from __future__ import annotations

from collections.abc import Hashable

from plainodds.answers.change import ChangeAnswer, ChangeQuestion, answer_change
from plainodds.answers.curve import CurveAnswer, CurveQuestion, answer_curve
from plainodds.answers.moves import Move
from plainodds.answers.pair import PairAnswer, PairQuestion, answer_pair
from plainodds.answers.population import Population, everyone
from plainodds.answers.questions import Question
from plainodds.answers.sketch import Sketch, sketch_of
from plainodds.answers.where import Mask, chosen_rows
from plainodds.model.fitted import FittedModel
from plainodds.values import Pairs

__all__ = ["answer_by_sketch", "sketch_for", "sketched"]


def sketched(question: Question) -> Hashable | None:
    """What a sketch for a question depends on: moved predictors and rows; None without one.

    Questions for which this is equal can be answered by one and the same sketch.
    """
    if isinstance(question, CurveQuestion) and question.others == "observed":
        names = (question.predictor, question.by)
        return tuple(name for name in names if name is not None), None
    if (
        isinstance(question, PairQuestion)
        and question.others == "observed"
        # a slope at each row's own value needs the rows
        and question.number == "change"
    ):
        return (question.a, question.b), None
    if (
        isinstance(question, ChangeQuestion)
        and question.others == "observed"
        and question.sample == "fixed"
        and not isinstance(question.where, Mask)
        and all(isinstance(move, Move) for _, move in question.moves)
    ):
        return tuple(name for name, _ in question.moves), question.where
    return None


def sketch_for(model: FittedModel, question: Question) -> Sketch | None:
    """The sketch by which a question can be answered, if there is one.

    Raises
    ------
    QuestionRefused
        If no row is where the question looks.
    """
    depends = sketched(question)
    if not isinstance(depends, tuple):
        return None
    names, where = depends
    for name in names:
        model.subject.predictor(name)
    return sketch_of(model, names, _population(model, where))


def _population(model: FittedModel, where: Pairs | None) -> Population:
    population = everyone(model)
    return population if where is None else population.among(*chosen_rows(model, where, None))


def answer_by_sketch(
    model: FittedModel, question: CurveQuestion | ChangeQuestion | PairQuestion, sketch: Sketch
) -> CurveAnswer | ChangeAnswer | PairAnswer:
    """Answer a question by the sketch that `sketch_for` made for it or its like."""
    if isinstance(question, CurveQuestion):
        return answer_curve(model, question, sketch)
    if isinstance(question, PairQuestion):
        return answer_pair(model, question, sketch)
    return answer_change(model, question, averager=sketch)
