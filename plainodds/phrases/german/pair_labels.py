"""What two predictors together are called in German: titles, places and combinations."""

from __future__ import annotations

import math
from typing import Literal

from plainodds.answers.joint import JointCell
from plainodds.answers.moves import Move
from plainodds.answers.pair import PairAnswer
from plainodds.answers.stretches import Stretch
from plainodds.model.predictors import PredictorFacts
from plainodds.phrases.german.parts import case, cases, event
from plainodds.phrases.labels import (
    from_to,
    listed,
    named_value,
    predictor_name,
    step_label,
    value_label,
)
from plainodds.phrases.lexicon import lexicon
from plainodds.phrases.moves import moves_label, moves_words
from plainodds.phrases.numbers import chance, quantity
from plainodds.phrases.pair_labels import is_averaged, levels_left_out, place_label, stretch_span
from plainodds.phrases.units import per_unit
from plainodds.values import Scalar

__all__ = [
    "at_b",
    "both_b",
    "change",
    "combination",
    "followed",
    "interaction",
    "left_out",
    "noun",
    "odds",
    "opening",
    "per_additional",
    "rows_behind",
    "share",
    "stretch_place",
    "taken_at",
    "title",
]


def noun(answer: PairAnswer) -> str:
    """As in "die mittlere Wahrscheinlichkeit", without the event."""
    return f"die {'mittlere ' if is_averaged(answer) else ''}Wahrscheinlichkeit"


def odds(answer: PairAnswer) -> str:
    """As in "die Chance (Odds) für „…“"."""
    return f"die Chance (Odds) für {event(answer.subject.outcome)}"


def title(answer: PairAnswer) -> str:
    """As in "Wahrscheinlichkeit für „…“: Werkstoff und Auskleidung zusammen"."""
    subject, question = answer.subject, answer.question
    of = "Chance (Odds)" if question.scale == "odds" else noun(answer).removeprefix("die ")
    a, b = (predictor_name(subject.predictor(name)) for name in (question.a, question.b))
    return f"{of} für {event(subject.outcome)}: {a} und {b} zusammen"


def at_b(answer: PairAnswer, value: Scalar) -> str:
    """The other predictor at a value: "Auskleidung = ja"."""
    return named_value(answer.subject.predictor(answer.question.b), value)


def both_b(answer: PairAnswer) -> tuple[str, str]:
    """The same at both values that are compared."""
    before, after = (at_b(answer, value) for value in answer.b_change)
    return before, after


def change(answer: PairAnswer) -> str:
    """What changes, to follow "mit": "Werkstoff = PVC statt Grauguss"."""
    return moves_words(answer.subject, ((answer.question.a, Move(*answer.a_change)),))


def per_additional(facts: PredictorFacts) -> str:
    """What a slope is stated for: "je Jahr mehr (Rohralter)"."""
    unit = lexicon().per_additional.format(per_unit(facts.unit))
    return f"{unit} ({predictor_name(facts)})"


def taken_at(answer: PairAnswer, name: str) -> str:
    """Where a slope is taken, which may differ from place to place."""
    if name not in answer.sloped:
        return ""
    if answer.question.others == "observed":
        return f", am eigenen Wert jedes {case(answer.subject.outcome, 'Falls')},"
    facts = answer.subject.predictor(name)
    return f", am Wert {value_label(facts, facts.typical)},"


def opening(answer: PairAnswer) -> str:
    """The change that an odds ratio belongs to: "mit Werkstoff = PVC statt Grauguss"."""
    facts = answer.subject.predictor(answer.question.a)
    if facts.name not in answer.sloped:
        return f"mit {change(answer)}"
    start, end = answer.a_change
    if not facts.linear:
        return f"mit {predictor_name(facts)} {from_to(facts, start, end)}"
    return f"{step_label(facts, float(end) - float(start))} ({predictor_name(facts)})"


def followed(answer: PairAnswer) -> str:
    """What is followed along the other: "Werkstoff PVC gegenüber Grauguss"."""
    facts = answer.subject.predictor(answer.question.a)
    if facts.name not in answer.sloped:
        return moves_label(answer.subject, ((facts.name, Move(*answer.a_change)),))
    if answer.question.scale == "probability":
        return per_additional(facts)
    return opening(answer).removeprefix("mit ")


def interaction(answer: PairAnswer, scale: Literal["probability", "odds"]) -> str:
    """What the interaction is called on a scale."""
    if scale == "odds":
        return "Verhältnis der Odds Ratios"
    question = answer.question
    a_sloped, b_sloped = question.a in answer.sloped, question.b in answer.sloped
    if not b_sloped:
        return "Differenz der Steigungen" if a_sloped else "Differenz der Differenzen"
    what = "Steigung" if a_sloped else "Differenz"
    return f"Änderung der {what} {per_additional(answer.subject.predictor(question.b))}"


def stretch_place(answer: PairAnswer, stretch: Stretch, *, first: bool) -> str:
    """Where a stretch lies, to follow "bei": "Rohralter von 12 bis 68 Jahre"."""
    facts = answer.subject.predictor(answer.question.b)
    name = predictor_name(facts)
    if not facts.is_number:
        value = value_label(facts, stretch.start)
        return lexicon().value.format(name, value) if first else value
    span = stretch_span(answer, stretch)
    if place_label(facts, stretch.start) == place_label(facts, stretch.end):
        return lexicon().value.format(name, span) if first else span
    ends = lexicon().from_to.format(span)
    return f"{name} {ends}" if first else ends


def share(number: float) -> str:
    """How many of the rows: "71 % der Fälle"; empty where nobody knows."""
    if math.isnan(number):
        return ""
    if number <= 0:
        return "keine Fälle"
    return "alle Fälle" if number >= 1 else f"{chance(number)} der Fälle"


def combination(answer: PairAnswer, cell: JointCell) -> str:
    """One combination of both: "Werkstoff = PVC und Auskleidung = ja"."""
    subject, question = answer.subject, answer.question
    a = named_value(subject.predictor(question.a), cell.a)
    return listed([a, at_b(answer, cell.b)])


def rows_behind(answer: PairAnswer, cell: JointCell) -> str:
    """The data behind one combination; empty where the model has no rows."""
    outcome = answer.subject.outcome
    if cell.rows is None:
        return ""
    if cell.rows == 0:
        return f"keine {cases(outcome)}"
    many = case(outcome) if cell.rows == 1 else cases(outcome)
    told = f"{quantity(cell.rows)} {many}"
    return told if cell.events is None else f"{told}, davon {quantity(cell.events)} mit Ereignis"


def left_out(answer: PairAnswer) -> list[str]:
    """How many levels of a category with very many are told; empty where all are."""
    return [
        f"Von {quantity(known)} Werten von {predictor_name(facts)} sind die verglichenen und die "
        "häufigsten gezeigt"
        for facts, known in levels_left_out(answer)
    ]
