"""What an answer's subject already knows against it: levels with few cases, values never seen."""

from __future__ import annotations

from collections.abc import Iterable

from plainodds.answers.odds import OddsAnswer, OddsRow
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.parts import amount, cases, counted, level_name, short_list
from plainodds.phrases.choices.concerns import (
    counted_rows,
    few_levels,
    odds_spoken_of,
    unseen_told,
)
from plainodds.phrases.labels import listed, value_label
from plainodds.phrases.sentences import sentence
from plainodds.phrases.unbounded import one_outcome_told
from plainodds.phrases.units import tidy
from plainodds.values import Scalar

__all__ = ["counted_rows", "level_cautions", "sparse_cautions", "sparse_row", "unseen_cautions"]


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
    compared = [(row.predictor, level) for level in (row.end, row.start)]
    for (_, level), (events, of) in few_levels(subject, compared).items():
        told = counted(events, "event", "events")
        found.append(f"{value_label(facts, level)}: {told} in {amount(of)}")
    return ", ".join(found)


def sparse_cautions(answer: OddsAnswer) -> tuple[str, ...]:
    """That odds ratios hang on few cases, by level; empty where none does.

    Left out are rows without a finite odds ratio, of which this is said already, and rows of
    further models, whose cases may be others.
    """
    return _hanging("Odds ratios", answer.subject, odds_spoken_of(answer))


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
    found = few_levels(subject, held)
    if not found:
        return ()
    told = short_list(
        [
            f"{level_name(subject, name, level)} ({counted(events, 'event', 'events')} in "
            f"{cases(subject, of)})"
            for (name, level), (events, of) in found.items()
        ]
    )
    return (f"{figures} that speak of {told} hang on few cases of one outcome.",)


def unseen_cautions(answer: OddsAnswer) -> tuple[str, ...]:
    """That odds ratios speak of numbers beyond the data; empty where none does."""
    found = unseen_told(answer)
    if not found:
        return ()
    return (
        f"Some odds ratios go beyond the data: {short_list(found)}; there the model speaks on its "
        "own.",
    )
