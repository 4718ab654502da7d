"""Parts of sentences that several checks need: counts, lists of names, gaps."""

from __future__ import annotations

import math

from plainodds.answers.checks.finding import Unknown
from plainodds.model.predictors import Subject
from plainodds.phrases.labels import listed, named_value, predictor_name
from plainodds.phrases.lexicon import lexicon, message
from plainodds.phrases.numbers import count, guarded_count, percentage_points, quantity, wording
from plainodds.phrases.units import tidy
from plainodds.values import Scalar

__all__ = [
    "LISTED_AT_MOST",
    "WHY_NOT_KNOWN",
    "amount",
    "because",
    "cases",
    "cases_called",
    "coefficients",
    "columns_named",
    "counted",
    "gap",
    "level_name",
    "named",
    "part_of",
    "quoted",
    "rows",
    "short_list",
    "told_count",
]

LISTED_AT_MOST = 4
"""So many names, before only their number is told."""

WHY_NOT_KNOWN: dict[Unknown, str] = {
    "no rows": "the result carries its rows no longer",
    "no outcome": "the result carries its outcome no longer",
    "no covariance": "the fit has no covariance matrix, and so no standard errors",
    "no likelihood": "the fit does not stand at a plain maximum of the likelihood of rows drawn "
    "one by one",
    "no groups named": "nobody has said which rows belong together",
    "not said by the fit": "the result does not say",
    "rows chosen by outcome": "the rows were chosen by their outcome",
    "single rows": "it is about single rows, and these do not leave the notebook",
    "too few rows": "there are too few cases with the event, or too few without it",
}
"""Why something cannot be known, to follow "because"."""


def because(unknown: Unknown) -> str:
    """As in ", because the result carries its rows no longer"; empty where all is known."""
    return f", because {WHY_NOT_KNOWN[unknown]}" if unknown else ""


def amount(number: float) -> str:
    """Write a number of cases, which weights can make a broken one."""
    if math.isnan(number):
        return wording().not_known
    whole = round(number)
    return count(whole) if math.isclose(whole, number, abs_tol=1e-6) else quantity(number)


def counted(number: float, one: str, many: str) -> str:
    """As in "1 event", "14 events"."""
    written = amount(number)
    return f"{written} {one if written == '1' else many}"


def cases(subject: Subject, number: float) -> str:
    """As in "1 pipe", "14 pipes"."""
    return counted(number, _case_called(subject), cases_called(subject))


def cases_called(subject: Subject) -> str:
    """What many rows are called: "pipes"; another language may put a noun of its own before."""
    called = tidy(subject.outcome.cases)
    return message("cases") if called == "cases" else message("{cases}", cases=called)


def _case_called(subject: Subject) -> str:
    called = tidy(subject.outcome.case)
    return message("case") if called == "case" else message("{case}", case=called)


def told_count(subject: Subject, number: float) -> str:
    """A number of rows; "up to 10" in a guarded answer where it may be fewer."""
    if 0 < number <= subject.smallest_cell:
        return guarded_count(round(number), subject.smallest_cell)
    return amount(number)


def rows(number: float) -> str:
    """As in "1 row", "6,000 rows"."""
    return counted(number, "row", "rows")


def coefficients(number: int) -> str:
    """As in "1 coefficient", "6 coefficients"."""
    return counted(number, message("coefficient"), message("coefficients"))


def part_of(part: str, whole: str) -> str:
    """As in "3 of 14"."""
    return message("{part} of {whole}", part=part, whole=whole)


def quoted(name: str) -> str:
    """A name that is not the analyst's label, in quotation marks."""
    return message("“{}”", tidy(name))


def short_list(items: list[str], at_most: int = LISTED_AT_MOST) -> str:
    """Join as in speech; of many only the first, and how many more there are."""
    left = len(items) - at_most
    return listed([*items[:at_most], lexicon().further.format(left)]) if left > 1 else listed(items)


def named(subject: Subject, names: tuple[str, ...], at_most: int = LISTED_AT_MOST) -> str:
    """Predictors as within a sentence: "pipe age and material"."""
    return short_list([predictor_name(subject.predictor(name)) for name in names], at_most)


def columns_named(names: tuple[str, ...], at_most: int = LISTED_AT_MOST) -> str:
    """Columns of the design, as the fit's own table of coefficients calls them."""
    return short_list([quoted(name) for name in names], at_most)


def level_name(subject: Subject, predictor: str, level: Scalar) -> str:
    """As in "material PVC"."""
    return named_value(subject.predictor(predictor), level)


def gap(size: float) -> str:
    """A largest gap between chances: "3.4 percentage points"."""
    return percentage_points(abs(size))
