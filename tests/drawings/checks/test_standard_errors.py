"""Standard errors too wide to mean something."""

import math

from tests.drawings import made_findings as made
from tests.drawings.checks.sheet import board_of, drawn, points_of, text_of
from tests.drawings.seen import words_on


def test_wide_ones_are_drawn_against_two_marks():
    board = board_of(made.answer(made.standard_errors()))
    assert [x for x, _ in points_of(board.lines["series 0"])] == [8.0]
    assert board.axes.get_xscale() == "log"
    assert {each[0][0] for each in board.segments["reference"].get_segments()} == {4.0, 10.0}


def test_an_absurd_one_leaves_in_an_arrow_and_is_told():
    board = board_of(made.answer(made.standard_errors()))
    assert len(board.lines["series 0 >"].get_xdata()) == 1
    words = words_on(drawn(made.answer(made.standard_errors())).axes.figure)
    assert {"soil[T.high]", "900", "material[T.PVC]", "8.00"} <= set(words)


def test_where_none_is_wide_the_widest_is_shown():
    board = board_of(made.answer(made.standard_errors((), 0.3)))
    assert [x for x, _ in points_of(board.lines["value"])] == [0.3]
    words = words_on(drawn(made.answer(made.standard_errors((), 0.3))).axes.figure)
    assert {"the widest: 0.30", "as usual", "wide", "absurd"} <= set(words)


def test_missing_ones_are_told_in_words():
    answer = made.answer(made.standard_errors((made.wide(se=math.nan),), math.nan))
    assert not board_of(answer).lines
    assert "has no standard error" in text_of(answer)
