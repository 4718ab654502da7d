"""A finding for those who do not analyse: without coefficients, tests and columns."""

from __future__ import annotations

import math

from plainodds.answers.checks.collinearity import CollinearityEvidence
from plainodds.answers.checks.convergence import ConvergenceEvidence
from plainodds.answers.checks.finding import Finding
from plainodds.answers.checks.overall import OverallEvidence
from plainodds.answers.checks.standard_errors import StandardErrorsEvidence
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.finding_words import finding_words
from plainodds.phrases.checks.parts import named
from plainodds.phrases.parts import sentence

__all__ = ["plain_sentences"]


def plain_sentences(finding: Finding, subject: Subject, level: float) -> tuple[str, ...]:
    """What a finding of some weight means for whoever hears the explanation."""
    other_words = _in_other_words(finding, subject)
    if other_words:
        return (sentence(other_words),)
    said = finding_words(finding, subject, level)
    return said.what, said.why


def _in_other_words(finding: Finding, subject: Subject) -> str:
    """Where a finding's own sentence speaks of the inside of a model; empty where it does not."""
    evidence, who = finding.evidence, named(subject, finding.about)
    if isinstance(evidence, ConvergenceEvidence):
        return _convergence(evidence, finding)
    if isinstance(evidence, StandardErrorsEvidence):
        of = f" that have to do with {who}" if who else ""
        return f"some figures{of} are hardly known at all, and their intervals mean little"
    if isinstance(evidence, CollinearityEvidence) and "rank" in finding.reasons:
        told = f": it has to do with {who}" if who else ""
        return (
            "some of what the model uses follows exactly from the rest, so no data can tell them "
            f"apart{told}"
        )
    if isinstance(evidence, OverallEvidence):
        return (
            "the model's chances bend in another way than what happened does, by enough to matter"
        )
    return ""


def _convergence(evidence: ConvergenceEvidence, finding: Finding) -> str:
    if "gradient" in finding.reasons:
        return (
            "the fit stopped before it came to the figures that the data support best, so all of "
            "them may still move"
        )
    if math.isnan(evidence.remaining_step):
        return "the fit says that it did not finish; how far its figures would move is not known"
    return "the fit says that it did not finish, though its figures would hardly move any more"
