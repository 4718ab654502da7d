"""How much data there is, in words."""

from __future__ import annotations

from plainodds.answers.checks.amount import AmountEvidence
from plainodds.answers.checks.finding import Finding
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.finding_words import (
    Figure,
    FindingWords,
    evidence_figures,
    evidence_words,
    made,
)
from plainodds.phrases.checks.parts import amount, cases, coefficients
from plainodds.phrases.lexicon import message
from plainodds.phrases.numbers import ratio
from plainodds.phrases.units import tidy

__all__: list[str] = []


@evidence_words.register
def _(evidence: AmountEvidence, finding: Finding, subject: Subject, level: float) -> FindingWords:
    rarer = "with the event" if evidence.events <= evidence.others else "without it"
    each = f"each of {coefficients(evidence.parameters)}"
    if evidence.parameters == 1:
        each = "the only coefficient"
    what = (
        f"{cases(subject, evidence.events)} had the event and {amount(evidence.others)} did not, "
        f"which makes {_whom(evidence, subject)} {rarer} for {each} beside the intercept"
    )
    if finding.concern == "nothing found":
        return made(finding, subject, what, "Nothing needs doing about this")
    step = "Use a smaller model that was chosen beforehand, gather more data or fit with a penalty"
    if finding.concern == "keep in mind":
        step = "Call odds ratios rough, and do not add predictors to this model"
    return made(finding, subject, what, step)


def _whom(evidence: AmountEvidence, subject: Subject) -> str:
    if evidence.events_per_parameter == 1:
        return cases(subject, 1)
    return f"{_each(evidence)} {tidy(subject.outcome.cases)}"


def _each(evidence: AmountEvidence) -> str:
    number = evidence.events_per_parameter
    return amount(number) if number.is_integer() else ratio(number)


@evidence_figures.register
def _(evidence: AmountEvidence, finding: Finding, subject: Subject, level: float) -> list[Figure]:
    return [
        (message("With the event"), amount(evidence.events)),
        (message("Without the event"), amount(evidence.others)),
        (message("Coefficients beside the intercept"), amount(evidence.parameters)),
        (message("Of the rarer outcome for each coefficient"), _each(evidence)),
    ]
