"""Overall tests and measures in words, with their limits."""

from __future__ import annotations

import math

from plainodds.answers.checks.finding import Finding
from plainodds.answers.checks.overall import OverallEvidence
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.bending import IN_SAMPLE
from plainodds.phrases.checks.finding_words import (
    Figure,
    FindingWords,
    evidence_figures,
    evidence_words,
    made,
)
from plainodds.phrases.checks.parts import amount, because, counted
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import p_value, ratio, signed, wording

__all__ = ["overall_limits"]


def overall_limits() -> tuple[str, ...]:
    """What each of these figures cannot say."""
    return (
        message(
            "Hosmer & Lemeshow's test hangs on how cases are grouped, which is arbitrary, finds "
            "little in small samples and something in any large one, and does not say where a "
            "model is wrong."
        ),
        message(
            "Tjur's and McFadden's R² are not shares of variance explained, and a right model of a "
            "rare or chancy event has low ones."
        ),
        message("The link test sees one kind of bend only, along the model's own chances."),
    )


@evidence_words.register
def _(evidence: OverallEvidence, finding: Finding, subject: Subject, level: float) -> FindingWords:
    if finding.reasons:
        what = (
            "the square of the linear predictor adds to the model (link test, p-value "
            f"{p_value(evidence.link_p_value)}), and chances are off by enough to matter"
        )
        step = "See along which number the model bends wrongly, or which product of two it lacks"
        return made(finding, subject, what, step)
    what = (
        f"Hosmer & Lemeshow's statistic over {counted(evidence.groups, 'group', 'groups')} is "
        f"{ratio(evidence.statistic)}{_test(evidence)}, Tjur's R² {_share(evidence.tjur)} and "
        f"McFadden's {_share(evidence.mcfadden)}{_link(evidence, finding)}"
    )
    if finding.unknown == "rows chosen by outcome":
        what += f"; {IN_SAMPLE}"
    return made(finding, subject, what, "Report these only where someone asks, with their limits")


def _test(evidence: OverallEvidence) -> str:
    return "" if math.isnan(evidence.p_value) else f" (p-value {p_value(evidence.p_value)})"


def _link(evidence: OverallEvidence, finding: Finding) -> str:
    if not math.isnan(evidence.link_p_value):
        return f"; the link test has a p-value of {p_value(evidence.link_p_value)}"
    why = because(finding.unknown) if finding.unknown == "no likelihood" else ""
    return f"; the link test is not known{why}"


def _share(number: float) -> str:
    return wording().not_known if math.isnan(number) else signed(number).removeprefix("+")


@evidence_figures.register
def _(evidence: OverallEvidence, finding: Finding, subject: Subject, level: float) -> list[Figure]:
    freedom = evidence.degrees_of_freedom
    name = message("Hosmer & Lemeshow ({} groups)", amount(evidence.groups))
    if evidence.groups == 1:
        name = message("Hosmer & Lemeshow (1 group)")
    told = ratio(evidence.statistic)
    if freedom:
        told = message("{}, {} df, p-value {}", told, freedom, p_value(evidence.p_value))
    return [
        (name, told),
        (message("Tjur's R²"), _share(evidence.tjur)),
        (message("McFadden's R²"), _share(evidence.mcfadden)),
        (message("Link test, p-value"), p_value(evidence.link_p_value)),
    ]
