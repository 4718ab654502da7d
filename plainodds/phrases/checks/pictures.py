"""What the picture of a finding shows, for those who cannot see it."""

from __future__ import annotations

from functools import singledispatch

from plainodds.answers.checks.amount import LevelsEvidence, MissingEvidence
from plainodds.answers.checks.calibration import CalibrationEvidence
from plainodds.answers.checks.collinearity import CollinearityEvidence
from plainodds.answers.checks.dependence import DependenceEvidence
from plainodds.answers.checks.discrimination import DiscriminationEvidence
from plainodds.answers.checks.finding import Finding
from plainodds.answers.checks.influence import InfluenceEvidence
from plainodds.answers.checks.shape import ShapeEvidence
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.finding_words import finding_words
from plainodds.phrases.checks.headings import concern_label
from plainodds.phrases.checks.parts import coefficients, counted
from plainodds.phrases.labels import predictor_name
from plainodds.phrases.sentences import sentence
from plainodds.phrases.units import tidy

__all__ = ["picture_words"]


def picture_words(finding: Finding, subject: Subject, level: float) -> str:
    """Say what the picture of a finding shows, with what was found.

    Returns
    -------
    str
        Plain text, not escaped: what is drawn, where there is something to draw, and the
        finding itself.
    """
    said = finding_words(finding, subject, level)
    drawn = _drawn(finding.evidence, subject)
    lead = f"{said.heading}, {concern_label(finding.concern)}"
    return f"{sentence(f'{lead}: {drawn}' if drawn else lead)} {said.what}"


@singledispatch
def _drawn(evidence: object, subject: Subject) -> str:
    """What is drawn of this kind of evidence; empty where its figures say it all."""
    return ""


@_drawn.register
def _(evidence: ShapeEvidence, subject: Subject) -> str:
    name = predictor_name(subject.predictor(evidence.predictor))
    groups = counted(len(evidence.bins), "group", "groups")
    return (
        f"the share of {tidy(subject.outcome.event)} in the data along {name}, smoothed with a "
        f"band and in {groups}, beside the model's"
    )


@_drawn.register
def _(evidence: CalibrationEvidence, subject: Subject) -> str:
    groups = counted(len(evidence.bins), "group", "groups")
    return (
        f"the share of {tidy(subject.outcome.event)} in the data along the model's chance, "
        f"smoothed with a band and in {groups}, beside the line of chances that come true"
    )


@_drawn.register
def _(evidence: DiscriminationEvidence, subject: Subject) -> str:
    return (
        f"how many {tidy(subject.outcome.cases)} with the event and without it have which chance "
        "by the model"
    )


@_drawn.register
def _(evidence: InfluenceEvidence, subject: Subject) -> str:
    shown = counted(len(evidence.probability), "kind of row", "different rows")
    return (
        f"{shown} by their chance and by how badly each is fitted, and how far each moves the fit"
    )


@_drawn.register
def _(evidence: DependenceEvidence, subject: Subject) -> str:
    if not evidence.standard_errors:
        return ""
    shown = coefficients(len(evidence.standard_errors))
    return f"standard errors of {shown}, taking rows as strangers and counting groups together"


@_drawn.register
def _(evidence: CollinearityEvidence, subject: Subject) -> str:
    shown = counted(len(evidence.inflation), "predictor", "predictors")
    return f"by how much standard errors of {shown} are stretched by the others"


@_drawn.register
def _(evidence: LevelsEvidence, subject: Subject) -> str:
    if not evidence.counts:
        return ""
    levels = counted(len(evidence.counts), "level", "levels")
    return f"cases with the event and without it at {levels}"


@_drawn.register
def _(evidence: MissingEvidence, subject: Subject) -> str:
    if evidence.difference is None:
        return ""
    return f"the share of {tidy(subject.outcome.event)} in rows left out and in rows used"
