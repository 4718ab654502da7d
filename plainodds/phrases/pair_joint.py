"""The joint table of two factors in words: each combination, and what adding up says."""

from __future__ import annotations

import math

from plainodds.answers.estimate import Estimate
from plainodds.answers.joint import AdditiveInteraction, JointCell, JointTable, StratumEffect
from plainodds.answers.moves import Move
from plainodds.answers.pair import PairAnswer
from plainodds.errors import QuestionRefused
from plainodds.phrases.choices.pair import (
    additive_of,
    cells_without_events,
    cells_without_rows,
    leaves_open,
)
from plainodds.phrases.labels import listed
from plainodds.phrases.moves import moves_words
from plainodds.phrases.pair_labels import at_value, combination_label, pair_noun, rows_label
from plainodds.phrases.parts import (
    association,
    chance_with_interval,
    difference_with_interval,
    model_cautions,
    odds_ratio_cautions,
    ratio_with_interval,
    signed_with_interval,
    standard_error,
)
from plainodds.phrases.saying import Words
from plainodds.phrases.sentences import sentence
from plainodds.phrases.units import tidy

__all__ = [
    "additive_words",
    "joint_cautions",
    "joint_technical",
    "joint_words",
    "no_synergy_words",
    "recoded_words",
]


def joint_words(answer: PairAnswer) -> Words:
    """Say the joint table alone, as it is told beside it.

    Parameters
    ----------
    answer : PairAnswer

    Returns
    -------
    Words

    Raises
    ------
    QuestionRefused
        If the answer has no joint table.
    """
    table = _table(answer)
    told = [
        _combinations(answer, table),
        *_apart_and_together(answer, table),
        *additive_words(answer),
        *_shares(answer, table),
    ]
    chances = [cell.chance.estimate for cell in table.cells if cell.chance is not None]
    cautions = [
        *joint_cautions(answer),
        *map(sentence, odds_ratio_cautions(chances)),
        association(answer.subject),
    ]
    held = answer.question.others != "observed"
    return Words(
        tuple(map(sentence, told)), (*cautions, *model_cautions(answer.subject, offset_held=held))
    )


def _table(answer: PairAnswer) -> JointTable:
    if answer.joint is None:
        raise QuestionRefused(
            "A joint table needs two values of each predictor; state them with a_values=(from, to) "
            "and b_values=(from, to)."
        )
    return answer.joint


def _combinations(answer: PairAnswer, table: JointTable) -> str:
    """Each combination with its chance, and its odds against the reference."""
    level, told = answer.question.level, []
    reference, *others = table.cells
    start = f"counted from {combination_label(answer, reference)}"
    if reference.chance is not None:
        noun = f"the {pair_noun(answer)} of {tidy(answer.subject.outcome.event)}"
        start += f", where {noun} is {chance_with_interval(reference.chance, level)}"
    for cell in others:
        odds = "the odds ratio is not known"
        if not math.isnan(cell.odds_ratio.estimate):
            odds = f"the odds are multiplied by {ratio_with_interval(cell.odds_ratio, level)}"
        if cell.chance is not None:
            odds = f"the chance is {chance_with_interval(cell.chance, level)} and {odds}"
        told.append(f"with {combination_label(answer, cell)}, {odds}")
    return f"{start}: {'; '.join(told)}"


def _apart_and_together(answer: PairAnswer, table: JointTable) -> list[str]:
    both = table.multiplicative
    if math.isnan(both.estimate):
        return []
    level = answer.question.level
    if not answer.interaction.joined:
        return [
            "By multiplying, the odds ratio of both together is exactly the product of the two "
            "odds ratios apart, since no term of the model joins the two"
        ]
    return [
        "By multiplying, the odds ratio of both together is "
        f"{ratio_with_interval(both, level)} times the product of the two odds ratios apart"
    ]


def additive_words(answer: PairAnswer) -> list[str]:
    """Say whether both together add more than the two apart; empty without a joint table."""
    table = answer.joint
    if table is None:
        return []
    found, unit = additive_of(table), _unit(table)
    excess = found.relative_excess_risk
    if math.isnan(excess.estimate):
        return []
    reference, _, _, both = table.cells
    how = "exactly as much as"
    if excess.estimate != 0:
        how = f"{'more' if excess.estimate > 0 else 'less'} than"
    told = (
        f"counted in multiples of the {unit} with {combination_label(answer, reference)}, "
        f"{combination_label(answer, both)} together add {how} the two apart would: RERI "
        f"{signed_with_interval(excess, answer.question.level)}"
    )
    if leaves_open(excess):
        told += ", which leaves open whether it is more or less"
    return [told]


def _unit(table: JointTable) -> str:
    return "odds" if table.additive_by_chances is None else "chance"


def _shares(answer: PairAnswer, table: JointTable) -> list[str]:
    found, unit = additive_of(table), _unit(table)
    level, told = answer.question.level, []
    share = found.attributable_proportion
    if not math.isnan(share.estimate):
        told.append(
            f"as a share of the {unit} with both, that is {signed_with_interval(share, level)} "
            "(the attributable proportion)"
        )
    if found.synergy_index is not None and not math.isnan(found.synergy_index.estimate):
        told.append(
            "What both together add is "
            f"{ratio_with_interval(found.synergy_index, level)} times what the two apart add up "
            "to (the synergy index)"
        )
    return told


def no_synergy_words(table: JointTable) -> list[str]:
    """Why a synergy index is missing; empty where none is."""
    found, unit = additive_of(table), _unit(table)
    if found.synergy_index is not None:
        return []
    if math.isnan(found.relative_excess_risk.estimate):
        return ["There is no synergy index, since the data leave one of the combinations open"]
    return [
        f"There is no synergy index: it compares what is added to the {unit}, and here the two "
        "apart, or both together, do not add to it"
    ]


def recoded_words(answer: PairAnswer) -> list[str]:
    """From which combination is counted, where it is not the stated one, and why."""
    if answer.joint is None or not answer.joint.recoded:
        return []
    reference = combination_label(answer, answer.joint.cells[0])
    return [
        f"The joint table counts from {reference}, since that combination has the lowest odds: "
        "measures of adding up can be read only where both factors raise the odds"
    ]


def joint_cautions(answer: PairAnswer) -> list[str]:
    """What must be known to read the joint table; empty without one."""
    if answer.joint is None:
        return []
    told = recoded_words(answer)
    cases = tidy(answer.subject.outcome.cases)
    empty = [combination_label(answer, cell) for cell in cells_without_rows(answer.joint)]
    if empty:
        told.append(
            f"The data have no {cases} with {listed(empty)}; what is said there is the model's "
            "own, or is not known"
        )
    still = [combination_label(answer, cell) for cell in cells_without_events(answer.joint)]
    if still:
        told.append(
            f"Among the {cases} with {listed(still)} there is no event, so what is said there "
            "hangs on the model"
        )
    told += no_synergy_words(answer.joint)
    if answer.joint.additive_by_chances is None:
        told.append(
            "Measures of adding up are made of odds ratios here, which stand for ratios of chances "
            "only where the chances are under about 10%"
        )
    return list(map(sentence, told))


def joint_technical(answer: PairAnswer) -> list[str]:
    """The whole joint table with its measures; empty without one."""
    table = answer.joint
    if table is None:
        return []
    return [
        *(_cell(answer, cell) for cell in table.cells),
        *(_stratum(answer, each) for each in table.strata),
        *_measures(answer, "odds ratios", table.additive_by_odds),
        *(
            []
            if table.additive_by_chances is None
            else _measures(answer, "risk ratios", table.additive_by_chances)
        ),
    ]


def _cell(answer: PairAnswer, cell: JointCell) -> str:
    level = answer.question.level
    told = [rows_label(answer, cell)] if rows_label(answer, cell) else []
    if cell.chance is not None:
        told.append(f"{pair_noun(answer)} {chance_with_interval(cell.chance, level)}")
    odds = f"odds ratio {ratio_with_interval(cell.odds_ratio, level)}"
    told.append("reference" if cell.is_reference else odds)
    return f"{combination_label(answer, cell)}: {', '.join(told)}"


def _stratum(answer: PairAnswer, each: StratumEffect) -> str:
    level, question = answer.question.level, answer.question
    other = question.b if each.predictor == question.a else question.a
    change = moves_words(answer.subject, ((each.predictor, Move(each.start, each.end)),))
    told = (
        f"within {at_value(answer.subject, other, each.within)}, {change}: odds ratio "
        f"{ratio_with_interval(each.odds_ratio, level)}"
    )
    if each.risk_difference is None:
        return told
    return f"{told}, chance {difference_with_interval(each.risk_difference, level)}"


def _measures(answer: PairAnswer, source: str, found: AdditiveInteraction) -> list[str]:
    level = answer.question.level

    def told(name: str, estimate: Estimate) -> str:
        return f"{name} {signed_with_interval(estimate, level)}{standard_error(estimate)}"

    synergy = "synergy index undefined"
    if found.synergy_index is not None:
        synergy = f"synergy index {ratio_with_interval(found.synergy_index, level)}"
    return [
        f"from {source}: {told('RERI', found.relative_excess_risk)}; "
        f"{told('attributable proportion', found.attributable_proportion)}; {synergy}"
    ]
