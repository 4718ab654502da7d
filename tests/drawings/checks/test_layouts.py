"""Rows, tables, names beside marks and zones: where they stand."""

import pytest
from matplotlib.figure import Figure

from plainodds.drawings.checks.board import Board
from plainodds.drawings.checks.gauge import Gauge, draw_gauge
from plainodds.drawings.checks.rows import Row, laid_rows
from plainodds.drawings.checks.tables import draw_table, table_height
from plainodds.drawings.checks.tags import Tag, draw_tags
from tests.drawings.checks.sheet import THEME

ROWS = [Row("Soil", "low", "3 of 9"), Row("Soil", "high", "none of 4"), Row("", "Age", "× 1.2")]


@pytest.fixture
def board():
    axes = Figure(figsize=(6, 4)).add_axes((0.0, 0.0, 1.0, 1.0))
    return Board(axes, THEME)


def test_rows_stand_beside_their_lanes_where_there_is_room():
    laid = laid_rows(ROWS, THEME, 500.0)
    assert not laid.stacked
    assert [text for text, _ in laid.heads] == ["Soil"]
    assert [y for _, _, y in laid.labels] == list(laid.middles)
    assert [y for _, y in laid.figures] == list(laid.middles)
    assert list(laid.middles) == sorted(laid.middles)


def test_rows_stand_above_their_lanes_where_it_is_narrow():
    laid = laid_rows(ROWS, THEME, 220.0)
    assert laid.stacked
    for (_, _, y), (low, high), middle in zip(laid.labels, laid.spans, laid.middles, strict=True):
        assert y < low < middle < high
    assert laid.left + laid.right < 0.1 * 220


def test_long_labels_leave_the_plot_its_room():
    rows = [Row("", "a label that goes on and on " * 4, "a figure of many words " * 3)]
    for width in (220.0, 500.0):
        laid = laid_rows(rows, THEME, width)
        assert width - laid.left - laid.right > 0.2 * width


def test_the_title_of_an_axis_fits_into_the_slot():
    laid = laid_rows(ROWS, THEME, 500.0)
    middle = laid.left + (500.0 - laid.left - laid.right) / 2
    half = laid.title_room(500.0) / 2
    assert middle - half >= -1e-9
    assert middle + half <= 500.0 + 1e-9


def test_a_table_has_its_figures_flush_right_and_is_as_high_as_is_said(board):
    rows = [("Measure", "own", "corrected"), ("A name that has to be broken " * 3, "1", "0.9")]
    board.begin()
    draw_table(board, rows, 0.0, 0.0, 180.0, (0, 1))
    board.end()
    (*_, lowest) = (segment[0][1] for segment in board.segments["rules of Measure"].get_segments())
    assert -lowest == pytest.approx(table_height(rows, THEME, 180.0))
    ends = {text.get_position()[0] for text in board.texts if text.get_ha() == "right"}
    assert len(ends) == 2
    assert max(ends) <= 180.0


def test_a_table_with_long_figures_stays_within_its_width(board):
    rows = [("Measure", "figure"), ("A name of some length", "over 1,000, 8 df, p-value unknown")]
    for width in (120.0, 180.0, 400.0):
        board.begin()
        draw_table(board, rows, 0.0, 0.0, width, (0, 1))
        board.end()
        edges = board.segments["rules of Measure"].get_segments()[0][:, 0]
        assert edges.max() <= width + 1e-6


def test_names_stand_clear_of_each_other_and_of_all_marks(board):
    tags = [Tag(f"row {place}", 200.0 + 3 * place, 100.0, 4.0, True) for place in range(5)]
    board.begin()
    draw_tags(board, tags, [(tag.x, tag.y) for tag in tags], (400.0, 200.0))
    board.end()
    board.axes.figure.draw_without_rendering()
    boxes = [text.get_window_extent() for text in board.texts]
    assert len(boxes) == 5
    for place, box in enumerate(boxes):
        assert not any(box.overlaps(other) for other in boxes[place + 1 :])
    assert board.segments["tag leaders"].get_segments(), "some stand away, with a line to them"


def test_a_name_that_is_not_wanted_stands_beside_its_mark_or_not_at_all(board):
    crowd = [(200.0 + dx, 100.0 + dy) for dx in range(-60, 61, 4) for dy in range(-30, 31, 4)]
    board.begin()
    draw_tags(board, [Tag("lost", 200.0, 100.0, 4.0, False)], crowd, (400.0, 200.0))
    board.end()
    assert not any(text.get_text() for text in board.texts)


def test_a_zone_too_narrow_for_its_words_goes_without(board):
    gauge = Gauge(
        2.0, "2", 1.0, 1000.0, (10.0, 11.0), ("few", "in between", "many"), ((1.0, "1"),), "title"
    )
    board.axes.set_xscale("log")
    board.begin()
    draw_gauge(board, gauge, 300.0, 100.0)
    board.end()
    written = {text.get_text() for text in board.texts}
    assert {"few", "many"} <= written
    assert not any("…" in text or "between" in text for text in written)


def test_what_an_answer_has_no_use_for_goes_out_of_sight(board):
    board.begin()
    line = board.line("kept", [0, 1], [0, 1])
    mark = board.marks("gone", [(0.5, 0.5)], 0)
    board.write("gone", 0.0, 0.0, board.at(0, 0))
    board.end()
    board.begin()
    assert board.line("kept", [0, 1], [1, 0]) is line
    board.end()
    assert line.get_visible()
    assert list(line.get_ydata()) == [1, 0]
    assert not mark.get_visible()
    assert [text.get_text() for text in board.texts] == [""]
