"""How the fit ended, in words."""

from __future__ import annotations

import math

from plainodds.answers.checks.convergence import ConvergenceEvidence
from plainodds.answers.checks.finding import Finding
from plainodds.model.predictors import Subject
from plainodds.phrases.checks.finding_words import (
    Figure,
    FindingWords,
    evidence_figures,
    evidence_words,
    made,
)
from plainodds.phrases.checks.parts import because, columns_named, counted
from plainodds.phrases.lexicon import lexicon, message
from plainodds.phrases.numbers import count, quantity, ratio, wording

__all__: list[str] = []

_VISIBLE = 0.001


@evidence_words.register
def _(
    evidence: ConvergenceEvidence, finding: Finding, subject: Subject, level: float
) -> FindingWords:
    return made(finding, subject, _what(evidence, finding), _next(evidence, finding))


def _what(evidence: ConvergenceEvidence, finding: Finding) -> str:
    said = {
        True: f"the fit says that it converged{_after(evidence)}",
        False: f"the fit says that it did not converge{_after(evidence)}",
        None: "the result does not say whether the fit converged",
    }[evidence.converged]
    step = evidence.remaining_step
    if math.isnan(step):
        rest = "whether it stands where the likelihood is highest is not known"
        return f"{said}; {rest}{because(finding.unknown)}"
    if "gradient" in finding.reasons:
        whose = columns_named((evidence.coefficient,))
        joined = ", but" if evidence.converged else ", and"
        moves = f"by {ratio(step)} of its standard error{'s' if step >= 1 else ''}"
        moves = "without an end" if math.isinf(step) else moves
        return f"{said}{joined} one more step would move the coefficient {whose} {moves}"
    joined = ", and yet" if evidence.converged is False else ", and"
    no_more = f"more than {ratio(step)}" if step >= _VISIBLE else f"as much as {quantity(_VISIBLE)}"
    return (
        f"{said}{joined} one more step would move no coefficient by {no_more} of its standard error"
    )


def _after(evidence: ConvergenceEvidence) -> str:
    if evidence.iterations is None:
        return ""
    return f" after {counted(evidence.iterations, 'iteration', 'iterations')}"


def _next(evidence: ConvergenceEvidence, finding: Finding) -> str:
    if finding.concern == "nothing found":
        return "Nothing needs doing about this"
    if finding.concern == "don't explain yet":
        return (
            "See first whether outcomes are told without exception; else fit again with more "
            "iterations, another method or other starting values, and explain that fit"
        )
    if "gradient" in finding.reasons:
        return "Fit again with more iterations or a closer tolerance; figures will move a little"
    if math.isnan(evidence.remaining_step):
        return "Look at the log of the fit"
    return "Fit again with more iterations to be rid of the doubt; figures will hardly move"


@evidence_figures.register
def _(
    evidence: ConvergenceEvidence, finding: Finding, subject: Subject, level: float
) -> list[Figure]:
    not_known = wording().not_known
    said = {True: lexicon().yes, False: lexicon().no, None: not_known}[evidence.converged]
    iterations = not_known if evidence.iterations is None else count(evidence.iterations)
    step = evidence.remaining_step
    told = message("no end") if math.isinf(step) else ratio(step)
    return [
        (message("Converged, as the fit says"), said),
        (message("Iterations"), iterations),
        (message("Largest remaining step (in standard errors)"), told),
    ]
