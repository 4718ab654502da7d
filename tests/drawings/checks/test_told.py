"""Findings told in words and figures: convergence, overall measures, what is not known."""

import math

import pytest

from plainodds.answers.checks.finding import TOPICS
from plainodds.phrases.checks.finding_words import finding_figures, finding_words
from plainodds.phrases.checks.overall import overall_limits
from tests.drawings import made_findings as made
from tests.drawings.checks.sheet import board_of, drawn, points_of, text_of
from tests.drawings.seen import words_on


def test_the_remaining_step_stands_against_its_marks():
    board = board_of(made.answer(made.convergence()))
    assert points_of(board.lines["value"])[0][0] == 0.4
    assert {each[0][0] for each in board.segments["marks"].get_segments()} == {0.01, 0.2}
    words = text_of(made.answer(made.convergence()))
    assert "The fit says that it did not converge after 35 iterations" in words
    assert "cannot be seen" in words


@pytest.mark.parametrize(("step", "side"), [(1e-9, "below"), (math.inf, "above")])
def test_a_step_off_the_line_is_an_arrow_at_its_end(step, side):
    board = board_of(made.answer(made.convergence(step)))
    end = board.axes.get_xlim()[side == "above"]
    assert points_of(board.lines[f"value {side}"])[0][0] == end
    assert board.lines[f"value {side}"].get_marker() == {"below": "<", "above": ">"}[side]


def test_a_step_that_is_not_known_is_told_in_words():
    answer = made.answer(made.convergence(math.nan))
    assert not board_of(answer).lines
    assert "not known" in text_of(answer)


def test_overall_figures_stand_in_a_table_with_their_limits():
    answer = made.answer(made.overall())
    words = words_on(drawn(answer).axes.figure)
    for label, figure in finding_figures(answer.findings[0], answer.subject, 0.95):
        assert label in words
        assert figure in words
    for limit in overall_limits():
        assert limit in text_of(answer)


@pytest.mark.parametrize("topic", TOPICS)
def test_what_is_not_known_is_said_with_its_reason(topic):
    answer = made.answer(made.not_known(topic))
    words, said = text_of(answer), finding_words(answer.findings[0], answer.subject, 0.95)
    assert "? not known" in words
    for sentence in (said.what, said.why, said.next_step.replace("`", "")):
        assert sentence in words
    assert not board_of(answer).lines
