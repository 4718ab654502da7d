"""Levels, the sparse ones first."""

import pytest

from tests.drawings import made_findings as made
from tests.drawings.checks.sheet import board_of, drawn, ends_of, points_of, text_of
from tests.drawings.seen import words_on

IN_ORDER = [
    (0.0, 14.0), (31.0, 149.0), (60.0, 150.0),  # material: PVC, ductile iron, cast iron
    (1.0, 0.0), (3.0, 6.0), (87.0, 303.0),  # soil: high, moderate, low
]  # fmt: skip


def test_events_and_others_are_lines_from_nought_as_long_as_their_numbers():
    board = board_of(made.answer(made.levels()))
    for place, name in enumerate(("events", "others")):
        wanted = [each[place] for each in IN_ORDER]
        assert ends_of(board.segments[name]) == [(0.0, number) for number in wanted]
        assert [x for x, _ in points_of(board.lines[f"{name} marks"])] == wanted


def test_others_lie_just_beneath_events():
    lines = board_of(made.answer(made.levels())).lines
    events, others = (lines[f"{name} marks"] for name in ("events", "others"))
    apart = events.get_ydata()[0] - others.get_ydata()[0]
    assert apart > 0
    assert [a - b for a, b in zip(events.get_ydata(), others.get_ydata(), strict=True)] == (
        pytest.approx([apart] * 6)
    )
    assert events.get_marker() != others.get_marker()


def test_the_sparse_ones_come_first():
    words = words_on(drawn(made.answer(made.levels())).axes.figure)
    order = ["Material", "PVC", "ductile iron", "cast iron", "Soil corrosivity", "high"]
    drawing = drawn(made.answer(made.levels()))
    heights = {text.get_text(): text.get_position()[1] for text in drawing.board.texts}
    assert set(order) <= set(words)
    assert sorted(order, key=lambda word: -heights[word]) == order


def test_numbers_are_told_with_none_in_words():
    words = words_on(drawn(made.answer(made.levels())).axes.figure)
    assert {"none of 14", "the only one", "3 of 9", "87 of 390"} <= set(words)


def test_both_kinds_are_named():
    words = words_on(drawn(made.answer(made.levels())).axes.figure)
    assert words.count("with burst this winter") == 2, "in the key and above the figures"
    assert "without burst this winter" in words


def test_of_many_levels_it_is_said_how_many_are_left_out():
    assert "Not shown: 3 more levels." in text_of(made.answer(made.many_levels()))
    assert "Not shown" not in text_of(made.answer(made.levels()))


def test_the_predictor_asked_for_comes_first():
    words = text_of(made.answer(made.levels(), predictor="soil"))
    assert words.index("Soil corrosivity") < words.index("Material")
