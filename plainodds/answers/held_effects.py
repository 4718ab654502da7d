"""Marginal effects at one profile."""

from __future__ import annotations

from collections.abc import Iterator

import numpy as np

from plainodds.answers.effect_parts import (
    Effect,
    Number,
    level_contrasts,
    refuse_steps_out_of_range,
)
from plainodds.answers.held import held_probabilities
from plainodds.model.fitted import FittedModel
from plainodds.model.predictors import PredictorFacts
from plainodds.scales import (
    probability_curvature,
    probability_from_linear_predictor,
    probability_slope,
)
from plainodds.values import Pairs

__all__ = ["held_effects"]


def held_effects(
    model: FittedModel, chosen: list[PredictorFacts], number: Number, profile: Pairs
) -> Iterator[Effect]:
    """Effects at one profile, in the order of the predictors."""
    base = dict(profile)
    for facts in chosen:
        if facts.is_number and number == "slope":
            yield _held_slope(model, facts.name, profile)
        elif facts.is_number:
            reached = float(base[facts.name]) + facts.step
            refuse_steps_out_of_range(facts, reached)
            averages = held_probabilities(model, [profile, {**base, facts.name: reached}])
            yield Effect(
                facts.name,
                None,
                None,
                facts.step,
                averages.value[1] - averages.value[0],
                averages.gradient[1] - averages.gradient[0],
                0.0,
            )
        else:
            profiles = [{**base, facts.name: level} for level in facts.levels]
            averages = held_probabilities(model, profiles)
            yield from level_contrasts(
                facts, averages, model.coded_reference(facts), np.zeros((len(profiles),) * 2)
            )


def _held_slope(model: FittedModel, name: str, profile: Pairs) -> Effect:
    row = model.rows([profile])[0]
    row_slope = model.design.row_derivatives(name, model.coded([profile]))[0]
    pi = probability_from_linear_predictor(row @ model.coefficients + model.offset)
    steepness = row_slope @ model.coefficients
    gradient = probability_slope(pi) * row_slope + probability_curvature(pi) * steepness * row
    return Effect(name, None, None, None, float(probability_slope(pi) * steepness), gradient, 0.0)
