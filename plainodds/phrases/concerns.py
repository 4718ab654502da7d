"""What an answer's subject already knows against it: levels with few cases, values never seen."""

from __future__ import annotations

from collections.abc import Iterable

from plainodds.answers.odds import OddsAnswer, OddsRow
from plainodds.model.predictors import PredictorFacts, Subject
from plainodds.phrases.checks.parts import amount, cases, counted, level_name, short_list
from plainodds.phrases.labels import listed, predictor_name, step_label, value_label
from plainodds.phrases.numbers import quantity
from plainodds.phrases.parts import sentence
from plainodds.phrases.unbounded import has_finite_estimate, one_outcome_told
from plainodds.phrases.units import tidy, with_unit
from plainodds.values import Scalar

__all__ = ["counted_rows", "level_cautions", "sparse_cautions", "sparse_row", "unseen_cautions"]

# as where levels are checked: cases of the rarer outcome; common practice, no source
_SPARSE = 5.0


def sparse_row(subject: Subject, row: OddsRow) -> str:
    """A short mark beside an odds ratio that hangs on few cases; empty where it doesn't.

    Parameters
    ----------
    subject : Subject
        Of the model that the row belongs to: levels are counted in its rows.
    row : OddsRow

    Returns
    -------
    str
        "PVC: 3 events in 14"; both levels where both have few cases of one outcome.
    """
    facts = subject.predictor(row.predictor)
    found = []
    for level in _levels(subject, row):
        counts = _few(subject, row.predictor, level)
        if counts is not None:
            events = counted(counts[0], "event", "events")
            found.append(f"{value_label(facts, level)}: {events} in {amount(counts[1])}")
    return ", ".join(found)


def counted_rows(answer: OddsAnswer) -> tuple[OddsRow, ...]:
    """The rows of the model in whose rows the answer's subject counts levels: the first one."""
    return tuple(row for row in answer.rows if row.model in ("", *answer.question.models[:1]))


def sparse_cautions(answer: OddsAnswer) -> tuple[str, ...]:
    """That odds ratios hang on few cases, by level; empty where none does.

    Left out are rows without a finite odds ratio, of which this is said already, and rows of
    further models, whose cases may be others.
    """
    held: list[tuple[str, Scalar]] = []
    for row in filter(has_finite_estimate, counted_rows(answer)):
        held += [(row.predictor, level) for level in (row.end, row.start)]
        held += row.given
    return _hanging("Odds ratios", answer.subject, held)


def level_cautions(
    subject: Subject, spoken_of: Iterable[tuple[str | None, Scalar | None]]
) -> tuple[str, ...]:
    """That figures speak of levels with one outcome only, or with few cases of one.

    Parameters
    ----------
    subject : Subject
    spoken_of : iterable of (predictor, level)
        What figures speak of; numbers, and pairs with None, are passed over.
    """
    held = [(name, level) for name, level in spoken_of if name is not None and level is not None]
    alone = {
        (name, level): told
        for name, level in held
        if not subject.predictor(name).is_number
        and (told := one_outcome_told(subject, name, level))
    }
    cautions = _hanging("Figures", subject, [each for each in held if each not in alone])
    if not alone:
        return cautions
    told = sentence(listed(list(dict.fromkeys(alone.values()))))
    return (
        f"{told.removesuffix('.')}: take what the model says of such "
        f"{tidy(subject.outcome.cases)} with care, intervals most of all.",
        *cautions,
    )


def _hanging(figures: str, subject: Subject, held: list[tuple[str, Scalar]]) -> tuple[str, ...]:
    """That figures hang on few cases of one outcome, with the levels that have so few."""
    found: dict[tuple[str, Scalar], str] = {}
    for name, level in held:
        counts = _few(subject, name, level) if level in _counted(subject, name) else None
        if counts is not None:
            events, of = counted(counts[0], "event", "events"), cases(subject, counts[1])
            found[name, level] = f"{level_name(subject, name, level)} ({events} in {of})"
    if not found:
        return ()
    told = short_list(list(found.values()))
    return (f"{figures} that speak of {told} hang on few cases of one outcome.",)


def unseen_cautions(answer: OddsAnswer) -> tuple[str, ...]:
    """That odds ratios speak of numbers beyond the data; empty where none does."""
    subject = answer.subject
    found: dict[str, None] = {}
    for row in answer.rows:
        facts = subject.predictor(row.predictor)
        if facts.is_number and row.per_step:
            # equal steps have one odds ratio, so that only the size of the step can be too large
            size = float(row.end) - float(row.start)
            if abs(size) > facts.maximum - facts.minimum:
                found[f"{predictor_name(facts)} {step_label(facts, size)} {_seen(facts)}"] = None
            held = row.given
        else:
            held = ((row.predictor, row.start), (row.predictor, row.end), *row.given)
        for name, value in held:
            its = subject.predictor(name)
            # false where the range is not known
            if its.is_number and (its.minimum > float(value) or its.maximum < float(value)):
                found[f"{predictor_name(its)} {value_label(its, value)} {_seen(its)}"] = None
    if not found:
        return ()
    return (
        f"Some odds ratios go beyond the data: {short_list(list(found))}; there the model speaks "
        "on its own.",
    )


def _seen(facts: PredictorFacts) -> str:
    return f"(the data have {quantity(facts.minimum)} to {with_unit(facts.maximum, facts.unit)})"


def _levels(subject: Subject, row: OddsRow) -> list[Scalar]:
    """The levels that a row compares, the one that the change leads to first."""
    known = _counted(subject, row.predictor)
    return [level for level in (row.end, row.start) if level in known]


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
