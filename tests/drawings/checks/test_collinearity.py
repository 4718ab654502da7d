"""By how much standard errors are stretched."""

import math

from tests.drawings import made_findings as made
from tests.drawings.checks.sheet import board_of, drawn, ends_of, points_of, text_of
from tests.drawings.seen import words_on

ENDLESS = (("age_years", math.inf), ("pressure_m", math.inf), ("soil", 1.0))


def test_each_predictor_is_a_line_from_one_the_longest_first():
    board = board_of(made.answer(made.collinearity()))
    assert [x for x, _ in points_of(board.lines["series 0"])] == [4.1, 4.0, 1.3, 1.01]
    assert ends_of(board.segments["joining"]) == [(1.0, each) for each in (4.1, 4.0, 1.3, 1.01)]
    assert board.axes.get_xscale() == "log"


def test_marks_stand_at_two_and_five_and_are_explained():
    board = board_of(made.answer(made.collinearity()))
    assert {x for x, _ in ends_of(board.segments["reference"])} == {2.0, 5.0}
    words = text_of(made.answer(made.collinearity()))
    assert "2: as if only 1 row in 4 were there" in words
    assert "5: as if only 1 in 25" in words


def test_figures_say_how_many_times():
    words = words_on(drawn(made.answer(made.collinearity())).axes.figure)
    assert {"Pipe age", "× 4.10", "Soil corrosivity", "× 1.01"} <= set(words)


def test_what_is_tied_is_listed():
    words = text_of(made.answer(made.collinearity()))
    assert "Tied: “age_years” and “pressure_m” (condition index 34.0)." in words
    assert "Tied" not in text_of(made.answer(made.collinearity(tied=False)))


def test_a_stretch_without_an_end_leaves_in_an_arrow():
    board = board_of(made.answer(made.collinearity(ENDLESS)))
    assert len(board.lines["series 0 >"].get_xdata()) == 2
    assert board.lines["series 0 >"].get_marker() == ">"
    assert set(board.lines["series 0 >"].get_xdata()) == {board.axes.get_xlim()[1]}
    words = words_on(drawn(made.answer(made.collinearity(ENDLESS))).axes.figure)
    assert words.count("without an end") == 2
