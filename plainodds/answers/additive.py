"""Interaction as departure from additivity: by how much both together exceed the sum.

Source: Hosmer & Lemeshow 1992 (Epidemiology 3:452); Rothman, Modern Epidemiology.
"""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.delta import mapped, wald
from plainodds.answers.estimate import Estimate
from plainodds.model.fitted import FittedModel
from plainodds.values import value

__all__ = ["AdditiveInteraction", "additive_interaction"]

Floats = NDArray[np.float64]


@value
class AdditiveInteraction:
    """By how much both together exceed the sum of each alone.

    Attributes
    ----------
    relative_excess_risk : Estimate
        RERI = R₁₁ − R₁₀ − R₀₁ + 1, R being odds ratios or risk ratios.
    attributable_proportion : Estimate
        AP = RERI / R₁₁.
    synergy_index : Estimate or None
        S = (R₁₁ − 1) / ((R₁₀ − 1) + (R₀₁ − 1)); None where numerator and denominator
        are not both positive, so that it has no meaning.
    """

    relative_excess_risk: Estimate
    attributable_proportion: Estimate
    synergy_index: Estimate | None


def additive_interaction(
    model: FittedModel, log_ratios: Floats, gradients: Floats, level: float
) -> AdditiveInteraction:
    """The measures with delta-method intervals: S on the log scale, the others on their own.

    Parameters
    ----------
    model : FittedModel
    log_ratios : array (3,)
        ln R₁₀, ln R₀₁ and ln R₁₁, against one reference.
    gradients : array (3, k)
        Their derivatives with respect to the coefficients.
    level : float
    """
    ratios = np.exp(log_ratios)
    slopes = ratios[:, None] * gradients
    both = ratios[2]
    excess = both - ratios[0] - ratios[1] + 1
    excess_slope = slopes[2] - slopes[0] - slopes[1]
    proportion = excess / both
    proportion_slope = (excess_slope - proportion * slopes[2]) / both
    found = wald(
        model,
        np.array([excess, proportion]),
        np.array([excess_slope, proportion_slope]),
        level,
    )
    return AdditiveInteraction(found.at(0), found.at(1), _synergy(model, ratios, slopes, level))


def _synergy(model: FittedModel, ratios: Floats, slopes: Floats, level: float) -> Estimate | None:
    together, apart = ratios[2] - 1, ratios[0] + ratios[1] - 2
    if not (together > 0 and apart > 0):
        return None
    slope = slopes[2] / together - (slopes[0] + slopes[1]) / apart
    log = wald(model, np.log([together / apart]), slope[None], level)
    return mapped(log, np.exp, np.exp).at(0)
