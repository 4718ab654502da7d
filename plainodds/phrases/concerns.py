"""What an answer's subject already knows against it: levels with few cases of one outcome."""

from __future__ import annotations

from plainodds.answers.odds import OddsAnswer, OddsRow
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.parts import amount, cases, counted, level_name, short_list
from plainodds.phrases.labels import value_label
from plainodds.phrases.unbounded import has_finite_estimate
from plainodds.values import Scalar

__all__ = ["counted_rows", "sparse_cautions", "sparse_row"]

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
    subject = answer.subject
    found: dict[tuple[str, Scalar], str] = {}
    for row in filter(has_finite_estimate, counted_rows(answer)):
        held = [(row.predictor, level) for level in _levels(subject, row)]
        held += [(name, level) for name, level in row.given if level in _counted(subject, name)]
        for name, level in held:
            counts = _few(subject, name, level)
            if counts is not None:
                events, of = counted(counts[0], "event", "events"), cases(subject, counts[1])
                found[name, level] = f"{level_name(subject, name, level)} ({events} in {of})"
    if not found:
        return ()
    told = short_list(list(found.values()))
    return (f"Odds ratios that speak of {told} hang on few cases of one outcome.",)


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
