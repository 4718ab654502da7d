import itertools

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from matplotlib.figure import Figure

from plainodds.drawings.ticks import bare, fraction_ticks, label_ticks, round_ticks
from plainodds.phrases.numbers import simple_fraction


def names(ticks):
    return [simple_fraction(tick) for tick in ticks]


def test_ticks_of_odds_are_simple_fractions():
    assert names(fraction_ticks(0.2, 5.0, 1.5)) == ["1/4", "1/2", "1", "2", "4"]
    assert names(fraction_ticks(0.7, 1.8, 1.05)) == ["4/5", "1", "5/4", "3/2"]
    assert names(fraction_ticks(1 / 300, 300, 5.0)) == ["1/100", "1/10", "1", "10", "100"]


@given(st.floats(-11, 0), st.floats(0, 11), st.floats(1.05, 6))
@settings(deadline=None)
def test_ticks_of_odds_hold_one_and_keep_apart(lower, upper, apart):
    low, high = 2.0**lower, 2.0**upper
    ticks = fraction_ticks(low, high, apart)
    assert 1.0 in ticks
    assert all(low * 0.999 <= tick <= high * 1.001 for tick in ticks)
    assert all(b / a >= apart * 0.999 for a, b in itertools.pairwise(ticks))


def test_a_wide_range_has_ticks_on_both_sides_of_one():
    for reach in (2.0, 5.0, 30.0, 1e3, 1e6):
        ticks = fraction_ticks(1 / reach, reach, reach**0.2)
        assert ticks[0] < 1 < ticks[-1]


def test_round_ticks_are_round_and_within_the_range():
    assert round_ticks(0.0, 0.57, 6) == (0.0, 0.1, 0.2, 0.3, 0.4, 0.5)
    assert round_ticks(18, 95, 5) == (20.0, 40.0, 60.0, 80.0)
    assert round_ticks(3.0, 3.0) == ()
    assert round_ticks(0.0, float("nan")) == ()


def test_ticks_that_are_there_already_are_kept():
    axes = Figure().add_axes((0, 0, 1, 1))
    label_ticks(axes, "x", [0, 1], ["no", "yes"], {})
    before = axes.xaxis.get_major_locator()
    label_ticks(axes, "x", [0, 1], ["no", "yes"], {})
    assert axes.xaxis.get_major_locator() is before
    label_ticks(axes, "x", [0, 1], ["no", "maybe"], {})
    assert axes.xaxis.get_major_locator() is not before
    assert [text.get_text() for text in axes.get_xticklabels()] == ["no", "maybe"]


@pytest.mark.parametrize("scale", ["linear", "log"])
def test_bare_axes_show_nothing_of_their_own(scale):
    axes = Figure().add_axes((0, 0, 1, 1))
    axes.set_xscale(scale)
    axes.grid(visible=True)
    bare(axes)
    assert not any(spine.get_visible() for spine in axes.spines.values())
    assert not len(axes.get_xticks())
    assert not axes.patch.get_visible()
