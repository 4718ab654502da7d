"""Rows left out, and whether events are as frequent among them."""

import pytest

from tests.drawings import made_findings as made
from tests.drawings.checks.sheet import board_of, drawn, ends_of, points_of, text_of
from tests.drawings.seen import words_on


def test_both_shares_are_marked_where_they_lie():
    lines = board_of(made.answer(made.missing())).lines
    ((used, above),), ((dropped, below),) = (
        points_of(lines[name]) for name in ("used mark", "dropped mark")
    )
    assert (used, dropped) == (0.21, 0.30)
    assert above > below
    assert lines["used mark"].get_marker() != lines["dropped mark"].get_marker()


def test_the_interval_is_that_of_the_difference():
    finding = made.missing()
    (ends,) = ends_of(board_of(made.answer(finding)).segments["difference"])
    held = finding.evidence.difference
    assert ends == pytest.approx((0.21 + held.lower, 0.21 + held.upper))
    assert "interval of the difference" in text_of(made.answer(finding))


def test_rows_are_counted_and_shares_told():
    words = words_on(drawn(made.answer(made.missing())).axes.figure)
    assert {"545 rows used", "21%", "30%"} <= set(words)
    assert "60 rows left out, outcome known" in text_of(made.answer(made.missing()))


def test_what_was_missing_is_listed():
    words = text_of(made.answer(made.missing()))
    assert "pressure (41), the outcome (9) and “elsewhere” (3)" in words


def test_without_outcomes_of_those_left_out_it_is_told_in_words():
    answer = made.answer(made.missing(known=0))
    assert not board_of(answer).lines
    assert "not known" in text_of(answer)
