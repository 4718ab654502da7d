"""Odds ratios without a finite estimate in German: why there is none, and what is known."""

from __future__ import annotations

import math

from plainodds.answers.estimate import Estimate
from plainodds.answers.odds import OddsAnswer, OddsRow
from plainodds.answers.profile import ProfileAnswer
from plainodds.model.predictors import Subject
from plainodds.phrases.german.parts import case, cases, event
from plainodds.phrases.labels import listed, named_value, predictor_name
from plainodds.phrases.lexicon import lexicon
from plainodds.phrases.numbers import count, level_figures, ratio
from plainodds.phrases.parts import ratio_with_interval
from plainodds.phrases.unbounded import one_outcome
from plainodds.values import Scalar

__all__ = [
    "one_outcome_told",
    "profile_cautions",
    "ratio_figure",
    "ratio_told",
    "unbounded_cautions",
    "unbounded_told",
]


def ratio_figure(odds: float) -> str:
    """An odds ratio, or that it has no finite value."""
    if odds == math.inf:
        return "kein endlicher Wert"
    return "kein Wert über 0" if odds == 0 else ratio(odds)


def ratio_told(odds: Estimate, level: float) -> str:
    """The same with its interval."""
    if odds.se is not None or odds.estimate not in (0.0, math.inf):
        return ratio_with_interval(odds, level)
    told = ""
    if odds.estimate == 0.0 and odds.upper is not None:
        told = f"von 0 bis {ratio(odds.upper)}"
    elif odds.estimate > 0 and odds.lower is not None:
        told = f"ab {ratio(odds.lower)}, ohne obere Grenze"
    between = lexicon().interval.format(level_figures(level), told) if told else ""
    return f"{ratio_figure(odds.estimate)}{between}"


def profile_cautions(answer: ProfileAnswer) -> list[str]:
    """That a profile's chance has no estimate short of certainty; empty where it has one."""
    points = [("dieses Profil", "diesem Profil", answer.point)]
    if answer.comparison is not None:
        points.append(("das verglichene Profil", "dem verglichenen Profil", answer.start))
    outcome, told = answer.subject.outcome, []
    for which, dative, point in points:
        if math.isnan(point.limit):
            given = ", und die angegebene ist die, bei der die Anpassung stehen blieb"
            if math.isnan(point.probability.estimate):
                given = ""
            told.append(
                f"Die Daten lassen die Wahrscheinlichkeit für {event(outcome)} für {which} offen: "
                f"jede würde sie gleich gut erklären{given}"
            )
        elif point.limit != 0:
            had, best = "hatten alle", "Gewissheit"
            if point.limit < 0:
                had, best = "hatte keiner der", "gar keine Wahrscheinlichkeit"
            whom = cases(outcome, "Fälle")
            told.append(
                f"In diesen Daten {had} {whom}, die das Modell nicht von {dative} unterscheidet, "
                f"das Ereignis, sodass {best} sie am besten erklären würde; die angegebene "
                "Wahrscheinlichkeit ist die, bei der die Anpassung stehen blieb, und ihr Intervall "
                "sagt wenig"
            )
    return told


def unbounded_told(answer: OddsAnswer, row: OddsRow) -> str:
    """What is said of such an odds ratio, to follow what changes: verb first."""
    what = event(answer.subject.outcome)
    side, odds = row.log_odds_ratio.estimate, row.odds_ratio
    name = f"das Chancenverhältnis (Odds Ratio) für {what}"
    if math.isnan(side):
        return (
            f"ist {name} nicht bekannt: die Daten lassen es offen, denn jeder Wert würde sie "
            "gleich gut erklären"
        )
    told = f"hat {name} keinen endlichen Schätzwert: {_why(answer, row)}"
    interval = f"; sein {level_figures(answer.question.level)}-%-Intervall reicht von "
    if side > 0 and odds.lower is not None:
        return f"{told}{interval}{ratio(odds.lower)} ohne Ende nach oben"
    if side < 0 and odds.upper is not None:
        return f"{told}{interval}{ratio(odds.upper)} nach unten bis 0"
    return told


def _why(answer: OddsAnswer, row: OddsRow) -> str:
    """Which cases all have the same outcome; else that the predictors together tell it."""
    subject = answer.subject
    told = [
        words
        for level in (row.end, row.start)
        if (words := one_outcome_told(subject, row.predictor, level))
    ]
    if told:
        return listed(told)
    name = predictor_name(subject.predictor(row.predictor))
    return (
        f"in diesen Daten legt {name}, allein oder mit anderen Merkmalen, das Ergebnis mancher "
        f"{cases(subject.outcome)} ausnahmslos fest"
    )


def one_outcome_told(subject: Subject, name: str, level: Scalar) -> str:
    """Said of a level all of whose cases had the same outcome; else empty."""
    facts = subject.predictor(name)
    found = None if facts.is_number else one_outcome(subject, name, level)
    if found is None:
        return ""
    number, with_event = found
    whom = f"mit {named_value(facts, level)}"
    if number == 1:
        had = "das Ereignis" if with_event else "das Ereignis nicht"
        return f"der einzige {case(subject.outcome)} {whom} hatte {had}"
    many = f"{count(number)} {cases(subject.outcome)} {whom}"
    if with_event:
        return f"alle {many} hatten das Ereignis"
    return f"keiner der {many} hatte das Ereignis"


def unbounded_cautions(answer: OddsAnswer) -> list[str]:
    """What an odds ratio without a finite estimate means; empty where all have one."""
    without = [row for row in answer.rows if math.isinf(row.log_odds_ratio.estimate)]
    left_open = [row for row in answer.rows if math.isnan(row.log_odds_ratio.estimate)]
    told = []
    if without:
        told.append(
            f"Ein endliches Chancenverhältnis (Odds Ratio) gibt es nicht bei "
            f"{_named(answer, without)}: je extremer der Wert, desto besser erklärt er diese "
            "Daten; mehr Daten, weniger Stufen oder eine bestrafte Anpassung können eines ergeben"
        )
        with_interval = any(row.odds_ratio.lower is not None for row in without)
        if with_interval and answer.question.interval == "wald":
            told.append(
                "Was darüber bekannt ist, stammt aus der Likelihood: die Werte, unter denen die "
                "Daten noch etwa so gut erklärt sind"
            )
        known = [row for row in without if row.odds_ratio.lower is not None]
        if len(known) < len(without) and answer.question.interval == "wald":
            told.append(
                "Wo die endliche Grenze des Intervalls fehlt, wurde sie ausgelassen, weil so viele "
                'lange zu berechnen sind (`interval="likelihood"` berechnet sie), oder weil die '
                "Anpassung keine Likelihood hat, aus der sie zu berechnen wäre"
            )
    if left_open:
        told.append(
            "Die Daten lassen das Chancenverhältnis (Odds Ratio) offen bei "
            f"{_named(answer, left_open)}: manche Merkmale folgen aus anderen, oder das Ergebnis "
            "zu vieler Fälle steht ausnahmslos fest"
        )
    return told


def _named(answer: OddsAnswer, rows: list[OddsRow]) -> str:
    names = (predictor_name(answer.subject.predictor(row.predictor)) for row in rows)
    return listed(list(dict.fromkeys(names)))
