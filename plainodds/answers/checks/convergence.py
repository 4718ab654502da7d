"""Whether the fit ended where the likelihood is highest."""

from __future__ import annotations

import math
from typing import ClassVar

import numpy as np

from plainodds.answers.checks.columns import owners_of
from plainodds.answers.checks.finding import Concern, Evidence, Finding, Topic, Unknown
from plainodds.answers.optimum import optimum_of
from plainodds.model.fitted import FittedModel
from plainodds.values import value

__all__ = ["REASONS", "ConvergenceEvidence", "convergence_of"]

REASONS = ("not converged", "gradient")

# A remaining step, in standard errors: beside an interval of ±2 of them the first can't be
# seen, and the second moves an interval by a tenth of its half. Common practice, no source.
_NOTICEABLE = 0.01
_SERIOUS = 0.2


@value
class ConvergenceEvidence(Evidence):
    """How the fit ended.

    Attributes
    ----------
    converged : bool or None
        What the result itself says.
    iterations : int or None
    remaining_step : float
        Largest step that one more Newton iteration would take for a coefficient, in its
        standard errors; nan where it can't be computed.
    coefficient : str
        The one that would take it.
    """

    topic: ClassVar[Topic] = "convergence"

    converged: bool | None
    iterations: int | None
    remaining_step: float
    coefficient: str


def convergence_of(model: FittedModel) -> Finding:
    """Whether the fit says that it converged, and whether it stands at the optimum.

    A fit that says it did not converge and yet stands where the likelihood is highest needs
    a mention only; one that says it did and has a step to go is not believed. The remaining
    step is that of one more Newton iteration, H⁻¹s, where the fit maximises the likelihood.
    """
    record = model.record
    step, place, unknown = _remaining_step(model)
    reasons = []
    if record.converged is False:
        reasons.append("not converged")
    if step > _NOTICEABLE:
        reasons.append("gradient")
    if record.converged is None and math.isnan(step):
        return Finding("convergence", "not known", unknown="not said by the fit")
    coefficient = "" if place is None else model.design.columns[place].name
    evidence = ConvergenceEvidence(record.converged, record.iterations, step, coefficient)
    about = owners_of(model, [place]) if place is not None and "gradient" in reasons else ()
    return Finding(
        "convergence", _concern(record.converged, step), tuple(reasons), about, evidence, unknown
    )


def _concern(converged: bool | None, step: float) -> Concern:
    if step > _SERIOUS or (converged is False and math.isnan(step)):
        return "don't explain yet"
    return "keep in mind" if step > _NOTICEABLE or converged is False else "nothing found"


def _remaining_step(model: FittedModel) -> tuple[float, int | None, Unknown]:
    record = model.record
    if record.method in ("penalised", "estimating equations") or record.constrained:
        # these do not end where the likelihood is highest, and are not meant to
        return math.nan, None, "no likelihood"
    optimum = optimum_of(model)
    if optimum is None:
        return math.nan, None, "no outcome"
    steps = np.abs(optimum.step)
    if not np.isfinite(steps).any():
        return math.nan, None, ""
    place = int(np.nanargmax(steps))
    return float(steps[place]), place, ""
