import dataclasses
from itertools import combinations

import pytest

from plainodds.drawings.theme import THEMES, Theme, theme_of
from plainodds.values import from_json, to_json
from tests.drawings import sight

ON_WHITE = {"as it is": (lambda colour: colour, "#ffffff")}
ON_DARK = {"through the filter": (sight.filtered, "#111111")}
SHOWN = {
    "page": ON_WHITE,
    "screen": ON_WHITE | ON_DARK,
    "screen dark": {"as it is": (lambda colour: colour, "#111111")},
}
CASES = [(name, way) for name, ways in SHOWN.items() for way in ways]

LEAST_DIFFERENCE = 12.0
"""Of series colours, CIEDE2000; 12.4 was measured, for deuteranopia through the filter."""

LEAST_GREY_DIFFERENCE = 5.0
"""Of series colours printed in grey; 5.2 was measured."""


def as_shown(name, way):
    to, paper = SHOWN[name][way]
    return lambda code: to(sight.rgb(code)), sight.rgb(paper)


@pytest.mark.parametrize(
    ("one", "other", "expected"),
    [
        ((50, 2.6772, -79.7751), (50, 0, -82.7485), 2.0425),
        ((50, 0, 0), (50, -1, 2), 2.3669),
        ((50, 2.5, 0), (73, 25, -18), 27.1492),
        ((60.2574, -34.0099, 36.2677), (60.4626, -34.1751, 39.4387), 1.2644),
        ((22.7233, 20.0904, -46.6940), (23.0331, 14.9730, -42.5619), 2.0373),
    ],
)
def test_the_colour_difference_is_the_published_one(one, other, expected):
    """Test pairs of Sharma, Wu & Dalal 2005, table 1."""
    assert sight.difference(one, other) == pytest.approx(expected, abs=5e-5)


def test_the_filter_turns_white_to_black_and_keeps_greys_grey():
    assert sight.filtered(sight.rgb("#ffffff")) == pytest.approx([0, 0, 0])
    grey = sight.filtered(sight.rgb("#404040"))
    assert grey == pytest.approx([1 - 0x40 / 255] * 3, abs=0.01)


@pytest.mark.parametrize(("name", "way"), CASES)
def test_text_stands_out_from_the_paper(name, way):
    theme, (to, paper) = theme_of(name), as_shown(name, way)
    for colour in (theme.ink, theme.faint):
        assert sight.contrast(to(colour), paper) >= 4.5


@pytest.mark.parametrize(("name", "way"), CASES)
def test_lines_and_markers_stand_out_from_the_paper(name, way):
    theme, (to, paper) = theme_of(name), as_shown(name, way)
    for colour in (theme.rule, *theme.colours):
        assert sight.contrast(to(colour), paper) >= 3.0


@pytest.mark.parametrize(("name", "way"), CASES)
@pytest.mark.parametrize("eyes", sight.SIGHT)
def test_series_can_be_told_apart_by_everybody(name, way, eyes):
    to, _ = as_shown(name, way)
    seen = [sight.seen(to(colour), eyes) for colour in theme_of(name).colours]
    smallest = min(sight.difference(a, b) for a, b in combinations(seen, 2))
    assert smallest >= LEAST_DIFFERENCE


@pytest.mark.parametrize(("name", "way"), CASES)
def test_series_can_be_told_apart_in_grey(name, way):
    to, _ = as_shown(name, way)
    printed = [sight.grey(to(colour)) for colour in theme_of(name).colours]
    smallest = min(sight.difference(a, b) for a, b in combinations(printed, 2))
    assert smallest >= LEAST_GREY_DIFFERENCE


def test_the_dark_theme_shows_what_the_filter_makes_of_the_light_one():
    for light, dark in zip(THEMES["screen"].colours, THEMES["screen dark"].colours, strict=True):
        assert sight.rgb(dark) == pytest.approx(sight.filtered(sight.rgb(light)), abs=2 / 255)


@pytest.mark.parametrize("name", THEMES)
def test_series_differ_by_marker_and_dash_besides_colour(name):
    series = [theme_of(name).series(place) for place in range(6)]
    for part in ("colour", "marker", "dash"):
        assert len({getattr(each, part) for each in series}) == 6
    assert all(each.dash for each in series)


@pytest.mark.parametrize("name", THEMES)
def test_forty_two_series_are_all_different(name):
    assert len({theme_of(name).series(place) for place in range(42)}) == 42


def test_a_theme_is_found_by_name_or_given():
    own = dataclasses.replace(theme_of("page"), font_size=20.0)
    assert theme_of(own) is own
    assert theme_of("page") is THEMES["page"]
    with pytest.raises(ValueError, match='"page", "screen", "screen dark"'):
        theme_of("sepia")


def test_a_theme_is_a_frozen_value_that_goes_to_json_and_back():
    theme = theme_of("screen")
    assert from_json(to_json(theme)) == theme
    with pytest.raises(dataclasses.FrozenInstanceError):
        theme.ink = "#000000"


def test_the_screen_is_transparent_and_the_page_is_white():
    assert theme_of("screen").background == "none"
    assert theme_of("screen dark").background == "none"
    assert theme_of("page").background == "#ffffff"
    assert isinstance(theme_of("page"), Theme)
