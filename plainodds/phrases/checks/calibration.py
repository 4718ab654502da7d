"""Chances against what happened, in words."""

from __future__ import annotations

import math
from dataclasses import replace

from plainodds.answers.checks.calibration import CalibrationEvidence, Optimism
from plainodds.answers.checks.finding import Finding
from plainodds.answers.estimate import Estimate
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.bending import IN_SAMPLE, apart, judged, middle_gap
from plainodds.phrases.checks.finding_words import (
    Figure,
    FindingWords,
    evidence_figures,
    evidence_words,
    made,
)
from plainodds.phrases.checks.parts import amount, gap
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import ratio, signed
from plainodds.phrases.parts import signed_with_interval

__all__: list[str] = []


@evidence_words.register
def _(
    evidence: CalibrationEvidence, finding: Finding, subject: Subject, level: float
) -> FindingWords:
    size, bends = evidence.largest_gap, "curve" in finding.reasons
    verdict = judged(size, math.nan, finding, subject, bends)
    if not bends and finding.unknown != "no likelihood" and "little" not in verdict:
        verdict = ", which chance alone may explain"
    what = (
        "on the fit's own data, chances and what happened differ "
        f"{apart(size)}{verdict}{_optimism(evidence.optimism)}"
    )
    if finding.unknown == "rows chosen by outcome":
        what += f"; {IN_SAMPLE}"
    return made(finding, subject, what, _next(evidence, finding))


def _optimism(found: Optimism | None) -> str:
    if found is None:
        return ""
    if not found.repeats or math.isnan(found.slope):
        return "; how much of that is the fit's own optimism could not be told"
    slope = signed(found.slope).removeprefix("+")
    extreme = "chances would be too extreme" if found.slope < 1 else "chances would do as well"
    return f"; on other cases of the same kind, {extreme} (slope {slope}, where 1 is right)"


def _next(evidence: CalibrationEvidence, finding: Finding) -> str:
    if "curve" in finding.reasons:
        return "See along which number the model bends wrongly, and mend that before giving chances"
    if finding.unknown == "no likelihood":
        return "Look at the picture, and keep to chances where the two lines are close"
    if "optimism" in finding.reasons and evidence.optimism and not evidence.optimism.repeats:
        return "Gather more data: no resample could be fitted, so the fit hangs on a few rows"
    if "optimism" in finding.reasons:
        return "Call chances far from the average too extreme, or fit a smaller or a shrunk model"
    if evidence.optimism is None:
        return (
            "If chances are meant for other cases than these, ask with `optimism='bootstrap'` how "
            "much of this is the fit's own optimism"
        )
    return "Nothing needs doing about this"


def _bare(estimate: Estimate) -> Estimate:
    """An estimate that is 0 but for the last digits is 0."""
    near = math.isclose(estimate.estimate, 0.0, abs_tol=1e-6)
    return replace(estimate, estimate=0.0) if near else estimate


@evidence_figures.register
def _(
    evidence: CalibrationEvidence, finding: Finding, subject: Subject, level: float
) -> list[Figure]:
    found: list[Figure] = [
        (middle_gap(), gap(evidence.largest_gap)),
        (message("Intercept (0 is right)"), signed_with_interval(_bare(evidence.intercept), level)),
        (message("Slope (1 is right)"), signed_with_interval(evidence.slope, level)),
        (message("Brier score"), ratio(evidence.brier)),
        (message("Brier score of one chance for all"), ratio(evidence.brier_of_share)),
        (message("Groups shown"), amount(len(evidence.bins))),
    ]
    optimism = evidence.optimism
    if optimism is None:
        return [*found, (message("Corrected for optimism"), message("not asked for"))]
    ways = {
        "bootstrap": message("Repeats (bootstrap)"),
        "cross-validation": message("Repeats (cross-validation)"),
    }
    return [
        *found,
        (ways[optimism.way], amount(optimism.repeats)),
        (message("Repeats that could not be fitted"), amount(optimism.failed)),
        (message("Slope, corrected for optimism"), signed(optimism.slope)),
        (message("Brier score, corrected for optimism"), ratio(optimism.brier)),
        (message("c, corrected for optimism"), ratio(optimism.c)),
    ]
