"""How the fit ended, and what it cannot tell apart, in German."""

from __future__ import annotations

import math

from plainodds.answers.checks.collinearity import CollinearityEvidence
from plainodds.answers.checks.convergence import ConvergenceEvidence
from plainodds.answers.checks.finding import Finding
from plainodds.answers.checks.separation import SeparationEvidence
from plainodds.answers.checks.standard_errors import StandardErrorsEvidence
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.finding_words import FindingWords
from plainodds.phrases.checks.parts import amount, told_count
from plainodds.phrases.german.checks.finding_words import NOTHING, evidence_words, made
from plainodds.phrases.german.checks.parts import (
    because,
    coefficients,
    columns_named,
    counted,
    named,
    rows,
    short_list,
)
from plainodds.phrases.german.parts import cases
from plainodds.phrases.labels import named_value, predictor_name
from plainodds.phrases.numbers import quantity, ratio

__all__ = ["told_without_exception"]

_VISIBLE = 0.001
_UNIT = "Log-Odds je Standardabweichung der Spalte"


@evidence_words.register
def _(
    evidence: ConvergenceEvidence, finding: Finding, subject: Subject, level: float
) -> FindingWords:
    return made(finding, subject, _ended(evidence, finding), _after_ending(evidence, finding))


def _ended(evidence: ConvergenceEvidence, finding: Finding) -> str:
    after = ""
    if evidence.iterations is not None:
        after = f" nach {counted(evidence.iterations, 'Schritt', 'Schritten')}"
    said = {
        True: f"die Anpassung sagt, dass sie{after} konvergiert ist",
        False: f"die Anpassung sagt, dass sie{after} nicht konvergiert ist",
        None: "das Ergebnis sagt nicht, ob die Anpassung konvergiert ist",
    }[evidence.converged]
    step = evidence.remaining_step
    if math.isnan(step):
        why = because(finding.unknown)
        return (
            f"{said}; ob sie dort steht, wo die Likelihood am höchsten ist, ist nicht bekannt{why}"
        )
    joined = "aber" if bool(evidence.converged) == ("gradient" in finding.reasons) else "und"
    if evidence.converged is None:
        joined = "und"
    if "gradient" in finding.reasons:
        far = "ohne Ende" if math.isinf(step) else f"um {ratio(step)} seines Standardfehlers"
        whose = columns_named((evidence.coefficient,))
        return (
            f"{said}, {joined} ein weiterer Schritt würde den Koeffizienten {whose} {far} bewegen"
        )
    far = f"mehr als {ratio(step)}" if step >= _VISIBLE else f"auch nur {quantity(_VISIBLE)}"
    return (
        f"{said}, {joined} ein weiterer Schritt würde keinen Koeffizienten um {far} seines "
        "Standardfehlers bewegen"
    )


def _after_ending(evidence: ConvergenceEvidence, finding: Finding) -> str:
    if finding.concern == "nothing found":
        return NOTHING
    if finding.concern == "don't explain yet":
        return (
            "Zuerst ansehen, ob Ergebnisse ausnahmslos feststehen; sonst neu anpassen, mit mehr "
            "Schritten, einem anderen Verfahren oder anderen Startwerten, und jene Anpassung "
            "erklären"
        )
    if "gradient" in finding.reasons:
        return (
            "Neu anpassen, mit mehr Schritten oder engerer Toleranz; die Zahlen werden sich ein "
            "wenig bewegen"
        )
    if math.isnan(evidence.remaining_step):
        return "Das Protokoll der Anpassung ansehen"
    return (
        "Neu anpassen, mit mehr Schritten, um den Zweifel loszuwerden; die Zahlen werden sich kaum "
        "bewegen"
    )


@evidence_words.register
def _(
    evidence: SeparationEvidence, finding: Finding, subject: Subject, level: float
) -> FindingWords:
    if evidence.kind == "none":
        what = (
            f"unter {rows(evidence.all_rows)} trennt keine Verbindung von Merkmalen Ereignisse "
            "ausnahmslos von ihrem Ausbleiben"
        )
        return made(finding, subject, what, NOTHING)
    restrained = finding.concern == "keep in mind"
    one = len(evidence.unbounded) == 1
    have = ("hat" if one else "haben") if not restrained else ("hätte" if one else "hätten")
    otherwise = " ohne die Bestrafung oder die Nebenbedingungen" if restrained else ""
    what = (
        f"{told_without_exception(evidence, subject)}; {coefficients(len(evidence.unbounded))} "
        f"{have}{otherwise} keinen endlichen Schätzwert"
    )
    if restrained:
        return made(
            finding,
            subject,
            what,
            "Sagen, dass diese Zahlen ebenso auf der Bestrafung oder den Nebenbedingungen beruhen "
            "wie auf den Daten",
            "Dass es hier endliche Odds Ratios gibt, liegt allein an der Bestrafung oder den "
            "Nebenbedingungen",
        )
    step = (
        "Ansehen, ob ein Merkmal das Ergebnis mit anderen Worten wiederholt, und es weglassen; "
        "sonst Stufen zusammenlegen, mehr Daten sammeln oder mit einer Bestrafung anpassen"
    )
    return made(finding, subject, what, step)


def told_without_exception(evidence: SeparationEvidence, subject: Subject) -> str:
    """Who tells the outcome of how many rows, and which levels have one outcome only."""
    return (
        f"{_who(evidence, subject)} das Ergebnis {_whose(evidence, subject)} ausnahmslos fest"
        f"{_levels(evidence, subject)}"
    )


def _who(evidence: SeparationEvidence, subject: Subject) -> str:
    if not evidence.predictors:
        return "das Modell legt"
    who = named(subject, evidence.predictors)
    return f"{who} {'legen zusammen' if len(evidence.predictors) > 1 else 'legt'}"


def _whose(evidence: SeparationEvidence, subject: Subject) -> str:
    if evidence.rows == evidence.all_rows:
        return "der einzigen Zeile" if evidence.rows == 1 else f"aller {rows(evidence.rows)}"
    return f"von {told_count(subject, evidence.rows)} der {rows(evidence.all_rows)}"


def _levels(evidence: SeparationEvidence, subject: Subject) -> str:
    if not evidence.levels:
        return ""
    told = [named_value(subject.predictor(name), held) for name, held in evidence.levels]
    many = cases(subject.outcome)
    if len(told) == 1:
        return f": alle {many} mit {told[0]} hatten dasselbe Ergebnis"
    return f": innerhalb von {short_list(told)} hatten alle {many} jeweils dasselbe Ergebnis"


@evidence_words.register
def _(
    evidence: CollinearityEvidence, finding: Finding, subject: Subject, level: float
) -> FindingWords:
    if "rank" in finding.reasons:
        step = (
            "Eines von dem weglassen, was aus dem anderen folgt, und neu anpassen: bis dahin "
            "können die Daten diese Koeffizienten nicht trennen"
        )
        return made(finding, subject, _exact(evidence), step)
    finite = [each for each in evidence.inflation if math.isfinite(each[1])]
    worst = max(finite, key=lambda each: each[1], default=None)
    stretched = ""
    if worst is not None:
        name = predictor_name(subject.predictor(worst[0]))
        stretched = (
            f"Standardfehler von {name} betragen das {ratio(worst[1])}-Fache dessen, was sie "
            "wären, wenn die anderen Merkmale nichts darüber sagten"
        )
    if "tied" in finding.reasons:
        who = named(subject, finding.about)
        tie = "bewegen sich eng gemeinsam"
        if len(finding.about) == 1:
            tie = "folgt beinahe aus den anderen"
        what = f"{who} {tie}; {stretched}" if stretched else f"{who} {tie}"
        step = (
            "Von diesen Merkmalen gemeinsam sprechen statt von jedem allein, oder eines weglassen, "
            "wenn es dasselbe bedeutet"
        )
        return made(finding, subject, what, step)
    what = "kein Merkmal folgt beinahe aus den anderen"
    return made(finding, subject, f"{what}: {stretched}" if stretched else what, NOTHING)


def _exact(evidence: CollinearityEvidence) -> str:
    what = f"von {amount(evidence.columns)} Spalten sagen nur {amount(evidence.rank)} etwas Eigenes"
    exact = [tie.columns for tie in evidence.tied if math.isinf(tie.condition_index)]
    told = [f"{columns_named(tie)} folgen genau auseinander" for tie in exact if len(tie) > 1][:2]
    told += [f"{columns_named(tie)} sagt gar nichts" for tie in exact if len(tie) == 1][:2]
    return f"{what}: {'; '.join(told)}" if told else what


@evidence_words.register
def _(
    evidence: StandardErrorsEvidence, finding: Finding, subject: Subject, level: float
) -> FindingWords:
    wide = evidence.wide
    columns = tuple(each.column for each in wide)
    if "missing" in finding.reasons:
        have = "hat" if len(wide) == 1 else "haben"
        what = f"{coefficients(len(wide))} {have} keinen Standardfehler: {columns_named(columns)}"
        step = (
            "Ansehen, ob Merkmale auseinander folgen oder die Anpassung nicht konvergiert ist, das "
            "beheben und neu anpassen"
        )
        why = "Ohne Standardfehler kann niemand sagen, wie sicher ein Odds Ratio ist"
        return made(finding, subject, what, step, why)
    if "absurd" in finding.reasons:
        left = len(wide) - 1
        more = f"; {amount(left)} weitere {'ist' if left == 1 else 'sind'} es ebenso wenig"
        what = (
            f"der Koeffizient {columns_named(columns[:1])} ist kaum bekannt, sein Standardfehler "
            f"beträgt {ratio(wide[0].se_per_spread)} ({_UNIT}){more if left else ''}"
        )
        step = (
            "Ansehen, ob Ergebnisse ausnahmslos feststehen, Merkmale auseinander folgen oder eine "
            "Stufe wenige Fälle hat; bis dahin nichts über seine Größe sagen"
        )
        return made(finding, subject, what, step)
    largest = ratio(evidence.largest_per_spread)
    what = f"jeder Koeffizient hat einen Standardfehler; der größte beträgt {largest} ({_UNIT})"
    return made(finding, subject, what, NOTHING)
