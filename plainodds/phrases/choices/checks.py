"""What is told of findings."""

from __future__ import annotations

import math
from typing import Literal, TypeAlias

from plainodds.answers.checks.amount import LevelsEvidence
from plainodds.answers.checks.calibration import CalibrationEvidence, Optimism
from plainodds.answers.checks.dependence import DependenceEvidence, StandardErrorPair
from plainodds.answers.checks.finding import Concern, Finding, Topic
from plainodds.answers.checks.influence import InfluenceEvidence, InfluentialPattern, Moved
from plainodds.answers.checks.shape import gap_that_matters
from plainodds.answers.soundness import SoundnessAnswer
from plainodds.model.predictors import Subject

__all__ = [
    "TOLD_WITH_WHY",
    "Verdict",
    "example_of",
    "farthest_pair",
    "fewest_of_one",
    "findings_told",
    "how_many",
    "optimism_of",
    "ratio_without",
    "topics_looked_at",
    "verdict_of",
]

Verdict: TypeAlias = Literal[
    "more than chance", "too little", "maybe chance", "not known", "nothing to test"
]

TOLD_WITH_WHY = ("separation", "shape", "influence")
"""Topics of which plain words say why they matter even where they put them otherwise."""

_TOLD_AT_MOST = 3
# who raises a concern has few cases: so many, or so large a share of all
_FEW_CASES, _FEW_SHARE = 2.0, 0.01


def verdict_of(size: float, p: float, finding: Finding, subject: Subject, bends: bool) -> Verdict:
    """Whether a gap between model and data is more than chance explains.

    Parameters
    ----------
    size : float
    p : float
        nan where there is no test.
    finding : Finding
    subject : Subject
    bends : bool
        Whether the gap raised a concern.
    """
    if bends:
        return "more than chance"
    if size <= gap_that_matters(subject.outcome.share):
        return "too little"
    if not math.isnan(p):
        return "maybe chance"
    return "not known" if finding.unknown == "no likelihood" else "nothing to test"


def example_of(
    evidence: InfluenceEvidence, finding: Finding, subject: Subject
) -> tuple[InfluentialPattern, Moved] | None:
    """The pattern that moves an odds ratio farthest, in the way that the finding speaks of."""
    most = max(_FEW_CASES, _FEW_SHARE * subject.rows)
    moves = [
        (pattern, moved)
        for pattern in evidence.standing_out
        for moved in pattern.moved
        if _far(moved) > 0 and (moved.predictor in finding.about or not finding.about)
    ]
    few = [each for each in moves if each[0].cases <= most]
    moves = few or (moves if finding.reasons else [])
    if "turns an odds ratio" in finding.reasons:
        moves = [each for each in moves if _turns(each[1])] or moves
    return max(moves, key=lambda each: _far(each[1]), default=None)


def ratio_without(moved: Moved) -> float:
    """The odds ratio without the pattern: refitted, or else by one step."""
    return moved.one_step if math.isnan(moved.refitted) else moved.refitted


def _far(moved: Moved) -> float:
    before, after = moved.odds_ratio, ratio_without(moved)
    if not (before > 0 and after > 0) or math.isinf(before):
        return 0.0
    return abs(math.log(after / before))


def _turns(moved: Moved) -> bool:
    return (moved.odds_ratio - 1) * (ratio_without(moved) - 1) < 0


def farthest_pair(evidence: DependenceEvidence) -> StandardErrorPair | None:
    """The coefficient whose standard error changes most when groups are counted together."""
    known = [
        pair for pair in evidence.standard_errors if pair.model_based > 0 and pair.by_groups > 0
    ]
    # nobody asks for the intercept's
    known = [pair for pair in known if pair.predictors] or known
    return max(
        known, key=lambda pair: abs(math.log(pair.by_groups / pair.model_based)), default=None
    )


def fewest_of_one(evidence: LevelsEvidence) -> float:
    """The fewest cases that a level has of either outcome; nan where some are withheld."""
    counts = [min(each.events, each.cases - each.events) for each in evidence.counts]
    return math.nan if any(map(math.isnan, counts)) else min(counts)


def how_many(answer: SoundnessAnswer, concern: Concern) -> int:
    """How many findings have this weight."""
    return sum(each.concern == concern for each in answer.findings)


def findings_told(answer: SoundnessAnswer) -> tuple[list[Finding], int]:
    """The findings that plain words tell, and how many weighty ones are left."""
    weighty = ("keep in mind", "don't explain yet")
    heaviest = [each for each in answer.findings if each.concern in weighty]
    return heaviest[:_TOLD_AT_MOST], len(heaviest) - _TOLD_AT_MOST


def topics_looked_at(answer: SoundnessAnswer) -> list[Topic]:
    """The topics of which there is evidence, the heaviest first, each once."""
    return list(dict.fromkeys(each.topic for each in answer.findings if each.evidence is not None))


def optimism_of(answer: SoundnessAnswer) -> Optimism | None:
    """How much of the calibration is the fit's own optimism, where that was looked at."""
    for each in answer.findings:
        if isinstance(each.evidence, CalibrationEvidence) and each.evidence.optimism is not None:
            return each.evidence.optimism
    return None
