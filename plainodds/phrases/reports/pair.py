"""Report tables of two predictors together: the interaction, and the joint table."""

from __future__ import annotations

import math
from collections.abc import Iterator

from plainodds.answers.joint import AdditiveInteraction, JointTable
from plainodds.answers.moves import Move
from plainodds.answers.pair import PairAnswer
from plainodds.phrases.captions.parts import fitted_words, rest_words
from plainodds.phrases.labels import named_value
from plainodds.phrases.lexicon import message
from plainodds.phrases.moves import moves_label
from plainodds.phrases.numbers import guarded_count
from plainodds.phrases.pair_labels import has_others, interaction_label, pair_title
from plainodds.phrases.parts import model_cautions
from plainodds.phrases.reports.cells import (
    chance_cell,
    interval_title,
    p_cell,
    points_cell,
    ratio_cell,
    signed_cell,
)
from plainodds.phrases.reports.report import ReportTable, report_of
from plainodds.phrases.reports.rows import ReportRow, entry, heading
from plainodds.phrases.sentences import joined

__all__: list[str] = []


@report_of.register
def _(answer: PairAnswer) -> ReportTable:
    subject, question = answer.subject, answer.question
    rows = [] if answer.joint is None else list(_joint(answer, answer.joint))
    rest = ""
    if has_others(answer):
        rest = rest_words(subject, question.others, answer.held, "chances", answer.counted)
    return ReportTable(
        pair_title(answer),
        (
            message("Figure"),
            interval_title(subject, message("Estimate"), question.level),
            message("p-value"),
        ),
        (*rows, *_interaction(answer)),
        (
            joined(rest, fitted_words(subject)),
            *model_cautions(subject, offset_held=question.others != "observed"),
        ),
    )


def _interaction(answer: PairAnswer) -> Iterator[ReportRow]:
    found = answer.interaction
    yield heading(message("The interaction"))
    label = interaction_label(answer, "probability")
    for told, estimate, p in (
        (
            message("{}, percentage points, at the profile held", label),
            found.at_profile,
            found.at_profile_p_value,
        ),
        (message("{}, percentage points, averaged", label), found.averaged, found.averaged_p_value),
    ):
        if estimate is not None:
            yield entry(told, points_cell(estimate), p_cell(p), within=True)
    test = found.test
    ratio = ratio_cell(found.ratio) if found.joined else message("1 (no shared term)")
    tested = p_cell(test.p_value) if test is not None else ""
    yield entry(interaction_label(answer, "odds"), ratio, tested, within=True)


def _joint(answer: PairAnswer, joint: JointTable) -> Iterator[ReportRow]:
    """Each combination, the effects within strata, the measures of adding up."""
    subject, question = answer.subject, answer.question
    yield heading(message("Each combination: cases with and without the event, chance, odds ratio"))
    for cell in joint.cells:
        a = named_value(subject.predictor(question.a), cell.a)
        b = named_value(subject.predictor(question.b), cell.b)
        counts = _counts(cell.rows, cell.events, subject.smallest_cell)
        chance = "" if cell.chance is None else f"{chance_cell(cell.chance)}; "
        one = f"1 {message('(reference)')}"
        odds = one if cell.is_reference else ratio_cell(cell.odds_ratio)
        yield entry(f"{a}, {b}{counts}", f"{chance}{odds}", "", within=True)
    yield heading(message("Odds ratios within strata"))
    for stratum in joint.strata:
        move = ((stratum.predictor, Move(stratum.start, stratum.end)),)
        other = question.b if stratum.predictor == question.a else question.a
        within = named_value(subject.predictor(other), stratum.within)
        label = message("{}, with {}", moves_label(subject, move), within)
        yield entry(label, ratio_cell(stratum.odds_ratio), "", within=True)
    yield heading(message("Adding up, from odds"))
    yield from _additive(joint.additive_by_odds)
    if joint.additive_by_chances is not None:
        yield heading(message("Adding up, from chances"))
        yield from _additive(joint.additive_by_chances)


def _counts(rows: float | None, events: float | None, smallest: int) -> str:
    if rows is None:
        return ""
    if rows == 0:
        return f" {message('(no rows)')}"
    total = guarded_count(round(rows), smallest)
    if events is None or math.isnan(events):
        return f" {message('({} in all)', total)}"
    told = message("({} with, of {})", guarded_count(round(events), smallest), total)
    return f" {told}"


def _additive(found: AdditiveInteraction) -> Iterator[ReportRow]:
    synergy = found.synergy_index
    told = message("has no meaning here") if synergy is None else ratio_cell(synergy)
    for name, figure in (
        (
            message("Relative excess risk due to interaction"),
            signed_cell(found.relative_excess_risk),
        ),
        (message("Attributable proportion"), signed_cell(found.attributable_proportion)),
        (message("Synergy index"), told),
    ):
        yield entry(name, figure, "", within=True)
