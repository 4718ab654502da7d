"""What a check of a fit found, without counts of few rows and without single rows."""

from __future__ import annotations

import math
from dataclasses import replace
from functools import singledispatch

from plainodds.answers.checks.amount import LevelsEvidence, MissingEvidence
from plainodds.answers.checks.calibration import CalibrationEvidence
from plainodds.answers.checks.discrimination import DiscriminationEvidence
from plainodds.answers.checks.finding import Evidence, Finding
from plainodds.answers.checks.influence import InfluenceEvidence
from plainodds.answers.checks.separation import SeparationEvidence
from plainodds.answers.checks.shape import Bin, ShapeEvidence
from plainodds.answers.withheld import merged, raised, withheld
from plainodds.values import Scalar

__all__ = ["guarded_finding"]


def guarded_finding(finding: Finding, smallest: int) -> Finding:
    """A finding whose evidence holds no single rows and no counts below the smallest cell."""
    if isinstance(finding.evidence, InfluenceEvidence):
        # it is about single rows by its nature, so nothing of it but the verdict leaves
        return replace(finding, evidence=None, unknown="single rows")
    if finding.evidence is None:
        return finding
    return replace(finding, evidence=_without_small(finding.evidence, smallest))


@singledispatch
def _without_small(evidence: Evidence, smallest: int) -> Evidence:
    return evidence


@_without_small.register
def _(evidence: LevelsEvidence, smallest: int) -> Evidence:
    hidden: dict[tuple[str, Scalar], bool] = {}
    for name in {each.predictor for each in evidence.counts}:
        own = [each for each in evidence.counts if each.predictor == name]
        found = withheld([(each.events, each.cases) for each in own], smallest)
        hidden |= dict(zip([(name, each.level) for each in own], found, strict=True))
    return replace(
        evidence,
        counts=tuple(
            replace(
                each,
                cases=raised(each.cases, smallest),
                events=math.nan if hidden[each.predictor, each.level] else each.events,
            )
            for each in evidence.counts
        ),
    )


@_without_small.register
def _(evidence: MissingEvidence, smallest: int) -> Evidence:
    # a share of few tells how many of them had the event
    few = 0 < evidence.known < smallest
    return replace(
        evidence,
        share_dropped=math.nan if few else evidence.share_dropped,
        difference=None if few else evidence.difference,
        dropped=raised(evidence.dropped, smallest),
        known=raised(evidence.known, smallest),
        columns=tuple((name, raised(number, smallest)) for name, number in evidence.columns),
    )


@_without_small.register
def _(evidence: SeparationEvidence, smallest: int) -> Evidence:
    return replace(
        evidence,
        rows=raised(evidence.rows, smallest),
        patterns=raised(evidence.patterns, smallest),
    )


@_without_small.register
def _(evidence: ShapeEvidence, smallest: int) -> Evidence:
    return replace(evidence, bins=_large(evidence.bins, smallest))


@_without_small.register
def _(evidence: CalibrationEvidence, smallest: int) -> Evidence:
    return replace(evidence, bins=_large(evidence.bins, smallest))


@_without_small.register
def _(evidence: DiscriminationEvidence, smallest: int) -> Evidence:
    bins = list(zip(evidence.events, evidence.others, strict=True))
    edges, counts = merged(evidence.edges, bins, smallest)
    return replace(
        evidence,
        edges=edges,
        events=tuple(events for events, _ in counts),
        others=tuple(others for _, others in counts),
    )


def _large(bins: tuple[Bin, ...], smallest: int) -> tuple[Bin, ...]:
    """Bins of too few cases are left out of the picture; the smoothed curve speaks for them."""
    return tuple(each for each in bins if each.cases >= smallest)
