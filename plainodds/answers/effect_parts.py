"""What an effect is made of before it has an interval: value, gradient, drawn variance."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from typing import Literal, TypeAlias

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.population import Averages
from plainodds.errors import QuestionRefused
from plainodds.model.predictors import PredictorFacts
from plainodds.values import Scalar

__all__ = ["Effect", "Number", "level_contrasts", "refuse_steps_out_of_range"]

Floats = NDArray[np.float64]
Number: TypeAlias = Literal["slope", "step"]
"""What an effect of a number is: dπ/dx, or the change of one step."""


@dataclass(frozen=True, eq=False)
class Effect:
    """What an effect is about, its value and gradient, and its variance from drawn rows."""

    predictor: str
    start: Scalar | None
    end: Scalar | None
    step: float | None
    value: float
    gradient: Floats
    drawn: float


def level_contrasts(
    facts: PredictorFacts, averages: Averages, reference: int, drawn: Floats
) -> Iterator[Effect]:
    """The discrete change from the reference to each other level."""
    for place, level in enumerate(facts.levels):
        if place == reference or level not in facts.levels_with_rows:
            continue
        contrast = np.zeros(len(facts.levels))
        contrast[place], contrast[reference] = 1.0, -1.0
        yield Effect(
            facts.name,
            facts.levels[reference],
            level,
            None,
            float(contrast @ averages.value),
            contrast @ averages.gradient,
            float(contrast @ drawn @ contrast),
        )


def refuse_steps_out_of_range(facts: PredictorFacts, reached: float) -> None:
    """Refuse a step beyond where the formula can be computed."""
    if reached > facts.allowed[1]:
        raise QuestionRefused(
            f"{facts.name}: one step of {facts.step:g} more would lead to {reached:g}, and the "
            f"formula can be computed up to {facts.allowed[1]:g} only. Ask number='slope', or "
            "change() with the shift capped."
        )
