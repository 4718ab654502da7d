import itertools

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from matplotlib.figure import Figure

from plainodds.drawings.geometry import Margins, Room, apart, corner, slot_size

lengths = st.floats(0.5, 20)
centres = st.floats(-50, 250)


@given(st.lists(st.tuples(centres, lengths), min_size=1, max_size=9))
@settings(deadline=None)
def test_labels_set_apart_keep_clear_of_each_other_and_of_the_ends(pairs):
    wanted, sizes = zip(*pairs, strict=True)
    placed = apart(wanted, sizes, 0.0, 200.0)
    edges = sorted((at - size / 2, at + size / 2) for at, size in zip(placed, sizes, strict=True))
    assert edges[0][0] >= -1e-6
    assert edges[-1][1] <= 200 + 1e-6
    assert all(a[1] <= b[0] + 1e-6 for a, b in itertools.pairwise(edges))


@given(st.lists(centres, min_size=2, max_size=9))
@settings(deadline=None)
def test_labels_set_apart_keep_their_order(wanted):
    placed = apart(wanted, [3.0] * len(wanted), 0.0, 200.0)
    order = sorted(range(len(wanted)), key=lambda i: wanted[i])
    assert all(placed[a] <= placed[b] for a, b in itertools.pairwise(order))


def test_labels_that_have_room_stay_where_they_want_to_be():
    assert apart([10.0, 50.0], [4.0, 4.0], 0.0, 100.0) == [10.0, 50.0]


def test_labels_without_room_share_what_there_is():
    placed = apart([1.0, 1.0, 1.0], [10.0, 10.0, 10.0], 0.0, 15.0)
    assert placed == pytest.approx([2.5, 7.5, 12.5])


def test_nothing_to_set_apart_is_nothing():
    assert apart([], [], 0.0, 1.0) == []


def axes_in(width, height, dpi=100):
    figure = Figure(figsize=(width / 72, height / 72), dpi=dpi)
    return figure, figure.add_axes((0, 0, 1, 1))


@pytest.mark.parametrize("dpi", [72, 192, 600])
def test_margins_are_in_points_at_every_resolution(dpi):
    figure, axes = axes_in(300, 200, dpi)
    room = Room(axes, lambda: None)
    room.margins = Margins(left=30, right=60, bottom=20, top=10)
    figure.draw_without_rendering()
    box = axes.get_window_extent()
    assert [v * 72 / dpi for v in box.extents] == pytest.approx([30, 20, 240, 190])
    assert room.plot_size() == pytest.approx((210, 170))


def test_margins_that_do_not_fit_leave_something_of_the_plot():
    figure, axes = axes_in(100, 100)
    room = Room(axes, lambda: None)
    room.margins = Margins(left=90, right=90, bottom=0, top=0)
    figure.draw_without_rendering()
    assert axes.get_position().width == pytest.approx(0.15)


def test_points_are_measured_from_a_corner():
    _, axes = axes_in(300, 200, dpi=144)
    x, y = corner(axes, 1, 0).transform((-10, 5))
    assert (x, y) == pytest.approx((580, 10))


def test_a_slot_is_measured_in_points():
    assert slot_size(axes_in(300, 200)[1]) == pytest.approx((300, 200))


def test_whoever_draws_is_told_of_another_size_once():
    told = []
    figure, axes = axes_in(300, 200)
    Room(axes, lambda: told.append(slot_size(axes)))
    figure.draw_without_rendering()
    assert told == []
    figure.set_size_inches(5, 5)
    figure.draw_without_rendering()
    figure.draw_without_rendering()
    assert told == [pytest.approx((360, 360))]
