"""Axes and strips that the pictures of checks share."""

import math
from itertools import pairwise

import pytest
from hypothesis import given
from hypothesis import strategies as st

from plainodds.drawings.checks.along import (
    chances_axis,
    density,
    marked_places,
    numbers_axis,
    x_axis_height,
)
from plainodds.drawings.checks.lanes import log_ticks
from tests.drawings.checks.sheet import THEME

chances = st.lists(st.floats(0.0, 1.0), min_size=1, max_size=8)


@given(chances, chances)
def test_all_that_has_to_be_seen_is_on_an_axis_of_chances(inner, outer):
    axis = chances_axis(inner, outer, 5)
    assert axis.lower <= min(inner)
    assert axis.upper >= max(inner)
    assert axis.lower < axis.upper
    assert all(0 <= tick <= 1 for tick in axis.ticks)


@given(st.floats(0.0, 0.5), st.floats(0.001, 0.3))
def test_intervals_widen_an_axis_of_chances_only_so_far(low, span):
    axis = chances_axis((low, low + span), (0.0, 1.0), 5)
    assert axis.upper - axis.lower <= 2.5 * 1.1 * span + low + 1e-9


def test_a_range_near_nought_or_one_is_shown_to_its_end():
    assert chances_axis((0.04, 0.3), (), 5).lower < 0
    assert chances_axis((0.7, 0.97), (), 5).upper > 1
    middle = chances_axis((0.4, 0.5), (), 5)
    assert (middle.lower, middle.upper) == (pytest.approx(0.395), pytest.approx(0.505))


def test_chances_that_are_all_the_same_have_an_axis():
    axis = chances_axis((0.5, 0.5), (), 5)
    assert axis.lower < 0.5 < axis.upper


def test_ticks_are_percentages():
    axis = chances_axis((0.0, 0.4), (), 5)
    assert dict(zip(axis.labels, axis.ticks, strict=True))["20%"] == pytest.approx(0.2)


def test_a_share_of_an_axis_stays_within_it():
    axis = numbers_axis(10.0, 20.0, 5)
    assert [axis.share(each) for each in (5.0, 10.0, 15.0, 30.0)] == [0.0, 0.0, 0.5, 1.0]


def test_whole_numbers_lose_the_ticks_between_them():
    axis = numbers_axis(0.0, 2.0, 5)
    assert any(tick != round(tick) for tick in axis.ticks)
    assert axis.of_whole_numbers().ticks == (0.0, 1.0, 2.0)
    assert axis.of_whole_numbers().labels == ("0", "1", "2")


def test_bars_have_areas_in_proportion_to_cases():
    bars = density([0.0, 10.0], [10.0, 40.0], [100.0, 150.0], 40.0)
    areas = [(last - first) * height for first, last, height in bars]
    assert areas[1] / areas[0] == pytest.approx(1.5)
    assert max(height for _, _, height in bars) == 1.0


def test_single_values_have_bars_as_high_as_their_cases():
    bars = density([0.0, 1.0, 2.0], [0.0, 1.0, 2.0], [80.0, 20.0, 4.0], 2.0)
    assert [height for _, _, height in bars] == pytest.approx([1.0, 0.25, 0.05])
    assert all(last > first for first, last, _ in bars)
    assert bars[0][1] < bars[1][0]


def test_small_gaps_between_bins_are_shared():
    bars = density([0.0, 10.5], [10.0, 40.0], [100.0, 150.0], 40.0)
    assert bars[0][1] == bars[1][0] == 10.25


def test_marks_are_few_and_no_two_lines_alike():
    assert marked_places(3, 0.5) == [0, 1, 2]
    one, other = marked_places(100, 0.0), marked_places(100, 0.5)
    assert len(one) == len(other) == 5
    assert not set(one) & set(other)


def test_a_title_takes_a_second_line_only_where_it_needs_one():
    short, long = (x_axis_height("Chance " * times, THEME, 200.0) for times in (2, 12))
    assert long - short == pytest.approx(1.25 * THEME.small)


@given(st.floats(1e-4, 1.0), st.floats(2.0, 1e6), st.integers(3, 8))
def test_ticks_of_a_logarithmic_axis_are_round_and_few(lower, times, most):
    ticks = log_ticks(lower, lower * times, most)
    assert len(ticks) <= most
    assert all(lower <= tick * (1 + 1e-6) for tick in ticks)
    assert all(after > before for before, after in pairwise(ticks))
    for tick in ticks:
        leading = tick / 10 ** math.floor(math.log10(tick) + 1e-9)
        assert any(math.isclose(leading, step, rel_tol=1e-6) for step in (1, 2, 3, 5))
