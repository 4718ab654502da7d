"""What checks and their weights are called in German."""

from __future__ import annotations

from plainodds.answers.checks.finding import Concern, Finding, Topic
from plainodds.model.predictors import Subject
from plainodds.phrases.labels import predictor_name

__all__ = ["concern_label", "finding_heading"]

_TOPICS: dict[Topic, str] = {
    "convergence": "Wie die Anpassung endete",
    "separation": "Ergebnisse, die ausnahmslos feststehen",
    "collinearity": "Merkmale, die auseinander folgen",
    "standard errors": "Standardfehler",
    "amount": "Wie viele Daten es gibt",
    "levels": "Stufen mit wenigen Fällen",
    "missing": "Ausgelassene Zeilen",
    "shape": "Form",
    "calibration": "Wahrscheinlichkeiten und was eintrat",
    "influence": "Zeilen, die das Ergebnis tragen",
    "dependence": "Zeilen, die zusammengehören",
    "discrimination": "Wie gut Ereignisse unterschieden werden",
    "overall": "Gesamttests und Gesamtmaße",
}
_CONCERNS: dict[Concern, str] = {
    "nothing found": "nichts gefunden",
    "not known": "nicht bekannt",
    "keep in mind": "zu bedenken",
    "don't explain yet": "noch nicht erklären",
}


def concern_label(concern: Concern) -> str:
    """What a finding's weight is called."""
    return _CONCERNS[concern]


def finding_heading(finding: Finding, subject: Subject) -> str:
    """A finding's short heading: its topic, and the number whose shape it speaks of."""
    label = _TOPICS[finding.topic]
    if finding.topic == "shape" and finding.about:
        return f"{label} entlang {predictor_name(subject.predictor(finding.about[0]))}"
    return label
