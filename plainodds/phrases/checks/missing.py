"""Rows left out for missing values, in words."""

from __future__ import annotations

import math

from plainodds.answers.checks.amount import MissingEvidence
from plainodds.answers.checks.finding import Finding
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.finding_words import (
    Figure,
    FindingWords,
    evidence_figures,
    evidence_words,
    made,
)
from plainodds.phrases.checks.parts import because, quoted
from plainodds.phrases.labels import predictor_label, predictor_name, sentence_case
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import chance, count, guarded_count
from plainodds.phrases.parts import difference_with_interval

__all__: list[str] = []


@evidence_words.register
def _(evidence: MissingEvidence, finding: Finding, subject: Subject, level: float) -> FindingWords:
    if not evidence.dropped:
        what = (
            "the fit left out no row for a missing value; rows taken out before the fit cannot be "
            "counted here"
        )
        return made(finding, subject, what, "Say so if rows were taken out before the fit")
    what = _left_out(evidence, subject) + _outcome(evidence, finding, level)
    step = "Say how many rows were left out, and that figures hold for the others"
    if finding.reasons:
        step = (
            "Find out why values are missing, compare with a fit after multiple imputation, and "
            "say of whom figures hold"
        )
    return made(finding, subject, what, step)


def _left_out(evidence: MissingEvidence, subject: Subject) -> str:
    every = evidence.used + evidence.dropped
    often = ""
    if evidence.columns:
        name, number = evidence.columns[0]
        most = "most often in" if len(evidence.columns) > 1 else "in"
        often = f", {most} {_column(name, subject)}"
        told = guarded_count(int(number), subject.smallest_cell)
        often += f" ({told})" if number < evidence.dropped else ""
    if evidence.dropped <= subject.smallest_cell:
        few = guarded_count(evidence.dropped, subject.smallest_cell)
        return f"in {few} rows something was missing{often}, and they were left out"
    return (
        f"in {chance(evidence.dropped / every)} of rows ({count(evidence.dropped)} of "
        f"{count(every)}) something was missing{often}, and they were left out"
    )


def _outcome(evidence: MissingEvidence, finding: Finding, level: float) -> str:
    if evidence.difference is None:
        if not evidence.known:
            return "; whether the event was as common among them is not known"
        return (
            f"; whether the event was as common among them is not known{because(finding.unknown)}"
        )
    among = "them"
    if evidence.known < evidence.dropped:
        among = f"the {count(evidence.known)} of them whose outcome is known"
        if evidence.known == 1:
            among = "the only one of them whose outcome is known"
    return (
        f"; among {among} the share of events was "
        f"{difference_with_interval(evidence.difference, level)} than among the rows used"
        if evidence.difference.estimate
        else f"; among {among} the share of events was the same as among the rows used"
    )


def _column(name: str, subject: Subject) -> str:
    if name == subject.outcome.name:
        return message("the outcome")
    for facts in subject.predictors:
        if facts.name == name:
            return predictor_name(facts)
    return quoted(name)


@evidence_figures.register
def _(evidence: MissingEvidence, finding: Finding, subject: Subject, level: float) -> list[Figure]:
    found: list[Figure] = [
        (message("Rows used"), count(evidence.used)),
        (message("Rows left out"), guarded_count(evidence.dropped, subject.smallest_cell)),
    ]
    labels = {facts.name: predictor_label(facts) for facts in subject.predictors}
    for name, number in evidence.columns:
        label = labels.get(name) or sentence_case(_column(name, subject))
        found.append(
            (message("Missing: {}", label), guarded_count(int(number), subject.smallest_cell))
        )
    if not evidence.dropped:
        return found
    known = guarded_count(evidence.known, subject.smallest_cell)
    found.append((message("Left out, outcome known"), known))
    if not math.isnan(evidence.share_used):
        found.append((message("Share of events, rows used"), chance(evidence.share_used)))
    if evidence.difference is not None:
        found += [
            (message("Share of events, rows left out"), chance(evidence.share_dropped)),
            (message("Difference"), difference_with_interval(evidence.difference, level)),
        ]
    return found
