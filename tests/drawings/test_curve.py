from dataclasses import replace

import numpy as np
import pytest
from matplotlib.colors import same_color
from matplotlib.figure import Figure

from plainodds.drawings.curve import CurveDrawing
from plainodds.drawings.curve_scale import is_cut, vertical_axis
from plainodds.drawings.theme import theme_of
from tests.drawings import made
from tests.drawings.conftest import words_on

THEME = theme_of("page")


def drawn(answer, width=500, height=330):
    figure = Figure(figsize=(width / 72, height / 72))
    return CurveDrawing(figure.add_axes((0, 0, 1, 1)), answer, THEME)


def whole(line):
    """The line that solid and broken pieces make together."""
    solid, loose = line.supported.get_ydata(), line.unsupported.get_ydata()
    return np.where(np.isnan(solid), loose, solid)


def test_each_line_goes_through_its_estimates():
    answer = made.curve_by_material()
    for line, artists in zip(answer.lines, drawn(answer).lines, strict=True):
        assert whole(artists) == pytest.approx(line.estimate)
        assert list(artists.supported.get_xdata()) == list(line.at)


def test_a_line_is_solid_where_supported_and_broken_where_not():
    answer = made.curve_by_material()
    for line, artists in zip(answer.lines, drawn(answer).lines, strict=True):
        held = np.asarray(line.supported)
        assert np.isnan(artists.supported.get_ydata())[~held].all()
        assert not np.isnan(artists.supported.get_ydata())[held].any()
        assert not np.isnan(artists.unsupported.get_ydata())[~held].any()
        assert artists.supported.get_linestyle() == "-"
        assert artists.unsupported.is_dashed()
    assert any("Broken line" in text for text in words_on(drawn(answer).axes.figure))


def test_each_series_has_its_own_colour_marker_and_dash():
    lines = drawn(made.curve_of_six()).lines
    assert len({line.supported.get_color() for line in lines}) == 6
    assert len({line.marks.get_marker() for line in lines}) == 6
    assert len({tuple(line.unsupported._unscaled_dash_pattern[1]) for line in lines}) == 6


def test_markers_of_several_lines_do_not_stand_at_the_same_places():
    lines = drawn(made.curve_by_material()).lines
    places = [set(line.marks.get_xdata()) for line in lines]
    assert all(places)
    assert not places[0] & places[1]
    assert not places[1] & places[2]


def test_one_line_needs_no_markers_and_no_label():
    drawing = drawn(made.curve_alone())
    assert not len(drawing.lines[0].marks.get_xdata())
    assert drawing.frame.labels == []


def test_a_band_spans_its_interval():
    answer = made.curve_by_material()
    for line, artists in zip(answer.lines, drawn(answer).lines, strict=True):
        (outline,) = [path.vertices for path in artists.band.get_paths()]
        heights = outline[:-1, 1]
        assert heights.min() == pytest.approx(min(line.lower))
        assert heights.max() == pytest.approx(max(line.upper))


def test_the_band_is_darker_where_the_data_support_it():
    answer = made.curve_by_material()
    artists = drawn(answer).lines[0]
    (outline,) = [path.vertices for path in artists.supported_band.get_paths()]
    held = np.asarray(answer.lines[0].at)[np.asarray(answer.lines[0].supported)]
    assert outline[:, 0].min() == held.min()
    assert outline[:, 0].max() == held.max()


def test_lines_are_labelled_at_their_ends_in_their_order():
    answer = made.curve_by_material()
    drawing = drawn(answer)
    names = [text.get_text() for text in drawing.frame.labels]
    assert names == ["cast iron", "ductile iron", "PVC"]
    heights = [text.get_position()[1] for text in drawing.frame.labels]
    ends = [line.estimate[-1] for line in answer.lines]
    assert np.argsort(heights).tolist() == np.argsort(ends).tolist()
    assert "Material" in words_on(drawing.axes.get_figure())
    for mark, line in zip(drawing.frame.label_marks, drawing.lines, strict=True):
        assert same_color(mark.get_markerfacecolor(), line.supported.get_color())
        assert mark.get_marker() == line.marks.get_marker()


def test_the_support_stands_beneath_each_line_where_the_rows_are():
    answer = made.curve_by_material()
    drawing = drawn(answer)
    for artists, support in zip(drawing.lines, answer.support, strict=True):
        values, edges, base = artists.support.get_data()
        counts = np.asarray(support.counts)
        assert base < 0
        assert ((values > base) == (counts > 0)).all()
        assert np.argmax(values) == np.argmax(counts)
        assert len(edges) == len(support.edges)
    total = sum(answer.support[2].counts)
    assert f"{total:,} pipes" in words_on(drawing.axes.get_figure())


def test_chances_run_from_nought_in_percent():
    axes = drawn(made.curve_by_material()).axes
    assert axes.get_ylim()[0] == 0
    labels = [text.get_text() for text in axes.get_yticklabels()]
    assert labels[0] == "0%"
    assert all(label.endswith("%") for label in labels)
    assert "Chance of burst this winter" in words_on(axes.get_figure())


def test_chances_near_one_end_at_one():
    answer = made.curve_by_material(shift=4.5)
    axis = vertical_axis(answer, 200, 9)
    assert 1.0 <= axis.upper < 1.05
    assert axis.labels[-1] == "100%"


def test_slopes_are_percentage_points_with_a_line_at_zero():
    answer = made.curve_by_material("slope")
    drawing = drawn(answer)
    assert whole(drawing.lines[0]) == pytest.approx(100 * np.asarray(answer.lines[0].estimate))
    assert drawing.frame.zero.get_visible()
    lower, upper = drawing.axes.get_ylim()
    assert lower < 0 < upper
    assert any("percentage points per year" in text for text in words_on(drawing.axes.figure))


def test_odds_have_a_logarithmic_axis_with_simple_fractions():
    axes = drawn(made.curve_by_material("odds")).axes
    assert axes.get_yscale() == "log"
    labels = [text.get_text() for text in axes.get_yticklabels()]
    assert "1/4" in labels
    assert labels[-1] == "1"


def test_log_odds_have_a_plain_axis_with_true_minus_signs():
    axes = drawn(made.curve_by_material("linear_predictor")).axes
    assert axes.get_yscale() == "linear"
    assert "−2" in [text.get_text() for text in axes.get_yticklabels()]


def test_a_giant_band_is_cut_off_and_the_lines_keep_their_room():
    usual, giant = made.curve_by_material(), made.curve_with_giant_band()
    assert vertical_axis(giant, 200, 9).upper == pytest.approx(
        vertical_axis(usual, 200, 9).upper, rel=0.05
    )


def test_a_cut_interval_is_owned_up_to():
    usual = made.curve_by_material()
    line = usual.lines[0]
    wide = replace(usual, lines=(replace(line, upper=tuple(1.0 for _ in line.at)),))
    narrow = replace(wide, lines=(replace(line, estimate=tuple(0.01 for _ in line.at)),))
    assert not is_cut(usual)
    answer = replace(
        narrow,
        question=replace(narrow.question, by=None),
        lines=(replace(narrow.lines[0], by=None, upper=wide.lines[0].upper),),
        support=usual.support[:1],
    )
    assert is_cut(answer)
    assert any("cut off" in text for text in words_on(drawn(answer).axes.figure))


def test_without_intervals_there_is_no_band_and_the_reason():
    drawing = drawn(made.curve_by_material(intervals=False))
    assert all(not line.band.get_paths() for line in drawing.lines)
    words = words_on(drawing.axes.get_figure())
    assert any(made.NO_INTERVAL in text for text in words)
    assert not any("95%" in text for text in words)


def test_another_answer_moves_the_artists():
    answer, other = made.curve_by_material(), made.curve_by_material(shift=1.0)
    assert CurveDrawing.structure(answer) == CurveDrawing.structure(other)
    drawing = drawn(answer)
    kept = list(drawing.axes.get_children())
    drawing.update(other)
    assert whole(drawing.lines[0]) == pytest.approx(other.lines[0].estimate)
    assert drawing.axes.get_ylim()[1] > 0.6
    assert [artist for artist in kept if artist not in drawing.axes.get_children()] == []


def test_another_grid_and_another_predictor_keep_the_artists():
    drawing = drawn(made.curve_by_material())
    other = made.curve_by_material(points=7)
    drawing.update(other)
    assert list(drawing.lines[0].supported.get_xdata()) == list(other.lines[0].at)
    assert len(drawing.lines[0].marks.get_xdata()) == 7, "a few points are all marked"


@pytest.mark.parametrize("points", [1, 2])
def test_one_or_two_points_are_marked(points):
    drawing = drawn(made.curve_by_material(points=points))
    assert len(drawing.lines[0].marks.get_xdata()) == points
