"""The lines of a printed table of odds ratios: headings, references, changes and tests.

The same for the picture and for the report table, so that both have the same rows.
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from typing import Literal

from plainodds.answers.odds import OddsAnswer, OddsRow
from plainodds.answers.odds_interactions import InteractionTest
from plainodds.model.predictors import PredictorFacts, Subject
from plainodds.phrases.joined_tests import interaction_line
from plainodds.phrases.labels import (
    change_label,
    given_clause,
    given_label,
    predictor_label,
    predictor_name,
    value_label,
)
from plainodds.phrases.lexicon import message
from plainodds.values import Pairs, Scalar

__all__ = ["Counts", "OddsLine", "odds_lines"]


@dataclass(frozen=True)
class Counts:
    """Events and cases of one level.

    Attributes
    ----------
    events : float or None
        nan where they are withheld; None where the fit doesn't carry its outcome.
    cases : float
    """

    events: float | None
    cases: float


@dataclass(frozen=True)
class OddsLine:
    """One line of the table.

    Attributes
    ----------
    kind : {"heading", "level", "reference", "entry", "test"}
        A heading names a predictor; a level has counts, and entries beneath it; a reference
        is what the entries are compared with; a test ends the lines of its predictor.
    predictor : str
    name, rest : str
        What the line is called, and what is read second of it.
    depth : {0, 1, 2}
        0 for a predictor, 1 beneath it, 2 beneath a level.
    level : str
        What the level is called that an entry of depth 2 stands beneath.
    counts : Counts or None
    rows : tuple of OddsRow
        An entry's, one for each model that has it.
    models : tuple of str
        The models that a reference belongs to.
    test : InteractionTest or None
    """

    kind: Literal["heading", "level", "reference", "entry", "test"]
    predictor: str
    name: str
    rest: str = ""
    depth: int = 0
    level: str = ""
    counts: Counts | None = None
    rows: tuple[OddsRow, ...] = ()
    models: tuple[str, ...] = ()
    test: InteractionTest | None = None


def odds_lines(answer: OddsAnswer) -> tuple[OddsLine, ...]:
    """The lines of all predictors, in the order of the answer's rows."""
    groups: dict[str, list[OddsRow]] = {}
    for row in answer.rows:
        groups.setdefault(row.predictor, []).append(row)
    return tuple(
        line for name, rows in groups.items() for line in _of_predictor(answer, name, rows)
    )


def _of_predictor(answer: OddsAnswer, name: str, rows: Sequence[OddsRow]) -> Iterator[OddsLine]:
    facts = answer.subject.predictor(name)
    slots = _slots(rows)
    shared, varies = _settings(slots)
    if not facts.is_number and len({row.start for row in rows}) == 1:
        yield from _levels(answer.subject, facts, slots, shared, varies)
    else:
        yield from _changes(answer.subject, facts, slots, shared, varies)
    if any(row.given for row in rows):
        for found in answer.interactions:
            if name in (found.predictor, found.modifier):
                told = interaction_line(answer.subject, name, found)
                yield OddsLine("test", name, told, depth=1, test=found)


def _slots(rows: Sequence[OddsRow]) -> list[tuple[OddsRow, ...]]:
    """Rows of one change in several models."""
    found: dict[tuple[object, ...], list[OddsRow]] = {}
    for row in rows:
        found.setdefault((row.start, row.end, row.per_step, row.given), []).append(row)
    return [tuple(slot) for slot in found.values()]


def _settings(slots: Sequence[tuple[OddsRow, ...]]) -> tuple[Pairs, bool]:
    """What all rows are given, and whether they are given anything else beside it."""
    givens = [slot[0].given for slot in slots]
    shared = tuple(pair for pair in givens[0] if all(pair in given for given in givens))
    return shared, len(set(givens)) > 1


def _levels(
    subject: Subject,
    facts: PredictorFacts,
    slots: Sequence[tuple[OddsRow, ...]],
    shared: Pairs,
    varies: bool,
) -> Iterator[OddsLine]:
    """Levels against one reference."""
    name, by = facts.name, _by(slots, shared)
    yield OddsLine("heading", name, predictor_label(facts), _rest(subject, "", shared, by))
    start = slots[0][0].start
    models = tuple(dict.fromkeys(row.model for slot in slots for row in slot))
    yield OddsLine(
        "reference", name, value_label(facts, start), depth=1, counts=_counts(facts, start),
        models=models,
    )  # fmt: skip
    by_level: dict[Scalar, list[tuple[OddsRow, ...]]] = {}
    for slot in slots:
        by_level.setdefault(slot[0].end, []).append(slot)
    for level, own in by_level.items():
        label, counts = value_label(facts, level), _counts(facts, level)
        if not varies:
            yield OddsLine("entry", name, label, depth=1, counts=counts, rows=own[0])
            continue
        yield OddsLine("level", name, label, depth=1, counts=counts)
        for slot in own:
            given = _own_given(subject, slot[0], shared, by)
            yield OddsLine("entry", name, given, depth=2, level=label, rows=slot)


def _changes(
    subject: Subject,
    facts: PredictorFacts,
    slots: Sequence[tuple[OddsRow, ...]],
    shared: Pairs,
    varies: bool,
) -> Iterator[OddsLine]:
    """Steps and two values of a number, or levels that have no reference in common."""
    name, heading, by = facts.name, predictor_label(facts), _by(slots, shared)
    changes = [change_label(facts, slot[0]) for slot in slots]
    one_change = len(set(changes)) == 1
    rest = _rest(subject, changes[0] if one_change else "", shared, by)
    if len(slots) == 1:
        yield OddsLine("entry", name, heading, rest, rows=slots[0])
        return
    yield OddsLine("heading", name, heading, rest)
    for slot, change in zip(slots, changes, strict=True):
        given = _own_given(subject, slot[0], shared, by) if varies else ""
        label = ", ".join(filter(None, ("" if one_change else change, given)))
        counts = _modifier_counts(subject, slot[0], shared) if one_change else None
        yield OddsLine("entry", name, label, depth=1, counts=counts, rows=slot)


def _by(slots: Sequence[tuple[OddsRow, ...]], shared: Pairs) -> str:
    """The one predictor whose value tells the lines apart; empty where there are more."""
    names = {name for slot in slots for name, held in slot[0].given if (name, held) not in shared}
    return names.pop() if len(names) == 1 else ""


def _rest(subject: Subject, change: str, shared: Pairs, by: str) -> str:
    """What all lines of a predictor share, as in "per 10 years more, by material"."""
    told = message("by {}", predictor_name(subject.predictor(by))) if by else ""
    return ", ".join(filter(None, (change, given_clause(subject, shared), told)))


def _own_given(subject: Subject, row: OddsRow, shared: Pairs, by: str) -> str:
    own = tuple(pair for pair in row.given if pair not in shared)
    if not own:
        return message("at every value")
    return value_label(subject.predictor(by), own[0][1]) if by else given_label(subject, own)


def _modifier_counts(subject: Subject, row: OddsRow, shared: Pairs) -> Counts | None:
    """Of the level of the one modifier that tells the rows apart: a subgroup's counts."""
    own = [pair for pair in row.given if pair not in shared]
    if len(own) != 1 or shared:
        return None
    ((name, level),) = own
    return _counts(subject.predictor(name), level)


def _counts(facts: PredictorFacts, level: Scalar) -> Counts | None:
    if not facts.level_cases or level not in facts.levels:
        return None
    place = facts.levels.index(level)
    events = facts.level_events[place] if facts.level_events else None
    return Counts(events, facts.level_cases[place])
