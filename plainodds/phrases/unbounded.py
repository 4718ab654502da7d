"""Odds ratios without a finite estimate, in words: why there is none, and what is known."""

from __future__ import annotations

import math

from plainodds.answers.estimate import Estimate
from plainodds.answers.odds import OddsAnswer, OddsRow
from plainodds.answers.profile import ProfileAnswer
from plainodds.model.predictors import Subject
from plainodds.phrases.labels import listed, predictor_name, value_label
from plainodds.phrases.lexicon import lexicon, message
from plainodds.phrases.numbers import confidence, count, ratio
from plainodds.phrases.parts import ratio_with_interval
from plainodds.phrases.units import tidy
from plainodds.values import Scalar

__all__ = [
    "has_finite_estimate",
    "odds_ratio_figures",
    "one_outcome",
    "one_outcome_told",
    "profile_unbounded_cautions",
    "ratio_or_none",
    "unbounded_cautions",
    "unbounded_note",
    "unbounded_told",
    "why_unbounded",
]


def has_finite_estimate(row: OddsRow) -> bool:
    """Whether an odds ratio is a number above 0."""
    return math.isfinite(row.log_odds_ratio.estimate)


def odds_ratio_figures(row: OddsRow) -> tuple[str, str]:
    """Figures of an odds ratio without a finite estimate, and of its interval.

    Returns
    -------
    tuple of str
        ("no finite value", "2.28 or more"), ("no value above 0", "0.42 or less"); the second
        is empty where there is no interval.
    """
    side, odds = row.log_odds_ratio.estimate, row.odds_ratio
    if side == math.inf:
        told = "" if odds.lower is None else lexicon().or_more.format(ratio(odds.lower))
        return message("no finite value"), told
    if side == -math.inf:
        told = "" if odds.upper is None else lexicon().or_less.format(ratio(odds.upper))
        return message("no value above 0"), told
    return ratio(odds.estimate), ""


def unbounded_note() -> str:
    """What such a figure means, beneath a picture."""
    return message(
        "No finite value: in these data the outcome of some cases is told without exception, so "
        "the best odds ratio lies farther off than any number."
    )


def ratio_or_none(odds: Estimate, level: float) -> str:
    """An odds ratio with its interval, or that it has no finite value.

    Returns
    -------
    str
        "2.02 (95% interval 1.08 to 3.78)", "no finite value (95% interval from 2.28, no upper
        end)".
    """
    if odds.se is not None or odds.estimate not in (0.0, math.inf):
        return ratio_with_interval(odds, level)
    between = f"{confidence(level)} interval"
    if odds.estimate == 0.0:
        told = "" if odds.upper is None else f" ({between} up to {ratio(odds.upper)}, from 0)"
        return f"no value above 0{told}"
    told = "" if odds.lower is None else f" ({between} from {ratio(odds.lower)}, no upper end)"
    return f"no finite value{told}"


def profile_unbounded_cautions(answer: ProfileAnswer) -> tuple[str, ...]:
    """That a profile's chance has no estimate short of certainty; empty where it has one."""
    points = [("this profile", answer.point)]
    if answer.comparison is not None:
        points.append(("the profile compared with", answer.start))
    outcome = answer.subject.outcome
    told = []
    for which, point in points:
        if math.isnan(point.limit):
            given = ", and the one given is where the fit happened to stop"
            if math.isnan(point.probability.estimate):
                given = ""
            told.append(
                f"The data leave the chance of {tidy(outcome.event)} for {which} open: any chance "
                f"would explain them as well{given}."
            )
        elif point.limit != 0:
            had, best = "had the event", "certainty"
            if point.limit < 0:
                had, best = "did not have the event", "no chance at all"
            told.append(
                f"In these data all {tidy(outcome.cases)} that the model tells apart as being like "
                f"{which} {had}, so that {best} would explain them best; the chance given is where "
                "the fit happened to stop, and its interval means little."
            )
    return tuple(told)


def unbounded_told(answer: OddsAnswer, row: OddsRow) -> str:
    """What is said of such an odds ratio, to follow what changes."""
    event = tidy(answer.subject.outcome.event)
    side, odds = row.log_odds_ratio.estimate, row.odds_ratio
    if math.isnan(side):
        return (
            f"the odds ratio for {event} is not known: the data leave it open, since any value "
            "would explain them as well"
        )
    told = f"the odds ratio for {event} has no finite estimate: {why_unbounded(answer, row)}"
    interval = f"{confidence(answer.question.level)} interval"
    if side > 0 and odds.lower is not None:
        told += f"; its {interval} goes from {ratio(odds.lower)} upwards without an end"
    if side < 0 and odds.upper is not None:
        told += f"; its {interval} goes from {ratio(odds.upper)} downwards to 0"
    return told


def why_unbounded(answer: OddsAnswer, row: OddsRow) -> str:
    """Which cases all have the same outcome; else that the predictors together tell it."""
    subject = answer.subject
    facts = subject.predictor(row.predictor)
    told = [
        words
        for level in (row.end, row.start)
        if not facts.is_number and (words := one_outcome_told(subject, row.predictor, level))
    ]
    if told:
        return listed(told)
    return (
        f"in these data {predictor_name(facts)}, alone or with other predictors, tells the outcome "
        f"of some {tidy(subject.outcome.cases)} without exception"
    )


def one_outcome(subject: Subject, name: str, level: Scalar) -> tuple[int, bool] | None:
    """How many cases a level has and whether all had the event; None unless all or none had."""
    facts = subject.predictor(name)
    if level not in facts.levels or not facts.level_events:
        return None
    place = facts.levels.index(level)
    cases, share = facts.level_cases[place], facts.level_events[place]
    number, share = round(cases), share / cases if cases else 0.5
    if number < 1 or math.isnan(share) or 1e-9 < share < 1 - 1e-9:
        return None
    return number, share > 0.5


def one_outcome_told(subject: Subject, name: str, level: Scalar) -> str:
    """Said of a level all of whose cases had the same outcome; else empty."""
    found = one_outcome(subject, name, level)
    if found is None:
        return ""
    number, with_event = found
    facts = subject.predictor(name)
    whom = f"with {predictor_name(facts)} {value_label(facts, level)}"
    if number == 1:
        had = "had" if with_event else "did not have"
        return f"the only {tidy(subject.outcome.case)} {whom} {had} the event"
    many = f"{count(number)} {tidy(subject.outcome.cases)} {whom} had the event"
    return f"all {many}" if with_event else f"none of the {many}"


def unbounded_cautions(answer: OddsAnswer) -> tuple[str, ...]:
    """What an odds ratio without a finite estimate means; empty where all have one."""
    without = [row for row in answer.rows if math.isinf(row.log_odds_ratio.estimate)]
    left_open = [row for row in answer.rows if math.isnan(row.log_odds_ratio.estimate)]
    told = []
    if without:
        told.append(
            f"There is no finite odds ratio for {_named(answer, without)}: the more extreme the "
            "value, the better it explains these data. More data, fewer levels or a penalised fit "
            "may give one."
        )
        with_interval = any(row.odds_ratio.lower is not None for row in without)
        if with_interval and answer.question.interval == "wald":
            told.append(
                "What is known of it comes from the likelihood: the values under which the data "
                "are still about as well explained."
            )
        known = [row for row in without if row.odds_ratio.lower is not None]
        if len(known) < len(without) and answer.question.interval == "wald":
            told.append(
                "Where the interval's finite end is missing, it was left out because so many of "
                'them take long to compute (interval="likelihood" computes them), or because '
                "the fit has no likelihood to compute it by."
            )
    if left_open:
        told.append(
            f"The odds ratio for {_named(answer, left_open)} is left open by the data: some "
            "predictors follow from others, or too many cases' outcome is told without exception."
        )
    return tuple(told)


def _named(answer: OddsAnswer, rows: list[OddsRow]) -> str:
    names = (predictor_name(answer.subject.predictor(row.predictor)) for row in rows)
    return listed(list(dict.fromkeys(names)))
