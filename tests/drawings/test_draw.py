import sys

import matplotlib as mpl
import pytest
from matplotlib.figure import Figure

from plainodds.answers.questions import Answer
from plainodds.drawings import draw
from plainodds.drawings.theme import THEMES
from tests.drawings import made
from tests.drawings.conftest import texts_of, words_on


def test_what_is_no_answer_is_refused():
    with pytest.raises(TypeError, match="no picture of Answer"):
        draw(Answer())


def test_a_theme_is_refused_by_its_name():
    with pytest.raises(ValueError, match="sepia"):
        draw(made.odds_answer(), theme="sepia")


@pytest.mark.parametrize(
    "answer", [made.odds_answer(), made.curve_by_material(), made.curve_of_levels(),
               made.profile_answer()], ids=["odds", "curve", "levels", "profile"],
)  # fmt: skip
def test_an_answer_gets_a_figure_of_its_own_and_no_setting_is_touched(answer):
    before = dict(mpl.rcParams)
    figure = draw(answer)
    assert isinstance(figure, Figure)
    assert len(figure.axes) == 1
    assert dict(mpl.rcParams) == before
    if "matplotlib.pyplot" in sys.modules:
        assert sys.modules["matplotlib.pyplot"].get_fignums() == []


def test_a_picture_keeps_to_the_place_of_the_axes_it_was_given(any_answer):
    # at low resolution letters advance by whole pixels, and lines come out a little longer
    figure = Figure(figsize=(12, 7), dpi=300)
    left, right = figure.subplots(1, 2)
    right.set_title("mine")
    assert draw(any_answer, ax=left) is figure
    slot = left.get_position(original=True)
    boxes, width, height = texts_of(figure)
    own = [box for text, box in boxes if text.axes is left]
    assert own
    for box in own:
        assert slot.x0 * width - 4 <= box.x0 <= box.x1 <= slot.x1 * width + 4
        assert slot.y0 * height - 4 <= box.y0 <= box.y1 <= slot.y1 * height + 4


def test_the_figure_and_the_other_axes_stay_the_users():
    figure = Figure(figsize=(12, 6), facecolor="beige")
    left, right = figure.subplots(1, 2)
    right.plot([1, 2, 3])
    limits, place = right.get_xlim(), right.get_position().bounds
    draw(made.curve_by_material(), ax=left)
    figure.draw_without_rendering()
    assert figure.get_facecolor() == Figure(facecolor="beige").get_facecolor()
    assert right.get_xlim() == limits
    assert right.get_position().bounds == place
    assert len(figure.axes) == 2


def test_more_can_be_drawn_on_the_axes_in_the_answers_own_units():
    figure = Figure(figsize=(8, 5))
    axes = figure.subplots()
    answer = made.curve_by_material()
    draw(answer, ax=axes)
    axes.axhline(0.2)
    figure.draw_without_rendering()
    bottom, top = axes.get_ylim()
    assert bottom < 0.2 < top
    first, last = axes.get_xlim()
    assert first < 0
    assert last > 110


@pytest.mark.parametrize("engine", ["constrained", "compressed", "tight"])
def test_a_layout_engine_finds_the_axes_as_large_as_their_slot(engine, recwarn):
    answers = (
        made.odds_answer(), made.curve_by_material(), made.profile_answer(), made.curve_of_levels()
    )  # fmt: skip
    figure = Figure(figsize=(14, 9), dpi=200, layout=engine)
    grid = figure.subplots(2, 2).ravel()
    for axes, answer in zip(grid, answers, strict=True):
        draw(answer, ax=axes)
    figure.draw_without_rendering()
    assert not recwarn.list
    boxes, width, height = texts_of(figure)
    for axes in grid:
        slot = axes.get_position(original=True)
        assert slot.width > 0.45
        assert slot.height > 0.4
        for box in (box for text, box in boxes if text.axes is axes):
            assert slot.x0 * width - 4 <= box.x0 <= box.x1 <= slot.x1 * width + 4
            assert slot.y0 * height - 4 <= box.y0 <= box.y1 <= slot.y1 * height + 4


def test_a_picture_follows_a_figure_that_is_resized():
    figure = draw(made.odds_nasty())
    figure.set_dpi(300)
    (title,) = (text for text in figure.axes[0].texts if text.get_text().startswith("Odds of"))
    lines = []
    for width in (12, 8, 4):
        figure.set_size_inches(width, 7)
        figure.draw_without_rendering()
        lines.append(title.get_text().count("\n") + 1)
        boxes, right, _ = texts_of(figure)
        assert max(box.x1 for _, box in boxes) <= right
    assert lines == [1, 1, 2]


def test_a_users_style_does_not_show():
    """Set on the axes as a style would, since styles are settings of everybody."""
    figure = Figure(figsize=(7, 5))
    axes = figure.subplots()
    axes.set_facecolor("black")
    axes.grid(visible=True, color="red")
    axes.spines["top"].set_visible(True)
    draw(made.curve_by_material(), ax=axes)
    assert not axes.patch.get_visible()
    assert not axes.spines["top"].get_visible()
    colours = {line.get_color() for line in axes.get_ygridlines()}
    assert colours == {THEMES["page"].grid}
    assert not any(line.get_visible() for line in axes.get_xgridlines())


def test_labels_are_shown_letter_by_letter():
    words = " ".join(words_on(draw(made.odds_nasty()))).replace("\n", " ")
    assert "_cost in $ per $x^2 {_y}$ <img src=x" in words
    assert "_$_ against $_" in words
    assert "Odds of $event$ _of a kind" in words


def test_the_screen_theme_is_transparent():
    assert draw(made.odds_answer(), theme="screen").get_facecolor()[3] == 0
    assert draw(made.odds_answer()).get_facecolor() == (1, 1, 1, 1)
