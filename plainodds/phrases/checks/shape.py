"""Shape along a number, in words."""

from __future__ import annotations

from plainodds.answers.checks.finding import Finding
from plainodds.answers.checks.shape import ShapeEvidence
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
from plainodds.phrases.labels import predictor_name
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import p_value, ratio, wording

__all__: list[str] = []


@evidence_words.register
def _(evidence: ShapeEvidence, finding: Finding, subject: Subject, level: float) -> FindingWords:
    name = predictor_name(subject.predictor(evidence.predictor))
    size = evidence.largest_gap
    bends = bool(finding.reasons)
    verdict = judged(size, evidence.p_value, finding, subject, bends)
    what = f"along {name}, the model and the data differ {apart(size)}{verdict}"
    if finding.unknown == "rows chosen by outcome":
        what += f"; {IN_SAMPLE}"
    if bends:
        step = (
            f"Let {name} bend in the model (a spline, a square or a logarithm), and compare the "
            "two pictures"
        )
    elif finding.concern == "not known":
        step = (
            "Look at the picture, and see whether the data bend where the model does not along "
            f"{name}"
        )
    else:
        step = "Nothing needs doing about this"
    return made(finding, subject, what, step)


@evidence_figures.register
def _(evidence: ShapeEvidence, finding: Finding, subject: Subject, level: float) -> list[Figure]:
    freedom = evidence.degrees_of_freedom
    statistic = wording().not_known
    if freedom:
        statistic = message("{}, {} df", ratio(evidence.statistic), freedom)
    return [
        (middle_gap(), gap(evidence.largest_gap)),
        (message("Test for another bend (χ²)"), statistic),
        (message("p-value"), p_value(evidence.p_value)),
        (message("Groups shown"), amount(len(evidence.bins))),
    ]
