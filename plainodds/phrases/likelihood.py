"""Likelihood intervals of odds ratios in words, and ends that do not exist."""

from __future__ import annotations

import math

from plainodds.answers.odds import OddsAnswer, OddsRow
from plainodds.phrases.labels import listed, predictor_name
from plainodds.phrases.numbers import confidence, ratio
from plainodds.phrases.parts import covariance_words, ratio_with_interval
from plainodds.phrases.unbounded import has_finite_estimate, odds_ratio_figures

__all__ = ["interval_method", "likelihood_cautions", "names_open", "odds_ratio_words", "open_ends"]


def odds_ratio_words(row: OddsRow, level: float) -> str:
    """As in "2.02 (95% interval 1.08 to 3.78)"; an end that does not exist is said to be none.

    Returns
    -------
    str
        "12.3 (95% interval from 1.42, no upper end)" where there is none.
    """
    open_below, open_above = open_ends(row)
    odds = row.odds_ratio
    if not has_finite_estimate(row) and odds.lower is None:
        return odds_ratio_figures(row)[0]
    if not (open_below or open_above) or odds.lower is None or odds.upper is None:
        return ratio_with_interval(odds, level)
    told = "without an end on either side"
    if not open_below:
        told = f"from {ratio(odds.lower)}, no upper end"
    elif not open_above:
        told = f"up to {ratio(odds.upper)}, no lower end"
    figure = odds_ratio_figures(row)[0]
    return f"{figure} ({confidence(level)} interval {told})"


def open_ends(row: OddsRow) -> tuple[bool, bool]:
    """Whether an end does not exist; on the log scale, since exp of a large number overflows."""
    logs = row.log_odds_ratio
    return logs.lower == -math.inf, logs.upper == math.inf


def names_open(answer: OddsAnswer, place: int) -> list[str]:
    """The predictors of which an interval has no lower end (place 0), or no upper one (1)."""
    found = (row for row in answer.rows if open_ends(row)[place])
    names = (predictor_name(answer.subject.predictor(row.predictor)) for row in found)
    return list(dict.fromkeys(names))


def likelihood_cautions(answer: OddsAnswer) -> tuple[str, ...]:
    """What likelihood intervals are, and what an open end means; empty for Wald intervals."""
    if answer.question.interval != "likelihood":
        return ()
    told = [
        "The intervals are likelihood intervals: they hold the values under which the data are "
        "still about as well explained as under the best one."
    ]
    for place, end, further in ((1, "upper", "larger"), (0, "lower", "smaller")):
        names = names_open(answer, place)
        if names:
            told.append(
                f"There is no {end} end for {listed(names)}: the data do not rule out any "
                f"{further} value."
            )
    return tuple(told)


def interval_method(answer: OddsAnswer) -> str:
    """How intervals and tests are made, to follow a semicolon."""
    level = confidence(answer.question.level)
    if answer.question.interval == "likelihood":
        return (
            f"{level} intervals are profile-likelihood intervals (values whose refitted deviance "
            "is within the chi-squared limit of the minimum), p-values are of likelihood-ratio "
            f"tests, standard errors rest on {covariance_words(answer.subject)}"
        )
    return (
        f"{level} intervals are Wald intervals on the log scale, with "
        f"{covariance_words(answer.subject)}"
    )
