"""Marginal effects averaged over the rows, each with its own values."""

from __future__ import annotations

from collections.abc import Iterator

import numpy as np

from plainodds.answers import averaging, rebuilding
from plainodds.answers.drawn import Spread
from plainodds.answers.effect_parts import (
    Effect,
    Number,
    level_contrasts,
    refuse_steps_out_of_range,
)
from plainodds.answers.population import Population
from plainodds.model.fitted import FittedModel
from plainodds.model.predictors import PredictorFacts

__all__ = ["observed_effects"]


def observed_effects(
    model: FittedModel,
    chosen: list[PredictorFacts],
    number: Number,
    population: Population,
    spread: Spread,
) -> Iterator[Effect]:
    """Averaged effects in the order of the predictors; all slopes come from one pass.

    Parameters
    ----------
    model : FittedModel
    chosen : list of PredictorFacts
    number : {"slope", "step"}
    population : Population
    spread : callable
        The variance from drawing the rows; see `plainodds.answers.drawn`.
    """
    sloped = [f.name for f in chosen if f.is_number and number == "slope"]
    slopes = iter(_observed_slopes(model, sloped, population, spread))
    for facts in chosen:
        if facts.name in sloped:
            yield next(slopes)
        elif facts.is_number:
            yield _observed_step(model, facts, population, spread)
        else:
            yield from _observed_levels(model, facts, population, spread)


def _observed_slopes(
    model: FittedModel, names: list[str], population: Population, spread: Spread
) -> Iterator[Effect]:
    if not names:
        return
    slopes = rebuilding.averaged_own_slopes(model, names, population)
    variances = np.diag(spread(rebuilding.row_own_slopes(model, names), len(names)))
    for i, name in enumerate(names):
        yield Effect(
            name, None, None, None, slopes.value[i], slopes.gradient[i], float(variances[i])
        )


def _observed_levels(
    model: FittedModel, facts: PredictorFacts, population: Population, spread: Spread
) -> Iterator[Effect]:
    moved = {facts.name: np.arange(len(facts.levels))}
    averages = averaging.averaged_probability(model, moved, population)
    covariance = spread(averaging.row_probabilities(model, moved), len(facts.levels))
    yield from level_contrasts(facts, averages, model.coded_reference(facts), covariance)


def _observed_step(
    model: FittedModel, facts: PredictorFacts, population: Population, spread: Spread
) -> Effect:
    refuse_steps_out_of_range(facts, facts.maximum + facts.step)
    movers = (rebuilding.as_they_are(), rebuilding.shifter(facts.name, facts.step))
    averages = rebuilding.averaged_probability(model, movers, population)
    covariance = spread(rebuilding.row_probabilities(model, movers), 2)
    contrast = np.array([-1.0, 1.0])
    return Effect(
        facts.name,
        None,
        None,
        facts.step,
        float(contrast @ averages.value),
        contrast @ averages.gradient,
        float(contrast @ covariance @ contrast),
    )
