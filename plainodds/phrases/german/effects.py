"""Effects on the chance in German: one sentence for each predictor, in percentage points."""

from __future__ import annotations

from plainodds.answers.effects import EffectRow, EffectsAnswer
from plainodds.model.predictors import PredictorFacts
from plainodds.phrases.averaged import rows_chosen
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
from plainodds.phrases.german.concerns import level_cautions
from plainodds.phrases.german.language import GERMAN
from plainodds.phrases.german.parts import (
    EVERYTHING,
    among,
    association,
    case,
    covariance,
    drawn_method,
    drawn_sentences,
    event,
    held_whom,
    level_intervals,
    model_cautions,
)
from plainodds.phrases.german.parts import chance as chance_for
from plainodds.phrases.labels import (
    effect_label,
    line_label,
    listed,
    named_value,
    predictor_label,
    predictor_name,
    step_label,
    value_label,
)
from plainodds.phrases.lexicon import lexicon
from plainodds.phrases.numbers import chance, frequency, p_value, percentage_points
from plainodds.phrases.parts import (
    difference_with_interval,
    points_with_interval,
    profile_words,
    rows_words,
    say_level_once,
)
from plainodds.phrases.saying import Audience, Words, for_audience
from plainodds.phrases.sentences import joined, sentence
from plainodds.phrases.units import per_unit

__all__ = ["effects_title"]


@GERMAN.words.register
def _(answer: EffectsAnswer, audience: Audience = "plain") -> Words:
    return for_audience(audience, {"plain": _plain, "technical": _technical}, answer)


def _plain(answer: EffectsAnswer) -> Words:
    others = _others(answer)
    told = [*_share(answer), *_rows(answer), *others]
    if not effects_averaged(answer):
        # whose chance it is comes before how it changes
        told = [*_share(answer), *others, *_rows(answer)]
    for row in answer.rows[:1]:
        told += drawn_sentences(answer.subject, answer.question.sample, row.effect)
    return _words(answer, told, [*_open(answer), *_slopes(answer)])


def _words(answer: EffectsAnswer, told: list[str], more: list[str]) -> Words:
    held = not effects_averaged(answer)
    levels = level_cautions(answer.subject, effects_spoken_of(answer))
    return Words(
        tuple(map(sentence, told)),
        (
            *map(sentence, (association(answer.subject), *levels, *more)),
            *model_cautions(answer.subject, offset_held=held),
        ),
    )


def _share(answer: EffectsAnswer) -> list[str]:
    """How common the event is, since percentage points alone say nothing of that."""
    if not share_is_known(answer):
        return []
    share, what = answer.subject.outcome.share, event(answer.subject.outcome)
    told = f"In den Daten insgesamt beträgt der Anteil mit {what} {chance(share)}"
    return [lexicon().that_is.format(told, frequency(share))]


def _rows(answer: EffectsAnswer) -> list[str]:
    told = []
    for place, rows in enumerate(rows_together(answer)):
        facts = answer.subject.predictor(rows[0].predictor)
        noun = _noun(answer, in_full=place == 0)
        items = [_difference(row, answer.question.level) for row in rows]
        items = say_level_once(items, answer.question.level)
        placed = listed(_placed(answer, rows, items))
        told.append(f"{_opening(facts, rows)} liegt {noun} {placed}")
    return told


def _difference(row: EffectRow, level: float) -> str:
    told = difference_with_interval(row.effect, level)
    return f"etwa {told}" if is_slope(row) and told[0].isdigit() else told


def _opening(facts: PredictorFacts, rows: list[EffectRow]) -> str:
    name, first = predictor_name(facts), rows[0]
    if first.start is None or first.end is None:
        step = lexicon().per_additional.format(per_unit(facts.unit))
        if first.step is not None:
            step = step_label(facts, first.step)
        return f"{step} ({name})"
    if len({row.end for row in rows}) > 1:
        return f"verglichen mit {named_value(facts, first.start)}"
    ends = value_label(facts, first.end), value_label(facts, first.start)
    return f"bei {lexicon().value.format(name, lexicon().rather.format(*ends))}"


def _placed(answer: EffectsAnswer, rows: list[EffectRow], items: list[str]) -> list[str]:
    """Each figure with its level or its group; alone where there is one only."""
    facts = answer.subject.predictor(rows[0].predictor)
    if answer.question.by is not None:
        return [f"{text} {_group(answer, row)}" for text, row in zip(items, rows, strict=True)]
    if len(rows) == 1:
        return items
    return [
        f"{text} bei {line_label(facts, row.end)}"
        for text, row in zip(items, rows, strict=True)
        if row.end is not None
    ]


def _group(answer: EffectsAnswer, row: EffectRow) -> str:
    """In which group: "bei material = PVC"."""
    if row.by is None:
        return ""
    return f"bei {named_value(answer.subject.predictor(answer.question.by or ''), row.by)}"


def _noun(answer: EffectsAnswer, *, in_full: bool) -> str:
    """Which chance differs, in full in the first sentence."""
    subject, averaged = answer.subject, effects_averaged(answer)
    if not in_full:
        if averaged:
            return "die mittlere Wahrscheinlichkeit"
        return f"die Wahrscheinlichkeit für diesen {case(subject.outcome)}"
    noun = chance_for(subject.outcome, averaged=averaged)
    if not averaged:
        return f"{noun} bei {held_whom(subject, answer.held, answer.question.others, 'einem')}"
    where = answer.question.where
    return f"{noun} bei {among(subject, where, sum(answer.counted))}" if where else noun


def _others(answer: EffectsAnswer, at_most: int = 8) -> list[str]:
    subject = answer.subject
    if not effects_averaged(answer):
        if not answer.held:
            return []
        held = profile_words(subject, answer.held, at_most=at_most)
        return [f"Jedes Merkmal wird betrachtet, während die anderen festgehalten sind: {held}"]
    return [
        f"Jeder {case(subject.outcome)} behält seine eigenen Werte in allem anderen; gemittelt "
        f"werden die Änderungen der Wahrscheinlichkeit über {_counted(answer)}"
    ]


def _counted(answer: EffectsAnswer) -> str:
    """The rows averaged over, for each group where there are groups."""
    subject, question = answer.subject, answer.question
    whole = rows_chosen(subject, question.where, sum(answer.counted))
    if question.by is None:
        return whole
    facts = subject.predictor(question.by)
    told = [
        f"{rows_chosen(subject, None, counted)} mit {named_value(facts, level)}"
        for level, counted in groups_counted(answer)
    ]
    return f"{whole}: {listed(told)}"


def _open(answer: EffectsAnswer) -> list[str]:
    """For which predictors an interval holds changes in both directions."""
    found = open_names(answer)
    if not found:
        return []
    return [
        f"Reicht ein Intervall von niedriger bis höher, wie bei {listed(found)}, so lassen die "
        "Daten offen, in welche Richtung sich die Wahrscheinlichkeit unterscheidet"
    ]


def _slopes(answer: EffectsAnswer) -> list[str]:
    """What a figure per unit is, and what to ask where it is too small to be written."""
    if not has_slopes(answer):
        return []
    whose = case(answer.subject.outcome, "Falls")
    own = f"am eigenen Wert jedes {whose}"
    if not effects_averaged(answer):
        own = f"am Wert dieses {whose}"
    told = [
        f"Eine Zahl je Einheit ist die Rate {own}; über eine größere Änderung muss sich die "
        "Wahrscheinlichkeit nicht daran halten"
    ]
    if has_tiny_slopes(answer):
        told.append(
            "Wo eine Zahl je Einheit zu klein ist, um ausgeschrieben zu werden, hilft es, nach "
            "einem ganzen Schritt zu fragen"
        )
    return told


def _technical(answer: EffectsAnswer) -> Words:
    subject, question = answer.subject, answer.question
    told = [_technical_row(answer, row) for row in answer.rows]
    kind = "Mittlere marginale Effekte (AME)"
    if question.others == "typical":
        kind = "Marginale Effekte am typischen Profil (Mediane und häufigste Stufen)"
    elif not effects_averaged(answer):
        kind = "Marginale Effekte an einem angegebenen Profil (MER), Nichtangegebenes ist typisch"
    method = (
        f"{kind}: dπ/dx von Zahlen durch jede Spalte, die sie bewegen, und diskrete Änderungen von "
        f"Stufen und Schritten, aus {rows_words(subject)}"
    )
    if any(row.effect.lower is not None for row in answer.rows):
        method += (
            f"; {level_intervals(question.level)} und p-Werte (Wald-Tests auf keine Änderung) nach "
            f"der Delta-Methode mit exakten Gradienten, mit {covariance(subject)}"
        )
        if effects_averaged(answer):
            method += f"; Zeilen gewichtet wie bei der Anpassung{drawn_method(question.sample)}"
    return _words(answer, [*told, *_others(answer, EVERYTHING), method], [])


def _technical_row(answer: EffectsAnswer, row: EffectRow) -> str:
    subject, question = answer.subject, answer.question
    facts = subject.predictor(row.predictor)
    label = f"{predictor_label(facts)}, {effect_label(facts, row)}"
    if question.by is not None and row.by is not None:
        label += f"; {named_value(subject.predictor(question.by), row.by)}"
    slope, averaged = is_slope(row), effects_averaged(answer)
    kind = "marginaler Effekt dπ/dx" if slope else "diskrete Änderung"
    average = ("mittlerer " if slope else "mittlere ") if averaged else ""
    text = f"{label}: {average}{kind} {points_with_interval(row.effect, question.level)}"
    if row.effect.se is not None:
        text += lexicon().standard_error.format(percentage_points(row.effect.se))
    return text if row.p_value is None else f"{text}, p-Wert {p_value(row.p_value)}"


def effects_title(answer: EffectsAnswer) -> str:
    """What changes, in the genitive: "der mittleren Wahrscheinlichkeit für …"."""
    averaged = "mittleren " if effects_averaged(answer) else ""
    return f"der {averaged}Wahrscheinlichkeit für {event(answer.subject.outcome)}"


@GERMAN.alternative.register
def _(answer: EffectsAnswer) -> str:
    rows = answer.rows
    one = len(rows) == 1
    changes = "1 Änderung" if one else f"{len(rows)} Änderungen"
    marks = "Punkt" if one else "Punkte"
    start = f"{changes} {effects_title(answer)} als {marks} auf einer Achse von Prozentpunkten"
    if any(row.effect.lower is not None for row in rows):
        start += f", mit Linien für {level_intervals(answer.question.level)}"
    known = highest_and_lowest(answer)
    if not known:
        return sentence(start)
    told = f"{'Sie beträgt' if one else 'Die höchste beträgt'} {_short(answer, known[0])}"
    for lowest in known[1:]:
        told += f"; die niedrigste beträgt {_short(answer, lowest)}"
    return joined(start, told)


def _short(answer: EffectsAnswer, row: EffectRow) -> str:
    facts = answer.subject.predictor(row.predictor)
    by = f", {_group(answer, row)}" if answer.question.by is not None else ""
    points = points_with_interval(row.effect, answer.question.level)
    return f"{points} für {predictor_name(facts)}, {effect_label(facts, row)}{by}"
