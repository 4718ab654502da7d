"""Counts of few rows do not leave the notebook."""

import math
from dataclasses import replace

import pytest
from hypothesis import given
from hypothesis import strategies as st

import plainodds as po
from plainodds.answers.bounded import as_ratio
from plainodds.answers.checks.amount import LevelCount, LevelsEvidence
from plainodds.answers.checks.discrimination import DiscriminationEvidence
from plainodds.answers.disclosure import guarded
from plainodds.answers.estimate import Estimate
from tests.phrases import made, made_changes, made_findings
from tests.phrases.made_pairs import pair_answer


def curve_with(counts, edges=True):
    answer = made.curve_answer()
    ends = tuple(map(float, range(len(counts) + 1))) if edges else ()
    support = replace(answer.support[0], edges=ends, counts=tuple(counts))
    return replace(answer, support=(support,) * len(answer.lines))


@given(st.lists(st.integers(0, 40), min_size=1, max_size=30), st.integers(2, 15))
def test_no_bin_holds_a_small_count_and_no_row_is_lost(counts, smallest):
    found = guarded(curve_with(counts), smallest).support[0]
    assert all(count == 0 or count >= smallest for count in found.counts)
    assert len(found.edges) == len(found.counts) + 1
    assert (found.edges[0], found.edges[-1]) == (0.0, float(len(counts)))
    total = sum(counts)
    assert sum(found.counts) == (total if total == 0 or total >= smallest else smallest)


def test_neighbours_are_merged_no_further_than_needed():
    found = guarded(curve_with([50, 3, 4, 60, 0, 0, 70, 2])).support[0]
    assert found.counts == (50, 67, 0, 0, 72)
    assert found.edges == (0.0, 1.0, 4.0, 5.0, 6.0, 8.0)


def test_levels_are_not_merged_but_said_to_be_few():
    found = guarded(curve_with([500, 3, 0], edges=False))
    assert found.support[0].counts == (500, 10, 0)
    assert found.subject.smallest_cell == 10


@pytest.mark.parametrize(("alike", "told"), [(3, "up to 10 rows"), (12, "12 rows")])
def test_rows_alike_are_told_up_to_the_smallest_cell(alike, told):
    answer = made.profile_answer()
    familiarity = replace(answer.point.familiarity, rows_alike=alike, verdict="familiar")
    answer = replace(answer, point=replace(answer.point, familiarity=familiarity))
    assert f"{alike} rows" in str(po.words(answer))
    assert told in str(po.words(guarded(answer)))


def test_level_counts_and_rows_averaged_over_are_guarded_too():
    material = replace(made.MATERIAL, level_counts=(5, 0, 500))
    answer = made_changes.change_answer()
    answer = replace(
        answer, counted=4, subject=replace(answer.subject, predictors=(made.AGE, material))
    )
    found = guarded(answer)
    assert found.counted == 10
    assert found.subject.predictor("material").level_counts == (10, 0, 500)
    effects = replace(made_changes.effects_answer(made_changes.effect_row()), counted=(3,))
    assert guarded(effects).counted == (10,)


@given(
    st.lists(st.tuples(st.integers(0, 60), st.integers(0, 60)), min_size=1, max_size=8),
    st.integers(2, 15),
)
def test_events_leave_only_where_they_and_the_others_are_enough(levels, smallest):
    names = tuple(f"level {i}" for i, _ in enumerate(levels))
    material = replace(
        made.MATERIAL, levels=names, level_labels=names, typical=names[0],
        level_counts=tuple(sum(each) for each in levels),
        level_cases=tuple(float(sum(each)) for each in levels),
        level_events=tuple(float(events) for events, _ in levels),
    )  # fmt: skip
    answer = made.profile_answer()
    subject = replace(answer.subject, predictors=(made.AGE, material))
    found = guarded(replace(answer, subject=subject), smallest)
    again = guarded(found, smallest).subject.predictor("material")
    facts = found.subject.predictor("material")
    for (events, others), told, cases in zip(
        levels, facts.level_events, facts.level_cases, strict=True
    ):
        few = 0 < events < smallest or 0 < others < smallest
        assert math.isnan(told) or (told == events and not few)
        assert cases == 0 or cases >= smallest
        assert few or cases == events + others
    hidden = sum(map(math.isnan, facts.level_events))
    assert hidden != 1 or len(levels) == 1, "one alone would follow from the total"
    assert str(again) == str(facts), "what is guarded stays as it is"


def test_withheld_events_are_not_read_as_none_or_all():
    """A level all of whose few cases had one outcome is not named as such once guarded."""
    material = replace(
        made.MATERIAL, level_counts=(400, 300, 7), level_cases=(400.0, 300.0, 7.0),
        level_events=(40.0, 30.0, 7.0),
    )  # fmt: skip
    start, _, level = material.levels
    log = Estimate(math.inf, None, 0.2, math.inf)
    row = replace(
        made.odds_row("material", start, level, per_step=False),
        log_odds_ratio=log, odds_ratio=as_ratio(log),
    )  # fmt: skip
    answer = made.odds_answer(row)
    answer = replace(answer, subject=replace(answer.subject, predictors=(made.AGE, material)))
    assert "all 7" in str(po.words(answer))
    told = str(po.words(guarded(answer)))
    assert "all 7" not in told
    assert "none of the" not in told


def test_with_a_smallest_cell_of_one_nothing_changes():
    answer = curve_with([1, 2, 3])
    assert guarded(answer, 1) is answer


@pytest.mark.parametrize("smallest", [0, -3, 2.5, "10", True])
def test_an_impossible_smallest_cell_is_refused(smallest):
    with pytest.raises(po.QuestionRefused, match="whole number of at least 1"):
        guarded(made.curve_answer(), smallest)


@given(
    st.lists(st.tuples(st.integers(0, 40), st.integers(0, 40)), min_size=1, max_size=20),
    st.integers(2, 15),
)
def test_bars_of_few_events_are_merged_and_no_case_is_lost(bins, smallest):
    edges = tuple(map(float, range(len(bins) + 1)))
    events, others = (tuple(map(float, each)) for each in zip(*bins, strict=True))
    evidence = DiscriminationEvidence(Estimate(0.7, 0.01, 0.6, 0.8), edges, events, others)
    answer = made_findings.answer_of(
        made_findings.finding("discrimination", "nothing found", evidence)
    )
    found = guarded(answer, smallest).findings[0].evidence
    assert (found.edges[0], found.edges[-1]) == (edges[0], edges[-1])
    for told, counts in ((found.events, events), (found.others, others)):
        assert len(told) == len(found.edges) - 1
        assert all(each == 0 or each >= smallest for each in told)
        total = sum(counts)
        assert sum(told) == (total if total == 0 or total >= smallest else smallest)


def test_a_combination_of_few_events_is_not_withheld_alone():
    answer = pair_answer()
    counts = [(400.0, 40.0), (300.0, 3.0), (200.0, 20.0), (100.0, 60.0)]
    cells = tuple(
        replace(cell, rows=rows, events=events)
        for cell, (rows, events) in zip(answer.joint.cells, counts, strict=True)
    )
    found = guarded(replace(answer, joint=replace(answer.joint, cells=cells)))
    assert [each.events for each in found.joint.cells] == [40.0, None, None, 60.0]
    assert [each.rows for each in found.joint.cells] == [400.0, 300.0, 200.0, 100.0]


def test_a_finding_withholds_the_levels_that_the_predictors_do():
    counts = [("PVC", 300.0, 3.0), ("CI", 200.0, 20.0), ("DI", 100.0, 40.0)]
    levels = tuple(LevelCount("material", level, cases, events) for level, cases, events in counts)
    evidence = LevelsEvidence((*levels, LevelCount("lined", True, 500.0, 50.0)), 1)
    answer = made_findings.answer_of(made_findings.finding("levels", "keep in mind", evidence))
    (finding,) = guarded(answer).findings
    told = [each.events for each in finding.evidence.counts]
    assert [math.isnan(each) for each in told] == [True, True, False, False]
