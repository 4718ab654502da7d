"""What is cautioned against: levels with few cases or one outcome, values never seen."""

from __future__ import annotations

from plainodds.answers.curve import CurveAnswer
from plainodds.answers.effects import EffectsAnswer
from plainodds.answers.odds import OddsAnswer, OddsRow
from plainodds.model.predictors import Subject
from plainodds.phrases.labels import data_range, named_value, predictor_name, step_label
from plainodds.phrases.unbounded import has_finite_estimate
from plainodds.values import Scalar

__all__ = [
    "Spoken",
    "counted_rows",
    "curve_spoken_of",
    "effects_spoken_of",
    "few_levels",
    "odds_spoken_of",
    "unseen_told",
]

Spoken = tuple[str | None, Scalar | None]
"""A predictor and a level that figures speak of; neither where there is none."""

# as where levels are checked: cases of the rarer outcome; common practice, no source
_SPARSE = 5.0


def odds_spoken_of(answer: OddsAnswer) -> list[tuple[str, Scalar]]:
    """What finite odds ratios of the first model speak of."""
    held: list[tuple[str, Scalar]] = []
    for row in filter(has_finite_estimate, counted_rows(answer)):
        held += [(row.predictor, level) for level in (row.end, row.start)]
        held += row.given
    return held


def curve_spoken_of(answer: CurveAnswer) -> list[Spoken]:
    """What a curve speaks of."""
    question = answer.question
    return [
        pair
        for line in answer.lines
        for pair in ((question.by, line.by), *((question.predictor, at) for at in line.at))
    ]


def effects_spoken_of(answer: EffectsAnswer) -> list[Spoken]:
    """What effects speak of."""
    return [
        pair
        for row in answer.rows
        for pair in (
            (row.predictor, row.end), (row.predictor, row.start), (answer.question.by, row.by)
        )
    ]  # fmt: skip


def few_levels(
    subject: Subject, held: list[tuple[str, Scalar]]
) -> dict[tuple[str, Scalar], tuple[float, float]]:
    """The levels of which either outcome is rare, with their events and cases."""
    found = {}
    for name, level in held:
        counts = _few(subject, name, level) if level in _counted(subject, name) else None
        if counts is not None:
            found[name, level] = counts
    return found


def counted_rows(answer: OddsAnswer) -> tuple[OddsRow, ...]:
    """The rows of the model in whose rows the answer's subject counts levels: the first one."""
    return tuple(row for row in answer.rows if row.model in ("", *answer.question.models[:1]))


def unseen_told(answer: OddsAnswer) -> list[str]:
    """Numbers beyond the data that odds ratios speak of, each with the data's range."""
    subject = answer.subject
    found: dict[str, None] = {}
    for row in answer.rows:
        facts = subject.predictor(row.predictor)
        if facts.is_number and row.per_step:
            # equal steps have one odds ratio, so that only the size of the step can be too large
            size = float(row.end) - float(row.start)
            if abs(size) > facts.maximum - facts.minimum:
                step = step_label(facts, size)
                found[f"{predictor_name(facts)} {step} {data_range(facts)}"] = None
            held = row.given
        else:
            held = ((row.predictor, row.start), (row.predictor, row.end), *row.given)
        for name, value in held:
            its = subject.predictor(name)
            # false where the range is not known
            if its.is_number and (its.minimum > float(value) or its.maximum < float(value)):
                found[f"{named_value(its, value)} {data_range(its)}"] = None
    return list(found)


def _counted(subject: Subject, name: str) -> tuple[Scalar, ...]:
    """The levels whose cases and events are known; none for numbers."""
    facts = subject.predictor(name)
    known = len(facts.level_events) == len(facts.levels) == len(facts.level_cases)
    return () if facts.is_number or not known else facts.levels


def _few(subject: Subject, name: str, level: Scalar) -> tuple[float, float] | None:
    """A level's events and cases where either outcome is rare; None where it isn't."""
    facts = subject.predictor(name)
    place = facts.levels.index(level)
    events, of = facts.level_events[place], facts.level_cases[place]
    return (events, of) if of > 0 and min(events, of - events) < _SPARSE else None
