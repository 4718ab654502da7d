"""Events above, others below."""

from dataclasses import replace

import numpy as np
import pytest

from tests.drawings import made_findings as made
from tests.drawings.checks.sheet import board_of, text_of


def tips(board, name):
    """How far each bar reaches, upwards or downwards."""
    return [path.vertices[2, 1] for path in board.areas[name].get_paths()]


def test_events_stand_above_and_others_below_the_axis():
    finding = made.discrimination()
    board, held = board_of(made.answer(finding)), finding.evidence
    assert tips(board, "events") == [each for each in held.events if each]
    assert tips(board, "others") == [-each for each in held.others if each]
    assert "scale of its own" not in text_of(made.answer(finding))


def test_merged_bars_have_areas_in_proportion_to_cases():
    finding = made.discrimination()
    evidence = finding.evidence
    counts = [(evidence.events[0] + evidence.events[1], *evidence.events[2:])]
    counts += [(evidence.others[0] + evidence.others[1], *evidence.others[2:])]
    merged = replace(
        evidence, edges=(evidence.edges[0], *evidence.edges[2:]),
        events=counts[0], others=counts[1],
    )  # fmt: skip
    answer = made.answer(replace(finding, evidence=merged))
    board = board_of(answer)
    assert tips(board, "events")[:2] == [counts[0][0] / 2, counts[0][1]]
    assert tips(board, "others")[:2] == [-counts[1][0] / 2, -counts[1][1]]
    assert "wider bar" in text_of(answer)
    assert "wider bar" not in text_of(made.answer(finding))


def test_bars_stand_within_their_bins():
    finding = made.discrimination()
    board, edges = board_of(made.answer(finding)), finding.evidence.edges
    held = [number for number in finding.evidence.others if number]
    for path, low, high in zip(
        board.areas["others"].get_paths(), edges[: len(held)], edges[1:], strict=False
    ):
        assert low <= path.vertices[:, 0].min() < path.vertices[:, 0].max() <= high


def test_numbers_below_the_axis_are_not_negative():
    axes = board_of(made.answer(made.discrimination())).axes
    ticks = dict(
        zip(axes.get_yticks(), (text.get_text() for text in axes.get_yticklabels()), strict=True)
    )
    assert min(ticks) < 0 < max(ticks)
    for at, label in ticks.items():
        assert label == f"{abs(at):,.0f}"


def test_a_rare_event_can_be_seen_beside_the_many_others():
    finding = made.discrimination(30.0, 2500.0)
    answer = made.answer(finding)
    board = board_of(answer)
    assert max(tips(board, "events")) == pytest.approx(-min(tips(board, "others")))
    labels = {text.get_text(): y for text, y in zip(
        board.axes.get_yticklabels(), board.axes.get_yticks(), strict=True)}  # fmt: skip
    factor = max(finding.evidence.events) / max(finding.evidence.others)
    assert labels["2,000"] == pytest.approx(-2000 * factor)
    assert "Each side has a scale of its own" in text_of(answer)


def test_both_sides_are_named_with_their_numbers():
    finding = made.discrimination()
    words = text_of(made.answer(finding))
    events, others = (int(np.sum(each)) for each in (finding.evidence.events,
                                                     finding.evidence.others))  # fmt: skip
    assert f"{events} pipes with burst this winter" in words
    assert f"{others} pipes without burst this winter" in words


def test_c_is_told_in_words_with_its_interval():
    words = text_of(made.answer(made.discrimination()))
    assert "71% of pairs (95% interval 66% to 76%)" in words
