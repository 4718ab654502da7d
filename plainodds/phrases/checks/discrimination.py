"""How well events are told apart, in words."""

from __future__ import annotations

import math

from plainodds.answers.checks.discrimination import DiscriminationEvidence
from plainodds.answers.checks.finding import Finding
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.finding_words import (
    Figure,
    FindingWords,
    evidence_figures,
    evidence_words,
    made,
)
from plainodds.phrases.checks.parts import because, cases_called
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import chance, count, span, wording
from plainodds.phrases.parts import article, chance_with_interval, interval

__all__ = ["C_LIMITS"]

C_LIMITS = (
    "The measure c says how often a case with the event is ranked above one without it; it says "
    "nothing of whether the chances come true, and a right model of what is hard to foretell has a "
    "low one."
)


@evidence_words.register
def _(
    evidence: DiscriminationEvidence, finding: Finding, subject: Subject, level: float
) -> FindingWords:
    c = evidence.c
    case = article(subject.outcome.case)
    pair = f"{case} that had the event and {case} that did not"
    if math.isnan(c.estimate):
        what = f"how often the model ranks {pair} rightly is not known"
    elif c.estimate >= 1:
        what = (
            f"of {pair}, the model gives the higher chance to the first without exception, and no "
            "interval can be given for that"
        )
    else:
        what = (
            f"of {pair}, the model gives the higher chance to the first in {chance(c.estimate)} "
            f"of pairs{interval(c, span, level)}, a tie counting half"
        )
        if finding.unknown:
            what += f"; an interval is not known{because(finding.unknown)}"
    step = "Tell it beside the picture, and not as a mark for the model"
    if finding.reasons:
        what += ", which may be no better than tossing a coin"
        step = "Do not use this model to tell cases apart"
    return made(finding, subject, what, step)


@evidence_figures.register
def _(
    evidence: DiscriminationEvidence, finding: Finding, subject: Subject, level: float
) -> list[Figure]:
    c = evidence.c
    told = chance_with_interval(c, level)
    if math.isnan(c.estimate):
        told = wording().not_known
    elif c.estimate >= 1:
        told = wording().out_of.format(count(100), count(100))
    return [(message("c (pairs of {cases} ranked rightly)", cases=cases_called(subject)), told)]
