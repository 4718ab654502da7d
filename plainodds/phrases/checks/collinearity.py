"""Predictors that follow from each other, in words."""

from __future__ import annotations

import math

from plainodds.answers.checks.collinearity import CollinearityEvidence
from plainodds.answers.checks.finding import Finding
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.finding_words import (
    Figure,
    FindingWords,
    evidence_figures,
    evidence_words,
    made,
)
from plainodds.phrases.checks.parts import amount, columns_named, named
from plainodds.phrases.labels import predictor_label, predictor_name
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import ratio

__all__: list[str] = []


@evidence_words.register
def _(
    evidence: CollinearityEvidence, finding: Finding, subject: Subject, level: float
) -> FindingWords:
    finite = [each for each in evidence.inflation if math.isfinite(each[1])]
    worst = max(finite, key=lambda each: each[1], default=None)
    if "rank" in finding.reasons:
        step = (
            "Leave out one of what follows from the others and fit again: until then the data "
            "cannot tell these coefficients apart"
        )
        return made(finding, subject, _exact(evidence), step)
    stretched = ""
    if worst is not None:
        name = predictor_name(subject.predictor(worst[0]))
        stretched = (
            f"standard errors of {name} are {ratio(worst[1])} times as large as they would be if "
            "the other predictors told nothing of it"
        )
    if "tied" in finding.reasons:
        who = named(subject, finding.about)
        tie = "is nearly told by the others" if len(finding.about) == 1 else "move together closely"
        what = f"{who} {tie}; {stretched}" if stretched else f"{who} {tie}"
        step = (
            "Speak of these predictors together rather than of each alone, or leave one out if it "
            "means the same"
        )
        return made(finding, subject, what, step)
    what = "no predictor is nearly told by the others"
    if stretched:
        what += f": at most, {stretched}"
    return made(finding, subject, what, "Nothing needs doing about this")


def _exact(evidence: CollinearityEvidence) -> str:
    what = (
        f"of {amount(evidence.columns)} columns only {amount(evidence.rank)} say something of "
        "their own"
    )
    exact = [tie for tie in evidence.tied if math.isinf(tie.condition_index)]
    ties = [columns_named(tie.columns) for tie in exact if len(tie.columns) > 1]
    alone = [columns_named(tie.columns) for tie in exact if len(tie.columns) == 1]
    told = [f"{tie} follow from each other exactly" for tie in ties[:2]]
    told += [f"{column} says nothing at all" for column in alone[:2]]
    return f"{what}: {'; '.join(told)}" if told else what


@evidence_figures.register
def _(
    evidence: CollinearityEvidence, finding: Finding, subject: Subject, level: float
) -> list[Figure]:
    number, no_end = evidence.condition_number, message("no end")
    found: list[Figure] = [
        (message("Columns"), amount(evidence.columns)),
        (message("Independent columns"), amount(evidence.rank)),
        (message("Condition number"), no_end if math.isinf(number) else ratio(number)),
    ]
    for tie in evidence.tied:
        index = tie.condition_index
        told = message("condition index {}", ratio(index))
        if math.isinf(index):
            told = message("exactly")
        found.append((message("Tied: {}", columns_named(tie.columns)), told))
    for name, stretch in evidence.inflation:
        whose = predictor_label(subject.predictor(name))
        label = message("Standard errors of {} stretched by", whose)
        times = message("{} times", ratio(stretch))
        found.append((label, no_end if math.isinf(stretch) else times))
    return found
