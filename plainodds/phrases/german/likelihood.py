"""Likelihood intervals of odds ratios in German, and ends that do not exist."""

from __future__ import annotations

from plainodds.answers.odds import OddsAnswer, OddsRow
from plainodds.phrases.german.parts import covariance, level_intervals
from plainodds.phrases.german.unbounded import ratio_figure
from plainodds.phrases.labels import listed
from plainodds.phrases.lexicon import lexicon
from plainodds.phrases.likelihood import names_open, open_ends
from plainodds.phrases.numbers import level_figures, ratio
from plainodds.phrases.parts import ratio_with_interval
from plainodds.phrases.unbounded import has_finite_estimate

__all__ = ["interval_method", "likelihood_cautions", "odds_ratio_words"]


def odds_ratio_words(row: OddsRow, level: float) -> str:
    """As in "2,02 (95-%-Intervall 1,08 bis 3,78)"; an end that does not exist is said to be none.

    Returns
    -------
    str
        "12,3 (95-%-Intervall ab 1,42, ohne obere Grenze)" where there is none.
    """
    open_below, open_above = open_ends(row)
    odds = row.odds_ratio
    if not has_finite_estimate(row) and odds.lower is None:
        return ratio_figure(odds.estimate)
    if not (open_below or open_above) or odds.lower is None or odds.upper is None:
        return ratio_with_interval(odds, level)
    told = "ohne Grenze auf beiden Seiten"
    if not open_below:
        told = f"ab {ratio(odds.lower)}, ohne obere Grenze"
    elif not open_above:
        told = f"bis {ratio(odds.upper)}, ohne untere Grenze"
    figure = ratio(odds.estimate) if has_finite_estimate(row) else ratio_figure(odds.estimate)
    return figure + lexicon().interval.format(level_figures(level), told)


def likelihood_cautions(answer: OddsAnswer) -> tuple[str, ...]:
    """What likelihood intervals are, and what an open end means; empty for Wald intervals."""
    if answer.question.interval != "likelihood":
        return ()
    told = [
        "Die Intervalle sind Likelihood-Intervalle: sie enthalten die Werte, unter denen die Daten "
        "noch etwa so gut erklärt sind wie unter dem besten"
    ]
    for place, end, further in ((1, "obere", "größeren"), (0, "untere", "kleineren")):
        names = names_open(answer, place)
        if names:
            told.append(
                f"Es gibt keine {end} Grenze bei {listed(names)}: die Daten schließen keinen "
                f"{further} Wert aus"
            )
    return tuple(told)


def interval_method(answer: OddsAnswer) -> str:
    """How intervals and tests are made, to follow a semicolon."""
    level, matrix = level_intervals(answer.question.level), covariance(answer.subject)
    if answer.question.interval == "likelihood":
        return (
            f"{level} sind Profil-Likelihood-Intervalle (Werte, deren neu angepasste Devianz "
            "innerhalb der Chi-Quadrat-Grenze des Minimums bleibt), p-Werte gehören zu "
            f"Likelihood-Quotienten-Tests, Standardfehler beruhen auf {matrix}"
        )
    return f"{level} sind Wald-Intervalle auf der Log-Skala, mit {matrix}"
