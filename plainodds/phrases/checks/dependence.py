"""Rows that belong together, in words."""

from __future__ import annotations

from plainodds.answers.checks.dependence import DependenceEvidence, StandardErrorPair
from plainodds.answers.checks.finding import Finding
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.finding_words import (
    Figure,
    FindingWords,
    evidence_figures,
    evidence_words,
    made,
)
from plainodds.phrases.checks.parts import amount, because, counted, quoted, rows
from plainodds.phrases.choices.checks import farthest_pair
from plainodds.phrases.lexicon import lexicon, message
from plainodds.phrases.numbers import ratio
from plainodds.phrases.units import tidy

__all__: list[str] = []

_ALREADY = "the fit's own standard errors already count rows of a group together"


@evidence_words.register
def _(
    evidence: DependenceEvidence, finding: Finding, subject: Subject, level: float
) -> FindingWords:
    return made(finding, subject, _what(evidence, finding), _next(evidence, finding))


def _what(evidence: DependenceEvidence, finding: Finding) -> str:
    if not evidence.name:
        return _ALREADY
    by = f"“{tidy(evidence.name)}”"
    if evidence.largest <= 1:
        return f"by {by} every row stands alone, so no rows belong together"
    groups = counted(evidence.groups, "group", "groups")
    what = (
        f"the {rows(evidence.rows)} belong to {groups} by {by}, the largest of them with "
        f"{rows(evidence.largest)}"
    )
    worst = farthest_pair(evidence)
    if evidence.already:
        what += f"; {_ALREADY}"
    elif worst is None:
        what += f"; what that does to standard errors is not known{because(finding.unknown)}"
    elif "standard errors differ" in finding.reasons:
        column, sizes = tidy(worst.column), _sizes(worst)
        what += f"; counting them together, the standard error of “{column}” is {sizes}"
    else:
        what += (
            "; counting them together changes standard errors by no more than matters, or than "
            f"chance explains: most that of “{tidy(worst.column)}”, {_sizes(worst)}"
        )
    if "few groups" in finding.reasons:
        what += "; so few groups are too few to tell it well"
    return what


def _sizes(pair: StandardErrorPair) -> str:
    return f"{ratio(pair.by_groups)} rather than {ratio(pair.model_based)}"


def _next(evidence: DependenceEvidence, finding: Finding) -> str:
    if finding.concern == "nothing found":
        return "Nothing needs doing about this"
    if evidence.already:
        return "Gather more groups, or call these intervals too short rather than too long"
    if finding.reasons == ("few groups",):
        return "Call intervals rough, and use a method made for few groups if much hangs on them"
    return (
        "Fit again with standard errors by groups (`cov_type='cluster'`) or with a model of the "
        "groups, and explain that fit"
    )


@evidence_figures.register
def _(
    evidence: DependenceEvidence, finding: Finding, subject: Subject, level: float
) -> list[Figure]:
    found: list[Figure] = []
    if evidence.name:
        found += [
            (message("Groups named by"), quoted(evidence.name)),
            (message("Groups"), amount(evidence.groups)),
            (message("Rows of the largest group"), amount(evidence.largest)),
        ]
    already = lexicon().yes if evidence.already else lexicon().no
    found.append((message("Groups counted by the fit itself"), already))
    return found + [
        (
            message("Standard error of “{}”", tidy(pair.column)),
            message(
                "{} as strangers, {} by groups", ratio(pair.model_based), ratio(pair.by_groups)
            ),
        )
        for pair in evidence.standard_errors
    ]
