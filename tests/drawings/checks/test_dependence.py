"""Standard errors that take rows as strangers, and those that count groups together."""

import pytest

from tests.drawings import made_findings as made
from tests.drawings.checks.sheet import board_of, drawn, ends_of, points_of, text_of
from tests.drawings.seen import words_on


def test_both_standard_errors_stand_in_one_row():
    lines = board_of(made.answer(made.dependence())).lines
    by_groups, strangers = points_of(lines["series 0"]), points_of(lines["series 1"])
    assert [x for x, _ in by_groups] == [0.47, 0.024, 0.15]
    assert [x for x, _ in strangers] == [0.50, 0.011, 0.14]
    assert [y for _, y in by_groups] == [y for _, y in strangers]
    assert lines["series 0"].get_marker() != lines["series 1"].get_marker()


def test_they_are_joined_and_their_ratio_is_told():
    board = board_of(made.answer(made.dependence()))
    assert ends_of(board.segments["joining"]) == [(0.47, 0.50), (0.011, 0.024), (0.14, 0.15)]
    words = words_on(drawn(made.answer(made.dependence())).axes.figure)
    assert {"age_years", "× 2.18", "× 0.94", "counting groups", "taking rows as strangers"} <= set(
        words
    )


def test_all_are_on_the_axis():
    axes = board_of(made.answer(made.dependence())).axes
    low, high = axes.get_xlim()
    assert axes.get_xscale() == "log"
    assert low < 0.011
    assert high > 0.5


def test_it_is_said_how_many_groups_there_are():
    assert "6,000 rows in 42 groups by district, at most 310 to a group." in text_of(
        made.answer(made.dependence())
    )


def test_groups_that_the_fit_counts_already_are_said_to_be():
    words = text_of(made.answer(made.dependence(already=True, concern="nothing found")))
    assert "count groups together already" in words


@pytest.mark.parametrize("pairs", [(), made.PAIRS[3:]])
def test_without_standard_errors_it_is_told_in_words(pairs):
    answer = made.answer(made.dependence(pairs))
    assert not board_of(answer).lines
    assert "42 groups" in text_of(answer)
