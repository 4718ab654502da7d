"""What the picture of a finding shows, in German, for those who cannot see it."""

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
from plainodds.phrases.checks.headings import concern_label
from plainodds.phrases.german.checks.finding_words import finding_words
from plainodds.phrases.german.checks.parts import coefficients, counted
from plainodds.phrases.german.parts import cases, event
from plainodds.phrases.labels import predictor_name
from plainodds.phrases.sentences import sentence

__all__ = ["picture_words"]


def picture_words(finding: Finding, subject: Subject, level: float) -> str:
    """Say what the picture of a finding shows, with what was found."""
    said = finding_words(finding, subject, level)
    drawn = _drawn(finding.evidence, subject)
    lead = f"{said.heading} ({concern_label(finding.concern)})"
    return f"{sentence(f'{lead}: {drawn}' if drawn else lead)} {said.what}"


@singledispatch
def _drawn(evidence: object, subject: Subject) -> str:
    """What is drawn of this kind of evidence; empty where its figures say it all."""
    return ""


def _groups(number: int) -> str:
    return counted(number, "Gruppe", "Gruppen")


@_drawn.register
def _(evidence: ShapeEvidence, subject: Subject) -> str:
    name = predictor_name(subject.predictor(evidence.predictor))
    return (
        f"der Anteil mit {event(subject.outcome)} in den Daten entlang {name}, geglättet mit einem "
        f"Band und in {_groups(len(evidence.bins))}, neben dem des Modells"
    )


@_drawn.register
def _(evidence: CalibrationEvidence, subject: Subject) -> str:
    return (
        f"der Anteil mit {event(subject.outcome)} in den Daten entlang der Wahrscheinlichkeit des "
        f"Modells, geglättet mit einem Band und in {_groups(len(evidence.bins))}, neben der Linie "
        "der Wahrscheinlichkeiten, die zutreffen"
    )


@_drawn.register
def _(evidence: DiscriminationEvidence, subject: Subject) -> str:
    return (
        f"wie viele {cases(subject.outcome)} mit dem Ereignis und ohne es welche "
        "Wahrscheinlichkeit nach dem Modell haben"
    )


@_drawn.register
def _(evidence: InfluenceEvidence, subject: Subject) -> str:
    shown = counted(len(evidence.probability), "Art von Zeilen", "verschiedene Zeilen")
    return (
        f"{shown} nach ihrer Wahrscheinlichkeit und danach, wie schlecht jede angepasst ist und "
        "wie weit jede die Anpassung bewegt"
    )


@_drawn.register
def _(evidence: DependenceEvidence, subject: Subject) -> str:
    if not evidence.standard_errors:
        return ""
    shown = coefficients(len(evidence.standard_errors))
    return f"Standardfehler von {shown}, Zeilen als fremde und Gruppen zusammen gezählt"


@_drawn.register
def _(evidence: CollinearityEvidence, subject: Subject) -> str:
    shown = counted(len(evidence.inflation), "Merkmal", "Merkmalen")
    return f"das Wievielfache die Standardfehler von {shown} durch die anderen betragen"


@_drawn.register
def _(evidence: LevelsEvidence, subject: Subject) -> str:
    if not evidence.counts:
        return ""
    levels = counted(len(evidence.counts), "Stufe", "Stufen")
    return f"Fälle mit dem Ereignis und ohne es in {levels}"


@_drawn.register
def _(evidence: MissingEvidence, subject: Subject) -> str:
    if evidence.difference is None:
        return ""
    return (
        f"der Anteil mit {event(subject.outcome)} in den ausgelassenen und in den verwendeten "
        "Zeilen"
    )
