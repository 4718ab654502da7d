"""The joint table of two factors in German: each combination, and what adding up says."""

from __future__ import annotations

import math

from plainodds.answers.estimate import Estimate
from plainodds.answers.joint import AdditiveInteraction, JointCell, JointTable, StratumEffect
from plainodds.answers.moves import Move
from plainodds.answers.pair import PairAnswer
from plainodds.phrases.choices.pair import (
    additive_of,
    cells_without_events,
    cells_without_rows,
    leaves_open,
)
from plainodds.phrases.german.pair_labels import combination, noun, rows_behind
from plainodds.phrases.german.parts import cases
from plainodds.phrases.labels import named_value
from plainodds.phrases.moves import moves_words
from plainodds.phrases.numbers import quantity
from plainodds.phrases.parts import (
    chance_with_interval,
    difference_with_interval,
    ratio_with_interval,
    signed_with_interval,
    standard_error,
)

__all__ = ["additive_sentences", "joint_cautions", "joint_technical"]


def additive_sentences(answer: PairAnswer) -> list[str]:
    """Whether both together add more than the two apart; empty without a joint table."""
    table = answer.joint
    if table is None:
        return []
    excess = additive_of(table).relative_excess_risk
    if math.isnan(excess.estimate):
        return []
    reference, _, _, both = table.cells
    how = "genau so viel hinzu, wie"
    if excess.estimate != 0:
        how = f"{'mehr' if excess.estimate > 0 else 'weniger'} hinzu, als"
    told = (
        f"gezählt in Vielfachen der {_unit(table)} mit {combination(answer, reference)} fügen "
        f"{combination(answer, both)} zusammen {how} beide einzeln hinzufügen würden: RERI "
        f"{signed_with_interval(excess, answer.question.level)}"
    )
    return [f"{told}; offen bleibt, ob es mehr oder weniger ist" if leaves_open(excess) else told]


def _unit(table: JointTable) -> str:
    return "Chance (Odds)" if table.additive_by_chances is None else "Wahrscheinlichkeit"


def joint_cautions(answer: PairAnswer) -> list[str]:
    """What must be known to read the joint table; empty without one."""
    table = answer.joint
    if table is None:
        return []
    told, many = _recoded(answer, table), cases(answer.subject.outcome)
    empty = " sowie mit ".join(combination(answer, cell) for cell in cells_without_rows(table))
    if empty:
        told.append(
            f"Die Daten haben keine {many} mit {empty}; was dort gesagt wird, sagt das "
            "Modell für sich allein, oder es ist nicht bekannt"
        )
    still = " sowie mit ".join(combination(answer, cell) for cell in cells_without_events(table))
    if still:
        among = cases(answer.subject.outcome, "Fällen")
        told.append(
            f"Unter den {among} mit {still} gibt es kein Ereignis; was dort gesagt wird, "
            "hängt am Modell"
        )
    told += _no_synergy(table)
    if table.additive_by_chances is None:
        told.append(
            "Die Maße des Addierens sind hier aus Odds Ratios gebildet, die nur dann für "
            "Verhältnisse von Wahrscheinlichkeiten stehen, wenn die Wahrscheinlichkeiten unter "
            f"etwa {quantity(10, '%')} liegen"
        )
    return told


def _recoded(answer: PairAnswer, table: JointTable) -> list[str]:
    """From which combination is counted, where it is not the stated one, and why."""
    if not table.recoded:
        return []
    return [
        f"Die gemeinsame Tafel zählt ab {combination(answer, table.cells[0])}, denn dort ist die "
        "Chance (Odds) am niedrigsten: Maße des Addierens lassen sich nur lesen, wenn beide "
        "Faktoren sie erhöhen"
    ]


def _no_synergy(table: JointTable) -> list[str]:
    """Why a synergy index is missing; empty where none is."""
    found = additive_of(table)
    if found.synergy_index is not None:
        return []
    if math.isnan(found.relative_excess_risk.estimate):
        return [
            "Einen Synergie-Index gibt es nicht, da die Daten eine der Verbindungen offen lassen"
        ]
    return [
        f"Einen Synergie-Index gibt es nicht: er vergleicht, was zur {_unit(table)} hinzukommt, "
        "und hier fügen beide einzeln oder beide zusammen ihr nichts hinzu"
    ]


def joint_technical(answer: PairAnswer) -> list[str]:
    """The whole joint table with its measures; empty without one."""
    table = answer.joint
    if table is None:
        return []
    told = [
        *(_cell(answer, cell) for cell in table.cells),
        *(_stratum(answer, each) for each in table.strata),
        _measures(answer, "Odds Ratios", table.additive_by_odds),
    ]
    if table.additive_by_chances is not None:
        told.append(_measures(answer, "relativen Risiken", table.additive_by_chances))
    return told


def _cell(answer: PairAnswer, cell: JointCell) -> str:
    level = answer.question.level
    told = [rows_behind(answer, cell)] if rows_behind(answer, cell) else []
    if cell.chance is not None:
        what = noun(answer).removeprefix("die ")
        told.append(f"{what} {chance_with_interval(cell.chance, level)}")
    odds = f"Odds Ratio {ratio_with_interval(cell.odds_ratio, level)}"
    told.append("Referenz" if cell.is_reference else odds)
    return f"{combination(answer, cell)}: {', '.join(told)}"


def _stratum(answer: PairAnswer, each: StratumEffect) -> str:
    level, question, subject = answer.question.level, answer.question, answer.subject
    other = question.b if each.predictor == question.a else question.a
    change = moves_words(subject, ((each.predictor, Move(each.start, each.end)),))
    told = (
        f"innerhalb von {named_value(subject.predictor(other), each.within)}, {change}: Odds Ratio "
        f"{ratio_with_interval(each.odds_ratio, level)}"
    )
    if each.risk_difference is None:
        return told
    return f"{told}, Wahrscheinlichkeit {difference_with_interval(each.risk_difference, level)}"


def _measures(answer: PairAnswer, source: str, found: AdditiveInteraction) -> str:
    level = answer.question.level

    def told(name: str, estimate: Estimate) -> str:
        return f"{name} {signed_with_interval(estimate, level)}{standard_error(estimate)}"

    synergy = "Synergie-Index nicht definiert"
    if found.synergy_index is not None:
        synergy = f"Synergie-Index {ratio_with_interval(found.synergy_index, level)}"
    return (
        f"aus {source}: {told('RERI', found.relative_excess_risk)}; "
        f"{told('zuschreibbarer Anteil', found.attributable_proportion)}; {synergy}"
    )
