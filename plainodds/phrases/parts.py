"""Parts of sentences that every answer needs: intervals, cautions, who is spoken of."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterable

from plainodds.answers.estimate import Estimate
from plainodds.model.predictors import OutcomeFacts, Subject
from plainodds.phrases.labels import listed, named_value
from plainodds.phrases.languages import in_language
from plainodds.phrases.lexicon import lexicon
from plainodds.phrases.numbers import (
    cases,
    cases_apart_in,
    cases_on_sides,
    chance,
    count,
    frequency,
    level_figures,
    percentage_points,
    points_on_sides,
    points_span,
    quantity,
    ratio,
    ratio_interval,
    signed,
    span,
    told_apart,
    wording,
)
from plainodds.phrases.sentences import sentence
from plainodds.phrases.stakes import stakes_cautions
from plainodds.phrases.units import tidy
from plainodds.values import Pairs

__all__ = [
    "BEYOND_SAYING",
    "RARE",
    "article",
    "association",
    "beyond_saying",
    "case_words",
    "cases_with_interval",
    "chance_with_interval",
    "counted_rows",
    "covariance_words",
    "difference_with_interval",
    "interval",
    "is_beyond_saying",
    "model_cautions",
    "odds_ratio_cautions",
    "points_with_interval",
    "profile_words",
    "rather",
    "ratio_with_interval",
    "rows_words",
    "say_level_once",
    "signed_with_interval",
    "standard_error",
    "typical_case",
    "typical_words",
]

_COVARIANCE = {
    "nonrobust": "the model-based covariance matrix",
    "cluster": "a cluster-robust covariance matrix",
    "robust": "a robust (sandwich) covariance matrix",
    "naive": "the model-based (naive) covariance matrix",
    "bias_reduced": "a bias-reduced robust covariance matrix",
    "fixed scale": "the model-based covariance matrix with its scale fixed",
    "hac-groupsum": "a covariance matrix robust to autocorrelation across groups (HAC)",
    "hac-panel": "a covariance matrix robust to autocorrelation within panels (HAC)",
    "HAC": "a covariance matrix robust to heteroscedasticity and autocorrelation (HAC)",
}
_LISTED_AT_MOST = 8
BEYOND_SAYING = 1000
RARE = 0.10


def association(subject: Subject) -> str:
    """Whether the figures speak of what goes together, or of what follows from what."""
    if subject.setting.causal:
        return (
            "The figures are read as effects on the analyst's word, for this reason: "
            f"{subject.setting.reason.rstrip('.')}. The model itself cannot tell an effect from "
            "an association."
        )
    return (
        "These figures say what goes with what in the data; they do not say what would follow "
        "if a value were changed on purpose."
    )


def article(noun: str) -> str:
    """Put "a" or "an" before a noun.

    Examples
    --------
    >>> article("pipe"), article("observation"), article("hour"), article("unit")
    ('a pipe', 'an observation', 'an hour', 'a unit')
    """
    noun = tidy(noun)
    start = noun.lower()
    if start.startswith(("hour", "heir", "honest", "honour")):
        return f"an {noun}"
    if start.startswith(("uni", "use", "usu", "eu", "one")) and not start.startswith("unin"):
        return f"a {noun}"
    return f"an {noun}" if start.startswith(("a", "e", "i", "o", "u")) else f"a {noun}"


def interval(estimate: Estimate, say: Callable[[float, float], str], level: float) -> str:
    """The interval in brackets, to follow an estimate; empty where there is none."""
    if estimate.lower is None or estimate.upper is None:
        return ""
    if math.isnan(estimate.lower) or math.isnan(estimate.upper):
        return lexicon().interval.format(level_figures(level), wording().not_known)
    return lexicon().interval.format(level_figures(level), say(estimate.lower, estimate.upper))


def chance_with_interval(estimate: Estimate, level: float) -> str:
    """As in "23% (95% interval 18% to 29%)"."""
    return chance(estimate.estimate) + interval(estimate, span, level)


def cases_with_interval(difference: Estimate, over: int, level: float) -> str:
    """As in "7 more in 100 (95% interval 2 to 12 more)"."""

    def ends(lower: float, upper: float) -> str:
        return cases_on_sides(lower, upper, over)

    return cases_apart_in(difference.estimate, over) + interval(difference, ends, level)


def ratio_with_interval(estimate: Estimate, level: float) -> str:
    """As in "2.02 (95% interval 1.08 to 3.78)"."""
    return ratio(estimate.estimate) + interval(estimate, ratio_interval, level)


def signed_with_interval(estimate: Estimate, level: float) -> str:
    """As in "+0.42 (95% interval +0.10 to +0.74)"."""
    return signed(estimate.estimate) + interval(estimate, _signed_range, level)


def _signed_range(lower: float, upper: float) -> str:
    return wording().to.format(signed(lower), signed(upper))


def standard_error(estimate: Estimate) -> str:
    """The standard error, to be listed after an estimate; empty where there is none."""
    if estimate.se is None:
        return ""
    return lexicon().standard_error.format(signed(estimate.se).lstrip("+"))


def difference_with_interval(estimate: Estimate, level: float) -> str:
    """As in "3.4 percentage points higher (95% interval 1.2 to 5.6 higher)"."""
    difference = estimate.estimate
    if math.isnan(difference):
        told = lexicon().points_not_known
    elif difference == 0:
        told = lexicon().no_difference
    else:
        side = wording().higher if difference > 0 else wording().lower
        told = side.format(percentage_points(abs(difference)))
    return told + interval(estimate, points_on_sides, level)


def points_with_interval(estimate: Estimate, level: float) -> str:
    """As in "+3.4 percentage points (95% interval 1.2 to 5.6 percentage points)"."""
    told = percentage_points(estimate.estimate, sign=True)
    return told + interval(estimate, points_span, level)


def say_level_once(told: list[str], level: float) -> list[str]:
    """Name the confidence level only in the first of several texts that has an interval."""
    opening = lexicon().interval.format(level_figures(level), "\0").partition("\0")[0].lstrip()
    first = next((place for place, text in enumerate(told) if opening in text), len(told))
    return [*told[: first + 1], *(text.replace(opening, "(") for text in told[first + 1 :])]


def rows_words(subject: Subject) -> str:
    """How many rows the fit used: "6,000 rows"."""
    return counted_rows(subject.rows)


def counted_rows(rows: int, told: str = "") -> str:
    """So many rows, in the number that grammar asks for; `told` where the count is guarded."""
    told = told or count(rows)
    return lexicon().row if told == "1" else lexicon().rows.format(told)


def covariance_words(subject: Subject) -> str:
    """The covariance that the intervals rest on."""
    kind = tidy(subject.covariance_kind)
    if kind.upper().startswith("HC") and kind[2:].isdigit():
        return f"a covariance matrix robust to heteroscedasticity ({kind.upper()})"
    return _COVARIANCE.get(kind, f"the covariance matrix of kind “{kind}”")


def is_beyond_saying(odds_ratio: Estimate) -> bool:
    """Whether an odds ratio is so far from 1 that only its limit is written."""
    number = odds_ratio.estimate
    return number > BEYOND_SAYING or number < 1 / BEYOND_SAYING


def beyond_saying(found: str) -> str:
    """What an odds ratio that is so far from 1 mostly means; `found` says whose it is."""
    return (
        f"An odds ratio beyond {quantity(1 / BEYOND_SAYING)} or {count(BEYOND_SAYING)}, as for "
        f"{found}, "
        "mostly means that in these data the predictors settle the outcome without exception, or "
        "that the change it speaks of is far too large."
    )


def odds_ratio_cautions(chances: Iterable[float]) -> tuple[str, ...]:
    """That an odds ratio is no ratio of chances, where these chances are common."""
    if not any(each > RARE for each in chances):
        return ()
    return (
        "An odds ratio is not a ratio of chances: where chances are above about 10%, as here, it "
        "lies further from 1 than the ratio of the chances does",
    )


@in_language
def model_cautions(subject: Subject, *, offset_held: bool = True) -> tuple[str, ...]:
    """What holds for every answer of this fitted model.

    `offset_held` is false where each row keeps its own offset.
    """
    cautions = []
    if subject.no_interval:
        cautions.append("No intervals can be given here.")
        cautions.append(sentence(subject.no_interval))
    if subject.offset is not None:
        held = f"here it is held at {quantity(subject.offset)}"
        if not offset_held:
            held = "here each row keeps its own"
        cautions.append(f"The model has an offset, an amount that is taken as known; {held}.")
    cautions += _sampling_cautions(subject)
    cautions += (sentence(notice) for notice in subject.notices)
    return (*cautions, *stakes_cautions(subject.outcome))


def _sampling_cautions(subject: Subject) -> list[str]:
    if subject.prevalence is not None:
        return [
            "The sample was chosen by its outcome (case-control), so every chance is corrected to "
            f"a stated share of {tidy(subject.outcome.event)} in the population of "
            f"{quantity(100 * subject.prevalence, '%')}, and averages are weighed to it; odds "
            "ratios at given values need no correction."
        ]
    if subject.sampling == "case-control":
        return [
            "The sample was chosen by its outcome (case-control), so it tells odds ratios but no "
            "chances."
        ]
    return []


def profile_words(subject: Subject, values: Pairs, *, at_most: int = _LISTED_AT_MOST) -> str:
    """Values in a row of words: "pipe age 40 years, material PVC and soil low".

    More than `at_most` are cut short, and the text says how many are left out.
    """
    told = [named_value(subject.predictor(name), held) for name, held in values]
    left = len(told) - at_most
    if left > 1:
        told = [*told[:at_most], lexicon().further.format(left)]
    return listed(told)


def rather(here: float, there: float, over: int) -> str:
    """As in "12% rather than 7%, that is 12 rather than 7 in 100"."""
    after, before = told_apart(here, there)
    say = lexicon()
    if after == before:
        return say.either_way.format(after)
    told = say.rather.format(after, before)
    often, seldom = cases(here, over), cases(there, over)
    if often == seldom:
        return told
    return say.that_is.format(told, say.rather.format(often, frequency(there, over)))


def typical_case(outcome: OutcomeFacts) -> str:
    """Who is typical: "a typical pipe"."""
    return f"a typical {tidy(outcome.case)}"


def case_words(
    subject: Subject, chosen: Pairs, *, whole: bool, at_most: int = _LISTED_AT_MOST
) -> str:
    """Whom stated values describe: "a pipe with pipe age 40 years, otherwise typical".

    `whole` where no other predictor is left.
    """
    if not chosen:
        return typical_case(subject.outcome)
    text = f"{article(subject.outcome.case)} with {profile_words(subject, chosen, at_most=at_most)}"
    return text if whole else f"{text}, otherwise typical"


def typical_words(subject: Subject) -> str:
    """At which values a typical case's predictors are."""
    chosen = any(stated.typical is not None for _, stated in subject.setting.predictors)
    values = "median or most frequent level"
    return f"with every predictor at its {'typical value' if chosen else values}"
