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
from plainodds.phrases.checks.parts import (
    amount,
    because,
    cases,
    cases_called,
    counted,
    level_name,
    short_list,
    told_count,
)
from plainodds.phrases.choices.checks import fewest_of_one
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
        fewest_known = fewest_of_one(evidence)
        what = (
            f"every level has at least {amount(fewest_known)} cases with the event and as many "
            "without it"
        )
        if math.isnan(fewest_known):
            what = "every level has enough cases with the event and without it"
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
    number, whole = amount(each.events), _whole(subject, each)
    if math.isnan(each.events):
        # withheld before the answer leaves, or never known
        withheld = message("{cases}, events not told", cases=whole)
        return withheld if subject.smallest_cell else whole
    if number == "1":
        return message("{number} event in {cases}", number=number, cases=whole)
    return message("{number} events in {cases}", number=number, cases=whole)


def _whole(subject: Subject, each: LevelCount) -> str:
    if each.cases <= subject.smallest_cell:
        return f"{told_count(subject, each.cases)} {cases_called(subject)}"
    return cases(subject, each.cases)


@evidence_figures.register
def _(evidence: LevelsEvidence, finding: Finding, subject: Subject, level: float) -> list[Figure]:
    return [
        (
            sentence_case(_name(subject, each)),
            _events(subject, each),
        )
        for each in evidence.counts
    ]
