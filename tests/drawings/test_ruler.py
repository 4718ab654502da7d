import math

import numpy as np
import pytest
from matplotlib.figure import Figure

from plainodds import scales
from plainodds.drawings.ruler import RulerDrawing
from plainodds.drawings.ruler_scales import (
    chance_scale,
    linear_predictor_scale,
    odds_scale,
    window,
)
from plainodds.drawings.theme import theme_of
from tests.drawings import made
from tests.drawings.conftest import words_on

THEME = theme_of("page")


def drawn(answer, width=480, height=200):
    figure = Figure(figsize=(width / 72, height / 72))
    return RulerDrawing(figure.add_axes((0, 0, 1, 1)), answer, THEME)


def named(scale, lower=-6.0, upper=2.5, length=400):
    ticks = scale(lower, upper, length, THEME, THEME.font_size)
    return dict(zip(ticks.names, ticks.named, strict=True))


def test_the_three_scales_are_aligned():
    """A chance of 10 %, odds of 1/9 and η = −ln 9 are one place."""
    chances, odds = named(chance_scale), named(odds_scale)
    for name, at in chances.items():
        chance = float(name.rstrip("%")) / 100
        assert at == pytest.approx(float(scales.linear_predictor_from_probability(chance)))
    for name, at in odds.items():
        above, _, below = name.replace(",", "").partition("/")
        assert at == pytest.approx(math.log(float(above) / float(below or 1)))
    assert chances["50%"] == odds["1"] == named(linear_predictor_scale)["0"] == 0


@pytest.mark.parametrize("scale", [chance_scale, odds_scale, linear_predictor_scale])
@pytest.mark.parametrize("span", [(-6.0, 2.5), (-5.0, 5.0), (-14.0, 14.0), (4.0, 12.0)])
@pytest.mark.parametrize("length", [120, 300, 600])
def test_names_along_a_scale_keep_apart_and_inside(scale, span, length):
    ticks = scale(*span, length, THEME, THEME.font_size)
    assert ticks.named
    assert list(ticks.named) == sorted(ticks.named)
    assert span[0] <= ticks.named[0] <= ticks.named[-1] <= span[1]
    gaps = np.diff(ticks.named) * length / (span[1] - span[0])
    assert (gaps > THEME.font_size).all()
    assert not set(ticks.named) & set(ticks.unnamed)


def test_the_pointer_stands_at_the_profile_and_its_band_spans_the_interval():
    answer = made.profile_answer(compared=False)
    (pointer,) = drawn(answer).pointers
    held = answer.point.linear_predictor
    assert set(pointer.line.get_xdata()) == {held.estimate}
    assert list(pointer.line.get_ydata()) == [0, 3], "through all three scales"
    assert pointer.band.get_x() == pytest.approx(held.lower)
    assert pointer.band.get_x() + pointer.band.get_width() == pytest.approx(held.upper)


def test_the_profile_compared_with_has_a_pointer_of_its_own():
    answer = made.profile_answer()
    point, start = drawn(answer).pointers
    assert start.line.get_xdata()[0] == answer.start.linear_predictor.estimate
    assert point.mark.get_marker() != start.mark.get_marker()
    assert point.line.get_color() != start.line.get_color()
    assert {"this profile", "compared with"} <= set(words_on(drawn(answer).axes.get_figure()))


def test_without_a_comparison_nothing_is_compared():
    words = words_on(drawn(made.profile_answer(compared=False)).axes.get_figure())
    assert not {"this profile", "compared with"} & set(words)
    assert not any("odds ×" in text for text in words)


def test_the_arrow_between_the_pointers_is_their_odds_ratio():
    answer = made.profile_answer()
    drawing = drawn(answer)
    first, last = drawing.move.line.get_xdata()
    assert first == answer.start.linear_predictor.estimate
    assert last == pytest.approx(answer.point.linear_predictor.estimate, abs=0.1)
    assert drawing.move.head.get_marker() == ">"
    assert f"odds × {answer.comparison.odds_ratio.estimate:.2f}" == drawing.move.words.get_text()
    back = drawn(made.profile_answer(eta=-3.5))
    assert back.move.head.get_marker() == "<"


def test_the_headline_gives_the_chance_in_percent_and_as_a_frequency():
    words = words_on(drawn(made.profile_answer()).axes.get_figure())
    assert "28%, or 28 in 100: chance of burst this winter" in words


@pytest.mark.parametrize("width", [250, 480])
def test_every_scale_is_read_out_with_its_interval(width):
    height = RulerDrawing.natural_height(made.profile_answer(), THEME, width)
    words = words_on(drawn(made.profile_answer(), width, height).axes.get_figure())
    for figures in ("28% (23% to 34%)", "0.39 (0.30 to 0.50)", "−0.94 (−1.2 to −0.7)",
                    "7.5% (6.6% to 8.5%)"):  # fmt: skip
        assert any(text.endswith(figures) for text in words), figures


@pytest.mark.parametrize("verdict", ["rare", "beyond"])
def test_a_profile_that_the_data_hardly_know_has_a_broken_pointer(verdict):
    drawing = drawn(made.profile_answer(verdict=verdict))
    point, start = drawing.pointers
    assert point.line.is_dashed()
    assert not start.line.is_dashed()
    assert any("Broken pointer" in text for text in words_on(drawing.axes.get_figure()))


def test_a_familiar_profile_has_a_whole_pointer():
    drawing = drawn(made.profile_answer())
    assert not drawing.pointers[0].line.is_dashed()
    assert not any("Broken" in text for text in words_on(drawing.axes.get_figure()))


def test_without_an_interval_there_is_no_band_and_the_reason():
    drawing = drawn(made.profile_answer(se=None))
    assert not drawing.pointers[0].band.get_visible()
    words = words_on(drawing.axes.get_figure())
    assert made.NO_INTERVAL in words
    assert "28%" in words


def test_a_band_that_leaves_the_ruler_ends_in_arrows():
    drawing = drawn(made.profile_answer(se=9.0))
    lower, upper = drawing.axes.get_xlim()
    band = drawing.pointers[0].band
    assert (band.get_x(), band.get_x() + band.get_width()) == pytest.approx((lower, upper))
    assert all(len(arrow.get_xdata()) == 3 for arrow in drawing.pointers[0].arrows)
    usual = drawn(made.profile_answer())
    assert all(not len(arrow.get_xdata()) for arrow in usual.pointers[0].arrows)


def test_the_ruler_stays_where_it_is_while_a_profile_changes():
    spans = {window(made.profile_answer(eta=eta), (made.profile_answer(eta=eta).point,))
             for eta in np.linspace(-5, 1.5, 20)}  # fmt: skip
    assert len(spans) == 1


@pytest.mark.parametrize("eta", [-40.0, -9.0, 9.0, 700.0])
def test_the_ruler_is_lengthened_for_what_lies_outside_but_not_without_end(eta):
    answer = made.profile_answer(eta=eta, se=1.0)
    lower, upper = window(answer, (answer.point,))
    assert lower <= max(eta, -14) <= upper or lower <= min(eta, 14) <= upper
    assert upper - lower <= 30
    x = drawn(answer).pointers[0].line.get_xdata()[0]
    assert lower <= x <= upper


def test_another_answer_moves_the_pointers():
    answer, other = made.profile_answer(), made.profile_answer(eta=-1.5)
    assert RulerDrawing.structure(answer) == RulerDrawing.structure(other)
    drawing = drawn(answer)
    drawing.update(other)
    assert drawing.pointers[0].line.get_xdata()[0] == -1.5
    assert any(text.startswith("18%") for text in words_on(drawing.axes.get_figure()))


def test_a_name_that_a_pointer_crosses_is_set_on_a_plate():
    answer = made.profile_answer(eta=math.log(1 / 9), compared=False)
    labels = {text.get_text(): text for text in drawn(answer).lanes[0].labels}
    assert labels["10%"].get_bbox_patch() is not None
    assert labels["50%"].get_bbox_patch() is None
