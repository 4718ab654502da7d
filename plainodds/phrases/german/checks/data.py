"""How much data there is and what was left out, in German."""

from __future__ import annotations

import math

from plainodds.answers.checks.amount import (
    AmountEvidence,
    LevelCount,
    LevelsEvidence,
    MissingEvidence,
)
from plainodds.answers.checks.finding import Finding
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.finding_words import FindingWords
from plainodds.phrases.checks.parts import amount
from plainodds.phrases.choices.checks import fewest_of_one
from plainodds.phrases.german.checks.finding_words import NOTHING, evidence_words, made
from plainodds.phrases.german.checks.parts import because, cases, coefficients, counted, short_list
from plainodds.phrases.german.parts import cases as many
from plainodds.phrases.labels import named_value, predictor_name
from plainodds.phrases.numbers import chance, count, guarded_count, ratio
from plainodds.phrases.parts import difference_with_interval
from plainodds.phrases.units import tidy

__all__: list[str] = []

_LISTED_AT_MOST = 3


@evidence_words.register
def _(evidence: AmountEvidence, finding: Finding, subject: Subject, level: float) -> FindingWords:
    rarer = "mit dem Ereignis" if evidence.events <= evidence.others else "ohne es"
    number = evidence.events_per_parameter
    each = amount(number) if number.is_integer() else ratio(number)
    whose = f"jeden von {coefficients(evidence.parameters)}"
    if evidence.parameters == 1:
        whose = "den einzigen Koeffizienten"
    what = (
        f"{cases(subject, evidence.events)} mit dem Ereignis und {amount(evidence.others)} ohne "
        f"es, das heißt {each} {rarer} auf {whose} neben der Konstante"
    )
    if finding.concern == "nothing found":
        return made(finding, subject, what, NOTHING)
    step = (
        "Ein kleineres, vorher gewähltes Modell nehmen, mehr Daten sammeln oder mit einer "
        "Bestrafung anpassen"
    )
    if finding.concern == "keep in mind":
        step = "Odds Ratios ungefähr nennen und diesem Modell keine Merkmale hinzufügen"
    return made(finding, subject, what, step)


@evidence_words.register
def _(evidence: LevelsEvidence, finding: Finding, subject: Subject, level: float) -> FindingWords:
    counts = evidence.counts
    if not counts:
        what = "das Modell hat weder Kategorien noch Ja-Nein-Merkmale, also gibt es keine Stufen"
        return made(finding, subject, what, NOTHING)
    if finding.unknown:
        fewest = min(counts, key=lambda each: each.cases)
        what = (
            "wie viele Fälle jeder Stufe das Ereignis hatten, ist nicht bekannt"
            f"{because(finding.unknown)}; die wenigsten Fälle hat {_name(subject, fewest)}: "
            f"{amount(fewest.cases)}"
        )
        return made(finding, subject, what, "Ereignisse je Stufe in den Daten selbst zählen")
    if not evidence.sparse:
        known = fewest_of_one(evidence)
        what = (
            f"jede Stufe hat mindestens {amount(known)} Fälle mit dem Ereignis und ebenso viele "
            "ohne es"
        )
        if math.isnan(known):
            what = "jede Stufe hat genug Fälle mit dem Ereignis und ohne es"
        return made(finding, subject, what, NOTHING)
    sparse = counts[: evidence.sparse]
    told = [f"{_name(subject, each)} ({_events(subject, each)})" for each in sparse]
    few = "wenige Fälle eines der beiden Ergebnisse"
    if finding.reasons == ("one outcome only",):
        few = "nur eines der beiden Ergebnisse"
    if len(finding.reasons) > 1:
        few += " oder keinen"
    have = "hat" if len(sparse) == 1 else "haben"
    what = (
        f"von {counted(len(counts), 'Stufe', 'Stufen')} {have} {amount(len(sparse))} {few}: "
        f"{short_list(told, _LISTED_AT_MOST)}"
    )
    step = (
        "Eine solche Stufe mit einer ähnlichen zusammenlegen, oder ihr Odds Ratio als ungefähr "
        "nennen"
    )
    if finding.concern == "don't explain yet":
        step = (
            "Eine Stufe mit nur einem der beiden Ergebnisse mit einer ähnlichen zusammenlegen, "
            "oder ihre Fälle weglassen"
        )
    return made(finding, subject, what, step)


def _events(subject: Subject, each: LevelCount) -> str:
    if math.isnan(each.events):
        # withheld before the answer leaves
        most = guarded_count(round(each.cases), subject.smallest_cell)
        return f"{most} {many(subject.outcome, 'Fälle')}, Ereignisse nicht genannt"
    whole = cases(subject, each.cases, "Fällen")
    return f"{counted(each.events, 'Ereignis', 'Ereignisse')} bei {whole}"


def _name(subject: Subject, each: LevelCount) -> str:
    return named_value(subject.predictor(each.predictor), each.level)


@evidence_words.register
def _(evidence: MissingEvidence, finding: Finding, subject: Subject, level: float) -> FindingWords:
    if not evidence.dropped:
        what = (
            "die Anpassung hat keine Zeile ausgelassen, in der ein Wert fehlt; Zeilen, die vorher "
            "entfernt wurden, lassen sich hier nicht zählen"
        )
        step = "Sagen, falls vor der Anpassung Zeilen entfernt wurden"
        return made(finding, subject, what, step)
    what = _left_out(evidence, subject) + _outcome(evidence, finding, level)
    step = "Sagen, wie viele Zeilen ausgelassen wurden und dass die Zahlen für die anderen gelten"
    if finding.reasons:
        step = (
            "Herausfinden, warum Werte fehlen, mit einer Anpassung nach multipler Imputation "
            "vergleichen und sagen, für wen die Zahlen gelten"
        )
    return made(finding, subject, what, step)


def _left_out(evidence: MissingEvidence, subject: Subject) -> str:
    every = evidence.used + evidence.dropped
    often = ""
    if evidence.columns:
        name, number = evidence.columns[0]
        most = "am häufigsten bei" if len(evidence.columns) > 1 else "bei"
        often = f", {most} {_column(name, subject)}"
        told = guarded_count(int(number), subject.smallest_cell)
        often += f" ({told})" if number < evidence.dropped else ""
    if evidence.dropped <= subject.smallest_cell:
        few = guarded_count(evidence.dropped, subject.smallest_cell)
        return f"in {few} Zeilen fehlte etwas{often}, und sie wurden ausgelassen"
    return (
        f"in {chance(evidence.dropped / every)} der Zeilen ({count(evidence.dropped)} von "
        f"{count(every)}) fehlte etwas{often}, und sie wurden ausgelassen"
    )


def _outcome(evidence: MissingEvidence, finding: Finding, level: float) -> str:
    if evidence.difference is None:
        why = because(finding.unknown) if evidence.known else ""
        return f"; ob das Ereignis unter ihnen ebenso häufig war, ist nicht bekannt{why}"
    among = "ihnen"
    if evidence.known == 1 < evidence.dropped:
        among = "der einzigen, deren Ergebnis bekannt ist,"
    elif evidence.known < evidence.dropped:
        among = f"den {count(evidence.known)}, deren Ergebnis bekannt ist,"
    if not evidence.difference.estimate:
        return f"; unter {among} war der Anteil der Ereignisse derselbe wie unter den verwendeten"
    points = difference_with_interval(evidence.difference, level)
    return f"; unter {among} lag der Anteil der Ereignisse {points} als unter den verwendeten"


def _column(name: str, subject: Subject) -> str:
    if name == subject.outcome.name:
        return "der Zielgröße"
    for facts in subject.predictors:
        if facts.name == name:
            return predictor_name(facts)
    return f"„{tidy(name)}“"
