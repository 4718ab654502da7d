"""How much data there is."""

import pytest

from tests.drawings import made_findings as made
from tests.drawings.checks.sheet import board_of, drawn, points_of, text_of
from tests.drawings.seen import words_on


@pytest.mark.parametrize(
    ("events", "others", "parameters"), [(59.0, 130.0, 8), (3.0, 900.0, 12), (9e3, 3e3, 3)]
)
def test_events_per_coefficient_stand_against_five_and_ten(events, others, parameters):
    board = board_of(made.answer(made.amount(events, others, parameters)))
    ((value, _),) = points_of(board.lines["value"])
    assert value == pytest.approx(min(events, others) / parameters)
    assert {each[0][0] for each in board.segments["marks"].get_segments()} == {5.0, 10.0}
    low, high = board.axes.get_xlim()
    assert low < value < high
    assert high > 10


def test_a_mark_gives_way_to_the_figure():
    drawing = drawn(made.answer(made.amount()), 300)
    drawing.axes.figure.draw_without_rendering()
    (figure,) = (text for text in drawing.board.texts if text.get_text() == "7.38")
    box = figure.get_window_extent()
    marks = drawing.board.segments["marks"]
    for segment in marks.get_segments():
        (x, top), (_, foot) = marks.get_transform().transform(segment)
        beside = x < box.x0 or x > box.x1
        assert beside or foot >= box.y1 - 1 or top <= box.y0 + 1


def test_the_bar_is_divided_as_the_cases_are():
    board = board_of(made.answer(made.amount()))
    events, others = (
        board.areas[name].get_paths()[0].vertices[:, 0] for name in ("events", "others")
    )
    whole = others.max() - events.min()
    assert (events.max() - events.min()) / whole == pytest.approx(59 / 189, abs=0.01)


def test_the_rarer_kind_is_the_one_counted():
    assert "Pipes with burst this winter for each of 8 coefficients" in text_of(
        made.answer(made.amount())
    )
    assert "Pipes without burst this winter for each of 3 coefficients" in text_of(
        made.answer(made.amount(9000.0, 3000.0, 3))
    )


def test_both_kinds_are_counted_and_zones_named():
    words = words_on(drawn(made.answer(made.amount())).axes.figure)
    assert {"59 pipes with burst this winter", "130 pipes without burst this winter", "too few",
            "few", "no longer few"} <= set(words)  # fmt: skip
