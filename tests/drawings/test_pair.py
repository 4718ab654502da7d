import io
import math
from dataclasses import replace

import numpy as np
import pytest
from matplotlib.figure import Figure
from PIL import Image

import plainodds as po
from plainodds.answers.estimate import Estimate
from plainodds.answers.stretches import Stretch
from plainodds.drawings.draw import draw, drawing_of
from plainodds.drawings.pair import PairDrawing
from plainodds.drawings.pair_axis import effect_axis
from plainodds.drawings.picture import Picture
from plainodds.drawings.theme import theme_of
from plainodds.phrases.pair_labels import followed_label, pair_title
from tests.drawings import made, made_effects
from tests.drawings import made_pairs as pairs
from tests.drawings.made import AGE, LINED, MATERIAL, PRESSURE, SOIL
from tests.drawings.seen import boxes_on, words_on

THEME = theme_of("page")


def drawn(answer, width=560.0, theme=THEME):
    height = PairDrawing.natural_height(answer, theme, width)
    figure = Figure(figsize=(width / 72, height / 72))
    return PairDrawing(figure.add_axes((0, 0, 1, 1)), answer, theme)


def told(answer, width=560.0):
    return words_on(drawn(answer, width).axes.figure)


def placed(part):
    return part.axes.get_position(original=True)


# ---------------------------------------------------------------- parts and places


def test_the_heading_names_the_chance_and_both_predictors():
    answer = pairs.pair_answer()
    assert pair_title(answer) in told(answer, 700)
    assert PairDrawing.title(answer) == pair_title(answer)


def test_the_parts_stand_side_by_side_where_there_is_width_and_else_beneath_each_other():
    wide, narrow = drawn(pairs.pair_answer(), 500), drawn(pairs.pair_answer(), 300)
    assert placed(wide.together).x1 < placed(wide.effect).x0
    assert placed(wide.together).y0 == pytest.approx(placed(wide.effect).y0)
    assert placed(narrow.together).y0 > placed(narrow.effect).y1
    for drawing in (wide, narrow):
        assert placed(drawing.effect).y0 > placed(drawing.interaction).y1
        assert placed(drawing.interaction).width == pytest.approx(1.0)


def test_plots_side_by_side_stand_in_line():
    drawing = drawn(pairs.pair_answer())
    drawing.axes.figure.draw_without_rendering()
    one, other = (part.axes.get_window_extent() for part in (drawing.together, drawing.effect))
    assert one.y0 == pytest.approx(other.y0)
    assert one.y1 == pytest.approx(other.y1)


def test_without_chances_there_are_no_lines_and_the_rest_stands():
    answer = pairs.pair_answer(scale="odds", chances=False)
    drawing = drawn(answer)
    assert drawing.together is None
    words = told(answer)
    assert "the sample tells no chances" in words
    assert any(text.startswith("1.39 (") for text in words)


@pytest.mark.parametrize(
    ("a", "b", "along", "by"),
    [
        (AGE, PRESSURE, AGE, PRESSURE),
        (AGE, MATERIAL, AGE, MATERIAL),
        (MATERIAL, AGE, AGE, MATERIAL),
    ],
)
def test_lines_run_along_a_number(a, b, along, by):
    answer = pairs.pair_answer(a, b)
    drawing = drawn(answer)
    assert len(drawing.together.lines) == len(by.levels or by.quartiles)
    for artists, line in zip(drawing.together.lines, answer.lines.lines, strict=True):
        x = artists.unsupported.get_xdata()
        assert list(x) == list(line.at)
    low, high = drawing.together.axes.get_xlim()
    assert low < along.minimum < along.maximum < high


def test_the_small_print_of_the_parts_stands_once_for_all():
    words = [text.replace("\n", " ") for text in told(pairs.pair_answer())]
    assert sum("95% intervals" in text for text in words) == 1
    assert sum("where the pipes are" in text for text in words) == 1


def test_a_part_is_no_axes_of_the_users_figure():
    figure = Figure(figsize=(8, 7))
    axes = figure.add_subplot()
    draw(pairs.pair_answer(), ax=axes)
    assert figure.axes == [axes]


def test_the_parts_follow_their_figure():
    figure = Figure(figsize=(8, 8))
    drawing = PairDrawing(figure.add_axes((0, 0, 1, 1)), pairs.pair_answer(), THEME)
    assert placed(drawing.together).x1 < placed(drawing.effect).x0
    figure.set_size_inches(4.5, 12)
    figure.draw_without_rendering()
    assert placed(drawing.together).y0 > placed(drawing.effect).y1


# ---------------------------------------------------------------- the effect along the other


def test_the_effect_is_drawn_in_percentage_points():
    answer = pairs.pair_answer(b=MATERIAL)
    points = drawn(answer).effect.effect.points
    assert list(points.get_ydata()) == pytest.approx([100 * x for x in answer.effect.estimate])


def test_the_effect_on_the_odds_scale_is_drawn_as_odds_ratios_on_a_logarithmic_axis():
    answer = pairs.pair_answer(scale="odds")
    panel = drawn(answer).effect
    assert panel.axes.get_yscale() == "log"
    y = np.asarray(panel.effect.supported.get_ydata())
    held = np.asarray(answer.effect.supported)
    assert y[held] == pytest.approx(np.asarray(answer.effect.estimate)[held])
    assert np.isnan(y[~held]).all()


@pytest.mark.parametrize(("scale", "none"), [("probability", 0.0), ("odds", 1.0)])
def test_no_effect_is_a_line_with_its_name_and_is_on_the_axis(scale, none):
    panel = drawn(pairs.pair_answer(scale=scale)).effect
    assert list(panel.none.get_ydata()) == [none, none]
    assert panel.none_label.get_position()[1] == none
    assert "no\neffect" in told(pairs.pair_answer(scale=scale))
    low, high = panel.axes.get_ylim()
    assert low < none < high


def test_the_change_that_is_followed_is_the_parts_heading():
    answer = pairs.pair_answer(MATERIAL, AGE)
    assert followed_label(answer) in told(answer)


@pytest.mark.parametrize("scale", ["probability", "odds"])
def test_every_estimate_is_on_the_axis(scale):
    answer = pairs.giant_answer(scale=scale)
    axis = effect_axis(answer, 150, 8)
    unit = 1 if scale == "odds" else 100
    assert axis.lower < unit * min(answer.effect.estimate)
    assert unit * max(answer.effect.estimate) < axis.upper
    assert axis.upper < 1e6
    assert any("cut off" in text for text in told(answer))


def test_a_turning_point_is_marked_on_the_line_and_named():
    answer = pairs.pair_answer()
    (turn,) = answer.effect.turns
    panel = drawn(answer).effect
    x, y = panel.turns.get_data()
    assert list(x) == [turn]
    assert y[0] == pytest.approx(100 * max(answer.effect.estimate))
    assert f"turns at {turn:.3g} m" in told(answer)
    still = replace(answer, effect=replace(answer.effect, turns=()))
    panel.update(still)
    assert len(panel.turns.get_xdata()) == 0
    assert not any("turns at" in text for text in told(still))


def with_stretches(answer, *signs):
    ends = np.linspace(*answer.subject.predictor(answer.question.b).offered, len(signs) + 1)
    stretches = tuple(
        Stretch(float(ends[i]), float(ends[i + 1]), sign, 1 / len(signs))
        for i, sign in enumerate(signs)
    )
    return replace(answer, effect=replace(answer.effect, stretches=stretches))


def heights(collection):
    return [(path.vertices[:, 1].min(), path.vertices[:, 1].max())
            for path in collection.get_paths()]  # fmt: skip


def test_the_strip_tells_stretches_by_shape_and_by_word():
    answer = with_stretches(pairs.pair_answer(), "above", "open", "below")
    strip = drawn(answer).effect.strip
    line = {segment[0][1] for segment in strip.line.get_segments()}
    assert len(line) == 1
    (middle,) = line
    (above, below), (around,) = heights(strip.blocks), heights(strip.frames)
    assert above[0] == pytest.approx(middle)
    assert below[1] == pytest.approx(middle)
    assert around[0] < middle < around[1]
    assert [text.get_text().split(":")[0] for text in strip.words if text.get_text()] == [
        "higher", "left open", "lower",
    ]  # fmt: skip


def test_the_strip_covers_each_stretch_from_end_to_end():
    answer = with_stretches(pairs.pair_answer(), "below", "open", "above", "open")
    strip = drawn(answer).effect.strip
    ends = [(segment[0][0], segment[1][0]) for segment in strip.line.get_segments()]
    assert ends == [(each.start, each.end) for each in answer.effect.stretches]


def test_a_stretch_too_short_for_a_word_has_its_sign_or_its_shape_alone():
    answer = with_stretches(pairs.pair_answer(), *["above", "open"] * 12)
    drawing = drawn(answer)
    words = {text.get_text() for text in drawing.effect.strip.words}
    assert words <= {"+", "±", ""}
    assert len(drawing.effect.strip.blocks.get_paths()) == 12


def test_levels_have_a_block_each():
    answer = pairs.pair_answer(AGE, MATERIAL)
    strip = drawn(answer).effect.strip
    assert len(strip.blocks.get_paths()) + len(strip.frames.get_paths()) == len(MATERIAL.levels)


def test_without_intervals_there_is_no_strip_and_the_reason_stands():
    answer = pairs.pair_answer(intervals=False)
    drawing = drawn(answer)
    assert not drawing.effect.strip.line.get_segments()
    assert not drawing.effect.effect.band.get_paths()
    assert any(made.NO_INTERVAL in text.replace("\n", " ") for text in told(answer))


def test_what_is_not_known_is_said_to_be_so():
    words = told(pairs.unknown_answer())
    assert words.count("not known") == 4


# ---------------------------------------------------------------- the interaction


def dots(drawing):
    return [list(each.dots[0].points.get_xdata()) for each in drawing.interaction.rows]


@pytest.mark.parametrize("scale", ["probability", "odds"])
def test_both_scales_are_always_told(scale):
    answer = pairs.pair_answer(scale=scale)
    found = answer.interaction
    assert dots(drawn(answer)) == [
        [found.at_profile.estimate, found.averaged.estimate], [found.log_ratio.estimate],
    ]  # fmt: skip
    words = told(answer)
    assert {"On the probability scale", "On the odds scale", "none"} <= set(words)
    assert any(text.startswith("+4.2 (+1.2 to +7.2)") for text in words)
    assert any(text.startswith("+2.5 (") for text in words)
    assert any(text.startswith("1.39 (1.13 to 1.72)") for text in words)


def test_intervals_run_from_end_to_end():
    answer = pairs.pair_answer()
    found = answer.interaction
    ends = [
        x
        for row in drawn(answer).interaction.rows
        for segment in row.dots[0].intervals.get_segments()
        for x in segment[:, 0]
    ]
    told = (found.at_profile, found.averaged, found.log_ratio)
    assert ends == pytest.approx([x for each in told for x in (each.lower, each.upper)])


def test_no_interaction_is_in_one_place_on_both_scales():
    rows = drawn(pairs.pair_answer()).interaction.rows
    zeros = [row.zero.get_transform().transform([(0.0, 0.0)])[0][0] for row in rows]
    assert zeros[0] == pytest.approx(zeros[1])


@pytest.mark.parametrize("scale", ["probability", "odds"])
def test_the_scale_that_is_shown_is_set_off_by_the_weight_of_its_name(scale):
    panel = drawn(pairs.pair_answer(scale=scale)).interaction
    weights = {name: text.get_fontweight() for name, text in panel.names.items()}
    other = "odds" if scale == "probability" else "probability"
    assert weights == {scale: "bold", other: "normal"}


@pytest.mark.parametrize("number", ["change", "slope"])
def test_a_switch_of_scale_leaves_the_parts_where_they_are(number):
    sizes = {
        (picture.height_px, *(placed(part).bounds for part in parts))
        for scale in ("probability", "odds")
        for picture in [Picture("screen", 590)]
        for _ in [picture.show(pairs.pair_answer(scale=scale, number=number, wide=0.5))]
        for drawing in [picture._drawing]
        for parts in [(drawing.together, drawing.effect, drawing.interaction)]
    }
    assert len(sizes) == 1


def test_without_a_shared_term_the_ratio_is_1_by_the_model():
    words = told(pairs.pair_answer(AGE, made.DIAMETER, joint=0.0))
    assert "1 by the model" in words


def test_an_average_over_nobody_is_left_out():
    answer = pairs.pair_answer(counted=0)
    assert dots(drawn(answer))[0] == [answer.interaction.at_profile.estimate]
    assert not any("averaged over" in text for text in told(answer))


def test_a_ratio_far_off_ends_in_an_arrow_and_the_axis_stays_readable():
    drawing = drawn(pairs.giant_answer())
    odds = drawing.interaction.rows[1]
    assert odds.limits.span < 2 * math.log(1000)
    left, right = (list(arrow.get_xdata()) for arrow in odds.dots[0].arrows)
    assert (len(left), len(right)) == (1, 1)
    assert any("Arrow" in text for text in words_on(drawing.axes.figure))
    assert not any("Arrow" in text for text in told(pairs.pair_answer()))


def test_an_interval_that_is_not_known_is_said_to_be_so():
    answer = pairs.pair_answer()
    nan = math.nan
    ratio = Estimate(1.4, nan, nan, nan)
    answer = replace(answer, interaction=replace(answer.interaction, ratio=ratio))
    assert any("interval not known" in text for text in told(answer))


# ---------------------------------------------------------------- following an answer


@pytest.mark.parametrize("shape", ["lines", "map"])
def test_another_answer_moves_the_artists(shape):
    first = pairs.pair_answer(shape=shape)
    other = pairs.pair_answer(shape=shape, shift=0.6, cross=-0.01)
    picture, built = Picture("screen", 700), Picture("screen", 700)
    picture.show(first)
    figure = picture.figure
    picture.show(other)
    built.show(other)
    assert picture.figure is figure
    assert picture.rebuilt == 1
    moved, new = (np.asarray(Image.open(io.BytesIO(each.png(1)))) for each in (picture, built))
    assert (moved == new).all()


def test_another_kind_of_part_is_another_structure():
    answers = (
        pairs.pair_answer(), pairs.map_answer(), pairs.pair_answer(scale="odds"),
        pairs.pair_answer(AGE, MATERIAL), pairs.pair_answer(AGE, LINED),
        pairs.pair_answer(SOIL, MATERIAL), pairs.pair_answer(scale="odds", chances=False),
    )  # fmt: skip
    assert len({PairDrawing.structure(each) for each in answers}) == len(answers)
    assert PairDrawing.structure(answers[0]) == PairDrawing.structure(
        pairs.pair_answer(shift=1.0, joint=0.2)
    )


def test_a_pair_is_drawn_and_saved_like_any_answer(tmp_path):
    answer = made_effects.fit().pair("age_years", "material")
    assert drawing_of(answer) is PairDrawing
    assert "PVC" in words_on(draw(answer))
    path = po.save(answer, tmp_path / "pair.svg", size="page")
    assert "On the odds scale" in path.read_text()
    path = po.save(
        made_effects.fit().pair("age_years", "diameter_mm", shape="map"), tmp_path / "pair.pdf"
    )
    assert path.stat().st_size > 10_000


@pytest.mark.parametrize("shape", ["lines", "map"])
def test_a_picture_keeps_to_the_place_of_the_users_axes(shape):
    figure = Figure(figsize=(9, 13), dpi=72)
    above, below = figure.subplots(2, 1)
    draw(pairs.pair_answer(shape=shape), ax=below)
    left, low, right, high = (
        below.get_position(original=True).transformed(figure.transFigure).extents
    )
    above.set_axis_off()
    inside = [box for text, box in boxes_on(figure) if text]
    assert len(inside) > 25
    for box in inside:
        assert left - 1 <= box.x0 <= box.x1 <= right + 1
        assert low - 1 <= box.y0 <= box.y1 <= high + 1
