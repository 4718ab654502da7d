"""Nothing meets and nothing is cut off, whatever two predictors and however wide the picture."""

import pytest

from plainodds.drawings.draw import figure_for, height_for
from plainodds.drawings.pair import PairDrawing
from plainodds.drawings.picture import Picture
from plainodds.drawings.theme import theme_of
from tests.drawings.made_pairs import PAIRS
from tests.drawings.seen import assert_readable


@pytest.mark.parametrize("name", PAIRS)
@pytest.mark.parametrize("width", [300, 380, 590])
def test_on_the_screen(name, width):
    picture = Picture("screen", width)
    picture.show(PAIRS[name]())
    assert_readable(picture.figure)


@pytest.mark.parametrize("name", PAIRS)
def test_in_a_column_of_print(name):
    answer, theme, width = PAIRS[name](), theme_of("page").scaled(7 / 9), 88 / 25.4 * 72
    height = height_for(PairDrawing, answer, theme, width)
    figure, _ = figure_for(PairDrawing, answer, theme, width, height, dpi=150)
    assert_readable(figure)


@pytest.mark.parametrize("name", PAIRS)
def test_no_higher_than_it_has_to_be(name):
    answer, theme, width = PAIRS[name](), theme_of("page"), 420.0
    least = PairDrawing.least_height(answer, theme, width)
    border = 2 * 0.7 * theme.font_size
    figure, _ = figure_for(PairDrawing, answer, theme, width + border, least + border, dpi=100)
    assert_readable(figure)
