"""Model against data along a number."""

import math
from dataclasses import replace

import pytest

from tests.drawings import made_findings as made
from tests.drawings.checks.sheet import board_of, drawn, ends_of, points_of, text_of


@pytest.fixture
def evidence():
    return made.shape().evidence


def test_data_and_model_are_two_lines_of_the_evidence(evidence):
    board = board_of(made.answer(made.shape()))
    assert points_of(board.lines["data"]) == list(zip(evidence.at, evidence.observed, strict=True))
    assert points_of(board.lines["model"]) == list(zip(evidence.at, evidence.expected, strict=True))


def test_the_lines_differ_by_colour_dash_and_marker():
    lines = board_of(made.answer(made.shape())).lines
    data, model = lines["data"], lines["model"]
    assert data.get_color() != model.get_color()
    assert not data.is_dashed()
    assert model.is_dashed()
    assert lines["model marks"].get_marker() != lines["end mark 0"].get_marker()
    assert set(lines["model marks"].get_xdata()) <= set(model.get_xdata())


def test_the_band_lies_between_its_ends(evidence):
    (path,) = board_of(made.answer(made.shape())).areas["band"].get_paths()
    outline = path.vertices[:-1]
    assert outline[:10, 1] == pytest.approx(evidence.upper)
    assert outline[10:20, 1] == pytest.approx(evidence.lower[::-1])


def test_bins_are_dots_with_their_intervals(evidence):
    board = board_of(made.answer(made.shape()))
    where = [(each.centre, each.observed) for each in evidence.bins]
    assert board.discs["bins"].get_offsets().tolist() == [pytest.approx(each) for each in where]
    low, high = board.axes.get_ylim()
    wanted = [(max(each.lower, low), min(each.upper, high)) for each in evidence.bins]
    assert ends_of(board.segments["intervals"], 1) == [pytest.approx(each) for each in wanted]


def test_a_dot_of_more_cases_is_larger():
    few = made.answer(made.shape(cases=(200.0, 100.0, 50.0)))
    sizes = board_of(few).discs["bins"].get_sizes()
    assert sizes[0] == pytest.approx(2 * sizes[1])
    assert sizes[0] == pytest.approx(4 * sizes[2])
    assert "50 to 200 pipes each, the more the larger" in text_of(few)


def test_dots_of_as_many_cases_each_say_how_many():
    assert "Dots: 60 pipes each." in text_of(made.answer(made.shape()))


def test_shares_are_in_percent_and_chances_end_at_their_ends():
    board = board_of(made.answer(made.shape()))
    labels = [text.get_text() for text in board.axes.get_yticklabels()]
    assert all(label.endswith("%") for label in labels)
    low, high = board.axes.get_ylim()
    assert low > -0.05
    assert high < 1.05


def test_common_events_are_not_shown_from_nought():
    bins = tuple(
        replace(each, observed=0.9, expected=0.92, lower=0.88, upper=0.95)
        for each in made.shape().evidence.bins
    )
    ten = (0.9,) * 10
    evidence = replace(
        made.shape().evidence, bins=bins, observed=ten, expected=(0.92,) * 10,
        lower=(0.88,) * 10, upper=(0.93,) * 10,
    )  # fmt: skip
    board = board_of(made.answer(replace(made.shape(), evidence=evidence)))
    assert board.axes.get_ylim()[0] > 0.8


def test_a_giant_interval_does_not_squash_the_curves():
    evidence = made.shape(0.0, cases=(3.0,) * 4, high=4.0).evidence
    board = board_of(made.answer(replace(made.shape(), evidence=evidence)))
    low, high = board.axes.get_ylim()
    reach = max(evidence.upper) - min(evidence.lower)
    assert high - low < 4 * reach
    for ends in ends_of(board.segments["intervals"], 1):
        assert low <= ends[0] <= ends[1] <= high


def test_the_strip_beneath_says_where_the_rows_are():
    board = board_of(made.answer(made.shape(cases=(100.0, 50.0), high=20.0)))
    (path,) = board.areas["support"].get_paths()
    tops, base = path.vertices[:, 1], path.vertices[:, 1].min()
    assert tops.max() < 0, "it is beneath the plot"
    first, second = (tops[place] - base for place in (1, 5))
    assert first == pytest.approx(2 * second)


def test_lines_are_named_at_their_ends():
    board = board_of(made.answer(made.shape()))
    written = {text.get_text(): text for text in board.texts}
    assert {"data", "model"} <= set(written)
    heights = [written[name].get_position()[1] for name in ("data", "model")]
    ends = [board.lines[name].get_ydata()[-1] for name in ("data", "model")]
    assert (heights[0] > heights[1]) == (ends[0] > ends[1])


def test_a_whole_number_has_no_ticks_between_whole_numbers():
    finding = made.shape(predictor="past_repairs", cases=(200.0, 40.0, 9.0, 1.0), high=2.0)
    axes = drawn(made.answer(finding)).axes
    assert all(tick == round(tick) for tick in axes.get_xticks())


def test_the_predictor_is_named_above_and_along_the_axis():
    words = text_of(made.answer(made.shape()))
    assert "Shape along pipe age" in words
    assert "Pipe age (years)" in words


def test_an_unknown_band_is_left_out():
    nothing = (math.nan,) * 10
    evidence = replace(made.shape().evidence, lower=nothing, upper=nothing)
    board = board_of(made.answer(replace(made.shape(), evidence=evidence)))
    assert board.areas["band"].get_paths() == []
