"""Rows that carry the result, rows that belong together, and overall measures, in German."""

from __future__ import annotations

import math

from plainodds.answers.checks.dependence import DependenceEvidence, StandardErrorPair
from plainodds.answers.checks.discrimination import DiscriminationEvidence
from plainodds.answers.checks.finding import Finding
from plainodds.answers.checks.influence import InfluenceEvidence, InfluentialPattern, Moved
from plainodds.answers.checks.overall import OverallEvidence
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.finding_words import FindingWords
from plainodds.phrases.checks.parts import amount
from plainodds.phrases.choices.checks import example_of, farthest_pair, ratio_without
from plainodds.phrases.german.checks.bending import IN_SAMPLE
from plainodds.phrases.german.checks.finding_words import NOTHING, evidence_words, made
from plainodds.phrases.german.checks.parts import because, cases, counted, rows, short_list
from plainodds.phrases.german.parts import case
from plainodds.phrases.labels import from_to, given_clause, predictor_name, value_label
from plainodds.phrases.lexicon import lexicon
from plainodds.phrases.numbers import chance, p_value, ratio, signed, span, wording
from plainodds.phrases.parts import interval
from plainodds.phrases.units import tidy

__all__ = ["moved_by_few"]

_LABELS_AT_MOST = 3
_ALREADY = (
    "die Standardfehler der Anpassung zählen die Zeilen einer Gruppe bereits als zusammengehörig"
)


@evidence_words.register
def _(
    evidence: InfluenceEvidence, finding: Finding, subject: Subject, level: float
) -> FindingWords:
    example = example_of(evidence, finding, subject)
    told = "" if example is None else _without(*example, subject)
    patterns = counted(evidence.patterns, "Art von Zeilen", "verschiedenen Zeilen")
    if finding.concern == "nothing found":
        what = (
            f"von {patterns} bewegt keine einzelne mit wenigen Fällen ein Odds Ratio um mehr als "
            "seinen Standardfehler"
        )
        return made(finding, subject, f"{what}; zum Beispiel {told}" if told else what, NOTHING)
    turns = "turns an odds ratio" in finding.reasons
    moves = "wendet eine einzelne ein Odds Ratio auf die andere Seite von 1"
    what = f"unter {patterns} {moves if turns else 'bewegt eine einzelne ein Odds Ratio weit'}"
    step = "Ansehen, ob diese Zeilen stimmen; wenn ja, sie behalten und beide Zahlen nennen"
    if turns:
        step = (
            "Ansehen, ob diese Zeilen stimmen und zu denen gehören, für die das Modell gemeint "
            "ist; bis dahin nicht sagen, in welche Richtung jenes Odds Ratio weist"
        )
    return made(finding, subject, f"{what}: {told}" if told else what, step)


def moved_by_few(evidence: InfluenceEvidence, finding: Finding, subject: Subject) -> str:
    """What an odds ratio is without some rows, whose labels are not told; empty where unknown."""
    example = example_of(evidence, finding, subject)
    if example is None:
        return ""
    pattern, moved = example
    return f"ohne {cases(subject, pattern.cases)} {_moved(moved, subject)}"


def _without(pattern: InfluentialPattern, moved: Moved, subject: Subject) -> str:
    return f"ohne {_pattern(pattern, subject)} {_moved(moved, subject)}"


def _moved(moved: Moved, subject: Subject) -> str:
    facts = subject.predictor(moved.predictor)
    if facts.is_number:
        change = f"{predictor_name(facts)} {from_to(facts, moved.start, moved.end)}"
    else:
        ends = value_label(facts, moved.end), value_label(facts, moved.start)
        change = f"{predictor_name(facts)} {lexicon().against.format(*ends)}"
    given = f", {given_clause(subject, moved.given)}," if moved.given else ""
    before, after = ratio(moved.odds_ratio), ratio(ratio_without(moved))
    how = "etwa " if math.isnan(moved.refitted) else ""
    sizes = f"{after} so oder so" if before == after else f"{after} statt {before}"
    return f"beträgt das Odds Ratio zu {change}{given} {how}{sizes}"


def _pattern(pattern: InfluentialPattern, subject: Subject) -> str:
    who = cases(subject, pattern.cases)
    share = pattern.events / pattern.cases if pattern.cases else math.nan
    told = f"{who}, davon {amount(pattern.events)} mit dem Ereignis"
    if share >= 1 - 1e-9:
        told = f"{who}, mit dem Ereignis"
    elif share <= 1e-9:
        told = f"{who}, ohne das Ereignis"
    labels = [f"„{tidy(label)}“" for label in pattern.labels]
    if not labels:
        return f"eine bestimmte Art von Zeilen ({told})"
    many = "Zeile" if len(labels) == 1 else "die Zeilen"
    return f"{many} {short_list(labels, _LABELS_AT_MOST)} ({told})"


@evidence_words.register
def _(
    evidence: DependenceEvidence, finding: Finding, subject: Subject, level: float
) -> FindingWords:
    return made(finding, subject, _together(evidence, finding), _next(evidence, finding))


def _together(evidence: DependenceEvidence, finding: Finding) -> str:
    if not evidence.name:
        return _ALREADY
    by = f"„{tidy(evidence.name)}“"
    if evidence.largest <= 1:
        return f"nach {by} steht jede Zeile für sich, also gehören keine Zeilen zusammen"
    what = (
        f"nach {by} gehören {rows(evidence.rows)} zu "
        f"{counted(evidence.groups, 'Gruppe', 'Gruppen')}, die größte mit {rows(evidence.largest)}"
    )
    worst = farthest_pair(evidence)
    if evidence.already:
        what += f"; {_ALREADY}"
    elif worst is None:
        why = because(finding.unknown)
        what += f"; was das mit den Standardfehlern macht, ist nicht bekannt{why}"
    elif "standard errors differ" in finding.reasons:
        what += (
            "; zusammen gezählt beträgt der Standardfehler von "
            f"„{tidy(worst.column)}“ {_sizes(worst)}"
        )
    else:
        what += (
            "; zusammen gezählt ändern sich Standardfehler nicht um mehr, als zählt oder der "
            f"Zufall erklärt: am meisten der von „{tidy(worst.column)}“, {_sizes(worst)}"
        )
    if "few groups" in finding.reasons:
        what += "; so wenige Gruppen sind zu wenige, um es gut zu sagen"
    return what


def _sizes(pair: StandardErrorPair) -> str:
    return f"{ratio(pair.by_groups)} statt {ratio(pair.model_based)}"


def _next(evidence: DependenceEvidence, finding: Finding) -> str:
    if finding.concern == "nothing found":
        return NOTHING
    if evidence.already:
        return "Mehr Gruppen sammeln, oder diese Intervalle eher zu kurz nennen als zu lang"
    if finding.reasons == ("few groups",):
        return (
            "Intervalle ungefähr nennen, und ein Verfahren für wenige Gruppen nehmen, wenn viel "
            "davon abhängt"
        )
    return (
        "Neu anpassen, mit Standardfehlern nach Gruppen (`cov_type='cluster'`) oder mit einem "
        "Modell der Gruppen, und jene Anpassung erklären"
    )


@evidence_words.register
def _(
    evidence: DiscriminationEvidence, finding: Finding, subject: Subject, level: float
) -> FindingWords:
    c, whose = evidence.c, case(subject.outcome)
    pair = f"einem {whose} mit dem Ereignis und einem ohne es"
    if math.isnan(c.estimate):
        what = f"wie oft das Modell von {pair} den richtigen vorzieht, ist nicht bekannt"
    elif c.estimate >= 1:
        what = (
            f"von {pair} gibt das Modell dem ersten ausnahmslos die höhere Wahrscheinlichkeit, und "
            "dafür lässt sich kein Intervall angeben"
        )
    else:
        what = (
            f"von {pair} gibt das Modell dem ersten die höhere Wahrscheinlichkeit in "
            f"{chance(c.estimate)} der Paare{interval(c, span, level)}, wobei Gleichstand halb "
            "zählt"
        )
        if finding.unknown:
            what += f"; ein Intervall ist nicht bekannt{because(finding.unknown)}"
    step = "Neben dem Bild nennen, und nicht als Note für das Modell"
    if finding.reasons:
        what += "; das ist vielleicht nicht besser als ein Münzwurf"
        step = "Dieses Modell nicht verwenden, um Fälle zu unterscheiden"
    return made(finding, subject, what, step)


@evidence_words.register
def _(evidence: OverallEvidence, finding: Finding, subject: Subject, level: float) -> FindingWords:
    if finding.reasons:
        what = (
            "das Quadrat des linearen Prädiktors trägt zum Modell bei (Link-Test, p-Wert "
            f"{p_value(evidence.link_p_value)}), und Wahrscheinlichkeiten liegen weit genug "
            "daneben, um zu zählen"
        )
        step = (
            "Ansehen, entlang welcher Zahl sich das Modell falsch biegt oder welches Produkt "
            "zweier Merkmale ihm fehlt"
        )
        return made(finding, subject, what, step)
    test = "" if math.isnan(evidence.p_value) else f" (p-Wert {p_value(evidence.p_value)})"
    why = because(finding.unknown) if finding.unknown == "no likelihood" else ""
    link = f"der Link-Test ist nicht bekannt{why}"
    if not math.isnan(evidence.link_p_value):
        link = f"der Link-Test hat den p-Wert {p_value(evidence.link_p_value)}"
    what = (
        "die Statistik von Hosmer und Lemeshow über "
        f"{counted(evidence.groups, 'Gruppe', 'Gruppen')} ist {ratio(evidence.statistic)}{test}, "
        f"Tjurs R² {_share(evidence.tjur)} und McFaddens {_share(evidence.mcfadden)}; {link}"
    )
    if finding.unknown == "rows chosen by outcome":
        what += f"; {IN_SAMPLE}"
    step = "Diese nur nennen, wo jemand danach fragt, und mit ihren Grenzen"
    return made(finding, subject, what, step)


def _share(number: float) -> str:
    return wording().not_known if math.isnan(number) else signed(number).removeprefix("+")
