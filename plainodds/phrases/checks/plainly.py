"""A finding for those who do not analyse: without coefficients, tests and columns."""

from __future__ import annotations

import math
from functools import singledispatch

from plainodds.answers.checks.amount import AmountEvidence
from plainodds.answers.checks.collinearity import CollinearityEvidence
from plainodds.answers.checks.convergence import ConvergenceEvidence
from plainodds.answers.checks.dependence import DependenceEvidence
from plainodds.answers.checks.finding import Finding
from plainodds.answers.checks.influence import InfluenceEvidence
from plainodds.answers.checks.overall import OverallEvidence
from plainodds.answers.checks.separation import SeparationEvidence
from plainodds.answers.checks.shape import ShapeEvidence
from plainodds.answers.checks.standard_errors import StandardErrorsEvidence
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.bending import apart
from plainodds.phrases.checks.finding_words import finding_words
from plainodds.phrases.checks.influence import moved_by_few
from plainodds.phrases.checks.parts import amount, cases, named
from plainodds.phrases.checks.separation import told_without_exception
from plainodds.phrases.choices.checks import TOLD_WITH_WHY
from plainodds.phrases.labels import predictor_name
from plainodds.phrases.sentences import sentence
from plainodds.phrases.units import tidy

__all__ = ["plain_sentences"]


def plain_sentences(finding: Finding, subject: Subject, level: float) -> tuple[str, ...]:
    """What a finding means for whoever hears the explanation, in at most two sentences."""
    other_words = _in_other_words(finding.evidence, finding, subject) if finding.reasons else ""
    said = finding_words(finding, subject, level)
    if not other_words:
        return said.what, said.why
    told = sentence(other_words)
    return (told, said.why) if finding.topic in TOLD_WITH_WHY else (told,)


@singledispatch
def _in_other_words(evidence: object, finding: Finding, subject: Subject) -> str:
    """Where a finding's own sentence speaks of the inside of a model; empty where it does not."""
    return ""


@_in_other_words.register
def _(evidence: ConvergenceEvidence, finding: Finding, subject: Subject) -> str:
    if "gradient" in finding.reasons:
        return (
            "the fit stopped before it came to the figures that the data support best, so all of "
            "them may still move"
        )
    if math.isnan(evidence.remaining_step):
        return "the fit says that it did not finish; how far its figures would move is not known"
    return "the fit says that it did not finish, though its figures would hardly move any more"


@_in_other_words.register
def _(evidence: StandardErrorsEvidence, finding: Finding, subject: Subject) -> str:
    of = f" that have to do with {named(subject, finding.about)}" if finding.about else ""
    return f"some figures{of} are hardly known at all, and their intervals mean little"


@_in_other_words.register
def _(evidence: CollinearityEvidence, finding: Finding, subject: Subject) -> str:
    who = named(subject, finding.about)
    if "rank" in finding.reasons:
        told = f": it has to do with {who}" if who else ""
        return (
            "some of what the model uses follows exactly from the rest, so no data can tell them "
            f"apart{told}"
        )
    if len(finding.about) == 1:
        return (
            f"{who} hardly varies by itself in the data, so what goes with it can hardly be told "
            "from what goes with the others"
        )
    return (
        f"{who} move together closely, so what goes with one of them can hardly be told from what "
        "goes with another"
    )


@_in_other_words.register
def _(evidence: AmountEvidence, finding: Finding, subject: Subject) -> str:
    return (
        f"{cases(subject, evidence.events)} had the event and {amount(evidence.others)} did not, "
        "which is little for a model of this size: its figures are rough"
    )


@_in_other_words.register
def _(evidence: DependenceEvidence, finding: Finding, subject: Subject) -> str:
    return (
        f"rows that belong together by “{tidy(evidence.name)}” tell less than as many strangers, "
        "so the model's figures may be less sure than they look"
    )


@_in_other_words.register
def _(evidence: ShapeEvidence, finding: Finding, subject: Subject) -> str:
    name = predictor_name(subject.predictor(evidence.predictor))
    return (
        f"along {name}, the model's chances and what happened differ "
        f"{apart(evidence.largest_gap)}, more than chance would explain"
    )


@_in_other_words.register
def _(evidence: OverallEvidence, finding: Finding, subject: Subject) -> str:
    return "the model's chances bend in another way than what happened does, by enough to matter"


@_in_other_words.register
def _(evidence: SeparationEvidence, finding: Finding, subject: Subject) -> str:
    return told_without_exception(evidence, subject)


@_in_other_words.register
def _(evidence: InfluenceEvidence, finding: Finding, subject: Subject) -> str:
    # labels of rows may be people's: they are for the analyst
    told = moved_by_few(evidence, finding, subject)
    return f"much hangs on a few rows{f': {told}' if told else ''}"
