import math
from dataclasses import replace

import numpy as np
import pytest
from matplotlib.figure import Figure

from plainodds.answers.bounded import UNDETERMINED, as_ratio
from plainodds.answers.estimate import Estimate
from plainodds.drawings.odds import OddsDrawing
from plainodds.drawings.odds_axis import axis_range
from plainodds.drawings.odds_figures import estimate_texts
from plainodds.drawings.odds_rows import groups_of
from plainodds.drawings.theme import theme_of
from tests.drawings import made
from tests.drawings.conftest import words_on
from tests.drawings.seen import assert_readable

THEME = theme_of("page")


def drawn(answer, width=500, height=None):
    theme = THEME
    if height is None:
        height = OddsDrawing.natural_height(answer, theme, width)
    figure = Figure(figsize=(width / 72, height / 72))
    return OddsDrawing(figure.add_axes((0, 0, 1, 1)), answer, theme)


def marks_of(drawing, model=0):
    x, y = drawing.marks[model].points.get_data()
    return list(x), list(y)


def test_every_odds_ratio_is_marked_where_it_lies():
    answer = made.odds_answer()
    x, y = marks_of(drawn(answer))
    assert x == [row.odds_ratio.estimate for row in answer.rows]
    assert y == sorted(y), "rows run downwards, and the axis too"


def test_every_interval_runs_from_end_to_end():
    answer = made.odds_answer()
    segments = drawn(answer).marks[0].intervals.get_segments()
    ends = [(segment[0][0], segment[1][0]) for segment in segments]
    assert ends == [(row.odds_ratio.lower, row.odds_ratio.upper) for row in answer.rows]


def test_the_axis_is_logarithmic_with_ticks_at_simple_fractions():
    drawing = drawn(made.odds_answer())
    assert drawing.axes.get_xscale() == "log"
    shown = [text.get_text() for text in drawing.axes.get_xticklabels()]
    assert shown == ["1/4", "1/2", "1", "2", "4"]


def test_the_reference_line_stands_at_one():
    segments = drawn(made.odds_answer()).reference.get_segments()
    assert {x for segment in segments for x in segment[:, 0]} == {1.0}


def test_figures_stand_beside_their_rows():
    answer = made.odds_answer()
    words = words_on(drawn(answer).axes.get_figure())
    assert "1.40 (1.30 to 1.52)" in words
    assert "0.27 (0.17 to 0.44)" in words
    assert "odds ratio\n(95% interval)" in words or "odds ratio (95% interval)" in words


def test_the_decimal_points_of_the_estimates_are_in_line():
    rows = [
        made.odds_row("age_years", 0, 10, math.log(each), 0.1, per_step=True)
        for each in (0.5, 12.3, 1.05)
    ]
    texts = estimate_texts(rows)
    assert texts[0].startswith("\u20070.50")
    assert texts[1].startswith("12.3\u2007 (")
    assert texts[2].startswith("\u20071.05")


def test_each_predictor_is_named_once_with_its_changes_beneath():
    words = words_on(drawn(made.odds_answer()).axes.get_figure())
    assert words.count("Pipe age") == 1
    assert words.count("per 10 years more") == 1
    assert {"material cast iron", "material ductile iron", "material PVC"} <= set(words)
    assert "given pipe age 41 years" in words
    assert "PVC against cast iron" in words


def test_what_all_rows_share_is_said_once_and_what_they_do_not_beside_each():
    given = [("age_years", 41.0)]
    rows = [
        made.odds_row("material", "cast iron", "PVC", 0.1, 0.1, given=(*given, ("soil", soil)))
        for soil in ("low", "high")
    ]
    (group,) = groups_of(made.odds_answer(rows))
    assert group.rest == "PVC against cast iron, given pipe age 41 years"
    assert [slot.label for slot in group.slots] == ["soil corrosivity low", "soil corrosivity high"]


def test_models_share_a_row_and_differ_by_colour_and_marker():
    answer = made.odds_of_models()
    drawing = drawn(answer)
    crude, adjusted = (mark.points for mark in drawing.marks)
    assert crude.get_marker() != adjusted.get_marker()
    assert crude.get_markerfacecolor() != adjusted.get_markerfacecolor()
    assert list(crude.get_xdata()) == [
        row.odds_ratio.estimate for row in answer.rows if row.model == "crude"
    ]
    gaps = np.subtract(adjusted.get_ydata(), crude.get_ydata())
    assert (gaps > 0).all()
    assert {"crude", "adjusted"} <= set(words_on(drawing.axes.get_figure()))


def test_models_are_set_side_by_side_whatever_order_their_rows_come_in():
    answer = made.odds_of_models()
    by_model = sorted(answer.rows, key=lambda row: row.model, reverse=True)
    groups = groups_of(replace(answer, rows=tuple(by_model)))
    assert all(len(slot.rows) == 2 for group in groups for slot in group.slots)


def test_an_enormous_interval_does_not_squash_the_rest():
    usual = axis_range(made.odds_answer().rows)
    giant = axis_range(made.odds_with_giants().rows)
    assert math.log(giant[1] / giant[0]) < 1.6 * math.log(usual[1] / usual[0])


def test_what_leaves_the_axis_ends_in_an_arrow_and_its_figures_stay():
    answer = made.odds_with_giants()
    drawing = drawn(answer)
    lower, upper = drawing.axes.get_xlim()
    left, right = (arrow.get_xdata() for arrow in drawing.marks[0].arrows)
    assert list(left) == [lower] * 3, "the two giants and the estimate far below"
    assert list(right) == [upper] * 2
    for segment in drawing.marks[0].intervals.get_segments():
        assert lower <= segment[:, 0].min() <= segment[:, 0].max() <= upper
    words = words_on(drawing.axes.get_figure())
    assert any(text.startswith("over 1,000") for text in words)
    assert any("Arrow" in text for text in words)


def test_an_estimate_beyond_the_axis_has_an_arrow_and_no_marker():
    answer = made.odds_with_giants()
    x, _ = marks_of(drawn(answer))
    assert len(x) == len(answer.rows) - 2


def test_without_arrows_nothing_is_said_of_arrows():
    assert not any("Arrow" in text for text in words_on(drawn(made.odds_answer()).axes.figure))


def test_without_intervals_there_are_markers_and_the_reason():
    answer = made.odds_without_intervals()
    drawing = drawn(answer)
    x, _ = marks_of(drawing)
    assert x == [row.odds_ratio.estimate for row in answer.rows]
    lengths = [np.ptp(segment[:, 0]) for segment in drawing.marks[0].intervals.get_segments()]
    assert max(lengths) == 0
    words = words_on(drawing.axes.get_figure())
    assert "1.40" in words
    assert "odds ratio" in words
    assert any(made.NO_INTERVAL in text for text in words)


def test_an_odds_ratio_near_one_lies_near_the_middle_of_a_calm_axis():
    row = made.odds_row("diameter_mm", 0, 50, 0.004, 0.002, per_step=True)
    lower, upper = axis_range([row])
    assert lower <= 0.8
    assert upper >= 1.25


@pytest.mark.parametrize("width", [220, 260, 600])
def test_a_narrow_picture_sets_the_labels_above_their_rows(width):
    drawing = drawn(made.odds_answer(), width)
    drawing.axes.get_figure().draw_without_rendering()
    plot = drawing.axes.get_position().width
    narrow = width < 300
    assert len(drawing.reference.get_segments()) == (11 if narrow else 1)
    assert plot > 0.3 if narrow else plot > 0.2


def test_another_answer_moves_the_artists():
    answer, other = made.odds_answer(), made.odds_answer(made.odds_rows(shift=0.2))
    assert OddsDrawing.structure(answer) == OddsDrawing.structure(other)
    drawing = drawn(answer)
    points = drawing.marks[0].points
    drawing.update(other)
    assert list(points.get_xdata()) == [row.odds_ratio.estimate for row in other.rows]
    texts = words_on(drawing.axes.get_figure())
    assert "1.72 (1.59 to 1.86)" in texts
    assert "1.40 (1.30 to 1.52)" not in texts


def test_other_predictors_are_another_structure():
    assert OddsDrawing.structure(made.odds_answer()) != OddsDrawing.structure(
        made.odds_answer(made.odds_rows()[:5])
    )


def test_the_event_is_named():
    assert "Odds of burst this winter" in words_on(drawn(made.odds_answer()).axes.figure)


def without_finite_estimates(*logs):
    """The usual rows, some of them with another log odds ratio: (estimate, lower, upper)."""
    answer = made.odds_answer()
    rows = list(answer.rows)
    for place, (estimate, lower, upper) in enumerate(logs):
        log = Estimate(estimate, None, lower, upper)
        rows[place] = replace(rows[place], log_odds_ratio=log, odds_ratio=as_ratio(log))
    return replace(answer, rows=tuple(rows))


def test_an_odds_ratio_without_a_finite_estimate_runs_open_ended_to_the_edge():
    answer = without_finite_estimates((math.inf, 0.3, math.inf), (-math.inf, -math.inf, -0.2))
    drawing = drawn(answer)
    x, _ = marks_of(drawing)
    assert len(x) == len(answer.rows) - 2, "there is no point to mark"
    assert np.isfinite(x).all()
    lower, upper = drawing.axes.get_xlim()
    up, down = drawing.marks[0].intervals.get_segments()[:2]
    assert sorted(up[:, 0]) == pytest.approx([math.exp(0.3), upper])
    assert sorted(down[:, 0]) == pytest.approx([lower, math.exp(-0.2)])
    left, right = (arrow.get_data() for arrow in drawing.marks[0].arrows)
    assert (list(left[0]), list(right[0])) == ([lower], [upper])
    assert (left[1][0], right[1][0]) == (down[0, 1], up[0, 1])
    words = words_on(drawing.axes.get_figure())
    assert "no finite value (1.35 or more)" in words
    assert "no value above 0 (0.82 or less)" in words
    assert any("told without exception" in text.replace("\n", " ") for text in words)
    assert not any("1,000" in text for text in words)


def test_without_an_end_only_the_arrow_is_left():
    drawing = drawn(without_finite_estimates((math.inf, None, None)))
    upper = drawing.axes.get_xlim()[1]
    assert list(drawing.marks[0].arrows[1].get_xdata()) == [upper]
    assert np.ptp(drawing.marks[0].intervals.get_segments()[0][:, 0]) == 0
    words = words_on(drawing.axes.get_figure())
    assert "no finite value" in words
    assert not any("No intervals can be given" in text for text in words)


def test_what_the_data_leave_open_is_not_drawn_and_said_to_be_not_known():
    answer = without_finite_estimates((math.nan, None, None))
    drawing = drawn(answer)
    assert len(drawing.marks[0].intervals.get_segments()) == len(answer.rows) - 1
    assert len(marks_of(drawing)[0]) == len(answer.rows) - 1
    assert "not known" in words_on(drawing.axes.get_figure())


@pytest.mark.parametrize(
    "log", [(math.inf, 0.3, math.inf), (-math.inf, -math.inf, -0.2), (math.nan, None, None)]
)
def test_it_does_not_squash_the_rest(log):
    usual = axis_range(made.odds_answer().rows)
    open_ended = axis_range(without_finite_estimates(log).rows)
    assert math.log(open_ended[1] / open_ended[0]) < 1.6 * math.log(usual[1] / usual[0])


def test_the_finite_end_is_in_view_where_it_is_not_far_off():
    low, high = axis_range(without_finite_estimates((math.inf, 2.0, math.inf)).rows)
    assert high > math.exp(2.0)
    assert low < 1


def test_nothing_but_open_ends_still_has_an_axis():
    (row, *_) = without_finite_estimates((math.inf, None, None)).rows
    low, high = axis_range([row])
    assert 0 < low < 1 < high < math.inf
    assert math.isfinite(axis_range([replace(row, log_odds_ratio=UNDETERMINED)])[1])


@pytest.mark.parametrize("width", [300, 500])
def test_open_ends_fit_into_the_slot(width):
    answer = without_finite_estimates((math.inf, 0.3, math.inf), (-math.inf, -math.inf, -0.2))
    assert_readable(drawn(answer, width).axes.get_figure())


def sparse_answer(**more):
    """PVC has 3 events in 14 pipes; the lined pipes never burst but have an interval."""
    material = replace(
        made.MATERIAL, level_cases=(2714.0, 1806.0, 14.0), level_events=(301.0, 170.0, 3.0)
    )
    lined = replace(made.LINED, level_cases=(5100.0, 900.0), level_events=(400.0, 4.0))
    rows = (
        made.odds_row("age_years", 41.0, 51.0, 0.34, 0.04, per_step=True),
        made.odds_row("material", "cast iron", "ductile iron", -0.62, 0.17),
        made.odds_row("material", "cast iron", "PVC", -1.3, 0.3),
        made.odds_row("lined", False, True, -1.1, 0.5),
    )
    return replace(
        made.odds_answer(rows), subject=made.subject(predictors=(made.AGE, material, lined)), **more
    )


def text_on(drawing, words):
    (found,) = (
        text for text in drawing.axes.texts if text.get_visible() and text.get_text() == words
    )
    return found


@pytest.mark.parametrize("width", [240, 330, 500, 800])
def test_a_row_of_few_cases_says_so_in_small_type_under_its_label(width):
    drawing = drawn(sparse_answer(), width)
    words = [text for text in words_on(drawing.axes.get_figure()) if "events in" in text]
    assert words == ["PVC: 3 events in 14", "yes: 4 events in 900"]
    label, mark = (
        text_on(drawing, each) for each in ("PVC against cast iron", "PVC: 3 events in 14")
    )
    assert mark.get_fontsize() < label.get_fontsize()
    renderer = drawing.axes.get_figure().canvas.get_renderer()
    above, below = (each.get_window_extent(renderer) for each in (label, mark))
    assert below.y1 <= above.y0 + 1.0
    assert above.y0 - below.y1 < above.height
    assert below.x0 == pytest.approx(above.x0, abs=1.0)
    assert_readable(drawing.axes.get_figure())


def test_rows_of_few_cases_stay_readable_in_a_picture_taller_than_it_needs_to_be():
    height = 1.4 * OddsDrawing.natural_height(sparse_answer(), THEME, 500)
    assert_readable(drawn(sparse_answer(), 500, height).axes.get_figure())


def test_a_picture_without_rows_of_few_cases_has_no_mark_and_no_room_for_one():
    many = replace(sparse_answer(), subject=made.subject())
    without = OddsDrawing.natural_height(many, THEME, 240)
    assert OddsDrawing.natural_height(sparse_answer(), THEME, 240) > without
    assert not any("events in" in text for text in words_on(drawn(many).axes.get_figure()))


def test_marks_come_and_go_with_the_answer():
    drawing = drawn(sparse_answer())
    drawing.update(replace(sparse_answer(), subject=made.subject()))
    assert not any("events in" in text for text in words_on(drawing.axes.get_figure()))
    drawing.update(sparse_answer())
    assert "PVC: 3 events in 14" in words_on(drawing.axes.get_figure())
