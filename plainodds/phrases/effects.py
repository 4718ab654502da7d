"""Effects on the chance in words: one sentence for each predictor, in percentage points."""

from __future__ import annotations

from plainodds.answers.effects import EffectRow, EffectsAnswer
from plainodds.model.predictors import PredictorFacts
from plainodds.phrases.alternative import alternative
from plainodds.phrases.averaged import cases_chosen, drawn_method, drawn_words, rows_chosen
from plainodds.phrases.choices.concerns import effects_spoken_of
from plainodds.phrases.choices.effects import (
    effects_averaged,
    groups_counted,
    has_slopes,
    has_tiny_slopes,
    highest_and_lowest,
    is_slope,
    open_names,
    rows_together,
    share_is_known,
)
from plainodds.phrases.concerns import level_cautions
from plainodds.phrases.held import held_case
from plainodds.phrases.labels import (
    effect_label,
    line_label,
    listed,
    predictor_label,
    predictor_name,
    step_label,
    value_label,
)
from plainodds.phrases.numbers import (
    chance,
    confidence,
    frequency,
    p_value,
    percentage_points,
)
from plainodds.phrases.parts import (
    association,
    covariance_words,
    difference_with_interval,
    model_cautions,
    points_with_interval,
    profile_words,
    rows_words,
    say_level_once,
)
from plainodds.phrases.saying import Audience, Words, for_audience, words
from plainodds.phrases.sentences import sentence
from plainodds.phrases.units import per_unit, tidy

__all__: list[str] = []

_EVERYTHING = 1_000_000


@words.register
def _(answer: EffectsAnswer, audience: Audience = "plain") -> Words:
    return for_audience(audience, {"plain": _plain, "technical": _technical}, answer)


def _plain(answer: EffectsAnswer) -> Words:
    others = _others(answer)
    told = [*_share(answer), *_rows(answer), *others]
    if not effects_averaged(answer):
        # whose chance it is comes before how it changes
        told = [*_share(answer), *others, *_rows(answer)]
    for row in answer.rows[:1]:
        told += drawn_words(answer.subject, answer.question.sample, row.effect)
    return _words(answer, told, [*_open(answer), *_slopes(answer)])


def _words(answer: EffectsAnswer, told: list[str], more: list[str]) -> Words:
    held, subject = not effects_averaged(answer), answer.subject
    levels = level_cautions(subject, effects_spoken_of(answer))
    cautions = (association(subject), *levels, *more)
    return Words(
        tuple(map(sentence, told)),
        (*map(sentence, cautions), *model_cautions(subject, offset_held=held)),
    )


def _share(answer: EffectsAnswer) -> list[str]:
    """How common the event is, since percentage points alone say nothing of that."""
    if not share_is_known(answer):
        return []
    share, subject = answer.subject.outcome.share, answer.subject
    return [
        f"In the data as a whole, the share of {tidy(subject.outcome.event)} is {chance(share)}, "
        f"that is {frequency(share)}"
    ]


def _rows(answer: EffectsAnswer) -> list[str]:
    told = []
    for place, rows in enumerate(rows_together(answer)):
        facts = answer.subject.predictor(rows[0].predictor)
        noun = _noun(answer, in_full=place == 0)
        items = [_difference(row, answer.question.level) for row in rows]
        items = say_level_once(items, answer.question.level)
        told.append(f"{_opening(facts, rows)}, {noun} is {listed(_placed(answer, rows, items))}")
    return told


def _difference(row: EffectRow, level: float) -> str:
    told = difference_with_interval(row.effect, level)
    return f"about {told}" if is_slope(row) and told[0].isdigit() else told


def _opening(facts: PredictorFacts, rows: list[EffectRow]) -> str:
    name, first = predictor_name(facts), rows[0]
    if first.start is None or first.end is None:
        if first.step is None:
            return f"per additional {per_unit(facts.unit)} of {name}"
        return f"{step_label(facts, first.step)} of {name}"
    if len({row.end for row in rows}) > 1:
        return f"compared with {name} {value_label(facts, first.start)}"
    end = value_label(facts, first.end)
    return f"for {name} {end} rather than {value_label(facts, first.start)}"


def _placed(answer: EffectsAnswer, rows: list[EffectRow], items: list[str]) -> list[str]:
    """Each figure with its level or its group; alone where there is one only."""
    facts = answer.subject.predictor(rows[0].predictor)
    if answer.question.by is not None:
        groups = (_group(answer, row, first=place == 0) for place, row in enumerate(rows))
        return [f"{text} {group}" for text, group in zip(items, groups, strict=True)]
    if len(rows) == 1:
        return items
    return [
        f"{text} for {line_label(facts, row.end)}"
        for text, row in zip(items, rows, strict=True)
        if row.end is not None
    ]


def _group(answer: EffectsAnswer, row: EffectRow, *, first: bool) -> str:
    """Among whom: "among pipes with material PVC", after the first "with ductile iron"."""
    facts = answer.subject.predictor(answer.question.by or "")
    if row.by is None:
        return ""
    if not effects_averaged(answer):
        return f"given {predictor_name(facts)} {value_label(facts, row.by)}"
    if first:
        among = "those" if answer.question.where else tidy(answer.subject.outcome.cases)
        return f"among {among} with {predictor_name(facts)} {value_label(facts, row.by)}"
    if facts.kind == "category":
        return f"with {value_label(facts, row.by)}"
    return f"with {predictor_name(facts)} {value_label(facts, row.by)}"


def _noun(answer: EffectsAnswer, *, in_full: bool) -> str:
    """Which chance differs, in full in the first sentence."""
    event = f" of {tidy(answer.subject.outcome.event)}" if in_full else ""
    if not effects_averaged(answer):
        whom = f"that {tidy(answer.subject.outcome.case)}"
        if in_full:
            whom = held_case(answer.subject, answer.held, answer.question.others)
        comma = "," if whom.endswith("otherwise typical") else ""
        return f"the chance{event} for {whom}{comma}"
    where, whom = answer.question.where, ""
    if in_full and where:
        whom = f" among {cases_chosen(answer.subject, where, sum(answer.counted))}"
    return f"the average chance{event}{whom}"


def _others(answer: EffectsAnswer, at_most: int = 8) -> list[str]:
    subject = answer.subject
    if not effects_averaged(answer):
        if not answer.held:
            return []
        held = profile_words(subject, answer.held, at_most=at_most)
        return [f"Each predictor is looked at while the others are held at {held}"]
    kept = f"Each {tidy(subject.outcome.case)} keeps its own values of everything else, and the "
    return [f"{kept}changes in the chance are averaged over {_counted(answer)}"]


def _counted(answer: EffectsAnswer) -> str:
    """The rows averaged over, for each group where there are groups."""
    subject, question = answer.subject, answer.question
    if question.by is None:
        return f"the {rows_chosen(subject, question.where, sum(answer.counted))}"
    facts = subject.predictor(question.by)
    told = [
        f"{rows_chosen(subject, None, counted)} with {predictor_name(facts)} "
        f"{value_label(facts, level)}"
        for level, counted in groups_counted(answer)
    ]
    of = rows_chosen(subject, question.where, sum(answer.counted))
    return f"the {of}: {listed(told)}"


def _open(answer: EffectsAnswer) -> list[str]:
    """For which predictors an interval holds changes in both directions."""
    found = open_names(answer)
    if not found:
        return []
    return [
        f"Where an interval goes from lower to higher, as for {listed(found)}, the data "
        "leave open which way the chance differs"
    ]


def _slopes(answer: EffectsAnswer) -> list[str]:
    """What a figure per unit is, and what to ask where it is too small to be written."""
    if not has_slopes(answer):
        return []
    case = tidy(answer.subject.outcome.case)
    own = f"at each {case}'s own value" if effects_averaged(answer) else f"at that {case}'s value"
    told = [
        f"A figure per unit is the rate {own}; over a larger change the chance need not keep to it"
    ]
    if has_tiny_slopes(answer):
        told.append("Where a figure per unit is too small to be written out, ask for a whole step")
    return told


def _technical(answer: EffectsAnswer) -> Words:
    subject, question = answer.subject, answer.question
    told = [_technical_row(answer, row) for row in answer.rows]
    kind = "Average marginal effects (AME)"
    if question.others == "typical":
        kind = "Marginal effects at the typical profile (medians and most frequent levels)"
    elif not effects_averaged(answer):
        kind = "Marginal effects at a stated profile (MER), what is not stated being typical"
    method = (
        f"{kind}: dπ/dx of numbers through every column that they move, and discrete changes of "
        f"levels and steps, from {rows_words(subject)}"
    )
    if any(row.effect.lower is not None for row in answer.rows):
        method += (
            f"; {confidence(question.level)} intervals and p-values (Wald tests of no change) by "
            f"the delta method with exact gradients, with {covariance_words(subject)}"
        )
        if effects_averaged(answer):
            method += f"; rows weighted as fitted{drawn_method(question.sample)}"
    return _words(answer, [*told, *_others(answer, _EVERYTHING), method], [])


def _technical_row(answer: EffectsAnswer, row: EffectRow) -> str:
    subject, question = answer.subject, answer.question
    facts = subject.predictor(row.predictor)
    label = f"{predictor_label(facts)}, {effect_label(facts, row)}"
    if question.by is not None and row.by is not None:
        by = subject.predictor(question.by)
        label += f"; {predictor_name(by)} {value_label(by, row.by)}"
    kind = "marginal effect dπ/dx" if is_slope(row) else "discrete change"
    average = "average " if effects_averaged(answer) else ""
    text = f"{label}: {average}{kind} {points_with_interval(row.effect, question.level)}"
    if row.effect.se is not None:
        text += f", standard error {percentage_points(row.effect.se)}"
    return text if row.p_value is None else f"{text}, p-value {p_value(row.p_value)}"


@alternative.register
def _(answer: EffectsAnswer) -> str:
    rows, level = answer.rows, answer.question.level
    event = tidy(answer.subject.outcome.event)
    average = "average " if effects_averaged(answer) else ""
    changes = "1 change" if len(rows) == 1 else f"{len(rows)} changes"
    start = f"{changes} of the {average}chance of {event} as points on an axis of percentage points"
    if any(row.effect.lower is not None for row in rows):
        start += f", with lines for their {confidence(level)} intervals"
    known = highest_and_lowest(answer)
    if not known:
        return sentence(start)
    told = f"{'It' if len(rows) == 1 else 'The highest'} is {_short(answer, known[0])}"
    for lowest in known[1:]:
        told += f"; the lowest is {_short(answer, lowest)}"
    return f"{sentence(start)} {sentence(told)}"


def _short(answer: EffectsAnswer, row: EffectRow) -> str:
    facts = answer.subject.predictor(row.predictor)
    by = ""
    if answer.question.by is not None:
        by = f", {_group(answer, row, first=True)}"
    points = points_with_interval(row.effect, answer.question.level)
    return f"{points} for {predictor_name(facts)}, {effect_label(facts, row)}{by}"
