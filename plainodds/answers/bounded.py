"""Which contrasts of the coefficients have a finite estimate, and what is known of the others."""

from __future__ import annotations

import math

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.estimate import Estimate
from plainodds.answers.kept import kept
from plainodds.answers.likelihood import likelihood_of
from plainodds.answers.optimum import optimum_of
from plainodds.answers.recession import recession_of
from plainodds.model.fitted import FittedModel

__all__ = [
    "UNDETERMINED",
    "as_ratio",
    "ends_are_quick",
    "limits_of",
    "unbounded_estimate",
    "unbounded_p_value",
]

Floats = NDArray[np.float64]

# rows times squared columns times ends: about ten seconds of refitting on an ordinary machine
_DEAREST = 1e9

UNDETERMINED = Estimate(math.nan, None, None, None)
"""Of a contrast that the data leave open."""


def limits_of(model: FittedModel, contrasts: Floats) -> Floats:
    """Where the maximum of the likelihood takes each c'β.

    Parameters
    ----------
    model : FittedModel
    contrasts : array (m, k)

    Returns
    -------
    array (m,)
        0 for a finite value, +inf or −inf where the likelihood rises for ever, nan where
        the data leave the contrast undetermined. All 0 where nothing can be known, and for
        fits that were kept from running away: penalised or under constraints.
    """
    standing = optimum_of(model)
    restrained = model.record.method == "penalised" or model.record.constrained
    if standing is None or standing.overlap or restrained:
        return np.zeros(len(contrasts))
    return recession_of(model).limits(contrasts)


def ends_are_quick(model: FittedModel, number: int) -> bool:
    """Whether the finite ends of so many unbounded contrasts can be found in a few seconds."""
    rows, columns = model.sample.matrix.shape
    return bool(rows * columns**2 * number <= _DEAREST)


def unbounded_estimate(
    model: FittedModel, contrast: Floats, limit: float, level: float
) -> Estimate:
    """The estimate of a c'β without a finite one: infinite, with one finite end.

    The end is that of the profile-likelihood interval (Venzon & Moolgavkar 1988), which
    exists where the estimate does not; there is none where the fit has no likelihood.

    Parameters
    ----------
    model : FittedModel
    contrast : array (k,)
    limit : float
        As `limits_of` tells it, not 0.
    level : float
    """
    if math.isnan(limit):
        return UNDETERMINED
    if model.no_likelihood:
        return Estimate(limit, None, None, None)
    ends, key = _ends(model), (contrast.tobytes(), level)
    if key not in ends:
        ends[key] = _likelihood(model).end(contrast, level, -math.copysign(1.0, limit))
    lower, upper = sorted((ends[key], limit))
    return Estimate(limit, None, lower, upper)


def as_ratio(log: Estimate) -> Estimate:
    """An estimate without standard error, carried over from the logarithm of a ratio."""

    def ratio(number: float | None) -> float | None:
        return None if number is None else float(np.exp(number))

    return Estimate(float(np.exp(log.estimate)), None, ratio(log.lower), ratio(log.upper))


def unbounded_p_value(model: FittedModel, contrast: Floats, limit: float) -> float | None:
    """Likelihood-ratio test of c'β = 0, where c'β has no finite estimate."""
    if math.isnan(limit) or model.no_likelihood:
        return None
    tests, key = _ends(model), (contrast.tobytes(), 0.0)
    if key not in tests:
        tests[key] = _likelihood(model).p_value(contrast)
    return tests[key]


_likelihood = kept(likelihood_of)


@kept
def _ends(model: FittedModel) -> dict[tuple[bytes, float], float]:
    """Ends and tests found before: each takes many refits."""
    return {}
