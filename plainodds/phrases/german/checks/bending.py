"""How far model and data are apart, and whether chances come true, in German."""

from __future__ import annotations

import math

from plainodds.answers.checks.calibration import CalibrationEvidence, Optimism
from plainodds.answers.checks.finding import Finding
from plainodds.answers.checks.shape import ShapeEvidence
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.finding_words import FindingWords
from plainodds.phrases.checks.parts import gap
from plainodds.phrases.choices.checks import verdict_of
from plainodds.phrases.german.checks.finding_words import NOTHING, evidence_words, made
from plainodds.phrases.german.checks.parts import because
from plainodds.phrases.labels import predictor_name
from plainodds.phrases.numbers import p_value, quantity, signed

__all__ = ["IN_SAMPLE", "apart"]

IN_SAMPLE = "Anteile sind hier die der Stichprobe, deren Zeilen nach dem Ergebnis ausgewählt wurden"


def apart(size: float) -> str:
    """Up to how far model and data are apart, to follow "unterscheiden sich"."""
    return f"um bis zu {gap(size)} in den mittleren {quantity(90, '%')} der Zeilen"


def _judged(size: float, p: float, finding: Finding, subject: Subject, bends: bool) -> str:
    """Whether a gap is more than chance explains; follows `apart`."""
    test = "" if math.isnan(p) else f" (p-Wert {p_value(p)})"
    return {
        "more than chance": f", mehr als der Zufall erklären würde{test}",
        "too little": f", zu wenig, um eine Erklärung zu ändern{test}",
        "maybe chance": f", was der Zufall allein erklären kann{test}",
        "not known": f"; ob das mehr als Zufall ist, ist nicht bekannt{because(finding.unknown)}",
        "nothing to test": "; das Modell lässt keine andere Form, gegen die zu prüfen wäre",
    }[verdict_of(size, p, finding, subject, bends)]


@evidence_words.register
def _(evidence: ShapeEvidence, finding: Finding, subject: Subject, level: float) -> FindingWords:
    name = predictor_name(subject.predictor(evidence.predictor))
    size, bends = evidence.largest_gap, bool(finding.reasons)
    what = (
        f"entlang {name} unterscheiden sich Modell und Daten {apart(size)}"
        f"{_judged(size, evidence.p_value, finding, subject, bends)}{_in_sample(finding)}"
    )
    step = NOTHING
    if bends:
        step = (
            f"{name} sich im Modell biegen lassen (mit einem Spline, einem Quadrat oder einem "
            "Logarithmus) und die beiden Bilder vergleichen"
        )
    elif finding.concern == "not known":
        step = (
            f"Das Bild ansehen, und ob sich die Daten entlang {name} biegen, wo das Modell es "
            "nicht tut"
        )
    return made(finding, subject, what, step)


def _in_sample(finding: Finding) -> str:
    return f"; {IN_SAMPLE}" if finding.unknown == "rows chosen by outcome" else ""


@evidence_words.register
def _(
    evidence: CalibrationEvidence, finding: Finding, subject: Subject, level: float
) -> FindingWords:
    size, bends = evidence.largest_gap, "curve" in finding.reasons
    verdict = _judged(size, math.nan, finding, subject, bends)
    kind = verdict_of(size, math.nan, finding, subject, bends)
    if kind == "nothing to test":
        verdict = ", was der Zufall allein erklären kann"
    what = (
        "an den eigenen Daten der Anpassung unterscheiden sich Wahrscheinlichkeiten und was "
        f"eintrat {apart(size)}{verdict}{_optimism(evidence.optimism)}{_in_sample(finding)}"
    )
    return made(finding, subject, what, _next(evidence, finding))


def _optimism(found: Optimism | None) -> str:
    if found is None:
        return ""
    if not found.repeats or math.isnan(found.slope):
        return "; wie viel davon die Anpassung sich selbst schönt, ließ sich nicht sagen"
    slope = signed(found.slope).removeprefix("+")
    told = "zu extrem" if found.slope < 1 else "ebenso gut"
    return (
        f"; bei anderen Fällen derselben Art wären die Wahrscheinlichkeiten {told} (Steigung "
        f"{slope}, richtig ist 1)"
    )


def _next(evidence: CalibrationEvidence, finding: Finding) -> str:
    if "curve" in finding.reasons:
        return (
            "Ansehen, entlang welcher Zahl sich das Modell falsch biegt, und das beheben, bevor "
            "Wahrscheinlichkeiten genannt werden"
        )
    if finding.unknown == "no likelihood":
        return "Das Bild ansehen und bei Wahrscheinlichkeiten bleiben, wo beide Linien nah sind"
    if "optimism" in finding.reasons and evidence.optimism and not evidence.optimism.repeats:
        return (
            "Mehr Daten sammeln: keine Wiederholung ließ sich anpassen, die Anpassung hängt also "
            "an wenigen Zeilen"
        )
    if "optimism" in finding.reasons:
        return (
            "Wahrscheinlichkeiten fern vom Mittel zu extrem nennen, oder ein kleineres oder ein "
            "geschrumpftes Modell anpassen"
        )
    if evidence.optimism is None:
        return (
            "Sind Wahrscheinlichkeiten für andere Fälle gemeint als diese, mit "
            "`optimism='bootstrap'` fragen, wie viel davon die Anpassung sich selbst schönt"
        )
    return NOTHING
