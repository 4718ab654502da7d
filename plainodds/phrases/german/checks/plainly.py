"""A finding in German for those who do not analyse: without coefficients, tests and columns."""

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
from plainodds.phrases.checks.parts import amount
from plainodds.phrases.choices.checks import TOLD_WITH_WHY
from plainodds.phrases.german.checks.bending import apart
from plainodds.phrases.german.checks.carrying import moved_by_few
from plainodds.phrases.german.checks.finding_words import finding_words
from plainodds.phrases.german.checks.fit import told_without_exception
from plainodds.phrases.german.checks.parts import cases, named
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
            "die Anpassung hörte auf, bevor sie zu den Zahlen kam, die die Daten am besten "
            "stützen, sodass sich alle noch bewegen können"
        )
    if math.isnan(evidence.remaining_step):
        return (
            "die Anpassung sagt, dass sie nicht fertig wurde; wie weit sich ihre Zahlen noch "
            "bewegen würden, ist nicht bekannt"
        )
    return (
        "die Anpassung sagt, dass sie nicht fertig wurde, doch ihre Zahlen würden sich kaum noch "
        "bewegen"
    )


@_in_other_words.register
def _(evidence: StandardErrorsEvidence, finding: Finding, subject: Subject) -> str:
    of = f", die mit {named(subject, finding.about)} zu tun haben," if finding.about else ""
    return f"manche Zahlen{of} sind kaum bekannt, und ihre Intervalle sagen wenig"


@_in_other_words.register
def _(evidence: CollinearityEvidence, finding: Finding, subject: Subject) -> str:
    who = named(subject, finding.about)
    if "rank" in finding.reasons:
        told = f": es hat mit {who} zu tun" if who else ""
        return (
            "manches von dem, was das Modell verwendet, folgt genau aus dem Rest, sodass keine "
            f"Daten es trennen können{told}"
        )
    if len(finding.about) == 1:
        return (
            f"{who} ändert sich in den Daten kaum für sich, sodass sich kaum sagen lässt, was "
            "damit einhergeht und was mit den anderen"
        )
    return (
        f"{who} bewegen sich eng gemeinsam, sodass sich kaum sagen lässt, was mit dem einen "
        "einhergeht und was mit dem anderen"
    )


@_in_other_words.register
def _(evidence: AmountEvidence, finding: Finding, subject: Subject) -> str:
    return (
        f"{cases(subject, evidence.events)} mit dem Ereignis und {amount(evidence.others)} ohne "
        "es sind wenig für ein Modell dieser Größe: seine Zahlen sind ungefähr"
    )


@_in_other_words.register
def _(evidence: DependenceEvidence, finding: Finding, subject: Subject) -> str:
    return (
        f"Zeilen, die nach „{tidy(evidence.name)}“ zusammengehören, sagen weniger als ebenso viele "
        "fremde, sodass die Zahlen des Modells weniger sicher sein können, als sie aussehen"
    )


@_in_other_words.register
def _(evidence: ShapeEvidence, finding: Finding, subject: Subject) -> str:
    name = predictor_name(subject.predictor(evidence.predictor))
    return (
        f"entlang {name} unterscheiden sich die Wahrscheinlichkeiten des Modells und was eintrat "
        f"{apart(evidence.largest_gap)}, mehr als der Zufall erklären würde"
    )


@_in_other_words.register
def _(evidence: OverallEvidence, finding: Finding, subject: Subject) -> str:
    return (
        "die Wahrscheinlichkeiten des Modells biegen sich anders als das, was eintrat, und zwar "
        "genug, um zu zählen"
    )


@_in_other_words.register
def _(evidence: SeparationEvidence, finding: Finding, subject: Subject) -> str:
    return told_without_exception(evidence, subject)


@_in_other_words.register
def _(evidence: InfluenceEvidence, finding: Finding, subject: Subject) -> str:
    # labels of rows may be people's: they are for the analyst
    told = moved_by_few(evidence, finding, subject)
    return f"vieles hängt an wenigen Zeilen{f': {told}' if told else ''}"
