"""A finding in German: what was found, why it matters, and what to do about it."""

from __future__ import annotations

from functools import singledispatch

from plainodds.answers.checks.finding import Evidence, Finding, Topic, Unknown
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.finding_words import FindingWords
from plainodds.phrases.checks.headings import finding_heading
from plainodds.phrases.german.checks.parts import WHY_NOT_KNOWN
from plainodds.phrases.german.language import GERMAN
from plainodds.phrases.numbers import quantity
from plainodds.phrases.sentences import sentence

__all__ = ["NOTHING", "evidence_words", "finding_words", "made"]

NOTHING = "Hier ist nichts zu tun"
_WHY: dict[Topic, str] = {
    "convergence": "Jede Zahl einer Erklärung beruht darauf, dass die Koeffizienten die sind, die "
    "die Daten am besten stützen",
    "separation": "Wo Merkmale das Ergebnis ausnahmslos festlegen, liegt das beste Odds Ratio "
    "weiter weg als jede Zahl, und eine Zahl, die dennoch dasteht, ist die, bei der die Anpassung "
    "stehen blieb",
    "collinearity": "Was mit einem Merkmal einhergeht, lässt sich von dem, was mit einem anderen "
    "einhergeht, nur so weit trennen, wie sich die beiden in den Daten nicht gemeinsam bewegen",
    "standard errors": "Ein Intervall ist nicht besser als der Standardfehler, auf dem es beruht",
    "amount": "Mit wenigen Ereignissen je Koeffizient liegen Odds Ratios im Mittel zu weit von 1 "
    "entfernt, und ihre Intervalle sind zu kurz",
    "levels": "Ein Odds Ratio für eine Stufe mit wenigen Fällen eines der beiden Ergebnisse hängt "
    "an diesen wenigen",
    "missing": "Die Anpassung beschreibt die verwendeten Zeilen; ausgelassene können von anderer "
    "Art sein",
    "shape": "Biegen sich die Daten, wo das Modell es nicht tut, so liegen Wahrscheinlichkeiten "
    "und Odds Ratios entlang dieses Merkmals dort falsch, wo man zuerst hinsieht, an den Enden und "
    "in der Mitte",
    "influence": "Eine Erklärung, die an wenigen Zeilen hängt, erklärt diese Zeilen",
    "dependence": "Zeilen, die zusammengehören, sagen weniger als ebenso viele fremde; als fremde "
    "gezählt, machen sie Intervalle meist zu kurz",
    "discrimination": "Es sagt, wie weit die Wahrscheinlichkeiten des Modells Fälle mit dem "
    "Ereignis von Fällen ohne es trennen, und nichts darüber, ob die Wahrscheinlichkeiten "
    "zutreffen",
    "overall": "Nach diesen Zahlen wird oft gefragt; jede hat bekannte Grenzen, und keine ist ein "
    "Urteil",
}
_WAY_OUT: dict[Unknown, str] = {
    "no rows": "Neu anpassen und die Zeilen im Ergebnis behalten, oder die Tabelle mit `data=` "
    "übergeben",
    "no outcome": "Neu anpassen und die Daten im Ergebnis behalten",
    "no covariance": "So neu anpassen, dass es eine Kovarianzmatrix gibt, zum Beispiel ohne "
    "Bestrafung",
    "no likelihood": "Mit einer einfachen Maximum-Likelihood-Anpassung derselben Zeilen "
    "vergleichen und diese Prüfung dort ansehen",
    "no groups named": "Gehören Zeilen zu derselben Person, demselben Haushalt, Ort oder "
    "Zeitpunkt, die Spalte mit `groups=` nennen; gehören keine zusammen, ist nichts zu tun",
    "not said by the fit": "Das Protokoll der Anpassung ansehen, oder neu anpassen, aus einer "
    "Tabelle mit einer Formel",
    "rows chosen by outcome": "Mit Anteilen vergleichen, die anderswoher bekannt sind",
    "single rows": "Dort ansehen, wo die Daten sind",
    "too few rows": "Mehr Daten sammeln, oder nicht mehr als Anzahlen erklären",
}


def _why(topic: Topic) -> str:
    if topic == "calibration":
        return (
            f"Wer von einer Wahrscheinlichkeit von {quantity(20, '%')} hört, erwartet, dass sie "
            "bei 20 von 100 zutrifft"
        )
    return _WHY[topic]


@GERMAN.finding_words.register
def finding_words(finding: Finding, subject: Subject, level: float) -> FindingWords:
    """Say a finding in words."""
    if finding.evidence is not None:
        return evidence_words(finding.evidence, finding, subject, level)
    why = WHY_NOT_KNOWN.get(finding.unknown, WHY_NOT_KNOWN["not said by the fit"])
    way_out = _WAY_OUT.get(finding.unknown, _WAY_OUT["not said by the fit"])
    return made(finding, subject, f"das lässt sich hier nicht sagen: {why}", way_out)


@singledispatch
def evidence_words(
    evidence: Evidence, finding: Finding, subject: Subject, level: float
) -> FindingWords:
    """Say in words what this kind of evidence shows."""
    raise TypeError(f"There are no German words for {type(evidence).__name__}.")


def made(
    finding: Finding, subject: Subject, what: str, next_step: str, why: str = ""
) -> FindingWords:
    """Make whole sentences of a finding's parts, with the topic's own heading and why."""
    return FindingWords(
        finding_heading(finding, subject),
        sentence(what),
        sentence(why or _why(finding.topic)),
        sentence(next_step),
    )
