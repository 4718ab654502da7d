"""Marginal effects: one per predictor, through every column that it moves."""

from __future__ import annotations

from collections.abc import Iterator
from typing import ClassVar

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.curve import Others
from plainodds.answers.delta import Intervals, checked_level, p_values, wald
from plainodds.answers.drawn import Sampling, spread_of
from plainodds.answers.effect_parts import Effect, Number
from plainodds.answers.estimate import Estimate
from plainodds.answers.held import stated_values
from plainodds.answers.held_effects import held_effects
from plainodds.answers.observed_effects import observed_effects
from plainodds.answers.population import Population, everyone
from plainodds.answers.questions import Answer, Question
from plainodds.answers.where import Where, chosen_rows
from plainodds.errors import QuestionRefused
from plainodds.model.fitted import FittedModel
from plainodds.model.predictors import PredictorFacts, Subject
from plainodds.values import Pairs, Scalar, value

__all__ = ["EffectRow", "EffectsAnswer", "EffectsQuestion", "answer_effects"]


@value
class EffectsQuestion(Question):
    """How much does the chance change with each predictor, for people like ours?

    Attributes
    ----------
    predictors : tuple of str
        Whose effects; empty for all.
    others : "observed", "typical" or pairs of (predictor, value)
        Effects averaged over the rows, each with its own values; at the typical
        profile; or at a stated profile, the rest typical.
    number : {"slope", "step"}
        For a number: dπ/dx, or the change when it goes up by one step.
    by : str or None
        A category or yes/no: the effects among the rows of each of its levels.
    where : pairs of (predictor, value), a mask's fingerprint, or None
        The effects among some of the rows.
    sample : {"fixed", "drawn"}
        Whether the interval is about these very rows, or also counts that they were
        drawn from a larger population.
    level : float
    """

    predictors: tuple[str, ...] = ()
    others: Others = "observed"
    number: Number = "slope"
    by: str | None = None
    where: Where = None
    sample: Sampling = "fixed"
    level: float = 0.95

    method: ClassVar[str] = "effects"


@value
class EffectRow:
    """One effect on the probability scale.

    Attributes
    ----------
    predictor : str
    start, end : scalar or None
        The levels compared; None for a number.
    step : float or None
        By how much a number goes up; None for a slope, and for levels.
    by : scalar or None
    effect : Estimate
        A change of the chance, per unit for a slope.
    p_value : float or None
        Wald test of no effect.
    """

    predictor: str
    start: Scalar | None
    end: Scalar | None
    step: float | None
    by: Scalar | None
    effect: Estimate
    p_value: float | None


@value
class EffectsAnswer(Answer):
    """Marginal effects, one row per predictor's change.

    Attributes
    ----------
    question : EffectsQuestion
    subject : Subject
    rows : tuple of EffectRow
    held : pairs of (predictor, value)
        The profile at which the effects hold; empty where they are averaged.
    counted : tuple of int
        Rows averaged over, for each value of `by` or once; empty at a profile.
    """

    question: EffectsQuestion
    subject: Subject
    rows: tuple[EffectRow, ...]
    held: Pairs
    counted: tuple[int, ...]


def answer_effects(
    model: FittedModel, question: EffectsQuestion, mask: NDArray[np.bool_] | None = None
) -> EffectsAnswer:
    """Marginal effects with delta-method intervals.

    For a number dπ/dx by the chain rule through every column that it moves, or the
    change of one step; for levels the discrete change from the first level to each.
    Averaged over the rows (observed values: Hanmer & Kalkan 2013, AJPS 57:263), at the
    typical or at a stated profile (Greene, Econometric Analysis). `sample="drawn"` adds
    Σ (wᵢ²/fᵢ)(θᵢ − θ̂)², see `plainodds.answers.drawn`.

    Raises
    ------
    QuestionRefused
    """
    level = checked_level(question.level)
    model.refuse_case_control()
    names = question.predictors or tuple(facts.name for facts in model.subject.predictors)
    chosen = [model.subject.predictor(name) for name in names]
    if question.number not in ("slope", "step"):
        raise QuestionRefused(f"number={question.number!r}: choose 'slope' or 'step'.")
    if question.others == "observed":
        groups = list(_groups(model, question, mask))
        held: Pairs = ()
        counted = tuple(population.counted for _, population in groups)
        found = [
            (by, list(_effects_among(model, chosen, question, population)))
            for by, population in groups
        ]
    else:
        held, found = _at_profiles(model, chosen, question)
        counted = ()
    rows: list[EffectRow] = []
    for by, effects in found:
        rows += _rows(model, by, effects, level)
    return EffectsAnswer(question, model.subject, tuple(rows), held, counted)


def _rows(
    model: FittedModel, by: Scalar | None, effects: list[Effect], level: float
) -> Iterator[EffectRow]:
    intervals: Intervals = wald(
        model,
        np.array([effect.value for effect in effects]),
        np.array([effect.gradient for effect in effects]),
        level,
        np.array([effect.drawn for effect in effects]),
    )
    for i, (effect, p) in enumerate(zip(effects, p_values(model, intervals), strict=True)):
        yield EffectRow(
            effect.predictor, effect.start, effect.end, effect.step, by, intervals.at(i), p
        )


def _groups(
    model: FittedModel, question: EffectsQuestion, mask: NDArray[np.bool_] | None
) -> Iterator[tuple[Scalar | None, Population]]:
    population = everyone(model)
    if question.where is not None:
        rows, what = chosen_rows(model, question.where, mask)
        population = population.among(rows, what)
    if question.by is None:
        yield None, population
        return
    by = _levels_of(model, question.by)
    for place, level in enumerate(by.levels):
        # a level that nobody has is left out: there is no effect among nobody
        rows = model.sample.columns[by.name] == place
        if (population.weights[rows] > 0).any():
            yield level, population.among(rows, f"{by.name} = {level!r}")


def _effects_among(
    model: FittedModel,
    chosen: list[PredictorFacts],
    question: EffectsQuestion,
    population: Population,
) -> Iterator[Effect]:
    spread = spread_of(question.sample, model, population)
    return observed_effects(model, chosen, question.number, population, spread)


def _levels_of(model: FittedModel, name: str) -> PredictorFacts:
    by = model.subject.predictor(name)
    if by.is_number:
        raise QuestionRefused(
            f"by={name!r} is a number and has no levels; choose rows with "
            f"where={{{name!r}: (lowest, highest)}}, or ask curve(…, by={name!r}, scale='slope')."
        )
    return by


def _at_profiles(
    model: FittedModel, chosen: list[PredictorFacts], question: EffectsQuestion
) -> tuple[Pairs, list[tuple[Scalar | None, list[Effect]]]]:
    stated = stated_values(question.others, question.where, question.sample)
    if question.by is None:
        profile = model.completed(stated)
        return profile, [(None, list(held_effects(model, chosen, question.number, profile)))]
    by = _levels_of(model, question.by)
    found: list[tuple[Scalar | None, list[Effect]]] = []
    for level in by.levels:
        profile = model.completed({**stated, by.name: level})
        found.append((level, list(held_effects(model, chosen, question.number, profile))))
    held = tuple((name, v) for name, v in model.completed(stated) if name != by.name)
    return held, found
