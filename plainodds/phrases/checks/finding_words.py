"""A finding in words: what was found, why it matters, and what to do about it."""

from __future__ import annotations

from functools import singledispatch

from plainodds.answers.checks.finding import Evidence, Finding, Topic, Unknown
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.headings import finding_heading
from plainodds.phrases.checks.parts import WHY_NOT_KNOWN
from plainodds.phrases.languages import in_language
from plainodds.phrases.sentences import sentence
from plainodds.values import value

__all__ = [
    "WHY",
    "Figure",
    "FindingWords",
    "evidence_figures",
    "evidence_words",
    "finding_figures",
    "finding_words",
    "made",
]

Figure = tuple[str, str]
"""What a figure is called, and how it is written."""

WHY: dict[Topic, str] = {
    "convergence": "Every figure of an explanation rests on the coefficients being those that the "
    "data support best.",
    "separation": "Where predictors tell the outcome without exception, the best odds ratio lies "
    "farther off than any number, and a figure shown all the same is where the fit happened to "
    "stop.",
    "collinearity": "What goes with one predictor can be told apart from what goes with another "
    "only as far as the two do not move together in the data.",
    "standard errors": "An interval is no better than the standard error behind it.",
    "amount": "With few events for each coefficient, odds ratios lie too far from 1 on average and "
    "their intervals are too short.",
    "levels": "An odds ratio for a level with few cases of either outcome hangs on those few.",
    "missing": "The fit describes the rows that were used; rows left out may be of another kind.",
    "shape": "If the data bend where the model does not, chances and odds ratios along this "
    "predictor are off where people look first, at its ends and in its middle.",
    "calibration": "Whoever hears of a chance of 20% expects that it comes true for 20 in 100.",
    "influence": "An explanation that hangs on a few rows is an explanation of these rows.",
    "dependence": "Rows that belong together tell less than as many strangers; counted as "
    "strangers, they mostly make intervals too short.",
    "discrimination": "It says how far the model's chances set cases with the event apart from "
    "cases without it, and nothing of whether the chances come true.",
    "overall": "These figures are often asked for; each has limits that are well known, and none "
    "of them is a verdict.",
}
"""Why each check matters for whoever explains the fit."""

_WAY_OUT: dict[Unknown, str] = {
    "no rows": "Fit again and keep the rows in the result, or hand the table over with `data=`.",
    "no outcome": "Fit again and keep the data in the result.",
    "no covariance": "Fit again in a way that gives a covariance matrix, for example without a "
    "penalty.",
    "no likelihood": "Compare with a plain maximum-likelihood fit of the same rows, and look at "
    "this check there.",
    "no groups named": "If some rows share a person, a household, a place or a time, name the "
    "column with `groups=`; if no rows do, nothing needs doing.",
    "not said by the fit": "Look at the log of the fit, or fit again from a table with a formula.",
    "rows chosen by outcome": "Compare with shares known from elsewhere.",
    "single rows": "Look at it where the data are.",
    "too few rows": "Gather more data, or explain no more than counts.",
}


@value
class FindingWords:
    """A finding in words.

    Attributes
    ----------
    heading : str
        Short, without a full stop.
    what : str
        What was found, with its figures: one sentence.
    why : str
        Why it matters for whoever explains the fit: one sentence.
    next_step : str
        What to do: one sentence.
    """

    heading: str
    what: str
    why: str
    next_step: str


@in_language
def finding_words(finding: Finding, subject: Subject, level: float) -> FindingWords:
    """Say a finding in words.

    Parameters
    ----------
    finding : Finding
    subject : Subject
    level : float
        Of the intervals that the finding's evidence holds.
    """
    if finding.evidence is not None:
        return evidence_words(finding.evidence, finding, subject, level)
    why = WHY_NOT_KNOWN.get(finding.unknown, "the result does not say")
    way_out = _WAY_OUT.get(finding.unknown, _WAY_OUT["not said by the fit"])
    return made(finding, subject, f"this cannot be told, because {why}", way_out)


def finding_figures(finding: Finding, subject: Subject, level: float) -> list[Figure]:
    """The figures behind a finding, as (label, text); empty where nothing is known."""
    if finding.evidence is None:
        return []
    return evidence_figures(finding.evidence, finding, subject, level)


@singledispatch
def evidence_words(
    evidence: Evidence, finding: Finding, subject: Subject, level: float
) -> FindingWords:
    """Say in words what this kind of evidence shows."""
    raise TypeError(f"There are no words for {type(evidence).__name__}.")


@singledispatch
def evidence_figures(
    evidence: Evidence, finding: Finding, subject: Subject, level: float
) -> list[Figure]:
    """Write the figures of this kind of evidence."""
    raise TypeError(f"There are no figures of {type(evidence).__name__}.")


def made(
    finding: Finding, subject: Subject, what: str, next_step: str, why: str = ""
) -> FindingWords:
    """Make whole sentences of a finding's parts, with the topic's own heading and why."""
    return FindingWords(
        finding_heading(finding, subject),
        sentence(what),
        sentence(why or WHY[finding.topic]),
        sentence(next_step),
    )
