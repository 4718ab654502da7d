"""Fitted chances against what happened."""

import math
from dataclasses import replace

import pytest

from tests.drawings import made_findings as made
from tests.drawings.checks.sheet import board_of, drawn, ends_of, points_of, text_of
from tests.drawings.seen import words_on


def test_the_curve_and_the_line_of_equality():
    finding = made.calibration()
    board, held = board_of(made.answer(finding)), finding.evidence
    assert points_of(board.lines["data"]) == list(zip(held.at, held.smoothed, strict=True))
    assert all(x == y for x, y in points_of(board.lines["equality"]))
    assert board.lines["equality"].is_dashed()
    assert not board.lines["data"].is_dashed()


def test_groups_are_dots_with_their_intervals():
    finding = made.calibration()
    board, bins = board_of(made.answer(finding)), finding.evidence.bins
    where = [(each.centre, each.observed) for each in bins]
    assert board.discs["bins"].get_offsets().tolist() == [pytest.approx(each) for each in where]
    low, high = board.axes.get_ylim()
    wanted = [(max(each.lower, low), min(each.upper, high)) for each in bins]
    assert ends_of(board.segments["intervals"], 1) == [pytest.approx(each) for each in wanted]
    assert "Dots: 60 pipes each." in text_of(made.answer(finding))


@pytest.mark.parametrize("width", [270, 480])
def test_both_axes_have_the_same_range_and_length(width):
    axes = drawn(made.answer(made.calibration()), width).axes
    axes.figure.draw_without_rendering()
    assert axes.get_xlim() == axes.get_ylim()
    plot = axes.get_window_extent()
    assert plot.width == pytest.approx(plot.height, rel=0.02)


@pytest.mark.parametrize(("top", "ends_at_one"), [(0.3, False), (0.97, True)])
def test_the_range_is_the_one_in_use(top, ends_at_one):
    axes = drawn(made.answer(made.calibration(top=top, shift=0.0))).axes
    assert (axes.get_xlim()[1] >= 1) == ends_at_one
    assert axes.get_xlim()[1] > top


def test_chances_beneath_come_from_where_they_were_counted_finely():
    fine = made.answer(made.calibration(), made.discrimination())
    assert _bars(board_of(fine)) == 20
    assert _bars(board_of(made.answer(made.calibration()))) == 10


def _bars(board):
    (path,) = board.areas["support"].get_paths()
    return len(path.vertices) // 4


def test_optimism_is_told_as_shown_and_corrected():
    answer = made.answer(made.calibration(made.OPTIMISM), made.discrimination())
    words = words_on(drawn(answer).axes.figure)
    for text in (
        "198 bootstrap samples", "on its own data", "corrected", "Slope (1 is right)", "0.81",
        "Brier score (0 is best)", "0.179", "0.196", "c (1 is best)", "0.71", "0.68",
    ):  # fmt: skip
        assert text in words


def test_without_optimism_there_is_no_table():
    assert "corrected" not in text_of(made.answer(made.calibration()))


def test_a_slope_that_no_resample_gave_is_not_known():
    optimism = replace(made.OPTIMISM, slope=math.nan)
    answer = made.answer(made.calibration(optimism), made.discrimination())
    words = words_on(drawn(answer).axes.figure)
    assert words.count("not known") == 1


def test_lines_are_named_at_their_ends_or_above_where_it_is_narrow():
    wide, narrow = (board_of(made.answer(made.calibration()), width) for width in (480, 270))
    names = {"data, smoothed", "chances that come true"}
    for board in (wide, narrow):
        assert names <= {text.get_text() for text in board.texts}
    assert "sample 0" not in wide.lines
    assert not narrow.lines["sample 0"].is_dashed()
    assert narrow.lines["sample -1"].is_dashed()
    assert "leader 0" not in narrow.segments
