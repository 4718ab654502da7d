"""Counts of few rows merged or withheld, before an answer leaves the notebook.

An answer holds no rows, but a count of one or two can be as telling. In a guarded answer
neighbouring bins are merged until each holds enough, and a count from 1 to the smallest
cell stands as the smallest cell itself, to be read as "up to": `Subject.smallest_cell`
says so. A level's events are withheld where they, or its cases without the event, are too
few; so are another level's, where one alone would follow from a total. What follows from
several tables laid side by side is not looked for. Source: common practice in official
statistics; the size is the analyst's to set, local rules come first.
"""

from __future__ import annotations

import math
from dataclasses import replace
from functools import singledispatch

from plainodds.answers.change import ChangeAnswer
from plainodds.answers.curve import CurveAnswer
from plainodds.answers.effects import EffectsAnswer
from plainodds.answers.excerpts import ExcerptAnswer
from plainodds.answers.familiarity import Familiarity
from plainodds.answers.guarded_findings import guarded_finding
from plainodds.answers.joint import JointCell
from plainodds.answers.pair import PairAnswer
from plainodds.answers.panels import PanelsAnswer
from plainodds.answers.profile import ProfileAnswer
from plainodds.answers.questions import Answer
from plainodds.answers.soundness import SoundnessAnswer
from plainodds.answers.support import Support
from plainodds.answers.withheld import merged, raised, withheld
from plainodds.errors import QuestionRefused
from plainodds.model.predictors import PredictorFacts, Subject

__all__ = ["SMALLEST_CELL", "guarded"]

SMALLEST_CELL = 10
"""Counts of fewer rows do not leave, unless the analyst sets another number."""


def guarded(answer: Answer, smallest_cell: int = SMALLEST_CELL) -> Answer:
    """The same answer without counts from 1 to below the smallest cell.

    Parameters
    ----------
    answer : Answer
    smallest_cell : int
        At least 1; with 1 nothing is withheld.

    Raises
    ------
    QuestionRefused
        If it is no whole number of at least 1.
    TypeError
        If it is no answer.
    """
    if not isinstance(answer, Answer):
        raise TypeError(f"{type(answer).__name__} is not an answer of plainodds.")
    if isinstance(smallest_cell, bool) or not isinstance(smallest_cell, int) or smallest_cell < 1:
        raise QuestionRefused(
            f"smallest_cell={smallest_cell!r}: state the smallest count that may leave, a whole "
            "number of at least 1, as 10."
        )
    if smallest_cell == 1:
        return answer
    return _without_small(_about(answer, smallest_cell), smallest_cell)


def _about(answer: Answer, smallest: int) -> Answer:
    subject: Subject = replace(
        answer.subject,
        smallest_cell=smallest,
        predictors=tuple(_facts(each, smallest) for each in answer.subject.predictors),
    )
    return replace(answer, subject=subject)  # type: ignore[type-var]


def _facts(facts: PredictorFacts, smallest: int) -> PredictorFacts:
    events = facts.level_events
    if events and facts.level_cases:
        counts = tuple(zip(events, facts.level_cases, strict=True))
        hidden = withheld(counts, smallest)
        events = tuple(
            math.nan if is_hidden else each for each, is_hidden in zip(events, hidden, strict=True)
        )
    return replace(
        facts,
        level_counts=tuple(raised(each, smallest) for each in facts.level_counts),
        level_cases=tuple(raised(each, smallest) for each in facts.level_cases),
        level_events=events,
    )


@singledispatch
def _without_small(answer: Answer, smallest: int) -> Answer:
    """The answer without small counts of its own; most kinds hold none."""
    return answer


@_without_small.register
def _curve(answer: CurveAnswer, smallest: int) -> CurveAnswer:
    return replace(answer, support=tuple(_merged(each, smallest) for each in answer.support))


@_without_small.register
def _(answer: ProfileAnswer, smallest: int) -> Answer:
    return replace(
        answer,
        point=replace(answer.point, familiarity=_familiar(answer.point.familiarity, smallest)),
        start=replace(answer.start, familiarity=_familiar(answer.start.familiarity, smallest)),
    )


def _familiar(found: Familiarity, smallest: int) -> Familiarity:
    return replace(found, rows_alike=raised(found.rows_alike, smallest))


@_without_small.register
def _(answer: EffectsAnswer, smallest: int) -> Answer:
    return replace(answer, counted=tuple(raised(each, smallest) for each in answer.counted))


@_without_small.register
def _(answer: ChangeAnswer, smallest: int) -> Answer:
    return replace(answer, counted=raised(answer.counted, smallest))


@_without_small.register
def _(answer: PairAnswer, smallest: int) -> Answer:
    lines = None if answer.lines is None else _curve(answer.lines, smallest)
    joint = answer.joint
    if joint is not None:
        joint = replace(joint, cells=_cells(joint.cells, smallest))
    return replace(answer, lines=lines, joint=joint, counted=raised(answer.counted, smallest))


def _cells(cells: tuple[JointCell, ...], smallest: int) -> tuple[JointCell, ...]:
    """Combinations whose events, and whose other cases, are enough or not told."""
    counts = [
        (math.nan if each.events is None else each.events, each.rows)
        for each in cells
        if each.rows is not None
    ]
    if len(counts) < len(cells):
        return cells
    return tuple(
        replace(
            cell,
            rows=raised(rows, smallest),
            events=None if is_hidden else cell.events,
        )
        for cell, (_, rows), is_hidden in zip(
            cells, counts, withheld(counts, smallest), strict=True
        )
    )


@_without_small.register
def _(answer: SoundnessAnswer, smallest: int) -> Answer:
    return replace(
        answer, findings=tuple(guarded_finding(each, smallest) for each in answer.findings)
    )


@_without_small.register
def _(answer: ExcerptAnswer, smallest: int) -> Answer:
    return replace(answer, whole=guarded(answer.whole, smallest))


@_without_small.register
def _(answer: PanelsAnswer, smallest: int) -> Answer:
    return replace(answer, answers=tuple(guarded(each, smallest) for each in answer.answers))


def _merged(support: Support, smallest: int) -> Support:
    """Bins merged with their neighbours until each holds enough; levels by themselves."""
    if not support.edges:
        return replace(support, counts=tuple(raised(each, smallest) for each in support.counts))
    edges, counts = merged(support.edges, [(each,) for each in support.counts], smallest)
    return replace(support, edges=edges, counts=tuple(number for (number,) in counts))
