"""The printed forest plot: a table with the plot as one of its columns."""

import math
from dataclasses import replace
from itertools import pairwise

import numpy as np
import pytest
from hypothesis import HealthCheck, Phase, given, settings
from hypothesis import strategies as st
from matplotlib.figure import Figure

from plainodds.answers.disclosure import guarded
from plainodds.drawings.draw import drawing_of
from plainodds.drawings.odds import OddsDrawing
from plainodds.drawings.odds_table import OddsTableDrawing
from plainodds.drawings.odds_table_axis import extent_of
from plainodds.drawings.odds_table_columns import columns_of
from plainodds.drawings.theme import theme_of
from plainodds.phrases.odds_lines import odds_lines
from plainodds.phrases.writing import writing
from tests.drawings import made
from tests.drawings.seen import assert_readable, boxes_on, words_on

PAGE = theme_of("page")
COLUMN = 88 / 25.4 * 72


def drawn(answer, width=500.0, theme=PAGE, height=None):
    if height is None:
        height = OddsTableDrawing.natural_height(answer, theme, width)
    # at low resolution letters advance by whole pixels
    figure = Figure(figsize=(width / 72, height / 72), dpi=200)
    return OddsTableDrawing(figure.add_axes((0, 0, 1, 1)), answer, theme)


def words(drawing):
    return words_on(drawing.axes.get_figure())


def place_of(drawing, text):
    """Where a text's box stands, in points from the left and from below."""
    scale = 72 / drawing.axes.get_figure().dpi
    (box,) = (box for told, box in boxes_on(drawing.axes.get_figure()) if told.strip() == text)
    return box.x0 * scale, box.x1 * scale, (box.y0 + box.y1) / 2 * scale


def dots_of(drawing, model=0):
    return [tuple(map(float, each)) for each in drawing.marks[model].points.get_xydata()]


def test_the_layout_of_the_question_chooses_the_drawing():
    assert drawing_of(made.odds_printed()) is OddsTableDrawing
    assert drawing_of(made.odds_answer()) is OddsDrawing


def test_every_odds_ratio_is_marked_where_it_lies_and_its_interval_from_end_to_end():
    answer = made.odds_printed()
    drawing = drawn(answer)
    shown = [row for line in odds_lines(answer) for row in line.rows]
    assert len(shown) == len(answer.rows)
    assert [x for x, _ in dots_of(drawing)] == [row.odds_ratio.estimate for row in shown]
    ends = [tuple(each[:, 0]) for each in drawing.marks[0].intervals.get_segments()]
    assert ends == [(row.odds_ratio.lower, row.odds_ratio.upper) for row in shown]


def test_each_reference_level_is_a_row_with_a_tick_at_one_and_no_marker():
    drawing = drawn(made.odds_printed())
    ticks = drawing.references.get_segments()
    assert len(ticks) == 3, "material, soil and lined"
    assert all((tick[:, 0] == 1.0).all() and np.ptp(tick[:, 1]) > 0 for tick in ticks)
    middles = {round(tick[:, 1].mean(), 3) for tick in ticks}
    assert not middles & {round(y, 3) for _, y in dots_of(drawing)}
    assert [" ".join(text.split()) for text in words(drawing)].count("1 (reference)") == 3


def test_levels_have_their_events_and_cases_beside_them():
    told = words(drawn(made.odds_printed()))
    assert "events /\npipes" in told
    assert {"267 / 2,410", "262 / 2,350", "139 / 1,240"} <= set(told)


def test_a_subgroup_has_the_counts_of_its_modifiers_level():
    told = words(drawn(made.odds_printed(made.odds_answer(made.odds_rows()[:3]))))
    assert {"301 / 2,714", "201 / 1,806", "166 / 1,480"} <= set(told)
    assert "per 10 years more, by material" in told


def test_counts_stand_beneath_the_labels_where_there_is_no_room_for_their_column():
    drawing = drawn(made.odds_printed(), COLUMN)
    assert "events / pipes" in words(drawing)
    left, _, y = place_of(drawing, "262 / 2,350")
    label_left, _, label_y = place_of(drawing, "moderate")
    assert left == pytest.approx(label_left, abs=1)
    assert 4 < label_y - y < 1.4 * PAGE.font_size


def test_events_of_few_cases_are_a_dash_with_a_note():
    answer = made.odds_printed(made.odds_nasty())
    told = words(drawn(guarded(answer, 10)))
    assert "– / ≤10" in told
    assert "– /  20" in told or "– / 20" in told
    assert any(text.startswith("A dash among the events: fewer than 10") for text in told)
    assert not any("dash" in text for text in words(drawn(answer)))


def test_without_counts_there_is_no_column_for_them():
    told = words(drawn(made.odds_printed(counts=False)))
    assert not any("events" in text or "pipes" in text for text in told)


def test_the_test_of_interaction_ends_the_lines_of_its_predictor():
    drawing = drawn(made.odds_printed())
    told = [text.replace("\u00a0", " ") for text in words(drawing)]
    for other in ("pipe age", "material"):
        assert (
            f"Test of interaction with {other}, Wald test on 2 degrees of freedom: p-value 0.031"
            in told
        )
    # its words interrupt the plot's lines
    spans = [tuple(each[:, 1]) for each in drawing.axis.reference.get_segments()]
    assert len(spans) == 3
    assert all(b[0] - a[1] > PAGE.small for a, b in pairwise(spans))


def test_decimal_points_of_the_estimates_are_in_line():
    rows = [
        made.odds_row(name, 0, 1, math.log(each), 0.1, per_step=True)
        for name, each in (("age_years", 0.5), ("diameter_mm", 12.3), ("past_repairs", 1.05))
    ]
    drawing = drawn(made.odds_printed(made.odds_answer(rows), tests=False))
    texts = [text.get_text() for (text,) in drawing._figures]
    assert [text.index(".") for text in texts] == [2, 2, 2]


def test_a_references_one_stands_under_the_units_of_the_other_figures():
    rows = [made.odds_row("soil", "low", level, log, 0.1) for level, log in
            (("moderate", math.log(12.3)), ("high", math.log(0.5)))]  # fmt: skip
    drawing = drawn(made.odds_printed(made.odds_answer(rows)))
    texts = [text.get_text() for (text,) in drawing._figures if text.get_text()]
    assert [text.partition(" (")[0][1] for text in texts] == ["1", "2", "0"]
    assert len({text.index(" (") for text in texts}) == 1


def test_models_side_by_side_have_a_column_each_headed_by_name_and_marker():
    drawing = drawn(made.odds_printed(made.odds_of_models()), 560)
    told = words(drawing)
    assert {"crude", "adjusted", "1.40 (1.30 to 1.52)", "1.58 (1.44 to 1.74)"} <= set(told)
    first, second = (
        place_of(drawing, "1.40 (1.30 to 1.52)"),
        place_of(drawing, "1.58 (1.44 to 1.74)"),
    )
    assert second[0] > first[1], "columns"
    assert second[2] == pytest.approx(first[2], abs=0.5), "of one line"
    heads = drawing._heads
    for i, (head, marks) in enumerate(zip(heads.markers, drawing.marks, strict=True)):
        assert head.get_marker() == marks.points.get_marker()
        scale = 72 / drawing.axes.get_figure().dpi
        x = head.get_transform().transform(head.get_xydata())[0][0] * scale
        assert x < place_of(drawing, ("crude", "adjusted")[i])[0]
    assert heads.markers[0].get_marker() != heads.markers[1].get_marker()
    gaps = np.subtract([y for _, y in dots_of(drawing, 1)], [y for _, y in dots_of(drawing)])
    assert (gaps > 0).all()


def test_where_models_have_no_room_side_by_side_each_has_its_figures_beside_its_marker():
    drawing = drawn(made.odds_printed(made.odds_of_models()), COLUMN)
    assert all(text.get_visible() for text in drawing._heads.key.texts)
    for model in range(2):
        shown = [y for column in drawing._figures
                 if column[0].get_text() and column[1].get_text()
                 for y in [column[model].get_position()[1]]]  # fmt: skip
        # figures are set at their baseline
        apart = np.subtract(shown, [y for _, y in dots_of(drawing, model)])
        assert np.ptp(apart) < 0.01


def test_a_model_without_a_row_has_a_dash_in_its_column_that_is_explained():
    answer = made.odds_of_models()
    rows = [row for row in answer.rows if row.model == "adjusted" or row.predictor == "soil"]
    told = words(drawn(made.odds_printed(replace(answer, rows=tuple(rows))), 560))
    assert "–" in told
    assert any("A dash among the figures: not in this model." in text for text in told)


def test_where_nothing_is_cut_the_axis_is_whole():
    drawing = drawn(made.odds_printed())
    assert len(drawing.axis.line.get_segments()) == 1
    assert len(drawing.axis.breaks.get_segments()) == 0
    assert not any("Arrow" in text for text in words(drawing))


def test_where_something_is_cut_the_axis_is_broken_on_that_side_and_the_row_has_an_arrow():
    row = made.odds_row("soil", "low", "high", 9.0, 3.0)
    drawing = drawn(made.odds_printed(made.odds_answer([*made.odds_rows()[5:6], row])))
    high = drawing.axes.get_xlim()[1]
    left, right = (list(arrow.get_xdata()) for arrow in drawing.marks[0].arrows)
    assert (left, right) == ([], [high])
    (before, after), strokes = (
        drawing.axis.line.get_segments(), drawing.axis.breaks.get_segments()
    )  # fmt: skip
    assert len(strokes) == 2
    assert before[1, 0] < after[0, 0]
    for stroke in strokes:
        (x0, y0), (x1, y1) = stroke
        assert x0 < x1
        assert y0 < 0 < y1, "it crosses the line, slanting"
        assert before[1, 0] - 3 < (x0 + x1) / 2 < after[0, 0] + 3
    # right of all that is shown to scale
    last = drawing.axis.ticks.get_segments()[-1][0, 0]
    assert strokes[0][:, 0].min() > last
    assert any("Arrow" in text for text in words(drawing))
    assert "over 1,000 (22.6 to over 1,000)" in words(drawing)


def test_what_is_cut_goes_to_the_edge_and_what_is_not_cut_is_never_in_the_break():
    answer = made.odds_printed(made.odds_with_giants())
    drawing, extent = drawn(answer), extent_of((answer.rows,))
    assert extent.broken_left
    assert extent.broken_right
    assert drawing.axes.get_xlim() == pytest.approx((extent.low, extent.high))
    for segment in drawing.marks[0].intervals.get_segments():
        for x in segment[:, 0]:
            inside = extent.lower * 0.999 <= x <= extent.upper * 1.001
            assert inside or x in (extent.low, extent.high)


def test_without_intervals_there_are_markers_figures_and_the_reason():
    drawing = drawn(made.odds_printed(made.odds_without_intervals(), tests=False))
    told = words(drawing)
    assert len(dots_of(drawing)) == 11
    assert "1.40" in told
    assert "odds ratio" in told
    assert "p-value" not in told
    assert made.NO_INTERVAL in told


def test_an_odds_ratio_that_is_left_open_is_told_and_not_drawn():
    rows = list(made.odds_rows())
    nothing = replace(rows[5].odds_ratio, estimate=math.nan, se=None, lower=None, upper=None)
    rows[5] = replace(rows[5], odds_ratio=nothing, log_odds_ratio=nothing)
    drawing = drawn(made.odds_printed(made.odds_answer(rows)))
    assert len(dots_of(drawing)) == len(rows) - 1
    assert "not known" in words(drawing)


def test_another_answer_moves_the_artists():
    answer = made.odds_printed()
    other = made.odds_printed(made.odds_answer(made.odds_rows(shift=0.2)))
    assert OddsTableDrawing.structure(answer) == OddsTableDrawing.structure(other)
    drawing = drawn(answer)
    points = drawing.marks[0].points
    drawing.update(other)
    assert drawing.marks[0].points is points
    assert "1.72 (1.59 to 1.86)" in words(drawing)
    assert "1.40 (1.30 to 1.52)" not in words(drawing)


def test_another_reference_is_another_word_and_without_tests_it_is_another_structure():
    answer = made.odds_printed()
    assert OddsTableDrawing.structure(answer) != OddsTableDrawing.structure(
        made.odds_printed(tests=False)
    )


def test_a_slot_that_is_higher_than_needed_gives_the_lines_air():
    answer = made.odds_printed()
    height = OddsTableDrawing.natural_height(answer, PAGE, 500.0)
    tight, airy = drawn(answer), drawn(answer, height=1.15 * height)
    steps = [np.diff([y for _, y in dots_of(each)]).min() for each in (tight, airy)]
    assert steps[1] > steps[0] + 1
    assert_readable(airy.axes.get_figure())


def test_panels_side_by_side_share_the_ends_of_their_scale():
    few = made.odds_printed(made.odds_answer(made.odds_rows()[:1]))
    drawing = drawn(few)
    alone = drawing.axes.get_xlim()
    drawing.beside = (made.odds_rows(),)
    drawing.update(few)
    wider = drawing.axes.get_xlim()
    assert wider[0] < alone[0]
    assert wider[1] > alone[1]


@pytest.mark.parametrize("theme", ["page", "screen", "screen dark", "slide"])
def test_a_reference_tick_and_a_break_are_told_by_form_and_contrast(theme):
    chosen = theme_of(theme)
    drawing = drawn(made.odds_printed(made.odds_with_giants()), 60 * chosen.font_size, chosen)
    assert drawing.references.get_linewidth()[0] > drawing.axis.reference.get_linewidth()[0]
    assert len(drawing.axis.breaks.get_segments()) == 4


LABELS = st.one_of(
    st.sampled_from(
        ["PVC", "$x_1^2$ & <b>", "very long " * 20, "x" * 200, "水道", "גיל", "two\nlines"]
    ),
    st.text(st.characters(codec="ascii", exclude_categories=("Cc",)), min_size=1, max_size=30),
)


@settings(
    max_examples=16,
    deadline=None,
    phases=[Phase.explicit, Phase.generate],  # a picture is slow to shrink
    suppress_health_check=[HealthCheck.too_slow],
)
@given(
    labels=st.lists(LABELS, min_size=7, max_size=7),
    log=st.floats(-30, 30),
    se=st.floats(0.01, 500),
    models=st.integers(1, 4),
    width=st.floats(COLUMN - 12, 900.0),
    smallest=st.sampled_from([1, 10, 2000]),
)
@pytest.mark.filterwarnings("ignore:Glyph")
def test_no_text_meets_another_and_none_leaves_the_picture(
    labels, log, se, models, width, smallest
):
    names = labels[:models] if models > 1 else ("",)
    names = tuple(f"{name}{i}" for i, name in enumerate(names)) if models > 1 else names
    rows = [
        row
        for name in names
        for row in (
            *made.odds_rows(name)[:6],
            made.odds_row("soil", "low", "high", log, se, model=name),
            *made.odds_rows(name)[7:8],
        )
    ]
    answer = made.odds_answer(rows, **({"models": names} if models > 1 else {}))
    answer = made.odds_printed(answer)
    facts = tuple(
        replace(
            each,
            label=labels[i],
            level_labels=tuple(labels[(i + j) % 7] for j, _ in enumerate(each.levels)),
        )
        for i, each in enumerate(answer.subject.predictors)
    )
    outcome = replace(answer.subject.outcome, event=labels[5], cases=labels[6])
    about = replace(answer.subject, predictors=facts, outcome=outcome)
    drawing = drawn(guarded(replace(answer, subject=about), smallest), width)
    assert_readable(drawing.axes.get_figure())
    columns = columns_of(drawing._answer, odds_lines(drawing._answer), PAGE, width)
    assert columns.plot_width > 4 * PAGE.font_size


def test_figures_stay_in_line_with_a_decimal_comma():
    answer = made.odds_printed()
    with writing(decimal=",", thousands="."):
        drawing = drawn(answer)
        told = words(drawing)
    assert "1,51 (1,17 to 1,94)" in told
    assert "262 / 2.350" in told
    heads = [text.get_text().partition(" (")[0] for (text,) in drawing._figures if text.get_text()]
    assert len({len(head) for head in heads}) == 1
