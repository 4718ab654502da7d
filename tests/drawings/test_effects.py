import io
import math

import numpy as np
import pytest
from matplotlib.figure import Figure
from PIL import Image

import plainodds as po
from plainodds.drawings import Picture
from plainodds.drawings.draw import draw, figure_for, height_for
from plainodds.drawings.effects import EffectsDrawing
from plainodds.drawings.effects_axis import limits_of
from plainodds.drawings.effects_rows import effect_texts, panels_of
from plainodds.drawings.theme import theme_of
from tests.drawings import made_effects as made
from tests.drawings.seen import assert_readable, words_on

THEME = theme_of("page")


def drawn(answer, width=500):
    height = EffectsDrawing.natural_height(answer, THEME, width)
    figure = Figure(figsize=(width / 72, height / 72))
    return EffectsDrawing(figure.add_axes((0, 0, 1, 1)), answer, THEME)


def effects_of(rows):
    return [row.effect.estimate for row in rows]


def across(artist_transform, x):
    """Where a value lies across the picture, in pixels."""
    return artist_transform.transform([(x, 0.0)])[0][0]


def test_every_effect_is_marked_with_its_own_number():
    answer = made.effects_answer()
    drawing = drawn(answer)
    marked = [x for panel in drawing.panels for x in panel.dots[0].points.get_xdata()]
    assert marked == effects_of(answer.rows)


def test_every_interval_runs_from_end_to_end():
    answer = made.effects_answer()
    ends = [
        (segment[0][0], segment[1][0])
        for panel in drawn(answer).panels
        for segment in panel.dots[0].intervals.get_segments()
    ]
    assert ends == [(row.effect.lower, row.effect.upper) for row in answer.rows]


def test_only_effects_in_one_unit_share_an_axis():
    panels = panels_of(made.effects_answer())
    assert [sorted({row.predictor for row in panel.rows}) for panel in panels] == [
        ["lined", "material", "soil"], ["age_years"], ["diameter_mm"], ["past_repairs"],
    ]  # fmt: skip
    assert [panel.is_slope for panel in panels] == [False, True, True, True]


def test_steps_are_in_percentage_points_and_share_the_axis_of_levels():
    (panel,) = panels_of(made.effects_of_steps())
    assert len(panel.rows) == 8


def test_a_dot_lies_at_its_number_on_the_axis_that_its_panel_shows():
    drawing = drawn(made.effects_answer())
    plot = drawing.axes.get_window_extent()
    for panel in drawing.panels:
        dot = panel.dots[0].points
        for x in dot.get_xdata():
            share = (across(dot.get_transform(), x) - plot.x0) / plot.width
            limits = panel.limits
            assert share == pytest.approx((x - limits.lower) / limits.span)
        for text in filter(lambda text: text.get_text(), panel.ticks):
            written = float(text.get_text().replace("−", "-")) / 100
            assert text.get_position()[0] == pytest.approx((written - limits.lower) / limits.span)


def test_zero_is_in_one_place_on_all_axes():
    drawing = drawn(made.effects_answer())
    zeros = [
        across(panel.zero.get_transform(), segment[0][0])
        for panel in drawing.panels
        for segment in panel.zero.get_segments()
    ]
    assert len(zeros) == 4
    assert np.ptp(zeros) < 1e-6


def test_a_small_slope_is_as_readable_as_a_large_one():
    for panel in drawn(made.effects_answer()).panels:
        longest = max(
            np.ptp(segment[:, 0]) / panel.limits.span
            for segment in panel.dots[0].intervals.get_segments()
        )
        assert longest > 0.1


def test_what_differs_in_unit_is_said_to():
    assert any(
        "an axis of its own" in text for text in words_on(drawn(made.effects_answer()).axes.figure)
    )
    words = words_on(drawn(made.effects_of_steps()).axes.figure)
    assert not any("an axis of its own" in text for text in words)


def test_figures_are_percentage_points_with_signs():
    words = words_on(drawn(made.effects_answer()).axes.figure)
    assert "+6.4 (+4.5 to +8.3)" in words
    assert "−3.1 (−6.0 to −0.3)" in words
    assert "+0.14 (+0.09 to +0.19)" in words
    assert "−0.013 (−0.022 to −0.005)" in words
    assert any("95% interval" in text for text in words)


def test_decimal_points_are_in_line():
    rows = [made.effect_row("soil", each, 0.02, "low", "high") for each in (0.004, -0.121, 0.05)]
    texts = effect_texts(rows)
    assert texts[0].startswith("\u2007+0.4 (")
    assert texts[1].startswith("−12.1 (")
    assert texts[2].startswith("\u2007+5.0 (")


def test_a_figure_never_hides_on_which_side_of_nought_it_lies():
    (text,) = effect_texts([made.effect_row("soil", 0.0139, 0.0138, "low", "high")])
    assert text == "+1.4 (+0.01 to +2.8)"


@pytest.mark.parametrize(("middle", "half"), [(0.0, 0.0), (0.0, 0.02), (1e-9, 1e-10), (0.5, None)])
def test_strange_sizes_are_written(middle, half):
    (text,) = effect_texts([made.effect_row("soil", middle, half, "low", "high")])
    assert any(figure.isdigit() for figure in text)
    assert ("to" in text) == (half is not None)


def test_changes_are_named():
    words = words_on(drawn(made.effects_answer()).axes.figure)
    assert {"Pipe age", "per additional year", "PVC against cast iron", "Soil"} <= set(words)
    assert "per 10 years more" in words_on(drawn(made.effects_of_steps()).axes.figure)


def test_levels_of_by_stand_in_one_slot_and_differ_by_colour_and_marker():
    answer = made.effects_by_material()
    drawing = drawn(answer)
    lines = [dots.points for dots in drawing.panels[0].dots]
    assert len({line.get_marker() for line in lines}) == 3
    assert len({line.get_markerfacecolor() for line in lines}) == 3
    for place, level in enumerate(("cast iron", "ductile iron", "PVC")):
        shown = [x for panel in drawing.panels for x in panel.dots[place].points.get_xdata()]
        assert shown == effects_of([row for row in answer.rows if row.by == level])
    heights = np.array([line.get_ydata() for line in lines])
    assert (np.diff(heights, axis=0) > 0).all()
    assert {"cast iron", "ductile iron", "PVC"} <= set(words_on(drawing.axes.figure))


def test_a_giant_leaves_in_an_arrow_and_does_not_squash_the_rest():
    usual, *_ = limits_of([panel.rows for panel in panels_of(made.effects_answer())])
    answer = made.effects_with_giants()
    drawing = drawn(answer)
    panel = drawing.panels[0]
    assert panel.limits.span < 6 * usual.span
    left, right = (list(arrow.get_xdata()) for arrow in panel.dots[0].arrows)
    assert left == [panel.limits.lower]
    assert right == [panel.limits.upper] * 2
    assert len(panel.dots[0].points.get_xdata()) == 4, "the one far off has no dot on the axis"
    for segment in panel.dots[0].intervals.get_segments():
        assert (
            panel.limits.lower <= segment[:, 0].min() <= segment[:, 0].max() <= panel.limits.upper
        )
    assert any("Arrow" in text for text in words_on(drawing.axes.figure))


def test_without_a_giant_nothing_is_said_of_arrows():
    assert not any("Arrow" in text for text in words_on(drawn(made.effects_answer()).axes.figure))


def test_without_intervals_there_are_dots_and_the_reason():
    answer = made.effects_without_intervals()
    drawing = drawn(answer)
    for panel in drawing.panels:
        lengths = [np.ptp(s[:, 0]) for s in panel.dots[0].intervals.get_segments()]
        assert max(lengths) == 0
    words = words_on(drawing.axes.figure)
    assert any(made.NO_INTERVAL in text.replace("\n", " ") for text in words)
    assert not any(" to " in text and text[0] in "+−" for text in words)


def test_an_interval_that_is_not_known_is_said_to_be_so():
    rows = made.effect_rows()
    rows[0] = made.effect_row("material", 0.01, math.nan, "cast iron", "ductile iron")
    assert "not known" in effect_texts(rows[:2])[0]
    points = drawn(made.effects_answer(rows)).panels[0].dots[0].points
    assert points.get_xdata()[0] == 0.01


def test_it_is_said_over_whom_or_where_the_effects_hold():
    averaged = " ".join(words_on(drawn(made.effects_answer()).axes.figure)).replace("\n", " ")
    assert "Averaged over 2,500 rows, each with its own values otherwise." in averaged
    some = made.fit().effects("soil", where={"material": "PVC", "age_years": (10, 30)})
    words = " ".join(words_on(drawn(some).axes.figure)).replace("\n", " ")
    assert "material PVC and pipe age 10 to 30 years" in words
    held = " ".join(words_on(drawn(made.effects_at_a_profile()).axes.figure)).replace("\n", " ")
    assert "At typical values: material PVC" in held
    assert "Averaged" not in held


@pytest.mark.parametrize("name", made.EFFECTS)
@pytest.mark.parametrize("width", [350, 590])
def test_nothing_meets_and_nothing_is_cut_off_on_the_screen(name, width):
    picture = Picture("screen", width)
    picture.show(made.EFFECTS[name]())
    assert_readable(picture.figure)


@pytest.mark.parametrize("name", made.EFFECTS)
def test_nothing_meets_and_nothing_is_cut_off_in_print(name):
    answer, theme, width = made.EFFECTS[name](), THEME.scaled(7 / 9), 88 / 25.4 * 72
    height = height_for(EffectsDrawing, answer, theme, width)
    figure, _ = figure_for(EffectsDrawing, answer, theme, width, height, dpi=150)
    assert_readable(figure)
    assert_readable(draw(answer))


def test_another_answer_moves_the_artists():
    picture, built = Picture("screen", 600, 520), Picture("screen", 600, 520)
    picture.show(made.effects_answer())
    figure = picture.figure
    other = made.effects_answer(made.effect_rows(shift=0.4))
    picture.show(other)
    built.show(other)
    assert picture.figure is figure
    assert picture.rebuilt == 1
    moved, new = (np.asarray(Image.open(io.BytesIO(each.png(1)))) for each in (picture, built))
    assert (moved == new).all()


def test_other_rows_are_another_structure():
    structures = {
        EffectsDrawing.structure(each())
        for each in (
            made.effects_answer, made.effects_by_material, made.effects_of_steps,
            lambda: made.effects_answer(made.effect_rows()[:5]),
        )
    }  # fmt: skip
    assert len(structures) == 4


def test_effects_are_drawn_and_saved_like_any_answer(tmp_path):
    answer = made.fit().effects()
    assert "Change of the average chance" in words_on(po.draw(answer))[0]
    path = po.save(answer, tmp_path / "effects.svg")
    assert "per additional year" in path.read_text()
