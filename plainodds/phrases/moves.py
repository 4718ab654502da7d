"""What changes in a change: predictors that go from one value to another, or are shifted.

Used by sentences and drawings alike, so that both say the same.
"""

from __future__ import annotations

import numpy as np

from plainodds.answers.change import ChangeAnswer
from plainodds.answers.moves import Move, Shift, shifted
from plainodds.model.predictors import PredictorFacts, Subject
from plainodds.phrases.labels import (
    data_range,
    from_to,
    listed,
    named_value,
    predictor_label,
    predictor_name,
    value_label,
)
from plainodds.phrases.lexicon import lexicon
from plainodds.phrases.numbers import quantity
from plainodds.phrases.units import tidy, with_unit
from plainodds.values import Scalar

__all__ = [
    "Moves",
    "beyond_cautions",
    "end_label",
    "end_rather_than_start",
    "ends_beyond",
    "levels_moved",
    "moves_label",
    "moves_words",
    "settled_moves",
    "shift_label",
    "start_label",
]

Moves = tuple[tuple[str, Move | Shift], ...]


def settled_moves(answer: ChangeAnswer) -> Moves:
    """The moves as they are spoken of: at a profile a shift is one from value to value."""
    if answer.question.others == "observed":
        return answer.question.moves
    return tuple(
        (name, _at_typical(answer.subject.predictor(name), move))
        for name, move in answer.question.moves
    )


def levels_moved(answer: ChangeAnswer) -> list[tuple[str, Scalar]]:
    """The values between which a change moves its predictors, those that it leads to first."""
    return [
        (name, value)
        for name, move in settled_moves(answer)
        if isinstance(move, Move)
        for value in (move.end, move.start)
    ]


def _at_typical(facts: PredictorFacts, move: Move | Shift) -> Move | Shift:
    if isinstance(move, Move):
        return move
    end = shifted(facts, move, np.array([float(facts.typical)]))[0]
    return Move(facts.typical, float(end))


def moves_words(subject: Subject, moves: Moves) -> str:
    """All moves, to follow "with": "pipe age 60 rather than 20 years"."""
    return listed([_move_words(subject.predictor(name), move) for name, move in moves])


def _move_words(facts: PredictorFacts, move: Move | Shift) -> str:
    say, name = lexicon(), predictor_name(facts)
    if isinstance(move, Shift):
        return f"{name} {shift_label(facts, move)}"
    if move.start == move.end:
        return say.either_way.format(say.value.format(name, value_label(facts, move.end)))
    return say.value.format(name, end_rather_than_start(facts, move.start, move.end))


def end_rather_than_start(facts: PredictorFacts, start: Scalar, end: Scalar) -> str:
    """Two values, the unit said once: "60 rather than 20 years"."""
    after, before = value_label(facts, end), value_label(facts, start)
    if facts.is_number and quantity(float(start)) != "1":
        # 1 year would give the other value a unit in the singular
        written = quantity(float(start))
        if before.startswith(f"{written} "):
            after = quantity(float(end))
    return lexicon().rather.format(after, before)


def shift_label(facts: PredictorFacts, shift: Shift) -> str:
    """A shift from each row's own value: "10 years less than it is".

    A cap is put in brackets: "10 years less than it is (moved no lower than 0 years)".
    """
    say, steps = lexicon(), []
    if shift.times != 1:
        steps.append(_times_words(facts, shift.times))
    if shift.by != 0:
        side = say.shifted_less if shift.by < 0 else say.shifted_more
        steps.append(side.format(_amount(facts, abs(shift.by))))
    told = say.and_then.join(steps)
    # what is multiplied is so, not "than it is"
    if shift.by != 0 or not _is_multiplied(facts, shift.times):
        told = say.than_it_is.format(told)
    caps = []
    if shift.lowest is not None:
        caps.append(say.no_lower.format(value_label(facts, shift.lowest)))
    if shift.highest is not None:
        caps.append(say.no_higher.format(value_label(facts, shift.highest)))
    return say.moved.format(told, listed(caps)) if caps else told


def _is_multiplied(facts: PredictorFacts, times: float) -> bool:
    # of a predictor in percent, "10% more" could be read as ten points more
    return tidy(facts.unit) == "%" or not 0 < times <= 2


def _times_words(facts: PredictorFacts, times: float) -> str:
    if _is_multiplied(facts, times):
        return lexicon().times.format(quantity(times))
    side = lexicon().shifted_less if times < 1 else lexicon().shifted_more
    return side.format(quantity(100 * abs(times - 1), "%"))


def _amount(facts: PredictorFacts, size: float) -> str:
    if tidy(facts.unit) == "%":
        point = lexicon().point if quantity(size) == "1" else lexicon().points
        return f"{quantity(size)} {point}"
    return with_unit(size, facts.unit)


def moves_label(subject: Subject, moves: Moves) -> str:
    """The whole change as a heading: "Pipe age from 20 to 60 years; PVC against cast iron"."""
    told: list[str] = []
    for name, move in moves:
        facts = subject.predictor(name)
        if isinstance(move, Shift):
            text = shift_label(facts, move)
        elif facts.is_number:
            text = from_to(facts, move.start, move.end)
        else:
            ends = value_label(facts, move.end), value_label(facts, move.start)
            text = lexicon().against.format(*ends)
        told.append(f"{predictor_label(facts) if not told else predictor_name(facts)} {text}")
    return "; ".join(told)


def start_label(subject: Subject, moves: Moves) -> str:
    """Where a change starts: "pipe age 20 years", or "pipe age as it is" before a shift."""
    return _ends(subject, moves, "start")


def end_label(subject: Subject, moves: Moves) -> str:
    """Where a change ends: "pipe age 60 years"."""
    return _ends(subject, moves, "end")


def _ends(subject: Subject, moves: Moves, place: str) -> str:
    told = []
    for name, move in moves:
        facts = subject.predictor(name)
        if isinstance(move, Move):
            told.append(named_value(facts, getattr(move, place)))
        else:
            text = shift_label(facts, move) if place == "end" else lexicon().as_it_is
            told.append(f"{predictor_name(facts)} {text}")
    return listed(told)


def beyond_cautions(answer: ChangeAnswer) -> list[str]:
    """Where a change leaves the data's range; empty where it does not."""
    outside = ends_beyond(answer)
    if not outside:
        return []
    return [
        f"This change goes beyond the data: {listed(outside)}; there the model speaks on its own"
    ]


def ends_beyond(answer: ChangeAnswer) -> list[str]:
    """For each predictor that leaves the data's range, which of its values do."""
    moves, subject = dict(settled_moves(answer)), answer.subject
    return [
        told
        for name in answer.beyond
        if (told := _outside(subject, subject.predictor(name), moves[name]))
    ]


def _outside(subject: Subject, facts: PredictorFacts, move: Move | Shift) -> str:
    say, name = lexicon(), predictor_name(facts)
    if not facts.is_number and isinstance(move, Move):
        unseen = [
            value_label(facts, level)
            for level in dict.fromkeys((move.start, move.end))
            if facts.level_counts[facts.levels.index(level)] == 0
        ]
        return say.unseen.format(say.value.format(name, listed(unseen)))
    known = data_range(facts)
    if isinstance(move, Shift):
        cases = tidy(subject.outcome.cases)
        return say.once_shifted.format(name=name, cases=cases, known=known)
    ends = [
        value_label(facts, end)
        for end in dict.fromkeys((move.start, move.end))
        if not facts.minimum <= float(end) <= facts.maximum
    ]
    # a shift that takes some rows beyond the data may leave the profile within them
    return f"{say.value.format(name, listed(ends))} {known}" if ends else ""
