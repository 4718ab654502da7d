import io

import numpy as np
import pytest
from PIL import Image

from plainodds.drawings import Picture
from plainodds.drawings.ruler import RulerDrawing
from tests.drawings import made
from tests.drawings.conftest import words_on


def pixels(png):
    return np.asarray(Image.open(io.BytesIO(png)))


@pytest.mark.parametrize("ratio", [1, 2, 1.5])
def test_the_png_has_the_size_asked_for_in_css_pixels_times_the_ratio(ratio):
    picture = Picture("screen", 600, 400)
    picture.show(made.curve_by_material())
    assert pixels(picture.png(ratio)).shape == (400 * ratio, 600 * ratio, 4)


def test_the_png_is_for_two_device_pixels_unless_asked_otherwise():
    picture = Picture("screen", 300, 200)
    picture.show(made.curve_alone())
    assert pixels(picture.png()).shape[:2] == (400, 600)


def test_an_answer_of_the_same_structure_is_shown_on_the_same_figure():
    picture = Picture("screen", 600, 400)
    picture.show(made.curve_by_material())
    figure, before = picture.figure, picture.png()
    picture.show(made.curve_by_material(shift=0.5))
    assert picture.figure is figure
    assert picture.rebuilt == 1
    assert picture.png() != before


def test_an_answer_of_another_structure_is_built_anew():
    picture = Picture("screen", 600, 400)
    structures = set()
    for answer in (
        made.curve_by_material(),
        made.curve_alone(),
        made.curve_by_material("odds"),
        made.curve_of_levels(),
        made.odds_answer(),
        made.profile_answer(),
        made.profile_answer(compared=False),
    ):
        picture.show(answer)
        structures.add(picture.structure)
    assert picture.rebuilt == len(structures) == 7


@pytest.mark.parametrize(
    ("first", "second"),
    [
        (made.odds_answer(), made.odds_answer(made.odds_rows(shift=-0.3))),
        (made.odds_with_giants(), made.odds_answer()),
        (made.odds_answer(), made.odds_without_intervals()),
        (made.curve_by_material(), made.curve_by_material(shift=2.0)),
        (made.curve_by_material(), made.curve_by_material("slope")),
        (made.curve_by_material(), made.curve_by_material(intervals=False)),
        (made.curve_with_giant_band(), made.curve_by_material()),
        (made.curve_nasty(), made.curve_by_material()),
        (made.curve_of_levels(), made.curve_of_levels(intervals=False)),
        (made.profile_answer(), made.profile_answer(eta=-4.0, verdict="rare")),
        (made.profile_answer(se=9.0), made.profile_answer()),
        (made.profile_answer(eta=9.0), made.profile_answer(se=None)),
    ],
)
def test_a_picture_that_was_moved_is_the_picture_built_for_the_answer(first, second):
    moved, built = Picture("screen", 600, 420), Picture("screen", 600, 420)
    moved.show(first)
    moved.png(1)
    moved.show(second)
    built.show(second)
    assert (pixels(moved.png(1)) == pixels(built.png(1))).all()


def test_a_profile_is_shown_as_its_ruler_alone():
    picture = Picture("screen", 600)
    picture.show(made.profile_answer())
    assert picture.structure[0] is RulerDrawing
    words = words_on(picture.figure)
    assert "this profile" in words
    assert "Soil corrosivity = high" not in words


def test_without_a_height_a_picture_is_as_high_as_its_answer_needs():
    picture = Picture("screen", 600)
    heights = []
    for answer in (made.profile_answer(compared=False), made.odds_answer(), made.odds_of_models()):
        picture.show(answer)
        heights.append(picture.height_px)
        assert pixels(picture.png(1)).shape[:2] == (picture.height_px, 600)
    assert heights == sorted(set(heights))


def test_an_empty_picture_says_so():
    with pytest.raises(ValueError, match="show an answer first"):
        Picture().png()


def test_the_screen_picture_is_transparent_and_the_page_white():
    corners = {}
    for theme in ("screen", "page"):
        picture = Picture(theme, 300, 200)
        picture.show(made.curve_alone())
        corners[theme] = tuple(pixels(picture.png(1))[0, 0])
    assert corners["screen"][3] == 0
    assert corners["page"] == (255, 255, 255, 255)
