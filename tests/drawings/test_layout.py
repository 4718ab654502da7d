"""Nothing overlaps and nothing is cut off, whatever the answer and however wide the picture."""

from itertools import combinations

import pytest

from plainodds.drawings.draw import draw, drawing_of, figure_for, height_for
from plainodds.drawings.picture import Picture
from plainodds.drawings.theme import theme_of
from tests.drawings.conftest import texts_of


def assert_all_is_readable(figure):
    boxes, width, height = texts_of(figure)
    assert len(boxes) >= 5
    for text, box in boxes:
        inside = -1 <= box.x0 <= box.x1 <= width + 1 and -1 <= box.y0 <= box.y1 <= height + 1
        assert inside, f"{text.get_text()!r} leaves the picture"
    for (text, box), (other, its) in combinations(boxes, 2):
        across = min(box.x1, its.x1) - max(box.x0, its.x0)
        up = min(box.y1, its.y1) - max(box.y0, its.y0)
        # boxes are as high as the font, letters seldom are
        assert across < 1.5 or up < 3, f"{text.get_text()!r} meets {other.get_text()!r}"


@pytest.mark.parametrize("width", [350, 590])
def test_pictures_for_the_screen(any_answer, width):
    picture = Picture("screen", width)
    picture.show(any_answer)
    assert_all_is_readable(picture.figure)


def test_pictures_of_a_given_height(any_answer):
    picture = Picture("screen", 600, 420)
    picture.show(any_answer)
    assert_all_is_readable(picture.figure)


def test_figures_for_a_column_of_print(any_answer):
    theme = theme_of("page").scaled(7 / 9)
    drawing, width = drawing_of(any_answer), 88 / 25.4 * 72
    height = height_for(drawing, any_answer, theme, width)
    figure, _ = figure_for(drawing, any_answer, theme, width, height, dpi=150)
    assert_all_is_readable(figure)


def test_figures_of_their_own(any_answer):
    assert_all_is_readable(draw(any_answer))
