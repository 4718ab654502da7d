"""Who tells the outcome without exception."""

import math

import pytest

from tests.drawings import made_findings as made
from tests.drawings.checks.sheet import board_of, drawn, ends_of, points_of, text_of
from tests.drawings.seen import words_on


def blamed():
    """PVC without an event."""
    return made.answer(made.separation(), facts=made.town(events=(270.0, 150.0, 0.0)))


def test_levels_of_the_predictor_to_blame_are_drawn_with_their_numbers():
    board = board_of(blamed())
    assert [x for x, _ in points_of(board.lines["events marks"])] == [270.0, 150.0, 0.0]
    assert [x for x, _ in points_of(board.lines["others marks"])] == [2444.0, 1656.0, 1480.0]


def test_none_is_said_in_words():
    assert "none of 1,480" in words_on(drawn(blamed()).axes.figure)


def test_coefficients_are_lines_without_an_end():
    board = board_of(blamed())
    lines = ends_of(board.segments["open"])
    middle, left, right = 0.5, 0.015, 0.985
    assert lines == [
        pytest.approx(each)
        for each in ((middle, left), (middle, right), (middle, right), (middle, left))
    ]
    heights = [each[0][1] for each in board.segments["open"].get_segments()]
    assert heights[2] == heights[3], "one that is open either way is one row"
    assert len(board.lines["no upper end"].get_xdata()) == 2
    assert len(board.lines["no lower end"].get_xdata()) == 2
    assert board.lines["no upper end"].get_marker() == ">"


def test_they_are_named_and_said_to_be_open():
    words = words_on(drawn(blamed()).axes.figure)
    assert {"material[T.PVC]", "no lower end", "age_years", "no upper end", "soil[T.high]",
            "open either way"} <= set(words)  # fmt: skip
    assert not any("e+" in text or text == "inf" for text in words)


def test_where_no_level_is_to_blame_only_coefficients_are_drawn():
    board = board_of(made.answer(made.separation("complete", ())))
    assert "events" not in board.segments
    assert len(board.segments["open"].get_segments()) == 4


def test_of_many_coefficients_it_is_said_how_many_are_left_out():
    sides = tuple((f"soil[T.{place}]", math.inf) for place in range(14))
    answer = made.answer(made.separation(unbounded=sides))
    assert len(board_of(answer).segments["open"].get_segments()) == 8
    assert "Not shown: 6 more coefficients." in text_of(answer)


def test_without_separation_there_is_nothing_to_draw():
    board = board_of(made.answer(made.no_separation()))
    assert not board.segments
    assert "No combination of predictors" in text_of(made.answer(made.no_separation()))
