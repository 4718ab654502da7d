"""Standard errors that are missing or absurd, in words."""

from __future__ import annotations

import math

from plainodds.answers.checks.finding import Finding
from plainodds.answers.checks.standard_errors import StandardErrorsEvidence
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.finding_words import (
    Figure,
    FindingWords,
    evidence_figures,
    evidence_words,
    made,
)
from plainodds.phrases.checks.parts import amount, coefficients, columns_named
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import ratio
from plainodds.phrases.units import tidy

__all__: list[str] = []


def _unit() -> str:
    return message("log odds for one standard deviation of the column")


@evidence_words.register
def _(
    evidence: StandardErrorsEvidence, finding: Finding, subject: Subject, level: float
) -> FindingWords:
    wide = evidence.wide
    columns = tuple(each.column for each in wide)
    if "missing" in finding.reasons:
        have = "has" if len(wide) == 1 else "have"
        what = f"{coefficients(len(wide))} {have} no standard error: {columns_named(columns)}"
        step = (
            "See whether predictors follow from each other or the fit did not converge, mend that "
            "and fit again"
        )
        why = "Without a standard error nobody can say how sure an odds ratio is"
        return made(finding, subject, what, step, why)
    if "absurd" in finding.reasons:
        more = f"; {amount(len(wide) - 1)} more {_are(len(wide) - 1)} hardly known either"
        what = (
            f"the coefficient {columns_named(columns[:1])} is hardly known, with a standard error "
            f"of {ratio(wide[0].se_per_spread)} in {_unit()}{more if len(wide) > 1 else ''}"
        )
        step = (
            "See whether outcomes are told without exception, predictors follow from each other "
            "or a level has few cases; until then say nothing of its size"
        )
        return made(finding, subject, what, step)
    what = (
        "every coefficient has a standard error; the largest is "
        f"{ratio(evidence.largest_per_spread)} in {_unit()}"
    )
    return made(finding, subject, what, "Nothing needs doing about this")


def _are(number: int) -> str:
    return "is" if number == 1 else "are"


@evidence_figures.register
def _(
    evidence: StandardErrorsEvidence, finding: Finding, subject: Subject, level: float
) -> list[Figure]:
    largest, unit = ratio(evidence.largest_per_spread), _unit()
    found: list[Figure] = [(message("Largest standard error ({})", unit), largest)]
    for each in evidence.wide:
        told = message("missing")
        if not math.isnan(each.se):
            sizes = ratio(each.se), ratio(each.se_per_spread)
            told = message("{}, that is {} in {}", *sizes, unit)
        found.append((message("Standard error of “{}”", tidy(each.column)), told))
    return found
