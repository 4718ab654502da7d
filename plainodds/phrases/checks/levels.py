"""Levels with few cases of either outcome, in words."""

from __future__ import annotations

import math

from plainodds.answers.checks.amount import LevelCount, LevelsEvidence
from plainodds.answers.checks.finding import Finding
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.finding_words import (
    Figure,
    FindingWords,
    evidence_figures,
    evidence_words,
    made,
)
from plainodds.phrases.checks.parts import amount, because, cases, counted, level_name, short_list
from plainodds.phrases.labels import sentence_case
from plainodds.phrases.lexicon import message

__all__: list[str] = []

_LISTED_AT_MOST = 3


@evidence_words.register
def _(evidence: LevelsEvidence, finding: Finding, subject: Subject, level: float) -> FindingWords:
    counts = evidence.counts
    if not counts:
        what = "the model has no categories and no yes/no predictors, so there are no levels"
        return made(finding, subject, what, "Nothing needs doing about this")
    if finding.unknown:
        fewest = min(counts, key=lambda each: each.cases)
        what = (
            "how many cases of each level had the event is not known"
            f"{because(finding.unknown)}; {_name(subject, fewest)} has the fewest cases, "
            f"{amount(fewest.cases)}"
        )
        return made(finding, subject, what, "Count events for each level in the data themselves")
    if not evidence.sparse:
        rarest = min(counts, key=lambda each: min(each.events, each.cases - each.events))
        what = (
            "every level has at least "
            f"{amount(min(rarest.events, rarest.cases - rarest.events))} cases with the event and "
            "as many without it"
        )
        return made(finding, subject, what, "Nothing needs doing about this")
    sparse = counts[: evidence.sparse]
    told = [f"{_name(subject, each)} ({_events(subject, each)})" for each in sparse]
    have = "has" if len(sparse) == 1 else "have"
    few = (
        "only one outcome"
        if finding.reasons == ("one outcome only",)
        else "few cases of one outcome"
    )
    if len(finding.reasons) > 1:
        few += " or none of it"
    what = (
        f"of {counted(len(counts), 'level', 'levels')}, {amount(len(sparse))} {have} {few}: "
        f"{short_list(told, _LISTED_AT_MOST)}"
    )
    step = "Merge such a level with one that is like it, or say that its odds ratio is rough"
    if finding.concern == "don't explain yet":
        step = "Merge a level of one outcome only with one that is like it, or leave its cases out"
    return made(finding, subject, what, step)


def _name(subject: Subject, each: LevelCount) -> str:
    return level_name(subject, each.predictor, each.level)


def _events(subject: Subject, each: LevelCount) -> str:
    number, whole = amount(each.events), cases(subject, each.cases)
    if number == "1":
        return message("{number} event in {cases}", number=number, cases=whole)
    return message("{number} events in {cases}", number=number, cases=whole)


@evidence_figures.register
def _(evidence: LevelsEvidence, finding: Finding, subject: Subject, level: float) -> list[Figure]:
    return [
        (
            sentence_case(_name(subject, each)),
            cases(subject, each.cases) if math.isnan(each.events) else _events(subject, each),
        )
        for each in evidence.counts
    ]
