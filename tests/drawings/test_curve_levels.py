import numpy as np
import pytest
from matplotlib.colors import same_color
from matplotlib.figure import Figure

from plainodds.drawings.curve_levels import LevelsDrawing
from plainodds.drawings.theme import theme_of
from tests.drawings import made
from tests.drawings.conftest import words_on

THEME = theme_of("page")


def drawn(answer, width=500, height=330):
    figure = Figure(figsize=(width / 72, height / 72))
    return LevelsDrawing(figure.add_axes((0, 0, 1, 1)), answer, THEME)


def test_each_level_has_a_point_at_its_estimate():
    answer = made.curve_of_levels(by=False)
    drawing = drawn(answer)
    x, y = drawing.lines[0].points.get_data()
    assert list(x) == [0, 1, 2]
    assert list(y) == list(answer.lines[0].estimate)
    assert [text.get_text() for text in drawing.axes.get_xticklabels()] == [
        "low", "moderate", "high",
    ]  # fmt: skip


def test_each_point_has_its_interval():
    answer = made.curve_of_levels(by=False)
    segments = drawn(answer).lines[0].intervals.get_segments()
    line = answer.lines[0]
    ends = [tuple(segment[:, 1]) for segment in segments]
    assert ends == list(zip(line.lower, line.upper, strict=True))


def test_lines_stand_side_by_side_and_levels_keep_apart():
    drawing = drawn(made.curve_of_levels())
    offsets = [line.offset for line in drawing.lines]
    assert offsets == sorted(offsets)
    assert sum(offsets) == pytest.approx(0)
    assert max(offsets) - min(offsets) < 0.7


def test_a_level_without_rows_is_hollow_with_a_broken_interval():
    drawing = drawn(made.curve_of_levels())
    loose = drawing.lines[2]
    assert list(loose.loose_points.get_xdata()) == [2 + loose.offset]
    assert list(loose.points.get_xdata()) == [loose.offset, 1 + loose.offset]
    assert same_color(loose.loose_points.get_markerfacecolor(), THEME.paper)
    assert len(loose.loose_intervals.get_segments()) == 1
    assert loose.loose_intervals.get_linestyles()[0][1] is not None
    assert any("Hollow point" in text for text in words_on(drawing.axes.figure))


def test_the_rows_of_each_level_are_counted_beneath():
    words = words_on(drawn(made.curve_of_levels(by=False)).axes.figure)
    assert {"2,410", "2,350", "1,240", "pipes"} <= set(words)


def test_counts_follow_the_level_and_not_the_place():
    answer = made.curve_of_levels(by=False)
    line = answer.lines[0]
    picked = type(line)(None, ("high",), *(v[2:] for v in (
        line.estimate, line.se, line.lower, line.upper, line.supported)))  # fmt: skip
    drawing = drawn(made.replace(answer, lines=(picked,)))
    words = words_on(drawing.axes.get_figure())
    assert "1,240" in words
    assert "2,410" not in words


def test_points_that_stand_alone_have_their_figure_beside_them():
    words = words_on(drawn(made.curve_of_levels(by=False)).axes.figure)
    assert {"6.9%", "10%", "18%"} <= set(words)
    assert not {"6.9%", "18%"} & set(words_on(drawn(made.curve_of_levels()).axes.figure))


def test_yes_and_no_are_levels_too():
    drawing = drawn(made.curve_yes_no())
    assert [text.get_text() for text in drawing.axes.get_xticklabels()] == ["no", "yes"]
    assert "5,100" in words_on(drawing.axes.get_figure())


def test_without_intervals_there_are_points_alone():
    drawing = drawn(made.curve_of_levels(intervals=False))
    assert all(not len(line.intervals.get_segments()) for line in drawing.lines)


def test_labels_that_do_not_fit_beside_each_other_are_turned():
    drawing = drawn(made.curve_of_many_levels(), width=300)
    assert {text.get_rotation() for text in drawing.axes.get_xticklabels()} == {90.0}
    wide = drawn(made.curve_of_levels(), width=500)
    assert {text.get_rotation() for text in wide.axes.get_xticklabels()} == {0.0}


def test_another_answer_moves_the_points():
    answer = made.curve_of_levels()
    other = made.replace(answer, lines=tuple(
        made.replace(line, estimate=tuple(v * 1.5 for v in line.estimate))
        for line in answer.lines))  # fmt: skip
    assert LevelsDrawing.structure(answer) == LevelsDrawing.structure(other)
    drawing = drawn(answer)
    drawing.update(other)
    assert np.allclose(drawing.lines[0].points.get_ydata(), other.lines[0].estimate)
