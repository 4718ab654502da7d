"""How a change moves predictors: from one value to another, or by a shift for everybody."""

from __future__ import annotations

import math
from collections.abc import Mapping
from typing import Any

import numpy as np
from numpy.typing import NDArray

from plainodds.answers.rebuilding import Mover
from plainodds.errors import QuestionRefused
from plainodds.model.design.design import Coded
from plainodds.model.fitted import FittedModel, checked
from plainodds.model.predictors import PredictorFacts
from plainodds.values import Scalar, plain, value

__all__ = [
    "Move",
    "Shift",
    "checked_moves",
    "refuse_empty_levels",
    "shifted",
    "shifting_mover",
    "stated_moves",
]


@value
class Move:
    """From one value to another, the same for everybody."""

    start: Scalar
    end: Scalar


@value
class Shift:
    """A change from each row's own value.

    Attributes
    ----------
    by : float
        What is added: −10 for "ten years younger".
    times : float
        What is multiplied first: 1.1 for "+10 %".
    lowest, highest : float or None
        A bound at which the shifted value is capped.

    Examples
    --------
    >>> Shift(by=-10, lowest=0).by
    -10
    """

    by: float = 0.0
    times: float = 1.0
    lowest: float | None = None
    highest: float | None = None


def stated_moves(
    moves: str | Mapping[str, Any], start: Any, end: Any
) -> tuple[tuple[str, Move | Shift], ...]:
    """What was stated, as moves: one predictor with its ends, or several that move together.

    Raises
    ------
    QuestionRefused
        If an end is missing or a move is neither (from, to) nor a Shift.
    """
    if isinstance(moves, str):
        if isinstance(start, Shift) and end is None:
            return ((moves, start),)
        if start is None or end is None:
            raise QuestionRefused(
                f"A change of {moves!r} needs from where to where, change({moves!r}, from, to), "
                f"or a shift, change({moves!r}, Shift(by=…))."
            )
        return ((moves, Move(plain(start), plain(end))),)
    if not isinstance(moves, Mapping) or start is not None or end is not None:
        raise QuestionRefused(
            "Name one predictor with from and to, or a mapping of predictors that move together: "
            "change({'age_years': (60, 0), 'material': ('cast iron', 'PVC')})."
        )
    return tuple((str(name), _stated_move(name, held)) for name, held in moves.items())


def _stated_move(name: str, held: Any) -> Move | Shift:
    if isinstance(held, Shift):
        return held
    if isinstance(held, tuple | list) and len(held) == 2:
        return Move(plain(held[0]), plain(held[1]))
    raise QuestionRefused(f"{name}: {held!r} is neither (from, to) nor a Shift.")


def checked_moves(
    model: FittedModel, moves: tuple[tuple[str, Move | Shift], ...]
) -> tuple[tuple[str, Move | Shift], ...]:
    """Moves whose values exist and which do change something.

    Raises
    ------
    QuestionRefused
        For an unknown predictor, level or value, a change from a value to itself, or a
        shift of a predictor that has levels.
    """
    if not moves:
        raise QuestionRefused("A change needs a predictor: change('age_years', 20, 60).")
    settled: list[tuple[str, Move | Shift]] = []
    for name, move in moves:
        facts = model.subject.predictor(name)
        if isinstance(move, Shift):
            _refuse_impossible(facts, move)
            settled.append((name, move))
        else:
            start, end = checked(facts, move.start), checked(facts, move.end)
            refuse_empty_levels(facts, (start, end))
            if start == end and len(moves) == 1:
                raise QuestionRefused(f"{name}: from {start!r} to {end!r} is no change.")
            settled.append((name, Move(start, end)))
    if all(isinstance(m, Move) and m.start == m.end for _, m in settled):
        raise QuestionRefused("Every predictor goes from a value to itself: that is no change.")
    return tuple(settled)


def refuse_empty_levels(facts: PredictorFacts, values: tuple[Scalar, Scalar]) -> None:
    """Refuse levels that no row has.

    Raises
    ------
    QuestionRefused
    """
    for level in values:
        if not facts.is_number and level not in facts.levels_with_rows:
            raise QuestionRefused(
                f"No row has {facts.name} = {level!r}, so nothing is known of its chance. Rows "
                f"have {', '.join(map(repr, facts.levels_with_rows))}."
            )


def _refuse_impossible(facts: PredictorFacts, shift: Shift) -> None:
    if not facts.is_number:
        raise QuestionRefused(
            f"{facts.name} has levels and cannot be shifted; name two of them: "
            f"change({facts.name!r}, {facts.levels[0]!r}, {facts.levels[-1]!r})."
        )
    for name in ("by", "times"):
        number = getattr(shift, name)
        if isinstance(number, str | bool) or not math.isfinite(number):
            raise QuestionRefused(f"{facts.name}: {name}={number!r} is not a number.")
    if shift.by == 0 and shift.times == 1:
        raise QuestionRefused(f"{facts.name}: a shift by 0 is no change.")
    if shift.lowest is not None and shift.highest is not None and shift.lowest >= shift.highest:
        raise QuestionRefused(
            f"{facts.name}: lowest={shift.lowest:g} is not below highest={shift.highest:g}."
        )


def shifted(facts: PredictorFacts, shift: Shift, x: NDArray[Any]) -> NDArray[Any]:
    """Each value shifted and capped.

    A value that lies beyond the cap already stays where it is.

    Raises
    ------
    QuestionRefused
        If the formula cannot be computed at some shifted value.
    """
    moved = np.asarray(x, dtype=float) * shift.times + shift.by
    if shift.lowest is not None:
        moved = np.maximum(moved, np.minimum(shift.lowest, x))
    if shift.highest is not None:
        moved = np.minimum(moved, np.maximum(shift.highest, x))
    low, high = facts.allowed
    if moved.min() < low or moved.max() > high:
        raise QuestionRefused(
            f"{facts.name}: the shift takes some rows to {moved.min():g} … {moved.max():g}, and "
            f"the formula can be computed from {low:g} to {high:g} only. Cap it: "
            f"Shift(by={shift.by:g}, times={shift.times:g}, lowest={low:g}, highest={high:g})."
        )
    return moved


def shifting_mover(
    model: FittedModel, moves: tuple[tuple[str, Move | Shift], ...], place: str
) -> Mover:
    """The mover to the moves' start or end, for changes with a shift among them.

    Parameters
    ----------
    place : {"start", "end"}
    """
    facts = {name: model.subject.predictor(name) for name, _ in moves}
    names = tuple(n for n, m in moves if isinstance(m, Move) or place == "end")

    def move(coded: Coded) -> Mapping[str, NDArray[Any]]:
        moved: dict[str, NDArray[Any]] = {}
        for name, each in moves:
            if isinstance(each, Move):
                code = model.coded_values(facts[name], (getattr(each, place),))
                moved[name] = np.repeat(code, len(coded[name]))
            elif place == "end":
                moved[name] = shifted(facts[name], each, coded[name])
        return moved

    return Mover(names, move)
