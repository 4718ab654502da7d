"""Separation in words: who tells the outcome of which rows without exception."""

from __future__ import annotations

import math

from plainodds.answers.checks.finding import Finding
from plainodds.answers.checks.separation import SeparationEvidence
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.finding_words import (
    Figure,
    FindingWords,
    evidence_figures,
    evidence_words,
    made,
)
from plainodds.phrases.checks.parts import (
    amount,
    coefficients,
    level_name,
    named,
    part_of,
    rows,
    short_list,
    told_count,
)
from plainodds.phrases.lexicon import lexicon, message
from plainodds.phrases.units import tidy

__all__ = ["told_without_exception"]


@evidence_words.register
def _(
    evidence: SeparationEvidence, finding: Finding, subject: Subject, level: float
) -> FindingWords:
    if evidence.kind == "none":
        what = (
            "no combination of predictors tells events from non-events without exception among "
            f"the {rows(evidence.all_rows)}"
        )
        return made(finding, subject, what, "Nothing needs doing about this")
    restrained = finding.concern == "keep in mind"
    # a penalty or constraint makes them finite
    have = "would have" if restrained else "have" if len(evidence.unbounded) > 1 else "has"
    otherwise = " without the penalty or constraints" if restrained else ""
    what = (
        f"{told_without_exception(evidence, subject)}; {coefficients(len(evidence.unbounded))} "
        f"{have} no finite estimate{otherwise}"
    )
    if restrained:
        return made(
            finding,
            subject,
            what,
            "Say that these figures rest on the penalty or the constraints as much as on the data",
            "That there are finite odds ratios here is the doing of the penalty or constraints "
            "alone",
        )
    step = (
        "See whether a predictor repeats the outcome in other words and leave it out; else merge "
        "levels, gather more data or fit with a penalty"
    )
    return made(finding, subject, what, step)


def told_without_exception(evidence: SeparationEvidence, subject: Subject) -> str:
    """Who tells the outcome of how many rows, and which levels have one outcome only."""
    return (
        f"{_who(evidence, subject)} the outcome of {_whose(evidence, subject)} without exception"
        f"{_levels(evidence, subject)}"
    )


def _who(evidence: SeparationEvidence, subject: Subject) -> str:
    if not evidence.predictors:
        return "the model tells"
    who = named(subject, evidence.predictors)
    return f"{who} {'together tell' if len(evidence.predictors) > 1 else 'tells'}"


def _whose(evidence: SeparationEvidence, subject: Subject) -> str:
    if evidence.rows == evidence.all_rows:
        return "the only row" if evidence.rows == 1 else f"all {rows(evidence.rows)}"
    return f"{told_count(subject, evidence.rows)} of {rows(evidence.all_rows)}"


def _levels(evidence: SeparationEvidence, subject: Subject) -> str:
    if not evidence.levels:
        return ""
    levels = [level_name(subject, name, held) for name, held in evidence.levels]
    cases = tidy(subject.outcome.cases)
    if len(levels) == 1:
        return f": all {cases} with {levels[0]} had the same outcome"
    told = short_list([f"within {level}" for level in levels])
    return f": {told}, all {cases} had the same outcome"


@evidence_figures.register
def _(
    evidence: SeparationEvidence, finding: Finding, subject: Subject, level: float
) -> list[Figure]:
    kinds = {
        "none": lexicon().no,
        "quasi-complete": message("some rows"),
        "complete": message("all rows"),
    }
    told, every_row = told_count(subject, evidence.rows), amount(evidence.all_rows)
    patterns, every_pattern = told_count(subject, evidence.patterns), amount(evidence.all_patterns)
    return [
        (message("Outcome told without exception"), kinds[evidence.kind]),
        (message("Rows so told"), part_of(told, every_row)),
        (message("Different rows so told"), part_of(patterns, every_pattern)),
        *(
            (message("Coefficient “{}”", tidy(name)), _side(float(side)))
            for name, side in evidence.unbounded
        ),
    ]


def _side(limit: float) -> str:
    if math.isnan(limit):
        return message("left open by the data")
    return message("no upper end") if limit > 0 else message("no lower end")
